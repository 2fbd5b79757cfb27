package roundwright.scheduling.timetable;

import java.util.ArrayList;
import java.util.Arrays;
import java.util.List;
import java.util.OptionalInt;
import java.util.stream.Stream;
import roundwright.scheduling.core.Problem;
import roundwright.scheduling.model.Pins;
import roundwright.scheduling.model.Round;

/**
 * One way to cut a round into groups before anything is known of time: hall, stations, size, length
 * and wanted crew of each group by its place. The arrays are not to be written.
 */
final class Shape {
  private static final int MOST_EXTRA_GROUPS = 2;
  private static final int STATION_LEVELS = 3;
  private static final int ROOM_FOR_SLOWER = 2;

  final int round;
  final int groups;
  final int[] hall;
  final int[] stations;
  final int[] size;
  final int[] minutes;

  /** Of each group: the slot that is likely to do, not under its least time. */
  private final int[] likelyMinutes;

  /** Most people each group may hold with its stations in use. */
  final int[] capacity;

  /** Of each group and role. */
  final int[][] crew;

  /** Of each group: what it keeps of each pool of the supply. */
  int[][] kept = {};

  private Shape(int round, int groups) {
    this.round = round;
    this.groups = groups;
    hall = new int[groups];
    stations = new int[groups];
    size = new int[groups];
    minutes = new int[groups];
    likelyMinutes = new int[groups];
    capacity = new int[groups];
    crew = new int[groups][3];
  }

  /**
   * The shapes worth trying, the plainest first; none where the round has no entrants.
   *
   * @param stretch how many times their largest bound groups are likely to take, in the order of
   *     the seeding; empty where nothing is known of it
   */
  static List<Shape> ofRound(Problem problem, Supply supply, int round, double[] stretch) {
    int entrants = problem.entrants(round);
    List<Shape> found = new ArrayList<>();
    if (entrants == 0) {
      return found;
    }
    for (int[] cycle : cycles(problem, round)) {
      int fewest = fewestGroups(problem, round, cycle, entrants);
      OptionalInt given = problem.roundList.get(round).groups();
      int from = given.isPresent() ? Math.min(given.getAsInt(), entrants) : fewest;
      int most = given.isPresent() ? from : Math.min(entrants, fewest + MOST_EXTRA_GROUPS);
      if (problem.mustBeWhole(round)) {
        if (problem.capacity[round][cycle[0]] < entrants) {
          continue;
        }
        most = from;
      }
      from = Math.max(from, Math.min(entrants, pinnedGroups(problem, round)));
      for (int groups = from; groups <= Math.max(from, most); groups++) {
        if (groups < cycle.length) {
          continue;
        }
        for (int level = 0; level < STATION_LEVELS; level++) {
          Shape shape = make(problem, round, cycle, groups, level, stretch);
          shape.kept = supply.kept(shape);
          Shape likely = shape.with(shape.likelyMinutes);
          Stream.of(likely, likely.allAsLongAsTheLongest(), shape, shape.allAsLongAsTheLongest())
              .filter(one -> found.stream().noneMatch(one::same))
              .forEach(found::add);
        }
      }
    }
    return found;
  }

  private static int pinnedGroups(Problem problem, int round) {
    if (problem.mustBeWhole(round) || problem.roundList.get(round).groups().isPresent()) {
      return 0;
    }
    String id = problem.roundList.get(round).id();
    int most = 0;
    for (Pins.GroupPin pin : problem.pins().groups()) {
      most = pin.round().equals(id) ? Math.max(most, pin.number()) : most;
    }
    for (Pins.CompetitorPin pin : problem.pins().competitors()) {
      most = pin.round().equals(id) ? Math.max(most, pin.number()) : most;
    }
    for (Pins.DutyPin pin : problem.pins().duties()) {
      most = pin.round().equals(id) ? Math.max(most, pin.number()) : most;
    }
    return most;
  }

  private boolean same(Shape other) {
    return Arrays.equals(hall, other.hall)
        && Arrays.equals(stations, other.stations)
        && Arrays.equals(minutes, other.minutes);
  }

