package roundwright.server.command;

import java.io.PrintWriter;
import java.nio.file.Path;
import java.util.List;
import java.util.concurrent.Callable;
import picocli.CommandLine.Command;
import picocli.CommandLine.Model.CommandSpec;
import picocli.CommandLine.Parameters;
import picocli.CommandLine.Spec;
import roundwright.scheduling.advice.Impossible;
import roundwright.scheduling.model.Event;

/** Says what stands in the way of an event, and what would help. */
@Command(
    name = "advise",
    mixinStandardHelpOptions = true,
    sortOptions = false,
    header = "Says what stands in the way of an event, and what would help.",
    description = {"What no plan for the event can do, with people, times and the remedy."},
    exitCodeListHeading = "%nExit codes:%n",
    exitCodeList = {
      "0:nothing stands in the way",
      "1:something does; it is told",
      "2:a file is wrong"
    },
    footer = {"", "Example: roundwright advise event.json"})
final class AdviseCommand implements Callable<Integer> {
  @Parameters(index = "0", paramLabel = "EVENT.json", description = "The event file.")
  private Path eventFile;

  @Spec private CommandSpec spec;

  @Override
  public Integer call() throws Refusal {
    Event event = Given.event(eventFile);
    PrintWriter out = spec.commandLine().getOut();
    List<Impossible> impossible = Impossible.of(event);
    if (impossible.isEmpty()) {
      out.println("Nothing is known that would keep a plan from doing all that is asked.");
    } else {
      out.println("Whatever is planned, some of this cannot be done:");
      impossible.forEach(one -> out.println("  " + one.says()));
    }
    out.flush();
    return impossible.isEmpty() ? 0 : 1;
  }
}
