package roundwright.scheduling;

import java.util.List;
import roundwright.scheduling.core.Dice;
import roundwright.scheduling.core.Frame;
import roundwright.scheduling.core.Problem;
import roundwright.scheduling.core.Slot;
import roundwright.scheduling.crewing.Arrangement;
import roundwright.scheduling.crewing.Crewing;
import roundwright.scheduling.rules.RuleBook;
import roundwright.scheduling.timetable.Timetabling;

/**
 * The search for a day plan: a few laid out anew by their outlook, then one changed a little again
 * and again, each judged by the price of a first arrangement over it. Simulated annealing
 * (Kirkpatrick, Gelatt and Vecchi 1983) with the outlook as a cheap stand-in for the price, which
 * proposes, and the first arrangement, which decides. Not thread-safe.
 *
 * <p>A first arrangement's price foretells the annealed one's well (see DECISIONS.md), the
 * outlook's only so-so.
 */
final class DayPlanSearch {
  private static final int FEWEST_LAYOUTS = 50;
  private static final double STARTS_UNTIL = 0.2;
  private static final int MOST_STARTS = 8;
  private static final double START_PART = 0.04;
  private static final double ANEW_PART = 0.15;
  private static final double AGAIN_PART = 0.04;
  private static final double HOT = 300;
  private static final double LUKEWARM = 60;
  private static final double COLD = 3;
  private static final double SLOTS_PART = 0.4;
  private static final double COLD_PART = 0.1;
  private static final double LONG_PART = 0.15;
  private static final double PACKED_UNTIL = 0.85;
  private static final double WARMER = 1.6;
  private static final int MOST_LAYOUTS = 1_000_000;
  private static final int LAYOUTS_PER_START = 5_000;
  private static final int MOST_CHANGES = 8;
  private static final double OUTLOOK_WARMTH = 1.5;
  private static final double PRICE_WARMTH = 3;
  private static final double MOVES_PER_FRAME = 400;
  private static final double MOVES_PER_PLACE = 8;
  private static final double MOVES_PER_POLISHED_PLACE = 60;
  private static final double SEATS_PER_MOVE = 20;
  private static final double FEWEST_MOVES_PER_LAYOUT = 8;

  /** What a breach and a gap of a first arrangement count in strain: much of either still heals. */
  private static final double BREACH = 1500;

  private static final double GAP = 300;

  private static final double FIRST_PRESSURE = 0.1;
  private static final double MORE_PRESSURE = 0.08;
  private static final double LESS_PRESSURE = 0.05;
  private static final double MOST_PRESSURE = 0.6;
  private static final double MILLIONTHS = 1e6;
  private static final int DRAWS = 1 << 20;

  /** How far the search's part of a budget is used, 0 to 1, and whether to stop at once. */
  interface Budget {
    double used(double moves, boolean broken);

    boolean over();

    /** Over even for the very first arrangement. */
    boolean overdue();

    void found(Arrangement best, Progress.Stage stage);
  }

  private final Problem problem;
  private final RuleBook book;
  private final Timetabling timetabling;
  private final Dice dice;
  private final Budget budget;
  private final double size;
  private double pressure = FIRST_PRESSURE;
  private double moves;
  private Timetabling.Choice standing;
  private double standingPrice;
  private Arrangement best;
  private double bestOverrun;
  private Arrangement latest;

  DayPlanSearch(Problem problem, RuleBook book, Dice dice, Budget budget) {
    this.problem = problem;
    this.book = book;
    this.dice = dice;
    this.budget = budget;
    timetabling = new Timetabling(problem);
    size = StrictMath.sqrt(problem.people);
  }

  /** The best first arrangement over any day plan tried; there is one however small the budget. */
  Arrangement best() {
    timetabling.startAnew();
    tryOut(timetabling.search(pressure, HOT, dice, l -> l / (double) FEWEST_LAYOUTS), false);
    stand();
    boolean inTime = (!timetabling.timesOnly() || pack()) && start();
    if (inTime && best.hard > 0) {
      inTime = mend();
    }
    if (inTime) {
      climb();
    }
    return best;
  }

  private double used() {
    return budget.over() ? 1 : budget.used(moves, best.hard > 0);
  }

  /**
   * Where times are all there is to choose, no arrangement can tell more than the outlook: fewest
   * slots, then long searches by the outlook alone; false where the time was over.
   */
  private boolean pack() {
    if (timetabling.slotsAlike()) {
      packIntoSlots();
      if (!tryOut(search(COLD, COLD_PART, MOST_LAYOUTS), false)) {
        return false;
      }
      stand();
    }
    while (used() < PACKED_UNTIL) {
      timetabling.startAnew();
      if (!tryOut(search(HOT, LONG_PART, MOST_LAYOUTS), false)) {
        return false;
      }
      if (price(latest) <= standingPrice) {
        stand();
      }
    }
    timetabling.goBackTo(standing);
    return true;
  }

