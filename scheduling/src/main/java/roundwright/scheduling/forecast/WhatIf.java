package roundwright.scheduling.forecast;

import java.math.BigDecimal;
import java.util.ArrayList;
import java.util.List;
import java.util.Optional;
import java.util.OptionalInt;
import roundwright.scheduling.model.Event;
import roundwright.scheduling.model.Round;
import roundwright.scheduling.model.Seating;

/**
 * What another number of stations, scramblers, runners or groups would do to a round alone in its
 * largest suitable hall; only ways that the hall can hold. Each line is forecast over the same days
 * by chance, so that the lines compare; the first is the round as it would be planned.
 */
public record WhatIf(Round round, List<Line> lines) {
  private static final int[] STEPS = {-2, -1, 1, 2};

  public WhatIf {
    lines = List.copyOf(lines);
  }

  /**
   * One way to hold the round; minutes are those of its longest group.
   *
   * @param change in words, such as {@code 1 scrambler more}
   * @param groups of the round
   * @param stations in use in the longest group
   * @param percentileMinutes within which slotPercentile of a hundred days end
   * @param slotMinutes the least time, or that percentile on the grid where it is longer
   * @param crewPeople on duty in the largest crew
   * @param togetherMinutes of all groups and the setting up between them
   */
  public record Line(
      String change,
      int groups,
      int stations,
      int scramblers,
      int runners,
      double medianMinutes,
      double percentileMinutes,
      int slotMinutes,
      int crewPeople,
      int togetherMinutes,
      Bottleneck bottleneck) {}

  /** The table of a round; empty where it has no entrant or no suitable hall. */
  public static Optional<WhatIf> of(Event event, Round round, long seed) {
    RoundForecast forecast = RoundForecast.of(event, round, Entrants.of(event));
    if (forecast.groups().isEmpty()) {
      return Optional.empty();
    }
    return Optional.of(new WhatIf(round, new Table(event, round, forecast, seed).lines()));
  }

  private static final class Table {
    private final Event event;
    private final Round round;
    private final List<String> entrants;
    private final LeastTime leastTime;
    private final long seed;
    private final int groups;
    private final int free;
    private final int stations;
    private final Round.CrewSize crew;

    Table(Event event, Round round, RoundForecast forecast, long seed) {
      this.event = event;
      this.round = round;
      this.seed = seed;
      this.entrants = Entrants.of(event).ids(round.id());
      this.leastTime = new LeastTime(event, round);
      this.groups = forecast.groups().size();
      int largest = largestOf(groups);
      this.free = RoundForecast.stations(round, forecast.hall().orElseThrow());
      this.stations = Math.min(free, largest);
      this.crew = leastTime.wantedCrew(largest, stations);
    }

    private int largestOf(int count) {
      return (entrants.size() + count - 1) / count;
    }

    /** Whether that many stations may hold that many people. */
    private boolean mayHold(int people, int used) {
      if (leastTime.seating() == Seating.FIXED) {
        return people <= used;
      }
      BigDecimal fill = round.fill().orElse(event.rules().fill());
      return fill.multiply(BigDecimal.valueOf(used)).compareTo(BigDecimal.valueOf(people)) >= 0;
    }

    List<Line> lines() {
      List<Line> lines = new ArrayList<>();
      lines.add(line("as planned", groups, stations, crew.scramblers(), crew.runners()));
      boolean sharing = leastTime.seating() == Seating.ROTATING;
      for (int step : STEPS) {
        int used = stations + step;
        boolean useful = used >= 1 && used <= Math.min(free, largestOf(groups));
        if (sharing && useful && mayHold(largestOf(groups), used)) {
          lines.add(line(words(step, "station"), groups, used, crew.scramblers(), crew.runners()));
        }
      }
      for (int step : STEPS) {
        if (crew.scramblers() + step >= 1 && crew.scramblers() > 0) {
          int scramblers = crew.scramblers() + step;
          lines.add(line(words(step, "scrambler"), groups, stations, scramblers, crew.runners()));
        }
      }
      for (int step : STEPS) {
        if (crew.runners() + step >= 1 && crew.runners() > 0) {
          int runners = crew.runners() + step;
          lines.add(line(words(step, "runner"), groups, stations, crew.scramblers(), runners));
        }
      }
      for (int step : STEPS) {
        int count = groups + step;
        if (count >= 1 && count <= entrants.size()) {
          int used = Math.min(free, largestOf(count));
          if (!mayHold(largestOf(count), used)) {
            continue;
          }
          Round.CrewSize wanted = leastTime.wantedCrew(largestOf(count), used);
          lines.add(line(words(step, "group"), count, used, wanted.scramblers(), wanted.runners()));
        }
      }
      return lines;
    }

    private static String words(int step, String thing) {
      int size = Math.abs(step);
      return size + " " + thing + (size == 1 ? "" : "s") + (step > 0 ? " more" : " fewer");
    }

    /** The line of a way: the longest group decides on minutes. */
    private Line line(String change, int count, int most, int scramblers, int runners) {
      Line longest = null;
      int slot = 0;
      for (List<String> people : RoundForecast.seeded(leastTime, round, entrants, count)) {
        int used = Math.min(most, people.size());
        Round.CrewSize hands = new Round.CrewSize(used, scramblers, runners);
        GroupSimulation days =
            GroupSimulation.of(
                leastTime, people, used, hands, GroupSimulation.SIGMA, GroupSimulation.RUNS, seed);
        double percentile = days.minutes(leastTime.slotPercentile());
        int least = new LeastTime(event, crewed(hands)).minutes(people, used);
        slot = Math.max(slot, Math.max(least, leastTime.onGrid(percentile)));
        if (longest == null || percentile > longest.percentileMinutes()) {
          int judges = round.crew().map(Round.CrewSize::judges).orElse(used);
          longest =
              new Line(
                  change,
                  count,
                  used,
                  scramblers,
                  runners,
                  days.medianMinutes(),
                  percentile,
                  0,
                  judges + scramblers + runners,
                  0,
                  days.bottleneck());
        }
      }
      return finished(longest, round.minutesPerGroup().orElse(slot));
    }

    private Line finished(Line line, int slot) {
      int setup = event.rules().setupMinutes();
      return new Line(
          line.change(),
          line.groups(),
          line.stations(),
          line.scramblers(),
          line.runners(),
          line.medianMinutes(),
          line.percentileMinutes(),
          slot,
          line.crewPeople(),
          line.groups() * slot + (line.groups() - 1) * setup,
          line.bottleneck());
    }

    private Round crewed(Round.CrewSize hands) {
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
          OptionalInt.empty(),
          round.groups(),
          round.minutesPerGroup(),
          Optional.of(hands),
          round.seeding(),
          round.notBefore(),
          round.notAfter(),
          round.entrants());
    }
  }
}
