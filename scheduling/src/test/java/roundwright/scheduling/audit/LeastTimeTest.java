package roundwright.scheduling.audit;

import static org.junit.jupiter.api.Assertions.assertEquals;

import java.math.BigDecimal;
import java.util.Map;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.CsvSource;
import roundwright.scheduling.Scene;
import roundwright.scheduling.model.Event;
import roundwright.scheduling.model.Group;

/** The least time of a group, worked out by hand from the page. */
final class LeastTimeTest {
  private static long least(Scene scene) {
    Event event = scene.event();
    Group group = scene.plan().groups().get(0);
    return LeastTime.minutes(new Directory(event), group);
  }

  private static Scene average(
      int people, Object expected, int stations, Map<String, Object> crew) {
    Scene scene =
        new Scene()
            .hall("main", 20)
            .discipline("cube3")
            .round("a", "cube3", 1)
            .set("countedBy", "average-of-5")
            .set("crew", crew);
    for (int i = 0; i < people; i++) {
      scene.person("p" + i).enters("cube3", expected);
    }
    scene.group("g", "a", 1, "main", "09:00-10:00").set("stations", stations);
    for (int i = 0; i < people; i++) {
      scene.solve("p" + i);
    }
    return scene;
  }

  private static Map<String, Object> crew(int judges, int scramblers, int runners) {
    return Map.of("judges", judges, "scramblers", scramblers, "runners", runners);
  }

  @ParameterizedTest
  @CsvSource({
    // people, expected, stations, scramblers, runners, minutes
    // path = 5 x (expected + 45) + 5 x (25 + 12); 18 s: 500 s x 1.2 = 600 s exactly
    "1, 18, 1, 1, 1, 10",
    "1, 18.0000001, 1, 1, 1, 15",
    // no scramblers: path = 5 x (expected + 45) + 5 x 12; 43 s: 500 s
    "1, 43, 1, 0, 1, 10",
    "1, 43.001, 1, 0, 1, 15",
    // no runners: path = 5 x (expected + 45) + 5 x 25; 30 s: 500 s
    "1, 30, 1, 1, 0, 10",
    "1, 30.001, 1, 1, 0, 15",
    // neither: path = work; 55 s: 500 s
    "1, 55, 1, 0, 0, 10",
    "1, 55.001, 1, 0, 0, 15",
    // stations: 6 x 300 / 2 = 900 s, x 1.2 = 1080 s, 18 minutes
    "6, 15, 2, 6, 6, 20",
    // scramblers: 12 x 5 x 25 / 1 = 1500 s, x 1.2 = 1800 s, 30 minutes exactly
    "12, 15, 12, 1, 12, 30",
    // runners: 20 x 5 x 12 / 1 = 1200 s, x 1.2 = 1440 s, 24 minutes
    "20, 15, 20, 20, 1, 25",
  })
  void the_scarcest_of_four_resources_decides(
      int people, BigDecimal expected, int stations, int scramblers, int runners, long minutes) {
    Scene scene = average(people, expected, stations, crew(1, scramblers, runners));
    assertEquals(minutes, least(scene));
  }

  @Test
  void in_fixed_seating_everybody_has_a_station_whatever_the_plan_says() {
    // sum of work / size = 300 s; longest path 485 s x 1.2 = 582 s
    Scene scene = average(6, 15, 2, crew(1, 6, 6));
    assertEquals(20, least(scene));
    assertEquals(10, least(scene.rule("seating", "fixed")));
  }

  @ParameterizedTest
  @CsvSource({
    // 5 x 100 + 225 + 5 x 37 = 910 s, x 1.2 = 1092 s
    "attempt, 100, 20",
    "attempt, 7000, 20",
    // 5 x 7000 is capped at 100 for the round: 100 + 225 + 185 = 510 s, x 1.2 = 612 s
    "round, 7000, 15",
    // 5 x 10 is not: 50 + 225 + 185 = 460 s, x 1.2 = 552 s
    "round, 10, 10",
  })
  void the_limit_caps_solving(String covers, int expected, long minutes) {
    assertEquals(minutes, least(capped(covers, 100, expected)));
  }