  private void packIntoSlots() {
    double usedBefore = used();
    double movesBefore = moves;
    timetabling.packIntoSlots(
        dice,
        tries -> {
          moves = movesBefore + tries;
          return (used() - usedBefore) / SLOTS_PART;
        });
  }

  /** Several starts, to go on from the best; false where the time was over. */
  private boolean start() {
    for (int starts = 0; starts < MOST_STARTS && used() < STARTS_UNTIL; starts++) {
      timetabling.startAnew();
      if (!tryOut(search(HOT, START_PART, LAYOUTS_PER_START), false)) {
        return false;
      }
      if (price(latest) <= standingPrice) {
        stand();
      }
      learn();
    }
    timetabling.goBackTo(standing);
    return true;
  }

  /**
   * Goes on by the outlook and by what is learned from each plan that breaks, until one does not:
   * warmer from time to time where that is in vain.
   */
  private boolean mend() {
    double warm = LUKEWARM;
    boolean anew = true;
    while (best.hard > 0 && used() < 1) {
      if (anew) {
        timetabling.startAnew();
        timetabling.forgetLessons();
      }
      long hardBefore = best.hard;
      double from = anew ? HOT : Math.min(HOT, warm);
      if (!tryOut(search(from, anew ? ANEW_PART : AGAIN_PART, MOST_LAYOUTS), true)) {
        return false;
      }
      learn();
      anew = book.hard(latest.frame) > 0;
      warm = best.hard < hardBefore ? LUKEWARM : warm * WARMER;
      if (best.hard == 0) {
        stand();
      }
    }
    return true;
  }

  private List<Slot> search(double from, double part, long mostLayouts) {
    double usedBefore = used();
    double movesPerLayout = Math.max(FEWEST_MOVES_PER_LAYOUT, problem.seats / SEATS_PER_MOVE);
    double movesBefore = moves;
    return timetabling.search(
        pressure,
        from,
        dice,
        layouts -> {
          moves = movesBefore + layouts * movesPerLayout;
          double ofPart = (used() - usedBefore) / part;
          return budget.over() ? 1 : Math.max(ofPart, layouts / (double) mostLayouts);
        });
  }

  private void climb() {
    while (used() < 1) {
      if (!wander()) {
        return;
      }
      double then = price(latest);
      double temperature = PRICE_WARMTH * size * (1 - used());
      double drawn = (dice.below(DRAWS) + 0.5) / DRAWS;
      if (then - standingPrice <= -temperature * StrictMath.log(drawn)) {
        stand();
      } else {
        timetabling.goBackTo(standing);
      }
    }
  }

  private boolean wander() {
    int changes = 1 + dice.below(MOST_CHANGES);
    return tryOut(timetabling.wander(pressure, OUTLOOK_WARMTH * size, changes, dice), false);
  }

  private void stand() {
    standing = timetabling.standing();
    standingPrice = price(latest);
  }

  /** Arranges everybody over a day plan; false where there was no time left to. */
  private boolean tryOut(List<Slot> slots, boolean polished) {
    Frame frame = new Frame(problem, slots);
    Crewing crewing = new Crewing(frame, book, dice);
    boolean whole = crewing.firstPlan(best == null ? budget::overdue : budget::over);
    moves += MOVES_PER_FRAME + MOVES_PER_PLACE * frame.places;
    if (!whole && best != null) {
      return false;
    }
    if (polished) {
      crewing.polish(budget::over);
      moves += MOVES_PER_POLISHED_PLACE * frame.places;
    }
    latest = crewing.arrangement();
    double overrun = timetabling.overrunPrice();
    if (best == null || isBetter(overrun)) {
      best = latest;
      bestOverrun = overrun;
    }
    budget.found(best, Progress.Stage.FIRST_PLAN);
    return true;
  }

  private boolean isBetter(double overrun) {
    return latest.hard != best.hard
        ? latest.hard < best.hard
        : latest.strain / MILLIONTHS + overrun < best.strain / MILLIONTHS + bestOverrun;
  }

  private void learn() {
    if (latest.hard > 0) {
      boolean gaps = Lessons.learn(latest.board(), timetabling);
      pressure = gaps ? Math.min(MOST_PRESSURE, pressure + MORE_PRESSURE) : pressure;
    } else {
      pressure = Math.max(0, pressure - LESS_PRESSURE);
    }
  }

  /** Of the latest arrangement, over the layout that the timetable now stands at. */
  private double price(Arrangement arrangement) {
    long breaches = arrangement.hard / RuleBook.BREACH;
    long gaps = arrangement.hard % RuleBook.BREACH;
    return breaches * BREACH
        + gaps * GAP
        + arrangement.strain / MILLIONTHS
        + timetabling.overrunPrice();
  }
}
