package roundwright.server.event;

import com.fasterxml.jackson.core.JsonProcessingException;
import com.fasterxml.jackson.databind.DeserializationFeature;
import com.fasterxml.jackson.databind.JsonNode;
import com.fasterxml.jackson.databind.json.JsonMapper;
import com.fasterxml.jackson.databind.node.ArrayNode;
import com.fasterxml.jackson.databind.node.ObjectNode;
import de.siegmar.fastcsv.reader.CsvParseException;
import de.siegmar.fastcsv.reader.CsvReader;
import de.siegmar.fastcsv.reader.CsvRecord;
import de.siegmar.fastcsv.writer.CsvWriter;
import de.siegmar.fastcsv.writer.LineDelimiter;
import java.io.IOException;
import java.io.StringWriter;
import java.io.UncheckedIOException;
import java.util.ArrayList;
import java.util.LinkedHashMap;
import java.util.List;
import java.util.Map;
import java.util.Optional;
import java.util.function.BiConsumer;
import roundwright.scheduling.file.EventFile;
import roundwright.scheduling.file.FileProblems;
import roundwright.server.event.CsvProblems.Problem;
import roundwright.server.event.CsvTable.Column;

/**
 * One conversion between tables and the event file's tree. While the tree grows it notes from which
 * line each of its objects came, so that a complaint about the tree can name the cell.
 */
final class EventTables {
  /** Says whether windows of presence are given, which no window at all would leave open. */
  static final String PRESENCE = "presence";

  private static final String ALWAYS = "always";
  private static final String WINDOWS = "windows";
  private static final JsonMapper JSON =
      JsonMapper.builder().enable(DeserializationFeature.USE_BIG_DECIMAL_FOR_FLOATS).build();

  private final Map<String, Line> lineByPath = new LinkedHashMap<>();
  private final Map<String, Owner> owners = new LinkedHashMap<>();
  private final List<Problem> problems = new ArrayList<>();

  private record Line(CsvTable table, long number) {
    String place() {
      return table.file() + " line " + number;
    }
  }

  private record Owner(ObjectNode node, String path) {}

  private record Row(ObjectNode node, String owner, Line line) {}

  EventFile read(Map<String, String> texts) throws CsvProblems {
    ObjectNode root = JSON.createObjectNode().put("format", "roundwright-event/1");
    top(root, texts);
    places(root, texts);
    list(root.putArray("disciplines"), "disciplines", rows(EventCsv.DISCIPLINES, texts), "");
    list(root.putArray("rounds"), "rounds", rows(EventCsv.ROUNDS, texts), "");
    people(root, texts);
    rules(root, texts);
    pins(root.putObject("pins"), texts);
    if (!problems.isEmpty()) {
      throw new CsvProblems(problems);
    }
    try {
      return EventFile.read(root.toString());
    } catch (FileProblems wrong) {
      throw new CsvProblems(wrong.problems().stream().map(this::inTheTables).toList());
    }
  }

  private void top(ObjectNode root, Map<String, String> texts) {
    List<Row> rows = rows(EventCsv.EVENT, texts);
    if (rows.size() != 1) {
      add("event.csv", rows.size() + " lines", "write one line of headings and one of the event");
    }
    for (Row row : rows) {
      root.setAll(row.node());
      lineByPath.put("", row.line());
    }
  }

  private void places(ObjectNode root, Map<String, String> texts) {
    list(root.putArray("venues"), "venues", rows(EventCsv.VENUES, texts), "venue");
    for (Owner venue : ownersOf("venue")) {
      venue.node().putArray("halls");
    }
    for (Row row : rows(EventCsv.HALLS, texts)) {
      under("venue", row, "halls", "hall");
    }
    for (Owner hall : ownersOf("hall")) {
      hall.node().putArray("open");
    }
    for (Row row : rows(EventCsv.OPENINGS, texts)) {
      under("hall", row, "open", "");
    }
    list(root.putArray("travel"), "travel", rows(EventCsv.WAYS, texts), "");
    list(root.putArray("fixedPoints"), "fixedPoints", rows(EventCsv.FIXED_POINTS, texts), "");
  }

  private void people(ObjectNode root, Map<String, String> texts) {
    list(root.putArray("people"), "people", rows(EventCsv.PEOPLE, texts), "person");
    for (Owner person : ownersOf("person")) {
      ObjectNode node = person.node();
      node.putArray("entries");
      JsonNode presence = node.remove(PRESENCE);
      String word = presence == null ? ALWAYS : presence.asText();
      if (word.equals(WINDOWS)) {
        node.putArray("available");
      } else if (!word.equals(ALWAYS)) {
        add(
            lineByPath.get(person.path()).place() + ", column presence",
            "'" + word + "'",
            "write always, or windows and list them in availability.csv");
      }
    }
    for (Row row : rows(EventCsv.ENTRIES, texts)) {
      under("person", row, "entries", "");
    }
    for (Row row : rows(EventCsv.AVAILABILITY, texts)) {
      Owner person = owners.get("person " + row.owner());
      if (person != null && !person.node().has("available")) {
        add(
            row.line().place(),
            "a window of '" + row.owner() + "', who is always there",
            "write windows under presence in people.csv, or take this line out");
      } else {
        under("person", row, "available", "");
      }
    }
    for (Row row : rows(EventCsv.BUSY, texts)) {
      under("person", row, "busy", "");
    }
  }

