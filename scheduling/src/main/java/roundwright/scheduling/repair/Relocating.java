package roundwright.scheduling.repair;

import java.util.ArrayList;
import java.util.Arrays;
import java.util.HashMap;
import java.util.List;
import java.util.Map;
import java.util.function.IntUnaryOperator;
import java.util.stream.IntStream;
import roundwright.scheduling.core.Dice;
import roundwright.scheduling.core.KeptDays;
import roundwright.scheduling.core.LocalClock;
import roundwright.scheduling.core.Problem;
import roundwright.scheduling.crewing.Halt;
import roundwright.scheduling.model.Role;

/**
 * Searches for a place for groups that cannot stay where they stood, so that the fewest commitments
 * change: simulated annealing (Kirkpatrick, Gelatt and Vecchi 1983) over halls and starts, with
 * everybody taken to stay in their group. Counts a moved group as all its people, somebody in two
 * groups at one time as the changes that would part them, and breaches of the day plan above all.
 * What really changes is told by the board that is made of it. One use each; not thread-safe.
 */
final class Relocating {
  private static final int MOVES = 20_000;
  private static final int BREACH = 400;
  private static final int TWO_SOLVING = 8;
  private static final int TWO_DUTIES = 2;
  private static final int NOT_THERE = 4;
  private static final double WARM = 30;
  private static final double COOL = 0.4;
  private static final int DRAWS = 1 << 20;
  private static final int LOOKS_BETWEEN = 64;
  private static final int TRIES_FOR_TROUBLE = 4;
  private static final int NEAR_GRIDS = 8;
  private static final int FIVE = 5;

  private final Problem problem;
  private final int setup;
  private final int turnaround;
  private final int notBefore;
  private final Dice dice;
  private final Halt halt;
  private final List<Standee> standees;
  private final int groups;
  private final int[] movable;
  private final int[] hall;
  private final int[] start;
  private final int[] minutes;
  private final int[] round;
  private final int[] homeHall;
  private final int[] homeStart;
  private final int[] told;
  private final int[][] usable;

  /** Of each group: its people, a solver as twice their number plus one. */
  private final int[][] people;

  /** Of each person: their groups, those they solve in as twice the number plus one. */
  private final int[][] listed;

  private final int[] undoGroup;
  private final int[] undoHall;
  private final int[] undoStart;
  private int undo;
  private long best;
  private int[] bestHall;
  private int[] bestStart;

  /**
   * @param laid where all groups stand; those not {@code free} stay there
   * @param notBefore nothing moves to before this minute
   */
  Relocating(
      Problem problem, List<Standee> laid, boolean[] free, int notBefore, long seed, Halt halt) {
    this.problem = problem;
    this.notBefore = notBefore;
    setup = problem.event.rules().setupMinutes();
    turnaround = problem.event.rules().turnaroundMinutes();
    dice = new Dice(seed);
    this.halt = halt;
    standees = laid;
    groups = laid.size();
    movable = IntStream.range(0, groups).filter(g -> free[g]).toArray();
    hall = ints(g -> laid.get(g).slot().hall());
    start = ints(g -> laid.get(g).slot().start());
    minutes = ints(g -> laid.get(g).slot().end() - laid.get(g).slot().start());
    round = ints(g -> laid.get(g).slot().round());
    homeHall = ints(g -> laid.get(g).kept().map(group -> indexOf(group.hall())).orElse(-1));
    homeStart =
        ints(
            g ->
                laid.get(g)
                    .kept()
                    .map(group -> LocalClock.epochMinute(group.start()))
                    .orElse(Problem.NEVER));
    usable = new int[problem.rounds][];
    Arrays.setAll(usable, problem::usableHalls);
    people = new int[groups][];
    listed = new int[problem.people][];
    told = new int[groups];
    list();
    undoGroup = new int[groups];
    undoHall = new int[groups];
    undoStart = new int[groups];
  }

  private int[] ints(IntUnaryOperator of) {
    return IntStream.range(0, groups).map(of).toArray();
  }

  private int indexOf(String hallId) {
    return IntStream.range(0, problem.halls)
        .filter(h -> problem.hallList.get(h).id().equals(hallId))
        .findFirst()
        .orElse(-1);
  }

  private void list() {
    Map<String, Integer> index = new HashMap<>();
    problem.personList.forEach(person -> index.put(person.id(), index.size()));
    List<List<Integer>> own = new ArrayList<>();
    for (int p = 0; p < problem.people; p++) {
      own.add(new ArrayList<>());
    }
    for (int g = 0; g < groups; g++) {
      List<Integer> here = new ArrayList<>();
      var kept = standees.get(g).kept();
      if (kept.isPresent()) {
        for (String id : kept.get().competitors()) {
          Integer person = index.get(id);
          if (person != null && problem.seatOf(person, round[g]) >= 0) {
            here.add(person * 2 + 1);
            own.get(person).add(g * 2 + 1);
          }
        }
        for (Role role : Role.values()) {
          for (String id : kept.get().crew().in(role)) {
            Integer person = index.get(id);
            if (person != null) {
              here.add(person * 2);
              own.get(person).add(g * 2);
            }
          }
        }
      }
      people[g] = here.stream().mapToInt(Integer::intValue).toArray();
      told[g] = here.size();
    }
    for (int p = 0; p < problem.people; p++) {
      listed[p] = own.get(p).stream().mapToInt(Integer::intValue).toArray();
    }
  }

