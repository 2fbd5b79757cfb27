package roundwright.server.event;

import com.fasterxml.jackson.databind.JsonNode;
import com.fasterxml.jackson.databind.node.ArrayNode;
import com.fasterxml.jackson.databind.node.BooleanNode;
import com.fasterxml.jackson.databind.node.DecimalNode;
import com.fasterxml.jackson.databind.node.JsonNodeFactory;
import com.fasterxml.jackson.databind.node.ObjectNode;
import com.fasterxml.jackson.databind.node.TextNode;
import java.math.BigDecimal;
import java.util.ArrayList;
import java.util.List;
import java.util.Optional;
import java.util.regex.Pattern;

/**
 * One of the tables of which an event's CSVs consist, and where its cells stand in the event file.
 *
 * @param file name of the file
 * @param owner heading of the column that names the thing a row belongs to, where it belongs to one
 * @param columns the others, in the order in which they are written
 */
record CsvTable(String file, Optional<String> owner, List<Column> columns) {
  private static final Pattern NUMBER = Pattern.compile("-?(0|[1-9][0-9]*)(\\.[0-9]+)?");
  private static final String NO_WORDS = "-";
  private static final String UNSAFE_STARTS = "=+-@\t\r";

  CsvTable {
    columns = List.copyOf(columns);
  }

  static CsvTable of(String file, Column... columns) {
    return new CsvTable(file, Optional.empty(), List.of(columns));
  }

  static CsvTable under(String owner, String file, Column... columns) {
    return new CsvTable(file, Optional.of(owner), List.of(columns));
  }

  /** Every heading, the owner's first. */
  List<String> headings() {
    List<String> headings = new ArrayList<>();
    owner.ifPresent(headings::add);
    columns.forEach(column -> headings.add(column.heading()));
    return headings;
  }

  Optional<Column> column(String heading) {
    return columns.stream().filter(column -> column.heading().equals(heading)).findFirst();
  }

  /** What a cell holds. */
  enum Kind {
    TEXT,
    /** A figure; anything else is passed on as text for the event file's reader to refuse. */
    NUMBER,
    /** {@code yes} or {@code no}. */
    FLAG,
    /** Words with blanks between them: a list; {@link #NO_WORDS} is a list of none. */
    WORDS,
    /** One of several cells that make up a list together. */
    ITEM
  }

  /**
   * One column.
   *
   * @param heading as the first line of the file has it
   * @param path of the cell within the row's object, keys joined by dots
   */
  record Column(String heading, String path, Kind kind) {
    static Column text(String heading, String path) {
      return new Column(heading, path, Kind.TEXT);
    }

    static Column number(String heading, String path) {
      return new Column(heading, path, Kind.NUMBER);
    }

    static Column flag(String heading, String path) {
      return new Column(heading, path, Kind.FLAG);
    }

    static Column words(String heading, String path) {
      return new Column(heading, path, Kind.WORDS);
    }

    static Column item(String heading, String path) {
      return new Column(heading, path, Kind.ITEM);
    }

    /** Puts a cell, which is not empty, where it belongs. */
    void put(ObjectNode row, String cell) {
      String[] keys = path.split("\\.", -1);
      ObjectNode holder = row;
      for (int i = 0; i < keys.length - 1; i++) {
        holder = holder.withObjectProperty(keys[i]);
      }
      String last = keys[keys.length - 1];
      if (kind == Kind.ITEM) {
        holder.withArrayProperty(last).add(cell);
      } else {
        holder.set(last, node(cell));
      }
    }

    private JsonNode node(String cell) {
      return switch (kind) {
        case NUMBER ->
            NUMBER.matcher(cell).matches()
                ? DecimalNode.valueOf(new BigDecimal(cell))
                : TextNode.valueOf(cell);
        case FLAG ->
            cell.equals("yes") || cell.equals("no")
                ? BooleanNode.valueOf(cell.equals("yes"))
                : TextNode.valueOf(cell);
        case WORDS -> {
          ArrayNode words = JsonNodeFactory.instance.arrayNode();
          if (cell.equals(NO_WORDS)) {
            yield words;
          }
          for (String word : cell.strip().split("\\s+", -1)) {
            words.add(word);
          }
          yield words;
        }
        case TEXT, ITEM -> TextNode.valueOf(cell);
      };
    }

    /** The cell of a row's object; empty where the object has nothing there. */
    String cell(JsonNode row, int index) {
      JsonNode node = row;
      for (String step : path.split("\\.", -1)) {
        node = node.path(step);
      }
      if (node.isMissingNode() || node.isNull()) {
        return "";
      }
      return switch (kind) {
        case FLAG -> node.asBoolean() ? "yes" : "no";
        case WORDS -> {
          List<String> words = new ArrayList<>();
          node.forEach(word -> words.add(word.asText()));
          yield words.isEmpty() ? NO_WORDS : String.join(" ", words);
        }
        case ITEM -> node.path(index).asText();
        case NUMBER -> node.isNumber() ? node.decimalValue().toPlainString() : node.asText();
        case TEXT -> node.asText();
      };
    }
  }

  /** A cell that no spreadsheet takes for a formula. */
  static String guarded(String cell) {
    return startsUnsafe(cell) && !NUMBER.matcher(cell).matches() ? "'" + cell : cell;
  }

  /** Undoes {@link #guarded}. */
  static String unguarded(String cell) {
    return cell.startsWith("'") && startsUnsafe(cell.substring(1)) ? cell.substring(1) : cell;
  }

  private static boolean startsUnsafe(String cell) {
    return !cell.isEmpty() && UNSAFE_STARTS.indexOf(cell.charAt(0)) >= 0;
  }
}
