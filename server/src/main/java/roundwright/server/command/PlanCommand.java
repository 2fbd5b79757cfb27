package roundwright.server.command;

import java.io.IOException;
import java.io.PrintWriter;
import java.math.BigDecimal;
import java.nio.file.Path;
import java.util.EnumMap;
import java.util.List;
import java.util.Locale;
import java.util.Map;
import java.util.Optional;
import java.util.OptionalDouble;
import java.util.OptionalLong;
import java.util.concurrent.Callable;
import java.util.concurrent.CountDownLatch;
import java.util.concurrent.TimeUnit;
import java.util.stream.Collectors;
import picocli.CommandLine.Command;
import picocli.CommandLine.Model.CommandSpec;
import picocli.CommandLine.Option;
import picocli.CommandLine.Parameters;
import picocli.CommandLine.Spec;
import roundwright.scheduling.Effort;
import roundwright.scheduling.Planner;
import roundwright.scheduling.advice.Impossible;
import roundwright.scheduling.cost.Cost;
import roundwright.scheduling.cost.Finding;
import roundwright.scheduling.cost.Level;
import roundwright.scheduling.cost.RuleName;
import roundwright.scheduling.file.PlanFile;
import roundwright.scheduling.model.Event;
import roundwright.scheduling.model.Plan;

/** Plans an event: an event file in, a plan file out. */
@Command(
    name = "plan",
    mixinStandardHelpOptions = true,
    sortOptions = false,
    header = "Plans an event, from an event file to a plan file.",
    description = {
      "Decides when and where each group solves, who is in it and who is on its",
      "crew.",
      "What no plan can do is said before the search begins.",
      "Press Ctrl-C to stop early and keep the best plan so far."
    },
    exitCodeListHeading = "%nExit codes:%n",
    exitCodeList = {
      "0:the plan breaks no rule and fills every duty",
      "2:a file is wrong; nothing was planned",
      "3:the best plan found still breaks a rule or leaves a duty empty; it is written"
    },
    footer = {"", "Example: roundwright plan event.json --out plan.json --seconds 30"})
final class PlanCommand implements Callable<Integer> {
  private static final double DEFAULT_SECONDS = 10;
  private static final double MOST_SECONDS = 86_400;
  private static final int MOST_THREADS = 64;
  private static final int DEFAULT_THREADS = 4;
  private static final int MOST_WARNINGS = 12;
  private static final long STOP_PATIENCE_SECONDS = 30;

  @Parameters(paramLabel = "EVENT.json", description = "The event file.")
  private Path eventFile;

  @Option(
      names = "--out",
      required = true,
      paramLabel = "PLAN.json",
      description = "Where to write the plan.")
  private Path planFile;

  @Option(
      names = "--seconds",
      paramLabel = "N",
      description = "How long to search (default: 10, or no limit where --steps is given).")
  private Optional<Double> seconds = Optional.empty();

  @Option(
      names = "--steps",
      paramLabel = "N",
      description = "How many moves to try; the same seed and steps give the same plan.")
  private Optional<Long> steps = Optional.empty();

  @Option(
      names = "--seed",
      paramLabel = "N",
      defaultValue = "1",
      description = "Another seed gives another plan (default: ${DEFAULT-VALUE}).")
  private long seed;

  @Option(
      names = "--threads",
      paramLabel = "N",
      description = {
        "How many searches to run side by side, the best of which is kept (default: one",
        "for each processor, at most 4; 1 where --steps is given)."
      })
  private Optional<Integer> threads = Optional.empty();

  @Spec private CommandSpec spec;

  @Override
  public Integer call() throws Refusal {
    Effort effort = effort();
    Event event = Given.event(eventFile);
    Refusal.unlessWritable(planFile);
    PrintWriter out = spec.commandLine().getOut();
    warn(event, out);
    ProgressLines progress = new ProgressLines(out, ProgressLines.isTerminal());
    CountDownLatch written = new CountDownLatch(1);
    Thread stopping = new Thread(() -> stopAndWait(progress, written), "stopping");
    Runtime.getRuntime().addShutdownHook(stopping);
    try {
      Plan plan = Planner.plan(event, effort, progress);
      progress.finish();
      write(plan, event);
      tell(plan, progress, out);
      return isWhole(plan) ? 0 : 3;
    } finally {
      written.countDown();
      forget(stopping);
    }
  }

