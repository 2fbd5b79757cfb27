package roundwright.scheduling.forecast;

import java.util.Arrays;
import java.util.Collection;
import java.util.Collections;
import java.util.EnumMap;
import java.util.Map;
import roundwright.scheduling.model.Round;

/**
 * How long a group may take, from many days by chance: its closed loop with each competitor's own
 * solve times, cut-off and limit, run by discrete events. In minutes from the first scramble until
 * the last puzzle is back; nothing is rounded and no slack added. The same seed gives every crew
 * and number of stations the same solve times, so that forecasts can be compared.
 */
public final class GroupSimulation {
  /** Spread of a competitor's solve times: the standard deviation of their logarithm. */
  public static final double SIGMA = 0.25;

  public static final int RUNS = 200;

  private static final Bottleneck[] RESOURCES = {
    Bottleneck.STATIONS, Bottleneck.SCRAMBLERS, Bottleneck.RUNNERS
  };

  private final double[] sortedMinutes;
  private final Map<Bottleneck, Double> use;
  private final Bottleneck bottleneck;

  private GroupSimulation(double[] minutes, Map<Bottleneck, Double> use, double pathPart) {
    this.sortedMinutes = minutes;
    Arrays.sort(sortedMinutes);
    this.use = Collections.unmodifiableMap(use);
    Bottleneck most = Bottleneck.LONGEST_PATH;
    for (Map.Entry<Bottleneck, Double> entry : use.entrySet()) {
      if (entry.getValue() > (most == Bottleneck.LONGEST_PATH ? pathPart : use.get(most))) {
        most = entry.getKey();
      }
    }
    this.bottleneck = most;
  }

  /** Two hundred days of a group with the crew it wants. */
  public static GroupSimulation of(
      LeastTime leastTime, Collection<String> competitors, int stations, long seed) {
    return of(
        leastTime,
        competitors,
        stations,
        leastTime.wantedCrew(competitors.size(), stations),
        SIGMA,
        RUNS,
        seed);
  }

  /**
   * So many days of a group.
   *
   * @param competitors ids, at least one; in this order they are scrambled for first
   * @param stations in use; in fixed seating everybody has one
   * @param crew 0 scramblers or runners take no time
   * @param sigma 0: everybody takes just what is expected of them
   */
  public static GroupSimulation of(
      LeastTime leastTime,
      Collection<String> competitors,
      int stations,
      Round.CrewSize crew,
      double sigma,
      int runs,
      long seed) {
    if (competitors.isEmpty() || stations < 1 || runs < 1 || !(sigma >= 0)) {
      throw new IllegalArgumentException(
          "A group needs a competitor, a station, a run and a spread of 0 or more, not "
              + competitors.size()
              + ", "
              + stations
              + ", "
              + runs
              + " and "
              + sigma);
    }
    return new Days(leastTime, competitors, stations, crew, sigma).simulated(runs, seed);
  }

  /** What the days of one group share. */
  private static final class Days {
    private final double[] expected;
    private final int[] servers;
    private final Carousel carousel;
    private final Solving solving;
    private final double[][] atStation;
    private final double handling;
    private final double scrambling;
    private final double carrying;

    Days(
        LeastTime leastTime,
        Collection<String> competitors,
        int stations,
        Round.CrewSize crew,
        double sigma) {
      expected =
          competitors.stream()
              .mapToDouble(person -> leastTime.expectedSeconds(person).doubleValue())
              .toArray();
      int shared = leastTime.terms(competitors, stations).shared();
      servers = new int[] {shared, crew.scramblers(), crew.runners()};
      carousel = new Carousel(expected.length, shared, crew.scramblers(), crew.runners());
      solving = new Solving(leastTime.round(), sigma);
      atStation = new double[expected.length][leastTime.round().countedBy().attempts()];
      handling = leastTime.discipline().handlingSeconds().doubleValue();
      scrambling = leastTime.discipline().scrambleSeconds().doubleValue();
      carrying = leastTime.discipline().carrySeconds().doubleValue();
    }

    private double seconds(int puzzle, int attempt, int step) {
      return switch (step) {
        case 0 -> scrambling;
        case 2 -> handling + atStation[puzzle][attempt];
        default -> carrying;
      };
    }

    GroupSimulation simulated(int runs, long seed) {
      Chance chance = new Chance(seed);
      Carousel.Times times = this::seconds;
      double[] minutes = new double[runs];
      double[] busy = new double[RESOURCES.length];
      double path = 0;
      double together = 0;
      for (int run = 0; run < runs; run++) {
        for (int puzzle = 0; puzzle < expected.length; puzzle++) {
          solving.draw(expected[puzzle], chance);
          carousel.attempts(puzzle, solving.made);
          System.arraycopy(solving.seconds, 0, atStation[puzzle], 0, solving.made);
        }
        double seconds = carousel.run(times);
        minutes[run] = seconds / 60;
        together += seconds;
        path += carousel.longestPathSeconds();
        for (int resource = 0; resource < busy.length; resource++) {
          busy[resource] += carousel.busySeconds(resource);
        }
      }
      Map<Bottleneck, Double> use = new EnumMap<>(Bottleneck.class);
      for (int resource = 0; resource < busy.length; resource++) {
        if (servers[resource] > 0) {
          use.put(RESOURCES[resource], busy[resource] / (servers[resource] * together));
        }
      }
      return new GroupSimulation(minutes, use, path / together);
    }
  }

  /**
   * The minutes within which so many of a hundred days end: the least length that at least that
   * many had.
   *
   * @param percentile over 0, at most 100
   */
  public double minutes(double percentile) {
    if (!(percentile > 0 && percentile <= 100)) {
      throw new IllegalArgumentException(
          "A percentile is over 0 and at most 100, not " + percentile);
    }
    int place = (int) Math.ceil(percentile * sortedMinutes.length / 100 - 1e-9);
    return sortedMinutes[Math.max(1, place) - 1];
  }

  public double medianMinutes() {
    return minutes(50);
  }

  /** Part of the time that each server of a resource was busy, 0 to 1; of those there are. */
  public Map<Bottleneck, Double> use() {
    return use;
  }

  /**
   * The resource that was busiest, or the longest path where some competitor was even less often
   * kept waiting.
   */
  public Bottleneck bottleneck() {
    return bottleneck;
  }
}
