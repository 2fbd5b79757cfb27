package roundwright.server.editions;

import java.time.ZonedDateTime;
import java.util.List;
import java.util.Optional;
import roundwright.server.web.EventMark;
import roundwright.server.web.HallMark;
import roundwright.server.web.Ticket;

/**
 * A hall's big screen.
 *
 * @param asOf now, in the hall's zone
 * @param shown the group that is on, else the next one that day or later; empty where none comes
 * @param names of its competitors as strangers may see them, in order of names
 * @param next the group after that
 */
public record Board(
    EventMark event,
    HallMark hall,
    ZonedDateTime asOf,
    Optional<Ticket> shown,
    List<String> names,
    Optional<Ticket> next) {
  public Board {
    names = List.copyOf(names);
  }

  /** The names as the board has room for them. */
  public BoardNames fitted() {
    return BoardNames.of(names);
  }
}
