package roundwright.scheduling.audit;

import java.math.BigDecimal;
import java.math.RoundingMode;
import java.util.Collections;
import java.util.List;
import java.util.Map;
import java.util.SortedMap;
import java.util.TreeMap;
import roundwright.scheduling.cost.Cost;
import roundwright.scheduling.cost.Finding;
import roundwright.scheduling.cost.Level;
import roundwright.scheduling.cost.RuleName;

/**
 * What the auditor finds of a plan.
 *
 * @param cost the plan's score, strain not rounded
 * @param amounts what each rule counts, in its own unit; rules that count nothing are left out, and
 *     so are strain rules of weight 0
 * @param strains amount times weight of each strain rule in {@code amounts}, not rounded
 * @param findings one for each thing found, in the order of the rules; the amounts of a rule's
 *     findings add up to its amount. Empty where only the price was asked for
 */
public record Verdict(
    Cost cost,
    SortedMap<RuleName, BigDecimal> amounts,
    SortedMap<RuleName, BigDecimal> strains,
    List<Finding> findings) {
  public Verdict {
    amounts = Collections.unmodifiableSortedMap(new TreeMap<>(amounts));
    strains = Collections.unmodifiableSortedMap(new TreeMap<>(strains));
    findings = List.copyOf(findings);
  }

  /** Breaches by rule. */
  public SortedMap<RuleName, Long> breaches() {
    SortedMap<RuleName, Long> breaches = new TreeMap<>();
    for (Map.Entry<RuleName, BigDecimal> entry : amounts.entrySet()) {
      if (entry.getKey().level() == Level.BREACH) {
        breaches.put(entry.getKey(), entry.getValue().longValueExact());
      }
    }
    return breaches;
  }

  /** Weighted strain by rule, each rounded to one decimal. */
  public SortedMap<RuleName, BigDecimal> roundedStrains() {
    SortedMap<RuleName, BigDecimal> rounded = new TreeMap<>();
    strains.forEach((rule, strain) -> rounded.put(rule, strain.setScale(1, RoundingMode.HALF_UP)));
    return rounded;
  }
}
