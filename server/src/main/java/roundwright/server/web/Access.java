package roundwright.server.web;

import io.javalin.http.Context;
import io.javalin.http.ForbiddenResponse;
import io.javalin.http.HandlerType;
import io.javalin.http.NotFoundResponse;
import io.javalin.security.RouteRole;
import java.net.URLEncoder;
import java.nio.charset.StandardCharsets;
import java.util.ArrayList;
import java.util.Arrays;
import java.util.List;
import java.util.Optional;
import java.util.Set;

/**
 * Decides, before any handler runs, whether whoever asks may have a route. Routes with an {@code
 * {event}} in their path are only ever open for an event that exists.
 */
public final class Access {
  /** Who may use a route. Every route names at least one. */
  public enum Role implements RouteRole {
    /** Everybody. */
    PUBLIC,
    /** Whoever holds the personal link of the {@code {person}} in the path. */
    PERSON,
    /** Whoever has signed in to an account. */
    SIGNED_IN,
    /** An organiser of the {@code {event}} in the path. */
    ORGANISER
  }

  /** Looks up who is behind a request; given by whoever keeps the accounts. */
  public interface Visitors {
    /**
     * Finds them.
     *
     * @param sessionToken of an account's session, as the browser sent it
     * @param linkTokens of personal links, as the browser sent them
     * @param eventSlug the event in the request's path
     * @param personCode the person in the request's path
     */
    Visitor find(
        Optional<String> sessionToken,
        List<String> linkTokens,
        Optional<String> eventSlug,
        Optional<String> personCode);
  }

  private static final String SESSION = "rw-session";
  private static final String LINKS = "rw-links";
  private static final String VISITOR = "visitor";
  private static final int MOST_LINKS = 8;

  private final Visitors visitors;
  private final Cookies cookies;

  public Access(Visitors visitors, Cookies cookies) {
    this.visitors = visitors;
    this.cookies = cookies;
  }

  /** Who is behind the request; {@link Visitor#NOBODY} where no route has been matched. */
  public static Visitor visitor(Context ctx) {
    Visitor visitor = ctx.attribute(VISITOR);
    return visitor == null ? Visitor.NOBODY : visitor;
  }

  /** To be run before every matched handler. */
  public void check(Context ctx) {
    Set<RouteRole> roles = ctx.routeRoles();
    boolean nobodyAsks = roles.contains(Role.PUBLIC) && pathPart(ctx, "event").isEmpty();
    Visitor visitor =
        nobodyAsks
            ? Visitor.NOBODY
            : visitors.find(
                sessionToken(ctx),
                linkTokens(ctx),
                pathPart(ctx, "event"),
                pathPart(ctx, "person"));
    ctx.attribute(VISITOR, visitor);
    if (!roles.contains(Role.PUBLIC)) {
      ctx.header("Cache-Control", "no-store");
    }
    if (allowed(ctx, roles, visitor)) {
      return;
    }
    if (visitor.account().isEmpty() && !roles.contains(Role.PERSON)) {
      askToSignIn(ctx);
      return;
    }
    throw pathPart(ctx, "event").isPresent() && visitor.event().isEmpty()
        ? new NotFoundResponse()
        : new ForbiddenResponse();
  }

  private static boolean allowed(Context ctx, Set<RouteRole> roles, Visitor visitor) {
    if (pathPart(ctx, "event").isPresent() && visitor.event().isEmpty()) {
      if (roles.contains(Role.PUBLIC)) {
        throw new NotFoundResponse();
      }
      return false;
    }
    return roles.contains(Role.PUBLIC)
        || (roles.contains(Role.SIGNED_IN) && visitor.account().isPresent())
        || (roles.contains(Role.ORGANISER) && visitor.organiser())
        || (roles.contains(Role.PERSON) && visitor.person().isPresent());
  }

  private static void askToSignIn(Context ctx) {
    boolean reading = ctx.method().equals(HandlerType.GET) || ctx.method().equals(HandlerType.HEAD);
    String target =
        reading && !Html.wantsFragment(ctx)
            ? "/sign-in?next=" + URLEncoder.encode(ctx.path(), StandardCharsets.UTF_8)
            : "/sign-in";
    Html.leaveFor(ctx, target);
    ctx.skipRemainingHandlers();
  }

  private static Optional<String> pathPart(Context ctx, String name) {
    return Optional.ofNullable(ctx.pathParamMap().get(name));
  }

  private Optional<String> sessionToken(Context ctx) {
    return cookies.read(ctx, SESSION);
  }

  private List<String> linkTokens(Context ctx) {
    return cookies
        .read(ctx, LINKS)
        .map(joined -> Arrays.stream(joined.split("\\.", -1)).limit(MOST_LINKS).toList())
        .orElse(List.of());
  }

  /** Lets the browser hold an account's session from now on. */
  public void signIn(Context ctx, String sessionToken, int seconds) {
    cookies.write(ctx, SESSION, sessionToken, seconds);
  }

  public void signOut(Context ctx) {
    cookies.remove(ctx, SESSION);
  }

  /** The session token the browser holds, for whoever ends the session. */
  public Optional<String> heldSession(Context ctx) {
    return sessionToken(ctx);
  }

  /** Lets the browser hold a personal link beside those it has, the oldest making room. */
  public void keepLink(Context ctx, String linkToken, int seconds) {
    List<String> links = new ArrayList<>(linkTokens(ctx));
    links.remove(linkToken);
    links.add(linkToken);
    cookies.write(
        ctx,
        LINKS,
        String.join(".", links.subList(Math.max(0, links.size() - MOST_LINKS), links.size())),
        seconds);
  }
}
