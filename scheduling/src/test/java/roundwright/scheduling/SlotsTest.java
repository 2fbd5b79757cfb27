package roundwright.scheduling;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertFalse;
import static org.junit.jupiter.api.Assertions.assertTrue;

import java.time.Duration;
import java.util.List;
import org.junit.jupiter.api.Test;
import roundwright.scheduling.cost.Finding;
import roundwright.scheduling.cost.RuleName;
import roundwright.scheduling.forecast.LeastTime;
import roundwright.scheduling.forecast.Overruns;
import roundwright.scheduling.model.Event;
import roundwright.scheduling.model.Group;
import roundwright.scheduling.model.Plan;

/** How long slots are where the least time by the rules would not do on most days. */
class SlotsTest {
  /** No slack at all: the least time is what the scarcest resource needs if it never waits. */
  private static Scene withoutSlack(String open) {
    Scene scene =
        new Scene()
            .hall("main", 6)
            .open(open)
            .discipline("cube3")
            .round("a", "cube3", 1)
            .set("countedBy", "average-of-5")
            .rule("slack", 1)
            .rule("startGridMinutes", 1)
            .rule("meals", List.of());
    for (int i = 0; i < 26; i++) {
      scene.person("p" + i).judges().runs().scrambles("cube3").enters("cube3", 20 + i);
    }
    return scene;
  }

  private static Plan planned(Event event) {
    return Planner.plan(event, Effort.ofSteps(20_000), Progress.NONE);
  }

  private static List<Finding> overruns(Plan plan) {
    return plan.findings().stream()
        .filter(finding -> finding.rule() == RuleName.LIKELY_OVERRUN)
        .toList();
  }

  @Test
  void aSlotIsLongEnoughForMostDaysWhereTheHallHasTheTime() {
    Event event = withoutSlack("09:00-18:00").event();
    Plan plan = planned(event);
    assertEquals(0, plan.score().orElseThrow().breaches());
    for (Finding overrun : overruns(plan)) {
      assertTrue(overrun.amount().doubleValue() < 1, overrun.says());
    }
  }

  @Test
  void aSlotIsAsShortAsTheRulesAllowWhereTheHallHasNoMoreAndThePlanSaysSo() {
    Event roomy = withoutSlack("09:00-18:00").event();
    Plan plan = planned(roomy);
    LeastTime least = new LeastTime(roomy, roomy.rounds().get(0));
    long longer = 0;
    long last = 0;
    for (Group group : plan.groups()) {
      long minutes = Duration.between(group.start(), group.end()).toMinutes();
      longer += minutes - least.minutes(group.competitors(), group.stations());
      last = Math.max(last, group.end().atZone(roomy.zone()).toLocalTime().toSecondOfDay() / 60);
    }
    assertTrue(longer > 4, "slots are longer than the rules ask, by " + longer);
    long closing = last - longer / 2;
    String to = String.format("%02d:%02d", closing / 60, closing % 60);
    Event tight = withoutSlack("09:00-" + to).event();
    Plan shorter = planned(tight);
    assertEquals(0, shorter.score().orElseThrow().breaches());
    assertFalse(overruns(shorter).isEmpty());
    assertEquals(Overruns.of(tight, shorter), overruns(shorter));
  }
}
