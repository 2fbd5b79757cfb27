package roundwright.server.command;

import java.io.IOException;
import java.io.PrintWriter;
import java.nio.file.Files;
import java.nio.file.Path;
import java.time.Clock;
import java.time.Duration;
import java.time.Instant;
import java.util.concurrent.Callable;
import picocli.CommandLine.Command;
import picocli.CommandLine.Model.CommandSpec;
import picocli.CommandLine.Option;
import picocli.CommandLine.Spec;
import roundwright.scheduling.Planner;
import roundwright.server.App;
import roundwright.server.Settings;
import roundwright.server.demo.Demo;

/** Shows the product on an invented event. */
@Command(
    name = "demo",
    mixinStandardHelpOptions = true,
    description =
        "Plans an invented event before your eyes, publishes it and serves it from this machine.")
final class DemoCommand implements Callable<Integer> {
  @Option(
      names = "--port",
      description = "Port to listen on, 0 for any that is free (default: ${DEFAULT-VALUE}).",
      defaultValue = "" + Settings.DEFAULT_PORT)
  private int port;

  @Option(
      names = "--database",
      paramLabel = "FILE",
      description = "Database to keep the event in (default: a new one that nobody keeps).")
  private Path database;

  @Option(
      names = "--seconds",
      description = "How long to plan (default: ${DEFAULT-VALUE}).",
      defaultValue = "30")
  private int seconds;

  @Option(
      names = "--seed",
      description = "Where chance begins (default: ${DEFAULT-VALUE}).",
      defaultValue = "1")
  private long seed;

  @Option(
      names = "--at",
      paramLabel = "INSTANT",
      description =
          "Pretend that it is that moment now, such as 2027-05-15T09:41:00Z, to see the day under"
              + " way.")
  private Instant at;

  @Option(
      names = "--dev",
      paramLabel = "ROOT",
      description = "Source folder whose templates and static files are read afresh each time.")
  private Path devRoot;

  @Spec private CommandSpec spec;

  @Override
  public Integer call() throws IOException, InterruptedException {
    PrintWriter out = spec.commandLine().getOut();
    Path file =
        database == null ? Files.createTempDirectory("roundwright-demo").resolve("demo") : database;
    Settings settings = Settings.local(file, port);
    if (devRoot != null) {
      settings = settings.withDevRoot(devRoot.toRealPath());
    }
    App app = App.start(settings, Planner::plan, clock());
    try {
      Demo.Addresses addresses =
          new Demo(
                  app,
                  line -> {
                    out.println(line);
                    out.flush();
                  })
              .run(seconds, seed);
      tell(out, app, addresses);
    } catch (RuntimeException | IOException e) {
      app.close();
      throw e;
    }
    ServeCommand.untilStopped(app);
    return 0;
  }

  private Clock clock() {
    Clock real = Clock.systemUTC();
    return at == null ? real : Clock.offset(real, Duration.between(real.instant(), at));
  }

  private static void tell(PrintWriter out, App app, Demo.Addresses addresses) {
    out.println();
    out.println("Open in a browser:");
    out.println("  public page     " + app.url(addresses.publicPage()));
    out.println("  a competitor    " + app.url(addresses.competitor()));
    out.println("  a crew member   " + app.url(addresses.crewMember()));
    out.println("  a hall's board  " + app.url(addresses.board()));
    app.firstSetUpLink()
        .ifPresentOrElse(
            link -> out.println("  the organiser   " + link + "  (works once)"),
            () -> out.println("  the organiser   " + app.url("/sign-in")));
    out.println();
    out.println("Ctrl-C ends it.");
    out.flush();
  }
}
