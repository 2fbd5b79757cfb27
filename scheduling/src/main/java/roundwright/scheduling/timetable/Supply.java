package roundwright.scheduling.timetable;

import roundwright.scheduling.core.LocalClock;
import roundwright.scheduling.core.Problem;
import roundwright.scheduling.model.Hall;
import roundwright.scheduling.model.Window;

/**
 * How many people who could take a duty are there, and how many of them a group keeps: as judges,
 * scramblers and runners it wants, and as competitors with that skill who are solving. Counted in
 * stretches of five minutes, for each discipline's scramblers, all scramblers, judges, runners and
 * everybody.
 *
 * <p>Layout: amounts are sixteenths of a person; {@code there[stretch][pool]}.
 */
final class Supply {
  static final int STRETCH_MINUTES = 5;
  static final int PARTS = 16;

  final int pools;
  final int firstMinute;
  final int stretches;
  final int[][] there;

  private final Problem problem;
  private final double[][] skilledPart;

  Supply(Problem problem) {
    this.problem = problem;
    pools = problem.disciplines + 4;
    int first = Problem.FOREVER;
    int last = Problem.NEVER;
    for (Hall hall : problem.hallList) {
      for (Window window : hall.open()) {
        first = Math.min(first, LocalClock.epochMinute(window.from()));
        last = Math.max(last, LocalClock.epochMinute(window.to()));
      }
    }
    firstMinute = first;
    stretches = (last - first) / STRETCH_MINUTES + 1;
    there = new int[stretches][pools];
    for (int p = 0; p < problem.people; p++) {
      countIn(p);
    }
    skilledPart = new double[problem.rounds][pools];
    for (int r = 0; r < problem.rounds; r++) {
      for (int pool = 0; pool < pools; pool++) {
        skilledPart[r][pool] = skilledPart(r, pool);
      }
    }
  }

  private void countIn(int person) {
    boolean[] in = new boolean[pools];
    for (int pool = 0; pool < pools; pool++) {
      in[pool] = inPool(person, pool);
    }
    for (int s = 0; s < stretches; s++) {
      int from = firstMinute + s * STRETCH_MINUTES;
      int to = from + STRETCH_MINUTES;
      if (problem.present(person, from, to) && !problem.busy(person, from, to)) {
        for (int pool = 0; pool < pools; pool++) {
          there[s][pool] += in[pool] ? PARTS : 0;
        }
      }
    }
  }

  private boolean inPool(int person, int pool) {
    int beyond = pool - problem.disciplines;
    return switch (beyond) {
      case 0 -> scramblesAnything(person);
      case 1 -> problem.judges[person];
      case 2 -> problem.runs[person];
      case 3 -> problem.judges[person] || problem.runs[person] || scramblesAnything(person);
      default -> problem.scrambles[pool][person];
    };
  }

  private boolean scramblesAnything(int person) {
    for (int d = 0; d < problem.disciplines; d++) {
      if (problem.scrambles[d][person]) {
        return true;
      }
    }
    return false;
  }

  private double skilledPart(int round, int pool) {
    int skilled = 0;
    for (int seat = problem.seatStart[round]; seat < problem.seatStart[round + 1]; seat++) {
      skilled += inPool(problem.seatPerson[seat], pool) ? 1 : 0;
    }
    return (double) skilled / Math.max(1, problem.entrants(round));
  }

  /** What each group of a shape keeps of each pool, in sixteenths. */
  int[][] kept(Shape shape) {
    int[][] kept = new int[shape.groups][];
    for (int i = 0; i < shape.groups; i++) {
      kept[i] = kept(shape, i);
    }
    return kept;
  }

  private int[] kept(Shape shape, int group) {
    int[] kept = new int[pools];
    int own = problem.roundDiscipline[shape.round];
    for (int pool = 0; pool < pools; pool++) {
      double amount = shape.size[group] * skilledPart[shape.round][pool];
      int beyond = pool - problem.disciplines;
      if (pool == own || beyond == 0) {
        amount += shape.crew[group][1];
      } else if (beyond == 1) {
        amount += shape.crew[group][0];
      } else if (beyond == 2) {
        amount += shape.crew[group][2];
      } else if (beyond == 3) {
        amount += shape.crew[group][0] + shape.crew[group][1] + shape.crew[group][2];
      }
      kept[pool] = (int) Math.ceil(amount * PARTS);
    }
    return kept;
  }

  int lastMinute() {
    return firstMinute + stretches * STRETCH_MINUTES;
  }

  int stretch(int minute) {
    return Math.max(0, Math.min(stretches - 1, (minute - firstMinute) / STRETCH_MINUTES));
  }
}
