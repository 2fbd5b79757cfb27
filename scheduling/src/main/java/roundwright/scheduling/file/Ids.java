package roundwright.scheduling.file;

import java.util.LinkedHashMap;
import java.util.Map;
import java.util.Set;
import java.util.regex.Pattern;

/** The ids of one kind of thing that a file defines, and where. */
final class Ids {
  static final Pattern PATTERN = Pattern.compile("[a-z0-9-]{1,40}");
  static final String SHAPE = "use 1 to 40 of the characters a-z, 0-9 and -";

  private final String kind;
  private final Map<String, String> places = new LinkedHashMap<>();

  /**
   * @param kind as a sentence names it, such as {@code hall}
   */
  Ids(String kind) {
    this.kind = kind;
  }

  boolean defines(String id) {
    return places.containsKey(id);
  }

  Set<String> all() {
    return places.keySet();
  }

  /** Takes the id that an object gives itself; empty where it gives none. */
  String define(Fields fields) {
    String id = fields.id("id");
    if (id.isEmpty()) {
      fields.raw("id").ifPresent(raw -> places.putIfAbsent(raw, fields.path()));
    } else {
      fields.owner(id);
      String before = places.putIfAbsent(id, fields.path());
      if (before != null) {
        fields.problem("id", Problems.quoted(id), "it is the id of " + before + " too: change one");
      }
    }
    return id;
  }

  /** Notes a problem where an id that is referred to is not defined. */
  void refer(Fields fields, String place, String id) {
    if (!id.isEmpty() && !defines(id)) {
      fields.problem(
          place,
          Problems.quoted(id),
          "no " + kind + " has this id" + Nearest.hint(id, places.keySet()));
    }
  }
}
