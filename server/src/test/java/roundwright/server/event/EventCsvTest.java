package roundwright.server.event;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertThrows;
import static org.junit.jupiter.api.Assertions.assertTrue;

import java.io.IOException;
import java.nio.file.Files;
import java.nio.file.Path;
import java.util.LinkedHashMap;
import java.util.List;
import java.util.Map;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.api.io.TempDir;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.CsvSource;
import roundwright.scheduling.file.EventFile;
import roundwright.scheduling.model.Event;
import roundwright.scheduling.model.Person;

/** Tables and event file are the same event, and what is wrong with a table is told by its cell. */
class EventCsvTest {
  private static final Path DEMO = Path.of("../demo-event");

  @Test
  void theDemoEventsTablesAndItsEventFileAreTheSameEvent() throws Exception {
    EventFile fromTables = EventCsv.read(DEMO);
    Path file = DEMO.resolve("event.json");
    if (Boolean.getBoolean("roundwright.rewrite")) {
      fromTables.write(file);
    }
    assertEquals(fromTables, EventFile.read(file));
  }

  @Test
  void theDemoEventIsAsItsStorySays() throws Exception {
    Event event = EventCsv.read(DEMO).event();
    List<Person> people = event.people();
    assertEquals(2, event.venues().size());
    assertEquals(3, event.venues().stream().mapToInt(venue -> venue.halls().size()).sum());
    assertEquals(11, event.disciplines().size());
    assertEquals(184, people.size());
    assertEquals(167, people.stream().filter(person -> !person.entries().isEmpty()).count());
    assertEquals(28, people.stream().filter(Person::newcomer).count());
    assertEquals(20, people.stream().flatMap(p -> p.household().stream()).distinct().count());
  }

  @Test
  void anEventWrittenAsTablesAndReadBackIsTheSameEvent() throws Exception {
    EventFile everything = EventFile.read(EVERYTHING);
    Map<String, String> tables = EventCsv.write(everything);
    assertEquals(everything, EventCsv.read(tables), () -> String.join("\n", tables.values()));
  }

  @Test
  void tablesSurviveTheWayThroughAFolder(@TempDir Path folder) throws Exception {
    EventFile demo = EventCsv.read(DEMO);
    EventCsv.write(demo, folder);
    assertEquals(demo, EventCsv.read(folder));
    String people = Files.readString(folder.resolve("people.csv"));
    assertTrue(people.contains("\r\n"), "RFC 4180 ends lines with CR LF");
  }

  @Test
  void aCellThatASpreadsheetWouldReckonIsGuardedAndReadBack() throws Exception {
    EventFile event = EventFile.read(EVERYTHING.replace("Hall of Echoes", "=HYPERLINK(1)"));
    Map<String, String> tables = EventCsv.write(event);
    assertTrue(tables.get("halls.csv").contains(",'=HYPERLINK(1),"), tables.get("halls.csv"));
    assertEquals(event, EventCsv.read(tables));
  }

  @ParameterizedTest
  @CsvSource(
      delimiter = '|',
      value = {
        "entries.csv|alder,9.5|alder,slow|entries.csv line 2, column expected seconds",
        "entries.csv|p1,alder,9.5|p1,alder,9.5,7|entries.csv line 2 is 4 cells",
        "entries.csv|p1,alder|nobody,alder|entries.csv line 2, column person is 'nobody'",
        "people.csv|yes,,alder maple|maybe,,alder maple|people.csv line 2, column judges",
        "people.csv|household|hausehold|people.csv line 1 is 'hausehold'; use the headings id",
        "people.csv|,windows,|,sometimes,|column presence is 'sometimes'; write always",
        "people.csv|,windows,|,always,|availability.csv line 2 is a window of 'p1'",
        "halls.csv|,12,|,0,|halls.csv line 2, column stations is 0",
        "openings.csv|2027-03-28T09:00|2027-03-28T01:30|openings.csv line 2, column from",
        "weights.csv|waiting,|weighting,|weights.csv line 3 is 3.5",
        "venues.csv|id,name|id,name,name|venues.csv line 2 is 4 cells",
        "rules.csv|,90,|,190,|rules.csv line 2, column slot percentile",
        "event.csv|Europe/Lisbon|Lisbon|event.csv line 2, column zone",
      })
  void whatIsWrongIsToldByFileLineAndColumn(
      String file, String right, String wrong, String complaint) throws Exception {
    Map<String, String> tables = new LinkedHashMap<>(EventCsv.write(EventFile.read(EVERYTHING)));
    String text = tables.get(file);
    assertTrue(text.contains(right), () -> "No '" + right + "' in " + text);
    tables.put(file, text.replaceFirst(java.util.regex.Pattern.quote(right), wrong));
    CsvProblems problems = assertThrows(CsvProblems.class, () -> EventCsv.read(tables));
    assertTrue(problems.getMessage().contains(complaint), problems.getMessage());
  }

  @Test
  void allThatIsWrongIsToldAtOnce() throws Exception {
    Map<String, String> tables = new LinkedHashMap<>(EventCsv.write(EventFile.read(EVERYTHING)));
    tables.computeIfPresent("halls.csv", (file, text) -> text.replace(",12,", ",900,"));
    tables.computeIfPresent("entries.csv", (file, text) -> text.replace("9.5", "0"));
    tables.computeIfPresent("event.csv", (file, text) -> text.replace("Europe/Lisbon", "Here"));
    CsvProblems problems = assertThrows(CsvProblems.class, () -> EventCsv.read(tables));
    assertTrue(problems.problems().size() >= 3, problems.getMessage());
  }

