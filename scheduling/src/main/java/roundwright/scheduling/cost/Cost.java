package roundwright.scheduling.cost;

import java.math.BigDecimal;
import java.math.RoundingMode;
import java.util.Comparator;

/**
 * A plan's score, compared level by level: breaches, then gaps, then strain.
 *
 * @param breaches rules broken, counted by each rule's amount
 * @param gaps wanted duties that nobody fills
 * @param strain weighted discomfort, as exact as its maker could; printed with one decimal
 */
public record Cost(long breaches, long gaps, BigDecimal strain) implements Comparable<Cost> {
  public static final Cost ZERO = new Cost(0, 0, BigDecimal.ZERO);

  private static final Comparator<Cost> BY_LEVEL =
      Comparator.comparingLong(Cost::breaches)
          .thenComparingLong(Cost::gaps)
          .thenComparing(Cost::strain);

  @Override
  public int compareTo(Cost other) {
    return BY_LEVEL.compare(this, other);
  }

  /** The strain as files and pages show it. */
  public BigDecimal roundedStrain() {
    return strain.setScale(1, RoundingMode.HALF_UP);
  }

  @Override
  public String toString() {
    return breaches
        + (breaches == 1 ? " breach, " : " breaches, ")
        + gaps
        + (gaps == 1 ? " gap" : " gaps")
        + ", strain "
        + roundedStrain();
  }
}
