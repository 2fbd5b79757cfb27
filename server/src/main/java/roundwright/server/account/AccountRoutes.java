package roundwright.server.account;

import static io.javalin.http.HttpStatus.UNPROCESSABLE_CONTENT;

import io.javalin.http.Context;
import io.javalin.http.NotFoundResponse;
import java.time.Clock;
import java.time.Duration;
import java.time.Instant;
import java.util.Optional;
import roundwright.server.account.AccountReads.Credentials;
import roundwright.server.account.AccountReads.LinkTarget;
import roundwright.server.ids.AccountId;
import roundwright.server.web.Access;
import roundwright.server.web.Form;
import roundwright.server.web.Html;
import roundwright.server.web.View;
import roundwright.server.web.Visitor;

/** Set-up, sign-in, sign-out, and the door that personal links open. */
public final class AccountRoutes {
  private static final int NAME_LETTERS = 200;

  private final AccountReads reads;
  private final AccountWrites writes;
  private final Access access;
  private final Html html;
  private final Clock clock;

  public AccountRoutes(
      AccountReads reads, AccountWrites writes, Access access, Html html, Clock clock) {
    this.reads = reads;
    this.writes = writes;
    this.access = access;
    this.html = html;
    this.clock = clock;
  }

  /** GET /setup/{token} */
  public void showSetUp(Context ctx) {
    requireOpenSetUp(ctx);
    html.show(ctx, setUpView(new Form(ctx)));
  }

  /** POST /setup/{token} */
  public void setUp(Context ctx) {
    String token = requireOpenSetUp(ctx);
    Form form = new Form(ctx);
    String name = form.line("name", NAME_LETTERS);
    String password = form.typed("password");
    String complaint = Passwords.complaint(password, name);
    if (!complaint.isEmpty()) {
      form.errors().add("password", complaint, Passwords.FEWEST_LETTERS, Passwords.MOST_LETTERS);
    }
    if (!form.errors().none()) {
      html.show(ctx, UNPROCESSABLE_CONTENT, setUpView(form));
      return;
    }
    AccountId account =
        writes.setUp(token, name, Passwords.hash(password)).orElseThrow(NotFoundResponse::new);
    enter(ctx, account, "/events");
  }

  private String requireOpenSetUp(Context ctx) {
    String token = ctx.pathParam("token");
    if (!reads.setUpOpen(token)) {
      throw new NotFoundResponse();
    }
    return token;
  }

  private static View setUpView(Form form) {
    return View.of("account/set-up")
        .with("errors", form.errors())
        .with("name", form.typed("name"))
        .with("fewestLetters", Passwords.FEWEST_LETTERS);
  }

  /** GET /sign-in */
  public void showSignIn(Context ctx) {
    String next = ctx.queryParam("next");
    html.show(ctx, signInView(new Form(ctx), next == null ? "" : next));
  }

  /** POST /sign-in */
  public void signIn(Context ctx) {
    Form form = new Form(ctx);
    String name = form.line("name", NAME_LETTERS);
    String password = form.typed("password");
    if (password.isEmpty()) {
      form.errors().add("password", "form.missing.password");
    }
    if (form.errors().none()) {
      Optional<AccountId> account = authenticated(form, name, password);
      if (account.isPresent()) {
        enter(ctx, account.get(), ownPath(form.typed("next")));
        return;
      }
    }
    html.show(ctx, UNPROCESSABLE_CONTENT, signInView(form, form.typed("next")));
  }

  /** Unknown name and wrong password look and take the same. */
  private Optional<AccountId> authenticated(Form form, String name, String password) {
    Optional<Credentials> known = reads.credentials(name);
    Instant now = clock.instant();
    Optional<Instant> waitUntil =
        known.flatMap(Credentials::nextTryAt).filter(until -> until.isAfter(now));
    boolean fits = Passwords.fits(password, known.map(Credentials::passwordHash).orElse(null));
    if (waitUntil.isPresent()) {
      long seconds = 1 + Duration.between(now, waitUntil.get()).toSeconds();
      form.errors().add("password", "account.sign-in.wait", seconds);
      return Optional.empty();
    }
    if (!fits) {
      known.ifPresent(account -> writes.noteFailure(account.id()));
      form.errors().add("password", "account.sign-in.wrong");
      return Optional.empty();
    }
    return known.map(Credentials::id);
  }

  private static View signInView(Form form, String next) {
    return View.of("account/sign-in")
        .with("errors", form.errors())
        .with("name", form.typed("name"))
        .with("next", ownPath(next));
  }

  /** A path of this server's, or the list of events: nobody is sent elsewhere by a link of ours. */
  static String ownPath(String path) {
    return path.matches("/[A-Za-z0-9][A-Za-z0-9/_-]*") ? path : "/events";
  }

  private void enter(Context ctx, AccountId account, String path) {
    access.heldSession(ctx).ifPresent(writes::endSession);
    access.signIn(
        ctx, writes.beginSession(account), Math.toIntExact(AccountWrites.SESSION.toSeconds()));
    Html.leaveFor(ctx, path);
  }

  /** POST /sign-out */
  public void signOut(Context ctx) {
    access.heldSession(ctx).ifPresent(writes::endSession);
    access.signOut(ctx);
    Html.leaveFor(ctx, "/sign-in");
  }

  /** GET /events: the organiser's own. */
  public void showEvents(Context ctx) {
    Visitor.Account account = Access.visitor(ctx).account().orElseThrow();
    html.show(ctx, View.of("account/events").with("events", reads.ownEvents(account)));
  }

  /** GET /link/{token}: trades a personal link for a cookie and a clean address. */
  public void openLink(Context ctx) {
    String token = ctx.pathParam("token");
    LinkTarget target = reads.linkTarget(token).orElseThrow(NotFoundResponse::new);
    long seconds = Duration.between(clock.instant(), target.endsAt()).toSeconds();
    access.keepLink(ctx, token, Math.toIntExact(Math.max(1, Math.min(seconds, 400L * 86_400))));
    ctx.header("Cache-Control", "no-store");
    Html.leaveFor(ctx, "/events/" + target.eventSlug() + "/my/" + target.person().code());
  }
}
