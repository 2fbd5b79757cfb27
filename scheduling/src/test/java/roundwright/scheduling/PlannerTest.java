package roundwright.scheduling;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertFalse;
import static org.junit.jupiter.api.Assertions.assertNotEquals;
import static org.junit.jupiter.api.Assertions.assertTrue;

import java.nio.file.Path;
import java.util.ArrayList;
import java.util.List;
import java.util.OptionalDouble;
import java.util.OptionalLong;
import org.junit.jupiter.api.Test;
import roundwright.scheduling.audit.Auditor;
import roundwright.scheduling.cost.Cost;
import roundwright.scheduling.file.EventFile;
import roundwright.scheduling.file.PlanFile;
import roundwright.scheduling.model.Event;
import roundwright.scheduling.model.Plan;

class PlannerTest {
  private static final long DEMO_STEPS = 400_000;

  private static EventFile demo() throws Exception {
    return EventFile.read(Path.of("..", "demo-event", "event.json"));
  }

  @Test
  void theDemoEventComesOutWithoutBreachOrGapAndTheAuditorSignsIt() throws Exception {
    Event event = demo().event();
    Plan plan = Planner.plan(event, Effort.ofSteps(DEMO_STEPS), Progress.NONE);
    Cost cost = new Auditor(event).audit(plan).cost();
    assertEquals(0, cost.breaches());
    assertEquals(0, cost.gaps());
    assertEquals(cost, plan.score().orElseThrow());
  }

  @Test
  void theSameSeedAndStepsGiveTheSameBytesTwiceAndAnotherSeedOthers() throws Exception {
    EventFile file = demo();
    Effort effort = Effort.ofSteps(20_000).withSeed(11);
    String once = written(file, effort);
    String twice = written(file, effort);
    assertEquals(once, twice);
    assertNotEquals(once, written(file, effort.withSeed(12)));
  }

  @Test
  void twoThreadsGiveTheSamePlanTwice() throws Exception {
    EventFile file = demo();
    Effort effort = new Effort(5, OptionalLong.of(20_000), OptionalDouble.empty(), 2);
    assertEquals(written(file, effort), written(file, effort));
  }

  private static String written(EventFile file, Effort effort) {
    return new PlanFile(Planner.plan(file.event(), effort, Progress.NONE)).json(file.event());
  }

  @Test
  void reportsItsProgressAndStopsWithThePlanItHasWhenAskedTo() throws Exception {
    List<Progress.Report> reports = new ArrayList<>();
    Progress stopAtOnce =
        new Progress() {
          @Override
          public void report(Report report) {
            reports.add(report);
          }

          @Override
          public boolean stopWanted() {
            return !reports.isEmpty();
          }
        };
    Event event = demo().event();
    Plan plan = Planner.plan(event, Effort.ofSteps(400_000_000), stopAtOnce);
    assertFalse(plan.groups().isEmpty());
    assertTrue(reports.size() >= 2, "reports: " + reports.size());
    assertEquals(Progress.Stage.DONE, reports.get(reports.size() - 1).stage());
  }
}
