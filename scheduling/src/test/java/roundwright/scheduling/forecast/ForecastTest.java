package roundwright.scheduling.forecast;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertTrue;

import java.math.BigDecimal;
import java.util.ArrayList;
import java.util.List;
import java.util.Map;
import java.util.Optional;
import java.util.Random;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.CsvSource;
import roundwright.scheduling.RandomEvents;
import roundwright.scheduling.RandomPlans;
import roundwright.scheduling.Scene;
import roundwright.scheduling.audit.Auditor;
import roundwright.scheduling.cost.RuleName;
import roundwright.scheduling.model.Event;
import roundwright.scheduling.model.Group;
import roundwright.scheduling.model.Plan;
import roundwright.scheduling.model.Round;

final class ForecastTest {
  private static Round round(Event event, String id) {
    return event.rounds().stream().filter(round -> round.id().equals(id)).findFirst().orElseThrow();
  }

  @Test
  void a_group_of_its_least_time_is_not_too_short_for_the_auditor_and_a_minute_less_is() {
    for (long seed = 0; seed < 80; seed++) {
      Event event = RandomEvents.wild(seed).event();
      Auditor auditor = new Auditor(event);
      for (Group group : RandomPlans.bad(event, seed).groups()) {
        Round round = round(event, group.round());
        if (round.minutesPerGroup().isPresent()) {
          continue;
        }
        int least = new LeastTime(event, round).minutes(group.competitors(), group.stations());
        assertEquals(0, tooShort(auditor, group, least), "seed " + seed + ", " + group);
        if (least > 1) {
          assertEquals(1, tooShort(auditor, group, least - 1), "seed " + seed + ", " + group);
        }
      }
    }
  }

  private static int tooShort(Auditor auditor, Group group, int minutes) {
    Group other =
        new Group(
            group.id(),
            group.round(),
            group.number(),
            group.hall(),
            group.stations(),
            group.start(),
            group.start().plusSeconds(minutes * 60L),
            group.competitors(),
            group.crew());
    return auditor
        .audit(new Plan(List.of(other), Optional.empty(), List.of()))
        .amounts()
        .getOrDefault(RuleName.TOO_SHORT, BigDecimal.ZERO)
        .intValueExact();
  }

  @Test
  void entrants_are_those_the_auditor_misses_where_there_is_no_group() {
    for (long seed = 0; seed < 100; seed++) {
      Event event = RandomEvents.wild(seed).event();
      Entrants entrants = Entrants.of(event);
      List<List<String>> missed = new ArrayList<>();
      for (Round round : event.rounds()) {
        entrants.ids(round.id()).forEach(person -> missed.add(List.of(person)));
      }
      List<List<String>> found =
          new Auditor(event)
              .audit(Plan.EMPTY).findings().stream()
                  .filter(finding -> finding.rule() == RuleName.ENTRY_MISSING)
                  .map(finding -> finding.people())
                  .toList();
      assertEquals(missed, found, "seed " + seed);
    }
  }

  private static Scene chain(String advance, Object value) {
    return new Scene()
        .hall("main", 10)
        .discipline("cube3")
        .round("a", "cube3", 1)
        .advance(advance, value)
        .round("b", "cube3", 2)
        .person("d")
        .enters("cube3", 30)
        .person("c")
        .enters("cube3", 10)
        .person("b")
        .enters("cube3", 20)
        .person("a")
        .enters("cube3", 20);
  }

  @ParameterizedTest
  @CsvSource({
    "count, 1, c",
    "count, 2, c a",
    "count, 3, c a b",
    "count, 9, c a b d",
    "percent, 1, c",
    "percent, 49.9, c",
    "percent, 50, c a",
    "percent, 74, c a",
    "percent, 75, c a b",
    "percent, 100, c a b d",
    "underSeconds, 10, ''",
    "underSeconds, 20, c",
    "underSeconds, 20.1, c a b",
  })
  void the_fastest_go_on_and_ties_go_by_id(String by, BigDecimal value, String ids) {
    Entrants entrants = Entrants.of(chain(by, value).event());
    assertEquals(ids, String.join(" ", entrants.ids("b")));
    assertEquals(List.of("d", "c", "b", "a"), entrants.ids("a"));
    assertTrue(entrants.areMerelyLikely("b"));
  }

