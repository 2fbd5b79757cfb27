package roundwright.scheduling.cost;

import java.math.BigDecimal;
import java.util.Arrays;
import java.util.Locale;
import java.util.Optional;

/**
 * Every named thing that a plan is judged by, in the order in which the event-file page lists it.
 */
public enum RuleName {
  ENTRY_MISSING(Level.BREACH),
  TWO_PLACES(Level.BREACH),
  ABSENT(Level.BREACH),
  UNQUALIFIED(Level.BREACH),
  HALL_CLASH(Level.BREACH),
  HALL_CLOSED(Level.BREACH),
  HALL_UNSUITED(Level.BREACH),
  ROUND_ORDER(Level.BREACH),
  ROUND_WINDOW(Level.BREACH),
  OVERSIZE(Level.BREACH),
  TOO_SHORT(Level.BREACH),
  OVERWORKED(Level.BREACH),
  OFF_GRID(Level.BREACH),
  WRONG_COUNT(Level.BREACH),
  PIN_MOVED(Level.BREACH),
  PAST_CHANGED(Level.BREACH),

  UNFILLED(Level.GAP),

  UNEVEN_GROUPS("4"),
  EXTRA_GROUP("10"),
  SPARE_CREW("3"),
  SEEDING("2"),
  LOAD("0.5"),
  BREATHING("8"),
  LONG_RUN("8"),
  KIN("10"),
  WAITING("4"),
  HOPS("2"),
  NO_MEAL("40"),
  NEWCOMER_FIRST("3"),
  GREEN_JUDGE("6"),
  LIKELY_AWAY("10"),
  LATE_FINISH("1"),
  CHANGED("15"),
  TOLD("30"),

  OCCUPANCY_PASSED(Level.NOTICE),
  LIKELY_OVERRUN(Level.NOTICE),
  CLOSE_TO_CLOSING(Level.NOTICE),
  LIKELY_ENTRANT_AWAY(Level.NOTICE);

  private final Level level;
  private final BigDecimal defaultWeight;

  RuleName(Level level) {
    this.level = level;
    this.defaultWeight = BigDecimal.ONE;
  }

  RuleName(String defaultWeight) {
    this.level = Level.STRAIN;
    this.defaultWeight = new BigDecimal(defaultWeight);
  }

  public Level level() {
    return level;
  }

  /** The strain of one unit of the rule's amount where the event names no weight of its own. */
  public BigDecimal defaultWeight() {
    return defaultWeight;
  }

  /** The name in files and on pages: lower case with hyphens. */
  public String word() {
    return name().toLowerCase(Locale.ROOT).replace('_', '-');
  }

  /** The rule of that {@link #word()}, or empty where there is none. */
  public static Optional<RuleName> ofWord(String word) {
    return Arrays.stream(values()).filter(rule -> rule.word().equals(word)).findFirst();
  }
}
