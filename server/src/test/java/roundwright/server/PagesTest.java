package roundwright.server;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertFalse;
import static org.junit.jupiter.api.Assertions.assertTrue;

import ch.qos.logback.classic.Level;
import ch.qos.logback.classic.Logger;
import ch.qos.logback.classic.spi.ILoggingEvent;
import ch.qos.logback.core.read.ListAppender;
import java.io.IOException;
import java.net.http.HttpResponse;
import java.nio.file.Path;
import java.util.List;
import java.util.Map;
import java.util.Optional;
import java.util.concurrent.CountDownLatch;
import java.util.concurrent.TimeUnit;
import java.util.concurrent.atomic.AtomicReference;
import org.junit.jupiter.api.BeforeAll;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.api.extension.RegisterExtension;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.CsvSource;
import org.slf4j.LoggerFactory;
import roundwright.scheduling.Effort;
import roundwright.scheduling.Progress;
import roundwright.scheduling.file.EventFile;
import roundwright.scheduling.file.FileProblems;
import roundwright.scheduling.model.Event;
import roundwright.scheduling.model.Plan;
import roundwright.server.account.AccountWrites;
import roundwright.server.event.EventWrites;
import roundwright.server.ids.DraftId;
import roundwright.server.ids.EventId;
import roundwright.server.ids.PersonId;
import roundwright.server.planning.PlanningWrites;
import roundwright.server.planning.SolveRuns;

/** Each page as a page, as a fragment and by plain forms, on a real server and database. */
class PagesTest {
  /** Holds searches while it is set, so that a page can be seen with one under way. */
  private static final AtomicReference<CountDownLatch> HELD =
      new AtomicReference<>(new CountDownLatch(0));

  @RegisterExtension static final Served SERVED = new Served(PagesTest::search);

  private static Browser organiser;
  private static Browser phone;
  private static EventId ready;

  private static Plan search(Event event, Effort effort, Progress progress) {
    Plan found = PlainSearch.plan(event, effort, progress);
    try {
      while (!progress.stopWanted()) {
        if (HELD.get().await(20, TimeUnit.MILLISECONDS)) {
          break;
        }
      }
    } catch (InterruptedException e) {
      throw new AssertionError(e);
    }
    return found;
  }

  @BeforeAll
  static void fill() throws IOException, FileProblems, InterruptedException {
    organiser = SERVED.hostBrowser();
    EventFile file = EventFile.read(Path.of("../demo-event/event.json"));
    EventWrites events = new EventWrites(SERVED.app().database());
    events.importEvent("fresh", file);
    events.importEvent("held", file);
    ready = events.importEvent("ready", file);
    DraftId draft = new DraftId(ready, 1);
    assertEquals(
        SolveRuns.Asked.TAKEN,
        SERVED.app().solveRuns().ask(draft, 0, 1, Optional.of(1L), Optional.empty()));
    ended("ready");
    new PlanningWrites(SERVED.app().database()).publish(draft, 1, Optional.empty());
    String link =
        new AccountWrites(SERVED.app().database())
            .personalLink(
                new PersonId(ready, "p001"), SERVED.clock().instant().plusSeconds(86_400));
    phone = SERVED.browser();
    phone.get("/link/" + link);
  }

  private static String ended(String event) throws InterruptedException {
    for (int i = 0; i < 500; i++) {
      String body = organiser.get("/events/" + event + "/plan").body();
      if (!body.contains("data-hx-trigger=\"every 1s\"") && body.contains("ticket-lane")) {
        return body;
      }
      Thread.sleep(20);
    }
    throw new AssertionError("The search did not end");
  }

  @ParameterizedTest
  @CsvSource({
    "/events/ready",
    "/events/ready?day=2027-05-16",
    "/events/ready?day=nonsense&name=an",
    "/events/ready?name=mar",
    "/events/ready/people/p001",
    "/events/ready/halls/great-floor",
    "/events/fresh",
    "/events/fresh/halls/great-floor"
  })
  void a_public_page_opens_for_a_stranger(String path) {
    HttpResponse<String> page = SERVED.browser().get(path);
    assertEquals(200, page.statusCode());
    assertTrue(page.body().startsWith("<!doctype html>"), page.body());
    assertFalse(page.headers().firstValue("Set-Cookie").isPresent(), "a cookie for a stranger");
  }

