package roundwright.scheduling.advice;

import java.util.Arrays;
import java.util.TreeSet;
import java.util.function.IntPredicate;
import java.util.stream.IntStream;
import roundwright.scheduling.core.Board;
import roundwright.scheduling.core.Frame;
import roundwright.scheduling.core.Problem;
import roundwright.scheduling.crewing.Standing;

/**
 * The duties of a plan that somebody is to cover, everybody solving where they do and pinned duties
 * staying with whom they are pinned to.
 *
 * <p>Layout: a <em>task</em> is one wanted duty; those of group {@code g} and role {@code k} are
 * alike, of kind {@code g * 3 + k}, and stand together.
 */
final class Tasks {
  final Frame frame;
  final Problem problem;
  final int[] kind;
  final int count;

  /** Of each kind: who could have it, in order of person. */
  final int[][] candidates;

  final boolean[] mustServe;
  final int dates;

  /** Of each person and date: minutes of the duties they are pinned to. */
  final int[] pinnedMinutes;

  /** Duties with too few candidates even if nobody did anything else. */
  final int uncovered;

  private final int[] dateIndex;
  private final long[] pinned;

  Tasks(Standing standing) {
    frame = standing.frame;
    problem = standing.problem;
    Board board = standing.board;
    pinned = new long[problem.people * frame.words];
    mustServe = new boolean[problem.people];
    dateIndex = new int[frame.groups];
    int[] distinct = Arrays.stream(frame.date).distinct().sorted().toArray();
    dates = Math.max(1, distinct.length);
    for (int g = 0; g < frame.groups; g++) {
      dateIndex[g] = Arrays.binarySearch(distinct, frame.date[g]);
    }
    pinnedMinutes = new int[problem.people * dates];
    int[] wanted = new int[frame.groups * 3];
    for (int gk = 0; gk < wanted.length; gk++) {
      wanted[gk] = board.wanted(gk / 3, gk % 3);
    }
    for (int place = 0; place < frame.places; place++) {
      if (frame.placePin[place] >= 0) {
        pin(frame.placePin[place], frame.placeGroup[place]);
        wanted[frame.placeGroup[place] * 3 + frame.placeRole[place]]--;
      }
    }
    candidates = new int[wanted.length][];
    int missing = 0;
    for (int gk = 0; gk < wanted.length; gk++) {
      int g = gk / 3;
      candidates[gk] =
          Arrays.stream(frame.candidates[gk])
              .filter(p -> isClear(board.solves, p, g) && isClear(pinned, p, g))
              .filter(p -> pinnedMinutes[at(p, g)] + length(g) <= problem.maxDutyMinutes[p])
              .toArray();
      int could = Math.min(Math.max(0, wanted[gk]), candidates[gk].length);
      missing += Math.max(0, wanted[gk]) - could;
      wanted[gk] = could;
    }
    uncovered = missing;
    count = IntStream.of(wanted).sum();
    kind = new int[count];
    int task = 0;
    for (int gk = 0; gk < wanted.length; gk++) {
      for (int i = 0; i < wanted[gk]; i++) {
        kind[task++] = gk;
      }
    }
  }

  private void pin(int person, int g) {
    pinned[person * frame.words + (g >>> 6)] |= 1L << g;
    mustServe[person] = true;
    pinnedMinutes[at(person, g)] += length(g);
  }

  private boolean isClear(long[] sets, int person, int g) {
    for (int w = 0; w < frame.words; w++) {
      if ((sets[person * frame.words + w] & frame.conflicts[g * frame.words + w]) != 0) {
        return false;
      }
    }
    return true;
  }

  /** Where a person's minutes on the date of a group are kept. */
  int at(int person, int g) {
    return person * dates + dateIndex[g];
  }

  boolean sameDate(int one, int other) {
    return dateIndex[one] == dateIndex[other];
  }

  int length(int g) {
    return frame.end[g] - frame.start[g];
  }

  boolean isCandidate(int gk, int person) {
    return Arrays.binarySearch(candidates[gk], person) >= 0;
  }

  int pins() {
    return (int) IntStream.of(frame.placePin).filter(person -> person >= 0).count();
  }

  /** Takes each pinned duty, by kind and person. */
  void eachPinned(Covering.Taker taker) {
    for (int place = 0; place < frame.places; place++) {
      if (frame.placePin[place] >= 0) {
        taker.take(frame.placeGroup[place] * 3 + frame.placeRole[place], frame.placePin[place]);
      }
    }
  }

  /**
   * No fewer people can be: duties at one minute each take somebody, and so do each day's minutes
   * of duty.
   */
  int bound(IntPredicate covered) {
    int most = (int) IntStream.range(0, problem.people).filter(p -> mustServe[p]).count();
    int[] byDate = new int[dates];
    for (int g = 0; g < frame.groups; g++) {
      most = Math.max(most, running(frame.start[g], covered));
    }
    for (int task = 0; task < count; task++) {
      int g = kind[task] / 3;
      byDate[dateIndex[g]] += covered.test(task) ? length(g) : 0;
    }
    int[] strongest = IntStream.of(problem.maxDutyMinutes).sorted().toArray();
    for (int wanted : byDate) {
      int people = 0;
      int left = wanted;
      while (left > 0 && people < strongest.length) {
        left -= strongest[strongest.length - 1 - people];
        people++;
      }
      most = Math.max(most, people);
    }
    return most;
  }

  private int running(int minute, IntPredicate covered) {
    int found = 0;
    for (int task = 0; task < count; task++) {
      found += runs(kind[task] / 3, minute) && covered.test(task) ? 1 : 0;
    }
    TreeSet<Integer> pins = new TreeSet<>();
    for (int place = 0; place < frame.places; place++) {
      if (frame.placePin[place] >= 0 && runs(frame.placeGroup[place], minute)) {
        pins.add(frame.placePin[place]);
      }
    }
    return found + pins.size();
  }

  boolean runs(int g, int minute) {
    return frame.start[g] <= minute && minute < frame.end[g];
  }
}
