package roundwright.scheduling.file;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertFalse;
import static org.junit.jupiter.api.Assertions.assertThrows;
import static org.junit.jupiter.api.Assertions.assertTrue;

import java.io.ByteArrayInputStream;
import java.io.IOException;
import java.math.BigDecimal;
import java.nio.charset.StandardCharsets;
import java.nio.file.Files;
import java.nio.file.Path;
import java.time.Instant;
import java.util.List;
import java.util.Optional;
import java.util.stream.Stream;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.api.io.TempDir;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.Arguments;
import org.junit.jupiter.params.provider.MethodSource;
import roundwright.scheduling.cost.RuleName;
import roundwright.scheduling.model.Event;
import roundwright.scheduling.model.Person;
import roundwright.scheduling.model.Round;
import roundwright.scheduling.model.Rules;
import roundwright.scheduling.model.Seating;
import roundwright.scheduling.model.Window;

final class EventFileTest {
  private static final String EVERY_KEY = Broken.resource("every-key.json");
  private static final String SMALLEST =
      """
      {
        "format": "roundwright-event/1",
        "name": "Nothing yet",
        "zone": "UTC",
        "venues": [],
        "disciplines": [],
        "rounds": [],
        "people": []
      }
      """;

  private static Event event(String json) throws FileProblems {
    return EventFile.read(json).event();
  }

  @Test
  void an_event_with_every_key_comes_back_the_same() throws FileProblems {
    EventFile first = EventFile.read(EVERY_KEY);
    String written = first.json();
    EventFile second = EventFile.read(written);
    assertEquals(first, second);
    assertEquals(written, second.json());
  }

  @Test
  void the_good_file_of_these_tests_differs_from_every_default() throws FileProblems {
    Event event = event(EVERY_KEY);
    assertEquals(Seating.FIXED, event.rules().seating());
    assertEquals(new BigDecimal("1.1"), event.rules().slack());
    assertEquals(BigDecimal.ZERO, event.rules().weight(RuleName.UNEVEN_GROUPS));
    assertEquals(new BigDecimal("4.5"), event.rules().weight(RuleName.WAITING));
    assertEquals(new BigDecimal("2"), event.rules().weight(RuleName.SEEDING));
    assertEquals(Optional.of(List.of()), event.people().get(1).available());
    assertEquals(Optional.empty(), event.people().get(2).available());
    assertTrue(event.rounds().get(4).continues());
    assertEquals(
        Optional.of(new Round.Advance.Percent(new BigDecimal("62.5"))),
        event.rounds().get(1).advance());
  }

  @Test
  void a_file_without_optional_keys_gets_the_defaults_and_stays_without_them() throws FileProblems {
    EventFile file = EventFile.read(SMALLEST);
    assertEquals(Rules.DEFAULT, file.event().rules());
    assertEquals(
        List.of("format", "name", "zone", "venues", "disciplines", "rounds", "people"),
        file.json().lines().filter(line -> line.contains(":")).map(EventFileTest::key).toList());
  }

  private static String key(String line) {
    return line.substring(line.indexOf('"') + 1, line.indexOf("\":"));
  }

  @Test
  void hall_times_are_in_the_venue_zone_and_personal_times_in_the_zone_of_the_event()
      throws FileProblems {
    Event event = event(EVERY_KEY);
    assertEquals(
        new Window(Instant.parse("2027-05-08T08:00:00Z"), Instant.parse("2027-05-08T17:00:00Z")),
        event.venues().get(1).halls().get(0).open().get(0));
    Person ada = event.people().get(0);
    assertEquals(
        List.of(
            new Window(
                Instant.parse("2027-05-08T07:00:00Z"), Instant.parse("2027-05-08T15:00:00Z"))),
        ada.available().orElseThrow());
    assertEquals(
        Optional.of(Instant.parse("2027-05-08T08:30:00Z")), event.rounds().get(0).notBefore());
    assertEquals(
        Optional.of(Instant.parse("2027-05-08T08:30:00Z")), event.pins().groups().get(0).start());
    assertEquals(
        Optional.of(Instant.parse("2027-05-08T10:30:00Z")), event.pins().groups().get(1).start());
  }

