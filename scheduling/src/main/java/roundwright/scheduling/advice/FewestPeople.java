package roundwright.scheduling.advice;

import java.util.ArrayList;
import java.util.List;
import java.util.Optional;
import java.util.TreeSet;
import roundwright.scheduling.core.Dice;
import roundwright.scheduling.crewing.Standing;
import roundwright.scheduling.model.Group;
import roundwright.scheduling.model.Plan;
import roundwright.scheduling.model.Role;

/**
 * The fewest people found who could cover all duties of a plan, everybody solving where they do.
 *
 * @param people ids of those who would be on duty, by id
 * @param atLeast no fewer could: a proved bound
 * @param uncovered duties for which nobody was found with everybody at hand
 * @param plan the plan with these crews, by the auditor without a breach of theirs
 * @param says one sentence
 */
public record FewestPeople(
    List<String> people, int atLeast, int uncovered, Plan plan, String says) {
  /** Moves that take some seconds for an event of a thousand duties. */
  public static final long ENOUGH_STEPS = 300_000;

  public FewestPeople {
    people = List.copyOf(people);
  }

  /**
   * Searches.
   *
   * @param steps moves tried at most; the same seed and steps give the same answer
   */
  public static FewestPeople of(Draft draft, long seed, long steps) {
    Standing standing = new Standing(draft.event(), draft.plan());
    Covering covering = new Covering(new Tasks(standing), new Dice(seed));
    covering.search(steps);
    Plan plan = plan(standing, covering);
    TreeSet<String> people = new TreeSet<>();
    for (Group group : plan.groups()) {
      for (Role role : Role.values()) {
        people.addAll(group.crew().in(role));
      }
    }
    int atLeast = Math.min(people.size(), covering.atLeast());
    String says =
        Wording.count(people.size(), "person")
            + " could cover "
            + (covering.uncovered() == 0 ? "all " : "all but " + covering.uncovered() + " of ")
            + Wording.count(covering.duties(), "duty").replace("dutys", "duties")
            + (people.size() == atLeast
                ? ", and no fewer could."
                : "; at least " + atLeast + " are needed.");
    return new FewestPeople(new ArrayList<>(people), atLeast, covering.uncovered(), plan, says);
  }

  private static Plan plan(Standing standing, Covering covering) {
    List<List<String>> crews = new ArrayList<>();
    for (int gk = 0; gk < standing.frame.groups * 3; gk++) {
      crews.add(new ArrayList<>());
    }
    covering.each((gk, person) -> crews.get(gk).add(standing.personId(person)));
    crews.forEach(crew -> crew.sort(null));
    List<Group> groups = new ArrayList<>();
    for (Group group : standing.plan.groups()) {
      int g = standing.group(group.id());
      groups.add(
          new Group(
              group.id(),
              group.round(),
              group.number(),
              group.hall(),
              group.stations(),
              group.start(),
              group.end(),
              group.competitors(),
              new Group.Crew(crews.get(g * 3), crews.get(g * 3 + 1), crews.get(g * 3 + 2))));
    }
    return new Plan(groups, Optional.empty(), List.of());
  }
}
