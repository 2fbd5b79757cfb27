package roundwright.scheduling.crewing;

import java.util.ArrayList;
import java.util.Arrays;
import java.util.Comparator;
import java.util.List;
import java.util.stream.IntStream;
import roundwright.scheduling.core.Board;
import roundwright.scheduling.core.Dice;
import roundwright.scheduling.core.Frame;
import roundwright.scheduling.core.Problem;
import roundwright.scheduling.rules.Ledger;
import roundwright.scheduling.rules.RuleBook;

/**
 * Groups and duties over one day plan: a first arrangement by flow, exact polish, then annealing
 * (Kirkpatrick, Gelatt and Vecchi 1983) with a temperature that falls geometrically. Not
 * thread-safe; independent searches each have their own.
 */
public final class Crewing {
  private static final int SWEEPS = 3;
  private static final int MOST_POLISHES = 12;
  private static final int NEAR_MOMENTS = 4;
  private static final int LOGARITHMS = 4096;
  private static final double MILLIONTHS = 1_000_000.0;
  private static final double MOVES_PER_PLACE_AND_DEGREE = 1200.0;
  private static final double COOLEST_START = 0.3;
  private static final double WARMEST_START = 4.0;
  private static final double END = 0.1;
  private static final int MOVES_BETWEEN_LOOKS = 256;

  /** Minus the logarithm of the middle of each of equally wide steps of 0 to 1. */
  private static final double[] MINUS_LOG = minusLogs();

  private final Ledger ledger;
  private final Frame frame;
  private final Problem problem;
  private final ExactParts parts;
  private final Dice dice;
  private final Refill refill;
  private final Untangling untangling;
  private final Relief relief;

  public Crewing(Frame frame, RuleBook book, Dice dice) {
    this(new Board(frame), book, dice);
  }

  private Crewing(Board board, RuleBook book, Dice dice) {
    this.frame = board.frame;
    this.problem = board.problem;
    this.ledger = new Ledger(board, book);
    this.parts = new ExactParts(ledger);
    this.dice = dice;
    this.refill = new Refill(ledger, dice);
    this.untangling = new Untangling(ledger, refill, dice);
    this.relief = new Relief(ledger, refill);
  }

  /** Goes on from an arrangement. */
  public static Crewing from(Arrangement arrangement, RuleBook book, Dice dice) {
    return new Crewing(arrangement.board(), book, dice);
  }

  private static double[] minusLogs() {
    double[] logs = new double[LOGARITHMS];
    for (int i = 0; i < LOGARITHMS; i++) {
      logs[i] = -StrictMath.log((i + 0.5) / LOGARITHMS);
    }
    return logs;
  }

  public Arrangement arrangement() {
    return Arrangement.of(ledger);
  }

  /**
   * Seats everybody and fills what duties it can.
   *
   * @return whether it came to the end before the halt
   */
  public boolean firstPlan(Halt halt) {
    for (int place = 0; place < frame.places; place++) {
      if (frame.placePin[place] >= 0) {
        ledger.duty(place, frame.placePin[place]);
      }
    }
    ledger.keep();
    List<Integer> rounds = roundsWithGroups();
    rounds.sort(
        Comparator.comparingInt((Integer r) -> frame.groupsOf[r].length).thenComparing(r -> r));
    for (int sweep = 0; sweep < SWEEPS; sweep++) {
      boolean better = false;
      for (int round : rounds) {
        if (sweep > 0 && halt.now()) {
          break;
        }
        better |= parts.seatRound(round);
      }
      if (!better) {
        break;
      }
    }
    untangling.everybody(halt);
    List<Integer> moments = new ArrayList<>(IntStream.range(0, parts.moments()).boxed().toList());
    double[] scarcity = moments.stream().mapToDouble(parts::scarcity).toArray();
    moments.sort(Comparator.comparingDouble((Integer m) -> -scarcity[m]).thenComparing(m -> m));
    for (int moment : moments) {
      if (halt.now()) {
        return false;
      }
      parts.crewMoment(moment);
    }
    relief.everyGroup(halt);
    return true;
  }

  private List<Integer> roundsWithGroups() {
    return new ArrayList<>(
        IntStream.range(0, problem.rounds)
            .filter(r -> frame.groupsOf[r].length > 0)
            .boxed()
            .toList());
  }

  /**
   * Like {@link #polish}, but only where somebody's day or a group breaks a rule, or a duty is
   * empty: leaves alone what is whole.
   */
  public void mend(Halt halt) {
    boolean[] stale = new boolean[parts.moments()];
    for (int turn = 0; turn < MOST_POLISHES && ledger.hard() > 0 && !halt.now(); turn++) {
      long before = ledger.hard();
      untangling.everybody(halt);
      relief.everyGroup(halt);
      parts.markTroubled(stale);
      polishMoments(stale, halt);
      for (int round : roundsWithGroups()) {
        if (!halt.now() && frame.groupsOf[round].length > 1 && parts.isTroubled(round)) {
          parts.seatRound(round);
        }
      }
      if (ledger.hard() >= before) {
        return;
      }
    }
  }