  /** What no plan can do is said at once, so that nobody waits for it. */
  private void warn(Event event, PrintWriter out) {
    List<Impossible> impossible = Impossible.of(event);
    if (impossible.isEmpty()) {
      return;
    }
    out.println("Whatever is planned, some of this cannot be done:");
    impossible.stream().limit(MOST_WARNINGS).forEach(one -> out.println("  " + one.says()));
    if (impossible.size() > MOST_WARNINGS) {
      out.println(
          "  and "
              + (impossible.size() - MOST_WARNINGS)
              + " more; see them all: roundwright advise "
              + eventFile);
    }
    out.println("The search goes on for the best plan there is.");
    out.flush();
  }

  private Effort effort() throws Refusal {
    if (seconds.isPresent() && !(seconds.get() > 0 && seconds.get() <= MOST_SECONDS)) {
      throw new Refusal("--seconds is " + seconds.get() + "; give more than 0, at most 86400");
    }
    if (steps.isPresent() && steps.get() < 1) {
      throw new Refusal("--steps is " + steps.get() + "; give 1 or more");
    }
    int searches =
        threads.orElse(
            steps.isPresent()
                ? 1
                : Math.min(DEFAULT_THREADS, Runtime.getRuntime().availableProcessors()));
    if (searches < 1 || searches > MOST_THREADS) {
      throw new Refusal("--threads is " + searches + "; give 1 to " + MOST_THREADS);
    }
    OptionalLong mostSteps = steps.map(OptionalLong::of).orElse(OptionalLong.empty());
    OptionalDouble mostSeconds =
        seconds
            .map(OptionalDouble::of)
            .orElse(
                steps.isPresent() ? OptionalDouble.empty() : OptionalDouble.of(DEFAULT_SECONDS));
    return new Effort(seed, mostSteps, mostSeconds, searches);
  }

  /** Runs when the process is told to end: the best plan so far is still to be written. */
  private static void stopAndWait(ProgressLines progress, CountDownLatch written) {
    progress.stop();
    try {
      written.await(STOP_PATIENCE_SECONDS, TimeUnit.SECONDS);
    } catch (InterruptedException interrupted) {
      Thread.currentThread().interrupt();
    }
  }

  private static void forget(Thread stopping) {
    try {
      Runtime.getRuntime().removeShutdownHook(stopping);
    } catch (IllegalStateException alreadyEnding) {
      // the hook is running, and has just been told that the plan is written
    }
  }

  private void write(Plan plan, Event event) throws Refusal {
    try {
      new PlanFile(plan).write(planFile, event);
    } catch (IOException unwritable) {
      throw Refusal.unwritable(planFile, unwritable);
    }
  }

  private static boolean isWhole(Plan plan) {
    Cost score = plan.score().orElseThrow();
    return score.breaches() == 0 && score.gaps() == 0;
  }

  private void tell(Plan plan, ProgressLines progress, PrintWriter out) {
    out.println(
        "Wrote "
            + planFile
            + ": "
            + plan.groups().size()
            + " groups, "
            + plan.score().orElseThrow()
            + String.format(
                Locale.ROOT, " (%.1f s, %,d steps)", progress.elapsedSeconds(), progress.steps()));
    if (!isWhole(plan)) {
      Map<RuleName, BigDecimal> wrong = new EnumMap<>(RuleName.class);
      for (Finding finding : plan.findings()) {
        if (finding.level() == Level.BREACH || finding.level() == Level.GAP) {
          wrong.merge(finding.rule(), finding.amount(), BigDecimal::add);
        }
      }
      String rules =
          wrong.entrySet().stream()
              .map(entry -> entry.getKey().word() + " " + entry.getValue().toPlainString())
              .collect(Collectors.joining(", "));
      out.println("Still wrong: " + rules + ".");
      out.println("See why: roundwright check " + eventFile + " " + planFile);
    }
    out.flush();
  }
}
