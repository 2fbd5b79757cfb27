package roundwright.scheduling.file;

import com.fasterxml.jackson.databind.JsonNode;
import com.fasterxml.jackson.databind.node.ArrayNode;
import com.fasterxml.jackson.databind.node.ObjectNode;
import java.nio.charset.StandardCharsets;
import java.util.LinkedHashMap;
import java.util.List;
import java.util.Map;
import java.util.Optional;

/**
 * The keys of a file that begin with {@code x-}: ignored by everything here and kept for whoever
 * put them there. Each stays with the thing it stood in, which is found again by its id where it
 * has one, else by its place in its list; it goes when that thing goes.
 */
public final class Extras {
  /** No such keys. */
  public static final Extras NONE = new Extras(Map.of());

  /** Objects that are left out when nothing in them differs from the default. */
  private static final List<String> MADE_AGAIN = List.of("pins", "rules", "weights");

  private final Map<String, Map<String, JsonNode>> byPlace;

  private Extras(Map<String, Map<String, JsonNode>> byPlace) {
    this.byPlace = byPlace;
  }

  static Extras in(JsonNode root) {
    Map<String, Map<String, JsonNode>> byPlace = new LinkedHashMap<>();
    collect(root, "", byPlace);
    return byPlace.isEmpty() ? NONE : new Extras(byPlace);
  }

  public boolean isEmpty() {
    return byPlace.isEmpty();
  }

  /** All keys as one JSON text, for whoever keeps an event elsewhere than in a file. */
  public String json() {
    ObjectNode all = Fields.newObject();
    byPlace.forEach(
        (place, keys) -> {
          ObjectNode there = all.putObject(place);
          keys.forEach(there::set);
        });
    return all.toString();
  }

  /**
   * What {@link #json()} gave.
   *
   * @throws FileProblems where the text is none of it
   */
  public static Extras of(String json) throws FileProblems {
    Problems problems = new Problems();
    JsonNode all = JsonText.tree(json.getBytes(StandardCharsets.UTF_8), problems);
    problems.throwIfAny();
    Map<String, Map<String, JsonNode>> byPlace = new LinkedHashMap<>();
    for (Map.Entry<String, JsonNode> place : all.properties()) {
      Map<String, JsonNode> keys = new LinkedHashMap<>();
      place.getValue().properties().forEach(key -> keys.put(key.getKey(), key.getValue()));
      byPlace.put(place.getKey(), keys);
    }
    return byPlace.isEmpty() ? NONE : new Extras(byPlace);
  }

  /** A text, number or flag beside a person, as text; empty where there is none. */
  public Optional<String> ofPerson(String person, String key) {
    return plain("/people/#" + person, key);
  }

  /** The same beside a venue. */
  public Optional<String> ofVenue(String venue, String key) {
    return plain("/venues/#" + venue, key);
  }

  private Optional<String> plain(String place, String key) {
    JsonNode kept = byPlace.getOrDefault(place, Map.of()).get(key);
    return Optional.ofNullable(kept).filter(JsonNode::isValueNode).map(JsonNode::asText);
  }

  private static void collect(
      JsonNode node, String place, Map<String, Map<String, JsonNode>> byPlace) {
    if (node instanceof ArrayNode array) {
      for (int i = 0; i < array.size(); i++) {
        collect(array.get(i), element(place, array.get(i), i), byPlace);
      }
    } else if (node instanceof ObjectNode object) {
      for (Map.Entry<String, JsonNode> field : object.properties()) {
        if (Fields.isOwn(field.getKey())) {
          byPlace
              .computeIfAbsent(place, unused -> new LinkedHashMap<>())
              .put(field.getKey(), field.getValue());
        } else {
          collect(field.getValue(), place + "/" + field.getKey(), byPlace);
        }
      }
    }
  }

  private static String element(String place, JsonNode element, int index) {
    JsonNode id = element.isObject() ? element.get("id") : null;
    return place + "/" + (id == null ? String.valueOf(index) : "#" + id.asText());
  }

  /** Puts the keys back where they stood. */
  void addTo(ObjectNode root) {
    if (!isEmpty()) {
      add(root, "");
    }
  }

  private void add(JsonNode node, String place) {
    if (node instanceof ArrayNode array) {
      for (int i = 0; i < array.size(); i++) {
        add(array.get(i), element(place, array.get(i), i));
      }
    } else if (node instanceof ObjectNode object) {
      for (String name : MADE_AGAIN) {
        if (!object.has(name) && holdsAnythingUnder(place + "/" + name)) {
          object.putObject(name);
        }
      }
      for (Map.Entry<String, JsonNode> field : object.properties()) {
        add(field.getValue(), place + "/" + field.getKey());
      }
      byPlace.getOrDefault(place, Map.of()).forEach(object::set);
    }
  }

  private boolean holdsAnythingUnder(String place) {
    return byPlace.keySet().stream()
        .anyMatch(kept -> kept.equals(place) || kept.startsWith(place + "/weights"));
  }

  @Override
  public boolean equals(Object other) {
    return other instanceof Extras extras && byPlace.equals(extras.byPlace);
  }

  @Override
  public int hashCode() {
    return byPlace.hashCode();
  }

  @Override
  public String toString() {
    return "Extras" + byPlace;
  }
}
