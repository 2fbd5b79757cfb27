package roundwright.scheduling.crewing;

import roundwright.scheduling.core.Board;
import roundwright.scheduling.core.Dice;
import roundwright.scheduling.core.Frame;
import roundwright.scheduling.core.Problem;
import roundwright.scheduling.rules.Ledger;

/**
 * The neighbourhood: small changes to duties and competitors that never put a duty where its person
 * cannot be. A move that is in the way of another duty throws that out and looks for somebody else
 * to fill it. Each proposes by playing it on the ledger, unsettled; false means nothing came of it
 * and whatever was played is to be undone.
 */
final class Moves {
  private static final int CHANGE_DUTY = 45;
  private static final int SWAP_DUTIES = CHANGE_DUTY + 15;
  private static final int MOVE_COMPETITOR = SWAP_DUTIES + 12;
  private static final int SWAP_COMPETITORS = MOVE_COMPETITOR + 16;
  private static final int REFILL_TRIES = 40;
  private static final int NEAR_GROUPS = 6;
  private static final int MOST_THROWN_OUT = 6;
  private static final int LONGEST_WINDOW_MINUTES = 240;

  private final Ledger ledger;
  private final Board board;
  private final Frame frame;
  private final Problem problem;
  private final Dice dice;
  private final int[] thrownOut = new int[64];
  private int thrownOutCount;

  Moves(Ledger ledger, Dice dice) {
    this.ledger = ledger;
    this.board = ledger.board;
    this.frame = ledger.frame;
    this.problem = ledger.problem;
    this.dice = dice;
  }

  boolean propose() {
    thrownOutCount = 0;
    int kind = dice.below(100);
    if (kind < CHANGE_DUTY) {
      return frame.places > 0 && changeDuty();
    }
    if (kind < SWAP_DUTIES) {
      return frame.places > 0 && swapDuties();
    }
    if (kind < MOVE_COMPETITOR) {
      return problem.seats > 0 && moveCompetitor();
    }
    if (kind < SWAP_COMPETITORS) {
      return problem.seats > 0 && swapCompetitors();
    }
    return problem.people > 1 && exchangeWindow();
  }

  private boolean changeDuty() {
    int place = dice.below(frame.places);
    if (frame.placePin[place] >= 0) {
      return false;
    }
    int group = frame.placeGroup[place];
    int role = frame.placeRole[place];
    int before = board.placePerson[place];
    int filled = board.filled[group * 3 + role];
    int wanted = board.wanted(group, role);
    if (before >= 0 && filled > wanted) {
      ledger.duty(place, -1);
      return true;
    }
    if (before < 0 && filled >= wanted) {
      return false;
    }
    int[] able = frame.candidates[group * 3 + role];
    if (able.length == 0) {
      return false;
    }
    int person = able[dice.below(able.length)];
    if (person == before) {
      return false;
    }
    if (board.couldTake(person, group)) {
      ledger.duty(place, person);
      return true;
    }
    if (!throwOut(person, group)) {
      return false;
    }
    ledger.duty(place, person);
    return refill();
  }

  private boolean swapDuties() {
    int one = dice.below(frame.places);
    int other = dice.below(3) == 0 ? dice.below(frame.places) : nearPlace(one);
    int a = board.placePerson[one];
    int b = board.placePerson[other];
    if (a < 0 || b < 0 || a == b || frame.placePin[one] >= 0 || frame.placePin[other] >= 0) {
      return false;
    }
    int groupA = frame.placeGroup[one];
    int groupB = frame.placeGroup[other];
    boolean able =
        problem.skilled(a, frame.round[groupB], frame.placeRole[other])
            && problem.skilled(b, frame.round[groupA], frame.placeRole[one])
            && frame.isFree(a, groupB)
            && frame.isFree(b, groupA)
            && board.couldTakeBut(a, groupB, groupA)
            && board.couldTakeBut(b, groupA, groupB);
    if (!able) {
      return false;
    }
    ledger.duty(one, -1);
    ledger.duty(other, -1);
    ledger.duty(one, b);
    ledger.duty(other, a);
    return true;
  }

  private int nearPlace(int place) {
    int group = frame.placeGroup[place] + dice.below(2 * NEAR_GROUPS + 1) - NEAR_GROUPS;
    group = Math.max(0, Math.min(frame.groups - 1, group));
    int from = frame.placeStart[group * 3];
    int to = frame.placeStart[group * 3 + 3];
    return from == to ? place : from + dice.below(to - from);
  }

