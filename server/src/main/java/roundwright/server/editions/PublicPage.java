package roundwright.server.editions;

import java.time.LocalDate;
import java.time.ZonedDateTime;
import java.util.List;
import java.util.Optional;
import roundwright.server.web.EventMark;
import roundwright.server.web.Lanes;

/**
 * An event's public page: look-up on top, the schedule of one day under it. Tickets are rounds.
 *
 * @param edition the newest, or empty where none is out
 * @param day the one shown: that asked for, else today's, else the first
 * @param lanes empty where no edition is out
 */
public record PublicPage(
    EventMark event,
    Optional<EditionMark> edition,
    LocalDate day,
    Optional<Lanes> lanes,
    LookUp lookUp) {

  /** An edition's number and when it came out, in the event's zone. */
  public record EditionMark(int number, ZonedDateTime publishedAt) {}

  /**
   * What was looked up and found.
   *
   * @param typed empty where nothing was
   * @param hits at most ten, by shown name
   * @param more true where there are others beside them
   */
  public record LookUp(String typed, List<Hit> hits, boolean more) {
    public static final int FEWEST_LETTERS = 3;
    public static final LookUp NOTHING = new LookUp("", List.of(), false);

    public LookUp {
      hits = List.copyOf(hits);
    }

    public boolean asked() {
      return !typed.isEmpty();
    }

    public boolean tooShort() {
      return asked() && typed.codePointCount(0, typed.length()) < FEWEST_LETTERS;
    }
  }

  /** Somebody found; {@code name} is what strangers may see. */
  public record Hit(String person, String name) {}
}
