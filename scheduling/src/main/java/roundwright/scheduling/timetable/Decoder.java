package roundwright.scheduling.timetable;

import java.util.ArrayList;
import java.util.Arrays;
import java.util.List;
import java.util.stream.IntStream;
import roundwright.scheduling.core.LocalClock;
import roundwright.scheduling.core.Problem;
import roundwright.scheduling.core.Slot;
import roundwright.scheduling.model.Pins;

/**
 * Lays rounds out one after the other: each group at the earliest start at which its hall is free
 * and open, the round before is over and the people for its crew are there (serial schedule
 * generation, Kelley 1963). Pinned groups stand first. What fits nowhere is laid down all the same
 * and pays for it in the price. Not thread-safe; allocates little.
 */
final class Decoder {
  private static final int NOT_FOUND = Integer.MAX_VALUE;
  private static final int LIMIT_PARTS = 1024;

  final Problem problem;
  final Supply supply;

  private final int setup;
  private final int turnaround;
  private final int[] dayStart;

  private final int[][] takenFrom;
  private final int[][] takenTo;
  private final int[] takenCount;
  private final int[][] kept;
  private int limit = LIMIT_PARTS;

  /** Of each round: starts of its groups by place; the rest is the shape's. */
  final int[][] start;

  final Shape[] shape;
  final int[] firstStart;
  final int[] lastEnd;
  private final boolean[] placed;
  private final int[][] pinStart;
  private final boolean hasPinnedStarts;

  /** Of each round: those that share an entrant with it, where these are to be kept apart. */
  final int[][] sharing;

  long shortage;

  Decoder(Problem problem, Supply supply) {
    this.problem = problem;
    this.supply = supply;
    setup = problem.event.rules().setupMinutes();
    turnaround = problem.event.rules().turnaroundMinutes();
    dayStart = dayStarts(problem);
    takenFrom = new int[problem.halls][16];
    takenTo = new int[problem.halls][16];
    takenCount = new int[problem.halls];
    kept = new int[supply.stretches][supply.pools];
    start = new int[problem.rounds][];
    shape = new Shape[problem.rounds];
    firstStart = new int[problem.rounds];
    lastEnd = new int[problem.rounds];
    placed = new boolean[problem.rounds];
    pinStart = new int[problem.rounds][];
    for (int r = 0; r < problem.rounds; r++) {
      pinStart[r] = new int[0];
    }
    boolean pinned = false;
    for (Pins.GroupPin pin : problem.pins().groups()) {
      if (pin.start().isPresent()) {
        pinned = true;
        int r = problem.round(pin.round());
        int known = pinStart[r].length;
        if (known < pin.number()) {
          pinStart[r] = Arrays.copyOf(pinStart[r], pin.number());
          Arrays.fill(pinStart[r], known, pin.number(), NOT_FOUND);
        }
        pinStart[r][pin.number() - 1] = LocalClock.epochMinute(pin.start().get());
      }
    }
    hasPinnedStarts = pinned;
    sharing = new int[problem.rounds][0];
  }

  /** From now on two rounds with an entrant in common do not meet, where each is one group. */
  void keepSharingRoundsApart() {
    boolean[][] share = new boolean[problem.rounds][problem.rounds];
    for (int[] own : problem.personSeats) {
      for (int one : own) {
        for (int other : own) {
          share[problem.seatRound[one]][problem.seatRound[other]] |= one != other;
        }
      }
    }
    for (int r = 0; r < problem.rounds; r++) {
      boolean[] row = share[r];
      sharing[r] = IntStream.range(0, row.length).filter(other -> row[other]).toArray();
    }
  }

  private static int[] dayStarts(Problem problem) {
    return IntStream.range(0, problem.halls)
        .flatMap(
            h ->
                Arrays.stream(problem.hallFreeFrom[h])
                    .map(from -> problem.hallClock[h].minuteAt(problem.hallClock[h].date(from), 0)))
        .sorted()
        .distinct()
        .toArray();
  }

  /** The same for layouts that are the same, and hardly ever for others. */
  long fingerprint() {
    long print = 1;
    for (int r = 0; r < problem.rounds; r++) {
      Shape own = shape[r];
      for (int i = 0; own != null && i < own.groups; i++) {
        print = (print ^ start[r][i]) * 0x100000001B3L;
        print =
            (print ^ (own.hall[i] << 20 | own.stations[i] << 10 | own.minutes[i])) * 0x100000001B3L;
      }
    }
    return print;
  }

