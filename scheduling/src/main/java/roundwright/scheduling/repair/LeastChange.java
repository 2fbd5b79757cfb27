package roundwright.scheduling.repair;

import java.util.HashSet;
import java.util.Map;
import java.util.Set;
import java.util.TreeMap;
import roundwright.scheduling.core.Board;
import roundwright.scheduling.core.KeptDays;
import roundwright.scheduling.core.Problem;

/**
 * A lower bound on what must change: for each round and role, the commitments that people were told
 * and can no longer have, or those that somebody must newly take for as many to be filled as now
 * are, whichever are more. It looks at each commitment alone: the hall open, the person there, free
 * and skilled.
 *
 * @param commitments at least so many change
 * @param people at least so many are to be told
 */
public record LeastChange(int commitments, int people) {
  static LeastChange of(Board board, KeptDays kept) {
    Problem problem = board.problem;
    Map<Integer, int[]> byKey = new TreeMap<>();
    Set<Integer> told = new HashSet<>();
    for (int p = 0; p < problem.people; p++) {
      for (int i = 0; i < kept.key[p].length; i++) {
        boolean possible = stillPossible(problem, kept, p, i);
        counts(byKey, kept.key[p][i])[possible ? 0 : 1]++;
        counts(byKey, kept.key[p][i])[3] += !possible && lostForGood(problem, kept, p, i) ? 1 : 0;
        if (!possible) {
          told.add(p);
        }
      }
      for (int i = 0; i < board.commitmentCount(p); i++) {
        int commitment = board.commitment(p, i);
        int round = board.frame.round[commitment >> 2];
        counts(byKey, round << 2 | (commitment & 3))[2]++;
      }
    }
    int commitments = 0;
    for (int[] counted : byKey.values()) {
      commitments += counted[3] + Math.max(counted[1] - counted[3], counted[2] - counted[0]);
    }
    return new LeastChange(commitments, Math.max(told.size(), commitments > 0 ? 1 : 0));
  }

  /**
   * Of a round and role: told and still possible, told and no longer so, now, and of the second
   * those whose people cannot take another one either.
   */
  private static int[] counts(Map<Integer, int[]> byKey, int key) {
    return byKey.computeIfAbsent(key, unused -> new int[4]);
  }

  private static boolean lostForGood(Problem problem, KeptDays kept, int person, int at) {
    int round = kept.key[person][at] >> 2;
    int kind = kept.key[person][at] & 3;
    return round < problem.rounds
        && kind != Problem.SOLVING
        && !problem.skilled(person, round, kind);
  }

  private static boolean stillPossible(Problem problem, KeptDays kept, int person, int at) {
    int round = kept.key[person][at] >> 2;
    int kind = kept.key[person][at] & 3;
    int hall = kept.hall[person][at];
    int start = kept.start[person][at];
    int end = kept.end[person][at];
    if (start < kept.pastBefore) {
      return true;
    }
    if (round >= problem.rounds
        || hall >= problem.halls
        || !couldStand(problem, hall, start, end)) {
      return false;
    }
    if (kind == Problem.SOLVING) {
      return problem.seatOf(person, round) >= 0
          && (problem.roundLikely[round] || problem.present(person, start, end));
    }
    return problem.skilled(person, round, kind)
        && problem.present(person, start, end)
        && !problem.busy(person, start, end);
  }

  /** Whether a hall is open for it, give or take what counts as no change. */
  private static boolean couldStand(Problem problem, int hall, int start, int end) {
    for (int w = 0; w < problem.hallFreeFrom[hall].length; w++) {
      if (problem.hallFreeFrom[hall][w] <= start + KeptDays.MOST_APART_MINUTES
          && end - KeptDays.MOST_APART_MINUTES <= problem.hallFreeTo[hall][w]) {
        return true;
      }
    }
    return false;
  }
}
