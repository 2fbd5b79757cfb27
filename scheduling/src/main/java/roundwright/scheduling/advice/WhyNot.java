package roundwright.scheduling.advice;

import java.time.Instant;
import java.util.ArrayList;
import java.util.Collections;
import java.util.EnumMap;
import java.util.List;
import java.util.Map;
import java.util.Optional;
import java.util.stream.Collectors;
import roundwright.scheduling.core.LocalClock;
import roundwright.scheduling.crewing.Standing;
import roundwright.scheduling.model.Role;

/**
 * Why a duty of a group is empty: everybody counted by what first keeps them from it, the duties of
 * that time that want more people than can have them, and single changes that would fill it.
 *
 * @param empty how many duties of the role the group wants and has nobody for
 * @param counts everybody in the event, by first obstacle
 * @param shortage what there is too little of; empty where the duty could be filled as things are
 * @param remedies what would fill it, each made and priced by the auditor: no new breach, one gap
 *     fewer or more
 * @param says one sentence; where there is a shortage it holds as long as all who solve and all
 *     duties at other times stay as they are
 */
public record WhyNot(
    String group,
    Role role,
    int empty,
    Map<Obstacle, Integer> counts,
    Optional<Shortage> shortage,
    List<Remedy> remedies,
    String says) {
  public WhyNot {
    Map<Obstacle, Integer> inOrder = new EnumMap<>(Obstacle.class);
    inOrder.putAll(counts);
    counts = Collections.unmodifiableMap(inOrder);
    remedies = List.copyOf(remedies);
  }

  /** Some duties of one role in one group. */
  public record Duties(String group, Role role, int wanted) {}

  /**
   * Duties of one time that together want more people than can have any of them.
   *
   * @param at a moment at which all of them run; the shortage holds whatever becomes of the duties
   *     of all groups that run then
   * @param wanted by all of the duties, those of people pinned to theirs apart
   * @param people ids of all who could have one of them, and most of whom do
   */
  public record Shortage(Instant at, List<Duties> duties, int wanted, List<String> people) {
    public Shortage {
      duties = List.copyOf(duties);
      people = List.copyOf(people);
    }
  }

  /** A change that fills the duty, and how much dearer or cheaper the plan is then. */
  public record Remedy(Change change, Difference difference, String says) {}

  /**
   * Looks into a role of a group.
   *
   * @throws IllegalArgumentException where the plan has no such group
   */
  public static WhyNot of(Draft draft, String group, Role role) {
    return new Asked(draft, group, role).answer();
  }

  /** Every group and role of a plan with an empty duty, in order of time. */
  public static List<Duties> empty(Draft draft) {
    return empty(new Standing(draft.event(), draft.plan()));
  }

  static List<Duties> empty(Standing standing) {
    List<Duties> found = new ArrayList<>();
    for (int g = 0; g < standing.frame.groups; g++) {
      for (int role = 0; role < 3; role++) {
        int missing = standing.board.wanted(g, role) - standing.board.filled[g * 3 + role];
        if (missing > 0) {
          found.add(new Duties(standing.groupId(g), Wording.role(role), missing));
        }
      }
    }
    return found;
  }

  private static final class Asked {
    private final Draft draft;
    private final Standing standing;
    private final Wording words;
    private final int group;
    private final int role;

    Asked(Draft draft, String group, Role role) {
      this.draft = draft;
      standing = new Standing(draft.event(), draft.plan());
      words = new Wording(draft.event());
      this.group = standing.group(group);
      this.role = roundwright.scheduling.core.Problem.role(role);
    }

    WhyNot answer() {
      Map<Obstacle, Integer> counts = new EnumMap<>(Obstacle.class);
      for (int p = 0; p < standing.problem.people; p++) {
        counts.merge(Obstacle.of(standing, p, group, role), 1, Integer::sum);
      }
      int empty =
          Math.max(0, standing.board.wanted(group, role) - standing.board.filled[group * 3 + role]);
      List<Remedy> remedies = new ArrayList<>();
      Optional<Shortage> shortage = Optional.empty();
      String says = words.group(standing.groups.get(group)) + " wants nobody more as " + word();
      if (empty > 0) {
        Remedies search = new Remedies(draft, standing, group, role);
        Optional<Moment.Outcome> failed = Optional.empty();
        Moment short_ = null;
        for (Moment moment : Moment.of(standing, group)) {
          Moment.Outcome outcome = moment.fill(moment.columnOf(group, role));
          if (!outcome.path().isEmpty()) {
            search.add(moment.change(outcome.path()));
          } else if (failed.isEmpty() || outcome.columns().size() < failed.get().columns().size()) {
            failed = Optional.of(outcome);
            short_ = moment;
          }
        }
        if (search.isEmpty() && short_ != null) {
          shortage = Optional.of(shortage(short_, failed.get()));
          says = says(short_, failed.get(), shortage.get());
          search.beyondDuties();
        } else {
          search.whoIsFree();
          says = words.group(standing.groups.get(group)) + " could have its " + word();
        }
        remedies = search.best();
      }
      return new WhyNot(
          standing.groupId(group),
          Wording.role(role),
          empty,
          counts,
          shortage,
          remedies,
          Wording.capital(says + "; of " + everybody(counts) + "."));
    }

    private String word() {
      return Wording.role(role).word();
    }

    private String everybody(Map<Obstacle, Integer> counts) {
      return Wording.count(standing.problem.people, "person")
          + ", "
          + counts.entrySet().stream()
              .map(entry -> entry.getKey().says(entry.getValue()))
              .collect(Collectors.joining(", "));
    }

    private Shortage shortage(Moment moment, Moment.Outcome outcome) {
      List<Duties> duties = new ArrayList<>();
      int wanted = 0;
      for (int c : outcome.columns()) {
        duties.add(
            new Duties(standing.groupId(moment.group(c)), Wording.role(c % 3), moment.wanted(c)));
        wanted += moment.wanted(c);
      }
      return new Shortage(
          LocalClock.instant(moment.minute),
          duties,
          wanted,
          outcome.people().stream().map(standing::personId).toList());
    }

    private String says(Moment moment, Moment.Outcome outcome, Shortage shortage) {
      Map<Obstacle, Integer> kept = new EnumMap<>(Obstacle.class);
      int skilled = 0;
      for (int p = 0; p < standing.problem.people; p++) {
        for (int c : outcome.columns()) {
          if (standing.problem.skilled(p, standing.frame.round[moment.group(c)], c % 3)) {
            skilled++;
            if (!outcome.people().contains(p)) {
              kept.merge(Obstacle.of(standing, p, moment.group(c), c % 3), 1, Integer::sum);
            }
            break;
          }
        }
      }
      String duties =
          shortage.duties.stream()
              .map(
                  one ->
                      Wording.count(one.wanted, one.role.word())
                          + " of "
                          + words.group(draft.group(one.group)))
              .collect(Collectors.joining(", "));
      return "the "
          + duties
          + (shortage.wanted == 1 ? " is 1 duty" : " are " + shortage.wanted + " duties")
          + " at "
          + words.timeIn(standing.groups.get(group).hall(), moment.minute)
          + ", and "
          + (shortage.people.isEmpty()
              ? "nobody"
              : "only " + Wording.count(shortage.people.size(), "free person"))
          + " can take "
          + (shortage.wanted == 1 ? "it" : "them")
          + ": "
          + skilled
          + (skilled == 1 ? " has" : " have")
          + " the skill"
          + kept.entrySet().stream()
              .map(entry -> ", " + entry.getKey().says(entry.getValue()))
              .collect(Collectors.joining())
          + "; that holds while those who solve and the duties of other times stay";
    }
  }
}
