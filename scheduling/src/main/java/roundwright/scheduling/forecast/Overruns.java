package roundwright.scheduling.forecast;

import java.math.BigDecimal;
import java.math.RoundingMode;
import java.util.ArrayList;
import java.util.HashMap;
import java.util.List;
import java.util.Map;
import java.util.Optional;
import roundwright.scheduling.cost.Finding;
import roundwright.scheduling.cost.RuleName;
import roundwright.scheduling.model.Event;
import roundwright.scheduling.model.Group;
import roundwright.scheduling.model.Hall;
import roundwright.scheduling.model.Plan;
import roundwright.scheduling.model.Round;
import roundwright.scheduling.model.Seating;
import roundwright.scheduling.model.Venue;

/**
 * Groups of a plan that are likely to overrun: whose slotPercentile of days by chance is longer
 * than their slot. Notices, which cost nothing; the amount is in minutes. The crew is the wanted
 * one, since a place left empty is a gap of its own.
 */
public final class Overruns {
  /** The same days for every plan: what is shown may change with the plan, never by chance. */
  private static final long SEED = 20_270_508;

  private static final int FIRST_RUNS = 40;

  /** A few days tell a percentile to within two or three in a hundred. */
  private static final double SURELY_LONG_ENOUGH = 0.93;

  private final Event event;
  private final Map<String, LeastTime> leastTimes = new HashMap<>();
  private final Map<String, Integer> stationsByHall = new HashMap<>();

  private Overruns(Event event) {
    this.event = event;
    for (Round round : event.rounds()) {
      leastTimes.put(round.id(), new LeastTime(event, round));
    }
    for (Venue venue : event.venues()) {
      for (Hall hall : venue.halls()) {
        stationsByHall.put(hall.id(), hall.stations());
      }
    }
  }

  /** A notice for each group that is likely to overrun, in the plan's order. */
  public static List<Finding> of(Event event, Plan plan) {
    Overruns overruns = new Overruns(event);
    List<Finding> notices = new ArrayList<>();
    for (Group group : plan.groups()) {
      overruns.notice(group).ifPresent(notices::add);
    }
    return notices;
  }

  private Optional<Finding> notice(Group group) {
    LeastTime leastTime = leastTimes.get(group.round());
    if (leastTime == null || group.competitors().isEmpty()) {
      return Optional.empty();
    }
    double slot = (group.end().getEpochSecond() - group.start().getEpochSecond()) / 60.0;
    Round.CrewSize crew = leastTime.wantedCrew(group.competitors().size(), group.stations());
    if (minutes(leastTime, group, group.stations(), crew, FIRST_RUNS) < SURELY_LONG_ENOUGH * slot) {
      return Optional.empty();
    }
    double minutes = minutes(leastTime, group, group.stations(), crew);
    BigDecimal over = BigDecimal.valueOf(minutes - slot).setScale(1, RoundingMode.HALF_UP);
    if (over.signum() <= 0) {
      return Optional.empty();
    }
    int percentile = event.rules().slotPercentile();
    String says =
        "Group "
            + group.number()
            + " of "
            + leastTime.discipline().name()
            + " round "
            + leastTime.round().number()
            + " is likely to overrun: on "
            + percentile
            + " of 100 days it takes up to "
            + BigDecimal.valueOf(minutes).setScale(1, RoundingMode.HALF_UP)
            + " minutes, "
            + over
            + " more than its slot of "
            + BigDecimal.valueOf(slot).setScale(0, RoundingMode.HALF_UP)
            + "; "
            + remedy(leastTime, group, crew, minutes)
            + ".";
    return Optional.of(
        new Finding(RuleName.LIKELY_OVERRUN, over, Optional.of(group.id()), List.of(), says));
  }

  /** Which one station, scrambler or runner more saves most time. */
  private String remedy(LeastTime leastTime, Group group, Round.CrewSize crew, double minutes) {
    int free =
        Math.min(
            stationsByHall.getOrDefault(group.hall(), 0),
            leastTime.round().stations().orElse(Integer.MAX_VALUE));
    double least = minutes;
    String what = "";
    if (leastTime.seating() == Seating.ROTATING
        && group.stations() < Math.min(free, group.competitors().size())) {
      double shorter = minutes(leastTime, group, group.stations() + 1, crew);
      if (shorter < least) {
        least = shorter;
        what = "station with its judge";
      }
    }
    if (crew.scramblers() > 0) {
      double shorter = minutes(leastTime, group, group.stations(), with(crew, 1, 0));
      if (shorter < least) {
        least = shorter;
        what = "scrambler";
      }
    }
    if (crew.runners() > 0) {
      double shorter = minutes(leastTime, group, group.stations(), with(crew, 0, 1));
      if (shorter < least) {
        least = shorter;
        what = "runner";
      }
    }
    BigDecimal saved = BigDecimal.valueOf(minutes - least).setScale(1, RoundingMode.HALF_UP);
    return saved.signum() == 0
        ? "nobody more would make it shorter, so make the slot longer"
        : "one " + what + " more would save " + saved;
  }

  private static Round.CrewSize with(Round.CrewSize crew, int scramblers, int runners) {
    return new Round.CrewSize(
        crew.judges(), crew.scramblers() + scramblers, crew.runners() + runners);
  }

  private double minutes(LeastTime leastTime, Group group, int stations, Round.CrewSize crew) {
    return minutes(leastTime, group, stations, crew, GroupSimulation.RUNS);
  }

  private double minutes(
      LeastTime leastTime, Group group, int stations, Round.CrewSize crew, int runs) {
    return GroupSimulation.of(
            leastTime, group.competitors(), stations, crew, GroupSimulation.SIGMA, runs, SEED)
        .minutes(event.rules().slotPercentile());
  }
}
