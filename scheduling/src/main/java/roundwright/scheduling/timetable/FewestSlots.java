package roundwright.scheduling.timetable;

import java.util.Arrays;
import java.util.Comparator;
import java.util.stream.IntStream;
import roundwright.scheduling.core.Dice;

/**
 * Rounds to as few slots as can be, so that none meets another which it must not meet: a fixed
 * number of slots, in which meetings are repaired one move at a time, none taken back for a while
 * (Hertz and de Werra 1987), then one slot less. What comes of it is an order of priority for the
 * decoder, nothing else. Not thread-safe.
 */
final class FewestSlots {
  private static final int LOOKS_BETWEEN = 64;
  private static final double WAIT_PER_MEETING = 0.6;
  private static final int MOST_EXTRA_WAIT = 10;

  private final int[][] apart;
  private final Dice dice;
  private final int[] slot;
  private int slots;
  private int[][] meetings;
  private long[][] barredUntil;
  private long meeting;
  private long tries;

  /* The move chosen last, how many more meetings it makes, and how many rounds had one. */
  private int chosen;
  private int chosenSlot;
  private int chosenMore;
  private int troubled;

  /**
   * @param apart of each round those it must not meet
   */
  FewestSlots(int[][] apart, Dice dice) {
    this.apart = apart;
    this.dice = dice;
    slot = new int[apart.length];
  }

  /** The slot of each round, in the fewest slots found within the budget. */
  int[] search(Timetabling.Budget budget) {
    firstFit();
    int[] best = slot.clone();
    while (slots > 1) {
      closeLastSlot();
      if (!repair(budget)) {
        return best;
      }
      System.arraycopy(slot, 0, best, 0, slot.length);
    }
    return best;
  }

  private void firstFit() {
    Arrays.fill(slot, -1);
    int[] byDegree =
        IntStream.range(0, apart.length)
            .boxed()
            .sorted(Comparator.comparingInt((Integer r) -> -apart[r].length))
            .mapToInt(Integer::intValue)
            .toArray();
    for (int r : byDegree) {
      boolean[] taken = new boolean[apart.length + 1];
      for (int other : apart[r]) {
        if (slot[other] >= 0) {
          taken[slot[other]] = true;
        }
      }
      int first = 0;
      while (taken[first]) {
        first++;
      }
      slot[r] = first;
      slots = Math.max(slots, first + 1);
    }
  }

  private void closeLastSlot() {
    slots--;
    meetings = new int[apart.length][slots];
    barredUntil = new long[apart.length][slots];
    for (int r = 0; r < slot.length; r++) {
      slot[r] = slot[r] == slots ? dice.below(slots) : slot[r];
    }
    meeting = 0;
    for (int r = 0; r < slot.length; r++) {
      for (int other : apart[r]) {
        meetings[r][slot[other]]++;
      }
      meeting += meetings[r][slot[r]];
    }
    meeting /= 2;
  }

  private boolean repair(Timetabling.Budget budget) {
    long least = meeting;
    for (long move = 1; meeting > 0; move++) {
      if (move % LOOKS_BETWEEN == 0 && budget.used(tries) >= 1) {
        return false;
      }
      choose(move, least);
      tries += 1 + (long) troubled * slots / LOOKS_BETWEEN;
      if (chosen >= 0) {
        barredUntil[chosen][slot[chosen]] =
            move + (long) (WAIT_PER_MEETING * troubled) + dice.below(MOST_EXTRA_WAIT);
        move(chosen, chosenSlot);
        meeting += chosenMore;
        least = Math.min(least, meeting);
      }
    }
    return true;
  }

  /** The move that leaves the fewest meetings, any of them where several do. */
  private void choose(long move, long least) {
    chosen = -1;
    chosenMore = Integer.MAX_VALUE;
    troubled = 0;
    int alike = 0;
    for (int r = 0; r < slot.length; r++) {
      int now = meetings[r][slot[r]];
      troubled += now > 0 ? 1 : 0;
      for (int s = 0; now > 0 && s < slots; s++) {
        int more = meetings[r][s] - now;
        boolean allowed = barredUntil[r][s] < move || meeting + more < least;
        if (s != slot[r] && allowed && more <= chosenMore) {
          alike = more < chosenMore ? 1 : alike + 1;
          chosenMore = more;
          if (dice.below(alike) == 0) {
            chosen = r;
            chosenSlot = s;
          }
        }
      }
    }
  }

  private void move(int round, int to) {
    for (int other : apart[round]) {
      meetings[other][slot[round]]--;
      meetings[other][to]++;
    }
    slot[round] = to;
  }
}
