package roundwright.server.command;

import java.io.PrintWriter;
import java.util.concurrent.Callable;
import picocli.CommandLine;
import picocli.CommandLine.Command;
import picocli.CommandLine.Model.CommandSpec;
import picocli.CommandLine.ParameterException;
import picocli.CommandLine.Spec;

/** The command that all others belong to. */
@Command(
    name = "roundwright",
    mixinStandardHelpOptions = true,
    version = "Roundwright 0.1.0",
    synopsisSubcommandLabel = "COMMAND",
    description = "Plans, publishes and runs the day of a speed-solving competition.",
    commandListHeading = "%nCommands:%n",
    subcommands = {
      PlanCommand.class,
      CheckCommand.class,
      RepairCommand.class,
      ForecastCommand.class,
      AdviseCommand.class,
      WhyCommand.class,
      ImportCommand.class,
      ServeCommand.class,
      DemoCommand.class
    },
    footer = {
      "",
      "Each command tells more: roundwright plan --help",
      "A first look: roundwright demo"
    })
public final class Roundwright implements Callable<Integer> {
  /** What a command ends with where a file or the command line itself is wrong. */
  static final int WRONG = 2;

  @Spec private CommandSpec spec;

  private Roundwright() {}

  /** Without a command there is nothing to do but say which there are. */
  @Override
  public Integer call() {
    spec.commandLine().usage(spec.commandLine().getErr());
    return WRONG;
  }

  /** The command line with every command there is; errors are single lines, never a trace. */
  public static CommandLine commandLine() {
    CommandLine line = new CommandLine(new Roundwright());
    line.setParameterExceptionHandler(Roundwright::onWrongArguments);
    line.setExecutionExceptionHandler(
        (failure, command, parsed) -> {
          PrintWriter err = command.getErr();
          if (failure instanceof Refusal refusal) {
            refusal.lines().forEach(problem -> err.println("roundwright: " + problem));
          } else {
            err.println("roundwright: " + oneLine(failure));
          }
          err.flush();
          return WRONG;
        });
    return line;
  }

  private static int onWrongArguments(ParameterException wrong, String[] arguments) {
    CommandLine command = wrong.getCommandLine();
    String message = wrong.getMessage().lines().findFirst().orElse("Wrong arguments");
    String stop = message.endsWith(".") ? " " : ". ";
    command
        .getErr()
        .println(
            "roundwright: "
                + message
                + stop
                + "Try: "
                + command.getCommandSpec().qualifiedName()
                + " --help");
    command.getErr().flush();
    return WRONG;
  }

  private static String oneLine(Exception failure) {
    String message = failure.getMessage();
    return message == null
        ? failure.getClass().getSimpleName() + "; this is a fault of ours, please report it"
        : message.replaceAll("\\s+", " ");
  }
}
