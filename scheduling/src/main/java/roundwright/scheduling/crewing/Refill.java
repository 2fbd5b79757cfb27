package roundwright.scheduling.crewing;

import java.util.Arrays;
import roundwright.scheduling.core.Board;
import roundwright.scheduling.core.Dice;
import roundwright.scheduling.core.Frame;
import roundwright.scheduling.core.Problem;
import roundwright.scheduling.rules.Ledger;

/** Takes duties away that are in the way of something and finds somebody else for them. */
final class Refill {
  private static final int TRIES = 40;

  private final Ledger ledger;
  private final Board board;
  private final Frame frame;
  private final Problem problem;
  private final Dice dice;
  private int[] places = new int[64];
  private int count;

  Refill(Ledger ledger, Dice dice) {
    this.ledger = ledger;
    this.board = ledger.board;
    this.frame = ledger.frame;
    this.problem = ledger.problem;
    this.dice = dice;
  }

  void begin() {
    count = 0;
  }

  int place(int at) {
    return places[at];
  }

  void empty(int place) {
    if (count == places.length) {
      places = Arrays.copyOf(places, count * 2);
    }
    places[count++] = place;
    ledger.duty(place, -1);
  }

  /** Moves a seat, emptying the duties in its way; false where one of them is pinned. */
  boolean reseat(int seat, int to) {
    int person = problem.seatPerson[seat];
    ledger.seat(seat, -1);
    boolean free = board.couldTake(person, to) || throwOut(person, to);
    ledger.seat(seat, to);
    return free;
  }

  /** Empties the duties that keep a person from a group; false where one of them is pinned. */
  boolean throwOut(int person, int group) {
    for (int i = board.commitmentCount(person) - 1; i >= 0; i--) {
      int commitment = board.commitment(person, i);
      int in = commitment >> 2;
      if ((commitment & 3) == Problem.SOLVING || !frame.conflict(in, group)) {
        continue;
      }
      int place = board.placeOf(person, in);
      if (frame.placePin[place] >= 0) {
        return false;
      }
      empty(place);
    }
    return true;
  }

  /** Whether no group that the person solves in, but one, is in the way of another. */
  boolean solvesOnlyIn(int person, int but, int group) {
    for (int w = 0; w < frame.words; w++) {
      long both = board.solves[person * frame.words + w] & frame.conflicts[group * frame.words + w];
      if (but >= 0 && w == but >>> 6) {
        both &= ~(1L << but);
      }
      if (both != 0) {
        return false;
      }
    }
    return true;
  }

  /** Gives each emptied place that is still wanted to the first who could take it. */
  void fill() {
    for (int i = 0; i < count; i++) {
      int place = places[i];
      int group = frame.placeGroup[place];
      int role = frame.placeRole[place];
      if (board.placePerson[place] >= 0
          || board.filled[group * 3 + role] >= board.wanted(group, role)) {
        continue;
      }
      int[] able = frame.candidates[group * 3 + role];
      int from = able.length == 0 ? 0 : dice.below(able.length);
      for (int tries = 0; tries < Math.min(able.length, TRIES); tries++) {
        int person = able[(from + tries) % able.length];
        if (board.couldTake(person, group)) {
          ledger.duty(place, person);
          break;
        }
      }
    }
  }
}
