package roundwright.scheduling.advice;

import java.util.ArrayDeque;
import java.util.ArrayList;
import java.util.Arrays;
import java.util.Collections;
import java.util.Deque;
import java.util.List;
import java.util.stream.IntStream;
import roundwright.scheduling.core.Board;
import roundwright.scheduling.core.Frame;
import roundwright.scheduling.core.Problem;
import roundwright.scheduling.crewing.Standing;
import roundwright.scheduling.rules.Ledger;

/**
 * All groups that run at one minute, and who could have which duty of theirs while everything else
 * stays. Each person takes at most one, so an empty duty can be filled exactly where an augmenting
 * path leads from it to somebody without a duty (Berge 1957); where none does, the duties reached
 * want more people than can have them (P. Hall 1935).
 *
 * <p>A <em>column</em> is a role in one of the groups: {@code index * 3 + role}.
 */
final class Moment {
  private static final int NONE = -1;
  private static final int PINNED = -2;

  final int[] groups;

  /** An epoch minute at which all of them run. */
  final int minute;

  private final Standing standing;
  private final Board board;
  private final Frame frame;
  private final Problem problem;
  private final Ledger ledger;

  /** Of each person: the column they fill, NONE, or PINNED where nobody may move them. */
  private final int[] column;

  private Moment(Standing standing, int minute, int[] groups) {
    this.standing = standing;
    this.minute = minute;
    this.groups = groups;
    board = standing.board;
    frame = standing.frame;
    problem = standing.problem;
    ledger = standing.ledger;
    column = new int[problem.people];
    Arrays.fill(column, NONE);
    for (int i = 0; i < groups.length; i++) {
      for (int role = 0; role < 3; role++) {
        int gk = groups[i] * 3 + role;
        for (int at = frame.placeStart[gk]; at < frame.placeStart[gk + 1]; at++) {
          int person = board.placePerson[at];
          if (person >= 0) {
            boolean second = column[person] != NONE;
            column[person] = second || frame.placePin[at] == person ? PINNED : i * 3 + role;
          }
        }
      }
    }
  }

  /** The moments of a group: at its start, and whenever another starts while it runs. */
  static List<Moment> of(Standing standing, int group) {
    Frame frame = standing.frame;
    List<Moment> moments = new ArrayList<>();
    int last = Integer.MIN_VALUE;
    for (int g = 0; g < frame.groups; g++) {
      int at = Math.max(frame.start[g], frame.start[group]);
      boolean inside = frame.start[g] >= frame.start[group] && frame.start[g] < frame.end[group];
      if (inside && at != last) {
        last = at;
        int minute = at;
        moments.add(
            new Moment(
                standing,
                minute,
                IntStream.range(0, frame.groups)
                    .filter(other -> frame.start[other] <= minute && minute < frame.end[other])
                    .toArray()));
      }
    }
    return moments;
  }

  int columnOf(int group, int role) {
    return Arrays.binarySearch(groups, group) * 3 + role;
  }

  int group(int ofColumn) {
    return groups[ofColumn / 3];
  }

  private int filled(int c) {
    return board.filled[group(c) * 3 + c % 3];
  }

  /** Duties wanted beside those of people who are pinned to theirs. */
  int wanted(int c) {
    int wanted = board.wanted(group(c), c % 3);
    int gk = group(c) * 3 + c % 3;
    for (int at = frame.placeStart[gk]; at < frame.placeStart[gk + 1]; at++) {
      int person = board.placePerson[at];
      wanted -= person >= 0 && column[person] == PINNED ? 1 : 0;
    }
    return Math.max(0, wanted);
  }

  /** Whether somebody could have a duty instead of theirs of this moment, without a new breach. */
  boolean could(int person, int c) {
    if (column[person] == c) {
      return true;
    }
    int g = group(c);
    if (column[person] == PINNED
        || !problem.skilled(person, frame.round[g], c % 3)
        || !frame.isFree(person, g)) {
      return false;
    }
    int own = column[person];
    if (own == NONE) {
      return board.couldTake(person, g) && addsNoBreach(person, g, c % 3, ledger.priceNow(person));
    }
    if (!board.couldTakeBut(person, g, group(own))) {
      return false;
    }
    long before = ledger.priceNow(person);
    int commitment = group(own) << 2 | own % 3;
    board.drop(person, commitment);
    boolean could = addsNoBreach(person, g, c % 3, before);
    board.add(person, commitment);
    return could;
  }

