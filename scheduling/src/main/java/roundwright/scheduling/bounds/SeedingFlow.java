package roundwright.scheduling.bounds;

import roundwright.scheduling.core.Frame;
import roundwright.scheduling.core.Problem;
import roundwright.scheduling.cost.RuleName;
import roundwright.scheduling.crewing.Standing;
import roundwright.scheduling.flow.Transport;

/**
 * The least that seeding and newcomers in first groups can cost in one round, its groups being of
 * the sizes they are: an exact transportation of entrants to groups, whatever else they have to do.
 */
final class SeedingFlow {
  private static final double MILLIONTHS = 1e6;

  private final Standing standing;
  private final Frame frame;
  private final Problem problem;
  private final Transport transport = new Transport();
  private final long seeding;
  private final long newcomerFirst;

  SeedingFlow(Standing standing) {
    this.standing = standing;
    this.frame = standing.frame;
    this.problem = standing.problem;
    seeding = weight(RuleName.SEEDING);
    newcomerFirst = weight(RuleName.NEWCOMER_FIRST);
  }

  private long weight(RuleName rule) {
    return Math.round(StrainBound.weight(problem, rule) * MILLIONTHS);
  }

  /** In millionths; 0 where the relaxation says nothing. */
  long least(int round) {
    int[] groups = frame.groupsOf[round];
    int rows = problem.entrants(round);
    if (groups.length < 2 || rows == 0) {
      return 0;
    }
    transport.begin(rows, groups.length);
    for (int row = 0; row < rows; row++) {
      price(row, problem.seatStart[round] + row, groups);
    }
    for (int i = 0; i < groups.length; i++) {
      transport.units(i, new long[standing.board.size[groups[i]]]);
    }
    transport.solve();
    long least = 0;
    for (int row = 0; row < rows; row++) {
      int column = transport.columnOf(row);
      if (column < 0) {
        return 0;
      }
      least += cost(problem.seatStart[round] + row, groups[column]);
    }
    return least;
  }

  private void price(int row, int seat, int[] groups) {
    transport.outCost(row, Transport.FORBIDDEN / 4);
    for (int i = 0; i < groups.length; i++) {
      int pinned = frame.seatPin[seat];
      boolean could =
          (pinned < 0 || pinned == groups[i])
              && StrainBound.couldSolve(frame, problem.seatPerson[seat], groups[i]);
      transport.cost(row, i, could ? cost(seat, groups[i]) : Transport.FORBIDDEN);
    }
  }

  private long cost(int seat, int group) {
    boolean first = problem.newcomer[problem.seatPerson[seat]] && frame.earliestOfSeveral[group];
    return seeding * Math.abs(frame.place[group] - frame.wantedPlace[seat])
        + (first ? newcomerFirst : 0);
  }
}
