package roundwright.scheduling.model;

import java.math.BigDecimal;
import java.util.List;
import java.util.Optional;

/**
 * Somebody who solves, helps, or both.
 *
 * @param available merged windows of presence; empty optional: always; empty list: never
 * @param share how much of the duties they take compared with others; empty: by their entries
 */
public record Person(
    String id,
    String name,
    List<Entry> entries,
    CrewSkills crew,
    Optional<List<Window>> available,
    List<Busy> busy,
    Optional<String> household,
    boolean newcomer,
    int maxDutyMinutesPerDay,
    Optional<BigDecimal> share) {
  /** The most duty a day of somebody who names none. */
  public static final int MAX_DUTY_MINUTES_PER_DAY = 240;

  public Person {
    entries = List.copyOf(entries);
    available = available.map(Window::merged);
    busy = List.copyOf(busy);
  }

  /**
   * The share that counts: their own, else 0.4 + 0.15 x entries, at most 1.3; 1 without entries.
   */
  public BigDecimal effectiveShare() {
    if (share.isPresent()) {
      return share.get();
    }
    if (entries.isEmpty()) {
      return BigDecimal.ONE;
    }
    return new BigDecimal("0.15")
        .multiply(BigDecimal.valueOf(entries.size()))
        .add(new BigDecimal("0.4"))
        .min(new BigDecimal("1.3"));
  }

  /** A registration in one discipline with the time expected of them. */
  public record Entry(String discipline, BigDecimal expectedSeconds) {}

  /** The duties somebody can take; scrambling goes by discipline. */
  public record CrewSkills(boolean judges, boolean runs, List<String> scrambles) {
    public static final CrewSkills NONE = new CrewSkills(false, false, List.of());

    public CrewSkills {
      scrambles = List.copyOf(scrambles);
    }
  }

  /** Time for which they are wanted elsewhere at the event. */
  public record Busy(Window window, String what) {}
}
