package roundwright.scheduling.file;

import com.fasterxml.jackson.databind.JsonNode;
import com.fasterxml.jackson.databind.node.ObjectNode;
import java.math.BigDecimal;
import java.time.DateTimeException;
import java.time.Instant;
import java.time.LocalDateTime;
import java.time.LocalTime;
import java.time.ZoneId;
import java.util.ArrayList;
import java.util.Arrays;
import java.util.HashSet;
import java.util.Iterator;
import java.util.LinkedHashMap;
import java.util.LinkedHashSet;
import java.util.List;
import java.util.Locale;
import java.util.Map;
import java.util.Optional;
import java.util.OptionalInt;
import java.util.Set;
import java.util.regex.Pattern;
import roundwright.scheduling.model.Window;

/**
 * One object of a file while it is read: hands out its values, notes what is wrong with them, and
 * remembers which keys were asked for, so that {@link #done} can complain of the others. A value
 * that is missing or wrong comes back empty, so that reading goes on and finds the next problem.
 */
final class Fields {
  private static final Pattern PLAIN_KEY = Pattern.compile("[A-Za-z0-9_-]{1,40}");
  private static final Pattern LOCAL_TIME =
      Pattern.compile("\\d{4}-\\d{2}-\\d{2}T\\d{2}:\\d{2}(:00)?");
  private static final Pattern TIME_OF_DAY = Pattern.compile("\\d{2}:\\d{2}(:00)?");
  private static final int MOST_DECIMALS = 30;
  private static final BigDecimal TOO_LARGE = new BigDecimal("1e15");

  private final Problems problems;
  private final String path;
  private final JsonNode node;
  private final boolean broken;
  private final Set<String> asked = new LinkedHashSet<>();
  private final Set<String> wrong = new HashSet<>();
  private String owner;

  Fields(Problems problems, String path, String owner, JsonNode node) {
    this.problems = problems;
    this.path = path;
    this.owner = owner;
    this.broken = !node.isObject();
    this.node = broken ? JsonText.NODES.objectNode() : node;
    if (broken) {
      problems.add(path.isEmpty() ? "the file" : path, owner, node, "write an object: {…}");
    }
  }

  static String join(String path, String key) {
    String shown = PLAIN_KEY.matcher(key).matches() ? key : "[" + Problems.quoted(key) + "]";
    return path.isEmpty() ? shown : shown.startsWith("[") ? path + shown : path + "." + shown;
  }

  static boolean isOwn(String key) {
    return key.startsWith("x-");
  }

  /** The word of a constant in files: lower case, with hyphens. */
  static String word(Enum<?> constant) {
    return constant.name().toLowerCase(Locale.ROOT).replace('_', '-');
  }

  String path() {
    return path;
  }

  /** Names the thing being read in every further problem. */
  void owner(String id) {
    owner = id;
  }

  void problem(String key, String value, String remedy) {
    wrong.add(key);
    problems.add(key.isEmpty() ? path : join(key), owner, value, remedy);
  }

  private void problem(String key, JsonNode value, String remedy) {
    problem(key, Problems.shown(value), remedy);
  }

  private String join(String key) {
    int bracket = key.indexOf('[');
    return bracket > 0
        ? join(path, key.substring(0, bracket)) + key.substring(bracket)
        : join(path, key);
  }

  /** Whether something was found wrong with a key so far. */
  boolean isWrong(String key) {
    return wrong.contains(key);
  }

  /** The text under a key, whatever is wrong with it, so that references to it can be followed. */
  Optional<String> raw(String key) {
    return Optional.ofNullable(node.get(key)).filter(JsonNode::isTextual).map(JsonNode::textValue);
  }

  boolean has(String key) {
    return node.has(key);
  }

  boolean isEmptyList(String key) {
    return isList(key) && length(key) == 0;
  }

  boolean isList(String key) {
    return node.has(key) && node.get(key).isArray();
  }

  int length(String key) {
    return node.get(key).size();
  }

  /** The value of a key as a problem shows it. */
  String shown(String key) {
    return Problems.shown(node.get(key));
  }

