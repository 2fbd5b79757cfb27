package roundwright.scheduling.crewing;

import roundwright.scheduling.core.Board;
import roundwright.scheduling.core.Frame;
import roundwright.scheduling.core.GroupRow;
import roundwright.scheduling.core.Pace;
import roundwright.scheduling.core.Problem;
import roundwright.scheduling.rules.Ledger;
import roundwright.scheduling.rules.RuleBook;

/**
 * Helps groups whose slot is too short for who is in them: slow members change places with faster
 * ones of the round's other groups, the exchange that takes most work off the group first, until it
 * fits. A slot counts in whole steps of the grid, so that no single exchange may seem to help.
 * Duties in the way are thrown out and filled again. Kept only where the whole has fewer breaches.
 */
final class Relief {
  private static final int MOST_EXCHANGES = 16;
  private static final int NOBODY = -1;

  private final Ledger ledger;
  private final Board board;
  private final Frame frame;
  private final Problem problem;
  private final Refill refill;
  private final GroupRow row = new GroupRow();

  private int leaver;
  private int comer;
  private int goal;

  Relief(Ledger ledger, Refill refill) {
    this.ledger = ledger;
    this.board = ledger.board;
    this.frame = ledger.frame;
    this.problem = ledger.problem;
    this.refill = refill;
  }

  /** Tries every group that is too short; whether anything got better. */
  boolean everyGroup(Halt halt) {
    boolean better = false;
    for (int g = 0; g < frame.groups && !halt.now(); g++) {
      if (ledger.groupHard(g) >= RuleBook.BREACH && tooShort(g)) {
        better |= relieve(g);
      }
    }
    return better;
  }

  private boolean tooShort(int group) {
    row.load(board, group);
    return row.size > 0
        && problem.roundList.get(row.round).minutesPerGroup().isEmpty()
        && row.leastMinutes() > minutes(group);
  }

  private int minutes(int group) {
    return frame.end[group] - frame.start[group];
  }

  private boolean relieve(int group) {
    refill.begin();
    for (int i = 0; i < MOST_EXCHANGES && tooShort(group); i++) {
      if (!findExchange(group)
          || !refill.reseat(leaver, goal)
          || (comer != NOBODY && !refill.reseat(comer, group))) {
        break;
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

  private boolean findExchange(int group) {
    int longest = longestPathSeat(group);
    boolean byPath = pathAlone(group, longest) > minutes(group);
    long most = 0;
    for (int to : frame.groupsOf[frame.round[group]]) {
      for (int i = 0; to != group && i < board.size[group]; i++) {
        int seat = board.member(group, i);
        if ((!byPath || seat == longest) && mayMove(seat, group, to)) {
          most = findCounterpart(group, to, seat, most);
        }
      }
    }
    return most > 0;
  }

  private long findCounterpart(int group, int to, int seat, long mostSoFar) {
    Pace pace = problem.pace;
    long most = mostSoFar;
    if (board.size[to] < frame.mostPeople[to] && pace.workMicros[seat] > most) {
      if (fits(to, seat, NOBODY)) {
        most = choose(seat, NOBODY, to);
      }
    }
    for (int i = 0; i < board.size[to]; i++) {
      int other = board.member(to, i);
      long less = pace.workMicros[seat] - pace.workMicros[other];
      if (less > most && mayMove(other, to, group) && fits(to, seat, other)) {
        most = choose(seat, other, to);
      }
    }
    return most;
  }

  private long choose(int seat, int other, int to) {
    leaver = seat;
    comer = other;
    goal = to;
    long back = other == NOBODY ? 0 : problem.pace.workMicros[other];
    return problem.pace.workMicros[seat] - back;
  }

  private boolean mayMove(int seat, int from, int to) {
    int person = problem.seatPerson[seat];
    return frame.seatPin[seat] < 0
        && !frame.frozen[to]
        && frame.isFree(person, to)
        && refill.solvesOnlyIn(person, from, to);
  }

  /** Whether a group would still fit its slot with somebody more, in exchange for somebody. */
  private boolean fits(int group, int seat, int other) {
    row.load(board, group);
    Pace pace = problem.pace;
    long work = board.workInAll[group] + pace.workMicros[seat];
    int attempts = board.attemptsInAll[group] + pace.attempts[seat];
    if (other != NOBODY) {
      work -= pace.workMicros[other];
      attempts -= pace.attempts[other];
    }
    long path = pace.pathMicros(row.round, seat, row.wanted[1], row.wanted[2]);
    int least =
        pace.leastMinutes(
            row.round, work, attempts, path, row.active(), row.wanted[1], row.wanted[2]);
    return least <= minutes(group);
  }

  private int longestPathSeat(int group) {
    int found = board.member(group, 0);
    for (int i = 1; i < board.size[group]; i++) {
      int seat = board.member(group, i);
      found = problem.pace.workMicros[seat] > problem.pace.workMicros[found] ? seat : found;
    }
    return found;
  }

  private int pathAlone(int group, int seat) {
    row.load(board, group);
    long path = problem.pace.pathMicros(row.round, seat, row.wanted[1], row.wanted[2]);
    return problem.pace.leastMinutes(
        row.round, 0, 0, path, row.active(), row.wanted[1], row.wanted[2]);
  }
}
