package roundwright.scheduling.bounds;

import java.util.Arrays;
import roundwright.scheduling.core.Board;
import roundwright.scheduling.core.Frame;
import roundwright.scheduling.core.Problem;
import roundwright.scheduling.cost.RuleName;
import roundwright.scheduling.crewing.Standing;

/**
 * The least that load and waiting can cost together. Whoever has <em>y</em> minutes of duty on a
 * date is on site that date for at least the shortest time their own groups of it can be chosen to
 * take, and for at least those groups' minutes and <em>y</em>; so each person's cost is at least a
 * convex function of their duty minutes by date. Rounds with groups on several dates are left out
 * of that time. Duties are taken as divisible and to collide with nothing: a flow of duty minutes
 * to people of the skill who are there, solved by filling the duties of each crew to one level in
 * turn (block coordinate descent). The bound is then the least over all flows of the tangent at
 * what was found (Frank and Wolfe 1956), which holds however near the optimum that is.
 *
 * <p>In strain units; costs are by minute. Layout: what is of a person and a date lies at {@code
 * person * dates + date}.
 */
final class DutyFlow {
  private static final int SWEEPS = 40;
  private static final int HALVINGS = 40;
  private static final double ENOUGH = 1e-4;
  private static final double MINUTES_AN_HOUR = 60;
  private static final double QUARTERS = 225;
  private static final double ROUNDING = 1e-6;
  private static final int MOST_TRIES = 20_000;

  private final Frame frame;
  private final Problem problem;
  private final Board board;
  private final double waiting;
  private final double[] load;
  private final double[] onSite;
  private final double[] solving;
  private final int dates;
  private final int[] dateOf;
  private final double[] inAll;
  private final double[] duty;
  private final double[] level;
  private final double[][] given;
  private final int[] blocks;

  private double shortest;
  private int tries;

  DutyFlow(Standing standing) {
    frame = standing.frame;
    problem = standing.problem;
    board = standing.board;
    waiting = StrainBound.weight(problem, RuleName.WAITING) / MINUTES_AN_HOUR;
    double loadWeight = StrainBound.weight(problem, RuleName.LOAD) / QUARTERS;
    int[] known = Arrays.stream(frame.date).sorted().distinct().toArray();
    dates = known.length;
    dateOf = Arrays.stream(frame.date).map(date -> Arrays.binarySearch(known, date)).toArray();
    load = new double[problem.people];
    inAll = new double[problem.people];
    onSite = new double[problem.people * dates];
    solving = new double[problem.people * dates];
    duty = new double[problem.people * dates];
    level = new double[problem.people * dates];
    for (int p = 0; p < problem.people; p++) {
      load[p] = loadWeight / problem.share[p];
      for (int date = 0; date < dates && waiting > 0; date++) {
        int[] seats = seatsOn(p, date);
        int at = p * dates + date;
        solving[at] = leastSolving(seats);
        onSite[at] = Math.max(solving[at], leastOnSite(seats));
      }
    }
    given = new double[frame.groups * 3][];
    for (int gk = 0; gk < given.length; gk++) {
      given[gk] = new double[frame.candidates[gk].length];
    }
    blocks =
        java.util.stream.IntStream.range(0, given.length)
            .filter(gk -> board.filled[gk] > 0)
            .toArray();
  }

  double least() {
    double before = Double.MAX_VALUE;
    for (int sweep = 0; sweep < SWEEPS; sweep++) {
      for (int gk : blocks) {
        fill(gk);
      }
      double now = cost();
      if (before - now < ENOUGH * now) {
        break;
      }
      before = now;
    }
    return tangentLeast();
  }

  private double cost() {
    double cost = 0;
    for (int p = 0; p < problem.people; p++) {
      cost += load[p] * inAll[p] * inAll[p];
    }
    for (int at = 0; at < duty.length; at++) {
      cost += waiting * Math.max(onSite[at], solving[at] + duty[at]);
    }
    return cost;
  }

  private int minutes(int gk) {
    return frame.end[gk / 3] - frame.start[gk / 3];
  }

  /** Gives a crew's duty minutes anew to whom they cost least, everything else standing. */
  private void fill(int gk) {
    int[] able = frame.candidates[gk];
    double each = minutes(gk);
    double wanted = each * Math.min(board.filled[gk], able.length);
    int date = dateOf[gk / 3];
    for (int i = 0; i < able.length; i++) {
      duty[able[i] * dates + date] -= given[gk][i];
      inAll[able[i]] -= given[gk][i];
    }
    double low = 0;
    double high = 1;
    while (taken(gk, high, each) < wanted && high < 1e9) {
      high *= 2;
    }
    for (int i = 0; i < HALVINGS; i++) {
      double middle = (low + high) / 2;
      if (taken(gk, middle, each) < wanted) {
        low = middle;
      } else {
        high = middle;
      }
    }
    for (int i = 0; i < able.length; i++) {
      int p = able[i];
      int at = p * dates + date;
      double amount = amountAt(p, at, high, each);
      given[gk][i] = amount;
      duty[at] += amount;
      inAll[p] += amount;
      if (amount > 0 && amount < each) {
        level[at] = high;
      }
    }
  }

