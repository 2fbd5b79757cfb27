package roundwright.scheduling;

import java.time.Duration;
import java.time.Instant;
import java.util.ArrayList;
import java.util.List;
import java.util.Optional;
import java.util.Random;
import java.util.function.UnaryOperator;
import roundwright.scheduling.model.Event;
import roundwright.scheduling.model.Group;
import roundwright.scheduling.model.Hall;
import roundwright.scheduling.model.Person;
import roundwright.scheduling.model.Pins;
import roundwright.scheduling.model.Plan;
import roundwright.scheduling.model.Round;
import roundwright.scheduling.model.Venue;
import roundwright.scheduling.model.Window;

/** What may happen to an event after its plan was told. */
enum Happening {
  GONE,
  HALL_LATE,
  HALL_CLOSES_EARLY,
  HALL_GONE,
  NEW_ENTRANTS,
  GROUP_PINNED;

  Event to(Event event, Plan kept, Random random) {
    return switch (this) {
      case GONE -> gone(event, random);
      case HALL_LATE -> hallLate(event, kept, random);
      case HALL_CLOSES_EARLY -> hallClosesEarly(event, kept, random);
      case HALL_GONE -> hallGone(event, kept, random);
      case NEW_ENTRANTS -> newEntrants(event, random);
      case GROUP_PINNED -> groupPinned(event, kept);
    };
  }

  private static Event gone(Event event, Random random) {
    List<Person> people = new ArrayList<>(event.people());
    Person gone = any(people, random);
    boolean named =
        event.pins().competitors().stream().anyMatch(pin -> pin.person().equals(gone.id()))
            || event.pins().duties().stream().anyMatch(pin -> pin.person().equals(gone.id()))
            || event.rounds().stream()
                .flatMap(round -> round.entrants().stream())
                .anyMatch(ids -> ids.contains(gone.id()));
    if (!named) {
      people.remove(gone);
    }
    return with(event, event.venues(), event.rounds(), people, event.pins());
  }

  private static Event hallLate(Event event, Plan kept, Random random) {
    String hall = any(kept.groups(), random).hall();
    return opens(event, hall, open -> shortened(open, Duration.ofMinutes(20), Duration.ZERO));
  }

  private static Event hallClosesEarly(Event event, Plan kept, Random random) {
    String hall = any(kept.groups(), random).hall();
    return opens(event, hall, open -> shortened(open, Duration.ZERO, Duration.ofHours(2)));
  }

  private static Event hallGone(Event event, Plan kept, Random random) {
    String gone = any(kept.groups(), random).hall();
    boolean named =
        event.fixedPoints().stream().anyMatch(point -> point.toString().contains(gone))
            || event.rounds().stream()
                .flatMap(round -> round.halls().stream())
                .anyMatch(halls -> halls.contains(gone))
            || event.pins().toString().contains(gone);
    List<Venue> venues = new ArrayList<>();
    for (Venue venue : event.venues()) {
      List<Hall> halls = new ArrayList<>(venue.halls());
      halls.removeIf(hall -> !named && halls.size() > 1 && hall.id().equals(gone));
      venues.add(new Venue(venue.id(), venue.name(), venue.zone(), halls));
    }
    return with(event, venues, event.rounds(), event.people(), event.pins());
  }

  private static Event newEntrants(Event event, Random random) {
    List<Round> rounds = new ArrayList<>(event.rounds());
    rounds.replaceAll(
        round -> round.number() > 1 && !round.continues() ? named(round, event, random) : round);
    return with(event, event.venues(), rounds, event.people(), event.pins());
  }

  private static Event groupPinned(Event event, Plan kept) {
    Group last = kept.groups().get(kept.groups().size() - 1);
    Pins pins = event.pins();
    List<Pins.GroupPin> groups = new ArrayList<>(pins.groups());
    groups.removeIf(pin -> pin.round().equals(last.round()) && pin.number() == last.number());
    groups.add(
        new Pins.GroupPin(
            last.round(),
            last.number(),
            Optional.empty(),
            Optional.of(last.start().plus(Duration.ofMinutes(60)))));
    return with(
        event,
        event.venues(),
        event.rounds(),
        event.people(),
        new Pins(groups, pins.competitors(), pins.duties()));
  }

  /** Whether the kept plan can still be priced as it is. */
  boolean leavesAllNames() {
    return this != GONE && this != HALL_GONE;
  }

  /** Whether everybody may still solve where they were told. */
  boolean leavesAllEntries() {
    return leavesAllNames() && this != NEW_ENTRANTS;
  }

  private static <T> T any(List<T> list, Random random) {
    return list.get(random.nextInt(list.size()));
  }

  /** Some of those with an entry, but for people whom a pin wants in the round. */
  private static Round named(Round round, Event event, Random random) {
    List<String> entrants =
        event.people().stream()
            .filter(
                one ->
                    one.entries().stream()
                        .anyMatch(entry -> entry.discipline().equals(round.discipline())))
            .map(Person::id)
            .filter(
                id ->
                    random.nextBoolean()
                        || event.pins().competitors().stream()
                            .anyMatch(pin -> pin.person().equals(id)))
            .toList();
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
        Optional.of(entrants));
  }

  private static Window shortened(Window open, Duration later, Duration earlier) {
    Instant from = open.from().plus(later);
    Instant to = open.to().minus(earlier);
    return from.isBefore(to) ? new Window(from, to) : open;
  }

  private static Event opens(Event event, String hall, UnaryOperator<Window> change) {
    List<Venue> venues = new ArrayList<>();
    for (Venue venue : event.venues()) {
      List<Hall> halls = new ArrayList<>();
      for (Hall one : venue.halls()) {
        List<Window> open = new ArrayList<>(one.open());
        if (one.id().equals(hall)) {
          open.replaceAll(change);
        }
        halls.add(
            new Hall(one.id(), one.name(), one.stations(), open, one.occupancy(), one.features()));
      }
      venues.add(new Venue(venue.id(), venue.name(), venue.zone(), halls));
    }
    return with(event, venues, event.rounds(), event.people(), event.pins());
  }

  private static Event with(
      Event event, List<Venue> venues, List<Round> rounds, List<Person> people, Pins pins) {
    return new Event(
        event.name(),
        event.zone(),
        venues,
        event.ways(),
        event.fixedPoints(),
        event.disciplines(),
        rounds,
        people,
        event.rules(),
        pins);
  }
}
