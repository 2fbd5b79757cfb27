package roundwright.scheduling.advice;

import java.time.Duration;
import java.time.Instant;
import java.util.ArrayList;
import java.util.List;
import java.util.Optional;
import java.util.stream.Collectors;
import roundwright.scheduling.model.Group;
import roundwright.scheduling.model.Person;
import roundwright.scheduling.model.Role;
import roundwright.scheduling.model.Window;

/**
 * Something an organiser may change by hand in a plan, or in what an event knows of a person.
 * Groups and people are named by id. Making one whose group or person is not there, or who is not
 * where the change takes them from, throws an {@link IllegalArgumentException}.
 */
public sealed interface Change {
  Draft madeTo(Draft draft);

  /** What to do, as an order without a full stop: {@code put Ada on duty as judge of ...}. */
  String says(Draft draft);

  /** Somebody takes a duty. */
  record PutOnDuty(String person, String group, Role role) implements Change {
    @Override
    public Draft madeTo(Draft draft) {
      draft.person(person);
      return draft.withCrew(group, role, list -> with(list, person));
    }

    @Override
    public String says(Draft draft) {
      return "put " + name(draft, person) + " on duty as " + duty(draft, role, group);
    }
  }

  /** Somebody leaves a duty, which stays empty. */
  record TakeOffDuty(String person, String group, Role role) implements Change {
    @Override
    public Draft madeTo(Draft draft) {
      return draft.withCrew(group, role, list -> without(list, person));
    }

    @Override
    public String says(Draft draft) {
      return "take " + name(draft, person) + " off duty as " + duty(draft, role, group);
    }
  }

  /** Somebody takes a duty from somebody else. */
  record HandOver(String from, String to, String group, Role role) implements Change {
    @Override
    public Draft madeTo(Draft draft) {
      return new PutOnDuty(to, group, role)
          .madeTo(new TakeOffDuty(from, group, role).madeTo(draft));
    }

    @Override
    public String says(Draft draft) {
      return "give the duty of "
          + name(draft, from)
          + " as "
          + duty(draft, role, group)
          + " to "
          + name(draft, to);
    }
  }

  /** Somebody leaves one duty for another. */
  record MoveDuty(String person, String fromGroup, Role fromRole, String toGroup, Role toRole)
      implements Change {
    @Override
    public Draft madeTo(Draft draft) {
      return new PutOnDuty(person, toGroup, toRole)
          .madeTo(new TakeOffDuty(person, fromGroup, fromRole).madeTo(draft));
    }

    @Override
    public String says(Draft draft) {
      return "move "
          + name(draft, person)
          + " from "
          + duty(draft, fromRole, fromGroup)
          + " to "
          + duty(draft, toRole, toGroup);
    }
  }

  /** Two people change their duties. */
  record SwapDuties(
      String one, String oneGroup, Role oneRole, String other, String otherGroup, Role otherRole)
      implements Change {
    @Override
    public Draft madeTo(Draft draft) {
      return new HandOver(other, one, otherGroup, otherRole)
          .madeTo(new HandOver(one, other, oneGroup, oneRole).madeTo(draft));
    }

    @Override
    public String says(Draft draft) {
      return "let "
          + name(draft, one)
          + ", "
          + duty(draft, oneRole, oneGroup)
          + ", and "
          + name(draft, other)
          + ", "
          + duty(draft, otherRole, otherGroup)
          + ", change places";
    }
  }

  /** A competitor goes to another group of the round. */
  record MoveCompetitor(String person, String fromGroup, String toGroup) implements Change {
    @Override
    public Draft madeTo(Draft draft) {
      return draft
          .withCompetitors(fromGroup, list -> without(list, person))
          .withCompetitors(toGroup, list -> with(list, person));
    }

    @Override
    public String says(Draft draft) {
      return "let "
          + name(draft, person)
          + " solve in "
          + group(draft, toGroup)
          + " instead of group "
          + draft.group(fromGroup).number();
    }
  }

  /** Two competitors of a round change groups. */
  record SwapCompetitors(String one, String oneGroup, String other, String otherGroup)
      implements Change {
    @Override
    public Draft madeTo(Draft draft) {
      return new MoveCompetitor(other, otherGroup, oneGroup)
          .madeTo(new MoveCompetitor(one, oneGroup, otherGroup).madeTo(draft));
    }

    @Override
    public String says(Draft draft) {
      return "let "
          + name(draft, one)
          + ", who solves in group "
          + draft.group(oneGroup).number()
          + ", and "
          + name(draft, other)
          + ", who solves in "
          + group(draft, otherGroup)
          + ", change places";
    }
  }

  /** A group goes to another hall, another start, or both, and keeps its length. */
  record MoveGroup(String group, String hall, Instant start) implements Change {
    @Override
    public Draft madeTo(Draft draft) {
      Group moved = draft.group(group);
      if (draft.event().venues().stream()
          .flatMap(venue -> venue.halls().stream())
          .noneMatch(one -> one.id().equals(hall))) {
        throw new IllegalArgumentException("The event has no hall " + hall);
      }
      Instant end = start.plus(Duration.between(moved.start(), moved.end()));
      return draft.with(
          new Group(
              moved.id(),
              moved.round(),
              moved.number(),
              hall,
              moved.stations(),
              start,
              end,
              moved.competitors(),
              moved.crew()));
    }

