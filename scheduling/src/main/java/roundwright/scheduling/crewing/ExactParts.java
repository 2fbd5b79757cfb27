package roundwright.scheduling.crewing;

import java.util.ArrayList;
import java.util.Arrays;
import java.util.List;
import roundwright.scheduling.core.Board;
import roundwright.scheduling.core.Frame;
import roundwright.scheduling.core.Problem;
import roundwright.scheduling.cost.RuleName;
import roundwright.scheduling.flow.Transport;
import roundwright.scheduling.rules.Ledger;

/**
 * Two parts of the whole that can be solved exactly while the rest stands: all duties of the groups
 * that run at one moment, since each person takes at most one of them, and the groups of one
 * round's entrants. Each is a transportation whose costs are what the commitment would change in
 * the person's own price. What comes out is kept only where the whole is no worse.
 */
final class ExactParts {
  private static final long FILLED = 1L << 40;
  private static final long EMPTY_BREACHES = 50;
  private static final long UNIT = 1_000_000L;
  private static final int NO_SKILL = -1;

  private final Ledger ledger;
  private final Board board;
  private final Frame frame;
  private final Problem problem;
  private final Transport transport = new Transport();
  private final List<int[]> moments;
  private final long unevenWeight;
  private final long kinWeight;
  private final long seedingWeight;
  private final int[] rowPerson;

  ExactParts(Ledger ledger) {
    this.ledger = ledger;
    this.board = ledger.board;
    this.frame = ledger.frame;
    this.problem = ledger.problem;
    this.moments = moments(frame);
    this.unevenWeight = weight(RuleName.UNEVEN_GROUPS);
    this.kinWeight = weight(RuleName.KIN);
    this.seedingWeight = weight(RuleName.SEEDING);
    this.rowPerson = new int[problem.people];
  }

  private long weight(RuleName rule) {
    return problem.event.rules().weight(rule).movePointRight(6).longValue();
  }

  /** The largest sets of groups that all run at one time, in order of time. */
  private static List<int[]> moments(Frame frame) {
    List<int[]> found = new ArrayList<>();
    for (int g = 0; g < frame.groups; g++) {
      int at = frame.start[g];
      int[] running =
          java.util.stream.IntStream.range(0, frame.groups)
              .filter(other -> frame.start[other] <= at && at < frame.end[other])
              .toArray();
      if (!found.isEmpty() && holds(running, found.get(found.size() - 1))) {
        found.set(found.size() - 1, running);
      } else if (found.isEmpty() || !holds(found.get(found.size() - 1), running)) {
        found.add(running);
      }
    }
    return found;
  }

  private static boolean holds(int[] outer, int[] inner) {
    return Arrays.stream(inner).allMatch(g -> Arrays.binarySearch(outer, g) >= 0);
  }

  int moments() {
    return moments.size();
  }

  /** Marks the moments near a round's groups. */
  void markMoments(int round, boolean[] marks, int near) {
    for (int moment = 0; moment < marks.length; moment++) {
      for (int g : moments.get(moment)) {
        if (frame.round[g] == round) {
          int to = Math.min(marks.length, moment + near + 1);
          Arrays.fill(marks, Math.max(0, moment - near), to, true);
        }
      }
    }
  }

  /** Marks the moments of groups that lack crew, and those of people who break a rule. */
  void markTroubled(boolean[] marks) {
    for (int moment = 0; moment < marks.length; moment++) {
      for (int g : moments.get(moment)) {
        marks[moment] |= ledger.groupHard(g) > 0 || hasTroubledCrew(g);
      }
    }
  }

  private boolean hasTroubledCrew(int g) {
    for (int at = frame.placeStart[g * 3]; at < frame.placeStart[g * 3 + 3]; at++) {
      int person = board.placePerson[at];
      if (person >= 0 && ledger.personHard(person) > 0) {
        return true;
      }
    }
    return false;
  }

