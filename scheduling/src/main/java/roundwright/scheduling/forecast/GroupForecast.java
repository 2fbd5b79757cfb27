package roundwright.scheduling.forecast;

import java.math.BigDecimal;
import java.util.ArrayList;
import java.util.Collection;
import java.util.Collections;
import java.util.EnumMap;
import java.util.List;
import java.util.Map;

/**
 * How long a group will take.
 *
 * @param leastMinutes the least time by the rules, slack included, a multiple of the grid
 * @param steadyMinutes what its attempts take at the throughput of the closed loop (mean-value
 *     analysis) or the longest path where that is longer; no slack, not rounded. Exponential times
 *     make it a cautious mean
 * @param bottleneck what the length hangs on
 * @param use of stations, scramblers and runners in steady state, 0 to 1; of those there are
 */
public record GroupForecast(
    int competitors,
    int stations,
    int leastMinutes,
    double steadyMinutes,
    Bottleneck bottleneck,
    Map<Bottleneck, Double> use) {
  public GroupForecast {
    use = Collections.unmodifiableMap(new EnumMap<>(use));
  }

  /**
   * The forecast of a group.
   *
   * @param competitors ids, at least one
   * @param stations in use
   */
  public static GroupForecast of(
      LeastTime leastTime, Collection<String> competitors, int stations) {
    LeastTime.Terms terms = leastTime.terms(competitors, stations);
    Bottleneck bottleneck = Bottleneck.STATIONS;
    for (Map.Entry<Bottleneck, LeastTime.Fraction> term : terms.seconds().entrySet()) {
      if (term.getValue().value() > terms.seconds().get(bottleneck).value()) {
        bottleneck = term.getKey();
      }
    }
    List<Bottleneck> resources = new ArrayList<>();
    List<ClosedLoop.Centre> centres = new ArrayList<>();
    BigDecimal attempts = BigDecimal.valueOf(terms.attempts());
    double workSeconds = terms.workSeconds().doubleValue() / attempts.doubleValue();
    resources.add(Bottleneck.STATIONS);
    centres.add(new ClosedLoop.Centre("stations", workSeconds, 1, terms.shared()));
    if (terms.scramblers() > 0) {
      resources.add(Bottleneck.SCRAMBLERS);
      double seconds = leastTime.discipline().scrambleSeconds().doubleValue();
      centres.add(new ClosedLoop.Centre("scramblers", seconds, 1, terms.scramblers()));
    }
    if (terms.runners() > 0) {
      resources.add(Bottleneck.RUNNERS);
      double seconds = leastTime.discipline().carrySeconds().doubleValue();
      centres.add(new ClosedLoop.Centre("runners", seconds, 2, terms.runners()));
    }
    double throughput = new ClosedLoop(centres, 0).throughput(terms.size());
    Map<Bottleneck, Double> use = new EnumMap<>(Bottleneck.class);
    for (int i = 0; i < resources.size(); i++) {
      ClosedLoop.Centre centre = centres.get(i);
      use.put(resources.get(i), throughput * centre.demandSeconds() / centre.servers());
    }
    double steadySeconds =
        Math.max(
            terms.attempts() / throughput, terms.seconds().get(Bottleneck.LONGEST_PATH).value());
    return new GroupForecast(
        terms.size(),
        stations,
        leastTime.minutes(competitors, stations),
        steadySeconds / 60,
        bottleneck,
        use);
  }
}
