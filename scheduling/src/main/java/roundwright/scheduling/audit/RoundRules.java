package roundwright.scheduling.audit;

import java.math.BigDecimal;
import java.math.MathContext;
import java.time.Duration;
import java.time.Instant;
import java.util.ArrayList;
import java.util.Collections;
import java.util.Comparator;
import java.util.HashMap;
import java.util.LinkedHashSet;
import java.util.List;
import java.util.Map;
import java.util.Optional;
import java.util.OptionalLong;
import java.util.Set;
import roundwright.scheduling.model.Group;
import roundwright.scheduling.model.Round;

/** Rules that look at a round as a whole. */
final class RoundRules {
  private RoundRules() {}

  /** 3 for each entrant not in exactly one group; 1 for each competitor who is no entrant. */
  static void entryMissing(Case given, Notes notes) {
    for (Round round : given.event().rounds()) {
      Map<String, Integer> groupsOf = new HashMap<>();
      Set<String> strangers = new LinkedHashSet<>();
      for (Group group : given.plan().groups(round)) {
        for (String person : new LinkedHashSet<>(group.competitors())) {
          groupsOf.merge(person, 1, Integer::sum);
          if (!given.event().isEntrant(person, round)) {
            strangers.add(person);
          }
        }
      }
      String title = given.words().round(round.id());
      for (String person : given.event().entrants(round)) {
        int groups = groupsOf.getOrDefault(person, 0);
        if (groups != 1) {
          notes.add(
              3,
              List.of(person),
              () ->
                  given.words().name(person)
                      + (groups == 0
                          ? " is in no group of " + title + "."
                          : " is in " + groups + " groups of " + title + " at once."));
        }
      }
      for (String person : strangers) {
        notes.add(
            1,
            List.of(person),
            () -> given.words().name(person) + " solves in " + title + " and is no entrant of it.");
      }
    }
  }

  /** 5 min by which a round starts before the end of the former one plus the turnaround. */
  static void roundOrder(Case given, Notes notes) {
    Duration turnaround = Duration.ofMinutes(given.event().rules().turnaroundMinutes());
    for (Round round : given.event().rounds()) {
      List<Group> groups = given.plan().groups(round);
      List<Group> former = given.event().before(round).map(given.plan()::groups).orElse(List.of());
      if (groups.isEmpty() || former.isEmpty()) {
        continue;
      }
      Group first = groups.get(0);
      Group last = Collections.max(former, Comparator.comparing(Group::end));
      Duration missing = Duration.between(first.start(), last.end().plus(turnaround));
      notes.add(
          Notes.startedFives(missing),
          first,
          List.of(),
          () ->
              given.words().groupAndTime(first)
                  + " starts "
                  + Wording.minutes(missing)
                  + " too soon after "
                  + given.words().groupAndTime(last)
                  + ", which comes first.");
    }
  }

  /** At most 1 for each round whose groups are not as many or not numbered as they must be. */
  static void wrongCount(Case given, Notes notes) {
    for (Round round : given.event().rounds()) {
      wrongCount(given, round)
          .ifPresent(
              why ->
                  notes.add(1, List.of(), () -> given.words().round(round.id()) + " " + why + "."));
    }
  }

  private static Optional<String> wrongCount(Case given, Round round) {
    List<Group> groups = given.plan().groups(round);
    int count = groups.size();
    int entrants = given.event().entrants(round).size();
    if (round.groups().isPresent() && round.groups().getAsInt() != count) {
      return Optional.of(
          "has "
              + Wording.count(count, "group")
              + " where it is to have "
              + round.groups().getAsInt());
    }
    if (count == 0 && entrants > 0) {
      return Optional.of("has no group, but " + Wording.count(entrants, "entrant"));
    }
    OptionalLong capacity = given.event().largestCapacity(round);
    if (count > 1
        && given.event().isLast(round)
        && round.groups().isEmpty()
        && capacity.isPresent()
        && entrants <= capacity.getAsLong()) {
      return Optional.of("is a final that fits one group and has " + count);
    }
    boolean kept = given.changes().isPresent();
    List<Integer> numbers = groups.stream().map(Group::number).toList();
    if (kept && new LinkedHashSet<>(numbers).size() < count) {
      return Optional.of("has two groups of the same number");
    }
    for (int i = 0; i < count && !kept; i++) {
      if (numbers.get(i) != i + 1) {
        return Optional.of("has groups that are not numbered 1, 2, 3 ... in time");
      }
    }
    return Optional.empty();
  }

