package roundwright.scheduling.advice;

import roundwright.scheduling.core.Frame;
import roundwright.scheduling.core.Problem;
import roundwright.scheduling.crewing.Standing;
import roundwright.scheduling.rules.Ledger;

/** What first keeps somebody from a duty, in the order in which it is asked. */
public enum Obstacle {
  LACKS_THE_SKILL("lacks the skill", "lack the skill"),
  AWAY("is away", "are away"),
  BUSY("is wanted elsewhere", "are wanted elsewhere"),
  /** In this group, in another at the time, or in one too far away. */
  SOLVING("solves at the time", "solve at the time"),
  /** Likewise. */
  ON_ANOTHER_DUTY("is on another duty", "are on other duties"),
  OVER_DAILY_MINUTES("has no minutes left that day", "have no minutes left that day"),
  BREAKS_A_RULE("would break another rule", "would break another rule"),
  NONE("could do it", "could do it");

  private final String one;
  private final String several;

  Obstacle(String one, String several) {
    this.one = one;
    this.several = several;
  }

  /** Such as {@code 1 is away} or {@code 3 are away}. */
  public String says(int people) {
    return people + " " + (people == 1 ? one : several);
  }

  /** The first obstacle between somebody and a duty, everything else as it stands. */
  static Obstacle of(Standing standing, int person, int group, int role) {
    Frame frame = standing.frame;
    Problem problem = standing.problem;
    if (!problem.skilled(person, frame.round[group], role)) {
      return LACKS_THE_SKILL;
    }
    if (!problem.present(person, frame.start[group], frame.end[group])) {
      return AWAY;
    }
    if (problem.busy(person, frame.start[group], frame.end[group])) {
      return BUSY;
    }
    boolean onDuty = false;
    for (int i = 0; i < standing.board.commitmentCount(person); i++) {
      int commitment = standing.board.commitment(person, i);
      if (frame.conflict(commitment >> 2, group)) {
        if ((commitment & 3) == Problem.SOLVING) {
          return SOLVING;
        }
        onDuty = true;
      }
    }
    if (onDuty) {
      return ON_ANOTHER_DUTY;
    }
    if (dutyMinutes(standing, person, frame.date[group]) + frame.end[group] - frame.start[group]
        > problem.maxDutyMinutes[person]) {
      return OVER_DAILY_MINUTES;
    }
    Ledger ledger = standing.ledger;
    long before = ledger.priceNow(person);
    long after = ledger.priceWith(person, group << 2 | role);
    return Math.floorDiv(after, Ledger.BREACH_IN_TRIALS)
            > Math.floorDiv(before, Ledger.BREACH_IN_TRIALS)
        ? BREAKS_A_RULE
        : NONE;
  }

  /** Minutes of duty that somebody has on a date. */
  static int dutyMinutes(Standing standing, int person, int date) {
    int minutes = 0;
    for (int i = 0; i < standing.board.commitmentCount(person); i++) {
      int commitment = standing.board.commitment(person, i);
      int g = commitment >> 2;
      if ((commitment & 3) != Problem.SOLVING && standing.frame.date[g] == date) {
        minutes += standing.frame.end[g] - standing.frame.start[g];
      }
    }
    return minutes;
  }
}
