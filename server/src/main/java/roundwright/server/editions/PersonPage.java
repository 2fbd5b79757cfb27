package roundwright.server.editions;

import java.time.LocalDate;
import java.time.ZonedDateTime;
import java.util.List;
import java.util.Locale;
import java.util.Optional;
import roundwright.server.web.EventMark;
import roundwright.server.web.Ticket;

/**
 * One person's days: as a pocket page behind their personal link, or as what strangers find by
 * look-up.
 *
 * @param name their own on the pocket page, what strangers may see on the other
 * @param own true on the pocket page
 * @param asOf now, in the event's zone
 * @param next the first commitment that has not ended, with what leads up to it left out
 * @param days what comes after it, by day, days without anything left out
 * @param done what has ended, newest last
 */
public record PersonPage(
    EventMark event,
    String name,
    boolean own,
    int edition,
    ZonedDateTime asOf,
    Optional<Stop> next,
    List<DayPart> days,
    List<Stop> done) {
  public PersonPage {
    days = List.copyOf(days);
    done = List.copyOf(done);
  }

  /** True where they have no commitment at all. */
  public boolean nothingAtAll() {
    return next.isEmpty() && days.isEmpty() && done.isEmpty();
  }

  /** Minutes until the next commitment starts; negative once it has. */
  public long minutesUntilNext() {
    return next.map(stop -> java.time.Duration.between(asOf, stop.start()).toMinutes()).orElse(0L);
  }

  /** One day's stops in order of time. */
  public record DayPart(LocalDate day, List<Stop> stops) {
    public DayPart {
      stops = List.copyOf(stops);
    }
  }

  /** What a stop is. */
  public enum Kind {
    COMPETITOR,
    JUDGE,
    SCRAMBLER,
    RUNNER,
    /**
     * On the way between two venues or halls: {@code what} is where to, {@code minutes} how long.
     */
    WALK,
    /** A meal or another fixed point: {@code what} is its name. */
    FIXED_POINT,
    /** Wanted elsewhere at the event: {@code what} says as what. */
    BUSY;

    /** The word in style names and keys of sentences. */
    public String word() {
      return name().toLowerCase(Locale.ROOT).replace('_', '-');
    }

    public boolean commitment() {
      return this == COMPETITOR || this == JUDGE || this == SCRAMBLER || this == RUNNER;
    }
  }

  /**
   * One thing in somebody's day.
   *
   * @param ticket null for what is no commitment
   * @param station in fixed seating, counted from 1; 0 where none is theirs
   */
  public record Stop(
      Kind kind,
      Ticket ticket,
      int station,
      String what,
      ZonedDateTime start,
      ZonedDateTime end,
      long minutes) {
    public static Stop commitment(Kind kind, Ticket ticket, int station) {
      return new Stop(kind, ticket, station, "", ticket.start(), ticket.end(), ticket.minutes());
    }

    public static Stop other(Kind kind, String what, ZonedDateTime start, ZonedDateTime end) {
      return new Stop(
          kind, null, 0, what, start, end, java.time.Duration.between(start, end).toMinutes());
    }

    public static Stop walk(String toVenue, ZonedDateTime leave, long minutes) {
      return new Stop(Kind.WALK, null, 0, toVenue, leave, leave.plusMinutes(minutes), minutes);
    }
  }
}