  @Test
  void anEmptyFolderIsRefusedWithAReason(@TempDir Path folder) throws IOException {
    CsvProblems problems = assertThrows(CsvProblems.class, () -> EventCsv.read(folder));
    assertTrue(problems.getMessage().startsWith("event.csv is 0 lines"), problems.getMessage());
  }

  /** Every kind of thing, and every optional key that a table has a column for. */
  private static final String EVERYTHING =
      """
      {
        "format": "roundwright-event/1", "name": "Echo Weekend", "zone": "Europe/Lisbon",
        "venues": [{"id": "pier", "name": "Pier House", "zone": "Europe/Lisbon",
          "x-address": "Quay 1, \\"upstairs\\"",
          "halls": [{"id": "main", "name": "Hall of Echoes", "stations": 12, "occupancy": 80,
            "features": ["quiet", "stage"],
            "open": [{"from": "2027-03-28T09:00", "to": "2027-03-28T18:00"},
                     {"from": "2027-03-29T09:00", "to": "2027-03-29T12:00"}]}]},
          {"id": "barn", "name": "Barn, old", "zone": "Europe/Madrid", "halls": [{"id": "loft",
            "name": "Loft", "stations": 4,
            "open": [{"from": "2027-03-28T09:00", "to": "2027-03-28T18:00"}]}]}],
        "travel": [{"between": ["pier", "barn"], "minutes": 12}],
        "fixedPoints": [
          {"name": "Lunch", "halls": ["main"], "from": "2027-03-28T12:30",
            "to": "2027-03-28T13:15"},
          {"name": "Prizes", "from": "2027-03-28T17:00", "to": "2027-03-28T18:00"}],
        "disciplines": [
          {"id": "alder", "name": "2x2x2", "handlingSeconds": 40.5, "scrambleSeconds": 20,
            "carrySeconds": 0, "needs": ["quiet"], "measure": "time"},
          {"id": "maple", "name": "Fewest Moves", "measure": "moves"}],
        "rounds": [
          {"id": "a1", "discipline": "alder", "number": 1, "countedBy": "average-of-5",
            "timeLimitSeconds": 300, "limitCovers": "round",
            "cutOff": {"attempts": 2, "seconds": 30}, "advance": {"count": 1},
            "halls": ["main"], "seating": "fixed", "fill": 1.5, "stations": 8, "groups": 1,
            "minutesPerGroup": 40, "crew": {"judges": 1, "scramblers": 0, "runners": 1},
            "seeding": "mixed", "notBefore": "2027-03-28T09:30", "notAfter": "2027-03-28T16:00",
            "entrants": ["p1"]},
          {"id": "a2", "discipline": "alder", "number": 2, "countedBy": "best-of-3",
            "advance": {"percent": 50}},
          {"id": "a3", "discipline": "alder", "number": 3, "countedBy": "best-of-1",
            "advance": {"underSeconds": 20.25}},
          {"id": "a4", "discipline": "alder", "number": 4, "countedBy": "best-of-1"},
          {"id": "m1", "discipline": "maple", "number": 1, "countedBy": "best-of-1"},
          {"id": "m2", "discipline": "maple", "number": 2, "countedBy": "best-of-1",
            "continues": true}],
        "people": [
          {"id": "p1", "name": "Ana \\"Nan\\" Rocha, the elder", "x-listed": true,
            "x-minor": true, "x-public-name": "Ana", "x-guardian": "Rui",
            "entries": [{"discipline": "alder", "expectedSeconds": 9.5},
                        {"discipline": "maple", "expectedSeconds": 3300}],
            "crew": {"judges": true, "runs": false, "scrambles": ["alder", "maple"]},
            "available": [{"from": "2027-03-28T08:00", "to": "2027-03-28T19:00"}],
            "busy": [{"from": "2027-03-28T08:30", "to": "2027-03-28T09:00", "what": "desk"}],
            "household": "h1", "newcomer": true, "maxDutyMinutesPerDay": 100, "share": 0.5},
          {"id": "p2", "name": "宮", "entries": [], "available": []}],
        "rules": {"seating": "rotating", "fill": 1.4, "stationsPerScrambler": 2.5,
          "stationsPerRunner": 0, "changeoverMinutes": 6, "setupMinutes": 7,
          "turnaroundMinutes": 8, "startGridMinutes": 10, "slack": 1.25, "slotPercentile": 90,
          "breathingMinutes": 11, "restMinutes": 12, "longestRunMinutes": 80,
          "meals": [{"from": "12:00", "to": "14:00", "minutes": 20}],
          "weights": {"waiting": 3.5, "kin": 0}},
        "pins": {
          "groups": [{"round": "a1", "number": 1, "hall": "main", "start": "2027-03-28T09:30"}],
          "competitors": [{"person": "p1", "round": "a1", "number": 1}],
          "duties": [{"person": "p2", "round": "a1", "number": 1, "role": "judge"}]}
      }
      """;
}
