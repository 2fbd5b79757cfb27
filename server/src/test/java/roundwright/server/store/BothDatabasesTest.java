package roundwright.server.store;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertFalse;
import static org.junit.jupiter.api.Assertions.assertThrows;
import static roundwright.server.store.schema.Tables.JOURNAL;

import io.zonky.test.db.postgres.embedded.EmbeddedPostgres;
import java.io.IOException;
import java.nio.file.Path;
import java.time.ZoneId;
import java.util.ArrayList;
import java.util.List;
import java.util.Optional;
import java.util.concurrent.ExecutionException;
import java.util.concurrent.ExecutorService;
import java.util.concurrent.Executors;
import java.util.concurrent.Future;
import java.util.stream.LongStream;
import org.junit.jupiter.api.AfterAll;
import org.junit.jupiter.api.BeforeAll;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.api.io.TempDir;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.ValueSource;
import roundwright.scheduling.file.EventFile;
import roundwright.scheduling.file.FileProblems;
import roundwright.server.PlainSearch;
import roundwright.server.Settings;
import roundwright.server.TestClock;
import roundwright.server.editions.EditionReads;
import roundwright.server.editions.PublicPage.LookUp;
import roundwright.server.event.EventReads;
import roundwright.server.event.EventWrites;
import roundwright.server.ids.DraftId;
import roundwright.server.ids.EventId;
import roundwright.server.planning.PlanningReads;
import roundwright.server.planning.PlanningWrites;
import roundwright.server.planning.SolveRuns;
import roundwright.server.web.Visitor.EventName;

/** The same work on H2 and on PostgreSQL comes to the same. */
class BothDatabasesTest {
  @TempDir static Path folder;
  private static EmbeddedPostgres server;
  private static Database h2;
  private static Database postgres;

  @BeforeAll
  static void openBoth() throws IOException {
    h2 = Database.open(Settings.h2Url(folder.resolve("both")), "sa", "", new TestClock());
    server = EmbeddedPostgres.builder().start();
    postgres =
        Database.open(
            "jdbc:postgresql://localhost:" + server.getPort() + "/postgres",
            "postgres",
            "postgres",
            new TestClock());
  }

  @AfterAll
  static void closeBoth() throws IOException {
    h2.close();
    postgres.close();
    server.close();
  }

  private static Database database(String name) {
    return name.equals("h2") ? h2 : postgres;
  }

  /** Everything that the pages read of an event brought in, planned and published. */
  private static List<Object> read(Database database) throws IOException, FileProblems {
    EventFile file = EventFile.read(Path.of("../demo-event/event.json"));
    EventId id = new EventWrites(database).importEvent("alike", file);
    EventName event = new EventName(id, "alike", "Alike", ZoneId.of("Europe/London"));
    try (SolveRuns runs = new SolveRuns(database, PlainSearch::plan, EventReads::event)) {
      assertEquals(
          SolveRuns.Asked.TAKEN,
          runs.ask(new DraftId(id, 1), 0, 1, Optional.of(3L), Optional.empty()));
      PlanningReads planning = new PlanningReads(database);
      while (planning
          .planPage(event, Optional.empty(), Optional.empty())
          .orElseThrow()
          .solve()
          .underWay()) {
        Thread.onSpinWait();
      }
      List<Object> read = new ArrayList<>();
      var plan = planning.planPage(event, Optional.empty(), Optional.empty()).orElseThrow();
      assertFalse(plan.lanes().down().isEmpty());
      read.add(plan.lanes());
      read.add(plan.findings());
      read.add(planning.publishPage(event, Optional.empty()).orElseThrow().changed());
      new PlanningWrites(database).publish(new DraftId(id, 1), 1, Optional.empty());
      EditionReads editions = new EditionReads(database);
      read.add(editions.publicPage(event, Optional.empty(), LookUp.NOTHING));
      read.add(editions.own(event, "p001"));
      read.add(editions.own(event, "p013"));
      read.add(editions.found(event, "p001"));
      read.add(editions.board(event, "great-floor"));
      read.add(editions.lookUp(id, "ild", "ild"));
      String group = plan.lanes().down().get(0).group();
      read.add(
          planning
              .crewsPage(event, Optional.empty(), Optional.empty(), Optional.of(group))
              .orElseThrow()
              .chosen());
      return read;
    }
  }

  @Test
  void every_page_reads_the_same_from_both() throws IOException, FileProblems {
    List<Object> fromH2 = read(h2);
    List<Object> fromPostgres = read(postgres);
    for (int i = 0; i < fromH2.size(); i++) {
      assertEquals(fromH2.get(i), fromPostgres.get(i), "reading " + i);
    }
  }

  @ParameterizedTest
  @ValueSource(strings = {"h2", "postgres"})
  void changes_made_at_once_are_numbered_without_a_hole(String name)
      throws IOException, FileProblems, InterruptedException, ExecutionException {
    Database database = database(name);
    EventId event =
        new EventWrites(database)
            .importEvent("busy", EventFile.read(Path.of("../demo-event/event.json")));
    ExecutorService many = Executors.newFixedThreadPool(8);
    List<Future<Long>> noted = new ArrayList<>();
    for (int i = 0; i < 100; i++) {
      String subject = "change " + i;
      noted.add(many.submit(() -> database.write(tx -> Journal.note(tx, event, "test", subject))));
    }
    for (Future<Long> one : noted) {
      one.get();
    }
    many.shutdown();
    List<Long> numbers =
        database.read(
            tx ->
                tx.sql()
                    .select(JOURNAL.NUMBER)
                    .from(JOURNAL)
                    .where(JOURNAL.EVENT_ID.eq(event.number()))
                    .orderBy(JOURNAL.NUMBER)
                    .fetch(JOURNAL.NUMBER));
    assertEquals(LongStream.rangeClosed(1, 101).boxed().toList(), numbers);
    long newest = database.read(tx -> Journal.newest(tx, event));
    assertEquals(101, newest);
  }

  @ParameterizedTest
  @ValueSource(strings = {"h2", "postgres"})
  void a_change_that_fails_leaves_nothing_behind(String name) throws IOException, FileProblems {
    Database database = database(name);
    EventId event =
        new EventWrites(database)
            .importEvent("failing", EventFile.read(Path.of("../demo-event/event.json")));
    assertThrows(
        IllegalStateException.class,
        () ->
            database.change(
                tx -> {
                  Journal.note(tx, event, "test", "half");
                  throw new IllegalStateException("in the middle");
                }));
    long newest = database.read(tx -> Journal.newest(tx, event));
    assertEquals(1, newest);
  }
}
