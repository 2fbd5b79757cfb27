package roundwright.server.planning;

import static io.javalin.http.HttpStatus.CONFLICT;
import static io.javalin.http.HttpStatus.UNPROCESSABLE_CONTENT;

import io.javalin.http.Context;
import io.javalin.http.HttpStatus;
import io.javalin.http.NotFoundResponse;
import java.util.Optional;
import roundwright.server.ids.DraftId;
import roundwright.server.web.Access;
import roundwright.server.web.Form;
import roundwright.server.web.Html;
import roundwright.server.web.Query;
import roundwright.server.web.View;
import roundwright.server.web.Visitor;
import roundwright.server.web.Visitor.EventName;

/**
 * The organiser's day plan: drafts, searches, crews, publishing. All of it is about one draft: that
 * numbered by {@code draft} in the query or form, else the newest.
 */
public final class PlanningRoutes {
  private static final int LEAST_SECONDS = 1;
  private static final int MOST_NAME_LETTERS = 200;

  private final PlanningReads reads;
  private final PlanningWrites writes;
  private final SolveRuns runs;
  private final Html html;
  private final int mostSeconds;

  /**
   * The routes.
   *
   * @param mostSeconds that one search may take
   */
  public PlanningRoutes(
      PlanningReads reads, PlanningWrites writes, SolveRuns runs, Html html, int mostSeconds) {
    this.reads = reads;
    this.writes = writes;
    this.runs = runs;
    this.html = html;
    this.mostSeconds = mostSeconds;
  }

  private static EventName event(Context ctx) {
    return Access.visitor(ctx).eventName();
  }

  /** The number of the draft asked for; whatever is no number names no draft. */
  private static Optional<Integer> draftNumber(Context ctx) {
    String asked = ctx.queryParam("draft");
    if (asked == null) {
      asked = ctx.formParam("draft");
    }
    if (asked == null || asked.isEmpty()) {
      return Optional.empty();
    }
    if (!asked.matches("[1-9][0-9]{0,8}")) {
      throw new NotFoundResponse();
    }
    return Optional.of(Integer.parseInt(asked));
  }

  /** The draft asked for, else the newest, else the one that the first change makes. */
  private DraftId draft(Context ctx) {
    EventName event = event(ctx);
    int number =
        draftNumber(ctx).or(() -> reads.newestDraft(event.id())).orElse(PlanningWrites.FIRST);
    return new DraftId(event.id(), number);
  }

  private String planPath(Context ctx) {
    String path = "/events/" + event(ctx).slug() + "/plan";
    return draftNumber(ctx).map(number -> path + "?draft=" + number).orElse(path);
  }

  /** GET /events/{event}/plan: the day plan. */
  public void showPlan(Context ctx) {
    html.show(ctx, planView(ctx, ""));
  }

  private View planView(Context ctx, String trouble) {
    PlanPage page =
        reads
            .planPage(event(ctx), draftNumber(ctx), Query.day(ctx, "day"))
            .orElseThrow(NotFoundResponse::new);
    return View.of("planning/plan")
        .with("page", trouble.isEmpty() ? page : page.withTrouble(trouble))
        .orFragment("solve");
  }

  /** POST /events/{event}/drafts: a new draft, as the one asked for or with nothing planned. */
  public void makeDraft(Context ctx) {
    Visitor visitor = Access.visitor(ctx);
    Form form = new Form(ctx);
    String name = form.typed("name").strip();
    Optional<DraftId> copied =
        draftNumber(ctx).map(number -> new DraftId(visitor.eventId(), number));
    int letters = Math.min(name.length(), MOST_NAME_LETTERS);
    DraftId draft =
        writes.newDraft(
            visitor.eventId(),
            name.substring(0, letters),
            copied,
            Optional.of(visitor.accountId()));
    Html.leaveFor(ctx, "/events/" + visitor.eventName().slug() + "/plan?draft=" + draft.number());
  }

  /** POST /events/{event}/solve: begins a search. */
  public void solve(Context ctx) {
    DraftId draft = draft(ctx);
    Form form = new Form(ctx);
    int seconds = form.whole("seconds", LEAST_SECONDS, mostSeconds);
    int version = form.whole("version", 0, Integer.MAX_VALUE);
    Optional<Long> seed =
        form.typed("seed").isBlank()
            ? Optional.empty()
            : Optional.of((long) form.whole("seed", 0, Integer.MAX_VALUE));
    if (!form.errors().none()) {
      refuse(ctx, UNPROCESSABLE_CONTENT, "seconds");
      return;
    }
    SolveRuns.Asked asked =
        runs.ask(draft, version, seconds, seed, Optional.of(Access.visitor(ctx).accountId()));
    switch (asked) {
      case TAKEN -> answerWithPanel(ctx);
      case ONE_IS_UNDER_WAY -> refuse(ctx, CONFLICT, "one");
      case TOO_MANY -> refuse(ctx, CONFLICT, "busy");
    }
  }

  private void refuse(Context ctx, HttpStatus status, String trouble) {
    html.show(ctx, status, planView(ctx, trouble));
  }

  private void answerWithPanel(Context ctx) {
    if (Html.wantsFragment(ctx)) {
      html.show(ctx, planView(ctx, ""));
    } else {
      Html.leaveFor(ctx, planPath(ctx));
    }
  }

  /** GET /events/{event}/solve: how far the search is, for the panel that follows itself. */
  public void showSolve(Context ctx) {
    if (!Html.wantsFragment(ctx)) {
      Html.leaveFor(ctx, planPath(ctx));
      return;
    }
    View view = planView(ctx, "");
    if (!((PlanPage) view.model().get("page")).solve().underWay()) {
      // Only a panel under way asks; now that it has ended, lanes and findings are others too.
      ctx.header("HX-Refresh", "true");
    }
    html.show(ctx, view);
  }

  /** POST /events/{event}/solve/stop: the best so far is kept. */
  public void stopSolve(Context ctx) {
    runs.stop(draft(ctx));
    answerWithPanel(ctx);
  }

  /** GET /events/{event}/crews: a day's groups, and one of them with everybody in it. */
  public void showCrews(Context ctx) {
    html.show(
        ctx,
        View.of("planning/crews")
            .with(
                "page",
                reads
                    .crewsPage(
                        event(ctx),
                        draftNumber(ctx),
                        Query.day(ctx, "day"),
                        Optional.ofNullable(ctx.queryParam("group")))
                    .orElseThrow(NotFoundResponse::new)));
  }

  /** GET /events/{event}/publish: what publishing would do, to be checked. */
  public void checkPublish(Context ctx) {
    Optional<PlanPage.PublishPage> page = reads.publishPage(event(ctx), draftNumber(ctx));
    if (page.isEmpty()) {
      Html.leaveFor(ctx, planPath(ctx));
      return;
    }
    html.show(ctx, View.of("planning/publish").with("page", page.get()));
  }

  /** POST /events/{event}/publish */
  public void publish(Context ctx) {
    int version = new Form(ctx).whole("version", 0, Integer.MAX_VALUE);
    writes.publish(draft(ctx), version, Optional.of(Access.visitor(ctx).accountId()));
    Html.leaveFor(ctx, planPath(ctx));
  }
}
