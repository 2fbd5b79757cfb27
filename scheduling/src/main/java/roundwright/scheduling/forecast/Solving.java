package roundwright.scheduling.forecast;

import java.util.Arrays;
import roundwright.scheduling.model.Round;

/**
 * One competitor's attempts in one round by chance: log-normal solve times whose mean is what is
 * expected of them, under the round's time limit and cut-off. Reused from draw to draw.
 */
final class Solving {
  private final Round round;
  private final double sigma;
  private final double limitSeconds;
  private final int cutOffAttempts;
  private final double cutOffSeconds;

  /** At the station for each attempt made, handling left out; the limit where it ran out. */
  final double[] seconds;

  /** The result of each attempt made: infinite where the limit ran out. */
  private final double[] results;

  private final double[] sorted;
  int made;
  private boolean cut;

  Solving(Round round, double sigma) {
    this.round = round;
    this.sigma = sigma;
    this.limitSeconds = round.timeLimitSeconds().doubleValue();
    this.cutOffAttempts = round.cutOff().map(Round.CutOff::attempts).orElse(Integer.MAX_VALUE);
    this.cutOffSeconds = round.cutOff().map(cut -> cut.seconds().doubleValue()).orElse(0.0);
    int most = round.countedBy().attempts();
    this.seconds = new double[most];
    this.results = new double[most];
    this.sorted = new double[most];
  }

  /** Draws as many times as the round has attempts, whatever comes of them. */
  void draw(double expectedSeconds, Chance chance) {
    made = 0;
    cut = false;
    boolean stopped = false;
    double left = limitSeconds;
    double best = Double.POSITIVE_INFINITY;
    for (int i = 0; i < seconds.length; i++) {
      double drawn = chance.logNormal(expectedSeconds, sigma);
      if (stopped) {
        continue;
      }
      double allowed = round.limitCovers() == Round.LimitCovers.ROUND ? left : limitSeconds;
      seconds[made] = Math.min(drawn, allowed);
      results[made] = drawn < allowed ? drawn : Double.POSITIVE_INFINITY;
      left -= seconds[made];
      best = Math.min(best, results[made]);
      made++;
      cut = made == cutOffAttempts && best >= cutOffSeconds;
      stopped = cut || (round.limitCovers() == Round.LimitCovers.ROUND && left <= 0);
    }
  }

  /** The best attempt; infinite where there is none. */
  double best() {
    double best = Double.POSITIVE_INFINITY;
    for (int i = 0; i < made; i++) {
      best = Math.min(best, results[i]);
    }
    return best;
  }

  /**
   * What the round counts: the best, the mean of three, or the mean of the middle three of five;
   * infinite where too few attempts have a result.
   */
  double counted() {
    return isCountedByBest() ? best() : middleThree();
  }

  boolean isCountedByBest() {
    return switch (round.countedBy()) {
      case BEST_OF_5, BEST_OF_3, BEST_OF_2, BEST_OF_1 -> true;
      case MEAN_OF_3, AVERAGE_OF_5 -> false;
    };
  }

  private double middleThree() {
    if (cut && made < results.length) {
      return Double.POSITIVE_INFINITY;
    }
    Arrays.fill(sorted, Double.POSITIVE_INFINITY);
    System.arraycopy(results, 0, sorted, 0, made);
    Arrays.sort(sorted);
    int from = (sorted.length - 3) / 2;
    return (sorted[from] + sorted[from + 1] + sorted[from + 2]) / 3;
  }
}