  private boolean addsNoBreach(int person, int g, int role, long before) {
    long after = ledger.priceWith(person, g << 2 | role);
    return Math.floorDiv(after, Ledger.BREACH_IN_TRIALS)
        <= Math.floorDiv(before, Ledger.BREACH_IN_TRIALS);
  }

  /** A person's way from a column (NONE: from no duty) to another. */
  record Step(int person, int from, int to) {}

  /**
   * What came of looking for somebody for one more duty of a column.
   *
   * @param path steps that fill it, the empty duty's first; empty where there is none
   * @param columns where there is no path: those that together want more people than can have them
   * @param people where there is no path: all who could have any of these
   */
  record Outcome(List<Step> path, List<Integer> columns, List<Integer> people) {}

  Outcome fill(int vacancy) {
    int[] reachedBy = new int[groups.length * 3];
    Arrays.fill(reachedBy, NONE);
    int[] towards = new int[problem.people];
    Arrays.fill(towards, NONE);
    boolean[] seen = new boolean[groups.length * 3];
    Deque<Integer> queue = new ArrayDeque<>(List.of(vacancy));
    seen[vacancy] = true;
    while (!queue.isEmpty()) {
      int c = queue.remove();
      for (int person = 0; person < problem.people; person++) {
        if (towards[person] != NONE || !could(person, c)) {
          continue;
        }
        towards[person] = c;
        int own = column[person];
        boolean spare = own >= 0 && own != c && filled(own) > board.wanted(group(own), own % 3);
        if (own == NONE || spare) {
          return new Outcome(path(person, vacancy, towards, reachedBy), List.of(), List.of());
        }
        if (!seen[own]) {
          seen[own] = true;
          reachedBy[own] = person;
          queue.add(own);
        }
      }
    }
    return new Outcome(
        List.of(),
        IntStream.range(0, seen.length).filter(c -> seen[c]).boxed().toList(),
        IntStream.range(0, problem.people).filter(p -> towards[p] != NONE).boxed().toList());
  }

  private List<Step> path(int last, int vacancy, int[] towards, int[] reachedBy) {
    List<Step> steps = new ArrayList<>();
    int person = last;
    while (true) {
      int to = towards[person];
      steps.add(new Step(person, column[person], to));
      if (to == vacancy) {
        Collections.reverse(steps);
        return steps;
      }
      person = reachedBy[to];
    }
  }

  /** Takes the steps on the board. The moment is stale afterwards. */
  void make(List<Step> path) {
    for (Step step : path) {
      if (step.from != NONE) {
        ledger.duty(place(step.from, step.person), -1);
      }
    }
    for (Step step : path) {
      ledger.duty(place(step.to, NONE), step.person);
    }
    ledger.keep();
  }

  private int place(int ofColumn, int person) {
    int gk = group(ofColumn) * 3 + ofColumn % 3;
    for (int at = frame.placeStart[gk]; at < frame.placeStart[gk + 1]; at++) {
      if (board.placePerson[at] == person && (person != NONE || frame.placePin[at] < 0)) {
        return at;
      }
    }
    throw new IllegalStateException("No such place in group " + standing.groupId(group(ofColumn)));
  }

  Change change(List<Step> path) {
    List<Change> changes = new ArrayList<>();
    for (Step step : path) {
      String person = standing.personId(step.person);
      String group = standing.groupId(group(step.to));
      changes.add(
          step.from == NONE
              ? new Change.PutOnDuty(person, group, Wording.role(step.to % 3))
              : new Change.MoveDuty(
                  person,
                  standing.groupId(group(step.from)),
                  Wording.role(step.from % 3),
                  group,
                  Wording.role(step.to % 3)));
    }
    return changes.size() == 1 ? changes.get(0) : new Change.Together(changes);
  }
}
