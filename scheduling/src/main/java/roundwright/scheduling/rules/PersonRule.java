package roundwright.scheduling.rules;

import roundwright.scheduling.core.PersonRow;
import roundwright.scheduling.cost.RuleName;

/** A rule over one person's commitments. */
public interface PersonRule {
  RuleName name();

  /** Breaches, or for a strain rule weighted millionths. Allocates nothing. */
  long price(PersonRow row);
}