  /** Everything as it stands. */
  private long cost() {
    long sum = 0;
    for (int g = 0; g < groups; g++) {
      sum += alone(g);
      for (int h = 0; h < g; h++) {
        sum += pair(g, h);
      }
      for (int code : people[g]) {
        for (int other : listed[code >> 1]) {
          sum += (other >> 1) < g ? together(g, code & 1, other) : 0;
        }
      }
    }
    return sum;
  }

  /**
   * The layout that changes least: looked for from where the groups were laid, then from where they
   * stood when people were told.
   */
  List<Standee> found() {
    best = Long.MAX_VALUE;
    search();
    if (best > 0) {
      for (int g : movable) {
        if (homeHall[g] >= 0) {
          hall[g] = homeHall[g];
          start[g] = homeStart[g];
        }
      }
      search();
    }
    List<Standee> found = new ArrayList<>();
    for (int g = 0; g < groups; g++) {
      Standee one = standees.get(g);
      found.add(one.at(bestHall[g], one.slot().stations(), bestStart[g]));
    }
    return found;
  }

  private void search() {
    long cost = cost();
    keepIfBest(cost);
    double temperature = WARM;
    for (int move = 0; move < MOVES && movable.length > 0 && best > 0; move++) {
      if (move % LOOKS_BETWEEN == 0) {
        if (halt.now()) {
          return;
        }
        temperature = WARM * StrictMath.pow(COOL / WARM, (double) move / MOVES);
      }
      undo = 0;
      long change = tryMove();
      if (change > 0 && change > -temperature * StrictMath.log(drawn())) {
        takeBack();
      } else {
        cost += change;
        keepIfBest(cost);
      }
    }
  }

  private void keepIfBest(long cost) {
    if (cost < best) {
      best = cost;
      bestHall = hall.clone();
      bestStart = start.clone();
    }
  }

  private double drawn() {
    return (dice.below(DRAWS) + 0.5) / DRAWS;
  }

  private long tryMove() {
    int g = movable[dice.below(movable.length)];
    for (int tries = 0; tries < TRIES_FOR_TROUBLE && alone(g) == 0; tries++) {
      g = movable[dice.below(movable.length)];
    }
    int kind = dice.below(10);
    if (kind < 2 && homeHall[g] >= 0) {
      return moved(g, homeHall[g], homeStart[g]);
    }
    if (kind < 5) {
      return anywhere(g);
    }
    if (kind < 7) {
      int by = (1 + dice.below(NEAR_GRIDS)) * problem.grid();
      return moved(g, hall[g], start[g] + (dice.below(2) == 0 ? by : -by));
    }
    if (kind < 9) {
      return pushed(g);
    }
    return exchanged(g, movable[dice.below(movable.length)]);
  }

  private long anywhere(int g) {
    int[] halls = usable[round[g]];
    int to = halls.length == 0 ? hall[g] : halls[dice.below(halls.length)];
    int windows = problem.hallFreeFrom[to].length;
    if (windows == 0) {
      return 0;
    }
    int w = dice.below(windows);
    int from = Math.max(notBefore, problem.hallFreeFrom[to][w]);
    int room = problem.hallFreeTo[to][w] - minutes[g] - from;
    return room < 0 ? 0 : moved(g, to, from + dice.below(room + 1));
  }

  /** A group and those that follow it without a pause, all by as much, earlier or later. */
  private long pushed(int g) {
    int by = (1 + dice.below(NEAR_GRIDS)) * problem.grid() * (dice.below(2) == 0 ? 1 : -1);
    int in = hall[g];
    int reach = by > 0 ? start[g] + minutes[g] : start[g];
    long change = 0;
    int next = g;
    while (next >= 0 && undo < groups) {
      int from = start[next];
      int to = from + minutes[next];
      change += moved(next, in, from + by);
      reach = by > 0 ? to + by + setup : from + by - setup;
      next = inTheWay(in, next, by > 0 ? to : from, reach, by > 0);
    }
    return change;
  }

  /** The next group of a hall beyond a minute that a push reaches, or -1. */
  private int inTheWay(int in, int moved, int beyond, int reach, boolean later) {
    int found = -1;
    for (int g : movable) {
      if (hall[g] != in || g == moved || isMoved(g)) {
        continue;
      }
      if (later
          && start[g] >= beyond
          && start[g] < reach
          && (found < 0 || start[g] < start[found])) {
        found = g;
      }
      if (!later
          && start[g] + minutes[g] <= beyond
          && start[g] + minutes[g] > reach
          && (found < 0 || start[g] > start[found])) {
        found = g;
      }
    }
    return found;
  }

