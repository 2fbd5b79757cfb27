package roundwright.scheduling;

import java.time.Instant;
import java.time.LocalDate;
import java.time.LocalTime;
import java.time.ZoneId;
import java.util.ArrayList;
import java.util.List;
import java.util.Optional;
import java.util.Random;
import roundwright.scheduling.model.Event;
import roundwright.scheduling.model.Group;
import roundwright.scheduling.model.Hall;
import roundwright.scheduling.model.Person;
import roundwright.scheduling.model.Plan;
import roundwright.scheduling.model.Round;
import roundwright.scheduling.model.Venue;

/** Plans made by chance: bad ones, with overlaps, strangers, missing people and wrong numbers. */
public final class RandomPlans {
  private static final LocalDate FIRST_DAY = LocalDate.of(2027, 5, 8);

  private final Event event;
  private final Random random;
  private final List<Venue> venues = new ArrayList<>();
  private final List<Hall> halls = new ArrayList<>();

  private RandomPlans(Event event, long seed) {
    this.event = event;
    this.random = new Random(seed);
    for (Venue venue : event.venues()) {
      for (Hall hall : venue.halls()) {
        venues.add(venue);
        halls.add(hall);
      }
    }
  }

  /** A plan in which nearly every rule is broken somewhere; most people are placed, though. */
  public static Plan bad(Event event, long seed) {
    return new RandomPlans(event, seed).bad();
  }

  /** The same plan after a few changes by chance, to be held to it as a kept plan. */
  public static Plan disturbed(Plan plan, Event event, long seed) {
    return new RandomPlans(event, seed).disturbed(plan);
  }

  private boolean chance(double probability) {
    return random.nextDouble() < probability;
  }

  private int between(int least, int most) {
    return least + random.nextInt(most - least + 1);
  }

  private Plan bad() {
    List<Group> groups = new ArrayList<>();
    for (Round round : event.rounds()) {
      if (chance(0.05)) {
        continue;
      }
      int count =
          round.groups().isPresent() && chance(0.8) ? round.groups().getAsInt() : between(1, 4);
      List<List<String>> competitors = new ArrayList<>();
      for (int i = 0; i < count; i++) {
        competitors.add(new ArrayList<>());
      }
      for (Person person : event.people()) {
        boolean entered =
            person.entries().stream()
                .anyMatch(entry -> entry.discipline().equals(round.discipline()));
        for (int times = chance(0.04) ? 2 : 1; times > 0; times--) {
          if (chance(entered ? (round.number() == 1 ? 0.95 : 0.5) : 0.03)) {
            competitors.get(random.nextInt(count)).add(person.id());
          }
        }
      }
      for (int i = 0; i < count; i++) {
        if (!competitors.get(i).isEmpty()) {
          groups.add(group(round, chance(0.9) ? i + 1 : between(1, 5), competitors.get(i)));
        }
      }
    }
    return new Plan(numbered(groups), Optional.empty(), List.of());
  }

  private static List<Group> numbered(List<Group> groups) {
    List<Group> numbered = new ArrayList<>();
    for (Group group : groups) {
      numbered.add(
          new Group(
              "g" + numbered.size(),
              group.round(),
              group.number(),
              group.hall(),
              group.stations(),
              group.start(),
              group.end(),
              group.competitors(),
              group.crew()));
    }
    return numbered;
  }

  private Group group(Round round, int number, List<String> competitors) {
    int at = random.nextInt(halls.size());
    Hall hall = halls.get(at);
    ZoneId zone = venues.get(at).zone();
    int minute = between(7 * 12, 21 * 12) * 5 + (chance(0.1) ? between(1, 4) : 0);
    if (chance(0.03)) {
      minute = between(23 * 60, 24 * 60 - 1);
    }
    Instant start =
        FIRST_DAY
            .plusDays(chance(0.6) ? 0 : 1)
            .atTime(LocalTime.ofSecondOfDay(minute * 60L))
            .atZone(zone)
            .toInstant();
    int minutes = chance(0.8) ? between(1, 18) * 5 : between(1, 130);
    int stations = Math.max(1, Math.min(hall.stations() + (chance(0.05) ? 3 : 0), between(1, 12)));
    return new Group(
        "?",
        round.id(),
        number,
        hall.id(),
        stations,
        start,
        start.plusSeconds(minutes * 60L),
        competitors,
        crew(stations));
  }

  private Group.Crew crew(int stations) {
    return new Group.Crew(
        people(between(0, stations + 1)), people(between(0, 3)), people(between(0, 3)));
  }

  private List<String> people(int count) {
    List<String> people = new ArrayList<>();
    for (int i = 0; i < count; i++) {
      people.add(event.people().get(random.nextInt(event.people().size())).id());
    }
    return people;
  }

  private Plan disturbed(Plan plan) {
    List<Group> groups = new ArrayList<>();
    for (Group group : plan.groups()) {
      if (chance(0.05)) {
        continue;
      }
      long startShift = chance(0.3) ? between(-8, 8) * 60L : 0;
      long endShift = chance(0.3) ? between(-8, 8) * 60L : startShift;
      Instant start = group.start().plusSeconds(startShift);
      Instant end = group.end().plusSeconds(endShift);
      if (!end.isAfter(start)) {
        end = start.plusSeconds(60);
      }
      List<String> competitors = new ArrayList<>(group.competitors());
      if (chance(0.2)) {
        competitors.addAll(people(1));
      }
      if (chance(0.2) && competitors.size() > 1) {
        competitors.remove(random.nextInt(competitors.size()));
      }
      groups.add(
          new Group(
              group.id(),
              group.round(),
              group.number(),
              chance(0.1) ? halls.get(random.nextInt(halls.size())).id() : group.hall(),
              group.stations(),
              start,
              end,
              competitors,
              chance(0.1) ? crew(3) : group.crew()));
    }
    return new Plan(groups, Optional.empty(), List.of());
  }
}
