package roundwright.scheduling;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertTrue;

import java.util.ArrayList;
import java.util.EnumSet;
import java.util.List;
import java.util.Set;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.EnumSource;
import roundwright.scheduling.advice.Impossible;
import roundwright.scheduling.audit.Auditor;
import roundwright.scheduling.cost.Cost;
import roundwright.scheduling.file.PlanFile;
import roundwright.scheduling.model.Event;
import roundwright.scheduling.model.Plan;

/**
 * Whatever an event is like, it gets its best plan, an honest price, and a word on what cannot be.
 */
class HostileEventsTest {
  private static final long SEEDS = 4;
  private static final long STEPS = 12_000;

  @ParameterizedTest
  @EnumSource(HostileEvents.class)
  void isPlannedAndPricedLikeAnyOther(HostileEvents family) throws Exception {
    for (long seed = 1; seed <= SEEDS; seed++) {
      Event event = family.scene(seed).event();
      List<Cost> own = new ArrayList<>();
      Plan plan =
          Planner.plan(
              event,
              Effort.ofSteps(STEPS).withSeed(seed),
              new Progress() {
                @Override
                public void report(Report report) {
                  own.add(report.best());
                }

                @Override
                public boolean stopWanted() {
                  return false;
                }
              });
      Cost audited = new Auditor(event).price(plan);
      Cost last = own.get(own.size() - 1);
      String about = family + " seed " + seed + ": " + audited + " " + plan.findings();
      assertEquals(audited, plan.score().orElseThrow(), about);
      assertEquals(audited.breaches(), last.breaches(), about);
      assertEquals(audited.gaps(), last.gaps(), about);
      assertEquals(audited.strain().doubleValue(), last.strain().doubleValue(), 0.05, about);
      assertEquals(
          plan.groups(), PlanFile.read(new PlanFile(plan).json(event), event).plan().groups());
      assertNamed(family, event, audited, about);
    }
  }

  private static void assertNamed(HostileEvents family, Event event, Cost audited, String about) {
    List<Impossible> impossible = Impossible.of(event);
    Set<Impossible.Kind> kinds = EnumSet.noneOf(Impossible.Kind.class);
    impossible.forEach(one -> kinds.add(one.kind()));
    Set<Impossible.Kind> named = EnumSet.noneOf(Impossible.Kind.class);
    family.named().ifPresent(named::add);
    assertEquals(named, kinds, about + " " + impossible);
    if (family.named().isEmpty()) {
      assertEquals(0, audited.breaches() + audited.gaps(), about);
    }
    for (Impossible one : impossible) {
      long paid = audited.breaches() + (one.kind().leavesGaps() ? audited.gaps() : 0);
      assertTrue(one.atLeast() <= paid, about + " " + one);
    }
  }
}
