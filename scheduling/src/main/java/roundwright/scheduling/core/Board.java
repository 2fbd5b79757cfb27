package roundwright.scheduling.core;

import java.util.Arrays;

/**
 * Who is where: every seat in a group or nowhere, every place with a person or empty. It keeps the
 * state and nothing of its price. Not thread-safe.
 *
 * <p>Layout: a person's commitments are ascending ints {@code group << 2 | kind}, kind 0 to 2 a
 * role, 3 solving; since groups are in order of time, so are they. {@link #taken} and {@link
 * #solves} repeat them as bitsets over groups. Nothing allocates once the board stands, but for a
 * person's list that grows.
 */
public final class Board {
  private static final int FIRST_LENGTH = 8;

  public final Frame frame;
  public final Problem problem;
  public final int[] seatGroup;
  public final int[] placePerson;
  public final int[] size;
  public final int[] filled;
  public final long[] workInAll;
  public final int[] attemptsInAll;

  /** Of each group: its least minutes, or -1 where somebody came or went since they were asked. */
  final int[] leastMinutes;

  /** Of each person: how far in all their groups are from where the seeding wants them. */
  public final int[] placesAway;

  public final long[] taken;
  public final long[] solves;

  /** Of each group: pairs of a judge and a competitor of one household, somebody twice included. */
  public final int[] kinPairs;

  private final int households;
  private final short[] kinSolving;
  private final short[] kinJudging;
  private final int[][] members;
  private final int[] memberAt;
  private final int[][] commitments;
  private final int[] commitmentCount;

  public Board(Frame frame) {
    this.frame = frame;
    this.problem = frame.problem;
    seatGroup = new int[problem.seats];
    Arrays.fill(seatGroup, -1);
    memberAt = new int[problem.seats];
    placePerson = new int[frame.places];
    Arrays.fill(placePerson, -1);
    size = new int[frame.groups];
    filled = new int[frame.groups * 3];
    workInAll = new long[frame.groups];
    attemptsInAll = new int[frame.groups];
    leastMinutes = new int[frame.groups];
    Arrays.fill(leastMinutes, -1);
    placesAway = new int[problem.people];
    taken = new long[problem.people * frame.words];
    solves = new long[problem.people * frame.words];
    members = new int[frame.groups][];
    for (int g = 0; g < frame.groups; g++) {
      members[g] = new int[problem.entrants(frame.round[g])];
    }
    kinPairs = new int[frame.groups];
    households = problem.households;
    kinSolving = new short[frame.groups * households];
    kinJudging = new short[frame.groups * households];
    commitments = new int[problem.people][FIRST_LENGTH];
    commitmentCount = new int[problem.people];
  }

  /** Moves a seat to a group of its round, or nowhere with -1. */
  public void seat(int seat, int group) {
    int before = seatGroup[seat];
    int person = problem.seatPerson[seat];
    if (before >= 0) {
      int last = members[before][--size[before]];
      members[before][memberAt[seat]] = last;
      memberAt[last] = memberAt[seat];
      workInAll[before] -= problem.pace.workMicros[seat];
      attemptsInAll[before] -= problem.pace.attempts[seat];
      leastMinutes[before] = -1;
      placesAway[person] -= Math.abs(frame.place[before] - frame.wantedPlace[seat]);
      countKin(person, before, kinSolving, kinJudging, -1);
      drop(person, before << 2 | Problem.SOLVING);
    }
    seatGroup[seat] = group;
    if (group >= 0) {
      memberAt[seat] = size[group];
      members[group][size[group]++] = seat;
      workInAll[group] += problem.pace.workMicros[seat];
      attemptsInAll[group] += problem.pace.attempts[seat];
      leastMinutes[group] = -1;
      placesAway[person] += Math.abs(frame.place[group] - frame.wantedPlace[seat]);
      countKin(person, group, kinSolving, kinJudging, 1);
      add(person, group << 2 | Problem.SOLVING);
    }
  }

  private void countKin(int person, int group, short[] own, short[] others, int by) {
    int household = problem.household[person];
    if (household >= 0) {
      own[group * households + household] += (short) by;
      kinPairs[group] += by * others[group * households + household];
    }
  }

