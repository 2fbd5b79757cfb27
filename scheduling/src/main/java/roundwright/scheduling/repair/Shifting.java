package roundwright.scheduling.repair;

import java.util.ArrayList;
import java.util.Arrays;
import java.util.Comparator;
import java.util.List;
import java.util.Optional;
import java.util.OptionalInt;
import java.util.stream.IntStream;
import roundwright.scheduling.core.LocalClock;
import roundwright.scheduling.core.Problem;
import roundwright.scheduling.core.Slot;
import roundwright.scheduling.model.Pins;

/**
 * Lays a kept day plan out anew, each group where it stood if it still can be there, and finds the
 * soonest place for those that cannot and for groups that entrants need more. In order of time, and
 * no group makes room for another: that is left to {@link Relocating}.
 */
final class Shifting {
  private static final int NOWHERE = Integer.MAX_VALUE;

  /** What becomes of a group that cannot stay. */
  enum Way {
    /** Into the soonest hole of any hall that suits; where there is none, in others' way. */
    MAKE_ROOM,
    /** It stays all the same, even where a pin wants it elsewhere, and no group is added. */
    STAY
  }

  private final Problem problem;
  private final Way way;
  private final int setup;
  private final int turnaround;
  private final int notBefore;
  private final List<Standee> placed = new ArrayList<>();
  private List<Standee> waiting = List.of();

  /**
   * @param notBefore no group moves to before this minute
   */
  Shifting(Problem problem, Way way, int notBefore) {
    this.problem = problem;
    this.way = way;
    this.notBefore = notBefore;
    setup = problem.event.rules().setupMinutes();
    turnaround = problem.event.rules().turnaroundMinutes();
  }

  List<Standee> lay(List<Standee> kept) {
    kept.stream().filter(Standee::frozen).forEach(placed::add);
    List<Standee> free = new ArrayList<>();
    for (Standee one : kept) {
      if (!one.frozen()) {
        pinned(one).ifPresentOrElse(placed::add, () -> free.add(one));
      }
    }
    List<Standee> open =
        new ArrayList<>(
            free.stream()
                .sorted(
                    Comparator.comparing(Standee::slot, roundwright.scheduling.core.Frame.IN_TIME))
                .toList());
    while (!open.isEmpty()) {
      Standee next = open.remove(0);
      waiting = open;
      placed.add(place(next));
    }
    waiting = List.of();
    if (way != Way.STAY) {
      addWhatIsMissing();
    }
    return placed;
  }

  /** Whether a group may be put elsewhere: it has not begun and no pin says where or when. */
  boolean mayMove(Standee one) {
    return !one.frozen() && pinned(one).isEmpty();
  }

  /** Where and when pins put a group; those with the start left open find a place like others. */
  private Optional<Standee> pinned(Standee one) {
    String round = problem.roundList.get(one.slot().round()).id();
    int hall = one.slot().hall();
    OptionalInt start = OptionalInt.empty();
    for (Pins.GroupPin pin : problem.event.pins().groups()) {
      if (pin.round().equals(round) && pin.number() == one.slot().number()) {
        hall = pin.hall().map(this::hallIndex).orElse(hall);
        start = pin.start().map(at -> OptionalInt.of(LocalClock.epochMinute(at))).orElse(start);
      }
    }
    if (way == Way.STAY || hall < 0 || (start.isEmpty() && hall == one.slot().hall())) {
      return Optional.empty();
    }
    return Optional.of(one.at(hall, one.slot().stations(), start.orElse(one.slot().start())));
  }

  private int hallIndex(String id) {
    return IntStream.range(0, problem.halls)
        .filter(hall -> problem.hallList.get(hall).id().equals(id))
        .findFirst()
        .orElse(-1);
  }

  private Standee place(Standee one) {
    Slot slot = one.slot();
    if (way == Way.STAY && slot.hall() >= 0) {
      return one;
    }
    int ready = ready(slot.round());
    if (slot.hall() >= 0
        && slot.start() >= ready
        && isFree(one, slot.hall(), slot.start(), List.of())) {
      return one;
    }
    int from = Math.max(ready, Math.max(notBefore, slot.start()));
    return anywhere(one, from).or(() -> anywhere(one, ready)).orElseGet(() -> somewhere(one));
  }

  /** Where it stood, or at its time in another hall where its own is no more. */
  private Standee somewhere(Standee one) {
    int[] halls = problem.usableHalls(one.slot().round());
    int instead = halls.length > 0 ? halls[0] : 0;
    return one.slot().hall() >= 0
        ? one
        : one.at(instead, one.slot().stations(), one.slot().start());
  }

  private Optional<Standee> anywhere(Standee one, int from) {
    int bestHall = -1;
    int best = NOWHERE;
    for (int hall : problem.usableHalls(one.slot().round())) {
      if (problem.mostStations[one.slot().round()][hall] >= one.slot().stations()) {
        int start = soonest(one, hall, Math.max(from, notBefore));
        if (start < best) {
          best = start;
          bestHall = hall;
        }
      }
    }
    return bestHall < 0
        ? Optional.empty()
        : Optional.of(one.at(bestHall, one.slot().stations(), best));
  }

  private int ready(int round) {
    int ready = problem.notBefore[round];
    int before = problem.roundBefore[round];
    for (Standee one : placed) {
      if (before >= 0 && one.slot().round() == before) {
        ready = Math.max(ready, one.slot().end() + turnaround);
      }
    }
    return ready;
  }

