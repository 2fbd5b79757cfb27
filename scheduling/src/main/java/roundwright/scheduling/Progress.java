package roundwright.scheduling;

import java.util.List;
import roundwright.scheduling.cost.Cost;

/**
 * Whoever follows a search and may stop it. Called from the searching thread, a few times a second
 * at most; must return at once and not throw.
 */
public interface Progress {
  /** Follows nothing and never stops. */
  Progress NONE =
      new Progress() {
        @Override
        public void report(Report report) {}

        @Override
        public boolean stopWanted() {
          return false;
        }
      };

  void report(Report report);

  /** Once true, the search ends soon and gives the best plan it has. */
  boolean stopWanted();

  /** What the search is at. */
  enum Stage {
    TIMETABLE,
    FIRST_PLAN,
    CREWING,
    DONE
  }

  /**
   * A look at a running search.
   *
   * @param best the engine's own price of the best plan so far
   * @param elapsedSeconds since the search began
   * @param steps moves tried so far
   * @param stillWrong names of the rules that the best plan still breaks or leaves gaps in
   */
  record Report(
      Stage stage, Cost best, double elapsedSeconds, long steps, List<String> stillWrong) {
    public Report {
      stillWrong = List.copyOf(stillWrong);
    }
  }
}