  @ParameterizedTest
  @CsvSource({
    // people, expected, stations, scramblers, runners, what it hangs on
    "12, 60, 4, 6, 6, STATIONS",
    "12, 10, 12, 1, 6, SCRAMBLERS",
    "12, 10, 12, 12, 1, RUNNERS",
    "2, 60, 2, 2, 2, LONGEST_PATH",
  })
  void the_bottleneck_is_named(
      int people, int expected, int stations, int scramblers, int runners, Bottleneck bottleneck) {
    Scene scene =
        new Scene()
            .hall("main", 20)
            .discipline("cube3")
            .set("carrySeconds", 20)
            .round("a", "cube3", 1)
            .set("countedBy", "average-of-5")
            .set("crew", Map.of("judges", 1, "scramblers", scramblers, "runners", runners));
    List<String> competitors = new ArrayList<>();
    for (int i = 0; i < people; i++) {
      competitors.add("p" + i);
      scene.person("p" + i).enters("cube3", expected);
    }
    Event event = scene.event();
    GroupForecast forecast =
        GroupForecast.of(new LeastTime(event, round(event, "a")), competitors, stations);
    assertEquals(bottleneck, forecast.bottleneck());
    if (bottleneck != Bottleneck.LONGEST_PATH) {
      double busiest =
          forecast.use().values().stream().mapToDouble(Double::doubleValue).max().orElseThrow();
      assertEquals(busiest, forecast.use().get(bottleneck));
    }
  }

  @Test
  void the_steady_forecast_is_never_under_the_bounds() {
    Random random = new Random(7);
    for (long seed = 0; seed < 100; seed++) {
      Event event = RandomEvents.wild(seed).event();
      Plan plan = RandomPlans.bad(event, seed);
      for (Group group : plan.groups()) {
        LeastTime leastTime = new LeastTime(event, round(event, group.round()));
        int stations = 1 + random.nextInt(12);
        GroupForecast forecast = GroupForecast.of(leastTime, group.competitors(), stations);
        double bound =
            leastTime.terms(group.competitors(), stations).seconds().values().stream()
                .mapToDouble(LeastTime.Fraction::value)
                .max()
                .orElseThrow();
        assertTrue(
            forecast.steadyMinutes() * 60 >= bound * (1 - 1e-9),
            "seed " + seed + ": " + forecast + " against " + bound);
      }
    }
  }

  @Test
  void a_round_is_cut_into_the_fewest_groups_of_its_largest_hall() {
    Scene scene =
        new Scene()
            .hall("annex", 5)
            .hall("main", 10)
            .hall("loft", 20)
            .discipline("cube3")
            .round("a", "cube3", 1)
            .set("halls", List.of("annex", "main"))
            .set("countedBy", "average-of-5");
    for (int i = 0; i < 33; i++) {
      scene.person("p" + i).enters("cube3", 10 + i);
    }
    RoundForecast forecast = RoundForecast.of(scene.event()).get(0);
    assertEquals("main", forecast.hall().orElseThrow().id());
    // capacity floor(1.6 x 10) = 16: three groups of eleven on ten stations
    assertEquals(
        List.of(11, 11, 11), forecast.groups().stream().map(GroupForecast::competitors).toList());
    assertEquals(10, forecast.groups().get(0).stations());
    // the slow group comes first and takes longest
    assertEquals(forecast.groups().get(0), forecast.longest().orElseThrow());
    assertEquals(forecast.groups().get(0).leastMinutes(), forecast.slotMinutes());
    assertEquals(33, forecast.entrants());
  }

  @Test
  void a_round_without_entrants_or_without_a_hall_has_no_groups() {
    Scene scene =
        new Scene()
            .hall("main", 10)
            .discipline("cube3")
            .set("needs", List.of("quiet"))
            .round("a", "cube3", 1)
            .discipline("blind")
            .round("b", "blind", 1)
            .person("p")
            .enters("cube3", 20);
    List<RoundForecast> forecasts = RoundForecast.of(scene.event());
    assertTrue(forecasts.get(0).groups().isEmpty());
    assertTrue(forecasts.get(0).hall().isEmpty());
    assertTrue(forecasts.get(1).groups().isEmpty());
    assertEquals(0, forecasts.get(1).slotMinutes());
  }
}