    @Override
    public String says(Draft draft) {
      Wording words = new Wording(draft.event());
      Group moved = draft.group(group);
      boolean elsewhere = !moved.hall().equals(hall);
      boolean later = !moved.start().equals(start);
      return "move "
          + words.group(moved)
          + (elsewhere ? " to " + words.hall(hall) : "")
          + (later || !elsewhere
              ? (elsewhere ? " at " : " to ") + words.timeIn(hall, minute(start))
              : "");
    }
  }

  /** Somebody leaves the event. */
  record TakeOut(String person) implements Change {
    @Override
    public Draft madeTo(Draft draft) {
      draft.person(person);
      return draft.without(person);
    }

    @Override
    public String says(Draft draft) {
      return "take " + name(draft, person) + " out of the event";
    }
  }

  /** Somebody learns a duty; a scrambler one discipline. */
  record Teach(String person, Role role, String discipline) implements Change {
    @Override
    public Draft madeTo(Draft draft) {
      Person known = draft.person(person);
      List<String> scrambles = new ArrayList<>(known.crew().scrambles());
      if (role == Role.SCRAMBLER && !scrambles.contains(discipline)) {
        scrambles.add(discipline);
      }
      Person.CrewSkills crew =
          new Person.CrewSkills(
              known.crew().judges() || role == Role.JUDGE,
              known.crew().runs() || role == Role.RUNNER,
              scrambles);
      return draft.with(changed(known, crew, known.available(), known.maxDutyMinutesPerDay()));
    }

    @Override
    public String says(Draft draft) {
      return "teach "
          + name(draft, person)
          + " to "
          + switch (role) {
            case JUDGE -> "judge";
            case RUNNER -> "run";
            case SCRAMBLER -> "scramble " + new Wording(draft.event()).discipline(discipline);
          };
    }
  }

  /** Somebody is there for a stretch of time more. */
  record WidenPresence(String person, Instant from, Instant to) implements Change {
    @Override
    public Draft madeTo(Draft draft) {
      Person known = draft.person(person);
      List<Window> windows = new ArrayList<>(known.available().orElse(List.of()));
      windows.add(new Window(from, to));
      Optional<List<Window>> there =
          known.available().isEmpty() ? Optional.empty() : Optional.of(windows);
      return draft.with(changed(known, known.crew(), there, known.maxDutyMinutesPerDay()));
    }

    @Override
    public String says(Draft draft) {
      return "ask "
          + name(draft, person)
          + " to be there "
          + Wording.span(from, to, draft.event().zone())
          + " too";
    }
  }

  /** Somebody agrees to more duty a day. */
  record RaiseDutyMinutes(String person, int minutes) implements Change {
    @Override
    public Draft madeTo(Draft draft) {
      Person known = draft.person(person);
      return draft.with(changed(known, known.crew(), known.available(), minutes));
    }

    @Override
    public String says(Draft draft) {
      return "ask "
          + name(draft, person)
          + " for up to "
          + Wording.count(minutes, "minute")
          + " of duty a day";
    }
  }

  /** Several changes that belong together, made in this order. */
  record Together(List<Change> changes) implements Change {
    public Together {
      changes = List.copyOf(changes);
    }

    @Override
    public Draft madeTo(Draft draft) {
      Draft made = draft;
      for (Change change : changes) {
        made = change.madeTo(made);
      }
      return made;
    }

    @Override
    public String says(Draft draft) {
      return changes.stream().map(change -> change.says(draft)).collect(Collectors.joining(", "));
    }
  }

  private static int minute(Instant instant) {
    return Math.toIntExact(Math.floorDiv(instant.getEpochSecond(), 60L));
  }

  private static String name(Draft draft, String person) {
    return new Wording(draft.event()).name(person);
  }

  private static String group(Draft draft, String group) {
    return new Wording(draft.event()).group(draft.group(group));
  }

  private static String duty(Draft draft, Role role, String group) {
    return role.word() + " of " + group(draft, group);
  }

  private static List<String> with(List<String> list, String person) {
    list.add(person);
    return list;
  }

  /** Takes out one listing of a person. */
  private static List<String> without(List<String> list, String person) {
    if (!list.remove(person)) {
      throw new IllegalArgumentException(person + " is not listed there");
    }
    return list;
  }

  private static Person changed(
      Person known,
      Person.CrewSkills crew,
      Optional<List<Window>> available,
      int maxDutyMinutesPerDay) {
    return new Person(
        known.id(),
        known.name(),
        known.entries(),
        crew,
        available,
        known.busy(),
        known.household(),
        known.newcomer(),
        maxDutyMinutesPerDay,
        known.share());
  }
}
