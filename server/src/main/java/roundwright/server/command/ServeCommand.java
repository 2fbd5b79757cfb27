package roundwright.server.command;

import java.io.IOException;
import java.net.URI;
import java.nio.file.Path;
import java.time.Clock;
import java.util.Optional;
import java.util.concurrent.Callable;
import java.util.concurrent.CountDownLatch;
import picocli.CommandLine.Command;
import picocli.CommandLine.Mixin;
import picocli.CommandLine.Model.CommandSpec;
import picocli.CommandLine.Option;
import picocli.CommandLine.Spec;
import roundwright.scheduling.Planner;
import roundwright.server.App;
import roundwright.server.Settings;

/** Serves until it is told to stop. */
@Command(
    name = "serve",
    mixinStandardHelpOptions = true,
    description = "Serves the pages. The first start prints a link that makes your account.")
final class ServeCommand implements Callable<Integer> {
  @Option(
      names = "--host",
      description = "Address to listen on (default: ${DEFAULT-VALUE}, this machine only).",
      defaultValue = Settings.LOOPBACK)
  private String host;

  @Option(
      names = "--port",
      description = "Port to listen on, 0 for any that is free (default: ${DEFAULT-VALUE}).",
      defaultValue = "" + Settings.DEFAULT_PORT)
  private int port;

  @Mixin private DatabaseOptions database;

  @Option(
      names = "--public-address",
      paramLabel = "URL",
      description = "How browsers reach the server where a proxy stands before it.")
  private URI publicAddress;

  @Option(
      names = "--dev",
      paramLabel = "ROOT",
      description = "Source folder whose templates and static files are read afresh each time.")
  private Path devRoot;

  @Spec private CommandSpec spec;

  @Override
  public Integer call() throws IOException, InterruptedException {
    Settings settings =
        new Settings(
            host,
            port,
            Optional.ofNullable(publicAddress),
            database.url(),
            database.user(),
            database.password(),
            devRoot == null ? Optional.empty() : Optional.of(devRoot.toRealPath()),
            5,
            600);
    App app = App.start(settings, Planner::plan, Clock.systemUTC());
    spec.commandLine().getOut().println("Serving on " + app.url("/"));
    app.firstSetUpLink()
        .ifPresent(
            link ->
                spec.commandLine()
                    .getOut()
                    .println("Make your account once, by this link: " + link));
    spec.commandLine().getOut().flush();
    untilStopped(app);
    return 0;
  }

  /** Keeps serving until the process is asked to end, then ends gently. */
  static void untilStopped(App app) throws InterruptedException {
    CountDownLatch asked = new CountDownLatch(1);
    Thread stopping =
        new Thread(
            () -> {
              app.close();
              asked.countDown();
            },
            "stopping");
    Runtime.getRuntime().addShutdownHook(stopping);
    asked.await();
  }
}