  /** Notes that a key is wanted and absent; says nothing where the object itself is unreadable. */
  void missing(String key, String remedy) {
    if (!broken && !node.has(key)) {
      problem(key, "missing", remedy);
    }
  }

  /** Complains of every key that nobody asked for and that is not the file's owner's own. */
  void done() {
    for (Map.Entry<String, JsonNode> field : node.properties()) {
      String key = field.getKey();
      if (!asked.contains(key) && !isOwn(key)) {
        problem(
            key,
            field.getValue(),
            "no such key is known here"
                + Nearest.hint(key, asked)
                + " (a key of your own begins with x-)");
      }
    }
  }

  private Optional<JsonNode> value(String key) {
    asked.add(key);
    return Optional.ofNullable(node.get(key));
  }

  /** Whether the key stands there as null; for the few places where null may stand. */
  boolean isNull(String key) {
    return value(key).filter(JsonNode::isNull).isPresent();
  }

  Optional<String> text(String key) {
    Optional<JsonNode> value = value(key);
    if (value.isPresent() && !isGoodText(value.get())) {
      problem(key, value.get(), "write text in quotes, at least one visible character");
      return Optional.empty();
    }
    return value.map(JsonNode::textValue);
  }

  private static boolean isGoodText(JsonNode value) {
    if (!value.isTextual() || value.textValue().isBlank()) {
      return false;
    }
    String text = value.textValue();
    return text.codePoints().noneMatch(point -> point >= 0xd800 && point <= 0xdfff);
  }

  String requiredText(String key) {
    missing(key, "write text in quotes");
    return text(key).orElse("");
  }

  /** An id that has the shape of one, or empty. */
  String id(String key) {
    missing(key, Ids.SHAPE);
    return optionalId(key).orElse("");
  }

  Optional<String> optionalId(String key) {
    Optional<JsonNode> value = value(key);
    return value.flatMap(found -> idIn(key, found));
  }

  private Optional<String> idIn(String place, JsonNode value) {
    if (value.isTextual() && Ids.PATTERN.matcher(value.textValue()).matches()) {
      return Optional.of(value.textValue());
    }
    problem(place, value, "it is no id: " + Ids.SHAPE);
    return Optional.empty();
  }

  /** An id of something that the file defines elsewhere; empty where it is missing or no id. */
  String reference(String key, Ids ids) {
    String id = id(key);
    ids.refer(this, key, id);
    return id;
  }

  /** Ids of things defined elsewhere, each at most once. */
  Optional<List<String>> references(String key, Ids ids) {
    Optional<List<String>> found = idList(key, true);
    found.ifPresent(
        list -> {
          for (int i = 0; i < list.size(); i++) {
            ids.refer(this, key + "[" + i + "]", list.get(i));
          }
        });
    return found.map(list -> list.stream().filter(id -> !id.isEmpty()).distinct().toList());
  }

  /** Ids in their order; an empty string stands where one is unreadable. */
  Optional<List<String>> idList(String key, boolean eachOnce) {
    return elements(key)
        .map(
            list -> {
              List<String> ids = new ArrayList<>();
              for (int i = 0; i < list.size(); i++) {
                String place = key + "[" + i + "]";
                String id = idIn(place, list.get(i)).orElse("");
                if (eachOnce && !id.isEmpty() && ids.contains(id)) {
                  problem(place, Problems.quoted(id), "it is in this list already: take one out");
                }
                ids.add(id);
              }
              return ids;
            });
  }

  List<String> words(String key) {
    List<String> words = new ArrayList<>();
    List<JsonNode> list = elements(key).orElse(List.of());
    for (int i = 0; i < list.size(); i++) {
      if (isGoodText(list.get(i))) {
        words.add(list.get(i).textValue());
      } else {
        problem(key + "[" + i + "]", list.get(i), "write a word in quotes");
      }
    }
    return words;
  }

  private Optional<List<JsonNode>> elements(String key) {
    Optional<JsonNode> value = value(key);
    if (value.isPresent() && !value.get().isArray()) {
      problem(key, value.get(), "write a list: […]");
      return Optional.empty();
    }
    return value.map(
        array -> {
          List<JsonNode> list = new ArrayList<>();
          array.forEach(list::add);
          return list;
        });
  }

