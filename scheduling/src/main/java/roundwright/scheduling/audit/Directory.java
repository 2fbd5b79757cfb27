package roundwright.scheduling.audit;

import java.math.BigDecimal;
import java.math.RoundingMode;
import java.time.Instant;
import java.time.LocalDate;
import java.time.ZoneId;
import java.util.ArrayList;
import java.util.HashMap;
import java.util.LinkedHashMap;
import java.util.List;
import java.util.Map;
import java.util.Optional;
import java.util.OptionalLong;
import java.util.Set;
import roundwright.scheduling.model.Discipline;
import roundwright.scheduling.model.Event;
import roundwright.scheduling.model.FixedPoint;
import roundwright.scheduling.model.Group;
import roundwright.scheduling.model.Hall;
import roundwright.scheduling.model.Person;
import roundwright.scheduling.model.Pins;
import roundwright.scheduling.model.Round;
import roundwright.scheduling.model.Rules;
import roundwright.scheduling.model.Seating;
import roundwright.scheduling.model.Venue;
import roundwright.scheduling.model.Way;
import roundwright.scheduling.model.Window;

/** An event looked up by id, and what follows at once from its description. */
final class Directory {
  /** What a competitor without an entry in the discipline counts with. */
  private static final BigDecimal STRANGER_SECONDS = BigDecimal.valueOf(60);

  private final Event event;
  private final Map<String, Hall> halls = new LinkedHashMap<>();
  private final Map<String, Venue> venueOfHall = new HashMap<>();
  private final Map<String, List<Window>> fixedInHall = new HashMap<>();
  private final Map<String, Discipline> disciplines = new HashMap<>();
  private final Map<String, Round> rounds = new LinkedHashMap<>();
  private final Map<String, Person> people = new LinkedHashMap<>();
  private final Map<String, List<Window>> busyOf = new HashMap<>();
  private final Map<String, Map<String, BigDecimal>> expectedOf = new HashMap<>();
  private final Map<Set<String>, Integer> minutesBetween = new HashMap<>();
  private final Entrants entrants;

  Directory(Event event) {
    this.event = event;
    for (Venue venue : event.venues()) {
      for (Hall hall : venue.halls()) {
        halls.put(hall.id(), hall);
        venueOfHall.put(hall.id(), venue);
        fixedInHall.put(hall.id(), fixedPoints(event, hall, venue.zone()));
      }
    }
    event.disciplines().forEach(discipline -> disciplines.put(discipline.id(), discipline));
    event.rounds().forEach(round -> rounds.put(round.id(), round));
    for (Person person : event.people()) {
      people.put(person.id(), person);
      busyOf.put(
          person.id(), Window.merged(person.busy().stream().map(Person.Busy::window).toList()));
      Map<String, BigDecimal> expected = new HashMap<>();
      person.entries().forEach(entry -> expected.put(entry.discipline(), entry.expectedSeconds()));
      expectedOf.put(person.id(), expected);
    }
    for (Way way : event.ways()) {
      minutesBetween.put(Set.of(way.oneVenue(), way.otherVenue()), way.minutes());
    }
    entrants = new Entrants(this);
  }

  private static List<Window> fixedPoints(Event event, Hall hall, ZoneId zone) {
    List<Window> windows = new ArrayList<>();
    for (FixedPoint point : event.fixedPoints()) {
      if (point.concerns(hall.id())) {
        windows.add(
            new Window(point.from().atZone(zone).toInstant(), point.to().atZone(zone).toInstant()));
      }
    }
    return Window.merged(windows);
  }

  private static <T> T known(Map<String, T> things, String kind, String id) {
    T thing = things.get(id);
    if (thing == null) {
      throw new IllegalArgumentException(
          "The plan names the " + kind + " " + id + ", which the event does not have");
    }
    return thing;
  }

  Rules rules() {
    return event.rules();
  }

  Pins pins() {
    return event.pins();
  }

  Iterable<Round> rounds() {
    return event.rounds();
  }

  Iterable<Person> people() {
    return event.people();
  }

  boolean hasPerson(String id) {
    return people.containsKey(id);
  }

  Person person(String id) {
    return known(people, "person", id);
  }

