package roundwright.scheduling;

import java.time.Instant;
import java.util.ArrayList;
import java.util.Comparator;
import java.util.HashMap;
import java.util.HashSet;
import java.util.List;
import java.util.Map;
import java.util.Optional;
import java.util.Set;
import roundwright.scheduling.audit.Verdict;
import roundwright.scheduling.core.Frame;
import roundwright.scheduling.core.LocalClock;
import roundwright.scheduling.core.Problem;
import roundwright.scheduling.cost.Finding;
import roundwright.scheduling.crewing.Arrangement;
import roundwright.scheduling.forecast.Overruns;
import roundwright.scheduling.model.Event;
import roundwright.scheduling.model.Group;
import roundwright.scheduling.model.Plan;

/** An arrangement as the plan that files and people know. */
final class Written {
  private static final int ID_LETTERS = 5;
  private static final String LETTERS = "0123456789abcdefghjkmnpqrstvwxyz";

  private Written() {}

  static Plan plan(Arrangement arrangement) {
    return plan(arrangement, new Plan(List.of(), Optional.empty(), List.of()), Optional.empty());
  }

  /**
   * The same where some of the groups have been in a plan before, whose ids they keep. Who solves
   * in a group that begins before {@code at} stays in it, also once they are no entrant.
   */
  static Plan plan(Arrangement arrangement, Plan kept, Optional<Instant> at) {
    Frame frame = arrangement.frame;
    Problem problem = frame.problem;
    List<List<String>> competitors = lists(frame.groups);
    for (int seat = 0; seat < problem.seats; seat++) {
      int group = arrangement.groupOf(seat);
      if (group >= 0) {
        competitors.get(group).add(problem.personList.get(problem.seatPerson[seat]).id());
      }
    }
    List<List<String>> crews = lists(frame.groups * 3);
    for (int place = 0; place < frame.places; place++) {
      int person = arrangement.personAt(place);
      if (person >= 0) {
        crews
            .get(frame.placeGroup[place] * 3 + frame.placeRole[place])
            .add(problem.personList.get(person).id());
      }
    }
    if (at.isPresent()) {
      keepBegun(frame, kept, at.get(), competitors);
    }
    crews.forEach(crew -> crew.sort(Comparator.naturalOrder()));
    List<Group> groups = new ArrayList<>();
    Map<String, String> known = new HashMap<>();
    kept.groups().forEach(group -> known.put(group.round() + "/" + group.number(), group.id()));
    Set<String> used = new HashSet<>();
    kept.groups().forEach(group -> used.add(group.id()));
    for (int g = 0; g < frame.groups; g++) {
      String round = problem.roundList.get(frame.round[g]).id();
      if (competitors.get(g).isEmpty()) {
        continue;
      }
      groups.add(
          new Group(
              idOf(round, frame.number[g], known, used),
              round,
              frame.number[g],
              problem.hallList.get(frame.hall[g]).id(),
              frame.stations[g],
              LocalClock.instant(frame.start[g]),
              LocalClock.instant(frame.end[g]),
              competitors.get(g),
              new Group.Crew(crews.get(g * 3), crews.get(g * 3 + 1), crews.get(g * 3 + 2))));
    }
    return new Plan(groups, Optional.empty(), List.of());
  }

  private static void keepBegun(
      Frame frame, Plan kept, Instant at, List<List<String>> competitors) {
    Set<String> people = new HashSet<>();
    frame.problem.personList.forEach(person -> people.add(person.id()));
    for (Group group : kept.groups()) {
      for (int g = 0; g < frame.groups && group.start().isBefore(at); g++) {
        String round = frame.problem.roundList.get(frame.round[g]).id();
        if (frame.frozen[g] && frame.number[g] == group.number() && round.equals(group.round())) {
          List<String> now = competitors.get(g);
          group.competitors().stream()
              .filter(id -> people.contains(id) && !now.contains(id))
              .forEach(now::add);
        }
      }
    }
  }

  /** The plan with its price and all that is to be said of it, likely overruns last. */
  static Plan signed(Event event, Plan plan, Verdict verdict) {
    List<Finding> findings = new ArrayList<>(verdict.findings());
    findings.addAll(Overruns.of(event, plan));
    return new Plan(plan.groups(), Optional.of(verdict.cost()), findings);
  }

  private static List<List<String>> lists(int count) {
    List<List<String>> lists = new ArrayList<>();
    for (int i = 0; i < count; i++) {
      lists.add(new ArrayList<>());
    }
    return lists;
  }

  private static String idOf(
      String round, int number, Map<String, String> known, Set<String> used) {
    String kept = known.get(round + "/" + number);
    return kept != null ? kept : id(round, number, used);
  }

  /** An id that says nothing and is the same whenever the same group is planned first. */
  private static String id(String round, int number, Set<String> used) {
    long hash = 1125899906842597L;
    for (char c : (round + "/" + number).toCharArray()) {
      hash = 31 * hash + c;
    }
    String id;
    do {
      long rest = hash * 0x9E3779B97F4A7C15L;
      StringBuilder letters = new StringBuilder("g-");
      for (int i = 0; i < ID_LETTERS; i++) {
        letters.append(LETTERS.charAt((int) (rest >>> (59 - 5 * i)) & 31));
      }
      id = letters.toString();
      hash++;
    } while (!used.add(id));
    return id;
  }
}
