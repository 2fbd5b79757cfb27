package roundwright.scheduling.repair;

import java.util.Comparator;
import java.util.List;
import java.util.Map;
import java.util.stream.Collectors;
import java.util.stream.IntStream;
import roundwright.scheduling.core.Board;
import roundwright.scheduling.core.Frame;
import roundwright.scheduling.core.Problem;
import roundwright.scheduling.model.Group;
import roundwright.scheduling.model.Role;

/**
 * Puts people where they were told they would be, as far as they still can be, and entrants without
 * a group into one. What has begun, or is not to change, stays as it was but for people who have
 * left the event.
 */
final class Carrying {
  private static final int COLLIDES = 1_000_000;
  private static final int FULL = 1_000;

  private final Problem problem;
  private final List<Standee> standees;
  private final Map<String, Integer> people;
  private final Frame frame;
  private final Board board;

  Carrying(Problem problem, List<Standee> laid) {
    this.problem = problem;
    people =
        IntStream.range(0, problem.people)
            .boxed()
            .collect(Collectors.toMap(p -> problem.personList.get(p).id(), p -> p));
    standees = laid.stream().sorted(Comparator.comparing(Standee::slot, Frame.IN_TIME)).toList();
    int[] listed = new int[standees.size() * 3];
    for (int g = 0; g < standees.size(); g++) {
      for (Role role : Role.values()) {
        int kind = Problem.role(role);
        listed[g * 3 + kind] =
            standees.get(g).kept().map(group -> group.crew().in(role).size()).orElse(0);
      }
    }
    frame = new Frame(problem, standees.stream().map(Standee::slot).toList(), listed);
    board = new Board(frame);
  }

  /** Frozen groups are frozen in its frame. */
  Board board(Scope.Depth depth) {
    seatKept(true);
    dutiesKept(true);
    seatKept(false);
    seatOthers();
    dutiesKept(false);
    pinnedDuties();
    freeze(depth);
    return board;
  }

  private void seatKept(boolean frozen) {
    for (int g = 0; g < frame.groups; g++) {
      if (standees.get(g).frozen() == frozen && standees.get(g).kept().isPresent()) {
        for (String id : standees.get(g).kept().get().competitors()) {
          Integer person = people.get(id);
          int seat = person == null ? -1 : problem.seatOf(person, frame.round[g]);
          boolean mayBe = seat >= 0 && board.seatGroup[seat] < 0;
          if (mayBe && (frame.seatPin[seat] < 0 || frame.seatPin[seat] == g || frozen)) {
            board.seat(seat, g);
          }
        }
      }
    }
  }

  /** The group where most fits: no other group of theirs at the time, room, near the seeding. */
  private void seatOthers() {
    for (int seat = 0; seat < problem.seats; seat++) {
      int best = -1;
      int least = Integer.MAX_VALUE;
      for (int g : frame.groupsOf[problem.seatRound[seat]]) {
        int price = standees.get(g).frozen() ? Integer.MAX_VALUE : priceOfSeat(seat, g);
        if (board.seatGroup[seat] < 0 && price < least) {
          least = price;
          best = g;
        }
      }
      if (best >= 0) {
        board.seat(seat, best);
      }
    }
  }

  private int priceOfSeat(int seat, int g) {
    int person = problem.seatPerson[seat];
    boolean there = problem.roundLikely[frame.round[g]] || frame.isFree(person, g);
    return (frame.seatPin[seat] >= 0 && frame.seatPin[seat] != g ? 2 * COLLIDES : 0)
        + (there && board.couldTake(person, g) ? 0 : COLLIDES)
        + (board.size[g] < frame.mostPeople[g] ? 0 : FULL)
        + Math.abs(frame.place[g] - frame.wantedPlace[seat]);
  }

  private void dutiesKept(boolean frozen) {
    for (int g = 0; g < frame.groups; g++) {
      if (standees.get(g).frozen() != frozen || standees.get(g).kept().isEmpty()) {
        continue;
      }
      Group group = standees.get(g).kept().get();
      for (Role role : Role.values()) {
        for (String id : group.crew().in(role)) {
          Integer person = people.get(id);
          if (person != null && (frozen || can(person, g, Problem.role(role)))) {
            give(g, Problem.role(role), person);
          }
        }
      }
    }
  }

  private boolean can(int person, int g, int role) {
    return problem.skilled(person, frame.round[g], role)
        && frame.isFree(person, g)
        && board.couldTake(person, g)
        && board.filled[g * 3 + role] < board.wanted(g, role);
  }

  private void give(int g, int role, int person) {
    int free = -1;
    for (int at = frame.placeStart[g * 3 + role]; at < frame.placeStart[g * 3 + role + 1]; at++) {
      boolean own = frame.placePin[at] == person;
      if (board.placePerson[at] < 0 && (own || (free < 0 && frame.placePin[at] < 0))) {
        free = at;
        if (own) {
          break;
        }
      }
    }
    if (free >= 0) {
      board.duty(free, person);
    }
  }

  private void pinnedDuties() {
    for (int at = 0; at < frame.places; at++) {
      int pinned = frame.placePin[at];
      if (pinned >= 0 && board.placePerson[at] < 0 && !isFrozen(at)) {
        board.duty(at, pinned);
      }
    }
  }

  private boolean isFrozen(int place) {
    return standees.get(frame.placeGroup[place]).frozen();
  }

  private void freeze(Scope.Depth depth) {
    for (int g = 0; g < frame.groups; g++) {
      if (standees.get(g).frozen()) {
        frame.freeze(g, board);
      }
    }
    if (depth == Scope.Depth.EVERYTHING) {
      return;
    }
    for (int seat = 0; seat < problem.seats; seat++) {
      frame.seatPin[seat] = board.seatGroup[seat];
    }
    for (int at = 0; at < frame.places && depth == Scope.Depth.BROKEN; at++) {
      frame.placePin[at] = board.placePerson[at];
    }
  }
}