  private boolean moveCompetitor() {
    int seat = dice.below(problem.seats);
    int[] groups = frame.groupsOf[problem.seatRound[seat]];
    if (groups.length < 2 || frame.seatPin[seat] >= 0) {
      return false;
    }
    int to = groups[dice.below(groups.length)];
    return to != board.seatGroup[seat] && reseat(seat, to) && refill();
  }

  private boolean swapCompetitors() {
    int seat = dice.below(problem.seats);
    int round = problem.seatRound[seat];
    int other = problem.seatStart[round] + dice.below(problem.entrants(round));
    int groupA = board.seatGroup[seat];
    int groupB = board.seatGroup[other];
    if (groupA == groupB
        || groupA < 0
        || groupB < 0
        || frame.seatPin[seat] >= 0
        || frame.seatPin[other] >= 0) {
      return false;
    }
    return reseat(seat, groupB) && reseat(other, groupA) && refill();
  }

  private boolean reseat(int seat, int to) {
    int person = problem.seatPerson[seat];
    ledger.seat(seat, -1);
    if (!board.couldTake(person, to) && !throwOut(person, to)) {
      return false;
    }
    ledger.seat(seat, to);
    return true;
  }

  /** Empties the duties that keep a person from a group; false where more than duties do. */
  private boolean throwOut(int person, int group) {
    for (int i = board.commitmentCount(person) - 1; i >= 0; i--) {
      int commitment = board.commitment(person, i);
      int in = commitment >> 2;
      if (!frame.conflict(in, group)) {
        continue;
      }
      if ((commitment & 3) == Problem.SOLVING) {
        return false;
      }
      int place = board.placeOf(person, in);
      if (frame.placePin[place] >= 0 || thrownOutCount == MOST_THROWN_OUT) {
        return false;
      }
      thrownOut[thrownOutCount++] = place;
      ledger.duty(place, -1);
    }
    return true;
  }

  private boolean refill() {
    for (int i = 0; i < thrownOutCount; i++) {
      int place = thrownOut[i];
      int group = frame.placeGroup[place];
      int role = frame.placeRole[place];
      if (board.placePerson[place] >= 0
          || board.filled[group * 3 + role] >= board.wanted(group, role)) {
        continue;
      }
      int[] able = frame.candidates[group * 3 + role];
      int from = able.length == 0 ? 0 : dice.below(able.length);
      for (int tries = 0; tries < Math.min(able.length, REFILL_TRIES); tries++) {
        int person = able[(from + tries) % able.length];
        if (board.couldTake(person, group)) {
          ledger.duty(place, person);
          break;
        }
      }
    }
    return true;
  }

  /** Two people take over all of each other's duties that start in a stretch of time. */
  private boolean exchangeWindow() {
    int place = dice.below(Math.max(1, frame.places));
    int a = frame.places == 0 ? -1 : board.placePerson[place];
    int b = dice.below(problem.people);
    if (a < 0 || a == b) {
      return false;
    }
    int from = frame.start[frame.placeGroup[place]];
    int to = from + 1 + dice.below(LONGEST_WINDOW_MINUTES);
    int mine = takeOff(a, from, to);
    if (mine < 0) {
      return false;
    }
    int theirs = takeOff(b, from, to);
    if (theirs < 0) {
      return false;
    }
    return handOver(0, mine, b) && handOver(mine, mine + theirs, a);
  }

  private int takeOff(int person, int from, int to) {
    int taken = 0;
    for (int i = board.commitmentCount(person) - 1; i >= 0; i--) {
      int commitment = board.commitment(person, i);
      int group = commitment >> 2;
      if ((commitment & 3) == Problem.SOLVING
          || frame.start[group] < from
          || frame.start[group] >= to) {
        continue;
      }
      int place = board.placeOf(person, group);
      if (frame.placePin[place] >= 0 || thrownOutCount == thrownOut.length) {
        return -1;
      }
      thrownOut[thrownOutCount++] = place;
      ledger.duty(place, -1);
      taken++;
    }
    return taken;
  }

  private boolean handOver(int fromIndex, int toIndex, int person) {
    for (int i = fromIndex; i < toIndex; i++) {
      int place = thrownOut[i];
      int group = frame.placeGroup[place];
      if (!problem.skilled(person, frame.round[group], frame.placeRole[place])
          || !frame.isFree(person, group)
          || !board.couldTake(person, group)) {
        return false;
      }
      ledger.duty(place, person);
    }
    return true;
  }
}
