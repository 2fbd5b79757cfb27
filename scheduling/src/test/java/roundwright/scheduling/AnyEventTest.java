package roundwright.scheduling;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertTrue;

import java.util.ArrayList;
import java.util.List;
import java.util.stream.LongStream;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.MethodSource;
import org.junit.jupiter.params.provider.ValueSource;
import roundwright.scheduling.cost.Cost;
import roundwright.scheduling.file.PlanFile;
import roundwright.scheduling.model.Event;
import roundwright.scheduling.model.Plan;

/** Any event gives a plan that its file can hold, and whose price hides nothing. */
class AnyEventTest {
  static LongStream seeds() {
    return LongStream.concat(LongStream.rangeClosed(1, 60), LongStream.of(105, 1015, 1027));
  }

  @ParameterizedTest
  @MethodSource("seeds")
  void aWildEventGivesAPlanThatTheEngineAndTheAuditorPriceAlike(long seed) throws Exception {
    Event event = RandomEvents.wild(seed).event();
    assertPricedAlike(event, Effort.ofSteps(3_000).withSeed(seed), "seed " + seed);
  }

  @ParameterizedTest
  @ValueSource(longs = {1, 2, 3, 4})
  void aFairEventComesOutWithFewBreaches(long seed) throws Exception {
    Event event = RandomEvents.fair(seed, 70, 2, 1).event();
    Cost cost = assertPricedAlike(event, Effort.ofSteps(60_000).withSeed(seed), "seed " + seed);
    assertTrue(cost.breaches() + cost.gaps() < 60, "seed " + seed + ": " + cost);
  }

  private static Cost assertPricedAlike(Event event, Effort effort, String seed) throws Exception {
    List<Progress.Report> reports = new ArrayList<>();
    Plan plan =
        Planner.plan(
            event,
            effort,
            new Progress() {
              @Override
              public void report(Report report) {
                reports.add(report);
              }

              @Override
              public boolean stopWanted() {
                return false;
              }
            });
    String about = seed;
    Cost signed = plan.score().orElseThrow();
    Cost own = reports.get(reports.size() - 1).best();
    about += ", signed " + signed + ", own " + own;
    assertEquals(signed.breaches(), own.breaches(), about);
    assertEquals(signed.gaps(), own.gaps(), about);
    assertEquals(signed.strain().doubleValue(), own.strain().doubleValue(), 0.05, about);
    Plan read = PlanFile.read(new PlanFile(plan).json(event), event).plan();
    assertEquals(plan.groups(), read.groups(), about);
    return signed;
  }
}
