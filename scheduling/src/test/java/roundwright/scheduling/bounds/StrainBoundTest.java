package roundwright.scheduling.bounds;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertTrue;

import java.util.Map;
import java.util.Optional;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.CsvSource;
import org.junit.jupiter.params.provider.ValueSource;
import roundwright.scheduling.Effort;
import roundwright.scheduling.Planner;
import roundwright.scheduling.Progress;
import roundwright.scheduling.RandomEvents;
import roundwright.scheduling.Scene;
import roundwright.scheduling.cost.Level;
import roundwright.scheduling.cost.RuleName;
import roundwright.scheduling.model.Event;
import roundwright.scheduling.model.Plan;

class StrainBoundTest {
  private static final double TENTH = 0.05;

  /** One group of half an hour, two of four helpers judging: by hand, see each test. */
  private static Scene halfAnHour() {
    return new Scene()
        .hall("main", 4)
        .discipline("cube3")
        .round("a", "cube3", 1)
        .set("minutesPerGroup", 30)
        .set("crew", Map.of("judges", 2, "scramblers", 0, "runners", 0))
        .person("ada")
        .enters("cube3", 20)
        .person("bo")
        .judges()
        .person("cy")
        .judges()
        .person("di")
        .judges()
        .person("ed")
        .judges()
        .group("g1", "a", 1, "main", "09:00-09:30")
        .solve("ada")
        .judge("bo", "cy");
  }

  private static Scene withOnly(Scene scene, RuleName... kept) {
    for (RuleName rule : RuleName.values()) {
      if (rule.level() == Level.STRAIN && !java.util.List.of(kept).contains(rule)) {
        scene.weight(rule, 0);
      }
    }
    return scene;
  }

  @Test
  void aFlowMayShareTwoDutiesAmongFourPeople() {
    Scene scene = withOnly(halfAnHour(), RuleName.LOAD);
    // A quarter of an hour each: 4 times 0.5 times 1 squared. The plan: twice 0.5 times 2 squared.
    StrainBound bound = StrainBound.of(scene.event(), scene.plan()).orElseThrow();
    assertEquals(4.0, bound.strain(), TENTH);
    assertEquals(2.0, bound.least(), TENTH);
  }

  @Test
  void everyDutyMinuteAndEveryGroupOfOnesOwnIsTimeOnSite() {
    Scene scene = withOnly(halfAnHour(), RuleName.WAITING);
    // An hour of duties and half an hour of solving at 4 an hour, however they are shared.
    StrainBound bound = StrainBound.of(scene.event(), scene.plan()).orElseThrow();
    assertEquals(6.0, bound.strain(), TENTH);
    assertEquals(6.0, bound.least(), TENTH);
  }

  @Test
  void theDayPlansOwnPartIsExact() {
    Scene scene = withOnly(halfAnHour(), RuleName.LATE_FINISH);
    StrainBound bound = StrainBound.of(scene.event(), scene.plan()).orElseThrow();
    assertEquals(30.0, bound.exact(), TENTH);
    assertEquals(bound.strain(), bound.least(), TENTH);
  }

  @Test
  void saysNothingOfAPlanThatBreaksARule() {
    Scene scene = halfAnHour().person("flo").enters("cube3", 30);
    assertEquals(Optional.empty(), StrainBound.of(scene.event(), scene.plan()));
  }

  @ParameterizedTest
  @ValueSource(longs = {1, 2, 3, 4, 5, 6, 7, 8, 9, 10, 11, 12})
  void noPlanFoundHasLess(long seed) {
    Event event = RandomEvents.fair(seed, 25, 1 + (int) seed % 2, 1 + (int) seed % 3).event();
    Plan plan = Planner.plan(event, Effort.ofSteps(60_000).withSeed(seed), Progress.NONE);
    StrainBound.of(event, plan)
        .ifPresent(
            bound -> {
              assertTrue(bound.least() <= bound.strain(), "seed " + seed + ": " + bound);
              assertTrue(bound.least() > 0, "seed " + seed + ": " + bound);
            });
  }

  /**
   * The bar for load: the flow is a bound for whoever shares duties more finely than a plan may.
   */
  @ParameterizedTest
  @CsvSource({"1, 95, 1, 1", "2, 230, 2, 2"})
  void whereOnlyLoadCountsThePlanComesWithinOnePercent(long seed, int people, int halls, int days) {
    Event event = withOnly(RandomEvents.fair(seed, people, halls, days), RuleName.LOAD).event();
    Plan plan = Planner.plan(event, Effort.ofSteps(600_000), Progress.NONE);
    StrainBound bound = StrainBound.of(event, plan).orElseThrow();
    assertTrue(bound.strain() <= 1.01 * bound.least(), bound.says());
  }
}
