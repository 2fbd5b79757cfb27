package roundwright.scheduling.audit;

import java.time.LocalDate;
import java.util.ArrayList;
import java.util.Collection;
import java.util.Comparator;
import java.util.HashMap;
import java.util.List;
import java.util.Map;
import java.util.Optional;
import java.util.SortedMap;
import java.util.TreeMap;
import java.util.function.BiConsumer;
import roundwright.scheduling.model.Group;
import roundwright.scheduling.model.Plan;
import roundwright.scheduling.model.Role;
import roundwright.scheduling.model.Round;

/** A plan in order: its groups by round and hall, its commitments by person, each in time. */
final class Book {
  /** Groups in time: by start, then hall id, then number; of other rounds' too, then by end. */
  static final Comparator<Group> IN_TIME =
      Comparator.comparing(Group::start)
          .thenComparing(Group::hall)
          .thenComparingInt(Group::number)
          .thenComparing(Group::end)
          .thenComparing(Group::id);

  private final Directory event;
  private final List<Group> groups;
  private final Map<String, List<Group>> byRound = new HashMap<>();
  private final SortedMap<String, List<Group>> byHall = new TreeMap<>();
  private final SortedMap<String, List<Commitment>> byPerson = new TreeMap<>();

  Book(Directory event, Plan plan) {
    this.event = event;
    this.groups = plan.groups().stream().sorted(IN_TIME).toList();
    for (Group group : groups) {
      byRound.computeIfAbsent(event.round(group.round()).id(), id -> new ArrayList<>()).add(group);
      byHall.computeIfAbsent(event.hall(group.hall()).id(), id -> new ArrayList<>()).add(group);
      eachListing(
          group,
          (person, role) ->
              byPerson
                  .computeIfAbsent(event.person(person).id(), id -> new ArrayList<>())
                  .add(new Commitment(person, group, role)));
    }
    byPerson.values().forEach(list -> list.sort(Commitment.IN_TIME));
  }

  /** Every listing of a group: competitors, judges, scramblers, runners, in this order. */
  static void eachListing(Group group, BiConsumer<String, Optional<Role>> listing) {
    group.competitors().forEach(person -> listing.accept(person, Optional.empty()));
    for (Role role : Role.values()) {
      group.crew().in(role).forEach(person -> listing.accept(person, Optional.of(role)));
    }
  }

  List<Group> groups() {
    return groups;
  }

  List<Group> groups(Round round) {
    return byRound.getOrDefault(round.id(), List.of());
  }

  Collection<List<Group>> groupsByHall() {
    return byHall.values();
  }

  /** Of everybody who has any, by id. */
  SortedMap<String, List<Commitment>> commitments() {
    return byPerson;
  }

  /** One person's commitments by day. */
  SortedMap<LocalDate, List<Commitment>> days(List<Commitment> commitments) {
    SortedMap<LocalDate, List<Commitment>> days = new TreeMap<>();
    for (Commitment commitment : commitments) {
      days.computeIfAbsent(event.day(commitment.group()), day -> new ArrayList<>()).add(commitment);
    }
    return days;
  }
}
