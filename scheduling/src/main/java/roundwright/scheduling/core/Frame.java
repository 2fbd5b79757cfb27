package roundwright.scheduling.core;

import java.util.ArrayList;
import java.util.Arrays;
import java.util.Comparator;
import java.util.List;
import roundwright.scheduling.model.Pins;
import roundwright.scheduling.model.Round;
import roundwright.scheduling.model.Rules;

/**
 * A day plan laid out for pricing: groups in order of time, so that a person's commitments in order
 * of group are in order of time, and bitsets over groups instead of minutes, so that "is free" is a
 * word or two of AND. Immutable once groups are frozen, if any are; then shared freely between
 * threads.
 *
 * <p>Layout: {@code words} longs a set; the set of group {@code g} in {@link #conflicts} begins at
 * {@code g * words}, that of person {@code p} in {@link #free} at {@code p * words}. A
 * <em>place</em> is one duty that a crew may have; those of group {@code g} and role {@code k} are
 * contiguous from {@code placeStart[g * 3 + k]} to {@code placeStart[g * 3 + k + 1]}.
 */
public final class Frame {
  /** The order of a frame's groups. */
  public static final Comparator<Slot> IN_TIME =
      Comparator.comparingInt(Slot::start)
          .thenComparingInt(Slot::end)
          .thenComparingInt(Slot::hall)
          .thenComparingInt(Slot::number)
          .thenComparingInt(Slot::round);

  public final Problem problem;
  public final int groups;
  public final int words;
  public final int[] round;
  public final int[] number;
  public final int[] hall;
  public final int[] stations;
  public final int[] start;
  public final int[] end;
  public final int[] date;

  /** Of each group: its round's discipline. */
  public final int[] discipline;

  /** Whether groups in order of time are in order of date: not so where zones differ. */
  public final boolean datesInOrder;

  /** The longest way in minutes between two halls with groups. */
  public final int longestWay;

  /** Place within the round, 0 and up, by start and then hall. */
  public final int[] place;

  /** Of each round: its groups by place. */
  public final int[][] groupsOf;

  public final boolean[] earliestOfSeveral;
  public final long[] conflicts;

  /** Whether a person is present and not busy for the whole of a group. */
  public final long[] free;

  public final int[] placeStart;
  public final int places;
  public final int[] placeGroup;
  public final int[] placeRole;

  /** The person pinned to a place, or -1. */
  public final int[] placePin;

  /** The group pinned to a seat, or -1. */
  public final int[] seatPin;

  /** Of each group: whether nobody comes, goes or changes duty. */
  public final boolean[] frozen;

  /** Of each group and role: who has the skill and is free, in order of person. */
  public final int[][] candidates;

  /** Of each seat: the place 0 and up within its round that the seeding wants. */
  public final int[] wantedPlace;

  /** Of each group: most people it may hold with its stations in use. */
  public final int[] mostPeople;

  /** Of each group: its part of the round's entrants by stations in use. */
  public final double[] fairSize;

  public final int[][] mealFrom;
  public final int[][] mealTo;

  /**
   * Of each group and meal: whether the day plan itself leaves everybody the time for it, who is
   * not busy.
   */
  public final boolean[][] mealLeft;

  public Frame(Problem problem, List<Slot> slots) {
    this(problem, slots, new int[slots.size() * 3]);
  }

