package roundwright.scheduling.timetable;

import java.util.ArrayList;
import java.util.Arrays;
import java.util.Collections;
import java.util.Comparator;
import java.util.List;
import java.util.stream.IntStream;
import roundwright.scheduling.core.Dice;
import roundwright.scheduling.core.Problem;
import roundwright.scheduling.core.Slot;

/**
 * Rounds to groups, halls and starts: simulated annealing (Kirkpatrick, Gelatt and Vecchi 1983)
 * over what the serial decoder is told: the order of priority, each round's shape and the day it
 * may begin on. Not thread-safe.
 */
public final class Timetabling {
  private static final double WARM = 300;
  private static final double LUKEWARM = 60;
  private static final double COOL = 2;
  private static final int LOOKS_BETWEEN = 16;

  private final Decoder decoder;
  private final Outlook outlook;
  private final List<List<Shape>> shapes = new ArrayList<>();
  private final int[] rounds;
  private final int halls;
  private final int setupMinutes;
  private final int[] firstOrder;
  private final Shape[] shape;
  private final int[] earliest;

  private Dice dice;
  private double pressure;
  private int[] order;
  private boolean begun;
  private double foundPrice;

  public Timetabling(Problem problem) {
    halls = problem.halls;
    setupMinutes = problem.event.rules().setupMinutes();
    Supply supply = new Supply(problem);
    decoder = new Decoder(problem, supply);
    outlook = new Outlook(problem, decoder, supply);
    for (int r = 0; r < problem.rounds; r++) {
      shapes.add(Shape.ofRound(problem, supply, r));
    }
    rounds = IntStream.range(0, problem.rounds).filter(r -> !shapes.get(r).isEmpty()).toArray();
    shape = new Shape[problem.rounds];
    earliest = new int[problem.rounds];
    firstOrder =
        IntStream.of(rounds)
            .boxed()
            .sorted(
                Comparator.comparingInt((Integer r) -> problem.roundList.get(r).number())
                    .thenComparing(r -> -problem.entrants(r))
                    .thenComparing(r -> r))
            .mapToInt(Integer::intValue)
            .toArray();
  }

  /** How far a budget is used: 0 at the start, 1 or more once it is spent. */
  @FunctionalInterface
  public interface Budget {
    double used(long layouts);
  }

  /**
   * The best layout found within the budget, as slots; empty where no round has entrants. The first
   * search begins anew and warm, later ones go on from the best one, cooler.
   *
   * @param partKeptBack part of the people there that no crew may count on, 0 to 1: more of it
   *     spreads the groups further apart
   * @param warmth how much warmer than lukewarm a search begins that goes on from another; 1 and up
   */
  public List<Slot> search(double partKeptBack, Dice chance, double warmth, Budget budget) {
    pressure = partKeptBack;
    dice = chance;
    double warm = begun ? Math.min(WARM, LUKEWARM * warmth) : WARM;
    if (!begun) {
      startAnew();
    }
    begun = true;
    double price = lay();
    List<Slot> best = decoder.slots();
    Choice bestChoice = choice();
    double bestPrice = price;
    long tried = 0;
    double temperature = warm;
    while (rounds.length > 0) {
      if (tried % LOOKS_BETWEEN == 0) {
        double used = budget.used(tried);
        if (used >= 1) {
          break;
        }
        temperature = warm * StrictMath.pow(COOL / warm, used);
      }
      tried++;
      Change change = change();
      double then = lay();
      double drawn = (dice.below(1 << 20) + 0.5) / (1 << 20);
      if (then - price <= -temperature * StrictMath.log(drawn)) {
        price = then;
        if (then < bestPrice) {
          bestPrice = then;
          best = decoder.slots();
          bestChoice = choice();
        }
      } else {
        change.undo();
      }
    }
    take(bestChoice);
    foundPrice = bestPrice;
    return best;
  }

  /** Forgets the layout and what was learned, so that the next search begins anew. */
  public void forget() {
    begun = false;
    outlook.forgetLessons();
  }

  /** Whether the next search goes on from the best layout of the last one. */
  public boolean begun() {
    return begun;
  }

