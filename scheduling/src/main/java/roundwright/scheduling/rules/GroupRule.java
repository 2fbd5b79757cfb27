package roundwright.scheduling.rules;

import roundwright.scheduling.core.GroupRow;
import roundwright.scheduling.cost.RuleName;

/** A rule over one group and who is in it. */
public interface GroupRule {
  RuleName name();

  /** Breaches or gaps, or for a strain rule weighted millionths. Allocates nothing. */
  long price(GroupRow row);
}
