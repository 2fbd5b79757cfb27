package roundwright.server.command;

import com.fasterxml.jackson.databind.node.ArrayNode;
import com.fasterxml.jackson.databind.node.JsonNodeFactory;
import com.fasterxml.jackson.databind.node.ObjectNode;
import java.io.PrintWriter;
import java.io.Writer;
import java.nio.file.Path;
import java.time.Instant;
import java.util.List;
import java.util.Optional;
import java.util.concurrent.Callable;
import picocli.CommandLine.Command;
import picocli.CommandLine.Model.CommandSpec;
import picocli.CommandLine.Option;
import picocli.CommandLine.Parameters;
import picocli.CommandLine.Spec;
import roundwright.scheduling.advice.Change;
import roundwright.scheduling.advice.Draft;
import roundwright.scheduling.advice.FewestPeople;
import roundwright.scheduling.advice.Impossible;
import roundwright.scheduling.advice.Recruiting;
import roundwright.scheduling.advice.StandIn;
import roundwright.scheduling.advice.WhatBreaks;
import roundwright.scheduling.advice.WhyNot;
import roundwright.scheduling.model.Event;
import roundwright.scheduling.model.Group;
import roundwright.scheduling.model.Role;

/** Says what stands in the way of an event or a plan, and what would help. */
@Command(
    name = "advise",
    mixinStandardHelpOptions = true,
    sortOptions = false,
    header = "Says what stands in the way of an event or a plan, and what would help.",
    description = {
      "Of an event: what no plan can do, with people, times and the remedy. Of a plan",
      "besides: its empty duties and what would fill them, whom to recruit, and how few",
      "people could cover all duties. Or, of a plan, one question: who could stand in for",
      "somebody, or what a change would break."
    },
    exitCodeListHeading = "%nExit codes:%n",
    exitCodeList = {
      "0:nothing stands in the way, or the one question is answered",
      "1:something does; it is told",
      "2:a file or what was asked is wrong"
    },
    footer = {
      "",
      "Example: roundwright advise event.json",
      "Example: roundwright advise event.json plan.json --group cube3-a/2 --duty judge \\",
      "         --falls-out p017 --at 2027-05-08T11:20"
    })
final class AdviseCommand implements Callable<Integer> {
  private static final int MOST_EMPTY_DUTIES = 12;
  private static final int MOST_RECRUITS = 6;
  private static final int MOST_STAND_INS = 10;
  private static final long SEED = 1;

  @Parameters(index = "0", paramLabel = "EVENT.json", description = "The event file.")
  private Path eventFile;

  @Parameters(
      index = "1",
      arity = "0..1",
      paramLabel = "PLAN.json",
      description = "A plan for it, also one made by hand.")
  private Optional<Path> planFile = Optional.empty();

  @Option(
      names = "--falls-out",
      paramLabel = "P",
      description =
          "Who could stand in for this person, by id or name, in the duty of --group and --duty;"
              + " without --group: what breaks if they leave the event.")
  private Optional<String> fallsOut = Optional.empty();

  @Option(
      names = "--group",
      paramLabel = "G",
      description = "A group's id, or its round and number such as cube3-a/2.")
  private Optional<String> group = Optional.empty();

  @Option(names = "--duty", paramLabel = "D", description = "judge, scrambler or runner.")
  private Optional<String> duty = Optional.empty();

  @Option(
      names = "--at",
      paramLabel = "T",
      description =
          "The moment it is: what began before can no longer change (default: the group's start).")
  private Optional<String> at = Optional.empty();

  @Option(
      names = "--start",
      paramLabel = "T",
      description = "What breaks if --group starts at T, a local time of the event.")
  private Optional<String> start = Optional.empty();

  @Option(
      names = "--hall",
      paramLabel = "H",
      description = "What breaks if --group is in this hall.")
  private Optional<String> hall = Optional.empty();

  @Option(names = "--json", description = "Print the answer as JSON and nothing else.")
  private boolean json;

  @Spec private CommandSpec spec;

  private final ObjectNode answer = JsonNodeFactory.instance.objectNode();

  @Override
  public Integer call() throws Refusal {
    boolean asks = fallsOut.isPresent() || group.isPresent() || duty.isPresent();
    if (planFile.isEmpty() && (asks || start.isPresent() || hall.isPresent())) {
      throw new Refusal("Name the plan that the question is about after the event");
    }
    Event event = Given.event(eventFile);
    PrintWriter out = spec.commandLine().getOut();
    PrintWriter told = json ? new PrintWriter(Writer.nullWriter()) : out;
    int code;
    if (planFile.isEmpty()) {
      code = impossible(event, told);
    } else {
      Draft draft = new Draft(event, Given.plan(planFile.get(), event));
      code =
          asks || start.isPresent() || hall.isPresent()
              ? question(draft, told)
              : Math.max(impossible(event, told), plan(draft, told));
    }
    if (json) {
      out.println(answer);
    }
    out.flush();
    return code;
  }