  private double taken(int gk, double marginal, double each) {
    double sum = 0;
    for (int p : frame.candidates[gk]) {
      sum += amountAt(p, p * dates + dateOf[gk / 3], marginal, each);
    }
    return sum;
  }

  /** How much more duty brings somebody's marginal cost to a level, from 0 to one duty. */
  private double amountAt(int p, int at, double marginal, double each) {
    double spare = Math.max(0, onSite[at] - solving[at] - duty[at]);
    double twice = 2 * load[p];
    double amount;
    if (marginal < twice * (inAll[p] + spare)) {
      amount = marginal / twice - inAll[p];
    } else if (marginal <= waiting + twice * (inAll[p] + spare)) {
      amount = spare;
    } else {
      amount = twice > 0 ? (marginal - waiting) / twice - inAll[p] : each;
    }
    return Math.max(0, Math.min(each, amount));
  }

  /** The least over all ways to fill the crews of the tangent to the cost at the flow found. */
  private double tangentLeast() {
    double[] slope = new double[duty.length];
    double least = 0;
    for (int p = 0; p < problem.people; p++) {
      least -= load[p] * inAll[p] * inAll[p];
      for (int at = p * dates; at < (p + 1) * dates; at++) {
        double part = onSitePart(p, at);
        slope[at] = waiting * part + 2 * load[p] * inAll[p];
        least += waiting * (onSite[at] + part * (solving[at] - onSite[at]));
      }
    }
    for (int gk : blocks) {
      int date = dateOf[gk / 3];
      double[] slopes =
          Arrays.stream(frame.candidates[gk]).mapToDouble(p -> slope[p * dates + date]).toArray();
      Arrays.sort(slopes);
      for (int i = 0; i < Math.min(board.filled[gk], slopes.length); i++) {
        least += slopes[i] * minutes(gk);
      }
    }
    return Math.max(0, least);
  }

  /** The tangent's slope where more duty begins to take more time: any part of it is one. */
  private double onSitePart(int p, int at) {
    double spare = onSite[at] - solving[at] - duty[at];
    if (waiting == 0 || spare > ROUNDING) {
      return 0;
    }
    if (spare < -ROUNDING) {
      return 1;
    }
    return Math.max(0, Math.min(1, (level[at] - 2 * load[p] * inAll[p]) / waiting));
  }

  /** The person's seats in rounds all of whose groups are on that date. */
  private int[] seatsOn(int person, int date) {
    return Arrays.stream(problem.personSeats[person])
        .filter(
            seat ->
                Arrays.stream(frame.groupsOf[problem.seatRound[seat]])
                    .allMatch(g -> dateOf[g] == date))
        .toArray();
  }

  private double leastSolving(int[] seats) {
    double minutes = 0;
    for (int seat : seats) {
      minutes +=
          Arrays.stream(frame.groupsOf[problem.seatRound[seat]])
              .filter(g -> mayBeIn(seat, g))
              .mapToDouble(g -> frame.end[g] - frame.start[g])
              .min()
              .orElse(0);
    }
    return minutes;
  }

  private boolean mayBeIn(int seat, int g) {
    return (frame.seatPin[seat] < 0 || frame.seatPin[seat] == g)
        && StrainBound.couldSolve(frame, problem.seatPerson[seat], g);
  }

  /** By depth-first search with the time on site so far as its bound; 0 where that takes long. */
  private double leastOnSite(int[] seats) {
    shortest = Double.MAX_VALUE;
    tries = 0;
    choose(seats, new int[seats.length], 0);
    return tries > MOST_TRIES || shortest == Double.MAX_VALUE ? 0 : shortest;
  }

  private void choose(int[] seats, int[] chosen, int count) {
    double soFar = minutesOnSite(chosen, count);
    if (soFar >= shortest || ++tries > MOST_TRIES) {
      return;
    }
    if (count == seats.length) {
      shortest = soFar;
      return;
    }
    for (int g : frame.groupsOf[problem.seatRound[seats[count]]]) {
      if (mayBeIn(seats[count], g) && collidesWithNone(chosen, count, g)) {
        chosen[count] = g;
        choose(seats, chosen, count + 1);
      }
    }
  }

  private boolean collidesWithNone(int[] chosen, int count, int g) {
    for (int i = 0; i < count; i++) {
      if (frame.conflict(chosen[i], g)) {
        return false;
      }
    }
    return true;
  }

  private double minutesOnSite(int[] chosen, int count) {
    int first = Integer.MAX_VALUE;
    int last = Integer.MIN_VALUE;
    for (int i = 0; i < count; i++) {
      first = Math.min(first, frame.start[chosen[i]]);
      last = Math.max(last, frame.end[chosen[i]]);
    }
    return count == 0 ? 0 : last - first;
  }
}
