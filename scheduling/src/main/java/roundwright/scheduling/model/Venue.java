package roundwright.scheduling.model;

import java.time.ZoneId;
import java.util.List;

/** A place with halls; its zone is that of everything that happens in them. */
public record Venue(String id, String name, ZoneId zone, List<Hall> halls) {
  public Venue {
    halls = List.copyOf(halls);
  }
}
