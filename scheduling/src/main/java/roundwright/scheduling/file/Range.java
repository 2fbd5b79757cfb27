package roundwright.scheduling.file;

import java.math.BigDecimal;

/**
 * The numbers that may stand under a key.
 *
 * @param least the smallest, itself left out where {@code above}
 * @param most the largest
 */
record Range(BigDecimal least, boolean above, BigDecimal most) {
  private static final BigDecimal UNBOUNDED = new BigDecimal("1000000000");

  static Range of(String least, String most) {
    return new Range(new BigDecimal(least), false, new BigDecimal(most));
  }

  static Range of(int least, int most) {
    return new Range(BigDecimal.valueOf(least), false, BigDecimal.valueOf(most));
  }

  static Range atLeast(int least) {
    return new Range(BigDecimal.valueOf(least), false, UNBOUNDED);
  }

  static Range over(int least, int most) {
    return new Range(BigDecimal.valueOf(least), true, BigDecimal.valueOf(most));
  }

  static Range over(int least) {
    return new Range(BigDecimal.valueOf(least), true, UNBOUNDED);
  }

  boolean holds(BigDecimal number) {
    int order = number.compareTo(least);
    return (above ? order > 0 : order >= 0) && number.compareTo(most) <= 0;
  }

  String words(String kind) {
    if (most.compareTo(UNBOUNDED) == 0) {
      return kind + (above ? " over " + least : ", " + least + " or more");
    }
    return kind
        + (above ? " over " + least + ", at most " + most : " from " + least + " to " + most);
  }
}
