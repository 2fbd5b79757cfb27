package roundwright.scheduling.advice;

import java.math.BigDecimal;
import java.math.RoundingMode;
import java.util.ArrayList;
import java.util.Comparator;
import java.util.List;
import roundwright.scheduling.cost.Cost;
import roundwright.scheduling.rules.RuleBook;

/**
 * How much dearer something is than something else, level by level; negative where it is cheaper.
 */
public record Difference(long breaches, long gaps, BigDecimal strain)
    implements Comparable<Difference> {
  private static final Comparator<Difference> BY_LEVEL =
      Comparator.comparingLong(Difference::breaches)
          .thenComparingLong(Difference::gaps)
          .thenComparing(Difference::strain);

  static Difference between(Cost before, Cost after) {
    return new Difference(
        after.breaches() - before.breaches(),
        after.gaps() - before.gaps(),
        after.strain().subtract(before.strain()));
  }

  /** Of what a ledger calls hard and strain. */
  static Difference ofLedger(long hard, long strain) {
    long breaches = Math.floorDiv(hard + RuleBook.BREACH / 2, RuleBook.BREACH);
    return new Difference(
        breaches, hard - breaches * RuleBook.BREACH, BigDecimal.valueOf(strain, 6));
  }

  @Override
  public int compareTo(Difference other) {
    return BY_LEVEL.compare(this, other);
  }

  /** Such as {@code 1 breach more, 2 gaps fewer, strain 3.2 less}. */
  public String says() {
    List<String> parts = new ArrayList<>();
    add(parts, breaches, "breach", "breaches");
    add(parts, gaps, "gap", "gaps");
    BigDecimal rounded = strain.setScale(1, RoundingMode.HALF_UP);
    if (rounded.signum() != 0) {
      parts.add(
          "strain " + rounded.abs().toPlainString() + (rounded.signum() > 0 ? " more" : " less"));
    }
    return parts.isEmpty() ? "the price stays the same" : String.join(", ", parts);
  }

  private static void add(List<String> parts, long number, String one, String several) {
    if (number != 0) {
      parts.add(
          Math.abs(number)
              + " "
              + (Math.abs(number) == 1 ? one : several)
              + (number > 0 ? " more" : " fewer"));
    }
  }
}