  /** Whether an entrant of a round, or a group of it, breaks a rule. */
  boolean isTroubled(int round) {
    for (int seat = problem.seatStart[round]; seat < problem.seatStart[round + 1]; seat++) {
      if (ledger.personHard(problem.seatPerson[seat]) > 0) {
        return true;
      }
    }
    return Arrays.stream(frame.groupsOf[round])
        .anyMatch(g -> ledger.groupHard(g) >= roundwright.scheduling.rules.RuleBook.BREACH);
  }

  /** Duties wanted at a moment for each person who could take one: where crews are scarcest. */
  double scarcity(int moment) {
    int wanted = 0;
    boolean[] could = new boolean[problem.people];
    for (int g : moments.get(moment)) {
      for (int role = 0; role < 3; role++) {
        wanted += board.wanted(g, role);
        for (int p : frame.candidates[g * 3 + role]) {
          could[p] |= board.couldTake(p, g);
        }
      }
    }
    int people = 0;
    for (boolean one : could) {
      people += one ? 1 : 0;
    }
    return (double) wanted / Math.max(1, people);
  }

  /** Crews all groups of a moment anew; whether the whole got better. */
  boolean crewMoment(int moment) {
    int[] groups = moments.get(moment);
    int columns = groups.length * 3;
    for (int g : groups) {
      for (int place = frame.placeStart[g * 3]; place < frame.placeStart[g * 3 + 3]; place++) {
        if (frame.placePin[place] < 0) {
          ledger.duty(place, -1);
        }
      }
    }
    int rows = gatherRows(groups);
    transport.begin(rows, columns);
    for (int row = 0; row < rows; row++) {
      priceRow(row, rowPerson[row], groups);
    }
    for (int i = 0; i < groups.length; i++) {
      for (int role = 0; role < 3; role++) {
        int open = Math.max(0, board.wanted(groups[i], role) - board.filled[groups[i] * 3 + role]);
        long[] units = new long[open];
        Arrays.fill(units, -FILLED);
        transport.units(i * 3 + role, units);
      }
    }
    transport.solve();
    for (int row = 0; row < rows; row++) {
      int column = transport.columnOf(row);
      if (column >= 0) {
        ledger.duty(emptyPlace(groups[column / 3], column % 3), rowPerson[row]);
      }
    }
    return keepUnlessWorse();
  }

  private int gatherRows(int[] groups) {
    boolean[] could = new boolean[problem.people];
    for (int g : groups) {
      for (int role = 0; role < 3; role++) {
        for (int p : frame.candidates[g * 3 + role]) {
          could[p] |= board.couldTake(p, g);
        }
      }
    }
    int rows = 0;
    for (int p = 0; p < problem.people; p++) {
      if (could[p]) {
        rowPerson[rows++] = p;
      }
    }
    return rows;
  }

  private void priceRow(int row, int person, int[] groups) {
    transport.outCost(row, 0);
    long now = ledger.priceNow(person);
    for (int i = 0; i < groups.length; i++) {
      int g = groups[i];
      boolean could = frame.isFree(person, g) && board.couldTake(person, g);
      int skill = could ? skillOf(person, frame.round[g]) : NO_SKILL;
      could = skill != NO_SKILL;
      long change = could ? ledger.priceWith(person, g << 2 | skill) - now : 0;
      for (int role = 0; role < 3; role++) {
        boolean able = could && problem.skilled(person, frame.round[g], role);
        long kin = role == 0 && able ? kinWeight * board.kinSolving(person, g) : 0;
        long own =
            able && ledger.tellsRolesApart()
                ? ledger.priceWith(person, g << 2 | role) - now
                : change;
        transport.cost(row, i * 3 + role, able ? own + kin : Transport.FORBIDDEN);
      }
    }
  }

