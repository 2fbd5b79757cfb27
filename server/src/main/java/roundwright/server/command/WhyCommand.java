package roundwright.server.command;

import java.io.PrintWriter;
import java.nio.file.Path;
import java.util.Optional;
import java.util.concurrent.Callable;
import picocli.CommandLine.Command;
import picocli.CommandLine.Model.CommandSpec;
import picocli.CommandLine.Option;
import picocli.CommandLine.Parameters;
import picocli.CommandLine.Spec;
import roundwright.scheduling.advice.Draft;
import roundwright.scheduling.advice.Why;
import roundwright.scheduling.advice.WhyNot;
import roundwright.scheduling.model.Event;
import roundwright.scheduling.model.Role;

/** Says why somebody is where a plan has them, or why a duty is empty. */
@Command(
    name = "why",
    mixinStandardHelpOptions = true,
    sortOptions = false,
    header = "Says why somebody is where a plan has them, or why a duty is empty.",
    description = {
      "With --person: what each of their commitments costs by rule, and the best",
      "other thing they could do. With --group and --duty: everybody counted by what",
      "keeps them from the duty, and single changes that would fill it, each made",
      "and priced. Any plan will do, also one made by hand."
    },
    exitCodeListHeading = "%nExit codes:%n",
    exitCodeList = {"0:answered", "2:a file or what was asked is wrong"},
    footer = {
      "",
      "Example: roundwright why event.json plan.json --person \"Ada Lindqvist\"",
      "Example: roundwright why event.json plan.json --group cube3-a/2 --duty scrambler"
    })
final class WhyCommand implements Callable<Integer> {
  @Parameters(index = "0", paramLabel = "EVENT.json", description = "The event file.")
  private Path eventFile;

  @Parameters(index = "1", paramLabel = "PLAN.json", description = "The plan file.")
  private Path planFile;

  @Option(names = "--person", paramLabel = "P", description = "Somebody's id or name.")
  private Optional<String> person = Optional.empty();

  @Option(
      names = "--group",
      paramLabel = "G",
      description = "A group's id, or its round and number such as cube3-a/2.")
  private Optional<String> group = Optional.empty();

  @Option(names = "--duty", paramLabel = "D", description = "judge, scrambler or runner.")
  private Optional<String> duty = Optional.empty();

  @Option(names = "--json", description = "Print the answer as JSON and nothing else.")
  private boolean json;

  @Spec private CommandSpec spec;

  @Override
  public Integer call() throws Refusal {
    boolean ofDuty = group.isPresent() && duty.isPresent();
    if (person.isPresent() == duty.isPresent() || (person.isEmpty() && !ofDuty)) {
      throw new Refusal("Ask about --person, or about --group and --duty");
    }
    Event event = Given.event(eventFile);
    Draft draft = new Draft(event, Given.plan(planFile, event));
    Optional<String> groupId =
        group.isPresent()
            ? Optional.of(Named.group("--group", group.get(), draft.plan()))
            : Optional.empty();
    PrintWriter out = spec.commandLine().getOut();
    if (person.isPresent()) {
      String id = Named.person("--person", person.get(), event);
      Why why = Why.of(draft, id, groupId);
      if (json) {
        out.println(AnswerJson.of(why));
      } else {
        out.println(why.says());
        why.commitments().forEach(commitment -> out.println("  " + commitment.says()));
      }
    } else {
      Role role = Named.role("--duty", duty.orElseThrow());
      WhyNot answer = WhyNot.of(draft, groupId.orElseThrow(), role);
      if (json) {
        out.println(AnswerJson.of(answer));
      } else {
        tell(answer, out);
      }
    }
    out.flush();
    return 0;
  }

  static void tell(WhyNot answer, PrintWriter out) {
    out.println(answer.says());
    answer.remedies().forEach(remedy -> out.println("  " + remedy.says()));
    if (answer.empty() > 0 && answer.remedies().isEmpty()) {
      out.println("  No single change was found that would fill it.");
    }
  }
}
