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
import roundwright.scheduling.forecast.Stretch;

/**
 * Rounds to groups, halls and starts: simulated annealing (Kirkpatrick, Gelatt and Vecchi 1983)
 * over what the serial decoder is told: the order of priority, each round's shape and the day it
 * may begin on. Not thread-safe.
 */
public final class Timetabling {
  private static final double COOL = 2;
  private static final int LOOKS_BETWEEN = 16;
  private static final int TRIES_PER_CHANGE = 50;
  private static final int DRAWS = 1 << 20;

  private final Decoder decoder;
  private final Outlook outlook;
  private final List<List<Shape>> shapes = new ArrayList<>();
  private final int[] rounds;
  private final int halls;
  private final int setupMinutes;
  private final int[] firstOrder;
  private final Shape[] shape;
  private final int[] earliest;
  private final boolean timesOnly;

  private Dice dice;
  private double pressure;
  private int[] order;

  public Timetabling(Problem problem) {
    halls = problem.halls;
    setupMinutes = problem.event.rules().setupMinutes();
    Supply supply = new Supply(problem);
    decoder = new Decoder(problem, supply);
    outlook = new Outlook(problem, decoder, supply);
    List<double[]> stretches = Stretch.ofRounds(problem.event);
    for (int r = 0; r < problem.rounds; r++) {
      shapes.add(Shape.ofRound(problem, supply, r, stretches.get(r)));
    }
    rounds = IntStream.range(0, problem.rounds).filter(r -> !shapes.get(r).isEmpty()).toArray();
    boolean oneGroupEach = shapes.stream().flatMap(List::stream).allMatch(one -> one.groups == 1);
    if (oneGroupEach) {
      // Nobody can change to another group then, so that a meeting is never worth trying.
      decoder.keepSharingRoundsApart();
    }
    timesOnly =
        oneGroupEach
            && shapes.stream()
                .flatMap(List::stream)
                .allMatch(one -> IntStream.of(one.crew[0]).sum() == 0);
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

  /** Stands where nothing is known yet: each round in the shape that fills the halls evenly. */
  public void startAnew() {
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

  /**
   * The best layout by its outlook that is found within the budget, as slots; empty where no round
   * has entrants. Goes on from where it stands, and stands at what it found.
   *
   * @param partKeptBack part of the people there that no crew may count on, 0 to 1: more of it
   *     spreads the groups further apart
   * @param warm the temperature to begin at, in strain units
   */
  public List<Slot> search(double partKeptBack, double warm, Dice chance, Budget budget) {
    pressure = partKeptBack;
    dice = chance;
    outlook.sampleOthers();
    double price = lay();
    List<Slot> best = decoder.slots();
    Choice bestChoice = standing();
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
      if (then - price <= -temperature * StrictMath.log(drawn())) {
        price = then;
        if (then < bestPrice) {
          bestPrice = then;
          best = decoder.slots();
          bestChoice = standing();
        }
      } else {
        change.undo();
      }
    }
    goBackTo(bestChoice);
    return best;
  }

  /**
   * Whether every round is one group without a crew, as where an organiser plans times before
   * anybody is asked to help.
   */
  public boolean timesOnly() {
    return timesOnly;
  }

  /** Whether besides all rounds are of one length, so that time is a row of slots. */
  public boolean slotsAlike() {
    return timesOnly && IntStream.of(rounds).map(r -> shape[r].minutes[0]).distinct().count() < 2;
  }

  /**
   * Stands where rounds that share an entrant or a hall take the fewest slots: for rounds of one
   * group each, best where they are of one length.
   */
  public void packIntoSlots(Dice chance, Budget budget) {
    int[][] apart = new int[rounds.length][];
    for (int i = 0; i < rounds.length; i++) {
      int r = rounds[i];
      apart[i] =
          IntStream.range(0, rounds.length)
              .filter(j -> rounds[j] != r && mustNotMeet(r, rounds[j]))
              .toArray();
    }
    int[] slot = new FewestSlots(apart, chance).search(budget);
    Arrays.fill(earliest, Problem.NEVER);
    order =
        IntStream.range(0, rounds.length)
            .boxed()
            .sorted(Comparator.comparingInt((Integer i) -> slot[i]))
            .mapToInt(i -> rounds[i])
            .toArray();
  }

  private boolean mustNotMeet(int one, int other) {
    return shape[one].hall[0] == shape[other].hall[0]
        || Arrays.binarySearch(decoder.sharing[one], other) >= 0;
  }

  /** What the next search goes on from: the layout found last, unless another is put back. */
  public Choice standing() {
    return new Choice(order.clone(), shape.clone(), earliest.clone());
  }

  public void goBackTo(Choice choice) {
    order = choice.order.clone();
    System.arraycopy(choice.shape, 0, shape, 0, shape.length);
    System.arraycopy(choice.earliest, 0, earliest, 0, earliest.length);
  }

  /** All that the decoder was told for a layout: to be gone back to, and nothing else. */
  public static final class Choice {
    private final int[] order;
    private final Shape[] shape;
    private final int[] earliest;

    private Choice(int[] order, Shape[] shape, int[] earliest) {
      this.order = order;
      this.shape = shape;
      this.earliest = earliest;
    }
  }

  /**
   * Goes some changes on from where it stands, up and down as the temperature allows, and stays
   * there: for whoever judges layouts by more than their outlook.
   *
   * @param partKeptBack as for {@link #search}
   * @param temperature in strain units
   * @param changes how many to take
   */
  public List<Slot> wander(double partKeptBack, double temperature, int changes, Dice chance) {
    pressure = partKeptBack;
    dice = chance;
    outlook.sampleOthers();
    double price = lay();
    long layout = decoder.fingerprint();
    int taken = 0;
    int most = rounds.length == 0 ? 0 : changes * TRIES_PER_CHANGE;
    for (int tried = 0; tried < most && taken < changes; tried++) {
      Change change = change();
      double then = lay();
      if (decoder.fingerprint() == layout) {
        continue;
      }
      if (then - price <= -temperature * StrictMath.log(drawn())) {
        price = then;
        layout = decoder.fingerprint();
        taken++;
      } else {
        change.undo();
      }
    }
    lay();
    return decoder.slots();
  }

  private double drawn() {
    return (dice.below(DRAWS) + 0.5) / DRAWS;
  }

  /** Forgets what was learned from plans that broke. */
  public void forgetLessons() {
    outlook.forgetLessons();
  }

  private int minutes(Shape one) {
    return IntStream.of(one.minutes).sum() + one.groups * setupMinutes;
  }

  /** Minutes in use in the fullest of a shape's halls, and a little for all the shape takes. */
  private int fullestHall(Shape one, int[] load) {
    add(one, load, 1);
    int fullest = IntStream.of(one.hall).map(hall -> load[hall]).max().getAsInt();
    add(one, load, -1);
    return fullest + minutes(one) / 4 + one.shortMinutes() * 2;
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

  /** What the slots where it stands, shorter than is likely to do, count for, in strain units. */
  public double overrunPrice() {
    return IntStream.of(rounds).mapToDouble(r -> Outlook.overrunPrice(shape[r])).sum();
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
    if (kind < (timesOnly ? 3 : 6)) {
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
