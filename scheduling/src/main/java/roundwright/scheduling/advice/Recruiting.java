package roundwright.scheduling.advice;

import java.time.Instant;
import java.util.ArrayList;
import java.util.Arrays;
import java.util.Comparator;
import java.util.LinkedHashMap;
import java.util.List;
import java.util.Map;
import java.util.Optional;
import java.util.TreeSet;
import roundwright.scheduling.core.LocalClock;
import roundwright.scheduling.crewing.Standing;
import roundwright.scheduling.model.Person;
import roundwright.scheduling.model.Plan;
import roundwright.scheduling.model.Role;
import roundwright.scheduling.model.Window;

/**
 * Whom to recruit for a plan with empty duties: for each skill and day, how many of them one person
 * more would fill, moving other duties of the time where that helps. Each is tried on the board, so
 * that the number is what came out, not an estimate; other ways of crewing may do better.
 *
 * @param gaps duties that are empty and cannot be filled with the people there are, by moving the
 *     duties of one time at a time
 * @param recruits the most useful first: most gaps filled, then the shortest hours
 */
public record Recruiting(int gaps, List<Recruit> recruits) {
  private static final String NEW_PERSON = "somebody-new";

  public Recruiting {
    recruits = List.copyOf(recruits);
  }

  /**
   * One person more.
   *
   * @param person with the skills and hours it takes, ready to be put into an event
   * @param fills gaps fewer
   * @param plan the plan with them in it, for the event with them in it
   * @param says one sentence
   */
  public record Recruit(Person person, int fills, Plan plan, String says) {}

  /** Every skill that an empty duty asks for, alone and all together, on every day with one. */
  public static Recruiting of(Draft draft) {
    Filled without = Filled.of(draft);
    List<WhyNot.Duties> empty = WhyNot.empty(without.draft);
    Wording words = new Wording(draft.event());
    List<Recruit> recruits = new ArrayList<>();
    String id = freeId(draft);
    TreeSet<Integer> dates = new TreeSet<>();
    Standing standing = new Standing(without.draft.event(), without.draft.plan());
    empty.forEach(duties -> dates.add(standing.frame.date[standing.group(duties.group())]));
    for (int date : dates) {
      for (Map.Entry<String, Person.CrewSkills> skill : skills(empty, draft, words).entrySet()) {
        recruit(without.draft, standing, date, id, skill.getKey(), skill.getValue())
            .ifPresent(recruits::add);
      }
    }
    recruits.sort(
        Comparator.comparingInt((Recruit one) -> -one.fills)
            .thenComparing(one -> minutes(one.person))
            .thenComparing(Recruit::says));
    return new Recruiting(empty.stream().mapToInt(WhyNot.Duties::wanted).sum(), recruits);
  }

  private static long minutes(Person person) {
    return person.available().orElseThrow().stream()
        .mapToLong(window -> java.time.Duration.between(window.from(), window.to()).toMinutes())
        .sum();
  }

  private static String freeId(Draft draft) {
    String id = NEW_PERSON;
    while (has(draft, id)) {
      id += "-x";
    }
    return id;
  }

  private static boolean has(Draft draft, String id) {
    return draft.event().people().stream().anyMatch(person -> person.id().equals(id));
  }

  /** By what somebody with them can do. */
  private static Map<String, Person.CrewSkills> skills(
      List<WhyNot.Duties> empty, Draft draft, Wording words) {
    Map<String, Person.CrewSkills> skills = new LinkedHashMap<>();
    TreeSet<String> scrambles = new TreeSet<>();
    boolean judges = false;
    boolean runs = false;
    for (WhyNot.Duties duties : empty) {
      switch (duties.role()) {
        case JUDGE -> judges = true;
        case RUNNER -> runs = true;
        case SCRAMBLER -> scrambles.add(discipline(draft, duties.group()));
      }
    }
    if (judges) {
      skills.put("judge", new Person.CrewSkills(true, false, List.of()));
    }
    if (runs) {
      skills.put("run", new Person.CrewSkills(false, true, List.of()));
    }
    for (String discipline : scrambles) {
      skills.put(
          "scramble " + words.discipline(discipline),
          new Person.CrewSkills(false, false, List.of(discipline)));
    }
    if (skills.size() > 1) {
      List<String> all = new ArrayList<>(skills.keySet());
      skills.put(
          Wording.listed(all, 0), new Person.CrewSkills(judges, runs, List.copyOf(scrambles)));
    }
    return skills;
  }

