package roundwright.scheduling.model;

import java.math.BigDecimal;
import java.time.LocalTime;
import java.util.Collections;
import java.util.EnumMap;
import java.util.List;
import java.util.Map;
import roundwright.scheduling.cost.RuleName;

/**
 * What holds for the whole event unless a round says otherwise. Minutes unless the name says more.
 *
 * @param fill competitors per station in use, in rotating seating
 * @param stationsPerScrambler 0: there are no scramblers
 * @param stationsPerRunner 0: there are no runners
 * @param changeoverMinutes between halls of one venue
 * @param setupMinutes between two groups in a hall
 * @param turnaroundMinutes from a round's last end to the next one's first start
 * @param slack what the least time of a group is multiplied by
 * @param weights only those the organiser has set
 */
public record Rules(
    Seating seating,
    BigDecimal fill,
    BigDecimal stationsPerScrambler,
    BigDecimal stationsPerRunner,
    int changeoverMinutes,
    int setupMinutes,
    int turnaroundMinutes,
    int startGridMinutes,
    BigDecimal slack,
    int slotPercentile,
    int breathingMinutes,
    int restMinutes,
    int longestRunMinutes,
    List<Meal> meals,
    Map<RuleName, BigDecimal> weights) {
  public static final Rules DEFAULT =
      new Rules(
          Seating.ROTATING,
          new BigDecimal("1.6"),
          new BigDecimal("3"),
          new BigDecimal("5"),
          5,
          5,
          15,
          5,
          new BigDecimal("1.2"),
          80,
          10,
          15,
          90,
          List.of(new Meal(LocalTime.of(11, 30), LocalTime.of(14, 0), 30)),
          Map.of());

  public Rules {
    meals = List.copyOf(meals);
    Map<RuleName, BigDecimal> copy = new EnumMap<>(RuleName.class);
    copy.putAll(weights);
    weights = Collections.unmodifiableMap(copy);
  }

  /** The weight that counts for a strain rule. */
  public BigDecimal weight(RuleName rule) {
    return weights.getOrDefault(rule, rule.defaultWeight());
  }

  /** A stretch of each day in which everybody should find {@code minutes} free in one piece. */
  public record Meal(LocalTime from, LocalTime to, int minutes) {}
}