  private void rules(ObjectNode root, Map<String, String> texts) {
    ObjectNode rules = root.putObject("rules");
    List<Row> rows = rows(EventCsv.RULES, texts);
    if (rows.size() > 1) {
      add("rules.csv", rows.size() + " lines", "write one line of headings and one of figures");
    }
    for (Row row : rows) {
      rules.setAll(row.node());
      lineByPath.put("rules", row.line());
    }
    if (texts.containsKey(EventCsv.MEALS.file())) {
      list(rules.putArray("meals"), "rules.meals", rows(EventCsv.MEALS, texts), "");
    }
    ObjectNode weights = rules.putObject("weights");
    for (Row row : rows(EventCsv.WEIGHTS, texts)) {
      String rule = row.node().path("rule").asText();
      if (weights.has(rule)) {
        add(row.line().place(), "a second weight of '" + rule + "'", "keep one of them");
      }
      weights.set(rule, row.node().path("weight"));
      lineByPath.put("rules.weights." + rule, row.line());
    }
  }

  private void pins(ObjectNode pins, Map<String, String> texts) {
    list(pins.putArray("groups"), "pins.groups", rows(EventCsv.GROUP_PINS, texts), "");
    list(
        pins.putArray("competitors"),
        "pins.competitors",
        rows(EventCsv.COMPETITOR_PINS, texts),
        "");
    list(pins.putArray("duties"), "pins.duties", rows(EventCsv.DUTY_PINS, texts), "");
  }

  /**
   * Adds rows to a list of the tree, and remembers them as owners of that kind where it has one.
   */
  private void list(ArrayNode list, String path, List<Row> rows, String kind) {
    for (Row row : rows) {
      add(list, path, row, kind);
    }
  }

  private void under(String kind, Row row, String field, String newKind) {
    Owner owner = owners.get(kind + " " + row.owner());
    if (owner == null) {
      add(
          row.line().place() + ", column " + kind,
          "'" + row.owner() + "'",
          "write the id of a " + kind + " that is listed");
      return;
    }
    add(owner.node().withArrayProperty(field), owner.path() + "." + field, row, newKind);
  }

  private void add(ArrayNode list, String path, Row row, String kind) {
    String place = path + "[" + list.size() + "]";
    lineByPath.put(place, row.line());
    list.add(row.node());
    if (!kind.isEmpty()) {
      owners.putIfAbsent(kind + " " + row.node().path("id").asText(), new Owner(row.node(), place));
    }
  }

  private List<Owner> ownersOf(String kind) {
    return owners.entrySet().stream()
        .filter(owner -> owner.getKey().startsWith(kind + " "))
        .map(Map.Entry::getValue)
        .toList();
  }

  private void add(String place, String value, String remedy) {
    problems.add(new Problem(place, value, remedy));
  }

  private List<Row> rows(CsvTable table, Map<String, String> texts) {
    List<Row> rows = new ArrayList<>();
    List<String> headings = new ArrayList<>();
    String text = texts.getOrDefault(table.file(), "");
    try (CsvReader<CsvRecord> csv =
        CsvReader.builder().allowMissingFields(true).allowExtraFields(true).ofCsvRecord(text)) {
      for (CsvRecord line : csv) {
        if (headings.isEmpty()) {
          headings.addAll(line.getFields().stream().map(EventTables::heading).toList());
          checkHeadings(table, headings);
        } else {
          row(table, headings, line).ifPresent(rows::add);
        }
      }
    } catch (CsvParseException e) {
      add(table.file(), "no CSV", "mend the quotes: " + e.getMessage());
    } catch (IOException e) {
      throw new UncheckedIOException(e);
    }
    return rows;
  }

  private static String heading(String cell) {
    String bare = cell.startsWith("\uFEFF") ? cell.substring(1) : cell;
    return bare.strip();
  }

  private void checkHeadings(CsvTable table, List<String> headings) {
    List<String> known = table.headings();
    for (String heading : headings) {
      if (!known.contains(heading)) {
        add(
            table.file() + " line 1",
            "'" + heading + "'",
            "use the headings " + String.join(", ", known));
      }
    }
  }

  private Optional<Row> row(CsvTable table, List<String> headings, CsvRecord cells) {
    Line line = new Line(table, cells.getStartingLineNumber());
    if (cells.getFieldCount() != headings.size()) {
      add(
          line.place(),
          cells.getFieldCount() + " cells",
          "write " + headings.size() + ", as the first line has; quote a cell that holds a comma");
      return Optional.empty();
    }
    ObjectNode node = JSON.createObjectNode();
    String owner = "";
    for (int i = 0; i < headings.size(); i++) {
      String cell = CsvTable.unguarded(cells.getField(i));
      if (table.owner().equals(Optional.of(headings.get(i)))) {
        owner = cell;
      } else if (!cell.isEmpty()) {
        table.column(headings.get(i)).ifPresent(column -> column.put(node, cell));
      }
    }
    return Optional.of(new Row(node, owner, line));
  }

