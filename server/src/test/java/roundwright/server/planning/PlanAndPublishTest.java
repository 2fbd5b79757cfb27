package roundwright.server.planning;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertFalse;
import static org.junit.jupiter.api.Assertions.assertThrows;
import static org.junit.jupiter.api.Assertions.assertTrue;
import static roundwright.server.store.schema.Tables.AUDIT;
import static roundwright.server.store.schema.Tables.JOURNAL;
import static roundwright.server.store.schema.Tables.PERSON;
import static roundwright.server.store.schema.Tables.PLAN;

import java.io.IOException;
import java.math.BigDecimal;
import java.nio.file.Path;
import java.time.LocalDate;
import java.time.ZoneId;
import java.util.List;
import java.util.Optional;
import java.util.concurrent.CountDownLatch;
import java.util.concurrent.Semaphore;
import java.util.concurrent.TimeUnit;
import org.junit.jupiter.api.AfterEach;
import org.junit.jupiter.api.BeforeEach;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.api.io.TempDir;
import roundwright.scheduling.Effort;
import roundwright.scheduling.Progress;
import roundwright.scheduling.cost.Cost;
import roundwright.scheduling.file.EventFile;
import roundwright.scheduling.file.FileProblems;
import roundwright.scheduling.model.Event;
import roundwright.scheduling.model.Plan;
import roundwright.server.PlainSearch;
import roundwright.server.Settings;
import roundwright.server.TestClock;
import roundwright.server.editions.Board;
import roundwright.server.editions.EditionReads;
import roundwright.server.editions.PersonPage;
import roundwright.server.editions.PublicPage;
import roundwright.server.event.EventReads;
import roundwright.server.event.EventWrites;
import roundwright.server.ids.DraftId;
import roundwright.server.ids.EventId;
import roundwright.server.planning.PlanPage.CrewsPage;
import roundwright.server.planning.PlanPage.PublishPage;
import roundwright.server.planning.PlanPage.SolvePanel;
import roundwright.server.store.Database;
import roundwright.server.store.StaleVersion;
import roundwright.server.web.Ticket;
import roundwright.server.web.Visitor.EventName;

/** From an event to its edition, behind the pages. */
class PlanAndPublishTest {
  private static final Path DEMO = Path.of("../demo-event/event.json");

  @TempDir Path folder;
  private final Gate gate = new Gate();
  private Database database;
  private SolveRuns runs;
  private PlanningReads reads;
  private PlanningWrites writes;
  private EventName event;
  private DraftId first;

  /** A search that waits until it is let through or told to stop. */
  private static final class Gate implements Search {
    final Semaphore open = new Semaphore(0);
    final CountDownLatch reached = new CountDownLatch(1);

    @Override
    public Plan plan(Event event, Effort effort, Progress progress) {
      PlainSearch.plan(event, effort, progress);
      reached.countDown();
      try {
        while (!open.tryAcquire(20, TimeUnit.MILLISECONDS)) {
          if (progress.stopWanted()) {
            break;
          }
        }
      } catch (InterruptedException e) {
        throw new AssertionError(e);
      }
      return PlainSearch.plan(event, effort, progress);
    }
  }

  @BeforeEach
  void open() throws IOException, FileProblems {
    database = Database.open(Settings.h2Url(folder.resolve("database")), "sa", "", new TestClock());
    runs = new SolveRuns(database, gate, EventReads::event);
    reads = new PlanningReads(database);
    writes = new PlanningWrites(database);
    EventId id = new EventWrites(database).importEvent("quillhaven", EventFile.read(DEMO));
    event = new EventName(id, "quillhaven", "Quillhaven Spring Solve", ZoneId.of("Europe/London"));
    first = new DraftId(id, 1);
  }

  @AfterEach
  void close() {
    runs.close();
    database.close();
  }

  private PlanPage page() {
    return reads.planPage(event, Optional.empty(), Optional.empty()).orElseThrow();
  }

  private SolvePanel ended() {
    for (int i = 0; i < 500; i++) {
      SolvePanel panel = page().solve();
      if (!panel.underWay()) {
        return panel;
      }
      try {
        Thread.sleep(20);
      } catch (InterruptedException e) {
        throw new AssertionError(e);
      }
    }
    throw new AssertionError("The search did not end: " + page().solve());
  }

  private void planned() {
    gate.open.release();
    assertEquals(SolveRuns.Asked.TAKEN, ask(page().draft().version()));
    assertEquals("done", ended().state());
  }

  private SolveRuns.Asked ask(int version) {
    return runs.ask(
        new DraftId(event.id(), page().draft().number()),
        version,
        5,
        Optional.empty(),
        Optional.empty());
  }

