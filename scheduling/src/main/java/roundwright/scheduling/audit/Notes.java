package roundwright.scheduling.audit;

import java.math.BigDecimal;
import java.time.Duration;
import java.util.ArrayList;
import java.util.List;
import java.util.Optional;
import java.util.function.Supplier;
import roundwright.scheduling.cost.Finding;
import roundwright.scheduling.cost.RuleName;
import roundwright.scheduling.model.Group;

/** What one rule finds, and its sum; sentences are made only where somebody wants them. */
final class Notes {
  private static final long FIVE_MINUTES_IN_SECONDS = 300;

  private final RuleName rule;
  private final boolean telling;
  private final List<Finding> findings = new ArrayList<>();
  private BigDecimal total = BigDecimal.ZERO;

  Notes(RuleName rule, boolean telling) {
    this.rule = rule;
    this.telling = telling;
  }

  BigDecimal total() {
    return total;
  }

  List<Finding> findings() {
    return findings;
  }

  /** One for each started five minutes; none for nothing or less. */
  static long startedFives(Duration length) {
    long seconds = length.toSeconds();
    return seconds <= 0 ? 0 : (seconds + FIVE_MINUTES_IN_SECONDS - 1) / FIVE_MINUTES_IN_SECONDS;
  }

  void add(long amount, Group group, List<String> people, Supplier<String> says) {
    add(BigDecimal.valueOf(amount), Optional.of(group.id()), people, says);
  }

  void add(long amount, List<String> people, Supplier<String> says) {
    add(BigDecimal.valueOf(amount), Optional.empty(), people, says);
  }

  /** Notes an amount over 0; 0 and less are nothing to note. */
  void add(BigDecimal amount, Optional<String> group, List<String> people, Supplier<String> says) {
    if (amount.signum() <= 0) {
      return;
    }
    total = total.add(amount);
    if (telling) {
      findings.add(new Finding(rule, amount, group, people, asSentence(says.get())));
    }
  }

  /** Begins with a capital where a word of ours stands first; a name keeps its own spelling. */
  private static String asSentence(String says) {
    return says.startsWith("group ") ? "G" + says.substring(1) : says;
  }
}