  private Problem inTheTables(FileProblems.Problem problem) {
    String path = problem.path();
    String held = path;
    while (!lineByPath.containsKey(held) && !held.isEmpty()) {
      held = held.substring(0, Math.max(0, Math.max(held.lastIndexOf('.'), held.lastIndexOf('['))));
    }
    Line line = lineByPath.get(held);
    if (line == null) {
      return new Problem(path, problem.value(), problem.remedy());
    }
    String rest = path.substring(held.length()).replaceFirst("^\\.", "").replaceAll("\\[.*", "");
    Optional<Column> column =
        line.table().columns().stream()
            .filter(one -> !rest.isEmpty() && one.path().equals(rest))
            .findFirst();
    if (held.isEmpty() && column.isEmpty()) {
      return new Problem(path, problem.value(), problem.remedy());
    }
    String place =
        column.map(one -> line.place() + ", column " + one.heading()).orElse(line.place());
    return new Problem(place, problem.value(), problem.remedy());
  }

  Map<String, String> write(EventFile file) {
    Map<String, List<List<String>>> lines = new LinkedHashMap<>();
    EventCsv.ALL.forEach(table -> lines.put(table.file(), new ArrayList<>()));
    BiConsumer<CsvTable, List<String>> out = (table, cells) -> lines.get(table.file()).add(cells);
    ObjectNode root = tree(file.json());
    out.accept(EventCsv.EVENT, cells(EventCsv.EVENT, root, ""));
    for (JsonNode venue : root.path("venues")) {
      out.accept(EventCsv.VENUES, cells(EventCsv.VENUES, venue, ""));
      for (JsonNode hall : venue.path("halls")) {
        out.accept(EventCsv.HALLS, cells(EventCsv.HALLS, hall, venue.path("id").asText()));
        all(EventCsv.OPENINGS, hall.path("open"), hall.path("id").asText(), out);
      }
    }
    all(EventCsv.WAYS, root.path("travel"), "", out);
    all(EventCsv.FIXED_POINTS, root.path("fixedPoints"), "", out);
    all(EventCsv.DISCIPLINES, root.path("disciplines"), "", out);
    all(EventCsv.ROUNDS, root.path("rounds"), "", out);
    for (JsonNode person : root.path("people")) {
      ((ObjectNode) person).put(PRESENCE, person.has("available") ? WINDOWS : ALWAYS);
      String id = person.path("id").asText();
      out.accept(EventCsv.PEOPLE, cells(EventCsv.PEOPLE, person, ""));
      all(EventCsv.ENTRIES, person.path("entries"), id, out);
      all(EventCsv.AVAILABILITY, person.path("available"), id, out);
      all(EventCsv.BUSY, person.path("busy"), id, out);
    }
    JsonNode rules = root.path("rules");
    out.accept(EventCsv.RULES, cells(EventCsv.RULES, rules, ""));
    all(EventCsv.MEALS, rules.path("meals"), "", out);
    rules
        .path("weights")
        .properties()
        .forEach(
            weight ->
                out.accept(EventCsv.WEIGHTS, List.of(weight.getKey(), weight.getValue().asText())));
    all(EventCsv.GROUP_PINS, root.path("pins").path("groups"), "", out);
    all(EventCsv.COMPETITOR_PINS, root.path("pins").path("competitors"), "", out);
    all(EventCsv.DUTY_PINS, root.path("pins").path("duties"), "", out);

    Map<String, String> texts = new LinkedHashMap<>();
    for (CsvTable table : EventCsv.ALL) {
      boolean left = table.equals(EventCsv.MEALS) && !rules.has("meals");
      if (!left) {
        texts.put(table.file(), csv(table, lines.get(table.file())));
      }
    }
    return texts;
  }

  private static ObjectNode tree(String json) {
    try {
      return (ObjectNode) JSON.readTree(json);
    } catch (JsonProcessingException e) {
      throw new IllegalStateException("An event file that was just written cannot be read", e);
    }
  }

  private static void all(
      CsvTable table, JsonNode rows, String owner, BiConsumer<CsvTable, List<String>> out) {
    rows.forEach(row -> out.accept(table, cells(table, row, owner)));
  }

  private static List<String> cells(CsvTable table, JsonNode row, String owner) {
    List<String> cells = new ArrayList<>();
    table.owner().ifPresent(unused -> cells.add(owner));
    int items = 0;
    for (Column column : table.columns()) {
      cells.add(column.cell(row, items));
      if (column.kind() == CsvTable.Kind.ITEM) {
        items++;
      }
    }
    return cells;
  }

  private static String csv(CsvTable table, List<List<String>> lines) {
    StringWriter text = new StringWriter();
    try (CsvWriter csv = CsvWriter.builder().lineDelimiter(LineDelimiter.CRLF).build(text)) {
      csv.writeRecord(table.headings());
      for (List<String> line : lines) {
        csv.writeRecord(line.stream().map(CsvTable::guarded).toList());
      }
    } catch (IOException e) {
      throw new UncheckedIOException(e);
    }
    return text.toString();
  }
}
