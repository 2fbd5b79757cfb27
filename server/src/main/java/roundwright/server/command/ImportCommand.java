package roundwright.server.command;

import java.io.IOException;
import java.nio.file.Files;
import java.nio.file.Path;
import java.time.Clock;
import java.util.concurrent.Callable;
import picocli.CommandLine.Command;
import picocli.CommandLine.Mixin;
import picocli.CommandLine.Model.CommandSpec;
import picocli.CommandLine.Option;
import picocli.CommandLine.Parameters;
import picocli.CommandLine.Spec;
import roundwright.scheduling.file.EventFile;
import roundwright.scheduling.file.FileProblems;
import roundwright.server.event.CsvProblems;
import roundwright.server.event.EventCsv;
import roundwright.server.event.EventWrites;
import roundwright.server.store.Database;

/** Brings an event into a server's database. */
@Command(
    name = "import",
    mixinStandardHelpOptions = true,
    description = {
      "Brings an event into a server's database.",
      "The embedded database must not be in use: stop the server first."
    })
final class ImportCommand implements Callable<Integer> {
  @Parameters(paramLabel = "EVENT", description = "An event file, or a folder of tables (CSV).")
  private Path event;

  @Option(
      names = "--as",
      required = true,
      paramLabel = "NAME",
      description = "The event's name in addresses: small letters, digits and hyphens.")
  private String name;

  @Mixin private DatabaseOptions database;

  @Spec private CommandSpec spec;

  @Override
  public Integer call() throws Refusal {
    if (!name.matches("[a-z0-9][a-z0-9-]{0,59}")) {
      throw new Refusal(
          "--as "
              + name
              + ": use small letters, digits and hyphens, 60 at most, such as spring-27");
    }
    EventFile file = read();
    try (Database open =
        Database.open(database.url(), database.user(), database.password(), Clock.systemUTC())) {
      new EventWrites(open).importEvent(name, file);
    }
    spec.commandLine()
        .getOut()
        .println(
            file.event().name()
                + " is in, with "
                + file.event().people().size()
                + " people. Start the server and open /events/"
                + name
                + "/plan");
    spec.commandLine().getOut().flush();
    return 0;
  }

  private EventFile read() throws Refusal {
    try {
      return Files.isDirectory(event) ? EventCsv.read(event) : EventFile.read(event);
    } catch (FileProblems problems) {
      throw Refusal.of(event, problems);
    } catch (CsvProblems problems) {
      throw new Refusal(problems.getMessage());
    } catch (IOException unreadable) {
      throw Refusal.unreadable(event, unreadable);
    }
  }
}
