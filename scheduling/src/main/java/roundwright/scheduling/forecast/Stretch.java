package roundwright.scheduling.forecast;

import java.util.ArrayList;
import java.util.Collections;
import java.util.List;
import roundwright.scheduling.model.Event;
import roundwright.scheduling.model.Round;

/**
 * How many times as long as the largest of its four asymptotic bounds a group is likely to take:
 * within how much of it slotPercentile of a hundred days by chance end. The bounds tell what is
 * scarce, the days what the queues before it add.
 */
public final class Stretch {
  private static final int RUNS = 50;
  private static final long SEED = 20_270_508;
  private static final double SECONDS_A_MINUTE = 60;

  private Stretch() {}

  /**
   * Of each round of the event, in its order: the stretch of each group of its plainest cut (fewest
   * groups, largest hall), in the order of its seeding. Empty where a round has no entrants, no
   * hall, or groups of given length. A group of like speed in another cut has much the same.
   */
  public static List<double[]> ofRounds(Event event) {
    Entrants entrants = Entrants.of(event);
    List<double[]> stretches = new ArrayList<>();
    for (Round round : event.rounds()) {
      RoundForecast.Cut cut = RoundForecast.plainest(event, round, entrants.ids(round.id()));
      List<List<String>> groups =
          round.minutesPerGroup().isPresent() ? List.of() : cut.competitors();
      stretches.add(
          groups.stream()
              .mapToDouble(group -> of(cut.leastTime(), group, cut.stations()))
              .toArray());
    }
    return Collections.unmodifiableList(stretches);
  }

  private static double of(LeastTime leastTime, List<String> competitors, int most) {
    int stations = Math.min(most, competitors.size());
    double bound =
        leastTime.terms(competitors, stations).seconds().values().stream()
            .mapToDouble(LeastTime.Fraction::value)
            .max()
            .getAsDouble();
    double minutes =
        GroupSimulation.of(
                leastTime,
                competitors,
                stations,
                leastTime.wantedCrew(competitors.size(), stations),
                GroupSimulation.SIGMA,
                RUNS,
                SEED)
            .minutes(leastTime.slotPercentile());
    return bound <= 0 ? 1 : minutes * SECONDS_A_MINUTE / bound;
  }
}