  private int soonest(Standee one, int hall, int from) {
    int minutes = one.slot().end() - one.slot().start();
    int grid = problem.grid();
    for (int w = 0; w < problem.hallFreeFrom[hall].length; w++) {
      int at = onGrid(hall, Math.max(from, problem.hallFreeFrom[hall][w]), grid);
      while (at + minutes <= problem.hallFreeTo[hall][w]) {
        if (isFree(one, hall, at, waiting)) {
          return at;
        }
        at = onGrid(hall, at + 1, grid);
      }
    }
    return NOWHERE;
  }

  private int onGrid(int hall, int minute, int grid) {
    LocalClock clock = problem.hallClock[hall];
    int at = minute;
    while (clock.minuteOfDay(at) % grid != 0 || clock.comesTwice(at)) {
      at++;
    }
    return at;
  }

  private boolean isFree(Standee one, int hall, int start, List<Standee> alsoHeed) {
    int end = start + one.slot().end() - one.slot().start();
    if (end > problem.notAfter[one.slot().round()] || !isOpen(hall, start, end)) {
      return false;
    }
    return placed.stream().noneMatch(other -> inTheWay(other, hall, start, end))
        && alsoHeed.stream().noneMatch(other -> inTheWay(other, hall, start, end));
  }

  private boolean isOpen(int hall, int start, int end) {
    for (int w = 0; w < problem.hallFreeFrom[hall].length; w++) {
      if (problem.hallFreeFrom[hall][w] <= start && end <= problem.hallFreeTo[hall][w]) {
        return true;
      }
    }
    return false;
  }

  private boolean inTheWay(Standee other, int hall, int start, int end) {
    Slot slot = other.slot();
    return slot.hall() == hall && slot.start() < end + setup && start < slot.end() + setup;
  }

  /** New groups where a round's entrants are more than its groups may hold. */
  private void addWhatIsMissing() {
    Integer[] rounds = new Integer[problem.rounds];
    Arrays.setAll(rounds, r -> r);
    Arrays.sort(rounds, Comparator.comparingInt(r -> problem.roundList.get(r).number()));
    for (int round : rounds) {
      int left = problem.entrants(round);
      int number = 0;
      for (Standee one : placed) {
        if (one.slot().round() == round) {
          left -= problem.largestSize(round, one.slot().stations());
          number = Math.max(number, one.slot().number());
        }
      }
      while (left > 0) {
        Optional<Standee> added = newGroup(round, ++number, left);
        if (added.isEmpty()) {
          return;
        }
        placed.add(added.get());
        left -= problem.largestSize(round, added.get().slot().stations());
      }
    }
  }

  private Optional<Standee> newGroup(int round, int number, int people) {
    Standee best = null;
    Standee inTheWay = null;
    for (int hall : problem.usableHalls(round)) {
      int stations =
          Math.min(problem.mostStations[round][hall], problem.fewestStations(round, people));
      if (problem.largestSize(round, stations) == 0) {
        continue;
      }
      Slot shape = new Slot(round, number, hall, stations, 0, minutes(round, stations, people));
      Standee blank = new Standee(Optional.empty(), shape, false);
      int start = soonest(blank, hall, Math.max(ready(round), notBefore));
      if (start != NOWHERE && (best == null || start < best.slot().start())) {
        best = blank.at(hall, stations, start);
      }
      inTheWay = inTheWay == null ? inOthersWay(blank, hall) : inTheWay;
    }
    return Optional.ofNullable(best == null ? inTheWay : best);
  }

  /** At the first opening from which it could be there; none where there is none to come. */
  private Standee inOthersWay(Standee blank, int hall) {
    int from = Math.max(ready(blank.slot().round()), notBefore);
    int minutes = blank.slot().end() - blank.slot().start();
    for (int w = 0; w < problem.hallFreeFrom[hall].length; w++) {
      int at = onGrid(hall, Math.max(from, problem.hallFreeFrom[hall][w]), problem.grid());
      if (at + minutes <= problem.hallFreeTo[hall][w]) {
        return blank.at(hall, blank.slot().stations(), at);
      }
    }
    return null;
  }

  /** Long enough for the round's slowest. */
  private int minutes(int round, int stations, int people) {
    var given = problem.roundList.get(round).minutesPerGroup();
    if (given.isPresent()) {
      return given.getAsInt();
    }
    int size = Math.min(people, problem.largestSize(round, stations));
    int first = problem.seatStart[round];
    Integer[] seats = new Integer[problem.entrants(round)];
    Arrays.setAll(seats, i -> first + i);
    Arrays.sort(seats, Comparator.comparingLong(seat -> -problem.pace.workMicros[seat]));
    int scramblers = problem.wanted(round, 1, stations, size);
    int runners = problem.wanted(round, 2, stations, size);
    long work = 0;
    int attempts = 0;
    long path = 0;
    for (int i = 0; i < size; i++) {
      work += problem.pace.workMicros[seats[i]];
      attempts += problem.pace.attempts[seats[i]];
      path = Math.max(path, problem.pace.pathMicros(round, seats[i], scramblers, runners));
    }
    int active = problem.roundFixed[round] ? size : stations;
    return problem.pace.leastMinutes(round, work, attempts, path, active, scramblers, runners);
  }
}
