package roundwright.scheduling.advice;

import java.util.ArrayList;
import java.util.List;
import java.util.function.UnaryOperator;
import roundwright.scheduling.audit.Auditor;
import roundwright.scheduling.audit.Verdict;
import roundwright.scheduling.cost.Cost;
import roundwright.scheduling.model.Event;
import roundwright.scheduling.model.Group;
import roundwright.scheduling.model.Person;
import roundwright.scheduling.model.Pins;
import roundwright.scheduling.model.Plan;
import roundwright.scheduling.model.Role;
import roundwright.scheduling.model.Round;

/** An event with any plan for it, as somebody looks at it and changes it by hand. */
public record Draft(Event event, Plan plan) {
  public Cost price() {
    return new Auditor(event).price(plan);
  }

  public Verdict verdict() {
    return new Auditor(event).audit(plan);
  }

  /**
   * The group of that id.
   *
   * @throws IllegalArgumentException where the plan has none
   */
  public Group group(String id) {
    return plan.groups().stream()
        .filter(group -> group.id().equals(id))
        .findFirst()
        .orElseThrow(() -> new IllegalArgumentException("The plan has no group " + id));
  }

  /**
   * The person of that id.
   *
   * @throws IllegalArgumentException where the event has none
   */
  public Person person(String id) {
    return event.people().stream()
        .filter(person -> person.id().equals(id))
        .findFirst()
        .orElseThrow(() -> new IllegalArgumentException("The event has no person " + id));
  }

  Draft with(Group changed) {
    List<Group> groups = new ArrayList<>(plan.groups());
    groups.replaceAll(group -> group.id().equals(changed.id()) ? changed : group);
    return new Draft(event, new Plan(groups, java.util.Optional.empty(), List.of()));
  }

  Draft withCompetitors(String id, UnaryOperator<List<String>> change) {
    Group group = group(id);
    return with(
        new Group(
            group.id(),
            group.round(),
            group.number(),
            group.hall(),
            group.stations(),
            group.start(),
            group.end(),
            change.apply(new ArrayList<>(group.competitors())),
            group.crew()));
  }

  Draft withCrew(String id, Role role, UnaryOperator<List<String>> change) {
    Group group = group(id);
    Group.Crew crew = group.crew();
    List<String> changed = change.apply(new ArrayList<>(crew.in(role)));
    return with(
        new Group(
            group.id(),
            group.round(),
            group.number(),
            group.hall(),
            group.stations(),
            group.start(),
            group.end(),
            group.competitors(),
            new Group.Crew(
                role == Role.JUDGE ? changed : crew.judges(),
                role == Role.SCRAMBLER ? changed : crew.scramblers(),
                role == Role.RUNNER ? changed : crew.runners())));
  }

  Draft with(Person changed) {
    List<Person> people = new ArrayList<>(event.people());
    people.replaceAll(person -> person.id().equals(changed.id()) ? changed : person);
    return withPeople(people, event.rounds(), event.pins());
  }

  Draft withOneMore(Person person) {
    List<Person> people = new ArrayList<>(event.people());
    people.add(person);
    return withPeople(people, event.rounds(), event.pins());
  }

  private Draft withPeople(List<Person> people, List<Round> rounds, Pins pins) {
    return new Draft(
        new Event(
            event.name(),
            event.zone(),
            event.venues(),
            event.ways(),
            event.fixedPoints(),
            event.disciplines(),
            rounds,
            people,
            event.rules(),
            pins),
        plan);
  }

  /** Without somebody, in the event, its pins and every group; a group they were alone in goes. */
  Draft without(String id) {
    List<Person> people = new ArrayList<>(event.people());
    people.removeIf(person -> person.id().equals(id));
    List<Round> rounds = event.rounds().stream().map(round -> without(round, id)).toList();
    Pins pins = event.pins();
    Draft left =
        withPeople(
            people,
            rounds,
            new Pins(
                pins.groups(),
                pins.competitors().stream().filter(pin -> !pin.person().equals(id)).toList(),
                pins.duties().stream().filter(pin -> !pin.person().equals(id)).toList()));
    List<Group> groups = new ArrayList<>();
    for (Group group : plan.groups()) {
      Draft one = new Draft(left.event, new Plan(List.of(group), plan.score(), List.of()));
      one = one.withCompetitors(group.id(), list -> without(list, id));
      for (Role role : Role.values()) {
        one = one.withCrew(group.id(), role, list -> without(list, id));
      }
      groups.addAll(one.plan.groups());
    }
    groups.removeIf(group -> group.competitors().isEmpty());
    return new Draft(left.event, new Plan(groups, java.util.Optional.empty(), List.of()));
  }

  private static List<String> without(List<String> list, String id) {
    list.removeIf(id::equals);
    return list;
  }

  private static Round without(Round round, String id) {
    return new Round(
        round.id(),
        round.discipline(),
        round.number(),
        round.countedBy(),
        round.timeLimitSeconds(),
        round.limitCovers(),
        round.cutOff(),
        round.advance(),
        round.continues(),
        round.halls(),
        round.seating(),
        round.fill(),
        round.stations(),
        round.groups(),
        round.minutesPerGroup(),
        round.crew(),
        round.seeding(),
        round.notBefore(),
        round.notAfter(),
        round.entrants().map(list -> list.stream().filter(one -> !one.equals(id)).toList()));
  }
}