  @Test
  void windows_that_touch_are_merged() throws FileProblems {
    assertEquals(
        List.of(
            new Window(
                Instant.parse("2027-05-08T08:00:00Z"), Instant.parse("2027-05-08T19:00:00Z")),
            new Window(
                Instant.parse("2027-05-09T08:00:00Z"), Instant.parse("2027-05-09T17:00:00Z"))),
        event(EVERY_KEY).venues().get(0).halls().get(0).open());
  }

  @Test
  void own_keys_are_ignored_and_kept_with_the_thing_they_stand_in() throws FileProblems {
    String written = EventFile.read(EVERY_KEY).json();
    assertTrue(written.contains("\"x-colour\": {\"of\": [\"ink\", 1.50, null], \"x-deep\": true}"));
    assertTrue(written.contains("\"minutes\": 15}]"));
    assertTrue(written.contains("\"weights\": {\"uneven-groups\": 0, \"waiting\": 4.5, \"x-taste"));
    assertTrue(written.contains("\"scrambles\": [\"cube3\", \"blind\"], \"x-shirt\": \"L\"}"));
  }

  @Test
  void own_keys_can_be_kept_apart_and_put_back() throws FileProblems {
    EventFile file = EventFile.read(EVERY_KEY);
    Extras kept = Extras.of(file.extras().json());
    assertEquals(file.extras(), kept);
    assertEquals(file.json(), new EventFile(file.event(), kept).json());
    String first = file.event().people().get(0).id();
    assertEquals(Optional.of("17"), kept.ofPerson(first, "x-badge"));
    assertEquals(Optional.empty(), kept.ofPerson(first, "x-nothing"));
    assertEquals(Extras.NONE, Extras.of(Extras.NONE.json()));
  }

  @Test
  void own_keys_follow_their_person_when_the_list_changes_and_go_with_them() throws FileProblems {
    EventFile file = EventFile.read(EVERY_KEY);
    Event event = file.event();
    List<Person> turned =
        List.of(event.people().get(2), event.people().get(1), event.people().get(0));
    EventFile reordered = new EventFile(withPeople(event, turned), file.extras());
    assertTrue(
        reordered.json().contains("\"share\": 0.75,\n      \"x-badge\": 17"), reordered.json());
    EventFile without = new EventFile(withPeople(event, turned.subList(0, 2)), file.extras());
    assertFalse(without.json().contains("x-badge"));
  }

  private static Event withPeople(Event event, List<Person> people) {
    return new Event(
        event.name(),
        event.zone(),
        event.venues(),
        event.ways(),
        event.fixedPoints(),
        event.disciplines(),
        event.rounds(),
        people,
        event.rules(),
        event.pins());
  }

  @Test
  void own_keys_are_kept_in_rules_that_are_all_as_usual() throws FileProblems {
    String json =
        SMALLEST.replace(
            "\"people\": []",
            "\"people\": [], \"rules\": {\"weights\": {\"x-a\": 1}}, \"pins\": {\"x-b\": 2}");
    String written = EventFile.read(json).json();
    assertTrue(written.contains("\"rules\": {\"weights\": {\"x-a\": 1}}"), written);
    assertTrue(written.contains("\"pins\": {\"x-b\": 2}"), written);
  }

  @Test
  void equal_numbers_are_equal_however_they_are_written() throws FileProblems {
    String other =
        EVERY_KEY
            .replace("\"stations\": 24,", "\"stations\": 24.0,")
            .replace("\"fill\": 1.25", "\"fill\": 125e-2")
            .replace("\"expectedSeconds\": 120", "\"expectedSeconds\": 1.2E+2");
    assertEquals(event(EVERY_KEY), event(other));
  }

  @Test
  void a_byte_order_mark_is_skipped_and_a_stream_and_a_path_read_the_same(@TempDir Path folder)
      throws IOException, FileProblems {
    byte[] marked = ("\ufeff" + EVERY_KEY).getBytes(StandardCharsets.UTF_8);
    Path path = folder.resolve("event.json");
    Files.write(path, marked);
    assertEquals(EventFile.read(EVERY_KEY), EventFile.read(path));
    assertEquals(EventFile.read(EVERY_KEY), EventFile.read(new ByteArrayInputStream(marked)));
    EventFile.read(path).write(path);
    assertEquals(EventFile.read(EVERY_KEY).json(), Files.readString(path));
  }

