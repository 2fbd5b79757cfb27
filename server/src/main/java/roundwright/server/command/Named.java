package roundwright.server.command;

import java.time.Instant;
import java.util.Arrays;
import java.util.List;
import java.util.stream.Collectors;
import roundwright.scheduling.file.EventFile;
import roundwright.scheduling.file.FileProblems;
import roundwright.scheduling.model.Event;
import roundwright.scheduling.model.Group;
import roundwright.scheduling.model.Hall;
import roundwright.scheduling.model.Person;
import roundwright.scheduling.model.Plan;
import roundwright.scheduling.model.Role;

/** Finds what somebody named on the command line. */
final class Named {
  private Named() {}

  /** A person by id, or by a name that only one of them has. */
  static String person(String option, String text, Event event) throws Refusal {
    List<String> found =
        event.people().stream().filter(person -> person.id().equals(text)).map(Person::id).toList();
    if (found.isEmpty()) {
      found =
          event.people().stream()
              .filter(person -> person.name().equals(text))
              .map(Person::id)
              .toList();
    }
    if (found.size() > 1) {
      throw new Refusal(
          option
              + " is \""
              + text
              + "\", the name of several people; give an id: "
              + String.join(", ", found));
    }
    return found.stream()
        .findFirst()
        .orElseThrow(
            () ->
                new Refusal(
                    option + " is \"" + text + "\"; give the id or name of somebody in the event"));
  }

  /** A group by id, or as round and number such as {@code cube3-a/2}. */
  static String group(String option, String text, Plan plan) throws Refusal {
    return plan.groups().stream()
        .filter(
            group -> group.id().equals(text) || (group.round() + "/" + group.number()).equals(text))
        .map(Group::id)
        .findFirst()
        .orElseThrow(
            () ->
                new Refusal(
                    option
                        + " is \""
                        + text
                        + "\"; give the id of a group of the plan, or its round and number such as "
                        + plan.groups().stream()
                            .findFirst()
                            .map(group -> group.round() + "/" + group.number())
                            .orElse("cube3-a/2")));
  }

  static String hall(String option, String text, Event event) throws Refusal {
    List<String> halls =
        event.venues().stream().flatMap(venue -> venue.halls().stream()).map(Hall::id).toList();
    if (!halls.contains(text)) {
      throw new Refusal(
          option + " is \"" + text + "\"; give the id of a hall: " + String.join(", ", halls));
    }
    return text;
  }

  static Role role(String option, String text) throws Refusal {
    return Arrays.stream(Role.values())
        .filter(role -> role.word().equals(text))
        .findFirst()
        .orElseThrow(
            () ->
                new Refusal(
                    option
                        + " is \""
                        + text
                        + "\"; give one of "
                        + Arrays.stream(Role.values())
                            .map(Role::word)
                            .collect(Collectors.joining(", "))));
  }

  static Instant moment(String option, String text, Event event) throws Refusal {
    try {
      return EventFile.moment(option, text, event);
    } catch (FileProblems problems) {
      throw new Refusal(problems.getMessage());
    }
  }
}