  private static String discipline(Draft draft, String group) {
    String round = draft.group(group).round();
    return draft.event().rounds().stream()
        .filter(one -> one.id().equals(round))
        .findFirst()
        .orElseThrow()
        .discipline();
  }

  private static Optional<Recruit> recruit(
      Draft draft, Standing before, int date, String id, String can, Person.CrewSkills skills) {
    int[] onDate =
        java.util.stream.IntStream.range(0, before.frame.groups)
            .filter(g -> before.frame.date[g] == date)
            .toArray();
    int from = Arrays.stream(onDate).map(g -> before.frame.start[g]).min().orElseThrow();
    int to = Arrays.stream(onDate).map(g -> before.frame.end[g]).max().orElseThrow();
    Person person = person(id, skills, LocalClock.instant(from), LocalClock.instant(to));
    Filled filled = Filled.of(draft.withOneMore(person));
    Optional<Window> hours = hours(filled.draft.plan(), id);
    if (filled.filled == 0 || hours.isEmpty()) {
      return Optional.empty();
    }
    Person needed = person(id, skills, hours.get().from(), hours.get().to());
    String says =
        "One person more who can "
            + can
            + ", "
            + Wording.span(hours.get().from(), hours.get().to(), draft.event().zone())
            + ", would fill "
            + filled.filled
            + " of the empty duties.";
    return Optional.of(new Recruit(needed, filled.filled, filled.draft.plan(), says));
  }

  private static Person person(String id, Person.CrewSkills skills, Instant from, Instant to) {
    return new Person(
        id,
        "Somebody new",
        List.of(),
        skills,
        Optional.of(List.of(new Window(from, to))),
        List.of(),
        Optional.empty(),
        false,
        Person.MAX_DUTY_MINUTES_PER_DAY,
        Optional.empty());
  }

  private static Optional<Window> hours(Plan plan, String id) {
    Optional<Window> hours = Optional.empty();
    for (var group : plan.groups()) {
      for (Role role : Role.values()) {
        if (group.crew().in(role).contains(id)) {
          Instant from = hours.map(Window::from).orElse(group.start());
          Instant to = hours.map(Window::to).orElse(group.end());
          hours =
              Optional.of(
                  new Window(
                      from.isBefore(group.start()) ? from : group.start(),
                      to.isAfter(group.end()) ? to : group.end()));
        }
      }
    }
    return hours;
  }

  /** A plan with every empty duty filled for which a way is found, in order of time. */
  private record Filled(Draft draft, int filled) {
    static Filled of(Draft draft) {
      Standing standing = new Standing(draft.event(), draft.plan());
      List<Change> changes = new ArrayList<>();
      for (WhyNot.Duties duties : WhyNot.empty(standing)) {
        for (int i = 0; i < duties.wanted(); i++) {
          Optional<Change> change = change(standing, duties);
          if (change.isEmpty()) {
            break;
          }
          changes.add(change.get());
        }
      }
      return new Filled(new Change.Together(changes).madeTo(draft), changes.size());
    }

    /** Fills one duty on the board and says how. */
    private static Optional<Change> change(Standing standing, WhyNot.Duties duties) {
      int group = standing.group(duties.group());
      int role = roundwright.scheduling.core.Problem.role(duties.role());
      for (Moment moment : Moment.of(standing, group)) {
        Moment.Outcome outcome = moment.fill(moment.columnOf(group, role));
        if (!outcome.path().isEmpty()) {
          moment.make(outcome.path());
          return Optional.of(moment.change(outcome.path()));
        }
      }
      return Optional.empty();
    }
  }
}
