package roundwright.scheduling.audit;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertFalse;
import static org.junit.jupiter.api.Assertions.assertThrows;
import static org.junit.jupiter.api.Assertions.assertTrue;

import java.math.BigDecimal;
import java.util.ArrayList;
import java.util.Collections;
import java.util.EnumMap;
import java.util.EnumSet;
import java.util.List;
import java.util.Map;
import java.util.Optional;
import java.util.Set;
import org.junit.jupiter.api.Test;
import roundwright.scheduling.RandomEvents;
import roundwright.scheduling.RandomPlans;
import roundwright.scheduling.Scene;
import roundwright.scheduling.cost.Cost;
import roundwright.scheduling.cost.Finding;
import roundwright.scheduling.cost.Level;
import roundwright.scheduling.cost.RuleName;
import roundwright.scheduling.model.Event;
import roundwright.scheduling.model.Group;
import roundwright.scheduling.model.Plan;

/** What holds for every verdict. */
final class AuditorTest {
  private static final int SEEDS = 120;
  private static final BigDecimal A_MILLIONTH = new BigDecimal("0.000001");

  private static Verdict verdict(Event event, long seed) {
    Plan plan = RandomPlans.bad(event, seed);
    Plan kept = RandomPlans.disturbed(plan, event, seed);
    return new Auditor(event).audit(plan, new Kept(kept, Optional.of(plan.groups().get(0).end())));
  }

  @Test
  void the_findings_of_each_rule_add_up_to_its_amount_and_the_amounts_to_the_price() {
    for (long seed = 0; seed < SEEDS; seed++) {
      Event event = RandomEvents.wild(seed).event();
      if (RandomPlans.bad(event, seed).groups().isEmpty()) {
        continue;
      }
      Verdict verdict = verdict(event, seed);
      Map<RuleName, BigDecimal> sums = new EnumMap<>(RuleName.class);
      for (Finding finding : verdict.findings()) {
        assertTrue(finding.amount().signum() > 0, "seed " + seed + ": " + finding);
        sums.merge(finding.rule(), finding.amount(), BigDecimal::add);
      }
      assertEquals(sums, verdict.amounts(), "seed " + seed);
      long breaches = 0;
      BigDecimal strain = BigDecimal.ZERO;
      for (Map.Entry<RuleName, BigDecimal> amount : verdict.amounts().entrySet()) {
        if (amount.getKey().level() == Level.BREACH) {
          breaches += amount.getValue().longValueExact();
        } else if (amount.getKey().level() == Level.STRAIN) {
          strain = strain.add(amount.getValue().multiply(event.rules().weight(amount.getKey())));
        }
      }
      assertEquals(breaches, verdict.cost().breaches(), "seed " + seed);
      assertTrue(
          strain.subtract(verdict.cost().strain()).abs().compareTo(A_MILLIONTH) < 0,
          "seed " + seed);
    }
  }

  @Test
  void the_price_alone_is_the_price_of_the_verdict() {
    for (long seed = 0; seed < SEEDS; seed++) {
      Event event = RandomEvents.wild(seed).event();
      Plan plan = RandomPlans.bad(event, seed);
      Auditor auditor = new Auditor(event);
      Kept kept = new Kept(RandomPlans.disturbed(plan, event, seed));
      assertEquals(auditor.audit(plan).cost(), auditor.price(plan), "seed " + seed);
      assertEquals(auditor.audit(plan, kept).cost(), auditor.price(plan, kept), "seed " + seed);
    }
  }

  @Test
  void bad_plans_by_chance_break_every_rule_there_is() {
    Set<RuleName> broken = EnumSet.noneOf(RuleName.class);
    for (long seed = 0; seed < SEEDS; seed++) {
      Event event = RandomEvents.wild(seed).event();
      if (!RandomPlans.bad(event, seed).groups().isEmpty()) {
        broken.addAll(verdict(event, seed).amounts().keySet());
      }
    }
    assertEquals(EnumSet.complementOf(EnumSet.of(RuleName.LIKELY_OVERRUN)), broken);
  }

  @Test
  void every_finding_is_one_sentence_that_names_its_people() {
    for (long seed = 0; seed < SEEDS; seed++) {
      Event event = RandomEvents.wild(seed).event();
      if (RandomPlans.bad(event, seed).groups().isEmpty()) {
        continue;
      }
      for (Finding finding : verdict(event, seed).findings()) {
        assertTrue(finding.says().endsWith("."), finding.says());
        assertFalse(finding.says().contains("\n"), finding.says());
        for (String person : finding.people()) {
          assertTrue(finding.says().contains(person), finding.says());
        }
      }
    }
  }

  @Test
  void the_order_in_which_a_plan_lists_its_groups_makes_no_difference() {
    for (long seed = 0; seed < SEEDS; seed++) {
      Event event = RandomEvents.wild(seed).event();
      Plan plan = RandomPlans.bad(event, seed);
      List<Group> turned = new ArrayList<>(plan.groups());
      Collections.reverse(turned);
      Cost cost = new Auditor(event).price(plan);
      Cost other = new Auditor(event).price(new Plan(turned, plan.score(), plan.findings()));
      assertEquals(cost.breaches(), other.breaches(), "seed " + seed);
      assertEquals(cost.gaps(), other.gaps(), "seed " + seed);
      assertEquals(cost.roundedStrain(), other.roundedStrain(), "seed " + seed);
    }
  }

  @Test
  void a_plan_that_names_somebody_unknown_is_refused() {
    Scene scene =
        new Scene()
            .hall("main", 10)
            .discipline("cube3")
            .round("a", "cube3", 1)
            .person("ada")
            .group("g1", "a", 1, "main", "09:00-09:30")
            .solve("ada");
    Event without = new Scene().hall("main", 10).discipline("cube3").round("a", "cube3", 1).event();
    IllegalArgumentException refusal =
        assertThrows(
            IllegalArgumentException.class, () -> new Auditor(without).audit(scene.plan()));
    assertEquals(
        "The plan names the person ada, which the event does not have", refusal.getMessage());
  }

  @Test
  void notices_cost_nothing() {
    Scene scene =
        new Scene()
            .hall("main", 10)
            .open("09:00-10:00")
            .set("occupancy", 1)
            .discipline("cube3")
            .round("a", "cube3", 1)
            .advance("count", 1)
            .round("b", "cube3", 2)
            .person("ada")
            .enters("cube3", 20)
            .available()
            .person("ben")
            .group("g1", "a", 1, "main", "09:00-09:46")
            .solve("ada", "ben")
            .group("g2", "b", 1, "main", "09:00-09:10")
            .solve("ben");
    Verdict verdict = scene.verdict();
    assertEquals(
        List.of(
            "Group 1 of cube3 round 1 (Sat 8 May 09:00-09:46) brings 2 people into main,"
                + " whose limit is 1.",
            "Group 1 of cube3 round 1 (Sat 8 May 09:00-09:46) ends 14 minutes before main closes.",
            "ada will likely be in cube3 round 2, and is away in all its groups"
                + " (Sat 8 May 09:00 to Sat 8 May 09:10)."),
        verdict.findings().stream()
            .filter(finding -> finding.level() == Level.NOTICE)
            .map(Finding::says)
            .toList());
    long breaches = verdict.breaches().values().stream().mapToLong(Long::longValue).sum();
    assertEquals(breaches, verdict.cost().breaches());
  }
}
