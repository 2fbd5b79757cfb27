package roundwright.scheduling.model;

import java.time.Instant;
import java.util.ArrayList;
import java.util.Comparator;
import java.util.List;

/**
 * A half-open stretch of time: what ends at 10:00 and what starts at 10:00 do not overlap.
 *
 * @param from first instant inside
 * @param to first instant after; later than {@code from}
 */
public record Window(Instant from, Instant to) {
  public Window {
    if (!from.isBefore(to)) {
      throw new IllegalArgumentException(
          "A window must end after it starts: " + from + " to " + to);
    }
  }

  public boolean holds(Instant start, Instant end) {
    return !start.isBefore(from) && !end.isAfter(to);
  }

  public boolean overlaps(Instant start, Instant end) {
    return start.isBefore(to) && from.isBefore(end);
  }

  /** The same stretches in order of time, those that touch or overlap made one. */
  public static List<Window> merged(List<Window> windows) {
    List<Window> sorted = new ArrayList<>(windows);
    sorted.sort(Comparator.comparing(Window::from).thenComparing(Window::to));
    List<Window> merged = new ArrayList<>();
    for (Window window : sorted) {
      int last = merged.size() - 1;
      if (last >= 0 && !window.from.isAfter(merged.get(last).to)) {
        if (window.to.isAfter(merged.get(last).to)) {
          merged.set(last, new Window(merged.get(last).from, window.to));
        }
      } else {
        merged.add(window);
      }
    }
    return List.copyOf(merged);
  }
}