  private int impossible(Event event, PrintWriter out) {
    List<Impossible> impossible = Impossible.of(event);
    ArrayNode list = answer.putArray("impossible");
    impossible.forEach(one -> list.add(AnswerJson.of(one)));
    if (impossible.isEmpty()) {
      out.println("Nothing is known that would keep a plan from doing all that is asked.");
      return 0;
    }
    out.println("Whatever is planned, some of this cannot be done:");
    impossible.forEach(one -> out.println("  " + one.says()));
    return 1;
  }

  private int plan(Draft draft, PrintWriter out) {
    List<WhyNot.Duties> empty = WhyNot.empty(draft);
    ArrayNode list = answer.putArray("empty");
    for (WhyNot.Duties duties : empty.subList(0, Math.min(MOST_EMPTY_DUTIES, empty.size()))) {
      WhyNot whyNot = WhyNot.of(draft, duties.group(), duties.role());
      list.add(AnswerJson.of(whyNot));
      out.println();
      WhyCommand.tell(whyNot, out);
    }
    if (empty.size() > MOST_EMPTY_DUTIES) {
      out.println();
      out.println("and " + (empty.size() - MOST_EMPTY_DUTIES) + " groups and duties more.");
    }
    if (!empty.isEmpty()) {
      recruit(draft, out);
    }
    FewestPeople fewest = FewestPeople.of(draft, SEED, FewestPeople.ENOUGH_STEPS);
    answer.set("fewest", AnswerJson.of(fewest));
    out.println();
    out.println("Everybody solving where they do, " + fewest.says());
    return empty.isEmpty() ? 0 : 1;
  }

  private void recruit(Draft draft, PrintWriter out) {
    Recruiting recruiting = Recruiting.of(draft);
    ArrayNode list = answer.putArray("recruits");
    recruiting.recruits().forEach(one -> list.add(AnswerJson.of(one)));
    out.println();
    out.println("To recruit:");
    recruiting.recruits().stream()
        .limit(MOST_RECRUITS)
        .forEach(one -> out.println("  " + one.says()));
    if (recruiting.recruits().isEmpty()) {
      out.println(
          recruiting.gaps() == 0
              ? "  nobody: the people there are could fill every duty."
              : "  one person more would not help.");
    }
  }

  private int question(Draft draft, PrintWriter out) throws Refusal {
    if (group.isEmpty()) {
      if (fallsOut.isEmpty() || duty.isPresent() || start.isPresent() || hall.isPresent()) {
        throw new Refusal("Name the group that the question is about with --group");
      }
      tell(
          draft,
          new Change.TakeOut(Named.person("--falls-out", fallsOut.get(), draft.event())),
          out);
      return 0;
    }
    String id = Named.group("--group", group.get(), draft.plan());
    Group moved = draft.group(id);
    if (start.isPresent() || hall.isPresent()) {
      String to = hall.isPresent() ? Named.hall("--hall", hall.get(), draft.event()) : moved.hall();
      Instant from =
          start.isPresent() ? Named.moment("--start", start.get(), draft.event()) : moved.start();
      tell(draft, new Change.MoveGroup(id, to, from), out);
      return 0;
    }
    if (duty.isEmpty()) {
      throw new Refusal("Name the duty with --duty, or where to move the group");
    }
    standIns(draft, moved, Named.role("--duty", duty.get()), out);
    return 0;
  }

  private void standIns(Draft draft, Group moved, Role role, PrintWriter out) throws Refusal {
    Optional<String> gone =
        fallsOut.isPresent()
            ? Optional.of(Named.person("--falls-out", fallsOut.get(), draft.event()))
            : Optional.empty();
    if (gone.isPresent() && !moved.crew().in(role).contains(gone.get())) {
      throw new Refusal(
          "--falls-out is \"" + fallsOut.get() + "\", who is no " + role.word() + " of that group");
    }
    Instant now = at.isPresent() ? Named.moment("--at", at.get(), draft.event()) : moved.start();
    List<StandIn> found = StandIn.rank(draft, moved.id(), role, gone, now);
    ArrayNode list = answer.putArray("standIns");
    found.forEach(one -> list.add(AnswerJson.of(one)));
    found.stream().limit(MOST_STAND_INS).forEach(one -> out.println(one.says()));
    if (found.isEmpty()) {
      out.println("Nobody with the skill is free then, or could leave what they have later.");
    }
  }

  private void tell(Draft draft, Change change, PrintWriter out) {
    WhatBreaks breaks = WhatBreaks.of(draft, change);
    answer.set("breaks", AnswerJson.of(breaks));
    out.println(breaks.says());
    breaks.comes().forEach(finding -> out.println("  new:  " + finding.says()));
    breaks.goes().forEach(finding -> out.println("  gone: " + finding.says()));
  }
}
