package roundwright.server.demo;

import java.io.IOException;
import java.io.InputStream;
import java.nio.charset.StandardCharsets;
import java.time.Duration;
import java.time.Instant;
import java.util.HashMap;
import java.util.List;
import java.util.Map;
import java.util.Optional;
import java.util.function.Consumer;
import java.util.function.Predicate;
import roundwright.scheduling.file.EventFile;
import roundwright.scheduling.model.Event;
import roundwright.scheduling.model.Person;
import roundwright.scheduling.model.Window;
import roundwright.server.App;
import roundwright.server.account.AccountWrites;
import roundwright.server.editions.EditionReads;
import roundwright.server.event.CsvProblems;
import roundwright.server.event.EventCsv;
import roundwright.server.event.EventReads;
import roundwright.server.event.EventWrites;
import roundwright.server.ids.DraftId;
import roundwright.server.ids.EventId;
import roundwright.server.ids.PersonId;
import roundwright.server.planning.PlanPage;
import roundwright.server.planning.PlanPage.Score;
import roundwright.server.planning.PlanPage.SolvePanel;
import roundwright.server.planning.PlanningReads;
import roundwright.server.planning.PlanningWrites;
import roundwright.server.planning.SolveRuns;
import roundwright.server.web.Visitor.EventName;

/**
 * Quillhaven Spring Solve on a running server: brought in, planned by the same search that the
 * organiser's page starts, and published.
 */
public final class Demo {
  /** The event's name in addresses. */
  public static final String SLUG = "quillhaven";

  private static final String FOLDER = "demo-event/";
  private static final Duration LINKS_AFTER_EVENT = Duration.ofDays(7);
  private static final long LOOK_MILLIS = 500;

  private final App app;
  private final Consumer<String> say;

  /**
   * A demo.
   *
   * @param say takes the lines that tell how far it is
   */
  public Demo(App app, Consumer<String> say) {
    this.app = app;
    this.say = say;
  }

  /** Addresses worth opening, as paths on the server. */
  public record Addresses(String publicPage, String competitor, String crewMember, String board) {}

  /**
   * Does all of it, leaving out what the database has from an earlier time.
   *
   * @param seconds that the search may take
   * @throws IllegalStateException where the search ends without a plan
   */
  public Addresses run(int seconds, long seed) throws IOException, InterruptedException {
    EventName event =
        app.database().read(tx -> EventReads.named(tx, SLUG)).orElseGet(this::bringIn);
    PlanningReads planning = new PlanningReads(app.database());
    PlanPage before = planning.planPage(event, Optional.empty(), Optional.empty()).orElseThrow();
    if (before.score().isEmpty()) {
      plan(event, planning, seconds, seed);
    }
    PlanPage page = planning.planPage(event, Optional.empty(), Optional.empty()).orElseThrow();
    tell(page.score().orElseThrow());
    if (page.draft().publishedEdition() == 0) {
      int edition =
          new PlanningWrites(app.database())
              .publish(draft(event, page), page.draft().version(), Optional.empty());
      say.accept("Published as edition " + edition + ".");
    }
    return addresses(event);
  }

  private EventName bringIn() {
    EventFile file;
    try {
      file = read();
    } catch (IOException e) {
      throw new IllegalStateException("The demo event cannot be read from the jar", e);
    }
    Event event = file.event();
    EventId id = new EventWrites(app.database()).importEvent(SLUG, file);
    say.accept(
        event.name()
            + ": "
            + event.people().size()
            + " people, "
            + event.disciplines().size()
            + " disciplines, "
            + event.venues().stream().mapToInt(venue -> venue.halls().size()).sum()
            + " halls in "
            + event.venues().size()
            + " venues.");
    return new EventName(id, SLUG, event.name(), event.zone());
  }

  /** The demo event as its tables in the jar have it. */
  public static EventFile read() throws IOException {
    Map<String, String> texts = new HashMap<>();
    for (String name : EventCsv.files()) {
      try (InputStream in = Demo.class.getClassLoader().getResourceAsStream(FOLDER + name)) {
        if (in != null) {
          texts.put(name, new String(in.readAllBytes(), StandardCharsets.UTF_8));
        }
      }
    }
    try {
      return EventCsv.read(texts);
    } catch (CsvProblems e) {
      throw new IOException(e.getMessage(), e);
    }
  }

  private static DraftId draft(EventName event, PlanPage page) {
    return new DraftId(event.id(), page.draft().number());
  }

  private void plan(EventName event, PlanningReads planning, int seconds, long seed)
      throws InterruptedException {
    PlanPage page = planning.planPage(event, Optional.empty(), Optional.empty()).orElseThrow();
    say.accept("Planning for " + seconds + " seconds, seed " + seed + ":");
    SolveRuns.Asked asked =
        app.solveRuns()
            .ask(
                draft(event, page),
                page.draft().version(),
                seconds,
                Optional.of(seed),
                Optional.empty());
    if (asked != SolveRuns.Asked.TAKEN) {
      throw new IllegalStateException("The search could not begin: " + asked);
    }
    String told = "";
    SolvePanel panel;
    do {
      Thread.sleep(LOOK_MILLIS);
      panel = planning.planPage(event, Optional.empty(), Optional.empty()).orElseThrow().solve();
      String line = line(panel);
      if (!line.equals(told) && panel.underWay()) {
        say.accept(line);
        told = line;
      }
    } while (panel.underWay());
    if (panel.state().equals("refused") || panel.state().equals("interrupted")) {
      throw new IllegalStateException(
          "The search ended without a plan (" + panel.trouble() + "); the log says more");
    }
  }

  private static String line(SolvePanel panel) {
    return panel
        .best()
        .map(
            best ->
                String.format(
                    "  %3d s  %d breaches, %d gaps, strain %s",
                    panel.elapsedSeconds().longValue(),
                    best.breaches(),
                    best.gaps(),
                    rounded(best)))
        .orElse("  looking for a first plan");
  }

  private static String rounded(Score score) {
    return score.strain().setScale(1, java.math.RoundingMode.HALF_UP).toPlainString();
  }

  private void tell(Score score) {
    say.accept(
        "The plan: "
            + score.breaches()
            + " breaches, "
            + score.gaps()
            + " gaps, strain "
            + rounded(score)
            + ".");
  }

  private Addresses addresses(EventName event) {
    Event model = app.database().read(tx -> EventReads.event(tx, event.id()));
    Instant end =
        model.venues().stream()
            .flatMap(venue -> venue.halls().stream())
            .flatMap(hall -> hall.open().stream())
            .map(Window::to)
            .max(Instant::compareTo)
            .orElseThrow()
            .plus(LINKS_AFTER_EVENT);
    String hall = model.venues().get(0).halls().get(0).id();
    return new Addresses(
        "/events/" + SLUG,
        link(event, model.people(), person -> !person.entries().isEmpty(), end),
        link(event, model.people(), person -> person.entries().isEmpty(), end),
        "/events/" + SLUG + "/halls/" + hall);
  }

  /** A personal link of the first fitting person who has anything to do. */
  private String link(
      EventName event, List<Person> people, Predicate<Person> fitting, Instant end) {
    EditionReads editions = new EditionReads(app.database());
    String person =
        people.stream()
            .filter(fitting)
            .map(Person::id)
            .filter(id -> !editions.own(event, id).orElseThrow().nothingAtAll())
            .findFirst()
            .orElse(people.get(0).id());
    String token =
        new AccountWrites(app.database()).personalLink(new PersonId(event.id(), person), end);
    return "/link/" + token;
  }
}
