package roundwright.scheduling.file;

import com.fasterxml.jackson.databind.JsonNode;
import com.fasterxml.jackson.databind.node.TextNode;
import java.util.ArrayList;
import java.util.List;
import roundwright.scheduling.file.FileProblems.Problem;

/** The problems of one file while it is read. */
final class Problems {
  private static final int LONGEST_VALUE = 60;

  private final List<Problem> found = new ArrayList<>();

  void add(String path, String id, String value, String remedy) {
    found.add(new Problem(path, id, value, remedy));
  }

  void add(String path, String id, JsonNode value, String remedy) {
    add(path, id, shown(value), remedy);
  }

  void throwIfAny() throws FileProblems {
    if (!found.isEmpty()) {
      throw new FileProblems(found);
    }
  }

  /** A value as a problem shows it: JSON on one line, cut where it is long. */
  static String shown(JsonNode value) {
    String text = value.toString();
    return text.length() <= LONGEST_VALUE ? text : text.substring(0, LONGEST_VALUE) + "…";
  }

  static String quoted(String text) {
    return shown(TextNode.valueOf(text));
  }
}