  /** (distance from the fair size, beyond 1) squared, per group. */
  static void unevenGroups(Case given, Notes notes) {
    for (Round round : given.event().rounds()) {
      List<Group> groups = given.plan().groups(round);
      BigDecimal entrants = BigDecimal.valueOf(given.event().entrants(round).size());
      long shared = groups.stream().mapToLong(group -> given.event().shared(round, group)).sum();
      if (shared == 0) {
        continue; // groups that a hand has left empty
      }
      for (Group group : groups) {
        BigDecimal fair =
            entrants
                .multiply(BigDecimal.valueOf(given.event().shared(round, group)))
                .divide(BigDecimal.valueOf(shared), MathContext.DECIMAL128);
        int size = group.competitors().size();
        BigDecimal beyond = BigDecimal.valueOf(size).subtract(fair).abs().subtract(BigDecimal.ONE);
        if (beyond.signum() > 0) {
          notes.add(
              beyond.pow(2, MathContext.DECIMAL128),
              Optional.of(group.id()),
              List.of(),
              () ->
                  given.words().groupAndTime(group)
                      + " has "
                      + Wording.count(size, "competitor")
                      + "; a fair share would be "
                      + Wording.oneDecimal(fair)
                      + ".");
        }
      }
    }
  }

  /** Groups beyond the fewest that could hold the entrants. */
  static void extraGroup(Case given, Notes notes) {
    for (Round round : given.event().rounds()) {
      long capacity = given.event().largestCapacity(round).orElse(0);
      if (round.groups().isPresent() || capacity == 0) {
        continue;
      }
      int entrants = given.event().entrants(round).size();
      long fewest = (entrants + capacity - 1) / capacity;
      int count = given.plan().groups(round).size();
      notes.add(
          count - fewest,
          List.of(),
          () ->
              given.words().round(round.id())
                  + " has "
                  + Wording.count(count, "group")
                  + "; "
                  + fewest
                  + " would hold its "
                  + Wording.count(entrants, "entrant")
                  + ".");
    }
  }

  /** Places between the group of each competitor and the one their seeding wants. */
  static void seeding(Case given, Notes notes) {
    for (Round round : given.event().rounds()) {
      List<Group> groups = given.plan().groups(round);
      Map<String, Integer> wanted = wantedPlaces(given, round, groups.size());
      for (int place = 0; place < groups.size(); place++) {
        Group group = groups.get(place);
        for (String person : group.competitors()) {
          if (wanted.containsKey(person)) {
            int away = Math.abs(place - wanted.get(person));
            notes.add(
                away,
                group,
                List.of(person),
                () ->
                    given.words().name(person)
                        + " is in "
                        + given.words().groupAndTime(group)
                        + ", "
                        + Wording.count(away, "place")
                        + " from where the seeding puts them.");
          }
        }
      }
    }
  }

  private static Map<String, Integer> wantedPlaces(Case given, Round round, int groups) {
    List<String> ranked = new ArrayList<>(given.event().entrants(round));
    Comparator<String> byTime =
        Comparator.comparing(person -> given.event().expectedSeconds(person, round));
    boolean slowestFirst = round.seeding() == Round.Seeding.SLOW_FIRST;
    ranked.sort(
        (slowestFirst ? byTime.reversed() : byTime).thenComparing(Comparator.naturalOrder()));
    Map<String, Integer> places = new HashMap<>();
    for (int rank = 0; rank < ranked.size() && groups > 0; rank++) {
      places.put(
          ranked.get(rank),
          round.seeding() == Round.Seeding.MIXED ? rank % groups : rank * groups / ranked.size());
    }
    return places;
  }

  /** 1 per newcomer in the earliest of several groups of a first round. */
  static void newcomerFirst(Case given, Notes notes) {
    for (Round round : given.event().rounds()) {
      List<Group> groups = given.plan().groups(round);
      if (round.number() != 1 || groups.size() < 2) {
        continue;
      }
      for (String person : new LinkedHashSet<>(groups.get(0).competitors())) {
        if (given.event().person(person).newcomer()) {
          notes.add(
              1,
              groups.get(0),
              List.of(person),
              () ->
                  given.words().name(person)
                      + " is new and solves in the first group, "
                      + given.words().groupAndTime(groups.get(0))
                      + ", before having seen one.");
        }
      }
    }
  }

  /** Notice: a likely entrant who will have left, or not have come, when their group solves. */
  static void likelyEntrantAway(Case given, Notes notes) {
    for (Round round : given.event().rounds()) {
      if (!given.event().areMerelyLikely(round)) {
        continue;
      }
      List<Group> groups = given.plan().groups(round);
      Instant from = groups.stream().map(Group::start).min(Comparator.naturalOrder()).orElse(null);
      Instant to = groups.stream().map(Group::end).max(Comparator.naturalOrder()).orElse(null);
      for (String person : given.event().entrants(round)) {
        boolean away =
            from != null
                && groups.stream()
                    .noneMatch(group -> given.event().isThere(person, group.start(), group.end()));
        notes.add(
            away ? 1 : 0,
            List.of(person),
            () ->
                given.words().name(person)
                    + " will likely be in "
                    + given.words().round(round.id())
                    + ", and is away in all its groups ("
                    + given.words().time(from, given.event().zone(groups.get(0).hall()))
                    + " to "
                    + given.words().time(to, given.event().zone(groups.get(0).hall()))
                    + ").");
      }
    }
  }
}