  /**
   * Solves each moment and each round exactly in turn, until nothing is gained. After the first
   * turn a moment is looked at again only where something near it in time got better.
   */
  public void polish(Halt halt) {
    boolean[] stale = new boolean[parts.moments()];
    Arrays.fill(stale, true);
    for (int turn = 0; turn < MOST_POLISHES && !halt.now(); turn++) {
      boolean better = polishMoments(stale, halt);
      if (turn < SWEEPS) {
        for (int round : roundsWithGroups()) {
          if (!halt.now() && frame.groupsOf[round].length > 1 && parts.seatRound(round)) {
            better = true;
            parts.markMoments(round, stale, NEAR_MOMENTS);
          }
        }
      }
      better |= untangling.everybody(halt);
      better |= relief.everyGroup(halt);
      if (!better) {
        return;
      }
    }
  }

  private boolean polishMoments(boolean[] stale, Halt halt) {
    boolean better = false;
    for (int moment = 0; moment < stale.length && !halt.now(); moment++) {
      if (stale[moment]) {
        stale[moment] = false;
        if (parts.crewMoment(moment)) {
          better = true;
          int from = Math.max(0, moment - NEAR_MOMENTS);
          int to = Math.min(stale.length, moment + NEAR_MOMENTS + 1);
          Arrays.fill(stale, from, to, true);
          stale[moment] = false;
        }
      }
    }
    return better;
  }

  /** How far a budget is used: 0 at the start, 1 or more once it is spent. */
  public interface Budget {
    double used(long moves);

    /** The moves that are likely to be made, for the first temperature. */
    double likelyMoves();
  }

  /** Follows a running search. */
  public interface Watch {
    void look(long hard, long strain, long moves);
  }

  /**
   * Anneals until the budget is used, then stands at the best arrangement seen.
   *
   * @return moves tried
   */
  public long anneal(Budget budget, Watch watch) {
    Moves moves = new Moves(ledger, refill, dice);
    double start =
        Math.max(
            COOLEST_START,
            Math.min(
                WARMEST_START,
                budget.likelyMoves() / Math.max(1, frame.places) / MOVES_PER_PLACE_AND_DEGREE));
    Arrangement best = arrangement();
    boolean atBest = true;
    long bestHard = ledger.hard();
    long bestStrain = ledger.strain();
    long tried = 0;
    double temperature = start;
    while (true) {
      if (tried % MOVES_BETWEEN_LOOKS == 0) {
        double used = budget.used(tried);
        if (used >= 1) {
          break;
        }
        temperature = start * StrictMath.pow(END / start, used) * MILLIONTHS;
        watch.look(bestHard, bestStrain, tried);
      }
      tried++;
      if (!moves.propose()) {
        ledger.undo();
        continue;
      }
      ledger.settle();
      long hardChange = ledger.hardChange();
      long strainChange = ledger.strainChange();
      if (!accepted(hardChange, strainChange, temperature)) {
        ledger.undo();
        continue;
      }
      boolean worse = hardChange > 0 || (hardChange == 0 && strainChange > 0);
      if (worse && atBest) {
        ledger.undo();
        best = arrangement();
        atBest = false;
        continue;
      }
      ledger.keep();
      if (ledger.hard() < bestHard || (ledger.hard() == bestHard && ledger.strain() < bestStrain)) {
        bestHard = ledger.hard();
        bestStrain = ledger.strain();
        atBest = true;
      }
    }
    if (!atBest) {
      restore(best);
    }
    return tried;
  }

  private boolean accepted(long hardChange, long strainChange, double temperature) {
    if (hardChange != 0) {
      return hardChange < 0;
    }
    if (strainChange <= 0) {
      return true;
    }
    double drawn = MINUS_LOG[dice.below(LOGARITHMS)];
    return strainChange <= temperature * drawn;
  }

  private void restore(Arrangement arrangement) {
    for (int place = 0; place < frame.places; place++) {
      ledger.duty(place, -1);
    }
    for (int seat = 0; seat < problem.seats; seat++) {
      ledger.seat(seat, arrangement.groupOf(seat));
    }
    for (int place = 0; place < frame.places; place++) {
      ledger.duty(place, arrangement.personAt(place));
    }
    ledger.keep();
  }

  public long hard() {
    return ledger.hard();
  }

  public long strain() {
    return ledger.strain();
  }
}
