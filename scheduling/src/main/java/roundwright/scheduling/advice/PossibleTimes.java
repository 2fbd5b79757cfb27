package roundwright.scheduling.advice;

import java.util.ArrayList;
import java.util.Arrays;
import java.util.Comparator;
import java.util.List;
import java.util.Map;
import java.util.TreeMap;
import java.util.stream.IntStream;
import roundwright.scheduling.core.LocalClock;
import roundwright.scheduling.core.Problem;
import roundwright.scheduling.model.Pins;
import roundwright.scheduling.model.Round;

/**
 * When a round's groups, and each of its entrants, may start without any breach, whatever else is
 * planned: generous on purpose, so that what is found to have no time has none in any plan. Times
 * are epoch minutes; lengths are lower bounds of what the least time asks for.
 */
final class PossibleTimes {
  final Problem problem;

  /** Whether the round has entrants and a hall that suits it and holds somebody. */
  final boolean[] placed;

  /** Whether all of its entrants are in one group. */
  final boolean[] single;

  /** Fewest groups that hold the entrants. */
  final int[] fewestGroups;

  /** The length of the shortest group there could be, and of the one with the slowest entrant. */
  final int[] shortestMinutes;

  final int[] longestMinutes;

  /** The round's groups together. */
  final int[] minutesInAll;

  /** From the first start to the last end. */
  final int[] spanMinutes;

  /** The soonest start and the latest end that the rounds before and after it leave. */
  final int[] ready;

  final int[] deadline;

  /** The slowest entrant's seat. */
  final int[] slowestSeat;

  private final int setup;
  private final int turnaround;
  private final int[] pinnedStart;
  private final int[] pinnedHall;
  private final Starts[] ofRound;

  /** By round and minutes, once the order of the rounds is reckoned with. */
  private final Map<Integer, Map<Integer, Starts>> known = new TreeMap<>();

  private boolean ordered;

  PossibleTimes(Problem problem) {
    this.problem = problem;
    setup = problem.event.rules().setupMinutes();
    turnaround = problem.event.rules().turnaroundMinutes();
    int rounds = problem.rounds;
    placed = new boolean[rounds];
    single = new boolean[rounds];
    fewestGroups = new int[rounds];
    shortestMinutes = new int[rounds];
    longestMinutes = new int[rounds];
    minutesInAll = new int[rounds];
    spanMinutes = new int[rounds];
    slowestSeat = new int[rounds];
    ready = new int[rounds];
    deadline = new int[rounds];
    Arrays.fill(ready, Problem.NEVER);
    Arrays.fill(deadline, Problem.FOREVER);
    pinnedStart = new int[rounds];
    pinnedHall = new int[rounds];
    ofRound = new Starts[rounds];
    for (int r = 0; r < rounds; r++) {
      pinnedStart[r] = Problem.NEVER;
      pinnedHall[r] = -1;
      placed[r] = problem.entrants(r) > 0 && problem.largestCapacity(r) > 0;
      if (placed[r]) {
        measure(r);
      }
    }
    order();
    ordered = true;
    for (int r = 0; r < rounds; r++) {
      if (placed[r]) {
        ofRound[r] = starts(r, longestMinutes[r], true);
      }
    }
  }

  private void measure(int r) {
    Round round = problem.roundList.get(r);
    int entrants = problem.entrants(r);
    int largest = problem.largestCapacity(r);
    fewestGroups[r] = (entrants + largest - 1) / largest;
    fewestGroups[r] = Math.max(fewestGroups[r], Math.min(entrants, round.groups().orElse(1)));
    single[r] = entrants == 1 || problem.mustBeWhole(r) || round.groups().orElse(0) == 1;
    if (single[r]) {
      notePins(r, round.id());
    }
    int shortest = Integer.MAX_VALUE;
    int longest = 0;
    long path = 0;
    long work = 0;
    int attempts = 0;
    for (int seat = problem.seatStart[r]; seat < problem.seatStart[r + 1]; seat++) {
      int minutes = seatMinutes(r, seat);
      if (minutes > longest) {
        slowestSeat[r] = seat;
      }
      shortest = Math.min(shortest, minutes);
      longest = Math.max(longest, minutes);
      path = Math.max(path, pathMicros(r, seat));
      work += problem.pace.workMicros[seat];
      attempts += problem.pace.attempts[seat];
    }
    if (round.minutesPerGroup().isPresent()) {
      minutesInAll[r] = fewestGroups[r] * round.minutesPerGroup().getAsInt();
    } else {
      int stations = mostStations(r);
      int whole =
          problem.pace.leastMinutes(
              r,
              work,
              attempts,
              path,
              stations,
              problem.wanted(r, 1, stations, entrants),
              problem.wanted(r, 2, stations, entrants));
      longest = single[r] ? whole : longest;
      shortest = single[r] ? whole : shortest;
      minutesInAll[r] = Math.max(whole, longest + (fewestGroups[r] - 1) * shortest);
    }
    shortestMinutes[r] = shortest;
    longestMinutes[r] = longest;
    int halls = suitableHalls(r).length;
    int setups = Math.max(0, fewestGroups[r] - halls) * setup;
    spanMinutes[r] = Math.max(longest, (minutesInAll[r] + setups + halls - 1) / halls);
  }