  /** The objects of a list; empty where the key is left out. */
  Optional<List<Fields>> objects(String key) {
    return elements(key)
        .map(
            list -> {
              List<Fields> objects = new ArrayList<>();
              for (int i = 0; i < list.size(); i++) {
                String place = join(path, key) + "[" + i + "]";
                objects.add(new Fields(problems, place, owner, list.get(i)));
              }
              return objects;
            });
  }

  List<Fields> requiredObjects(String key) {
    missing(key, "write a list of objects: [{…}]");
    return objects(key).orElse(List.of());
  }

  Optional<Fields> object(String key) {
    return value(key).map(found -> new Fields(problems, join(path, key), owner, found));
  }

  /** The keys and values of an object of numbers, such as weights; the owner's own left out. */
  Map<String, BigDecimal> numbers(Range range) {
    Map<String, BigDecimal> numbers = new LinkedHashMap<>();
    Iterator<String> keys = node.fieldNames();
    while (keys.hasNext()) {
      String key = keys.next();
      if (!isOwn(key)) {
        asked.add(key);
        numbers.put(key, number(key, range).orElse(BigDecimal.ZERO));
      }
    }
    return numbers;
  }

  Optional<BigDecimal> number(String key, Range range) {
    Optional<JsonNode> value = value(key);
    if (value.isEmpty()) {
      return Optional.empty();
    }
    if (!value.get().isNumber()) {
      problem(key, value.get(), "write " + range.words("a number"));
      return Optional.empty();
    }
    BigDecimal number = value.get().decimalValue();
    if (!range.holds(number) || number.abs().compareTo(TOO_LARGE) >= 0) {
      problem(key, value.get(), "write " + range.words("a number"));
      return Optional.empty();
    }
    if (number.scale() > MOST_DECIMALS + 1000 || plain(number).scale() > MOST_DECIMALS) {
      problem(key, value.get(), "write at most " + MOST_DECIMALS + " decimals");
      return Optional.empty();
    }
    return Optional.of(plain(number));
  }

  BigDecimal number(String key, Range range, BigDecimal otherwise) {
    return number(key, range).orElse(otherwise);
  }

  BigDecimal requiredNumber(String key, Range range) {
    missing(key, "write " + range.words("a number"));
    return number(key, range).orElse(BigDecimal.ONE);
  }

  OptionalInt whole(String key, Range range) {
    Optional<JsonNode> value = value(key);
    if (value.isEmpty()) {
      return OptionalInt.empty();
    }
    String remedy = "write " + range.words("a whole number");
    if (!value.get().isNumber()) {
      problem(key, value.get(), remedy);
      return OptionalInt.empty();
    }
    BigDecimal number = value.get().decimalValue();
    if (!range.holds(number) || number.scale() > 1000 || plain(number).scale() > 0) {
      problem(key, value.get(), remedy);
      return OptionalInt.empty();
    }
    return OptionalInt.of(number.intValueExact());
  }

  int whole(String key, Range range, int otherwise) {
    return whole(key, range).orElse(otherwise);
  }

  int requiredWhole(String key, Range range) {
    missing(key, "write " + range.words("a whole number"));
    return whole(key, range).orElse(1);
  }

  /** The same number without needless zeros, so that equal numbers are equal records. */
  static BigDecimal plain(BigDecimal number) {
    if (number.signum() == 0) {
      return BigDecimal.ZERO;
    }
    BigDecimal stripped = number.stripTrailingZeros();
    return stripped.scale() < 0 ? stripped.setScale(0) : stripped;
  }

  boolean flag(String key) {
    Optional<JsonNode> value = value(key);
    if (value.isPresent() && !value.get().isBoolean()) {
      problem(key, value.get(), "write true or false");
    }
    return value.filter(JsonNode::isBoolean).map(JsonNode::booleanValue).orElse(false);
  }