  @Test
  void before_anything_is_planned_the_page_shows_the_first_day_with_nothing_on_it() {
    PlanPage page = page();
    assertEquals(LocalDate.of(2027, 5, 15), page.day());
    assertEquals(List.of(), page.lanes().down());
    assertEquals("idle", page.solve().state());
    assertTrue(page.score().isEmpty());
    assertEquals(
        List.of("Great Floor", "Long Room", "Reading Room"),
        page.lanes().halls().stream().map(hall -> hall.name()).toList());
    assertEquals("UTC+1", page.lanes().utc());
  }

  @Test
  void a_search_fills_the_draft_and_says_what_it_found() {
    planned();
    PlanPage page = page();
    assertEquals(1, page.draft().number());
    assertEquals(1, page.draft().version());
    assertFalse(page.lanes().down().isEmpty());
    assertTrue(page.score().orElseThrow().gaps() > 0);
    assertEquals("gap", page.findings().get(0).level());
    Ticket ticket = page.lanes().down().get(0);
    assertEquals(1, ticket.gaps());
    assertEquals("judge", ticket.crew().get(0).role());
    assertEquals(1, ticket.crew().get(0).filled());
    assertEquals(List.of("unfilled"), page.solve().stillWrong());
  }

  @Test
  void while_one_search_is_under_way_the_event_takes_no_other() throws InterruptedException {
    ask(0);
    gate.reached.await();
    assertEquals(SolveRuns.Asked.ONE_IS_UNDER_WAY, ask(0));
    runs.stop(first);
    assertEquals("stopped", ended().state());
    assertFalse(page().lanes().down().isEmpty(), "the best so far is kept");
  }

  @Test
  void a_draft_changed_during_the_search_stays_and_the_find_becomes_a_draft_of_its_own()
      throws InterruptedException {
    ask(0);
    gate.reached.await();
    database.change(
        tx ->
            PlanningWrites.replacePlan(
                tx, first, 0, EventReads.event(tx, event.id()), Plan.EMPTY, Optional.empty()));
    gate.open.release();
    SolvePanel panel =
        waitFor(() -> reads.planPage(event, Optional.of(1), Optional.empty()).orElseThrow());
    assertEquals("own-draft", panel.trouble());
    assertEquals(2, page().draft().number());
    assertFalse(page().lanes().down().isEmpty());
    assertTrue(
        reads
            .planPage(event, Optional.of(1), Optional.empty())
            .orElseThrow()
            .lanes()
            .down()
            .isEmpty());
  }

  private static SolvePanel waitFor(java.util.function.Supplier<PlanPage> page)
      throws InterruptedException {
    for (int i = 0; i < 500; i++) {
      if (!page.get().solve().underWay()) {
        return page.get().solve();
      }
      Thread.sleep(20);
    }
    throw new AssertionError("The search did not end");
  }

  @Test
  void a_search_that_finds_a_worse_plan_leaves_the_better_one() {
    planned();
    List<Ticket> before = page().lanes().down();
    Search worse =
        (event, effort, progress) -> {
          Plan plan = PlainSearch.plan(event, effort, progress);
          return new Plan(
              plan.groups().subList(0, 3),
              Optional.of(new Cost(0, 10_000, BigDecimal.ZERO)),
              plan.findings());
        };
    try (SolveRuns hasty = new SolveRuns(database, worse, EventReads::event)) {
      hasty.ask(first, 1, 5, Optional.empty(), Optional.empty());
      assertEquals("no-better", ended().trouble());
    }
    assertEquals(before, page().lanes().down());
    assertEquals(1, page().draft().version());
  }

  @Test
  void a_search_that_fails_says_so_and_leaves_the_draft_as_it_was() {
    try (SolveRuns failing =
        new SolveRuns(
            database,
            (event, effort, progress) -> {
              throw new IllegalStateException("as a broken engine would");
            },
            EventReads::event)) {
      failing.ask(first, 0, 5, Optional.of(7L), Optional.empty());
      SolvePanel panel = ended();
      assertEquals("refused", panel.state());
      assertEquals("failed", panel.trouble());
      assertEquals(7, panel.seed());
      assertEquals(0, page().draft().version());
    }
  }

  @Test
  void a_search_cut_off_by_a_restart_is_marked_so_and_another_can_be_asked_for()
      throws InterruptedException {
    ask(0);
    gate.reached.await();
    runs.markInterrupted(true);
    assertEquals("interrupted", page().solve().state());
    assertEquals("restart", page().solve().trouble());
  }

  @Test
  void stopping_the_server_keeps_what_the_search_has() throws InterruptedException {
    ask(0);
    gate.reached.await();
    runs.close();
    assertEquals("stopped", page().solve().state());
    assertFalse(page().lanes().down().isEmpty());
  }

  @Test
  void a_search_asked_for_on_an_old_version_is_refused() {
    planned();
    assertThrows(StaleVersion.class, () -> ask(0));
  }

