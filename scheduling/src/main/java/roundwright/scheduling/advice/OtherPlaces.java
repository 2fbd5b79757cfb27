package roundwright.scheduling.advice;

import java.util.ArrayList;
import java.util.Comparator;
import java.util.List;
import roundwright.scheduling.core.Board;
import roundwright.scheduling.core.Frame;
import roundwright.scheduling.core.LocalClock;
import roundwright.scheduling.core.Problem;
import roundwright.scheduling.crewing.Standing;

/** Where else one group could be with the people it has: other starts on the grid, other halls. */
final class OtherPlaces {
  private final Standing standing;
  private final Frame frame;
  private final Problem problem;
  private final Board board;
  private final int group;
  private final int minutes;

  OtherPlaces(Standing standing, int group) {
    this.standing = standing;
    this.group = group;
    frame = standing.frame;
    problem = standing.problem;
    board = standing.board;
    minutes = frame.end[group] - frame.start[group];
  }

  private record Place(int hall, int start) {}

  /** The nearest in time at which its hall and all of its own people are free. */
  List<Change.MoveGroup> nearest(int most) {
    List<Place> places = new ArrayList<>();
    for (int hall = 0; hall < problem.halls; hall++) {
      if (!problem.suits[frame.round[group]][hall]
          || problem.mostStations[frame.round[group]][hall] < frame.stations[group]) {
        continue;
      }
      for (int w = 0; w < problem.hallFreeFrom[hall].length; w++) {
        int last = problem.hallFreeTo[hall][w] - minutes;
        for (int start = problem.hallFreeFrom[hall][w]; start <= last; start++) {
          if (problem.hallClock[hall].minuteOfDay(start) % problem.grid() == 0
              && !(hall == frame.hall[group] && start == frame.start[group])
              && roundAllows(start)
              && hallIsFree(hall, start)) {
            places.add(new Place(hall, start));
          }
        }
      }
    }
    places.sort(
        Comparator.comparingInt((Place place) -> Math.abs(place.start - frame.start[group]))
            .thenComparingInt(Place::start)
            .thenComparingInt(Place::hall));
    return places.stream()
        .filter(place -> peopleAreFree(place.hall, place.start))
        .limit(most)
        .map(
            place ->
                new Change.MoveGroup(
                    standing.groupId(group),
                    problem.hallList.get(place.hall).id(),
                    LocalClock.instant(place.start)))
        .toList();
  }

  /** The round's window, and its order with the rounds before and after. */
  private boolean roundAllows(int start) {
    int round = frame.round[group];
    if (start < problem.notBefore[round] || start + minutes > problem.notAfter[round]) {
      return false;
    }
    int turnaround = problem.event.rules().turnaroundMinutes();
    for (int g = 0; g < frame.groups; g++) {
      boolean before = frame.round[g] == problem.roundBefore[round];
      boolean after = problem.roundBefore[frame.round[g]] == round;
      if ((before && frame.end[g] + turnaround > start)
          || (after && start + minutes + turnaround > frame.start[g])) {
        return false;
      }
    }
    return true;
  }

  private boolean hallIsFree(int hall, int start) {
    int setup = problem.event.rules().setupMinutes();
    for (int g = 0; g < frame.groups; g++) {
      if (g != group
          && frame.hall[g] == hall
          && start < frame.end[g] + setup
          && frame.start[g] < start + minutes + setup) {
        return false;
      }
    }
    return true;
  }

  private boolean peopleAreFree(int hall, int start) {
    for (int p = 0; p < problem.people; p++) {
      if (isIn(p) && !isFree(p, hall, start)) {
        return false;
      }
    }
    return true;
  }

  private boolean isIn(int p) {
    for (int i = 0; i < board.commitmentCount(p); i++) {
      if (board.commitment(p, i) >> 2 == group) {
        return true;
      }
    }
    return false;
  }

  private boolean isFree(int p, int hall, int start) {
    if (!problem.present(p, start, start + minutes) || problem.busy(p, start, start + minutes)) {
      return false;
    }
    for (int i = 0; i < board.commitmentCount(p); i++) {
      int g = board.commitment(p, i) >> 2;
      int way = problem.way[hall][frame.hall[g]];
      if (g != group && start < frame.end[g] + way && frame.start[g] < start + minutes + way) {
        return false;
      }
    }
    return true;
  }
}
