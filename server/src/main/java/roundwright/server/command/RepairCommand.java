package roundwright.server.command;

import java.io.IOException;
import java.io.PrintWriter;
import java.nio.file.Path;
import java.time.LocalDate;
import java.time.format.DateTimeParseException;
import java.util.ArrayList;
import java.util.HashSet;
import java.util.List;
import java.util.Optional;
import java.util.OptionalDouble;
import java.util.OptionalLong;
import java.util.concurrent.Callable;
import picocli.CommandLine.Command;
import picocli.CommandLine.Model.CommandSpec;
import picocli.CommandLine.Option;
import picocli.CommandLine.Parameters;
import picocli.CommandLine.Spec;
import roundwright.scheduling.Effort;
import roundwright.scheduling.Progress;
import roundwright.scheduling.Repair;
import roundwright.scheduling.cost.Cost;
import roundwright.scheduling.file.PlanFile;
import roundwright.scheduling.model.Event;
import roundwright.scheduling.model.Plan;
import roundwright.scheduling.model.Round;
import roundwright.scheduling.repair.LeastChange;
import roundwright.scheduling.repair.Scope;

/** Repairs a plan that people have been told, for an event that has changed since. */
@Command(
    name = "repair",
    mixinStandardHelpOptions = true,
    sortOptions = false,
    header = "Repairs a plan that people have been told, changing as little as can be.",
    description = {
      "Give the event as it now is (somebody gone, a hall late or closed, new entrants,",
      "a new pin) and the plan people know. Groups keep their ids and numbers."
    },
    exitCodeListHeading = "%nExit codes:%n",
    exitCodeList = {
      "0:the repaired plan breaks no rule and fills every duty",
      "2:a file is wrong; nothing was repaired",
      "3:it still breaks a rule or leaves a duty empty; it is written"
    },
    footer = {
      "",
      "Example: roundwright repair event.json told.json --at 2027-05-08T11:20 --out plan.json"
    })
final class RepairCommand implements Callable<Integer> {
  private static final double DEFAULT_SECONDS = 10;
  private static final int MOST_CHANGES = 40;

  @Parameters(index = "0", paramLabel = "EVENT.json", description = "The event as it now is.")
  private Path eventFile;

  @Parameters(index = "1", paramLabel = "KEPT.json", description = "The plan people were told.")
  private Path keptFile;

  @Option(
      names = "--out",
      required = true,
      paramLabel = "PLAN.json",
      description = "Where to write the repaired plan.")
  private Path planFile;

  @Option(
      names = "--at",
      paramLabel = "TIME",
      description =
          "Now, in the event's zone, such as 2027-05-08T11:20: what has begun stays as it is.")
  private Optional<String> at = Optional.empty();

  @Option(
      names = "--day",
      paramLabel = "DATE",
      description = "Change only groups of this date, such as 2027-05-08.")
  private Optional<String> day = Optional.empty();

  @Option(names = "--hall", paramLabel = "HALL", description = "Change only groups in this hall.")
  private Optional<String> hall = Optional.empty();

  @Option(
      names = "--round",
      paramLabel = "ROUND",
      description = "Change only groups of this round; may be given several times.")
  private List<String> rounds = new ArrayList<>();

  @Option(names = "--crews-only", description = "Leave times and competitors; change duties only.")
  private boolean crewsOnly;

  @Option(
      names = "--broken-only",
      description = "Fill what is empty and mend what is broken; move nobody else.")
  private boolean brokenOnly;

  @Option(
      names = "--seconds",
      paramLabel = "N",
      defaultValue = "" + DEFAULT_SECONDS,
      description = "How long to search at most (default: ${DEFAULT-VALUE}); mostly it takes one.")
  private double seconds;

  @Option(
      names = "--seed",
      paramLabel = "N",
      defaultValue = "1",
      description = "Where chance begins (default: ${DEFAULT-VALUE}).")
  private long seed;

  @Spec private CommandSpec spec;

  @Override
  public Integer call() throws Refusal {
    if (!(seconds > 0)) {
      throw new Refusal("--seconds is " + seconds + "; give more than 0");
    }
    Event event = Given.event(eventFile);
    Plan kept = Given.keptPlan(keptFile, event);
    Refusal.unlessWritable(planFile);
    Effort effort = new Effort(seed, OptionalLong.empty(), OptionalDouble.of(seconds), 1);
    Repair.Repaired repaired =
        Repair.repair(
            event,
            kept,
            at.isPresent() ? Optional.of(Named.moment("--at", at.get(), event)) : Optional.empty(),
            scope(event),
            effort,
            Progress.NONE);
    try {
      new PlanFile(repaired.plan()).write(planFile, event);
    } catch (IOException unwritable) {
      throw Refusal.unwritable(planFile, unwritable);
    }
    tell(repaired, spec.commandLine().getOut());
    Cost cost = repaired.plan().score().orElseThrow();
    return cost.breaches() == 0 && cost.gaps() == 0 ? 0 : 3;
  }

  private Scope scope(Event event) throws Refusal {
    if (crewsOnly && brokenOnly) {
      throw new Refusal("--crews-only and --broken-only exclude each other; give one of them");
    }
    for (String round : rounds) {
      if (event.rounds().stream().map(Round::id).noneMatch(round::equals)) {
        throw new Refusal("--round is \"" + round + "\"; give the id of a round of the event");
      }
    }
    Scope.Depth depth =
        crewsOnly ? Scope.Depth.CREWS : brokenOnly ? Scope.Depth.BROKEN : Scope.Depth.EVERYTHING;
    Optional<String> inHall =
        hall.isPresent() ? Optional.of(Named.hall("--hall", hall.get(), event)) : hall;
    return new Scope(date(), inHall, new HashSet<>(rounds), depth);
  }

  private Optional<LocalDate> date() throws Refusal {
    if (day.isEmpty()) {
      return Optional.empty();
    }
    try {
      return Optional.of(LocalDate.parse(day.get()));
    } catch (DateTimeParseException wrong) {
      throw new Refusal("--day is \"" + day.get() + "\"; give a date such as 2027-05-08");
    }
  }

  private void tell(Repair.Repaired repaired, PrintWriter out) {
    out.printf("Wrote %s: %s%n", planFile, repaired.plan().score().orElseThrow());
    Optional<LeastChange> least = repaired.least();
    out.printf(
        "Commitments that change: %d%s.%n",
        repaired.changed(),
        least
            .map(
                one ->
                    "; no repair that fills as many duties changes fewer than " + one.commitments())
            .orElse("; how few must is not known while rules are broken"));
    out.printf(
        "People to be told: %d%s.%n",
        repaired.told(), least.map(one -> "; at least " + one.people()).orElse(""));
    List<String> changes = repaired.changes();
    changes.stream().limit(MOST_CHANGES).forEach(change -> out.println("  " + change));
    if (changes.size() > MOST_CHANGES) {
      out.println("  and " + (changes.size() - MOST_CHANGES) + " more, in the plan's findings");
    }
    out.flush();
  }
}
