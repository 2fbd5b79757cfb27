package roundwright.scheduling.model;

import java.math.BigDecimal;
import java.util.SortedSet;
import java.util.TreeSet;

/**
 * What is solved.
 *
 * @param handlingSeconds per attempt at the station besides solving: uncover, inspect, record, sign
 * @param scrambleSeconds one scramble by hand
 * @param carrySeconds one way between scrambling table and station
 * @param needs features that a hall must have
 */
public record Discipline(
    String id,
    String name,
    BigDecimal handlingSeconds,
    BigDecimal scrambleSeconds,
    BigDecimal carrySeconds,
    SortedSet<String> needs,
    Measure measure) {
  public static final BigDecimal HANDLING_SECONDS = BigDecimal.valueOf(45);
  public static final BigDecimal SCRAMBLE_SECONDS = BigDecimal.valueOf(25);
  public static final BigDecimal CARRY_SECONDS = BigDecimal.valueOf(6);

  public Discipline {
    needs = java.util.Collections.unmodifiableSortedSet(new TreeSet<>(needs));
  }

  /** What an attempt's result is counted in. */
  public enum Measure {
    TIME,
    MOVES,
    SOLVED_OF_TRIED
  }
}
