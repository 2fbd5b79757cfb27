package roundwright.server.event;

import static roundwright.server.event.CsvTable.Column.flag;
import static roundwright.server.event.CsvTable.Column.item;
import static roundwright.server.event.CsvTable.Column.number;
import static roundwright.server.event.CsvTable.Column.text;
import static roundwright.server.event.CsvTable.Column.words;

import java.io.IOException;
import java.nio.charset.StandardCharsets;
import java.nio.file.Files;
import java.nio.file.Path;
import java.util.LinkedHashMap;
import java.util.List;
import java.util.Map;
import roundwright.scheduling.file.EventFile;

/**
 * An event as a set of CSV tables (UTF-8, RFC 4180), one for each kind of thing, as registrars keep
 * them in a spreadsheet; and the way to the event file and back. The event file's reader is the
 * judge of what the cells may hold, so both forms of an event are refused for the same reasons; the
 * places it names are told as file, line and column. A cell that a spreadsheet would take for a
 * formula is written with an apostrophe before it, which reading takes off.
 */
public final class EventCsv {
  static final CsvTable EVENT =
      CsvTable.of("event.csv", text("name", "name"), text("zone", "zone"));
  static final CsvTable VENUES =
      CsvTable.of(
          "venues.csv",
          text("id", "id"),
          text("name", "name"),
          text("address", "x-address"),
          text("zone", "zone"));
  static final CsvTable HALLS =
      CsvTable.under(
          "venue",
          "halls.csv",
          text("id", "id"),
          text("name", "name"),
          number("stations", "stations"),
          number("occupancy", "occupancy"),
          words("features", "features"));
  static final CsvTable OPENINGS =
      CsvTable.under("hall", "openings.csv", text("from", "from"), text("to", "to"));
  static final CsvTable WAYS =
      CsvTable.of(
          "ways.csv",
          item("one venue", "between"),
          item("other venue", "between"),
          number("minutes", "minutes"));
  static final CsvTable FIXED_POINTS =
      CsvTable.of(
          "fixed-points.csv",
          text("name", "name"),
          words("halls", "halls"),
          text("from", "from"),
          text("to", "to"));
  static final CsvTable DISCIPLINES =
      CsvTable.of(
          "disciplines.csv",
          text("id", "id"),
          text("name", "name"),
          number("handling seconds", "handlingSeconds"),
          number("scramble seconds", "scrambleSeconds"),
          number("carry seconds", "carrySeconds"),
          words("needs", "needs"),
          text("measure", "measure"));
  static final CsvTable ROUNDS =
      CsvTable.of(
          "rounds.csv",
          text("id", "id"),
          text("discipline", "discipline"),
          number("number", "number"),
          text("counted by", "countedBy"),
          number("time limit seconds", "timeLimitSeconds"),
          text("limit covers", "limitCovers"),
          number("cut-off attempts", "cutOff.attempts"),
          number("cut-off seconds", "cutOff.seconds"),
          number("advance count", "advance.count"),
          number("advance percent", "advance.percent"),
          number("advance under seconds", "advance.underSeconds"),
          flag("continues", "continues"),
          words("halls", "halls"),
          text("seating", "seating"),
          number("fill", "fill"),
          number("stations", "stations"),
          number("groups", "groups"),
          number("minutes per group", "minutesPerGroup"),
          number("judges", "crew.judges"),
          number("scramblers", "crew.scramblers"),
          number("runners", "crew.runners"),
          text("seeding", "seeding"),
          text("not before", "notBefore"),
          text("not after", "notAfter"),
          words("entrants", "entrants"));
  static final CsvTable PEOPLE =
      CsvTable.of(
          "people.csv",
          text("id", "id"),
          text("name", "name"),
          text("public name", "x-public-name"),
          flag("listed", "x-listed"),
          flag("minor", "x-minor"),
          text("guardian", "x-guardian"),
          flag("newcomer", "newcomer"),
          text("household", "household"),
          flag("judges", "crew.judges"),
          flag("runs", "crew.runs"),
          words("scrambles", "crew.scrambles"),
          text("presence", EventTables.PRESENCE),
          number("max duty minutes per day", "maxDutyMinutesPerDay"),
          number("share", "share"));
  static final CsvTable ENTRIES =
      CsvTable.under(
          "person",
          "entries.csv",
          text("discipline", "discipline"),
          number("expected seconds", "expectedSeconds"));
  static final CsvTable AVAILABILITY =
      CsvTable.under("person", "availability.csv", text("from", "from"), text("to", "to"));
  static final CsvTable BUSY =
      CsvTable.under(
          "person", "busy.csv", text("from", "from"), text("to", "to"), text("what", "what"));
  static final CsvTable RULES =
      CsvTable.of(
          "rules.csv",
          text("seating", "seating"),
          number("fill", "fill"),
          number("stations per scrambler", "stationsPerScrambler"),
          number("stations per runner", "stationsPerRunner"),
          number("changeover minutes", "changeoverMinutes"),
          number("setup minutes", "setupMinutes"),
          number("turnaround minutes", "turnaroundMinutes"),
          number("start grid minutes", "startGridMinutes"),
          number("slack", "slack"),
          number("slot percentile", "slotPercentile"),
          number("breathing minutes", "breathingMinutes"),
          number("rest minutes", "restMinutes"),
          number("longest run minutes", "longestRunMinutes"));
  static final CsvTable MEALS =
      CsvTable.of(
          "meals.csv", text("from", "from"), text("to", "to"), number("minutes", "minutes"));
  static final CsvTable WEIGHTS =
      CsvTable.of("weights.csv", text("rule", "rule"), number("weight", "weight"));
  static final CsvTable GROUP_PINS =
      CsvTable.of(
          "group-pins.csv",
          text("round", "round"),
          number("number", "number"),
          text("hall", "hall"),
          text("start", "start"));
  static final CsvTable COMPETITOR_PINS =
      CsvTable.of(
          "competitor-pins.csv",
          text("person", "person"),
          text("round", "round"),
          number("number", "number"));
  static final CsvTable DUTY_PINS =
      CsvTable.of(
          "duty-pins.csv",
          text("person", "person"),
          text("round", "round"),
          number("number", "number"),
          text("role", "role"));

