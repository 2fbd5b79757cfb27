package roundwright.scheduling.rules;

import java.math.RoundingMode;
import roundwright.scheduling.core.Problem;
import roundwright.scheduling.cost.RuleName;

/** What one unit of a rule's amount weighs, in millionths of strain. */
final class Weights {
  static final long MILLIONTHS = 1_000_000;
  static final int BREACH_MINUTES = 5;

  private Weights() {}

  static long millionths(Problem problem, RuleName rule) {
    return problem
        .event
        .rules()
        .weight(rule)
        .movePointRight(6)
        .setScale(0, RoundingMode.HALF_UP)
        .longValueExact();
  }

  /** One for each started five minutes. */
  static long startedFives(int minutes) {
    return minutes <= 0 ? 0 : (minutes + BREACH_MINUTES - 1) / BREACH_MINUTES;
  }
}