  private void notePins(int r, String round) {
    for (Pins.GroupPin pin : problem.pins().groups()) {
      if (pin.round().equals(round) && pin.number() == 1) {
        pinnedHall[r] = pin.hall().map(problem::hall).orElse(pinnedHall[r]);
        pinnedStart[r] = pin.start().map(LocalClock::epochMinute).orElse(pinnedStart[r]);
      }
    }
  }

  private int mostStations(int r) {
    return IntStream.of(suitableHalls(r)).map(h -> problem.mostStations[r][h]).max().orElse(1);
  }

  int[] suitableHalls(int r) {
    return IntStream.range(0, problem.halls)
        .filter(h -> problem.suits[r][h] && problem.capacity[r][h] > 0)
        .toArray();
  }

  private long pathMicros(int r, int seat) {
    int scramblers = problem.wanted(r, 1, 1, 1);
    int runners = problem.wanted(r, 2, 1, 1);
    return problem.pace.pathMicros(r, seat, scramblers, runners);
  }

  /** The least length of any group that the seat's owner may be in. */
  int seatMinutes(int r, int seat) {
    if (single[r] && longestMinutes[r] > 0) {
      return longestMinutes[r];
    }
    return problem
        .roundList
        .get(r)
        .minutesPerGroup()
        .orElseGet(() -> problem.pace.leastMinutes(r, 0, 0, pathMicros(r, seat), 1, 0, 0));
  }

  /** Each round waits for the one before, and is over in time for the one after. */
  private void order() {
    int[] byNumber =
        IntStream.range(0, problem.rounds)
            .boxed()
            .sorted(Comparator.comparingInt(r -> problem.roundList.get(r).number()))
            .mapToInt(Integer::intValue)
            .toArray();
    for (int r : byNumber) {
      int before = problem.roundBefore[r];
      if (before >= 0 && placed[r] && placed[before]) {
        Starts first = starts(before, shortestMinutes[before], true);
        int soonest = first.isEmpty() ? ready[before] : first.first();
        if (soonest > Problem.NEVER) {
          ready[r] = soonest + spanMinutes[before] + turnaround;
        }
      }
    }
    for (int i = byNumber.length - 1; i >= 0; i--) {
      int r = byNumber[i];
      int before = problem.roundBefore[r];
      if (before >= 0 && placed[r] && placed[before]) {
        Starts any = starts(r, shortestMinutes[r], true);
        if (!any.isEmpty()) {
          int latestEnd = any.last() + shortestMinutes[r];
          deadline[before] = latestEnd - spanMinutes[r] - turnaround;
        }
      }
    }
  }

  /** When a group of a round may start, with or without regard to the rounds before and after. */
  Starts starts(int r, int minutes, boolean inOrder) {
    if (!ordered || !inOrder) {
      return allStarts(r, minutes, inOrder);
    }
    return known
        .computeIfAbsent(r, first -> new TreeMap<>())
        .computeIfAbsent(minutes, first -> allStarts(r, minutes, true));
  }

  private Starts allStarts(int r, int minutes, boolean inOrder) {
    int earliest = Math.max(problem.notBefore[r], inOrder ? ready[r] : Problem.NEVER);
    int latest = Math.min(problem.notAfter[r], inOrder ? deadline[r] : Problem.FOREVER);
    List<Starts.Stretch> found = new ArrayList<>();
    for (int hall : suitableHalls(r)) {
      if (pinnedHall[r] >= 0 && pinnedHall[r] != hall) {
        continue;
      }
      int[] from = problem.hallFreeFrom[hall];
      for (int w = 0; w < from.length; w++) {
        int first = Math.max(from[w], earliest);
        int last = Math.min(problem.hallFreeTo[hall][w], latest) - minutes;
        if (pinnedStart[r] > Problem.NEVER) {
          first = Math.max(first, pinnedStart[r]);
          last = Math.min(last, pinnedStart[r]);
        }
        found.add(new Starts.Stretch(first, last));
      }
    }
    return Starts.of(found);
  }

  /** When the group with the slowest entrant may start. */
  Starts ofRound(int r) {
    return ofRound[r];
  }

  /** When a group that the seat's owner is in may start, with them there and not busy. */
  Starts ofSeat(int seat) {
    int r = problem.seatRound[seat];
    int minutes = seatMinutes(r, seat);
    return withPerson(
        starts(r, minutes, true), problem.seatPerson[seat], minutes, !problem.roundLikely[r]);
  }

  /** Those starts at which somebody is not busy, and there where that is asked for. */
  Starts withPerson(Starts starts, int person, int minutes, boolean there) {
    Starts found = starts;
    boolean always =
        problem.presentFrom[person].length == 1 && problem.presentFrom[person][0] == Problem.NEVER;
    if (there && !always) {
      List<Starts.Stretch> present = new ArrayList<>();
      for (int w = 0; w < problem.presentFrom[person].length; w++) {
        present.add(
            new Starts.Stretch(
                problem.presentFrom[person][w], problem.presentTo[person][w] - minutes));
      }
      found = found.and(Starts.of(present));
    }
    for (int b = 0; b < problem.busyFrom[person].length; b++) {
      found = found.clearOf(problem.busyFrom[person][b], problem.busyTo[person][b], minutes);
    }
    return found;
  }

  /** For a round of one group: when it may start with everybody there. */
  Starts together(int r) {
    Starts all = ofRound[r];
    for (int seat = problem.seatStart[r]; seat < problem.seatStart[r + 1]; seat++) {
      all = all.and(ofSeat(seat));
    }
    return all;
  }
}