  /** In the order in which they are read and written: owners before what belongs to them. */
  static final List<CsvTable> ALL =
      List.of(
          EVENT,
          VENUES,
          HALLS,
          OPENINGS,
          WAYS,
          FIXED_POINTS,
          DISCIPLINES,
          ROUNDS,
          PEOPLE,
          ENTRIES,
          AVAILABILITY,
          BUSY,
          RULES,
          MEALS,
          WEIGHTS,
          GROUP_PINS,
          COMPETITOR_PINS,
          DUTY_PINS);

  private EventCsv() {}

  /** The names of all the files. */
  public static List<String> files() {
    return ALL.stream().map(CsvTable::file).toList();
  }

  /**
   * Reads the tables of a folder; one that is missing holds nothing.
   *
   * @throws CsvProblems with everything that is wrong, if anything is
   */
  public static EventFile read(Path folder) throws IOException, CsvProblems {
    Map<String, String> texts = new LinkedHashMap<>();
    for (String file : files()) {
      Path path = folder.resolve(file);
      if (Files.exists(path)) {
        texts.put(file, Files.readString(path, StandardCharsets.UTF_8));
      }
    }
    return read(texts);
  }

  /**
   * Reads the tables from their texts, by file name; one that is missing holds nothing.
   *
   * @throws CsvProblems with everything that is wrong, if anything is
   */
  public static EventFile read(Map<String, String> texts) throws CsvProblems {
    return new EventTables().read(texts);
  }

  /** The texts of all the tables, by file name, in the order of {@link #files()}. */
  public static Map<String, String> write(EventFile file) {
    return new EventTables().write(file);
  }

  /** Writes all the tables into a folder, which must be there. */
  public static void write(EventFile file, Path folder) throws IOException {
    for (Map.Entry<String, String> table : write(file).entrySet()) {
      Files.writeString(folder.resolve(table.getKey()), table.getValue(), StandardCharsets.UTF_8);
    }
  }
}
