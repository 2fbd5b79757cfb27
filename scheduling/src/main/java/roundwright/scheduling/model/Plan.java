package roundwright.scheduling.model;

import java.util.List;
import java.util.Optional;
import roundwright.scheduling.cost.Cost;
import roundwright.scheduling.cost.Finding;

/**
 * A day plan with its crews.
 *
 * @param score as its maker priced it, where it did; whoever needs to be sure asks the auditor
 */
public record Plan(List<Group> groups, Optional<Cost> score, List<Finding> findings) {
  public static final Plan EMPTY = new Plan(List.of(), Optional.empty(), List.of());

  public Plan {
    groups = List.copyOf(groups);
    findings = List.copyOf(findings);
  }
}
