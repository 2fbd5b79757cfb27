package roundwright.scheduling.core;

import java.math.BigDecimal;
import java.math.RoundingMode;
import java.util.ArrayList;
import java.util.Comparator;
import java.util.HashMap;
import java.util.List;
import java.util.Map;
import roundwright.scheduling.model.Event;
import roundwright.scheduling.model.Person;
import roundwright.scheduling.model.Round;
import roundwright.scheduling.model.Round.Advance;

/**
 * Who is in each round: those named, else everybody with an entry in a first round, the same people
 * where a round continues the one before, and the likely ones where that round's advance decides.
 *
 * @param people in order of id
 * @param merelyLikely whether the advance of a former round decided
 */
record Entrants(List<Person> people, boolean merelyLikely) {
  static Map<String, Entrants> ofEachRound(Event event) {
    List<Round> inOrder = new ArrayList<>(event.rounds());
    inOrder.sort(Comparator.comparingInt(Round::number));
    Map<String, Person> byId = new HashMap<>();
    event.people().forEach(person -> byId.put(person.id(), person));
    Map<String, Entrants> found = new HashMap<>();
    Map<String, Round> latest = new HashMap<>();
    for (Round round : inOrder) {
      found.put(round.id(), of(round, latest.get(round.discipline()), found, event, byId));
      latest.put(round.discipline(), round);
    }
    return found;
  }

  private static Entrants of(
      Round round,
      Round before,
      Map<String, Entrants> found,
      Event event,
      Map<String, Person> byId) {
    if (round.entrants().isPresent()) {
      List<Person> named = new ArrayList<>();
      round.entrants().get().forEach(id -> named.add(byId.get(id)));
      return sorted(named, false);
    }
    if (before == null) {
      List<Person> entered = new ArrayList<>(event.people());
      entered.removeIf(person -> expectedSeconds(person, round.discipline()) == null);
      return sorted(entered, false);
    }
    Entrants former = found.get(before.id());
    if (round.continues()) {
      return former;
    }
    return sorted(likely(former.people, before, round.discipline()), true);
  }

  private static List<Person> likely(List<Person> former, Round before, String discipline) {
    List<Person> fastest = new ArrayList<>(former);
    fastest.sort(
        Comparator.comparing((Person person) -> expectedSeconds(person, discipline))
            .thenComparing(Person::id));
    Advance advance = before.advance().orElse(new Advance.Count(fastest.size()));
    if (advance instanceof Advance.Under under) {
      fastest.removeIf(
          person -> expectedSeconds(person, discipline).compareTo(under.seconds()) >= 0);
      return fastest;
    }
    int count =
        advance instanceof Advance.Count fixed
            ? fixed.people()
            : Math.max(1, share(((Advance.Percent) advance).percent(), fastest.size()));
    return fastest.subList(0, Math.min(count, fastest.size()));
  }

  private static int share(BigDecimal percent, int of) {
    return percent
        .multiply(BigDecimal.valueOf(of))
        .movePointLeft(2)
        .setScale(0, RoundingMode.FLOOR)
        .intValue();
  }

  private static Entrants sorted(List<Person> people, boolean merelyLikely) {
    List<Person> inOrder = new ArrayList<>(people);
    inOrder.sort(Comparator.comparing(Person::id));
    return new Entrants(List.copyOf(inOrder), merelyLikely);
  }

  /** The time expected of a person in a discipline, or null where they have no entry. */
  static BigDecimal expectedSeconds(Person person, String discipline) {
    for (Person.Entry entry : person.entries()) {
      if (entry.discipline().equals(discipline)) {
        return entry.expectedSeconds();
      }
    }
    return null;
  }
}