  private boolean isMoved(int g) {
    for (int i = 0; i < undo; i++) {
      if (undoGroup[i] == g) {
        return true;
      }
    }
    return false;
  }

  private long exchanged(int g, int other) {
    if (g == other || !suits(g, hall[other]) || !suits(other, hall[g])) {
      return 0;
    }
    int toHall = hall[other];
    int toStart = start[other];
    int fromHall = hall[g];
    int fromStart = start[g];
    return moved(g, toHall, toStart) + moved(other, fromHall, fromStart);
  }

  private boolean suits(int g, int to) {
    return problem.mostStations[round[g]][to] >= standees.get(g).slot().stations()
        && IntStream.of(usable[round[g]]).anyMatch(usable -> usable == to);
  }

  private long moved(int g, int toHall, int toStart) {
    if (toHall != homeHall[g] && !suits(g, toHall)) {
      return 0;
    }
    int at = toHall == homeHall[g] && toStart == homeStart[g] ? toStart : onGrid(toHall, toStart);
    if (at < notBefore || (at == start[g] && toHall == hall[g])) {
      return 0;
    }
    long before = costOf(g);
    undoGroup[undo] = g;
    undoHall[undo] = hall[g];
    undoStart[undo++] = start[g];
    hall[g] = toHall;
    start[g] = at;
    return costOf(g) - before;
  }

  private void takeBack() {
    while (undo > 0) {
      undo--;
      hall[undoGroup[undo]] = undoHall[undo];
      start[undoGroup[undo]] = undoStart[undo];
    }
  }

  private int onGrid(int at, int minute) {
    LocalClock clock = problem.hallClock[at];
    int then = minute - clock.minuteOfDay(minute) % problem.grid();
    while (clock.comesTwice(then) || clock.comesTwice(then + 1)) {
      then += problem.grid();
    }
    return then;
  }

  private long costOf(int g) {
    long sum = alone(g);
    for (int h = 0; h < groups; h++) {
      sum += h == g ? 0 : pair(g, h);
    }
    for (int code : people[g]) {
      for (int other : listed[code >> 1]) {
        sum += (other >> 1) == g ? 0 : together(g, code & 1, other);
      }
    }
    return sum;
  }

  private int alone(int g) {
    int end = start[g] + minutes[g];
    int breaches =
        fives(closedMinutes(hall[g], start[g], end))
            + fives(problem.notBefore[round[g]] - start[g])
            + fives(end - problem.notAfter[round[g]]);
    boolean moved =
        hall[g] != homeHall[g] || Math.abs(start[g] - homeStart[g]) > KeptDays.MOST_APART_MINUTES;
    if (!moved) {
      return breaches * BREACH;
    }
    int sum = breaches * BREACH + told[g];
    boolean likely = problem.roundLikely[round[g]];
    for (int code : people[g]) {
      int person = code >> 1;
      boolean there =
          (((code & 1) == 1 && likely) || problem.present(person, start[g], end))
              && !problem.busy(person, start[g], end);
      sum += there ? 0 : (code & 1) == 1 ? NOT_THERE : 1;
    }
    return sum;
  }

  private int closedMinutes(int in, int from, int to) {
    int open = 0;
    for (int w = 0; w < problem.hallFreeFrom[in].length; w++) {
      open +=
          Math.max(
              0,
              Math.min(to, problem.hallFreeTo[in][w])
                  - Math.max(from, problem.hallFreeFrom[in][w]));
    }
    return to - from - open;
  }

  private int pair(int g, int h) {
    int breaches = 0;
    if (hall[g] == hall[h]) {
      int overlap =
          Math.min(start[g] + minutes[g], start[h] + minutes[h])
              + setup
              - Math.max(start[g], start[h]);
      breaches += fives(overlap);
    }
    if (problem.roundBefore[round[g]] == round[h]) {
      breaches += fives(start[h] + minutes[h] + turnaround - start[g]);
    } else if (problem.roundBefore[round[h]] == round[g]) {
      breaches += fives(start[g] + minutes[g] + turnaround - start[h]);
    }
    return breaches * BREACH;
  }

  private static int fives(int minutes) {
    return minutes <= 0 ? 0 : (minutes + FIVE - 1) / FIVE;
  }

  private int together(int g, int solves, int other) {
    int h = other >> 1;
    int way = problem.way[hall[g]][hall[h]];
    boolean apart =
        start[g] >= start[h] + minutes[h] + way || start[h] >= start[g] + minutes[g] + way;
    if (apart) {
      return 0;
    }
    return (solves & other & 1) == 1 ? TWO_SOLVING : TWO_DUTIES;
  }
}
