package roundwright.scheduling;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertTrue;
import static roundwright.scheduling.repair.Scope.Depth.BROKEN;
import static roundwright.scheduling.repair.Scope.Depth.CREWS;
import static roundwright.scheduling.repair.Scope.Depth.EVERYTHING;

import java.time.Instant;
import java.time.LocalDate;
import java.time.ZoneId;
import java.util.List;
import java.util.Map;
import java.util.Optional;
import java.util.Random;
import java.util.Set;
import java.util.function.Function;
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
import roundwright.scheduling.model.Person;
import roundwright.scheduling.model.Plan;
import roundwright.scheduling.model.Venue;
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
    Happening happening = any(List.of(Happening.values()), random);
    Event now = happening.to(event, kept, random);
    Group middle = any(kept.groups(), random);
    Instant at = middle.start();
    Scope scope = scope(middle, now, random);
    Repair.Repaired repaired =
        Repair.repair(now, kept, Optional.of(at), scope, Effort.ofSteps(1), Progress.NONE);
    String about = "seed " + seed + ", " + happening + ", " + scope;
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
      boolean stands =
          group.start().isBefore(at) || !holds(scope, group, now) || scope.depth() == CREWS;
      if (found != null && canStand && stands) {
        assertEquals(group.start(), found.start(), about);
        assertEquals(group.end(), found.end(), about);
        assertEquals(group.hall(), found.hall(), about);
        if (happening.leavesAllEntries()) {
          assertTrue(found.competitors().containsAll(group.competitors()), about);
        }
      }
    }
  }

  private static Scope scope(Group middle, Event event, Random random) {
    Optional<LocalDate> day = Optional.of(middle.start().atZone(zone(event, middle)).toLocalDate());
    return switch (random.nextInt(6)) {
      case 0 -> new Scope(day, Optional.empty(), Set.of(), EVERYTHING);
      case 1 -> new Scope(Optional.empty(), Optional.of(middle.hall()), Set.of(), EVERYTHING);
      case 2 -> new Scope(Optional.empty(), Optional.empty(), Set.of(middle.round()), EVERYTHING);
      case 3 -> new Scope(Optional.empty(), Optional.empty(), Set.of(), CREWS);
      case 4 -> new Scope(Optional.empty(), Optional.empty(), Set.of(), BROKEN);
      default -> Scope.ALL;
    };
  }

  private static boolean holds(Scope scope, Group group, Event event) {
    LocalDate date = group.start().atZone(zone(event, group)).toLocalDate();
    return scope.day().map(date::equals).orElse(true)
        && scope.hall().map(group.hall()::equals).orElse(true)
        && (scope.rounds().isEmpty() || scope.rounds().contains(group.round()));
  }

  private static ZoneId zone(Event event, Group group) {
    return event.venues().stream()
        .filter(venue -> venue.halls().stream().anyMatch(one -> one.id().equals(group.hall())))
        .map(Venue::zone)
        .findFirst()
        .orElse(event.zone());
  }

  private static boolean solves(Person person, Group group) {
    return group.competitors().contains(person.id());
  }

  private static <T> T any(List<T> list, Random random) {
    return list.get(random.nextInt(list.size()));
  }
}
