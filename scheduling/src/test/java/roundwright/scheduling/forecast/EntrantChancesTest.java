package roundwright.scheduling.forecast;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertTrue;

import java.util.List;
import java.util.Map;
import java.util.TreeSet;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.CsvSource;
import roundwright.scheduling.Scene;
import roundwright.scheduling.model.Event;

final class EntrantChancesTest {
  private static final int DAYS = 4000;

  private static Scene alike(int people, String countedBy, String advance, Object value) {
    Scene scene =
        new Scene()
            .hall("main", 10)
            .discipline("cube3")
            .round("a", "cube3", 1)
            .set("countedBy", countedBy)
            .advance(advance, value)
            .round("b", "cube3", 2)
            .set("countedBy", countedBy)
            .advance("count", 2)
            .round("c", "cube3", 3)
            .set("countedBy", countedBy);
    for (int i = 0; i < people; i++) {
      scene.person("p" + i).enters("cube3", 20);
    }
    return scene;
  }

  @ParameterizedTest(name = "{0}, {1} {2}")
  @CsvSource({
    "average-of-5, count, 6, 6",
    "mean-of-3, percent, 40, 4",
    "best-of-2, percent, 49, 4",
    "best-of-1, percent, 1, 1"
  })
  void people_alike_have_the_same_chance_in_every_later_round(
      String countedBy, String advance, int value, int going) {
    EntrantChances chances =
        EntrantChances.of(alike(10, countedBy, advance, value).event(), 0.25, DAYS, 11);
    assertEquals(going, chances.entrants("b", 50));
    int last = Math.min(2, going);
    assertEquals(last, chances.entrants("c", 50));
    for (int i = 0; i < 10; i++) {
      assertEquals(1, chances.of("a").get("p" + i));
      assertEquals(going / 10.0, chances.of("b").get("p" + i), 0.035, "p" + i);
      assertEquals(last / 10.0, chances.of("c").get("p" + i), 0.03, "p" + i);
    }
    double sum = chances.of("b").values().stream().mapToDouble(Double::doubleValue).sum();
    assertEquals(going, sum, 1e-9);
  }

  /**
   * One log-normal is under another as their difference of logarithms, a normal one, is under 0.
   */
  @Test
  void one_of_two_wins_as_often_as_the_normal_distribution_says() {
    Scene scene =
        new Scene()
            .hall("main", 10)
            .discipline("cube3")
            .round("a", "cube3", 1)
            .advance("count", 1)
            .round("b", "cube3", 2)
            .person("fast")
            .enters("cube3", 20)
            .person("slow")
            // 0.25 x root of 2 = 0.353553 in the logarithm: one standard deviation
            .enters("cube3", 28.4824);
    EntrantChances chances = EntrantChances.of(scene.event(), 0.25, DAYS, 3);
    assertEquals(0.8413, chances.of("b").get("fast"), 0.02);
    assertEquals(0.1587, chances.of("b").get("slow"), 0.02);
    assertEquals(List.of("fast", "slow"), List.copyOf(chances.of("b").keySet()));
  }

  /** P(20 exp(0.25 z - 0.03125) < 16) = P(z < -0.7676) = 0.2214. */
  @Test
  void under_so_many_seconds_each_has_the_chance_of_a_log_normal() {
    EntrantChances chances =
        EntrantChances.of(alike(10, "best-of-1", "underSeconds", 16).event(), 0.25, DAYS, 9);
    for (int i = 0; i < 10; i++) {
      assertEquals(0.2214, chances.of("b").get("p" + i), 0.027, "p" + i);
    }
    assertTrue(chances.entrants("b", 5) < chances.entrants("b", 95));
  }

  /** Of three attempts the best is under t unless all three are not: 1 - (1 - 0.2214)^3. */
  @Test
  void the_best_of_three_is_under_more_often() {
    EntrantChances chances =
        EntrantChances.of(alike(10, "best-of-3", "underSeconds", 16).event(), 0.25, DAYS, 9);
    assertEquals(0.528, chances.of("b").get("p0"), 0.032);
  }

  @Test
  void without_chance_the_entrants_are_the_likely_ones() {
    Scene scene = alike(0, "average-of-5", "percent", 35);
    for (int i = 0; i < 23; i++) {
      scene.person("p" + i).enters("cube3", 10 + (i * 7) % 23);
    }
    Event event = scene.event();
    EntrantChances chances = EntrantChances.of(event, 0, 1, 1);
    for (String round : List.of("a", "b", "c")) {
      assertEquals(
          new TreeSet<>(Entrants.of(event).ids(round)),
          new TreeSet<>(chances.of(round).keySet()),
          round);
    }
  }

  @Test
  void a_round_that_continues_has_the_same_people_and_named_ones_are_certain() {
    Event event =
        new Scene()
            .hall("main", 10)
            .discipline("cube3")
            .round("a", "cube3", 1)
            .set("continues", false)
            .round("b", "cube3", 2)
            .set("continues", true)
            .advance("count", 1)
            .round("c", "cube3", 3)
            .advance("count", 1)
            .round("d", "cube3", 4)
            .set("entrants", List.of("p2"))
            .person("p1")
            .enters("cube3", 20)
            .person("p2")
            .enters("cube3", 60)
            .event();
    EntrantChances chances = EntrantChances.of(event, 7);
    assertEquals(Map.of("p1", 1.0, "p2", 1.0), chances.of("b"));
    assertTrue(chances.of("c").get("p1") > 0.99);
    assertEquals(Map.of("p2", 1.0), chances.of("d"));
  }

  @Test
  void who_never_ends_within_the_limit_does_not_go_on() {
    Event event =
        new Scene()
            .hall("main", 10)
            .discipline("cube3")
            .round("a", "cube3", 1)
            .set("countedBy", "average-of-5")
            .set("timeLimitSeconds", 30)
            .advance("count", 2)
            .round("b", "cube3", 2)
            .person("in")
            .enters("cube3", 10)
            .person("over")
            .enters("cube3", 900)
            .event();
    assertEquals(Map.of("in", 1.0), EntrantChances.of(event, 7).of("b"));
  }
}
