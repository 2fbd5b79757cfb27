package roundwright.server;

import static roundwright.server.web.Access.Role.ORGANISER;
import static roundwright.server.web.Access.Role.PERSON;
import static roundwright.server.web.Access.Role.PUBLIC;
import static roundwright.server.web.Access.Role.SIGNED_IN;
import static roundwright.server.web.Route.get;
import static roundwright.server.web.Route.post;

import io.javalin.Javalin;
import io.javalin.config.JavalinConfig;
import io.javalin.http.Context;
import io.javalin.http.HandlerType;
import io.javalin.security.RouteRole;
import java.time.Clock;
import java.util.List;
import java.util.Optional;
import org.eclipse.jetty.http.UriCompliance;
import org.eclipse.jetty.server.handler.ErrorHandler;
import roundwright.server.account.AccountReads;
import roundwright.server.account.AccountRoutes;
import roundwright.server.account.AccountWrites;
import roundwright.server.editions.EditionReads;
import roundwright.server.editions.EditionRoutes;
import roundwright.server.event.EventReads;
import roundwright.server.event.EventRoutes;
import roundwright.server.planning.PlanningReads;
import roundwright.server.planning.PlanningRoutes;
import roundwright.server.planning.PlanningWrites;
import roundwright.server.planning.Search;
import roundwright.server.planning.SolveRuns;
import roundwright.server.store.Database;
import roundwright.server.web.Access;
import roundwright.server.web.Assets;
import roundwright.server.web.Cookies;
import roundwright.server.web.ErrorPages;
import roundwright.server.web.Guard;
import roundwright.server.web.Html;
import roundwright.server.web.Messages;
import roundwright.server.web.RateLimit;
import roundwright.server.web.Route;

/** The running server: its parts put together, and every route it has. */
public final class App implements AutoCloseable {
  private static final long MOST_BODY_BYTES = 256 * 1024;

  /** A hall of 500 phones may look up at once from behind one address. */
  private static final double LOOK_UPS_AT_ONCE = 500;

  private static final double LOOK_UPS_PER_SECOND = 5;

  private final Settings settings;
  private final Database database;
  private final AccountWrites accountWrites;
  private final SolveRuns solveRuns;
  private final List<Route> routes;
  private final Javalin javalin;

  private App(Settings settings, Search search, Clock clock) {
    this.settings = settings;
    this.database =
        Database.open(
            settings.databaseUrl(), settings.databaseUser(), settings.databasePassword(), clock);
    Cookies cookies = new Cookies(settings.address());
    Guard guard = new Guard(settings.address(), cookies);
    Assets assets = new Assets(settings.devRoot());
    Html html = new Html(new Messages(settings.devRoot()), assets, guard, settings.devRoot());
    AccountReads accountReads = new AccountReads(database);
    this.accountWrites = new AccountWrites(database);
    Access access = new Access(accountReads, cookies);
    AccountRoutes account = new AccountRoutes(accountReads, accountWrites, access, html, clock);
    EventRoutes event = new EventRoutes(database);
    EditionRoutes edition =
        new EditionRoutes(
            new EditionReads(database),
            html,
            new RateLimit(clock, LOOK_UPS_AT_ONCE, LOOK_UPS_PER_SECOND));
    this.solveRuns = new SolveRuns(database, search, EventReads::event);
    solveRuns.markInterrupted(settings.embedded());
    PlanningRoutes planning =
        new PlanningRoutes(
            new PlanningReads(database),
            new PlanningWrites(database),
            solveRuns,
            html,
            settings.solveSeconds());
    this.routes =
        List.of(
            get("/", App::front, PUBLIC),
            get("/health", ctx -> ctx.result("ready"), PUBLIC),
            get(Assets.PATH + "<name>", assets::serve, PUBLIC),
            get("/setup/{token}", account::showSetUp, PUBLIC),
            post("/setup/{token}", account::setUp, PUBLIC),
            get("/sign-in", account::showSignIn, PUBLIC),
            post("/sign-in", account::signIn, PUBLIC),
            post("/sign-out", account::signOut, SIGNED_IN),
            get("/events", account::showEvents, SIGNED_IN),
            get("/link/{token}", account::openLink, PUBLIC),
            get("/events/{event}", edition::showEvent, PUBLIC),
            get("/events/{event}/people/{person}", edition::showFound, PUBLIC),
            get("/events/{event}/my/{person}", edition::showPocket, PERSON),
            get("/events/{event}/halls/{hall}", edition::showBoard, PUBLIC),
            get("/events/{event}/event.json", event::export, ORGANISER),
            get("/events/{event}/plan", planning::showPlan, ORGANISER),
            post("/events/{event}/drafts", planning::makeDraft, ORGANISER),
            get("/events/{event}/solve", planning::showSolve, ORGANISER),
            post("/events/{event}/solve", planning::solve, ORGANISER),
            post("/events/{event}/solve/stop", planning::stopSolve, ORGANISER),
            get("/events/{event}/crews", planning::showCrews, ORGANISER),
            get("/events/{event}/publish", planning::checkPublish, ORGANISER),
            post("/events/{event}/publish", planning::publish, ORGANISER));
    this.javalin = Javalin.create(config -> configure(config, access, guard, html));
  }