  /** Competitors of the person's household in a group, the person included. */
  public int kinSolving(int person, int group) {
    int household = problem.household[person];
    return household < 0 ? 0 : kinSolving[group * households + household];
  }

  /** Judges of the person's household in a group, the person included. */
  public int kinJudging(int person, int group) {
    int household = problem.household[person];
    return household < 0 ? 0 : kinJudging[group * households + household];
  }

  /** Gives a place to a person, or empties it with -1. */
  public void duty(int place, int person) {
    int before = placePerson[place];
    int group = frame.placeGroup[place];
    int role = frame.placeRole[place];
    if (before >= 0) {
      filled[group * 3 + role]--;
      if (role == 0) {
        countKin(before, group, kinJudging, kinSolving, -1);
      }
      drop(before, group << 2 | role);
    }
    placePerson[place] = person;
    if (person >= 0) {
      filled[group * 3 + role]++;
      if (role == 0) {
        countKin(person, group, kinJudging, kinSolving, 1);
      }
      add(person, group << 2 | role);
    }
  }

  /** Adds a commitment for a trial price; whoever does takes it back with {@link #drop}. */
  public void add(int person, int commitment) {
    int count = commitmentCount[person];
    int[] list = commitments[person];
    if (count == list.length) {
      list = Arrays.copyOf(list, count * 2);
      commitments[person] = list;
    }
    int at = count;
    while (at > 0 && list[at - 1] > commitment) {
      list[at] = list[at - 1];
      at--;
    }
    list[at] = commitment;
    commitmentCount[person] = count + 1;
    mark(person, commitment);
  }

  private void mark(int person, int commitment) {
    int group = commitment >> 2;
    int word = person * frame.words + (group >>> 6);
    taken[word] |= 1L << group;
    if ((commitment & 3) == Problem.SOLVING) {
      solves[word] |= 1L << group;
    }
  }

  public void drop(int person, int commitment) {
    int[] list = commitments[person];
    int count = commitmentCount[person] - 1;
    int at = 0;
    while (list[at] != commitment) {
      at++;
    }
    System.arraycopy(list, at + 1, list, at, count - at);
    commitmentCount[person] = count;
    int group = commitment >> 2;
    int word = person * frame.words + (group >>> 6);
    taken[word] &= ~(1L << group);
    solves[word] &= ~(1L << group);
    for (int i = Math.max(0, at - 3); i < count && list[i] >> 2 <= group; i++) {
      if (list[i] >> 2 == group) {
        mark(person, list[i]);
      }
    }
  }

  public int commitmentCount(int person) {
    return commitmentCount[person];
  }

  public int commitment(int person, int at) {
    return commitments[person][at];
  }

  /** The seat at a position of a group, 0 to {@code size[group] - 1}, in no lasting order. */
  public int member(int group, int at) {
    return members[group][at];
  }

  public int wanted(int group, int role) {
    return problem.wanted(frame.round[group], role, frame.stations[group], size[group]);
  }

  /** Whether nothing the person is committed to keeps them from a duty in the group. */
  public boolean couldTake(int person, int group) {
    int words = frame.words;
    int mine = person * words;
    int theirs = group * words;
    for (int w = 0; w < words; w++) {
      if ((taken[mine + w] & frame.conflicts[theirs + w]) != 0) {
        return false;
      }
    }
    return true;
  }

  /** Like {@link #couldTake}, were the person not solving, or on duty, in {@code but}. */
  public boolean couldTakeBut(int person, int group, int but) {
    int words = frame.words;
    int mine = person * words;
    int theirs = group * words;
    for (int w = 0; w < words; w++) {
      long both = taken[mine + w] & frame.conflicts[theirs + w];
      if (w == but >>> 6) {
        both &= ~(1L << but);
      }
      if (both != 0) {
        return false;
      }
    }
    return true;
  }

  /** The place a person has in a group, or -1. */
  public int placeOf(int person, int group) {
    for (int at = frame.placeStart[group * 3]; at < frame.placeStart[group * 3 + 3]; at++) {
      if (placePerson[at] == person) {
        return at;
      }
    }
    return -1;
  }
}
