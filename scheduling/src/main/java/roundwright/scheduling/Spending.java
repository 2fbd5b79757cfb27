package roundwright.scheduling;

import java.util.List;

/**
 * What of an effort is spent, and the reports on the way: the only place in the engine that reads a
 * clock. Reports may come from several threads; only the first one's are passed on while several
 * search.
 */
final class Spending {
  private static final double SECONDS_BETWEEN_REPORTS = 0.2;
  private static final double FIRST_PLAN_BEYOND_SECONDS = 1.5;
  private static final double NANOS = 1e9;

  private final Effort effort;
  private final Progress progress;
  private final long began = System.nanoTime();
  private double lastReport = -1;
  private long steps;

  Spending(Effort effort, Progress progress) {
    this.effort = effort;
    this.progress = progress;
  }

  double elapsedSeconds() {
    return (System.nanoTime() - began) / NANOS;
  }

  /** The part of the seconds that is used; 0 where they are not bounded. */
  double usedTime() {
    return effort.seconds().isPresent() ? elapsedSeconds() / effort.seconds().getAsDouble() : 0;
  }

  boolean over() {
    return usedTime() >= 1 || progress.stopWanted();
  }

  /** Past even what a first plan may take beyond the seconds given. */
  boolean overdue() {
    return effort.seconds().isPresent()
        && elapsedSeconds() >= effort.seconds().getAsDouble() + FIRST_PLAN_BEYOND_SECONDS;
  }

  synchronized void spent(long moves) {
    steps += moves;
  }

  synchronized void report(Progress.Stage stage, long hard, long strain, List<String> wrong) {
    lastReport = elapsedSeconds();
    progress.report(
        new Progress.Report(stage, Planner.cost(hard, strain), lastReport, steps, wrong));
  }

  void reportNowAndThen(
      Progress.Stage stage, long moves, long hard, long strain, List<String> wrong) {
    if (elapsedSeconds() - lastReport >= SECONDS_BETWEEN_REPORTS) {
      synchronized (this) {
        lastReport = elapsedSeconds();
        progress.report(
            new Progress.Report(
                stage, Planner.cost(hard, strain), lastReport, steps + moves, wrong));
      }
    }
  }
}