  @Test
  void bytes_that_are_not_utf_8_are_told_by_their_place() {
    byte[] bytes = SMALLEST.replace("Nothing yet", "Caf_").getBytes(StandardCharsets.UTF_8);
    int at = SMALLEST.indexOf("Nothing yet") + 3;
    bytes[at] = (byte) 0xe9;
    FileProblems problems =
        assertThrows(FileProblems.class, () -> EventFile.read(new ByteArrayInputStream(bytes)));
    assertEquals(
        "byte " + (at + 1) + " is not UTF-8; save the file in the UTF-8 encoding",
        problems.getMessage());
  }

  static Stream<Arguments> brokenFiles() {
    return Broken.rows("broken-events.json", EVERY_KEY);
  }

  @ParameterizedTest(name = "{0}")
  @MethodSource("brokenFiles")
  void each_broken_file_says_what_is_wrong_where_and_what_to_do(String json, String message) {
    FileProblems problems = assertThrows(FileProblems.class, () -> EventFile.read(json));
    assertEquals(message, problems.getMessage());
  }

  @Test
  void there_are_more_than_a_hundred_broken_files() {
    assertTrue(brokenFiles().count() > 100);
  }

  @Test
  void a_file_with_three_mistakes_names_all_three() {
    String json =
        EVERY_KEY
            .replace("\"stations\": 24", "\"stations\": 0")
            .replace("\"expectedSeconds\": 31", "\"expectedSeconds\": \"fast\"")
            .replace("\"waiting\"", "\"wating\"");
    FileProblems problems = assertThrows(FileProblems.class, () -> EventFile.read(json));
    assertEquals(
        List.of(
            "venues[0].halls[0].stations (pier-main) is 0; write a whole number from 1 to 500",
            "people[1].entries[0].expectedSeconds (p002) is \"fast\";"
                + " write a number over 0, at most 7200",
            "rules.weights.wating is 4.5; no rule with a weight has this name:"
                + " did you mean \"waiting\"?"),
        problems.problems().stream().map(FileProblems.Problem::line).toList());
  }

  static Stream<Arguments> texts() {
    return Stream.of(
        Arguments.of("", "line 1, column 1 is the end of an empty file; write one JSON object"),
        Arguments.of("[]", "the file is []; write an object: {…}"),
        Arguments.of("3", "the file is 3; write an object: {…}"),
        Arguments.of(
            SMALLEST + "{}",
            "line 10, column 1 is text after the end; keep one JSON object in the file"),
        Arguments.of(
            "[".repeat(2000),
            "line 1, column 1 is broken JSON; mend this: document nesting depth (1001) exceeds"
                + " the maximum allowed (1000)"));
  }

  @ParameterizedTest
  @MethodSource("texts")
  void a_text_that_is_no_object_is_told_once(String json, String message) {
    FileProblems problems = assertThrows(FileProblems.class, () -> EventFile.read(json));
    assertEquals(message, problems.getMessage());
  }

  @Test
  void a_moment_on_the_command_line_is_in_the_zone_of_the_event() throws FileProblems {
    Event event = event(EVERY_KEY);
    assertEquals(
        Instant.parse("2027-05-08T09:00:00Z"), EventFile.moment("--at", "2027-05-08T10:00", event));
    FileProblems problems =
        assertThrows(FileProblems.class, () -> EventFile.moment("--at", "2027-03-28T01:10", event));
    assertTrue(problems.getMessage().startsWith("--at is \"2027-03-28T01:10\"; the change of"));
  }

  @Test
  void a_time_that_has_no_words_is_not_written() throws FileProblems {
    Event event = event(EVERY_KEY);
    Person ada = event.people().get(0);
    Window repeated =
        new Window(Instant.parse("2027-10-31T00:30:00Z"), Instant.parse("2027-10-31T05:00:00Z"));
    Person late =
        new Person(
            ada.id(),
            ada.name(),
            ada.entries(),
            ada.crew(),
            Optional.of(List.of(repeated)),
            ada.busy(),
            ada.household(),
            ada.newcomer(),
            ada.maxDutyMinutesPerDay(),
            ada.share());
    EventFile file = new EventFile(withPeople(event, List.of(late)));
    IllegalArgumentException refusal = assertThrows(IllegalArgumentException.class, file::json);
    assertTrue(refusal.getMessage().contains("2027-10-31T01:30"), refusal.getMessage());
  }
}
