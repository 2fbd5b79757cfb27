package roundwright.scheduling.file;

import com.fasterxml.jackson.databind.JsonNode;
import com.fasterxml.jackson.databind.node.ObjectNode;
import com.fasterxml.jackson.databind.node.TextNode;
import java.util.Iterator;
import java.util.Map;

/**
 * Lays a tree out as text for people: what fits a line stands on one line, lists of plain values
 * fill their lines. The same tree gives the same characters everywhere.
 */
final class Layout {
  private static final int WIDTH = 100;
  private static final int STEP = 2;

  private final StringBuilder out = new StringBuilder();

  private Layout() {}

  static String of(JsonNode root) {
    Layout layout = new Layout();
    layout.put(root, 0, 0);
    return layout.out.append('\n').toString();
  }

  /**
   * @param indent of the line that the value begins on
   * @param used characters of that line already taken, indent included
   */
  private void put(JsonNode node, int indent, int used) {
    StringBuilder flat = new StringBuilder();
    boolean root = indent == 0 && used == 0;
    if (!node.isContainerNode()
        || node.isEmpty()
        || (!root && flat(node, flat, WIDTH - used - 1))) {
      flat.setLength(0);
      flat(node, flat, Integer.MAX_VALUE);
      out.append(flat);
    } else if (node.isObject()) {
      putObject((ObjectNode) node, indent);
    } else if (isPlain(node)) {
      putFilled(node, indent + STEP);
    } else {
      putArray(node, indent);
    }
  }

  private void putObject(ObjectNode node, int indent) {
    out.append('{');
    String between = "\n";
    for (Map.Entry<String, JsonNode> field : node.properties()) {
      String key = TextNode.valueOf(field.getKey()) + ": ";
      out.append(between).append(" ".repeat(indent + STEP)).append(key);
      put(field.getValue(), indent + STEP, indent + STEP + key.length());
      between = ",\n";
    }
    out.append('\n').append(" ".repeat(indent)).append('}');
  }

  private void putArray(JsonNode node, int indent) {
    out.append('[');
    String between = "\n";
    for (JsonNode element : node) {
      out.append(between).append(" ".repeat(indent + STEP));
      put(element, indent + STEP, indent + STEP);
      between = ",\n";
    }
    out.append('\n').append(" ".repeat(indent)).append(']');
  }

  private void putFilled(JsonNode node, int indent) {
    out.append('[');
    int used = WIDTH;
    Iterator<JsonNode> elements = node.iterator();
    while (elements.hasNext()) {
      String text = elements.next() + (elements.hasNext() ? "," : "");
      if (used + 1 + text.length() > WIDTH) {
        out.append('\n').append(" ".repeat(indent)).append(text);
        used = indent + text.length();
      } else {
        out.append(' ').append(text);
        used += 1 + text.length();
      }
    }
    out.append('\n').append(" ".repeat(indent - STEP)).append(']');
  }

  private static boolean isPlain(JsonNode array) {
    for (JsonNode element : array) {
      if (element.isContainerNode()) {
        return false;
      }
    }
    return true;
  }

  /** Appends a value on one line; false as soon as it is longer than the room there is. */
  private static boolean flat(JsonNode node, StringBuilder flat, int room) {
    if (node.isObject()) {
      flat.append('{');
      String between = "";
      for (Map.Entry<String, JsonNode> field : node.properties()) {
        flat.append(between).append(TextNode.valueOf(field.getKey())).append(": ");
        between = ", ";
        if (!flat(field.getValue(), flat, room)) {
          return false;
        }
      }
      flat.append('}');
    } else if (node.isArray()) {
      flat.append('[');
      String between = "";
      for (JsonNode element : node) {
        flat.append(between);
        between = ", ";
        if (!flat(element, flat, room)) {
          return false;
        }
      }
      flat.append(']');
    } else {
      flat.append(node);
    }
    return flat.length() <= room;
  }
}
