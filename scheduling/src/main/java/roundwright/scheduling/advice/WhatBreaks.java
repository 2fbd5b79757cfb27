package roundwright.scheduling.advice;

import java.math.BigDecimal;
import java.math.RoundingMode;
import java.util.ArrayList;
import java.util.LinkedHashMap;
import java.util.List;
import java.util.Map;
import java.util.SortedMap;
import java.util.TreeMap;
import roundwright.scheduling.audit.Verdict;
import roundwright.scheduling.cost.Finding;
import roundwright.scheduling.cost.Level;
import roundwright.scheduling.cost.RuleName;

/**
 * What a change by hand does to a plan, by the auditor's reading of it before and after.
 *
 * @param byRule how much more, or with a minus less, each rule that changes counts: breaches and
 *     gaps as they are, strain weighted
 * @param comes findings of breaches and gaps that were not there before
 * @param goes findings of breaches and gaps that are there no longer
 * @param says one sentence with the price and the rules
 */
public record WhatBreaks(
    Change change,
    Difference difference,
    SortedMap<RuleName, BigDecimal> byRule,
    List<Finding> comes,
    List<Finding> goes,
    String says) {
  public WhatBreaks {
    comes = List.copyOf(comes);
    goes = List.copyOf(goes);
  }

  /**
   * Makes a change and compares.
   *
   * @throws IllegalArgumentException where the change cannot be made to this draft
   */
  public static WhatBreaks of(Draft draft, Change change) {
    Verdict before = draft.verdict();
    Verdict after = change.madeTo(draft).verdict();
    SortedMap<RuleName, BigDecimal> byRule = new TreeMap<>();
    priced(after).forEach((rule, price) -> byRule.merge(rule, price, BigDecimal::add));
    priced(before).forEach((rule, price) -> byRule.merge(rule, price.negate(), BigDecimal::add));
    byRule.values().removeIf(price -> price.signum() == 0);
    Difference difference = Difference.between(before.cost(), after.cost());
    return new WhatBreaks(
        change,
        difference,
        java.util.Collections.unmodifiableSortedMap(byRule),
        without(after.findings(), before.findings()),
        without(before.findings(), after.findings()),
        says(draft, change, difference, byRule));
  }

  private static Map<RuleName, BigDecimal> priced(Verdict verdict) {
    Map<RuleName, BigDecimal> priced = new TreeMap<>(verdict.strains());
    verdict
        .amounts()
        .forEach(
            (rule, amount) -> {
              if (rule.level() == Level.BREACH || rule.level() == Level.GAP) {
                priced.put(rule, amount);
              }
            });
    return priced;
  }

  /** Breaches and gaps among the findings that are not in the others, each as often as it is. */
  private static List<Finding> without(List<Finding> findings, List<Finding> others) {
    Map<Finding, Integer> count = new LinkedHashMap<>();
    others.forEach(finding -> count.merge(finding, 1, Integer::sum));
    List<Finding> left = new ArrayList<>();
    for (Finding finding : findings) {
      boolean heavy = finding.level() == Level.BREACH || finding.level() == Level.GAP;
      if (count.merge(finding, -1, Integer::sum) < 0 && heavy) {
        left.add(finding);
      }
    }
    return left;
  }

  private static String says(
      Draft draft, Change change, Difference difference, Map<RuleName, BigDecimal> byRule) {
    List<String> rules = new ArrayList<>();
    byRule.forEach(
        (rule, price) -> {
          BigDecimal rounded = price.setScale(1, RoundingMode.HALF_UP);
          if (rounded.signum() != 0) {
            rules.add(
                rule.word()
                    + (rounded.signum() > 0 ? " +" : " ")
                    + (rule.level() == Level.STRAIN ? rounded : price).toPlainString());
          }
        });
    String order = change.says(draft);
    return Character.toUpperCase(order.charAt(0))
        + order.substring(1)
        + ": "
        + difference.says()
        + (rules.isEmpty() ? "" : " (" + String.join(", ", rules) + ")")
        + ".";
  }
}
