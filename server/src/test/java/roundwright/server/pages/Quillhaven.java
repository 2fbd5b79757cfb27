package roundwright.server.pages;

import java.io.IOException;
import java.nio.file.Files;
import java.nio.file.Path;
import java.time.Duration;
import java.time.Instant;
import java.util.Map;
import java.util.Optional;
import java.util.concurrent.CountDownLatch;
import java.util.concurrent.TimeUnit;
import java.util.concurrent.atomic.AtomicReference;
import org.junit.jupiter.api.extension.AfterAllCallback;
import org.junit.jupiter.api.extension.BeforeAllCallback;
import org.junit.jupiter.api.extension.ExtensionContext;
import roundwright.scheduling.Effort;
import roundwright.scheduling.Planner;
import roundwright.scheduling.Progress;
import roundwright.scheduling.audit.Auditor;
import roundwright.scheduling.cost.Cost;
import roundwright.scheduling.file.EventFile;
import roundwright.scheduling.file.PlanFile;
import roundwright.scheduling.model.Event;
import roundwright.scheduling.model.Plan;
import roundwright.server.App;
import roundwright.server.Browser;
import roundwright.server.Served;
import roundwright.server.account.AccountWrites;
import roundwright.server.event.EventWrites;
import roundwright.server.ids.EventId;
import roundwright.server.ids.PersonId;

/**
 * A real server with the demo event in it, planned as {@code demo-plan.json} has it and published
 * as edition 1; and beside it the same event with nothing planned, and once more with a search that
 * stays under way. It is 10:41 on the event's first morning.
 *
 * <p>The plan is the engine's own; {@code -Droundwright.rewrite=true} has it made anew.
 */
public final class Quillhaven implements BeforeAllCallback, AfterAllCallback {
  public static final String SLUG = "quillhaven";
  public static final String UNPLANNED = "quillhaven-unplanned";
  public static final String SEARCHING = "quillhaven-searching";

  private static final Path EVENT = Path.of("../demo-event/event.json");
  private static final Path PLAN = Path.of("src/test/resources/demo-plan.json");
  private static final Instant MORNING = Instant.parse("2027-05-15T09:41:00Z");
  private static final int STEPS = 3_000_000;

  private final AtomicReference<Plan> plan = new AtomicReference<>();
  private final CountDownLatch over = new CountDownLatch(1);
  private volatile boolean waits;
  private final Served served = new Served(this::search);
  private final Served fresh = new Served();
  private Browser organiser;
  private Browser competitor;
  private String pocketLink;

  @Override
  public void beforeAll(ExtensionContext context) throws Exception {
    Event event = EventFile.read(EVENT).event();
    if (Boolean.getBoolean("roundwright.rewrite")) {
      Plan fresh = Planner.plan(event, Effort.ofSteps(STEPS), Progress.NONE);
      new PlanFile(new Plan(fresh.groups(), Optional.empty(), java.util.List.of()))
          .write(PLAN, event);
    }
    plan.set(PlanFile.read(PLAN, event).plan());
    Cost cost = new Auditor(event).price(plan.get());
    if (cost.breaches() > 0 || cost.gaps() > 0) {
      throw new AssertionError(
          PLAN
              + " no longer fits the demo event: "
              + cost
              + ". Run with -Droundwright.rewrite=true");
    }
    served.beforeAll(context);
    fresh.beforeAll(context);
    served.later(Duration.between(served.clock().instant(), MORNING));
    organiser = served.hostBrowser();
    EventWrites events = new EventWrites(app().database());
    EventId planned = events.importEvent(SLUG, EventFile.read(EVENT));
    events.importEvent(UNPLANNED, EventFile.read(EVENT));
    events.importEvent(SEARCHING, EventFile.read(EVENT));
    planAndPublish();
    AccountWrites accounts = new AccountWrites(app().database());
    pocketLink =
        app()
            .url(
                "/link/"
                    + accounts.personalLink(
                        new PersonId(planned, "p015"), MORNING.plus(Duration.ofDays(9))));
    competitor = served.browser();
    competitor.get(pocketLink.substring(pocketLink.indexOf("/link/")));
  }

  private Plan search(Event event, Effort effort, Progress progress) {
    Plan found = plan.get();
    Cost best = new Auditor(event).price(found);
    progress.report(
        new Progress.Report(
            Progress.Stage.CREWING, best, 1.5, 1_000, java.util.List.of("unfilled")));
    try {
      while (waits && !progress.stopWanted() && !over.await(20, TimeUnit.MILLISECONDS)) {
        Thread.onSpinWait();
      }
    } catch (InterruptedException e) {
      Thread.currentThread().interrupt();
    }
    return new Plan(found.groups(), Optional.of(best), new Auditor(event).audit(found).findings());
  }

  private void planAndPublish() {
    solve(SLUG);
    String publish = "/events/" + SLUG + "/publish";
    await(publish, 200);
    int status = organiser.submit(publish, publish, Map.of("version", "1")).statusCode();
    if (status != 303) {
      throw new AssertionError("Publishing gave " + status);
    }
  }

  private void solve(String slug) {
    String page = "/events/" + slug + "/plan";
    int status =
        organiser
            .submit(page, "/events/" + slug + "/solve", Map.of("seconds", "20", "version", "0"))
            .statusCode();
    if (status != 303) {
      throw new AssertionError("Planning " + slug + " gave " + status);
    }
  }

  private void await(String path, int status) {
    for (int i = 0; i < 500; i++) {
      if (organiser.get(path).statusCode() == status) {
        return;
      }
      try {
        Thread.sleep(20);
      } catch (InterruptedException e) {
        throw new AssertionError(e);
      }
    }
    throw new AssertionError(path + " never gave " + status);
  }

  @Override
  public void afterAll(ExtensionContext context) throws IOException {
    over.countDown();
    served.afterAll(context);
    fresh.afterAll(context);
  }

  /** Has a search under way that stays so until the server ends. */
  void beginLastingSearch() {
    waits = true;
    solve(SEARCHING);
  }

  /** Lets the next searches find their plan at once, or only when they are told to stop. */
  public void searchesWait(boolean wait) {
    waits = wait;
  }

  public App app() {
    return served.app();
  }

  public String root() {
    return "http://127.0.0.1:" + app().port();
  }

  /** A browser without scripts in which a sample's viewer is known. */
  Browser browserOf(Sample sample) {
    if (sample.path().equals(Sample.SET_UP)) {
      return fresh.browser();
    }
    return switch (sample.viewer()) {
      case ORGANISER -> organiser;
      case COMPETITOR -> competitor;
      case ANYBODY -> served.browser();
    };
  }

  /** The personal link of somebody with much to do. */
  public String pocketLink() {
    return pocketLink;
  }

  /** The first start's single-use link of a server without accounts. */
  String setUpLink() {
    return fresh.app().firstSetUpLink().orElseThrow();
  }

  /** The address of a sample. */
  String address(Sample sample) {
    return switch (sample.path()) {
      case Sample.SET_UP -> setUpLink();
      default -> root() + sample.path().replace(Sample.A_GROUP, plan.get().groups().get(0).id());
    };
  }

  /** A folder for this run's files. */
  public static Path target(String folder) throws IOException {
    return Files.createDirectories(Path.of("target").resolve(folder));
  }
}