  Round round(String id) {
    return known(rounds, "round", id);
  }

  Optional<Round> roundIfKnown(String id) {
    return Optional.ofNullable(rounds.get(id));
  }

  Hall hall(String id) {
    return known(halls, "hall", id);
  }

  Venue venueOf(String hall) {
    return known(venueOfHall, "hall", hall);
  }

  /** The zone of a hall; the event's for one that has left it. */
  ZoneId zone(String hall) {
    Venue venue = venueOfHall.get(hall);
    return venue == null ? event.zone() : venue.zone();
  }

  /** The day that a group belongs to: the date of its start in its hall's zone. */
  LocalDate day(Group group) {
    return group.start().atZone(zone(group.hall())).toLocalDate();
  }

  /** Merged fixed points that keep a hall from being used. */
  List<Window> fixedPoints(String hall) {
    return fixedInHall.get(hall);
  }

  Discipline discipline(Round round) {
    return known(disciplines, "discipline", round.discipline());
  }

  /** Merged times for which somebody is wanted elsewhere. */
  List<Window> busy(String person) {
    return busyOf.get(person);
  }

  BigDecimal expectedSeconds(String person, Round round) {
    return expectedOf
        .getOrDefault(person, Map.of())
        .getOrDefault(round.discipline(), STRANGER_SECONDS);
  }

  /** Whether somebody is there all the while. */
  boolean isThere(String person, Instant start, Instant end) {
    return person(person)
        .available()
        .map(windows -> windows.stream().anyMatch(window -> window.holds(start, end)))
        .orElse(true);
  }

  List<String> entrants(Round round) {
    return entrants.of(round);
  }

  boolean isEntrant(String person, Round round) {
    return entrants.has(person, round);
  }

  /** Whether a round's entrants are only likely, since a former round decides them. */
  boolean areMerelyLikely(Round round) {
    return entrants.areMerelyLikely(round);
  }

  Optional<Round> before(Round round) {
    return event.rounds().stream()
        .filter(other -> other.discipline().equals(round.discipline()))
        .filter(other -> other.number() == round.number() - 1)
        .findFirst();
  }

  /** The last of its discipline, from which nobody goes on. */
  boolean isLast(Round round) {
    return round.advance().isEmpty()
        && event.rounds().stream()
            .filter(other -> other.discipline().equals(round.discipline()))
            .noneMatch(other -> other.number() > round.number());
  }

  /** Minutes from one hall to another. */
  int wayMinutes(String from, String to) {
    if (from.equals(to)) {
      return 0;
    }
    String fromVenue = venueOf(from).id();
    String toVenue = venueOf(to).id();
    return fromVenue.equals(toVenue)
        ? rules().changeoverMinutes()
        : minutesBetween.getOrDefault(
            Set.of(fromVenue, toVenue), Event.MINUTES_BETWEEN_UNNAMED_VENUES);
  }

  Seating seating(Round round) {
    return round.seating().orElse(rules().seating());
  }

  /** People that so many stations can take. */
  long room(Round round, int stations) {
    if (seating(round) == Seating.FIXED) {
      return stations;
    }
    return round
        .fill()
        .orElse(rules().fill())
        .multiply(BigDecimal.valueOf(stations))
        .setScale(0, RoundingMode.FLOOR)
        .longValueExact();
  }

  /** The most stations a round may use in a hall. */
  int mostStations(Round round, Hall hall) {
    return Math.min(hall.stations(), round.stations().orElse(Integer.MAX_VALUE));
  }

  boolean isSuitable(Round round, Hall hall) {
    return hall.features().containsAll(discipline(round).needs())
        && (round.halls().isEmpty() || round.halls().get().contains(hall.id()));
  }

  /** The largest capacity of a suitable hall; empty where there is no suitable hall. */
  OptionalLong largestCapacity(Round round) {
    return halls.values().stream()
        .filter(hall -> isSuitable(round, hall))
        .mapToLong(hall -> room(round, mostStations(round, hall)))
        .max();
  }

  /** What the competitors of a group share: stations in use, or in fixed seating one each. */
  int shared(Round round, Group group) {
    return seating(round) == Seating.FIXED ? group.competitors().size() : group.stations();
  }
}
