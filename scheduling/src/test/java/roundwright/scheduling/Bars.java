package roundwright.scheduling;

import java.io.PrintStream;
import java.lang.management.ManagementFactory;
import java.lang.management.MemoryPoolMXBean;
import java.lang.management.MemoryType;
import java.util.List;
import java.util.Locale;
import java.util.Optional;
import java.util.OptionalDouble;
import java.util.OptionalLong;
import java.util.stream.LongStream;
import roundwright.scheduling.audit.Auditor;
import roundwright.scheduling.bounds.StrainBound;
import roundwright.scheduling.cost.Cost;
import roundwright.scheduling.model.Event;
import roundwright.scheduling.model.Plan;

/**
 * Measures the whole engine on generated events and prints what comes out: not a test, since times
 * are the machine's. See "Measure" in DEVELOPERS.md for how to run it.
 *
 * <ul>
 *   <li>{@code sizes [SIZE ...]}: each size in its time on one thread: score, bound, first plan
 *       without breach and gap, moves a second, memory.
 *   <li>{@code tenfold [SIZE ...]}: strain above the bound with a budget of steps, over that with
 *       ten times as many, mean of some events.
 *   <li>{@code growing}: mean strain over 20 seeds with growing budgets of steps.
 *   <li>{@code outside [NAME ...]}: published problems as events, 60 s each, from the folder that
 *       ROUNDWRIGHT_OUTSIDE names: the length of the day reached, published, and at most allowed.
 *   <li>{@code disputes COUNT}: that many tiny events made by chance; the engine's own price of
 *       each plan against the auditor's.
 * </ul>
 */
public final class Bars {
  private static final PrintStream OUT = System.out;
  private static final double MEGA = 1e6;
  private static final long DISPUTE_STEPS = 2_000;
  private static final int EVENTS = 3;
  private static final double HALF_A_TENTH = 0.05;

  private Bars() {}

  public static void main(String[] args) {
    String what = args.length == 0 ? "sizes" : args[0];
    List<String> rest = List.of(args).subList(Math.min(1, args.length), args.length);
    switch (what) {
      case "sizes" -> chosen(rest).forEach(Bars::inItsTime);
      case "tenfold" -> chosen(rest).forEach(Bars::tenfold);
      case "growing" -> growing();
      case "outside" -> OutsideBars.print(rest);
      case "disputes" -> disputes(Long.parseLong(rest.get(0)));
      default ->
          throw new IllegalArgumentException(
              what + " is none of sizes, tenfold, growing, outside, disputes COUNT");
    }
  }

  private static List<EventSize> chosen(List<String> names) {
    return names.isEmpty()
        ? List.of(EventSize.values())
        : names.stream().map(name -> EventSize.valueOf(name.toUpperCase(Locale.ROOT))).toList();
  }

  /** Listens for the first plan without breach and gap, and for the moves made. */
  private static final class Listening implements Progress {
    private double firstCleanSeconds = -1;
    private double crewingFrom = -1;
    private double crewingTo = -1;
    private long steps;
    private Cost best;

    @Override
    public void report(Report report) {
      best = report.best();
      steps = Math.max(steps, report.steps());
      if (firstCleanSeconds < 0 && best.breaches() == 0 && best.gaps() == 0) {
        firstCleanSeconds = report.elapsedSeconds();
      }
      if (report.stage() == Stage.CREWING) {
        crewingFrom = crewingFrom < 0 ? report.elapsedSeconds() : crewingFrom;
        crewingTo = report.elapsedSeconds();
      }
    }

    @Override
    public boolean stopWanted() {
      return false;
    }
  }

  private static void inItsTime(EventSize size) {
    Event event = size.event(1);
    Effort effort = new Effort(1, OptionalLong.empty(), OptionalDouble.of(size.seconds), 1);
    Listening listening = new Listening();
    resetPeaks();
    Plan plan = Planner.plan(event, effort, listening);
    long peak = peakHeapBytes();
    Cost cost = new Auditor(event).price(plan);
    OUT.printf(
        Locale.ROOT,
        "%-11s %4d people, %3d groups, %2d s: %d breaches, %d gaps, strain %.1f; first clean %.1f s;"
            + " %.2f M moves/s; heap at most %.0f MB%n",
        size,
        size.people,
        plan.groups().size(),
        size.seconds,
        cost.breaches(),
        cost.gaps(),
        cost.strain(),
        listening.firstCleanSeconds,
        listening.steps / MEGA / Math.max(0.1, listening.crewingTo - listening.crewingFrom),
        peak / MEGA);
    Optional<StrainBound> bound = StrainBound.of(event, plan);
    OUT.println(
        "            " + bound.map(StrainBound::says).orElse("No bound: a rule is broken."));
  }

  private static void resetPeaks() {
    ManagementFactory.getMemoryPoolMXBeans().forEach(MemoryPoolMXBean::resetPeakUsage);
  }

  private static long peakHeapBytes() {
    return ManagementFactory.getMemoryPoolMXBeans().stream()
        .filter(pool -> pool.getType() == MemoryType.HEAP)
        .mapToLong(pool -> pool.getPeakUsage().getUsed())
        .sum();
  }

  private static void tenfold(EventSize size) {
    long steps = size.steps;
    double once = 0;
    double tenTimes = 0;
    for (long seed = 1; seed <= EVENTS; seed++) {
      Event event = size.event(seed);
      Plan much = Planner.plan(event, Effort.ofSteps(steps * 10), Progress.NONE);
      double least = StrainBound.of(event, much).map(StrainBound::least).orElse(0.0);
      tenTimes += strain(much) - least;
      once += strain(Planner.plan(event, Effort.ofSteps(steps), Progress.NONE)) - least;
    }
    OUT.printf(
        Locale.ROOT,
        "%-11s strain above the bound with %,d steps: %.3f of that with ten times as many%n",
        size,
        steps,
        once / tenTimes);
  }

  private static double strain(Plan plan) {
    return plan.score().orElseThrow().strain().doubleValue();
  }

  private static void growing() {
    Event event = EventSize.CLUB.event(1);
    for (long steps = 50_000; steps <= 1_600_000; steps *= 2) {
      long budget = steps;
      double mean =
          LongStream.rangeClosed(1, 20)
              .mapToDouble(
                  seed ->
                      strain(
                          Planner.plan(
                              event, Effort.ofSteps(budget).withSeed(seed), Progress.NONE)))
              .average()
              .orElseThrow();
      OUT.printf(Locale.ROOT, "%,9d steps: mean strain of 20 seeds %.1f%n", steps, mean);
    }
  }

  /** The engine adds millionths, the auditor exactly: to half a tenth they are one. */
  private static boolean alike(Cost one, Cost other) {
    return one.breaches() == other.breaches()
        && one.gaps() == other.gaps()
        && one.strain().subtract(other.strain()).abs().doubleValue() < HALF_A_TENTH;
  }

  private static void disputes(long count) {
    long disputed = 0;
    for (long seed = 1; seed <= count; seed++) {
      Event event = RandomEvents.wild(seed).event();
      Listening listening = new Listening();
      Plan plan = Planner.plan(event, Effort.ofSteps(DISPUTE_STEPS).withSeed(seed), listening);
      Cost audited = new Auditor(event).price(plan);
      if (!alike(audited, listening.best)) {
        disputed++;
        OUT.println(
            "seed " + seed + ": the engine says " + listening.best + ", the auditor " + audited);
      }
    }
    OUT.printf(Locale.ROOT, "%,d plans of events made by chance, %d disputed%n", count, disputed);
  }
}