  @ParameterizedTest
  @CsvSource({
    "/events/none",
    "/events/ready/people/nobody",
    "/events/ready/halls/cellar",
    "/events/ready/plan?draft=9",
    "/events/ready/plan?draft=x",
    "/events/ready/crews?group=g-none",
    "/nothing"
  })
  void what_is_not_there_is_a_page_that_says_so(String path) {
    HttpResponse<String> page = organiser.get(path);
    assertEquals(404, page.statusCode());
    assertTrue(page.body().contains("There is no such page"), page.body());
    assertFalse(page.body().contains("Exception"), page.body());
  }

  @ParameterizedTest
  @CsvSource({
    "/events/ready/plan,ticket-lane",
    "/events/ready/plan?draft=1&day=2027-05-16,lane-axis",
    "/events/ready/crews,group-list",
    "/events/ready/publish,name=\"version\"",
    "/events/fresh/plan,Nothing is planned yet",
    "/events/fresh/crews,no groups",
    "/events,Quillhaven Spring Solve"
  })
  void an_organisers_page_opens_with_what_it_is_for(String path, String shows) {
    HttpResponse<String> page = organiser.get(path);
    assertEquals(200, page.statusCode());
    assertTrue(
        page.body()
            .toLowerCase(java.util.Locale.ROOT)
            .contains(shows.toLowerCase(java.util.Locale.ROOT)),
        page.body());
  }

  @Test
  void before_anything_is_planned_there_is_nothing_to_publish() {
    HttpResponse<String> page = organiser.get("/events/fresh/publish");
    assertEquals(303, page.statusCode());
    assertEquals("/events/fresh/plan", page.headers().firstValue("Location").orElseThrow());
  }

  @Test
  void htmx_gets_the_fragment_alone() {
    HttpResponse<String> found = SERVED.browser().fragment("/events/ready?name=mar");
    assertTrue(found.body().strip().startsWith("<section class=\"found\""), found.body());
    HttpResponse<String> board = SERVED.browser().fragment("/events/ready/halls/great-floor");
    assertTrue(board.body().strip().startsWith("<main"), board.body());
    assertEquals("HX-Request", board.headers().firstValue("Vary").orElseThrow());
    HttpResponse<String> restored =
        SERVED
            .browser()
            .get(
                "/events/ready?name=mar",
                "HX-Request",
                "true",
                "HX-History-Restore-Request",
                "true");
    assertTrue(restored.body().startsWith("<!doctype html>"));
  }

  @Test
  void a_name_is_looked_up_by_three_letters_and_without_accents() {
    Browser stranger = SERVED.browser();
    assertFalse(stranger.get("/events/ready?name=yi").body().contains("/people/"));
    String hits = stranger.get("/events/ready?name=yildiz").body();
    assertTrue(hits.contains("/events/ready/people/p002"), hits);
  }

  @Test
  void a_pocket_page_shows_the_whole_day_to_its_owner() {
    HttpResponse<String> page = phone.get("/events/ready/my/p001");
    assertEquals(200, page.statusCode());
    assertTrue(page.body().contains("<time"), page.body());
    assertEquals("no-store", page.headers().firstValue("Cache-Control").orElseThrow());
  }

