package roundwright.scheduling.rules;

import roundwright.scheduling.core.Frame;
import roundwright.scheduling.cost.RuleName;

/** A rule over the day plan alone, whoever is in its groups. */
public interface FrameRule {
  RuleName name();

  /** Breaches, or for a strain rule weighted millionths. */
  long price(Frame frame);
}
