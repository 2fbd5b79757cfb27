package roundwright.scheduling.crewing;

import roundwright.scheduling.core.Board;
import roundwright.scheduling.core.Dice;
import roundwright.scheduling.core.Frame;
import roundwright.scheduling.core.Problem;
import roundwright.scheduling.rules.Ledger;

/**
 * Helps people whose own groups collide, or who are not there for one of them: all their groups are
 * chosen anew together, nearest to the seeding first, by depth-first search with a bounded number
 * of tries. Where a group is full, somebody of it takes the seat that falls free; duties in the way
 * are thrown out and filled again. Kept only where the whole gets better.
 */
final class Untangling {
  private static final int MOST_TRIES = 2_000;
  private static final int MOST_PLANS = 12;
  private static final int COUNTERPART_TRIES = 80;

  private final Ledger ledger;
  private final Board board;
  private final Frame frame;
  private final Problem problem;
  private final Refill refill;
  private final Dice dice;

  private int person;
  private int[] own;
  private final int[] order;
  private final int[] choice;
  private int triesLeft;
  private int plansLeft;

  Untangling(Ledger ledger, Refill refill, Dice dice) {
    this.ledger = ledger;
    this.board = ledger.board;
    this.frame = ledger.frame;
    this.problem = ledger.problem;
    this.refill = refill;
    this.dice = dice;
    int most = 1;
    for (int[] seats : problem.personSeats) {
      most = Math.max(most, seats.length);
    }
    order = new int[most];
    choice = new int[most];
  }

  /** Tries everybody whose own price holds a breach; whether anything got better. */
  boolean everybody(Halt halt) {
    boolean better = false;
    for (int p = 0; p < problem.people && !halt.now(); p++) {
      if (ledger.personHard(p) > 0 && problem.personSeats[p].length > 0) {
        better |= untangle(p);
      }
    }
    return better;
  }

  private boolean untangle(int wanted) {
    person = wanted;
    own = problem.personSeats[wanted];
    for (int i = 0; i < own.length; i++) {
      int at = i;
      while (at > 0 && groups(own[order[at - 1]]).length > groups(own[i]).length) {
        order[at] = order[at - 1];
        at--;
      }
      order[at] = i;
    }
    triesLeft = MOST_TRIES;
    plansLeft = MOST_PLANS;
    return choose(0);
  }

  private int[] groups(int seat) {
    return frame.groupsOf[problem.seatRound[seat]];
  }

  private boolean choose(int done) {
    if (done == own.length) {
      plansLeft--;
      return play();
    }
    int s = order[done];
    int[] groups = groups(own[s]);
    int seeded = frame.wantedPlace[own[s]];
    for (int step = 0; step < 2 * groups.length && plansLeft > 0; step++) {
      int place = step % 2 == 0 ? seeded + step / 2 : seeded - 1 - step / 2;
      if (place < 0 || place >= groups.length) {
        continue;
      }
      if (triesLeft-- <= 0) {
        return false;
      }
      int group = groups[place];
      if (frame.seatPin[own[s]] >= 0 && frame.seatPin[own[s]] != group) {
        continue;
      }
      choice[s] = group;
      if (suits(person, own[s], group) && clashesWithNone(s, done) && choose(done + 1)) {
        return true;
      }
    }
    return false;
  }

  private boolean suits(int who, int seat, int group) {
    int round = frame.round[group];
    int minutes = frame.end[group] - frame.start[group];
    return (!frame.frozen[group] || board.seatGroup[seat] == group)
        && (frame.isFree(who, group)
            || (problem.roundLikely[round]
                && !problem.busy(who, frame.start[group], frame.end[group])))
        && (problem.roundList.get(round).minutesPerGroup().isPresent()
            || problem.pace.aloneMinutes(round, seat) <= minutes);
  }

  private boolean clashesWithNone(int s, int done) {
    for (int i = 0; i < done; i++) {
      if (frame.conflict(choice[order[i]], choice[s])) {
        return false;
      }
    }
    return true;
  }

  private boolean play() {
    refill.begin();
    for (int i = 0; i < own.length; i++) {
      if (choice[i] != board.seatGroup[own[i]]) {
        int from = board.seatGroup[own[i]];
        refill.reseat(own[i], choice[i]);
        int most = frame.mostPeople[choice[i]];
        if (from >= 0 && board.size[choice[i]] > most) {
          sendBack(choice[i], from, own[i]);
        }
      }
    }
    refill.fill();
    ledger.settle();
    if (ledger.hardChange() < 0) {
      ledger.keep();
      return true;
    }
    ledger.undo();
    return false;
  }

  /** Finds a member of a group who may as well be in another, and moves them there. */
  private void sendBack(int from, int to, int except) {
    int offset = dice.below(board.size[from]);
    for (int i = 0; i < Math.min(COUNTERPART_TRIES, board.size[from]); i++) {
      int seat = board.member(from, (offset + i) % board.size[from]);
      int who = problem.seatPerson[seat];
      if (seat != except
          && frame.seatPin[seat] < 0
          && suits(who, seat, to)
          && refill.solvesOnlyIn(who, from, to)) {
        refill.reseat(seat, to);
        return;
      }
    }
  }
}