  <E extends Enum<E>> Optional<E> word(String key, E[] words) {
    Optional<JsonNode> value = value(key);
    if (value.isEmpty()) {
      return Optional.empty();
    }
    for (E word : words) {
      if (value.get().isTextual() && word(word).equals(value.get().textValue())) {
        return Optional.of(word);
      }
    }
    problem(key, value.get(), "write " + oneOf(words));
    return Optional.empty();
  }

  <E extends Enum<E>> E requiredWord(String key, E[] words) {
    missing(key, "write " + oneOf(words));
    return word(key, words).orElse(words[0]);
  }

  private static String oneOf(Enum<?>[] words) {
    return String.join(" or ", Arrays.stream(words).map(Fields::word).toList());
  }

  Optional<ZoneId> zone(String key) {
    Optional<JsonNode> value = value(key);
    if (value.isEmpty()) {
      return Optional.empty();
    }
    Set<String> known = ZoneId.getAvailableZoneIds();
    if (value.get().isTextual() && known.contains(value.get().textValue())) {
      return Optional.of(ZoneId.of(value.get().textValue()));
    }
    String hint = value.get().isTextual() ? Nearest.hint(value.get().textValue(), known) : "";
    problem(key, value.get(), "write an IANA zone such as Europe/Lisbon" + hint);
    return Optional.empty();
  }

  Optional<LocalTime> timeOfDay(String key) {
    missing(key, "write a time of day such as 11:30");
    Optional<JsonNode> value = value(key);
    if (value.isEmpty()) {
      return Optional.empty();
    }
    try {
      if (value.get().isTextual() && TIME_OF_DAY.matcher(value.get().textValue()).matches()) {
        return Optional.of(LocalTime.parse(value.get().textValue()));
      }
    } catch (DateTimeException noTime) {
      // told below, in the same words as a wrong shape
    }
    problem(key, value.get(), "write a time of day such as 11:30");
    return Optional.empty();
  }

  /** A local date-time, not yet in any zone. */
  Optional<LocalDateTime> local(String key) {
    Optional<JsonNode> value = value(key);
    if (value.isEmpty()) {
      return Optional.empty();
    }
    try {
      if (value.get().isTextual() && LOCAL_TIME.matcher(value.get().textValue()).matches()) {
        return Optional.of(LocalDateTime.parse(value.get().textValue()));
      }
    } catch (DateTimeException noTime) {
      // told below, in the same words as a wrong shape
    }
    problem(
        key,
        value.get(),
        "write a local date and time in whole minutes, without offset, such as 2027-05-08T09:00");
    return Optional.empty();
  }

  Optional<Instant> instant(String key, ZoneId zone) {
    return local(key).flatMap(local -> instant(key, local, zone));
  }

  /** The instant of a local time, unless a clock change skips or repeats that time. */
  Optional<Instant> instant(String key, LocalDateTime local, ZoneId zone) {
    Optional<String> remedy = ClockChange.remedy(local, zone);
    if (remedy.isPresent()) {
      problem(key, Problems.quoted(local.toString()), remedy.get());
      return Optional.empty();
    }
    return Optional.of(local.atZone(zone).toInstant());
  }

  Optional<Instant> requiredInstant(String key, ZoneId zone) {
    missing(key, "write a local date and time such as 2027-05-08T09:00");
    return instant(key, zone);
  }

  /** The stretch between this object's {@code from} and {@code to}. */
  Optional<Window> window(ZoneId zone) {
    Optional<Instant> from = requiredInstant("from", zone);
    Optional<Instant> to = requiredInstant("to", zone);
    if (from.isEmpty() || to.isEmpty()) {
      return Optional.empty();
    }
    if (!from.get().isBefore(to.get())) {
      problem("to", node.get("to"), "it must be later than from, " + node.get("from"));
      return Optional.empty();
    }
    return Optional.of(new Window(from.get(), to.get()));
  }

  Optional<List<Window>> windows(String key, ZoneId zone) {
    return objects(key)
        .map(
            list -> {
              List<Window> windows = new ArrayList<>();
              for (Fields fields : list) {
                fields.window(zone).ifPresent(windows::add);
                fields.done();
              }
              return windows;
            });
  }

  static ObjectNode newObject() {
    return JsonText.NODES.objectNode();
  }
}
