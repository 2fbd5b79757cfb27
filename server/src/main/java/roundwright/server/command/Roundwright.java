package roundwright.server.command;

import picocli.CommandLine;
import picocli.CommandLine.Command;

/** The command that all others belong to. */
@Command(
    name = "roundwright",
    mixinStandardHelpOptions = true,
    version = "Roundwright 0.1.0",
    synopsisSubcommandLabel = "COMMAND",
    description = "Plans, publishes and runs the day of a speed-solving competition.",
    subcommands = {ServeCommand.class})
public final class Roundwright {
  private Roundwright() {}

  /** The command line with every command there is; errors are one line, never a trace. */
  public static CommandLine commandLine() {
    CommandLine line = new CommandLine(new Roundwright());
    line.setExecutionExceptionHandler(
        (e, command, parsed) -> {
          command.getErr().println("roundwright: " + e.getMessage());
          return 2;
        });
    return line;
  }
}
