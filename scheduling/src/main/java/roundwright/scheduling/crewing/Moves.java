package roundwright.scheduling.crewing;

import roundwright.scheduling.core.Board;
import roundwright.scheduling.core.Dice;
import roundwright.scheduling.core.Frame;
import roundwright.scheduling.core.Problem;
import roundwright.scheduling.rules.Ledger;
import roundwright.scheduling.rules.RuleBook;

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
  private static final int MEND_ONE_IN = 8;
  private static final int PROPOSALS_BETWEEN_LISTS = 64;
  private static final int NEAR_GROUPS = 6;
  private static final int NOBODYS_GROUP = -1;
  private static final int LONGEST_WINDOW_MINUTES = 240;

  private final Ledger ledger;
  private final Board board;
  private final Frame frame;
  private final Problem problem;
  private final Dice dice;
  private final Refill refill;
  private final int[] troubledRow;
  private int troubled;
  private long proposals;

  Moves(Ledger ledger, Refill refill, Dice dice) {
    this.refill = refill;
    this.ledger = ledger;
    this.board = ledger.board;
    this.frame = ledger.frame;
    this.problem = ledger.problem;
    this.dice = dice;
    this.troubledRow = new int[problem.people + frame.groups];
  }

  boolean propose() {
    refill.begin();
    if (ledger.hard() >= RuleBook.BREACH && dice.below(MEND_ONE_IN) == 0) {
      return mend();
    }
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
    if (!refill.solvesOnlyIn(person, NOBODYS_GROUP, group) || !refill.throwOut(person, group)) {
      return false;
    }
    ledger.duty(place, person);
    refill.fill();
    return true;
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
    if (to == board.seatGroup[seat] || frame.frozen[to] || !refill.reseat(seat, to)) {
      return false;
    }
    refill.fill();
    return true;
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
    if (!refill.reseat(seat, groupB) || !refill.reseat(other, groupA)) {
      return false;
    }
    refill.fill();
    return true;
  }

  /** A competitor whose groups collide, or of a group that is too short, to another group. */
  private boolean mend() {
    if (proposals++ % PROPOSALS_BETWEEN_LISTS == 0) {
      listTroubled();
    }
    if (troubled == 0) {
      return false;
    }
    int one = troubledRow[dice.below(troubled)];
    int seat;
    if (one < problem.people) {
      int[] own = problem.personSeats[one];
      seat = own[dice.below(own.length)];
    } else {
      int group = one - problem.people;
      seat = board.member(group, dice.below(board.size[group]));
    }
    int[] groups = frame.groupsOf[problem.seatRound[seat]];
    int from = board.seatGroup[seat];
    if (from < 0) {
      return false;
    }
    int to = groups[dice.below(groups.length)];
    if (from == to || frame.frozen[to] || frame.seatPin[seat] >= 0 || !refill.reseat(seat, to)) {
      return false;
    }
    if (dice.below(4) > 0) {
      int other = board.member(to, dice.below(board.size[to]));
      if (other == seat || frame.seatPin[other] >= 0 || !refill.reseat(other, from)) {
        return false;
      }
    }
    refill.fill();
    return true;
  }

  private void listTroubled() {
    troubled = 0;
    for (int p = 0; p < problem.people; p++) {
      if (ledger.personHard(p) > 0 && problem.personSeats[p].length > 0) {
        troubledRow[troubled++] = p;
      }
    }
    for (int g = 0; g < frame.groups; g++) {
      if (ledger.groupHard(g) >= RuleBook.BREACH && board.size[g] > 0) {
        troubledRow[troubled++] = problem.people + g;
      }
    }
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
      if (frame.placePin[place] >= 0) {
        return -1;
      }
      refill.empty(place);
      taken++;
    }
    return taken;
  }

  private boolean handOver(int fromIndex, int toIndex, int person) {
    for (int i = fromIndex; i < toIndex; i++) {
      int place = refill.place(i);
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