  int days() {
    return dayStart.length;
  }

  int dayStart(int day) {
    return dayStart[day];
  }

  /**
   * Lays out all rounds.
   *
   * @param order rounds by priority
   * @param shapes by round; null for a round without entrants
   * @param earliest by round: not before that minute
   * @param pressure part of the people there to leave out of account, 0 to 1
   */
  void decode(int[] order, Shape[] shapes, int[] earliest, double pressure) {
    Arrays.fill(takenCount, 0);
    for (int[] stretch : kept) {
      Arrays.fill(stretch, 0);
    }
    Arrays.fill(placed, false);
    shortage = 0;
    limit = (int) Math.round((1 - pressure) * LIMIT_PARTS);
    for (int r = 0; r < problem.rounds; r++) {
      shape[r] = shapes[r];
      if (shapes[r] != null && (start[r] == null || start[r].length != shapes[r].groups)) {
        start[r] = new int[shapes[r].groups];
      }
      if (shapes[r] != null) {
        placePinned(r);
      }
    }
    for (int r : order) {
      place(r, earliest);
    }
  }

  private void placePinned(int r) {
    for (int i = 0; i < Math.min(pinStart[r].length, shape[r].groups); i++) {
      if (pinStart[r][i] != NOT_FOUND) {
        start[r][i] = pinStart[r][i];
        take(shape[r], i, start[r][i]);
      }
    }
  }

  private boolean pinned(int r, int i) {
    return i < pinStart[r].length && pinStart[r][i] != NOT_FOUND;
  }

  private void place(int r, int[] earliest) {
    if (placed[r] || shape[r] == null) {
      return;
    }
    int ready = Math.max(problem.notBefore[r], earliest[r]);
    int before = problem.roundBefore[r];
    if (before >= 0 && shape[before] != null) {
      place(before, earliest);
      ready = Math.max(ready, lastEnd[before] + turnaround);
    }
    Shape own = shape[r];
    firstStart[r] = NOT_FOUND;
    lastEnd[r] = Problem.NEVER;
    int next = ready;
    int lastHall = -1;
    for (int i = 0; i < own.groups; i++) {
      if (!pinned(r, i)) {
        int from = own.hall[i] > lastHall || lastHall < 0 ? next : next + 1;
        start[r][i] = findStart(own, i, from);
        take(own, i, start[r][i]);
      }
      if (start[r][i] >= next) {
        next = start[r][i];
        lastHall = own.hall[i];
      }
      firstStart[r] = Math.min(firstStart[r], start[r][i]);
      lastEnd[r] = Math.max(lastEnd[r], start[r][i] + own.minutes[i]);
    }
    placed[r] = true;
  }

  private int findStart(Shape own, int group, int from) {
    int found = search(own, group, from, true, true);
    if (found == NOT_FOUND && sharing[own.round].length > 0) {
      found = search(own, group, from, true, false);
    }
    if (found == NOT_FOUND) {
      found = search(own, group, from, false, false);
    }
    return found == NOT_FOUND ? afterEverything(own, group, from) : found;
  }

  private int search(Shape own, int group, int from, boolean withSupply, boolean apart) {
    int hall = own.hall[group];
    int minutes = own.minutes[group];
    int[] freeFrom = problem.hallFreeFrom[hall];
    int[] freeTo = problem.hallFreeTo[hall];
    int[] keeps = own.kept[group];
    for (int w = 0; w < freeFrom.length; w++) {
      int at = onGrid(hall, Math.max(from, freeFrom[w]));
      while (at + minutes <= freeTo[w]) {
        int later = afterClash(hall, at, minutes);
        if (later > at) {
          at = onGrid(hall, later);
        } else if (hasNoName(hall, at) || hasNoName(hall, at + minutes)) {
          at = onGrid(hall, at + 1);
        } else {
          later = apart ? afterMeeting(own, at) : at;
          if (later == at && withSupply) {
            later = afterShortage(keeps, at, at + minutes);
          }
          if (later == at) {
            return at;
          }
          at = onGrid(hall, later);
        }
      }
    }
    return NOT_FOUND;
  }

  /** Plans are told in wall time, which cannot name an hour that comes twice. */
  private boolean hasNoName(int hall, int minute) {
    return problem.hallClock[hall].comesTwice(minute);
  }

