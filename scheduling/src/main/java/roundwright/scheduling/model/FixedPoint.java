package roundwright.scheduling.model;

import java.time.LocalDateTime;
import java.util.List;
import java.util.Optional;

/**
 * Something at a fixed time that keeps halls from being used: a meal, a briefing, prize giving.
 *
 * @param halls ids of the halls concerned; empty means every hall of the event
 * @param from in each hall's own zone, hence local
 * @param to in each hall's own zone, later than {@code from}
 */
public record FixedPoint(
    String name, Optional<List<String>> halls, LocalDateTime from, LocalDateTime to) {
  public FixedPoint {
    halls = halls.map(List::copyOf);
  }

  public boolean concerns(String hall) {
    return halls.isEmpty() || halls.get().contains(hall);
  }
}