  @Test
  void an_edition_is_numbered_noted_and_never_changed_by_later_planning() {
    planned();
    PublishPage check = reads.publishPage(event, Optional.empty()).orElseThrow();
    assertEquals(1, check.edition());
    assertEquals(check.people(), check.changed(), "the first edition is new to everybody");
    assertEquals(1, writes.publish(first, 1, Optional.empty()));
    EditionReads editions = new EditionReads(database);
    PublicPage before = editions.publicPage(event, Optional.empty(), PublicPage.LookUp.NOTHING);
    assertEquals(1, before.edition().orElseThrow().number());
    assertTrue(page().draft().published());
    assertEquals(0, reads.publishPage(event, Optional.empty()).orElseThrow().changed());

    database.change(
        tx ->
            PlanningWrites.replacePlan(
                tx, first, 1, EventReads.event(tx, event.id()), Plan.EMPTY, Optional.empty()));
    PublicPage after = editions.publicPage(event, Optional.empty(), PublicPage.LookUp.NOTHING);
    assertEquals(before, after);
    assertFalse(page().draft().published());
    List<String> kinds =
        database.read(
            tx ->
                tx.sql()
                    .select(JOURNAL.KIND)
                    .from(JOURNAL)
                    .where(JOURNAL.EVENT_ID.eq(event.id().number()))
                    .orderBy(JOURNAL.NUMBER)
                    .fetch(JOURNAL.KIND));
    assertEquals(
        List.of(
            "event-imported", "draft-made", "draft-changed", "edition-published", "draft-changed"),
        kinds);
    int trail = database.read(tx -> tx.sql().fetchCount(AUDIT));
    assertEquals(kinds.size(), trail);
  }

  @Test
  void publishing_what_somebody_else_has_changed_is_refused() {
    planned();
    assertThrows(StaleVersion.class, () -> writes.publish(first, 0, Optional.empty()));
  }

  @Test
  void a_copied_draft_shares_its_plan_until_it_is_changed() {
    planned();
    int plans = database.read(tx -> tx.sql().fetchCount(PLAN));
    writes.newDraft(event.id(), "Library later", Optional.of(first), Optional.empty());
    int plansAfter = database.read(tx -> tx.sql().fetchCount(PLAN));
    assertEquals(plans, plansAfter);
    assertEquals("Library later", page().draft().name());
    assertEquals(2, page().drafts().size());
    assertFalse(page().lanes().down().isEmpty());
  }

  @Test
  void a_group_shows_its_crew_and_competitors_by_name() {
    planned();
    Ticket ticket = page().lanes().down().get(0);
    CrewsPage crews =
        reads
            .crewsPage(event, Optional.empty(), Optional.empty(), Optional.of(ticket.group()))
            .orElseThrow();
    assertEquals(ticket.competitors(), crews.chosen().orElseThrow().competitors().size());
    assertEquals(1, crews.chosen().orElseThrow().roles().get(0).people().size());
    assertTrue(
        reads
            .crewsPage(event, Optional.empty(), Optional.empty(), Optional.of("g-none"))
            .isEmpty());
  }

  @Test
  void a_person_finds_solving_and_duties_alike_in_order_of_time() {
    planned();
    writes.publish(first, 1, Optional.empty());
    EditionReads editions = new EditionReads(database);
    PersonPage own = editions.own(event, "p001").orElseThrow();
    assertEquals(1, own.edition());
    assertTrue(own.next().isPresent());
    List<PersonPage.Stop> stops = own.days().stream().flatMap(day -> day.stops().stream()).toList();
    for (int i = 1; i < stops.size(); i++) {
      assertFalse(stops.get(i).start().isBefore(stops.get(i - 1).start()));
    }
    assertTrue(
        stops.stream().anyMatch(stop -> stop.kind() == PersonPage.Kind.JUDGE)
            || own.next().get().kind() == PersonPage.Kind.JUDGE,
        "the plain search lets the first who can judge");
    assertTrue(editions.own(event, "nobody").isEmpty());
  }

  @Test
  void a_board_shows_the_coming_group_with_its_competitors() {
    planned();
    writes.publish(first, 1, Optional.empty());
    Board board = new EditionReads(database).board(event, "great-floor").orElseThrow();
    assertEquals(Ticket.State.NEXT, board.shown().orElseThrow().state());
    assertEquals(board.shown().get().competitors(), board.names().size());
    assertTrue(board.next().isPresent());
    assertTrue(new EditionReads(database).board(event, "cellar").isEmpty());
  }

  @Test
  void strangers_look_up_only_who_is_listed_and_at_most_ten() {
    EditionReads editions = new EditionReads(database);
    PublicPage.LookUp found = editions.lookUp(event.id(), "a", "a");
    assertEquals(10, found.hits().size());
    assertTrue(found.more());
    List<String> unlisted =
        database.read(
            tx -> tx.sql().fetch(PERSON, PERSON.LISTED.isFalse()).map(row -> row.getCode()));
    assertEquals(15, unlisted.size());
    for (String person : unlisted) {
      assertTrue(editions.found(event, person).isEmpty(), person);
      assertTrue(editions.own(event, person).isPresent(), person);
    }
  }
}
