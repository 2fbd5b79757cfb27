package roundwright.scheduling.crewing;

import java.util.ArrayList;
import java.util.Comparator;
import java.util.HashMap;
import java.util.List;
import java.util.Map;
import roundwright.scheduling.core.Board;
import roundwright.scheduling.core.Frame;
import roundwright.scheduling.core.LocalClock;
import roundwright.scheduling.core.Problem;
import roundwright.scheduling.core.Slot;
import roundwright.scheduling.model.Event;
import roundwright.scheduling.model.Group;
import roundwright.scheduling.model.Plan;
import roundwright.scheduling.model.Role;
import roundwright.scheduling.rules.Ledger;
import roundwright.scheduling.rules.RuleBook;

/**
 * Any plan of records as it stands on a board, also one made by hand. Somebody who solves where
 * they have no seat (no entrant, or in a second group of the round) keeps that time as taken, but
 * counts in no group's size. Not thread-safe.
 */
public final class Standing {
  public final Event event;
  public final Plan plan;
  public final Problem problem;
  public final RuleBook book;
  public final Frame frame;
  public final Board board;
  public final Ledger ledger;

  /** The plan's groups in the frame's order. */
  public final List<Group> groups;

  /** Somebody who solves in a group without a seat of the board's. */
  public record Unseated(String person, String group) {}

  public final List<Unseated> unseated = new ArrayList<>();

  private final Map<String, Integer> groupIndex = new HashMap<>();
  private final Map<String, Integer> roundIndex = new HashMap<>();
  private final Map<String, Integer> hallIndex = new HashMap<>();
  private final Map<String, Integer> personIndex = new HashMap<>();

  /**
   * @throws IllegalArgumentException where the plan names a round, hall or person that the event
   *     does not have
   */
  public Standing(Event event, Plan plan) {
    this.event = event;
    this.plan = plan;
    problem = new Problem(event);
    book = new RuleBook(problem);
    problem.roundList.forEach(round -> roundIndex.put(round.id(), roundIndex.size()));
    problem.hallList.forEach(hall -> hallIndex.put(hall.id(), hallIndex.size()));
    problem.personList.forEach(person -> personIndex.put(person.id(), personIndex.size()));
    List<Placed> placed = new ArrayList<>();
    plan.groups().forEach(group -> placed.add(new Placed(slot(group), group)));
    placed.sort(Comparator.comparing(Placed::slot, Frame.IN_TIME));
    groups = placed.stream().map(Placed::group).toList();
    for (int g = 0; g < groups.size(); g++) {
      groupIndex.put(groups.get(g).id(), g);
    }
    frame = new Frame(problem, placed.stream().map(Placed::slot).toList(), listed());
    board = new Board(frame);
    for (int g = 0; g < groups.size(); g++) {
      seat(g);
      for (Role role : Role.values()) {
        for (String person : groups.get(g).crew().in(role)) {
          board.duty(place(g, Problem.role(role), person(person)), person(person));
        }
      }
    }
    ledger = new Ledger(board, book);
  }

  private record Placed(Slot slot, Group group) {}

  private Slot slot(Group group) {
    return new Slot(
        known(roundIndex.get(group.round()), "round", group.round()),
        group.number(),
        known(hallIndex.get(group.hall()), "hall", group.hall()),
        group.stations(),
        LocalClock.epochMinute(group.start()),
        LocalClock.epochMinute(group.end()));
  }

  private static int known(Integer index, String what, String id) {
    if (index == null) {
      throw new IllegalArgumentException("The event has no " + what + " " + id);
    }
    return index;
  }

  public int person(String id) {
    return known(personIndex.get(id), "person", id);
  }

  /** The frame's index of a group of the plan. */
  public int group(String id) {
    return known(groupIndex.get(id), "group", id);
  }

  /** Room for every listing and every wanted duty, and for every pin beside them. */
  private int[] listed() {
    int[] places = new int[groups.size() * 3];
    for (int g = 0; g < groups.size(); g++) {
      Group group = groups.get(g);
      for (Role role : Role.values()) {
        long pins =
            problem.pins().duties().stream()
                .filter(pin -> pin.round().equals(group.round()) && pin.role() == role)
                .filter(pin -> pin.number() == group.number())
                .count();
        int wanted =
            problem.wanted(
                problem.round(group.round()),
                Problem.role(role),
                group.stations(),
                Integer.MAX_VALUE);
        places[g * 3 + Problem.role(role)] =
            Math.max(wanted, group.crew().in(role).size()) + (int) pins;
      }
    }
    return places;
  }

  private void seat(int g) {
    for (String id : groups.get(g).competitors()) {
      int person = person(id);
      int seat = problem.seatOf(person, frame.round[g]);
      if (seat >= 0 && board.seatGroup[seat] < 0) {
        board.seat(seat, g);
      } else {
        board.add(person, g << 2 | Problem.SOLVING);
        unseated.add(new Unseated(id, groups.get(g).id()));
      }
    }
  }

  /** The place pinned to the person, else one that is pinned to nobody. */
  private int place(int g, int role, int person) {
    int free = -1;
    for (int at = frame.placeStart[g * 3 + role]; at < frame.placeStart[g * 3 + role + 1]; at++) {
      if (board.placePerson[at] < 0) {
        if (frame.placePin[at] == person) {
          return at;
        }
        free = free < 0 && frame.placePin[at] < 0 ? at : free;
      }
    }
    return free;
  }

  /** An empty place for a duty, whoever may be pinned to it; -1 where the board has none left. */
  public int emptyPlace(int g, int role) {
    for (int at = frame.placeStart[g * 3 + role]; at < frame.placeStart[g * 3 + role + 1]; at++) {
      if (board.placePerson[at] < 0 && frame.placePin[at] < 0) {
        return at;
      }
    }
    return -1;
  }

  public String personId(int person) {
    return problem.personList.get(person).id();
  }

  public String groupId(int group) {
    return groups.get(group).id();
  }
}
