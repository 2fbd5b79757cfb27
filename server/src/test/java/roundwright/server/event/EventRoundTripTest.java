package roundwright.server.event;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertThrows;
import static org.junit.jupiter.api.Assertions.assertTrue;
import static roundwright.server.store.schema.Tables.PERSON;

import io.zonky.test.db.postgres.embedded.EmbeddedPostgres;
import java.io.IOException;
import java.nio.file.Files;
import java.nio.file.Path;
import java.time.Clock;
import java.util.List;
import org.junit.jupiter.api.AfterAll;
import org.junit.jupiter.api.BeforeAll;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.api.io.TempDir;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.CsvSource;
import roundwright.scheduling.file.EventFile;
import roundwright.scheduling.file.FileProblems;
import roundwright.scheduling.model.Event;
import roundwright.server.Settings;
import roundwright.server.ids.EventId;
import roundwright.server.store.Database;
import roundwright.server.ticket.NameFold;

class EventRoundTripTest {
  private static final Path EVERY_KEY =
      Path.of("../scheduling/src/test/resources/roundwright/scheduling/file/every-key.json");
  private static final Path DEMO = Path.of("../demo-event/event.json");

  @TempDir static Path folder;
  private static EmbeddedPostgres server;
  private static Database h2;
  private static Database postgres;

  @BeforeAll
  static void openBoth() throws IOException {
    h2 = Database.open(Settings.h2Url(folder.resolve("round-trip")), "sa", "", Clock.systemUTC());
    server = EmbeddedPostgres.builder().start();
    postgres =
        Database.open(
            "jdbc:postgresql://localhost:" + server.getPort() + "/postgres",
            "postgres",
            "postgres",
            Clock.systemUTC());
  }

  @AfterAll
  static void closeBoth() throws IOException {
    h2.close();
    postgres.close();
    server.close();
  }

  @ParameterizedTest
  @CsvSource({"h2", "postgres"})
  void an_event_with_every_key_comes_back_the_same(String name) throws IOException, FileProblems {
    comesBack(database(name), EVERY_KEY);
  }

  @ParameterizedTest
  @CsvSource({"h2", "postgres"})
  void the_demo_event_comes_back_the_same(String name) throws IOException, FileProblems {
    comesBack(database(name), DEMO);
  }

  private static Database database(String name) {
    return name.equals("h2") ? h2 : postgres;
  }

  private static void comesBack(Database database, Path path) throws IOException, FileProblems {
    EventFile file = EventFile.read(path);
    String slug = path.getFileName().toString().replace(".json", "");
    EventId id = new EventWrites(database).importEvent(slug, file);
    EventFile back = database.read(tx -> EventReads.file(tx, id));
    assertEquals(file.event(), back.event());
    assertEquals(file, back);
    assertEquals(file.json(), back.json());
  }

  @Test
  void two_events_of_the_same_file_do_not_mix() throws IOException, FileProblems {
    EventFile file = EventFile.read(EVERY_KEY);
    EventWrites writes = new EventWrites(h2);
    EventId one = writes.importEvent("one", file);
    EventId other = writes.importEvent("other", file);
    Event first = h2.read(tx -> EventReads.event(tx, one));
    Event second = h2.read(tx -> EventReads.event(tx, other));
    assertEquals(first, second);
  }

  @Test
  void an_address_that_is_taken_is_refused_with_what_to_do() throws IOException, FileProblems {
    EventFile file = EventFile.read(EVERY_KEY);
    EventWrites writes = new EventWrites(h2);
    writes.importEvent("taken", file);
    IllegalArgumentException e =
        assertThrows(IllegalArgumentException.class, () -> writes.importEvent("taken", file));
    assertTrue(e.getMessage().contains("Choose another address"), e.getMessage());
  }

  @Test
  void an_event_that_cannot_be_kept_leaves_nothing_behind() throws IOException, FileProblems {
    String tooLong =
        Files.readString(EVERY_KEY).replace("\"name\": \"", "\"name\": \"" + "long ".repeat(110));
    EventFile file = EventFile.read(tooLong);
    int before = people();
    IllegalArgumentException e =
        assertThrows(
            IllegalArgumentException.class,
            () -> new EventWrites(h2).importEvent("too-long", file));
    assertTrue(e.getMessage().contains("500 can be kept"), e.getMessage());
    assertEquals(before, people());
  }

  private static int people() {
    return h2.read(tx -> tx.sql().fetchCount(PERSON));
  }

  @ParameterizedTest
  @CsvSource({
    "Ines Halvorsen,,true,false,Ines Halvorsen",
    "Ines Halvorsen,,false,false,Ines",
    "Ines Halvorsen,,true,true,Ines",
    "Ines Halvorsen,Inka,true,true,Inka",
    "佐伯 遥斗,,true,true,遥斗",
    "陈思远,,true,true,思远",
    "김서준,,false,false,서준",
    "Ólafur,,true,true,Ólafur"
  })
  void strangers_see_no_surname_of_a_minor_or_of_somebody_not_listed(
      String name, String publicName, boolean listed, boolean minor, String shown) {
    assertEquals(
        shown, ShownName.of(name, java.util.Optional.ofNullable(publicName), listed, minor));
  }

  @ParameterizedTest
  @CsvSource({
    "İdil Yıldıztepe,idil yildiztepe",
    "Łucja,lucja",
    "Jón Þór,jon thor",
    "Søren Æbelø,soren aebelo",
    "Nguyễn Thị,nguyen thi",
    "김서준,김서준",
    "Θεανώ,θεανω",
    "Straße,strasse"
  })
  void a_name_is_found_without_its_accents(String name, String folded) {
    assertEquals(folded, NameFold.of(name));
  }

  @Test
  void folded_names_of_the_demo_event_are_as_long_as_typing_needs()
      throws IOException, FileProblems {
    List<String> empty =
        EventFile.read(DEMO).event().people().stream()
            .map(person -> NameFold.of(person.name()))
            .filter(String::isBlank)
            .toList();
    assertEquals(List.of(), empty);
  }
}