  /** The same with room in each group for everybody: for rounds with people who come late. */
  private Shape allAsLongAsTheLongest() {
    int[] same = new int[groups];
    Arrays.fill(same, Arrays.stream(minutes).max().getAsInt());
    return with(same);
  }

  private Shape with(int[] otherMinutes) {
    Shape shape = new Shape(round, groups);
    System.arraycopy(hall, 0, shape.hall, 0, groups);
    System.arraycopy(stations, 0, shape.stations, 0, groups);
    System.arraycopy(size, 0, shape.size, 0, groups);
    System.arraycopy(capacity, 0, shape.capacity, 0, groups);
    System.arraycopy(otherMinutes, 0, shape.minutes, 0, groups);
    System.arraycopy(likelyMinutes, 0, shape.likelyMinutes, 0, groups);
    System.arraycopy(crew, 0, shape.crew, 0, groups);
    shape.kept = kept;
    return shape;
  }

  /** Minutes by which its slots are shorter than is likely to do, over all groups. */
  int shortMinutes() {
    int sum = 0;
    for (int i = 0; i < groups; i++) {
      sum += Math.max(0, likelyMinutes[i] - minutes[i]);
    }
    return sum;
  }

  /** The halls its groups take in turn: each alone, each two together, all together. */
  private static List<int[]> cycles(Problem problem, int round) {
    int[] usable = problem.usableHalls(round);
    List<int[]> found = new ArrayList<>();
    Integer[] bySize = Arrays.stream(usable).boxed().toArray(Integer[]::new);
    Arrays.sort(
        bySize,
        (a, b) -> {
          int larger = Integer.compare(problem.capacity[round][b], problem.capacity[round][a]);
          return larger != 0 ? larger : Integer.compare(a, b);
        });
    for (int one : bySize) {
      found.add(new int[] {one});
    }
    for (int i = 0; i < bySize.length; i++) {
      for (int j = i + 1; j < bySize.length; j++) {
        found.add(new int[] {Math.min(bySize[i], bySize[j]), Math.max(bySize[i], bySize[j])});
      }
    }
    if (usable.length > 2) {
      found.add(usable);
    }
    return found;
  }

  private static int fewestGroups(Problem problem, int round, int[] cycle, int entrants) {
    int groups = 0;
    int held = 0;
    while (held < entrants) {
      held += Math.max(1, problem.capacity[round][cycle[groups % cycle.length]]);
      groups++;
    }
    return groups;
  }

  private static Shape make(
      Problem problem, int round, int[] cycle, int groups, int level, double[] stretch) {
    Shape shape = new Shape(round, groups);
    int entrants = problem.entrants(round);
    int inUse = 0;
    for (int i = 0; i < groups; i++) {
      shape.hall[i] = cycle[i % cycle.length];
    }
    shape.pinHalls(problem);
    int[] most = new int[groups];
    for (int i = 0; i < groups; i++) {
      most[i] = problem.mostStations[round][shape.hall[i]];
      inUse += most[i];
    }
    int cut = 0;
    int before = 0;
    for (int i = 0; i < groups; i++) {
      cut += most[i];
      int upTo = (int) (((long) entrants * cut + inUse - 1) / inUse);
      upTo = Math.max(before + 1, Math.min(upTo, entrants - (groups - 1 - i)));
      shape.size[i] = upTo - before;
      before = upTo;
    }
    shape.chooseStations(problem, most, level);
    shape.measure(problem, stretch);
    return shape;
  }

  private void pinHalls(Problem problem) {
    String id = problem.roundList.get(round).id();
    for (Pins.GroupPin pin : problem.pins().groups()) {
      if (pin.round().equals(id) && pin.number() <= groups && pin.hall().isPresent()) {
        hall[pin.number() - 1] = problem.hall(pin.hall().get());
      }
    }
  }

  private void chooseStations(Problem problem, int[] most, int level) {
    boolean crewGiven = problem.roundList.get(round).crew().isPresent();
    for (int i = 0; i < groups; i++) {
      int room = groups > 1 ? 1 : 0;
      int fewest = Math.min(most[i], problem.fewestStations(round, size[i] + room));
      fewest = Math.max(1, fewest);
      int useful =
          problem.roundFixed[round] ? fewest : Math.max(fewest, Math.min(most[i], size[i]));
      stations[i] = crewGiven ? useful : fewest + (useful - fewest) * level / (STATION_LEVELS - 1);
    }
  }

