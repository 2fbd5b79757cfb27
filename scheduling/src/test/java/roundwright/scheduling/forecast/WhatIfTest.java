package roundwright.scheduling.forecast;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertTrue;

import java.math.BigDecimal;
import java.util.List;
import java.util.Optional;
import org.junit.jupiter.api.Test;
import roundwright.scheduling.RandomEvents;
import roundwright.scheduling.Scene;
import roundwright.scheduling.audit.Auditor;
import roundwright.scheduling.cost.Finding;
import roundwright.scheduling.cost.Level;
import roundwright.scheduling.cost.RuleName;
import roundwright.scheduling.model.Event;

final class WhatIfTest {
  /** Twelve people at twelve stations, and one scrambler who needs a minute for each scramble. */
  private static Scene oneSlowScrambler() {
    Scene scene =
        new Scene()
            .hall("main", 12)
            .rule("stationsPerScrambler", 12)
            .discipline("cube3")
            .set("scrambleSeconds", 60)
            .round("a", "cube3", 1)
            .set("countedBy", "average-of-5");
    for (int i = 0; i < 12; i++) {
      scene.person("p" + (10 + i)).enters("cube3", 15);
    }
    return scene;
  }

  private static WhatIf.Line line(WhatIf table, String change) {
    return table.lines().stream()
        .filter(line -> line.change().equals(change))
        .findFirst()
        .orElseThrow(() -> new AssertionError(change + " is not in " + table.lines()));
  }

  @Test
  void the_table_tells_which_resource_to_add() {
    Event event = oneSlowScrambler().event();
    WhatIf table = WhatIf.of(event, event.rounds().get(0), 1).orElseThrow();
    WhatIf.Line planned = table.lines().get(0);
    assertEquals("as planned", planned.change());
    assertEquals(Bottleneck.SCRAMBLERS, planned.bottleneck());
    // sixty scrambles of a minute, and the last one's way back
    assertTrue(planned.medianMinutes() >= 60 && planned.medianMinutes() < 63, planned.toString());
    assertEquals(75, planned.slotMinutes());
    WhatIf.Line second = line(table, "1 scrambler more");
    assertTrue(second.medianMinutes() < 0.55 * planned.medianMinutes(), second.toString());
    assertEquals(planned.crewPeople() + 1, second.crewPeople());
    assertTrue(line(table, "1 runner more").medianMinutes() > 0.97 * planned.medianMinutes());
    WhatIf.Line halves = line(table, "1 group more");
    assertEquals(2, halves.groups());
    assertEquals(6, halves.stations());
    assertEquals(2 * halves.slotMinutes() + 5, halves.togetherMinutes());
  }

  private static List<String> changes(int stations, int people, int groups) {
    Scene scene = new Scene().hall("main", stations).discipline("cube3").round("a", "cube3", 1);
    scene.set("groups", groups).set("countedBy", "average-of-5");
    for (int i = 0; i < people; i++) {
      scene.person("p" + (100 + i)).enters("cube3", 15);
    }
    Event event = scene.event();
    WhatIf table = WhatIf.of(event, event.rounds().get(0), 1).orElseThrow();
    return table.lines().stream().map(line -> line.change() + ": " + line.stations()).toList();
  }

  @Test
  void only_ways_that_the_hall_can_hold_are_told() {
    // Twelve stations hold 19 people, so 40 people need three groups, and 13 stations there are
    // not.
    List<String> full = changes(12, 40, 3);
    assertTrue(full.contains("1 group more: 10"), full.toString());
    assertTrue(full.stream().noneMatch(change -> change.contains("group fewer")), full.toString());
    assertTrue(full.stream().noneMatch(change -> change.contains("station more")), full.toString());
    // Two groups of twelve leave half of 24 stations idle; one group may use them all.
    List<String> idle = changes(24, 24, 2);
    assertTrue(idle.contains("1 group fewer: 24"), idle.toString());
  }

  @Test
  void the_first_line_is_the_round_as_forecast_and_nothing_is_below_one() {
    int tables = 0;
    for (long seed = 0; seed < 6; seed++) {
      Event event = RandomEvents.fair(seed, 60, 1, 1).event();
      for (RoundForecast forecast : RoundForecast.of(event)) {
        Optional<WhatIf> table = WhatIf.of(event, forecast.round(), seed);
        assertEquals(forecast.groups().isEmpty(), table.isEmpty());
        if (table.isEmpty()) {
          continue;
        }
        tables++;
        WhatIf.Line planned = table.get().lines().get(0);
        assertEquals(forecast.groups().size(), planned.groups());
        assertTrue(planned.slotMinutes() >= forecast.slotMinutes(), planned.toString());
        for (WhatIf.Line line : table.get().lines()) {
          assertTrue(line.groups() >= 1 && line.stations() >= 1 && line.crewPeople() >= 1);
          assertTrue(line.percentileMinutes() >= line.medianMinutes(), line.toString());
          assertTrue(line.slotMinutes() >= line.percentileMinutes(), line.toString());
        }
      }
    }
    assertTrue(tables > 20, tables + " tables");
  }

  private static List<Finding> overruns(String stretch) {
    Scene scene = oneSlowScrambler().group("g1", "a", 1, "main", stretch).set("stations", 12);
    for (int i = 0; i < 12; i++) {
      scene.solve("p" + (10 + i));
    }
    Event event = scene.event();
    List<Finding> notices = Overruns.of(event, scene.plan());
    notices.forEach(notice -> assertEquals(Level.NOTICE, notice.level()));
    assertEquals(
        scene.verdict().cost(), new Auditor(event).audit(scene.plan()).cost(), "costs nothing");
    return notices;
  }

  @Test
  void a_slot_that_most_days_outlast_is_told_with_what_would_help() {
    assertEquals(List.of(), overruns("09:00-10:15"));
    Finding notice = overruns("09:00-09:45").get(0);
    assertEquals(RuleName.LIKELY_OVERRUN, notice.rule());
    assertEquals(Optional.of("g1"), notice.group());
    assertTrue(notice.amount().compareTo(new BigDecimal("15")) > 0, notice.says());
    assertTrue(notice.amount().compareTo(new BigDecimal("18")) < 0, notice.says());
    assertTrue(notice.says().contains("slot of 45; one scrambler more would save"), notice.says());
  }
}
