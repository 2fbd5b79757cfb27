package roundwright.scheduling.audit;

import java.math.BigDecimal;
import java.util.Comparator;
import java.util.HashMap;
import java.util.HashSet;
import java.util.List;
import java.util.Map;
import java.util.Optional;
import java.util.Set;
import java.util.stream.StreamSupport;
import roundwright.scheduling.model.Person;
import roundwright.scheduling.model.Round;

/** Who is in a round. */
final class Entrants {
  private final Directory event;
  private final Map<String, List<String>> lists = new HashMap<>();
  private final Map<String, Set<String>> sets = new HashMap<>();
  private final Map<String, Boolean> likely = new HashMap<>();

  Entrants(Directory event) {
    this.event = event;
    for (Round round : event.rounds()) {
      settle(round);
    }
  }

  List<String> of(Round round) {
    return lists.get(round.id());
  }

  boolean has(String person, Round round) {
    return sets.get(round.id()).contains(person);
  }

  boolean areMerelyLikely(Round round) {
    return likely.get(round.id());
  }

  private void settle(Round round) {
    if (lists.containsKey(round.id())) {
      return;
    }
    Optional<Round> before = event.before(round);
    if (round.entrants().isPresent()) {
      put(round, round.entrants().get(), false);
    } else if (round.number() == 1 || before.isEmpty()) {
      put(
          round,
          StreamSupport.stream(event.people().spliterator(), false)
              .filter(person -> isEntered(person, round))
              .map(Person::id)
              .toList(),
          false);
    } else {
      settle(before.get());
      List<String> former = lists.get(before.get().id());
      if (round.continues()) {
        put(round, former, likely.get(before.get().id()));
      } else {
        put(round, goingOn(before.get(), former), true);
      }
    }
  }

  private void put(Round round, List<String> people, boolean merelyLikely) {
    lists.put(round.id(), people);
    sets.put(round.id(), new HashSet<>(people));
    likely.put(round.id(), merelyLikely);
  }

  private static boolean isEntered(Person person, Round round) {
    return person.entries().stream()
        .anyMatch(entry -> entry.discipline().equals(round.discipline()));
  }

  private List<String> goingOn(Round former, List<String> entrants) {
    List<String> fastestFirst =
        entrants.stream()
            .sorted(
                Comparator.comparing((String person) -> event.expectedSeconds(person, former))
                    .thenComparing(Comparator.naturalOrder()))
            .toList();
    Optional<Round.Advance> advance = former.advance();
    if (advance.isEmpty()) {
      return List.of();
    }
    if (advance.get() instanceof Round.Advance.Under under) {
      return fastestFirst.stream()
          .filter(person -> event.expectedSeconds(person, former).compareTo(under.seconds()) < 0)
          .toList();
    }
    int wanted =
        advance.get() instanceof Round.Advance.Count count
            ? count.people()
            : Math.max(1, share((Round.Advance.Percent) advance.get(), fastestFirst.size()));
    return fastestFirst.subList(0, Math.min(wanted, fastestFirst.size()));
  }

  private static int share(Round.Advance.Percent percent, int people) {
    return percent
        .percent()
        .multiply(BigDecimal.valueOf(people))
        .divideToIntegralValue(BigDecimal.valueOf(100))
        .intValueExact();
  }
}
