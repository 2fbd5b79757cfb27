package roundwright.scheduling.forecast;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertThrows;
import static org.junit.jupiter.api.Assertions.assertTrue;

import java.util.ArrayList;
import java.util.List;
import java.util.Map;
import java.util.Random;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.CsvSource;
import roundwright.scheduling.RandomEvents;
import roundwright.scheduling.RandomPlans;
import roundwright.scheduling.Scene;
import roundwright.scheduling.model.Event;
import roundwright.scheduling.model.Group;
import roundwright.scheduling.model.Round;

final class GroupSimulationTest {
  /** Hand-made times: 20 s to handle, 10 s to scramble, 5 s to carry. */
  private static Scene scene() {
    return new Scene()
        .hall("main", 10)
        .discipline("cube3")
        .set("handlingSeconds", 20)
        .set("scrambleSeconds", 10)
        .set("carrySeconds", 5);
  }

  private static LeastTime leastTime(Scene scene) {
    Event event = scene.event();
    return new LeastTime(event, event.rounds().get(0));
  }

  private static double exactSeconds(
      LeastTime leastTime, List<String> people, int stations, int scramblers, int runners) {
    Round.CrewSize crew = new Round.CrewSize(stations, scramblers, runners);
    return 60 * GroupSimulation.of(leastTime, people, stations, crew, 0, 1, 1).medianMinutes();
  }

  @ParameterizedTest(name = "{0}")
  @CsvSource({
    // one alone: two attempts of 10 + 5 + 50 + 5
    "one alone, 1, 1, 1, 1, 140",
    "no scrambler and no runner, 1, 1, 0, 0, 100",
    // p1 solves 15-65 and 80-130 but for p2, who stands at the only station 65-115; p1 again
    // 115-165, p2 165-215, and back at 220
    "two at one station, 2, 1, 2, 2, 220",
    "two at two stations, 2, 2, 2, 2, 140",
    // scrambled 0-10 and 10-20, and the second pair of attempts 70-80 and 80-90: 10 later
    "two with one scrambler, 2, 2, 1, 2, 150"
  })
  void lengths_without_chance_are_those_worked_out_by_hand(
      String what, int people, int stations, int scramblers, int runners, double seconds) {
    Scene scene = scene().round("a", "cube3", 1).set("countedBy", "best-of-2");
    List<String> ids = new ArrayList<>();
    for (int i = 1; i <= people; i++) {
      scene.person("p" + i).enters("cube3", 30);
      ids.add("p" + i);
    }
    assertEquals(
        seconds, exactSeconds(leastTime(scene), ids, stations, scramblers, runners), 1e-6, what);
  }

  @Test
  void cut_off_and_limits_end_attempts() {
    Scene cut =
        scene()
            .round("a", "cube3", 1)
            .set("countedBy", "average-of-5")
            .set("cutOff", Map.of("attempts", 2, "seconds", 30))
            .person("under")
            .enters("cube3", 29)
            .person("not")
            .enters("cube3", 30);
    assertEquals(5 * 69, exactSeconds(leastTime(cut), List.of("under"), 1, 1, 1), 1e-6);
    assertEquals(2 * 70, exactSeconds(leastTime(cut), List.of("not"), 1, 1, 1), 1e-6);
    Scene limit =
        scene()
            .round("a", "cube3", 1)
            .set("countedBy", "mean-of-3")
            .set("timeLimitSeconds", 100)
            .person("slow")
            .enters("cube3", 200);
    assertEquals(3 * 140, exactSeconds(leastTime(limit), List.of("slow"), 1, 1, 1), 1e-6);
    Scene together =
        scene()
            .round("a", "cube3", 1)
            .set("countedBy", "mean-of-3")
            .set("timeLimitSeconds", 100)
            .set("limitCovers", "round")
            .person("slow")
            .enters("cube3", 60);
    // 60 and what is left, 40; no third attempt
    assertEquals(100 + 2 * 40, exactSeconds(leastTime(together), List.of("slow"), 1, 1, 1), 1e-6);
  }

  @ParameterizedTest(name = "{0} customers, {1} stations, {2} scramblers, {3} runners")
  @CsvSource({
    "1, 1, 1, 1",
    "6, 2, 1, 1",
    "12, 5, 2, 2",
    "12, 12, 1, 3",
    "20, 8, 3, 1",
    "9, 1, 4, 4"
  })
  void with_exponential_times_the_throughput_is_that_of_exact_mean_value_analysis(
      int customers, int stations, int scramblers, int runners) {
    double[] means = {25, 6, 60, 6};
    int attempts = 30_000;
    Chance chance = new Chance(20_270_508L + customers);
    Carousel carousel = new Carousel(customers, stations, scramblers, runners);
    for (int puzzle = 0; puzzle < customers; puzzle++) {
      carousel.attempts(puzzle, attempts);
    }
    double seconds = carousel.run((puzzle, attempt, step) -> chance.exponential(means[step]));
    ClosedLoop loop =
        new ClosedLoop(
            List.of(
                new ClosedLoop.Centre("stations", 60, 1, stations),
                new ClosedLoop.Centre("scramblers", 25, 1, scramblers),
                new ClosedLoop.Centre("runners", 6, 2, runners)),
            0);
    double throughput = (double) customers * attempts / seconds;
    double exact = loop.throughput(customers);
    assertEquals(1, throughput / exact, 0.015);
    assertTrue(throughput < 1.01 * loop.mostThroughput(customers));
    assertEquals(
        exact * 60 / stations,
        carousel.busySeconds(Carousel.STATION) / (stations * seconds),
        0.015);
  }