  /**
   * A role the person can have: in their own price all of these cost alike, but where people have
   * been told theirs, and others a breach.
   */
  private int skillOf(int person, int round) {
    for (int role = 0; role < 3; role++) {
      if (problem.skilled(person, round, role)) {
        return role;
      }
    }
    return NO_SKILL;
  }

  private int emptyPlace(int group, int role) {
    int place = frame.placeStart[group * 3 + role];
    while (board.placePerson[place] >= 0) {
      place++;
    }
    return place;
  }

  /** Puts a round's entrants into its groups anew; whether the whole got better. */
  boolean seatRound(int round) {
    int[] groups = frame.groupsOf[round];
    int first = problem.seatStart[round];
    int rows = problem.entrants(round);
    for (int seat = first; seat < first + rows; seat++) {
      ledger.seat(seat, -1);
    }
    transport.begin(rows, groups.length);
    for (int row = 0; row < rows; row++) {
      priceSeat(row, first + row, groups);
    }
    for (int i = 0; i < groups.length; i++) {
      transport.units(i, sizeCosts(groups[i], rows));
    }
    transport.solve();
    for (int row = 0; row < rows; row++) {
      int column = transport.columnOf(row);
      if (column >= 0) {
        ledger.seat(first + row, groups[column]);
      }
    }
    return keepUnlessWorse();
  }

  private void priceSeat(int row, int seat, int[] groups) {
    transport.outCost(row, Transport.FORBIDDEN / 4);
    int person = problem.seatPerson[seat];
    int pinned = frame.seatPin[seat];
    long now = ledger.priceNow(person);
    for (int i = 0; i < groups.length; i++) {
      int g = groups[i];
      if (pinned >= 0 ? pinned != g : frame.frozen[g]) {
        transport.cost(row, i, Transport.FORBIDDEN);
        continue;
      }
      long change = ledger.priceWith(person, g << 2 | Problem.SOLVING) - now;
      change += seedingWeight * Math.abs(frame.place[g] - frame.wantedPlace[seat]);
      change += kinWeight * board.kinJudging(person, g);
      if (pathPassesSlot(seat, g)) {
        change += Ledger.BREACH_IN_TRIALS;
      }
      transport.cost(row, i, change);
    }
  }

  private boolean pathPassesSlot(int seat, int g) {
    int round = frame.round[g];
    if (problem.roundList.get(round).minutesPerGroup().isPresent()) {
      return false;
    }
    int stations = frame.stations[g];
    int scramblers = problem.wanted(round, 1, stations, stations);
    int runners = problem.wanted(round, 2, stations, stations);
    long path = problem.pace.pathMicros(round, seat, scramblers, runners);
    return problem.pace.leastMinutes(round, 0, 0, path, 1, scramblers, runners)
        > frame.end[g] - frame.start[g];
  }

  private long[] sizeCosts(int g, int rows) {
    int capacity = frame.mostPeople[g];
    long[] costs = new long[rows];
    for (int size = 0; size < rows; size++) {
      costs[size] = unevenPrice(g, size + 1) - unevenPrice(g, size);
      if (size >= capacity) {
        costs[size] += Ledger.BREACH_IN_TRIALS;
      }
    }
    if (rows > 0) {
      costs[0] -= EMPTY_BREACHES * Ledger.BREACH_IN_TRIALS;
    }
    return costs;
  }

  private long unevenPrice(int g, int size) {
    if (problem.roundFixed[frame.round[g]]) {
      return size * (long) size * UNIT / 1000;
    }
    double beyond = Math.max(0, Math.abs(size - frame.fairSize[g]) - 1);
    return Math.round(beyond * beyond * Math.max(unevenWeight, UNIT / 1000));
  }

  private boolean keepUnlessWorse() {
    ledger.settle();
    long hard = ledger.hardChange();
    long strain = ledger.strainChange();
    if (hard > 0 || (hard == 0 && strain >= 0)) {
      ledger.undo();
      return false;
    }
    ledger.keep();
    return true;
  }
}