  /** The soonest minute at which no group in the way is left, or the same where none is. */
  private int afterClash(int hall, int at, int minutes) {
    int count = takenCount[hall];
    for (int i = firstEndingAfter(hall, at - setup); i < count; i++) {
      if (takenFrom[hall][i] >= at + minutes + setup) {
        return at;
      }
      if (at < takenTo[hall][i] + setup) {
        return takenTo[hall][i] + setup;
      }
    }
    return at;
  }

  /**
   * The soonest minute at which no round in the way is left with an entrant in common, who has
   * neither another group nor can be in two places; or the same.
   */
  private int afterMeeting(Shape own, int at) {
    int later = at;
    int end = at + own.minutes[0];
    for (int other : sharing[own.round]) {
      if (placed[other]) {
        int way = problem.way[own.hall[0]][shape[other].hall[0]];
        int over = lastEnd[other] + way;
        if (at < over && firstStart[other] < end + way) {
          later = Math.max(later, over);
        }
      }
    }
    return later;
  }

  /** By bisection: groups in a hall follow each other, but for pins, which stand first of all. */
  private int firstEndingAfter(int hall, int minute) {
    if (hasPinnedStarts) {
      return 0;
    }
    int low = 0;
    int high = takenCount[hall];
    while (low < high) {
      int middle = (low + high) >>> 1;
      if (takenTo[hall][middle] <= minute) {
        low = middle + 1;
      } else {
        high = middle;
      }
    }
    return low;
  }

  /** The soonest minute that leaves a stretch without enough people behind, or the same. */
  private int afterShortage(int[] keeps, int from, int to) {
    int first = supply.stretch(from);
    for (int s = supply.stretch(to - 1); s >= first; s--) {
      for (int pool = 0; pool < supply.pools; pool++) {
        int keep = keeps[pool];
        if (keep > 0
            && (kept[s][pool] + keep) * (long) LIMIT_PARTS > (long) supply.there[s][pool] * limit) {
          return Math.max(from + 1, supply.firstMinute + (s + 1) * Supply.STRETCH_MINUTES);
        }
      }
    }
    return from;
  }

  private int afterEverything(Shape own, int group, int from) {
    int hall = own.hall[group];
    int[] freeTo = problem.hallFreeTo[hall];
    int at = Math.max(from, freeTo.length == 0 ? from : freeTo[freeTo.length - 1]);
    for (int i = 0; i < takenCount[hall]; i++) {
      at = Math.max(at, takenTo[hall][i] + setup);
    }
    return onGrid(hall, at);
  }

  private int onGrid(int hall, int minute) {
    LocalClock clock = problem.hallClock[hall];
    int off = clock.minuteOfDay(minute) % problem.grid();
    if (off == 0) {
      return minute;
    }
    int next = minute + problem.grid() - off;
    // Every day begins on the grid, also where the grid does not divide a day.
    return clock.date(next) == clock.date(minute)
        ? onGrid(hall, next)
        : next - clock.minuteOfDay(next);
  }

  private void take(Shape own, int group, int at) {
    int hall = own.hall[group];
    int end = at + own.minutes[group];
    if (takenCount[hall] == takenFrom[hall].length) {
      takenFrom[hall] = Arrays.copyOf(takenFrom[hall], takenCount[hall] * 2);
      takenTo[hall] = Arrays.copyOf(takenTo[hall], takenCount[hall] * 2);
    }
    int i = takenCount[hall]++;
    while (i > 0 && takenFrom[hall][i - 1] > at) {
      takenFrom[hall][i] = takenFrom[hall][i - 1];
      takenTo[hall][i] = takenTo[hall][i - 1];
      i--;
    }
    takenFrom[hall][i] = at;
    takenTo[hall][i] = end;
    int[] keeps = own.kept[group];
    int last = supply.stretch(end - 1);
    for (int s = supply.stretch(at); s <= last; s++) {
      for (int pool = 0; pool < supply.pools; pool++) {
        kept[s][pool] += keeps[pool];
        shortage += Math.max(0, Math.min(keeps[pool], kept[s][pool] - supply.there[s][pool]));
      }
    }
  }

  /** The layout as slots, rounds in order and groups numbered by place. */
  List<Slot> slots() {
    List<Slot> slots = new ArrayList<>();
    for (int r = 0; r < problem.rounds; r++) {
      if (shape[r] != null) {
        for (int i = 0; i < shape[r].groups; i++) {
          slots.add(
              new Slot(
                  r,
                  i + 1,
                  shape[r].hall[i],
                  shape[r].stations[i],
                  start[r][i],
                  start[r][i] + shape[r].minutes[i]));
        }
      }
    }
    return slots;
  }
}
