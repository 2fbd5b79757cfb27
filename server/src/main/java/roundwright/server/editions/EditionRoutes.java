package roundwright.server.editions;

import io.javalin.http.Context;
import io.javalin.http.HttpResponseException;
import io.javalin.http.HttpStatus;
import io.javalin.http.NotFoundResponse;
import java.time.LocalDate;
import java.util.Optional;
import roundwright.server.editions.PublicPage.LookUp;
import roundwright.server.ticket.NameFold;
import roundwright.server.web.Access;
import roundwright.server.web.Html;
import roundwright.server.web.Query;
import roundwright.server.web.RateLimit;
import roundwright.server.web.View;
import roundwright.server.web.Visitor.EventName;

/** What competitors, crew and the hall see. */
public final class EditionRoutes {
  private static final int MOST_LETTERS = 100;

  private final EditionReads reads;
  private final Html html;
  private final RateLimit lookUps;

  public EditionRoutes(EditionReads reads, Html html, RateLimit lookUps) {
    this.reads = reads;
    this.html = html;
    this.lookUps = lookUps;
  }

  /** GET /events/{event}: the public page, with {@code day} and {@code name} asked for. */
  public void showEvent(Context ctx) {
    EventName event = Access.visitor(ctx).eventName();
    Optional<LocalDate> day = Query.day(ctx, "day");
    html.show(
        ctx,
        View.of("editions/event")
            .with("page", reads.publicPage(event, day, lookUp(ctx, event)))
            .orFragment("found"));
  }

  private LookUp lookUp(Context ctx, EventName event) {
    String typed = Optional.ofNullable(ctx.queryParam("name")).orElse("").strip();
    String asked = typed.substring(0, Math.min(typed.length(), MOST_LETTERS));
    String folded = NameFold.of(asked);
    long letters = folded.codePoints().filter(Character::isLetter).count();
    if (letters < LookUp.FEWEST_LETTERS) {
      return new LookUp(asked, java.util.List.of(), false);
    }
    if (!lookUps.allows(ctx.ip())) {
      throw new HttpResponseException(HttpStatus.TOO_MANY_REQUESTS.getCode());
    }
    return reads.lookUp(event.id(), asked, folded);
  }

  /** GET /events/{event}/people/{person}: somebody's days as strangers may see them. */
  public void showFound(Context ctx) {
    EventName event = Access.visitor(ctx).eventName();
    PersonPage page =
        reads.found(event, ctx.pathParam("person")).orElseThrow(NotFoundResponse::new);
    html.show(ctx, View.of("editions/person").with("page", page));
  }

  /** GET /events/{event}/my/{person}: the pocket page. */
  public void showPocket(Context ctx) {
    EventName event = Access.visitor(ctx).eventName();
    PersonPage page = reads.own(event, ctx.pathParam("person")).orElseThrow(NotFoundResponse::new);
    html.show(ctx, View.of("editions/person").with("page", page));
  }

  /** GET /events/{event}/halls/{hall}: a hall's board. */
  public void showBoard(Context ctx) {
    EventName event = Access.visitor(ctx).eventName();
    Board board = reads.board(event, ctx.pathParam("hall")).orElseThrow(NotFoundResponse::new);
    html.show(ctx, View.of("editions/board").with("page", board).orFragment("board"));
  }
}
