package roundwright.scheduling.cost;

import java.math.BigDecimal;
import java.util.List;
import java.util.Optional;

/**
 * One thing that a rule has to say about a plan.
 *
 * @param rule the rule; its level is the finding's
 * @param amount in the rule's own unit, before any weight
 * @param group id of the plan's group concerned, where there is one
 * @param people ids of the people touched, in the order in which the sentence names them
 * @param says one sentence in plain words
 */
public record Finding(
    RuleName rule, BigDecimal amount, Optional<String> group, List<String> people, String says) {
  public Finding {
    people = List.copyOf(people);
  }

  public Level level() {
    return rule.level();
  }
}
