package roundwright.scheduling.model;

import java.time.ZoneId;
import java.util.List;

/**
 * Everything the engine needs to know of an event. Ids are unique and defined within their kind;
 * whoever makes an event by other means than the event file sees to that.
 *
 * @param zone zone of whatever belongs to a person or a round
 */
public record Event(
    String name,
    ZoneId zone,
    List<Venue> venues,
    List<Way> ways,
    List<FixedPoint> fixedPoints,
    List<Discipline> disciplines,
    List<Round> rounds,
    List<Person> people,
    Rules rules,
    Pins pins) {
  /** Minutes between two venues that no way names together. */
  public static final int MINUTES_BETWEEN_UNNAMED_VENUES = 30;

  public Event {
    venues = List.copyOf(venues);
    ways = List.copyOf(ways);
    fixedPoints = List.copyOf(fixedPoints);
    disciplines = List.copyOf(disciplines);
    rounds = List.copyOf(rounds);
    people = List.copyOf(people);
  }
}
