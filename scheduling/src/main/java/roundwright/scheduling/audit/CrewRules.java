package roundwright.scheduling.audit;

import java.util.HashSet;
import java.util.List;
import java.util.Optional;
import java.util.Set;
import roundwright.scheduling.model.Group;
import roundwright.scheduling.model.Person;
import roundwright.scheduling.model.Role;
import roundwright.scheduling.model.Round;

/** Rules that look at one group's listings. */
final class CrewRules {
  private CrewRules() {}

  /** 1 for each listing in a crew without its skill, or after the person's first in the group. */
  static void unqualified(Case given, Notes notes) {
    for (Group group : given.plan().groups()) {
      Round round = given.event().round(group.round());
      Set<String> listed = new HashSet<>();
      Book.eachListing(
          group,
          (person, role) -> {
            boolean again = !listed.add(person);
            boolean unskilled = !isSkilled(given.event().person(person), role, round);
            notes.add(
                again || unskilled ? 1 : 0,
                group,
                List.of(person),
                () ->
                    given.words().name(person)
                        + " "
                        + Wording.doing(role)
                        + " in "
                        + given.words().groupAndTime(group)
                        + (unskilled
                            ? " and has not said they can."
                            : " and is listed there already."));
          });
    }
  }

  private static boolean isSkilled(Person person, Optional<Role> role, Round round) {
    return role.map(
            duty ->
                switch (duty) {
                  case JUDGE -> person.crew().judges();
                  case RUNNER -> person.crew().runs();
                  case SCRAMBLER -> person.crew().scrambles().contains(round.discipline());
                })
        .orElse(true);
  }

  /** Wanted duties that nobody fills. */
  static void unfilled(Case given, Notes notes) {
    for (Group group : given.plan().groups()) {
      WantedCrew wanted = WantedCrew.of(given.event(), group);
      for (Role role : Role.values()) {
        int there = group.crew().in(role).size();
        int missing = wanted.in(role) - there;
        notes.add(
            missing,
            group,
            List.of(),
            () ->
                given.words().groupAndTime(group)
                    + " has "
                    + there
                    + " of the "
                    + Wording.count(wanted.in(role), role.word())
                    + " it wants.");
      }
    }
  }

  /** Crew members beyond the wanted number. */
  static void spareCrew(Case given, Notes notes) {
    for (Group group : given.plan().groups()) {
      WantedCrew wanted = WantedCrew.of(given.event(), group);
      for (Role role : Role.values()) {
        int there = group.crew().in(role).size();
        notes.add(
            there - wanted.in(role),
            group,
            List.of(),
            () ->
                given.words().groupAndTime(group)
                    + " has "
                    + Wording.count(there, role.word())
                    + " and wants "
                    + wanted.in(role)
                    + ".");
      }
    }
  }

  /** 1 per judge of a group and competitor in it of the same household. */
  static void kin(Case given, Notes notes) {
    for (Group group : given.plan().groups()) {
      for (String judge : group.crew().judges()) {
        Optional<String> household = given.event().person(judge).household();
        if (household.isEmpty()) {
          continue;
        }
        for (String competitor : group.competitors()) {
          boolean kin =
              !competitor.equals(judge)
                  && given.event().person(competitor).household().equals(household);
          notes.add(
              kin ? 1 : 0,
              group,
              List.of(judge, competitor),
              () ->
                  given.words().name(judge)
                      + " judges in "
                      + given.words().groupAndTime(group)
                      + ", where "
                      + given.words().name(competitor)
                      + " of the same household solves.");
        }
      }
    }
  }
}