  private void measure(Problem problem, double[] stretch) {
    Round given = problem.roundList.get(round);
    int[][] members = members(problem);
    for (int i = 0; i < groups; i++) {
      capacity[i] = problem.largestSize(round, stations[i]);
      for (int role = 0; role < 3; role++) {
        crew[i][role] = problem.wanted(round, role, stations[i], size[i]);
      }
      if (given.minutesPerGroup().isPresent()) {
        minutes[i] = given.minutesPerGroup().getAsInt();
        likelyMinutes[i] = minutes[i];
        continue;
      }
      long work = 0;
      int attempts = 0;
      long longest = 0;
      for (int seat : members[i]) {
        work += problem.pace.workMicros[seat];
        attempts += problem.pace.attempts[seat];
        longest = Math.max(longest, problem.pace.pathMicros(round, seat, crew[i][1], crew[i][2]));
      }
      int active = problem.roundFixed[round] ? size[i] : stations[i];
      minutes[i] =
          problem.pace.leastMinutes(round, work, attempts, longest, active, crew[i][1], crew[i][2]);
      double likely = stretch.length == 0 ? 1 : stretch[i * stretch.length / groups];
      likelyMinutes[i] =
          problem
              .pace
              .withSlack(likely)
              .leastMinutes(round, work, attempts, longest, active, crew[i][1], crew[i][2]);
    }
  }

  /** The seats of each group as the seeding would have them, pinned ones where they are pinned. */
  private int[][] members(Problem problem) {
    int first = problem.seatStart[round];
    int entrants = problem.entrants(round);
    int[] byRank = new int[entrants];
    for (int seat = first; seat < first + entrants; seat++) {
      byRank[problem.seatRank[seat]] = seat;
    }
    List<List<Integer>> lists = new ArrayList<>();
    for (int i = 0; i < groups; i++) {
      lists.add(new ArrayList<>());
    }
    boolean mixed = problem.roundList.get(round).seeding() == Round.Seeding.MIXED;
    int group = 0;
    for (int rank = 0; rank < entrants; rank++) {
      if (mixed) {
        lists.get(rank % groups).add(byRank[rank]);
        continue;
      }
      while (group < groups - 1 && lists.get(group).size() >= size[group]) {
        group++;
      }
      lists.get(group).add(byRank[rank]);
    }
    pinMembers(problem, lists);
    if (!mixed) {
      makeRoomForNeighbours(lists);
    }
    return lists.stream()
        .map(list -> list.stream().mapToInt(Integer::intValue).toArray())
        .toArray(int[][]::new);
  }

  private void pinMembers(Problem problem, List<List<Integer>> lists) {
    String id = problem.roundList.get(round).id();
    for (Pins.CompetitorPin pin : problem.pins().competitors()) {
      int seat = pin.round().equals(id) ? problem.seatOf(problem.person(pin.person()), round) : -1;
      if (seat >= 0 && pin.number() <= groups) {
        Integer boxed = seat;
        lists.forEach(list -> list.remove(boxed));
        lists.get(pin.number() - 1).add(seat);
      }
    }
  }

  /**
   * Lets a group's length bear a few of the neighbours' members, since who cannot be in their own
   * group will mostly be in the next one; each stands in for somebody of like speed at its edge.
   */
  private void makeRoomForNeighbours(List<List<Integer>> lists) {
    List<List<Integer>> before = new ArrayList<>();
    lists.forEach(list -> before.add(List.copyOf(list)));
    for (int i = 0; i < groups; i++) {
      if (i > 0) {
        List<Integer> slower = before.get(i - 1);
        int from = Math.max(0, slower.size() - ROOM_FOR_SLOWER);
        List<Integer> own = lists.get(i);
        int borrowed = Math.min(slower.size() - from, own.size());
        for (int b = 0; b < borrowed; b++) {
          own.set(own.size() - 1 - b, slower.get(from + b));
        }
        if (!slower.isEmpty()) {
          own.add(slower.get(slower.size() - 1));
        }
      }
    }
  }
}
