package roundwright.scheduling;

import java.time.Instant;
import java.util.List;
import java.util.Optional;
import roundwright.scheduling.audit.Auditor;
import roundwright.scheduling.audit.Kept;
import roundwright.scheduling.audit.Verdict;
import roundwright.scheduling.cost.Finding;
import roundwright.scheduling.cost.RuleName;
import roundwright.scheduling.crewing.Arrangement;
import roundwright.scheduling.model.Event;
import roundwright.scheduling.model.Plan;
import roundwright.scheduling.repair.LeastChange;
import roundwright.scheduling.repair.Mending;
import roundwright.scheduling.repair.Scope;

/** Keeps a plan that people have been told for an event that has changed, and changes little. */
public final class Repair {
  private Repair() {}

  /**
   * What came of a repair.
   *
   * @param plan priced by the auditor against the kept one
   * @param changed commitments that are not what people were told; a moved one counts once
   * @param told people with such commitments
   * @param least no plan without breaches that fills as many duties changes less; empty where the
   *     repaired plan has breaches, which may well be what it did not change
   */
  public record Repaired(Plan plan, int changed, int told, Optional<LeastChange> least) {
    /** Every change, a sentence each. */
    public List<String> changes() {
      return plan.findings().stream()
          .filter(finding -> finding.rule() == RuleName.CHANGED)
          .map(Finding::says)
          .toList();
    }
  }

  /**
   * Repairs a plan.
   *
   * @param event as it now is
   * @param kept the plan people were told
   * @param at what starts before this moment stays as it is
   * @param scope what may change
   */
  public static Repaired repair(
      Event event, Plan kept, Optional<Instant> at, Scope scope, Effort effort, Progress progress) {
    Spending spending = new Spending(effort, progress);
    Mending mending = new Mending(event, kept, at, scope, effort.seed(), spending::over);
    Arrangement arrangement = mending.mended();
    Plan plan = Written.plan(arrangement, kept, at);
    Verdict verdict = new Auditor(event).audit(plan, new Kept(kept, at));
    int changed = amount(verdict, RuleName.CHANGED);
    int told = amount(verdict, RuleName.TOLD);
    Optional<LeastChange> least =
        verdict.cost().breaches() == 0
            ? Optional.of(mending.leastChange(arrangement))
            : Optional.empty();
    return new Repaired(Written.signed(event, plan, verdict), changed, told, least);
  }

  private static int amount(Verdict verdict, RuleName rule) {
    var amount = verdict.amounts().get(rule);
    return amount == null ? 0 : amount.intValueExact();
  }
}
