package roundwright.scheduling.forecast;

import java.math.BigDecimal;
import java.math.RoundingMode;
import java.util.ArrayList;
import java.util.Comparator;
import java.util.List;
import java.util.Optional;
import roundwright.scheduling.model.Discipline;
import roundwright.scheduling.model.Event;
import roundwright.scheduling.model.Hall;
import roundwright.scheduling.model.Round;
import roundwright.scheduling.model.Rules;
import roundwright.scheduling.model.Seating;
import roundwright.scheduling.model.Venue;

/**
 * How many groups a round needs in its largest suitable hall and how long they take, were it alone
 * in the world.
 *
 * @param entrants real or likely
 * @param likely whether a former round decides who they are
 * @param hall the suitable hall of the largest capacity; empty where no hall suits
 * @param groups in the order of the round's seeding; empty where there is no entrant or no hall
 */
public record RoundForecast(
    Round round, int entrants, boolean likely, Optional<Hall> hall, List<GroupForecast> groups) {
  public RoundForecast {
    groups = List.copyOf(groups);
  }

  /** The forecast of each round of an event, in the event's order. */
  public static List<RoundForecast> of(Event event) {
    Entrants entrants = Entrants.of(event);
    List<RoundForecast> forecasts = new ArrayList<>();
    for (Round round : event.rounds()) {
      forecasts.add(of(event, round, entrants));
    }
    return forecasts;
  }

  static RoundForecast of(Event event, Round round, Entrants entrants) {
    List<String> ids = entrants.ids(round.id());
    Cut cut = plainest(event, round, ids);
    List<GroupForecast> groups = new ArrayList<>();
    for (List<String> competitors : cut.competitors()) {
      int stations = Math.min(cut.stations(), competitors.size());
      groups.add(GroupForecast.of(cut.leastTime(), competitors, stations));
    }
    boolean likely = entrants.areMerelyLikely(round.id());
    return new RoundForecast(round, ids.size(), likely, largestHall(event, round), groups);
  }

  /**
   * The fewest groups of a round in its largest suitable hall, in the order of its seeding.
   *
   * @param stations that each may use at most; 0 where no hall suits
   * @param competitors empty where there is no entrant or no hall
   */
  record Cut(LeastTime leastTime, int stations, List<List<String>> competitors) {}

  static Cut plainest(Event event, Round round, List<String> ids) {
    LeastTime leastTime = new LeastTime(event, round);
    Optional<Hall> hall = largestHall(event, round);
    if (hall.isEmpty() || ids.isEmpty()) {
      return new Cut(leastTime, 0, List.of());
    }
    int stations = stations(round, hall.get());
    int fewest = 1 + (ids.size() - 1) / capacity(event.rules(), round, stations);
    int count = Math.min(ids.size(), round.groups().orElse(fewest));
    return new Cut(leastTime, stations, seeded(leastTime, round, ids, count));
  }

  /** Minutes of the longest group's slot: as laid down, else the least time. */
  public int slotMinutes() {
    return round
        .minutesPerGroup()
        .orElse(groups.stream().mapToInt(GroupForecast::leastMinutes).max().orElse(0));
  }

  /** The group that takes longest; empty where there is none. */
  public Optional<GroupForecast> longest() {
    return groups.stream().max(Comparator.comparingInt(GroupForecast::leastMinutes));
  }

  static Optional<Hall> largestHall(Event event, Round round) {
    Discipline discipline =
        event.disciplines().stream()
            .filter(candidate -> candidate.id().equals(round.discipline()))
            .findFirst()
            .orElseThrow();
    Hall largest = null;
    for (Venue venue : event.venues()) {
      for (Hall hall : venue.halls()) {
        boolean suitable =
            hall.features().containsAll(discipline.needs())
                && (round.halls().isEmpty() || round.halls().get().contains(hall.id()));
        if (suitable
            && capacity(event.rules(), round, stations(round, hall)) > 0
            && (largest == null || stations(round, hall) > stations(round, largest))) {
          largest = hall;
        }
      }
    }
    return Optional.ofNullable(largest);
  }

  static int stations(Round round, Hall hall) {
    return Math.min(hall.stations(), round.stations().orElse(Integer.MAX_VALUE));
  }

  static int capacity(Rules rules, Round round, int stations) {
    if (round.seating().orElse(rules.seating()) == Seating.FIXED) {
      return stations;
    }
    BigDecimal fill = round.fill().orElse(rules.fill());
    return fill.multiply(BigDecimal.valueOf(stations))
        .setScale(0, RoundingMode.FLOOR)
        .intValueExact();
  }

  /** The entrants cut into even groups as the round's seeding wants them. */
  static List<List<String>> seeded(LeastTime leastTime, Round round, List<String> ids, int count) {
    List<String> ranked = new ArrayList<>(ids);
    Comparator<String> byTime = Comparator.comparing(leastTime::expectedSeconds);
    boolean slowestFirst = round.seeding() == Round.Seeding.SLOW_FIRST;
    ranked.sort(
        (slowestFirst ? byTime.reversed() : byTime).thenComparing(Comparator.naturalOrder()));
    List<List<String>> groups = new ArrayList<>();
    for (int i = 0; i < count; i++) {
      groups.add(new ArrayList<>());
    }
    for (int rank = 0; rank < ranked.size(); rank++) {
      int place =
          round.seeding() == Round.Seeding.MIXED ? rank % count : rank * count / ranked.size();
      groups.get(place).add(ranked.get(rank));
    }
    return groups;
  }
}