  /**
   * With room for a larger crew than is wanted, as a plan by hand may have.
   *
   * @param leastPlaces of each group in the order of {@link #IN_TIME}, and role
   */
  public Frame(Problem problem, List<Slot> slots, int[] leastPlaces) {
    this.problem = problem;
    List<Slot> inTime = new ArrayList<>(slots);
    inTime.sort(IN_TIME);
    groups = inTime.size();
    words = Math.max(1, (groups + 63) >>> 6);
    round = inTime.stream().mapToInt(Slot::round).toArray();
    number = inTime.stream().mapToInt(Slot::number).toArray();
    hall = inTime.stream().mapToInt(Slot::hall).toArray();
    stations = inTime.stream().mapToInt(Slot::stations).toArray();
    start = inTime.stream().mapToInt(Slot::start).toArray();
    end = inTime.stream().mapToInt(Slot::end).toArray();
    date = new int[groups];
    place = new int[groups];
    groupsOf = new int[problem.rounds][];
    earliestOfSeveral = new boolean[groups];
    mealFrom = new int[groups][];
    mealTo = new int[groups][];
    mealLeft = new boolean[groups][];
    discipline = Arrays.stream(round).map(r -> problem.roundDiscipline[r]).toArray();
    layOutGroups();
    layOutMeals();
    boolean inOrder = true;
    int longest = 0;
    for (int g = 0; g < groups; g++) {
      inOrder &= g == 0 || date[g - 1] <= date[g];
      for (int h : hall) {
        longest = Math.max(longest, problem.way[hall[g]][h]);
      }
    }
    datesInOrder = inOrder;
    longestWay = longest;
    conflicts = new long[groups * words];
    layOutConflicts();
    free = new long[problem.people * words];
    layOutFree();

    int[] pinnedDuties = new int[groups * 3];
    List<int[]> dutyPins = dutyPins(pinnedDuties);
    placeStart = new int[groups * 3 + 1];
    for (int gk = 0; gk < groups * 3; gk++) {
      int g = gk / 3;
      int most = problem.wanted(round[g], gk % 3, stations[g], Integer.MAX_VALUE);
      placeStart[gk + 1] =
          placeStart[gk] + Math.max(Math.max(most, leastPlaces[gk]), pinnedDuties[gk]);
    }
    places = placeStart[groups * 3];
    placeGroup = new int[places];
    placeRole = new int[places];
    placePin = new int[places];
    Arrays.fill(placePin, -1);
    frozen = new boolean[groups];
    candidates = new int[groups * 3][];
    layOutPlaces(dutyPins);
    seatPin = new int[problem.seats];
    layOutSeatPins();
    wantedPlace = new int[problem.seats];
    for (int seat = 0; seat < problem.seats; seat++) {
      wantedPlace[seat] = seededPlace(seat);
    }
    mostPeople = new int[groups];
    fairSize = new double[groups];
    for (int g = 0; g < groups; g++) {
      mostPeople[g] = problem.largestSize(round[g], stations[g]);
      int inUse = 0;
      for (int other : groupsOf[round[g]]) {
        inUse += stations[other];
      }
      fairSize[g] = (double) problem.entrants(round[g]) * stations[g] / inUse;
    }
  }

  private void layOutGroups() {
    List<Rules.Meal> meals = problem.event.rules().meals();
    for (int g = 0; g < groups; g++) {
      LocalClock clock = problem.hallClock[hall[g]];
      date[g] = clock.date(start[g]);
      mealFrom[g] = new int[meals.size()];
      mealTo[g] = new int[meals.size()];
      for (int m = 0; m < meals.size(); m++) {
        mealFrom[g][m] = clock.minuteAt(date[g], meals.get(m).from().toSecondOfDay() / 60);
        mealTo[g][m] = clock.minuteAt(date[g], meals.get(m).to().toSecondOfDay() / 60);
      }
    }
    for (int r = 0; r < problem.rounds; r++) {
      int wanted = r;
      groupsOf[r] =
          java.util.stream.IntStream.range(0, groups)
              .filter(g -> round[g] == wanted)
              .boxed()
              .sorted(
                  Comparator.comparingInt((Integer g) -> start[g])
                      .thenComparingInt(g -> hall[g])
                      .thenComparingInt(g -> number[g]))
              .mapToInt(Integer::intValue)
              .toArray();
      for (int i = 0; i < groupsOf[r].length; i++) {
        place[groupsOf[r][i]] = i;
      }
      if (groupsOf[r].length > 1 && problem.roundList.get(r).number() == 1) {
        earliestOfSeveral[groupsOf[r][0]] = true;
      }
    }
  }

  private void layOutMeals() {
    List<Rules.Meal> meals = problem.event.rules().meals();
    for (int g = 0; g < groups; g++) {
      mealLeft[g] = new boolean[meals.size()];
      for (int m = 0; m < meals.size(); m++) {
        boolean asBefore =
            g > 0 && mealFrom[g - 1][m] == mealFrom[g][m] && mealTo[g - 1][m] == mealTo[g][m];
        mealLeft[g][m] =
            asBefore
                ? mealLeft[g - 1][m]
                : leavesStretch(mealFrom[g][m], mealTo[g][m], meals.get(m).minutes());
      }
    }
  }

