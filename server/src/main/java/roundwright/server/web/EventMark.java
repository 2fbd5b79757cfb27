package roundwright.server.web;

import java.time.LocalDate;
import java.util.List;

/**
 * What the top of an event's pages says of it.
 *
 * @param days those on which a hall is open, in order
 */
public record EventMark(String slug, String name, List<LocalDate> days, int disciplines) {
  public EventMark {
    days = List.copyOf(days);
  }

  public LocalDate firstDay() {
    return days.get(0);
  }

  public LocalDate lastDay() {
    return days.get(days.size() - 1);
  }
}