  /** Spreads the rounds over the halls, the longest first, each in the shape that adds least. */
  private void startAnew() {
    order = firstOrder.clone();
    Arrays.fill(earliest, Problem.NEVER);
    int[] load = new int[halls];
    IntStream.of(rounds)
        .boxed()
        .sorted(Comparator.comparingInt((Integer r) -> -minutes(shapes.get(r).get(0))))
        .forEach(
            r -> {
              shape[r] =
                  Collections.min(
                      shapes.get(r), Comparator.comparingInt(one -> fullestHall(one, load)));
              add(shape[r], load, 1);
            });
  }

  private int minutes(Shape one) {
    return IntStream.of(one.minutes).sum() + one.groups * setupMinutes;
  }

  /** Minutes in use in the fullest of a shape's halls, and a little for all the shape takes. */
  private int fullestHall(Shape one, int[] load) {
    add(one, load, 1);
    int fullest = IntStream.of(one.hall).map(hall -> load[hall]).max().getAsInt();
    add(one, load, -1);
    return fullest + minutes(one) / 4;
  }

  private void add(Shape one, int[] load, int sign) {
    for (int i = 0; i < one.groups; i++) {
      load[one.hall[i]] += sign * (one.minutes[i] + setupMinutes);
    }
  }

  /** Makes it dearer that two rounds run at one time: somebody could not be in both. */
  public void keepApart(int oneRound, int otherRound) {
    if (oneRound != otherRound) {
      outlook.raiseMeeting(oneRound, otherRound);
    }
  }

  /** Makes the shape that a round now has dearer: somebody did not find a group in it. */
  public void reshape(int round) {
    if (shape[round] != null && shapes.get(round).size() > 1) {
      outlook.raiseShape(shape[round]);
    }
  }

  private record Choice(List<Integer> order, List<Shape> shape, List<Integer> earliest) {}

  private Choice choice() {
    return new Choice(
        IntStream.of(order).boxed().toList(),
        Collections.unmodifiableList(Arrays.asList(shape.clone())),
        IntStream.of(earliest).boxed().toList());
  }

  private void take(Choice choice) {
    for (int i = 0; i < order.length; i++) {
      order[i] = choice.order.get(i);
    }
    for (int r = 0; r < shape.length; r++) {
      shape[r] = choice.shape.get(r);
      earliest[r] = choice.earliest.get(r);
    }
  }

  /** What the last layout found is likely to cost, in strain units; a breach counts 20,000. */
  public double foundPrice() {
    return foundPrice;
  }

  private double lay() {
    decoder.decode(order, shape, earliest, pressure);
    return outlook.price();
  }

  private interface Change {
    void undo();
  }

  private Change change() {
    int r = rounds[dice.below(rounds.length)];
    int kind = dice.below(10);
    if (kind < 3 && shapes.get(r).size() > 1) {
      return otherShape(r);
    }
    if (kind < 6) {
      return otherEarliest(r);
    }
    return otherOrder(kind);
  }

  private Change otherShape(int r) {
    Shape before = shape[r];
    shape[r] = shapes.get(r).get(dice.below(shapes.get(r).size()));
    return () -> shape[r] = before;
  }

  /** Not before some day, not before another round is over, or whenever it may be. */
  private Change otherEarliest(int r) {
    int before = earliest[r];
    int kind = dice.below(4);
    if (kind == 0) {
      earliest[r] = Problem.NEVER;
    } else if (kind == 1 && decoder.days() > 0) {
      earliest[r] = decoder.dayStart(dice.below(decoder.days()));
    } else {
      int other = rounds[dice.below(rounds.length)];
      earliest[r] = kind == 2 ? decoder.lastEnd[other] : decoder.firstStart[other];
    }
    return () -> earliest[r] = before;
  }

  private Change otherOrder(int kind) {
    int[] before = order.clone();
    int from = dice.below(order.length);
    int to = dice.below(order.length);
    int moved = order[from];
    if (kind % 2 == 0) {
      order[from] = order[to];
      order[to] = moved;
    } else if (from < to) {
      System.arraycopy(order, from + 1, order, from, to - from);
      order[to] = moved;
    } else {
      System.arraycopy(order, to, order, to + 1, from - to);
      order[to] = moved;
    }
    return () -> order = before;
  }
}