  /**
   * The machine repair model (Feller 1950, chapter XVII): machines run for a while each, and one
   * repairer mends them. Its states are a birth-and-death chain, solved here by balance.
   */
  @Test
  void a_scrambler_and_people_with_a_station_each_are_machines_and_their_repairer() {
    int machines = 7;
    double runs = 90;
    double repair = 20;
    double[] down = new double[machines + 1];
    down[0] = 1;
    double sum = 1;
    for (int k = 1; k <= machines; k++) {
      down[k] = down[k - 1] * (machines - k + 1) * repair / runs;
      sum += down[k];
    }
    Chance chance = new Chance(5);
    Carousel carousel = new Carousel(machines, machines, 1, 0);
    for (int puzzle = 0; puzzle < machines; puzzle++) {
      carousel.attempts(puzzle, 30_000);
    }
    double seconds =
        carousel.run((puzzle, attempt, step) -> chance.exponential(step == 0 ? repair : runs));
    assertEquals(1 - down[0] / sum, carousel.busySeconds(Carousel.SCRAMBLER) / seconds, 0.015);
  }

  /** Denning & Buzen 1978, and nothing slower than one thing at a time. */
  @Test
  void no_group_of_any_event_is_shorter_than_its_bounds() {
    int groups = 0;
    int bounded = 0;
    for (long seed = 0; seed < 60; seed++) {
      Event event = RandomEvents.wild(seed).event();
      for (Group group : RandomPlans.bad(event, seed).groups()) {
        Round round =
            event.rounds().stream()
                .filter(one -> one.id().equals(group.round()))
                .findFirst()
                .orElseThrow();
        LeastTime leastTime = new LeastTime(event, round);
        LeastTime.Terms terms = leastTime.terms(group.competitors(), group.stations());
        Round.CrewSize crew = leastTime.wantedCrew(terms.size(), group.stations());
        GroupSimulation days =
            GroupSimulation.of(leastTime, group.competitors(), group.stations(), crew, 0, 1, seed);
        double most = 0;
        double together = 0;
        for (LeastTime.Fraction fraction : terms.seconds().values()) {
          most = Math.max(most, fraction.value());
          together += fraction.seconds().doubleValue();
        }
        String about = "seed " + seed + ", " + group;
        // the least time counts attempts by what is expected: it knows neither that a limit over
        // the
        // round ends them nor that who runs into the limit is not under a longer cut-off
        boolean counted =
            round.limitCovers() == Round.LimitCovers.ATTEMPT
                && (round.cutOff().isEmpty()
                    || round.cutOff().get().seconds().compareTo(round.timeLimitSeconds()) <= 0);
        if (counted) {
          assertTrue(days.medianMinutes() * 60 >= most - 1e-6, about);
          bounded++;
        }
        assertTrue(days.medianMinutes() * 60 <= together + 1e-6, about);
        days.use().values().forEach(use -> assertTrue(use >= 0 && use <= 1 + 1e-9, about));
        groups++;
      }
    }
    assertTrue(bounded > 100, bounded + " of " + groups + " groups");
  }

  @Test
  void a_seed_gives_the_same_days_and_percentiles_rise() {
    Event event = RandomEvents.fair(3, 60, 1, 1).event();
    LeastTime leastTime = new LeastTime(event, event.rounds().get(0));
    List<String> people = Entrants.of(event).ids(event.rounds().get(0).id());
    GroupSimulation once = GroupSimulation.of(leastTime, people, 8, 4);
    GroupSimulation again = GroupSimulation.of(leastTime, people, 8, 4);
    double before = 0;
    for (int percentile = 1; percentile <= 100; percentile++) {
      assertEquals(once.minutes(percentile), again.minutes(percentile));
      assertTrue(once.minutes(percentile) >= before);
      before = once.minutes(percentile);
    }
    assertTrue(once.minutes(95) > once.medianMinutes());
    assertThrows(IllegalArgumentException.class, () -> once.minutes(0));
    assertThrows(
        IllegalArgumentException.class, () -> GroupSimulation.of(leastTime, List.of(), 8, 4));
  }

  /** Forecasts against days told by another program and another source of chance. */
  @Test
  void half_of_all_days_end_before_the_median_and_nine_in_ten_before_the_ninetieth_percentile() {
    int days = 0;
    int beforeMedian = 0;
    int beforeNinetieth = 0;
    Random truth = new Random(977);
    for (long seed = 0; seed < 12; seed++) {
      Event event = RandomEvents.fair(seed, 95, 1, 1).event();
      for (RoundForecast forecast : RoundForecast.of(event)) {
        if (forecast.groups().isEmpty()) {
          continue;
        }
        LeastTime leastTime = new LeastTime(event, forecast.round());
        List<String> ids = Entrants.of(event).ids(forecast.round().id());
        int count = forecast.groups().size();
        for (List<String> people : RoundForecast.seeded(leastTime, forecast.round(), ids, count)) {
          int stations = forecast.groups().get(0).stations();
          int used = Math.min(stations, people.size());
          GroupSimulation forecasted = GroupSimulation.of(leastTime, people, used, seed);
          for (int day = 0; day < 5; day++) {
            double took = NaiveDay.minutes(leastTime, people, used, truth);
            days++;
            beforeMedian += took <= forecasted.medianMinutes() ? 1 : 0;
            beforeNinetieth += took <= forecasted.minutes(90) ? 1 : 0;
          }
        }
      }
    }
    String about = days + " days: " + beforeMedian + " and " + beforeNinetieth;
    assertTrue(days > 1000, about);
    assertEquals(0.5, (double) beforeMedian / days, 0.05, about);
    assertEquals(0.9, (double) beforeNinetieth / days, 0.05, about);
  }
}