  @Test
  void by_plain_forms_a_search_is_begun_followed_and_stopped() throws InterruptedException {
    HELD.set(new CountDownLatch(1));
    String plan = "/events/held/plan";
    HttpResponse<String> begun =
        organiser.submit(plan, "/events/held/solve", Map.of("seconds", "60", "version", "0"));
    assertEquals(303, begun.statusCode());
    assertEquals(plan, begun.headers().firstValue("Location").orElseThrow());
    String page = organiser.get(plan).body();
    assertTrue(page.contains("data-hx-trigger=\"every 1s\""), page);
    assertTrue(page.contains("/events/held/solve/stop"), page);

    HttpResponse<String> second =
        organiser.submit(plan, "/events/held/solve", Map.of("seconds", "60", "version", "0"));
    assertEquals(409, second.statusCode());
    HttpResponse<String> panel = organiser.fragment("/events/held/solve");
    assertTrue(panel.body().strip().startsWith("<section"), panel.body());
    assertTrue(panel.headers().firstValue("HX-Refresh").isEmpty());

    HttpResponse<String> stopped = organiser.submit(plan, "/events/held/solve/stop", Map.of());
    assertEquals(303, stopped.statusCode());
    String after = ended("held");
    assertTrue(after.contains("ticket-lane"), "the best so far is kept");
    assertEquals(
        "true",
        organiser
            .fragment("/events/held/solve")
            .headers()
            .firstValue("HX-Refresh")
            .orElse("nothing"),
        "a panel that was under way loads the lanes anew");
    HELD.get().countDown();

    HttpResponse<String> published =
        organiser.submit("/events/held/publish", "/events/held/publish", Map.of("version", "1"));
    assertEquals(303, published.statusCode());
    assertTrue(SERVED.browser().get("/events/held").body().contains("Edition 1"));
    assertEquals(
        409,
        organiser
            .submit("/events/held/publish", "/events/held/publish", Map.of("version", "0"))
            .statusCode());
  }

  @ParameterizedTest
  @CsvSource({"0", "601", "ten", "''", "-5", "1e1", "99999999999"})
  void a_search_of_no_sensible_length_is_refused_where_it_was_asked_for(String seconds) {
    HttpResponse<String> answer =
        organiser.submit(
            "/events/fresh/plan",
            "/events/fresh/solve",
            Map.of("seconds", seconds, "version", "0"));
    assertEquals(422, answer.statusCode());
    assertTrue(answer.body().contains("id=\"solve\""), answer.body());
    assertTrue(answer.body().contains("field-error"), answer.body());
  }

  @Test
  void a_new_draft_is_a_copy_and_has_its_own_address() {
    HttpResponse<String> made =
        organiser.submit(
            "/events/ready/plan",
            "/events/ready/drafts",
            Map.of("draft", "1", "name", "Library later"));
    assertEquals(303, made.statusCode());
    String path = made.headers().firstValue("Location").orElseThrow();
    assertTrue(path.startsWith("/events/ready/plan?draft="), path);
    assertTrue(organiser.get(path).body().contains("Library later"));
  }

  /** Three at most, and one that tells who asks; a look-up of names is one by itself. */
  @ParameterizedTest
  @CsvSource({
    "/events/ready,3",
    "/events/ready?name=mar,4",
    "/events/ready/people/p001,3",
    "/events/ready/my/p001,3",
    "/events/ready/halls/great-floor,3",
    "/events/ready/plan?draft=1,4",
    "/events/ready/crews?draft=1,4",
    "/events/ready/publish?draft=1,4",
    "/static/css/tokens.css,0",
    "/sign-in,0"
  })
  void a_page_needs_few_queries(String path, int most) {
    Logger queries = (Logger) LoggerFactory.getLogger("org.jooq.tools.LoggerListener");
    ListAppender<ILoggingEvent> seen = new ListAppender<>();
    seen.start();
    queries.setLevel(Level.DEBUG);
    queries.setAdditive(false);
    queries.addAppender(seen);
    try {
      Browser browser = path.contains("/my/") ? phone : organiser;
      assertEquals(200, browser.get(path).statusCode());
    } finally {
      queries.detachAppender(seen);
      queries.setLevel(null);
      queries.setAdditive(true);
    }
    List<String> run =
        seen.list.stream()
            .map(ILoggingEvent::getFormattedMessage)
            .filter(line -> line.startsWith("Executing query"))
            .toList();
    assertTrue(most == 0 ? run.isEmpty() : !run.isEmpty(), "counted " + run.size());
    assertTrue(run.size() <= most, run.size() + " queries: " + run);
  }
}