  /** Whether some stretch of that many minutes meets no group at all. */
  private boolean leavesStretch(int from, int to, int minutes) {
    int freeSince = from;
    for (int g = 0; g < groups; g++) {
      if (Math.min(start[g], to) - freeSince >= minutes) {
        return true;
      }
      freeSince = Math.max(freeSince, end[g]);
    }
    return to - freeSince >= minutes;
  }

  private void layOutConflicts() {
    for (int g = 0; g < groups; g++) {
      for (int later = g; later < groups; later++) {
        if (start[later] < end[g] + problem.way[hall[g]][hall[later]]) {
          conflicts[g * words + (later >>> 6)] |= 1L << later;
          conflicts[later * words + (g >>> 6)] |= 1L << g;
        }
      }
    }
  }

  private void layOutFree() {
    for (int p = 0; p < problem.people; p++) {
      for (int g = 0; g < groups; g++) {
        if (problem.present(p, start[g], end[g]) && !problem.busy(p, start[g], end[g])) {
          free[p * words + (g >>> 6)] |= 1L << g;
        }
      }
    }
  }

  private List<int[]> dutyPins(int[] count) {
    List<int[]> found = new ArrayList<>();
    for (Pins.DutyPin pin : problem.pins().duties()) {
      int g = group(problem.round(pin.round()), pin.number());
      if (g >= 0) {
        int role = Problem.role(pin.role());
        found.add(new int[] {g * 3 + role, problem.person(pin.person())});
        count[g * 3 + role]++;
      }
    }
    return found;
  }

  private void layOutPlaces(List<int[]> dutyPins) {
    for (int gk = 0; gk < groups * 3; gk++) {
      int g = gk / 3;
      int role = gk % 3;
      for (int at = placeStart[gk]; at < placeStart[gk + 1]; at++) {
        placeGroup[at] = g;
        placeRole[at] = role;
      }
      candidates[gk] =
          java.util.stream.IntStream.range(0, problem.people)
              .filter(p -> problem.skilled(p, round[g], role) && isFree(p, g))
              .toArray();
    }
    int[] next = Arrays.copyOf(placeStart, groups * 3);
    for (int[] pin : dutyPins) {
      placePin[next[pin[0]]++] = pin[1];
    }
  }

  private void layOutSeatPins() {
    Arrays.fill(seatPin, -1);
    for (Pins.CompetitorPin pin : problem.pins().competitors()) {
      int r = problem.round(pin.round());
      int seat = problem.seatOf(problem.person(pin.person()), r);
      int g = group(r, pin.number());
      if (seat >= 0 && g >= 0) {
        seatPin[seat] = g;
      }
    }
  }

  /** The group of that number, or -1. */
  public int group(int wantedRound, int wantedNumber) {
    for (int g : groupsOf[wantedRound]) {
      if (number[g] == wantedNumber) {
        return g;
      }
    }
    return -1;
  }

  public boolean isFree(int person, int group) {
    return (free[person * words + (group >>> 6)] & (1L << group)) != 0;
  }

  public boolean conflict(int one, int other) {
    return (conflicts[one * words + (other >>> 6)] & (1L << other)) != 0;
  }

  /** Leaves a group as it stands on a board, for good: to be done before a search begins. */
  public void freeze(int group, Board board) {
    frozen[group] = true;
    for (int i = 0; i < board.size[group]; i++) {
      seatPin[board.member(group, i)] = group;
    }
    for (int at = placeStart[group * 3]; at < placeStart[group * 3 + 3]; at++) {
      placePin[at] = board.placePerson[at];
    }
    for (int role = 0; role < 3; role++) {
      candidates[group * 3 + role] = new int[0];
    }
  }

  private int seededPlace(int seat) {
    int r = problem.seatRound[seat];
    int several = groupsOf[r].length;
    if (several == 0) {
      return 0;
    }
    return problem.roundList.get(r).seeding() == Round.Seeding.MIXED
        ? problem.seatRank[seat] % several
        : (int) ((long) problem.seatRank[seat] * several / problem.entrants(r));
  }
}
