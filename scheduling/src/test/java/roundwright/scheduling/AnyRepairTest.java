package roundwright.scheduling;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertTrue;

import java.time.Duration;
import java.time.Instant;
import java.util.ArrayList;
import java.util.List;
import java.util.Map;
import java.util.Optional;
import java.util.Random;
import java.util.function.Function;
import java.util.function.UnaryOperator;
import java.util.stream.Collectors;
import java.util.stream.LongStream;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.MethodSource;
import roundwright.scheduling.audit.Auditor;
import roundwright.scheduling.audit.Kept;
import roundwright.scheduling.audit.Verdict;
import roundwright.scheduling.cost.RuleName;
import roundwright.scheduling.model.Event;
import roundwright.scheduling.model.Group;
import roundwright.scheduling.model.Hall;
import roundwright.scheduling.model.Person;
import roundwright.scheduling.model.Pins;
import roundwright.scheduling.model.Plan;
import roundwright.scheduling.model.Round;
import roundwright.scheduling.model.Venue;
import roundwright.scheduling.model.Window;
import roundwright.scheduling.repair.Scope;

/** Any event to which anything may happen, in the middle of it. */
class AnyRepairTest {
  static LongStream seeds() {
    return LongStream.rangeClosed(1, 100);
  }

  @ParameterizedTest
  @MethodSource("seeds")
  void whatHasBegunStandsAndNothingGetsWorse(long seed) {
    Random random = new Random(seed);
    Event event = RandomEvents.wild(seed).event();
    Plan kept = Planner.plan(event, Effort.ofSteps(3_000).withSeed(seed), Progress.NONE);
    if (kept.groups().isEmpty()) {
      return;
    }
    Happening happening = Happening.values()[random.nextInt(Happening.values().length)];
    Event now = happening.to(event, kept, random);
    Instant at = any(kept.groups(), random).start();
    Repair.Repaired repaired =
        Repair.repair(now, kept, Optional.of(at), Scope.ALL, Effort.ofSteps(1), Progress.NONE);
    String about = "seed " + seed + ", " + happening;
    Verdict after = new Auditor(now).audit(repaired.plan(), new Kept(kept, Optional.of(at)));
    assertEquals(after.cost(), repaired.plan().score().orElseThrow(), about);
    if (happening.leavesAllNames()) {
      Verdict before = new Auditor(now).audit(kept, new Kept(kept, Optional.of(at)));
      assertTrue(
          after.cost().breaches() <= before.cost().breaches(),
          about + ": " + after.breaches() + " from " + before.breaches());
    }
    // What has begun in a hall that is gone, or has lost its last competitor, cannot stay.
    boolean canStand =
        happening != Happening.HALL_GONE
            && kept.groups().stream()
                .filter(group -> group.start().isBefore(at))
                .allMatch(group -> now.people().stream().anyMatch(one -> solves(one, group)));
    if (canStand) {
      assertEquals(0L, after.breaches().getOrDefault(RuleName.PAST_CHANGED, 0L), about);
    }
    repaired
        .least()
        .ifPresent(least -> assertTrue(least.commitments() <= repaired.changed(), about));
    repaired.least().ifPresent(least -> assertTrue(least.people() <= repaired.told(), about));
    Map<String, Group> groups =
        repaired.plan().groups().stream().collect(Collectors.toMap(Group::id, Function.identity()));
    for (Group group : kept.groups()) {
      Group found = groups.get(group.id());
      if (found != null) {
        assertEquals(group.round(), found.round(), about);
        assertEquals(group.number(), found.number(), about);
      }
      if (found != null && canStand && group.start().isBefore(at)) {
        assertEquals(group.start(), found.start(), about);
        assertEquals(group.end(), found.end(), about);
        assertEquals(group.hall(), found.hall(), about);
      }
    }
  }

  private static boolean solves(Person person, Group group) {
    return group.competitors().contains(person.id());
  }

  private static <T> T any(List<T> list, Random random) {
    return list.get(random.nextInt(list.size()));
  }

  private enum Happening {
    GONE {
      @Override
      Event to(Event event, Plan kept, Random random) {
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
    },
    HALL_LATE {
      @Override
      Event to(Event event, Plan kept, Random random) {
        String hall = any(kept.groups(), random).hall();
        return opens(event, hall, open -> shortened(open, Duration.ofMinutes(20), Duration.ZERO));
      }
    },
    HALL_CLOSES_EARLY {
      @Override
      Event to(Event event, Plan kept, Random random) {
        String hall = any(kept.groups(), random).hall();
        return opens(event, hall, open -> shortened(open, Duration.ZERO, Duration.ofHours(2)));
      }
    },
    HALL_GONE {
      @Override
      Event to(Event event, Plan kept, Random random) {
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
    },
    GROUP_PINNED {
      @Override
      Event to(Event event, Plan kept, Random random) {
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
    };

    abstract Event to(Event event, Plan kept, Random random);

    /** Whether the kept plan can still be priced as it is. */
    boolean leavesAllNames() {
      return this != GONE && this != HALL_GONE;
    }
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