  private static Scene capped(String covers, int limit, int expected) {
    return new Scene()
        .hall("main", 20)
        .discipline("cube3")
        .round("a", "cube3", 1)
        .set("countedBy", "average-of-5")
        .set("timeLimitSeconds", limit)
        .set("limitCovers", covers)
        .set("crew", crew(1, 1, 1))
        .person("p0")
        .enters("cube3", expected)
        .group("g", "a", 1, "main", "09:00-10:00")
        .solve("p0");
  }

  @ParameterizedTest
  @CsvSource({
    // a x (expected + 45 + 37) x 1.2: 5 x 141.9 x 1.2 = 851.4 s; 2 x 142 x 1.2 = 340.8 s
    "average-of-5, 59.9, 2, 15",
    "average-of-5, 60, 2, 10",
    "average-of-5, 60.1, 2, 10",
    // at most the round's own attempts: 2 x 142 x 1.2 = 340.8 s, 4 would be 681.6 s
    "best-of-2, 60, 4, 10",
    // 4 x 142 x 1.2 = 681.6 s
    "average-of-5, 60, 4, 15",
  })
  void who_is_not_under_the_cut_off_stops_after_its_attempts(
      String countedBy, BigDecimal expected, int attempts, long minutes) {
    Scene scene =
        new Scene()
            .hall("main", 20)
            .discipline("cube3")
            .round("a", "cube3", 1)
            .set("countedBy", countedBy)
            .set("cutOff", Map.of("attempts", attempts, "seconds", 60))
            .set("crew", crew(1, 1, 1))
            .person("p0")
            .enters("cube3", expected)
            .group("g", "a", 1, "main", "09:00-10:00")
            .solve("p0");
    assertEquals(minutes, least(scene));
  }

  @Test
  void a_competitor_without_an_entry_counts_with_sixty_seconds() {
    Scene scene =
        new Scene()
            .hall("main", 20)
            .discipline("cube3")
            .round("a", "cube3", 1)
            .set("countedBy", "average-of-5")
            .set("crew", crew(1, 1, 1))
            .person("p0")
            .group("g", "a", 1, "main", "09:00-10:00")
            .solve("p0");
    // 5 x (60 + 45 + 37) = 710 s, x 1.2 = 852 s
    assertEquals(15, least(scene));
  }

  @Test
  void the_wanted_crew_follows_from_stations_size_and_rules() {
    // judges min(4, 8) = 4; scramblers ceil(4 / 3) = 2; runners ceil(4 / 5) = 1
    Scene scene = new Scene().hall("main", 20).discipline("cube3").round("a", "cube3", 1);
    scene.person("p0").enters("cube3", 20);
    scene.group("g", "a", 1, "main", "09:00-10:00").set("stations", 4);
    scene.solve("p0", "p0", "p0", "p0", "p0", "p0", "p0", "p0");
    assertEquals(new WantedCrew(4, 2, 1), wanted(scene));
    scene.rule("stationsPerScrambler", 0).rule("stationsPerRunner", 0.5);
    assertEquals(new WantedCrew(4, 0, 8), wanted(scene));
    scene.set("stations", 20).rule("stationsPerScrambler", 8).rule("stationsPerRunner", 9);
    assertEquals(new WantedCrew(8, 1, 1), wanted(scene));
  }

  private static WantedCrew wanted(Scene scene) {
    return WantedCrew.of(new Directory(scene.event()), scene.plan().groups().get(0));
  }

  @Test
  void slack_and_grid_are_the_rules_own() {
    // path 500 s: slack 1 -> 500 s, grid 1 -> 9 minutes; slack 3 -> 1500 s = 25 minutes
    Scene scene = average(1, 18, 1, crew(1, 1, 1)).rule("slack", 1).rule("startGridMinutes", 1);
    assertEquals(9, least(scene));
    assertEquals(25, least(scene.rule("slack", 3)));
    assertEquals(28, least(scene.rule("startGridMinutes", 7)));
  }
}