  /**
   * Opens the database and begins to listen.
   *
   * @param search finds the plans
   * @throws IllegalStateException with a plain sentence where either cannot be done
   */
  public static App start(Settings settings, Search search, Clock clock) {
    App app = new App(settings, search, clock);
    try {
      app.javalin.start(settings.host(), settings.port());
    } catch (RuntimeException e) {
      app.database.close();
      throw new IllegalStateException(
          "Port "
              + settings.port()
              + " on "
              + settings.host()
              + " cannot be listened on. Another program may hold it; choose one with --port, 0"
              + " for any that is free.",
          e);
    }
    return app;
  }

  private void configure(JavalinConfig config, Access access, Guard guard, Html html) {
    config.startup.showJavalinBanner = false;
    config.startup.showOldJavalinVersionWarning = false;
    config.startup.startupWatcherEnabled = false;
    config.http.prefer405over404 = true;
    config.http.maxRequestSize = MOST_BODY_BYTES;
    config.jetty.modifyHttpConfiguration(http -> http.setUriCompliance(UriCompliance.DEFAULT));
    config.jetty.modifyServer(
        server -> {
          server.setStopTimeout(settings.stopSeconds() * 1000L);
          ErrorHandler bare = new ErrorHandler();
          bare.setShowStacks(false);
          bare.setShowCauses(false);
          bare.setShowMessageInTitle(false);
          server.setErrorHandler(bare);
        });
    config.routes.before(guard::check);
    config.routes.beforeMatched(access::check);
    for (Route route : routes) {
      RouteRole[] roles = route.roles().toArray(RouteRole[]::new);
      config.routes.addHttpHandler(route.method(), route.path(), route.handler(), roles);
      if (route.method().equals(HandlerType.GET)) {
        // Without a handler of its own a HEAD would be answered without asking who may.
        config.routes.addHttpHandler(HandlerType.HEAD, route.path(), route.handler(), roles);
      }
    }
    new ErrorPages(html).register(config.routes);
  }

  private static void front(Context ctx) {
    Html.leaveFor(ctx, "/events");
  }

  /** Every route there is, for whoever checks them all. */
  public List<Route> routes() {
    return routes;
  }

  public Database database() {
    return database;
  }

  /** Where searches are asked for. */
  public SolveRuns solveRuns() {
    return solveRuns;
  }

  public int port() {
    return javalin.port();
  }

  /** How this machine's browser reaches a path of the server's. */
  public String url(String path) {
    return settings
            .publicAddress()
            .map(Object::toString)
            .orElse("http://" + settings.host() + ":" + port())
        + path;
  }

  /** The single-use link for the first account, where there is no account yet. */
  public Optional<String> firstSetUpLink() {
    return accountWrites.firstSetUpToken().map(token -> url("/setup/" + token));
  }

  /** Ends what is under way, then lets the database go. */
  @Override
  public void close() {
    javalin.stop();
    solveRuns.close();
    database.close();
  }
}
