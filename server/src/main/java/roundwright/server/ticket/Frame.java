package roundwright.server.ticket;

import java.time.Instant;
import java.time.LocalDate;
import java.time.LocalDateTime;
import java.time.ZoneId;
import java.util.Comparator;
import java.util.List;
import java.util.Map;
import java.util.Set;
import java.util.stream.Collectors;
import roundwright.server.web.EventMark;
import roundwright.server.web.HallMark;
import roundwright.server.web.Lanes.FixedBlock;
import roundwright.server.web.Visitor;

/**
 * What of an event every page with tickets needs: its halls in order, its rounds by code, its fixed
 * points, openings and the ways between its venues.
 *
 * @param disciplines how many the event has
 * @param setupMinutes between two groups in a hall
 * @param pinnedGroups round and number, as {@code round/number}, of each group that a pin holds
 */
public record Frame(
    List<HallRow> halls,
    Map<String, RoundRow> rounds,
    List<FixedRow> fixedPoints,
    List<OpeningRow> openings,
    List<WayRow> ways,
    int disciplines,
    int setupMinutes,
    Set<String> pinnedGroups) {
  private static final int MINUTES_BETWEEN_UNNAMED_VENUES = 30;

  /**
   * A hall with its venue.
   *
   * @param zone the venue's
   */
  public record HallRow(
      HallMark mark,
      int stations,
      List<String> features,
      String venueCode,
      String address,
      ZoneId zone) {
    public String code() {
      return mark.code();
    }
  }

  /**
   * A round.
   *
   * @param last true where it is the last of several rounds and no further sitting of another
   */
  public record RoundRow(
      String code, String discipline, int number, boolean last, boolean fixedSeating) {}

  /** A fixed point in the local time of whichever hall it concerns. */
  public record FixedRow(
      String name,
      LocalDateTime from,
      LocalDateTime to,
      boolean inEveryHall,
      List<String> hallCodes) {
    boolean concerns(HallRow hall) {
      return inEveryHall || hallCodes.contains(hall.code());
    }

    public Instant start(ZoneId zone) {
      return from.atZone(zone).toInstant();
    }

    public Instant end(ZoneId zone) {
      return to.atZone(zone).toInstant();
    }
  }

  /** When a hall is open. */
  public record OpeningRow(String hall, Instant from) {}

  /** The minutes between two venues, whichever way. */
  public record WayRow(String oneVenue, String otherVenue, int minutes) {
    boolean joins(String one, String other) {
      return (oneVenue.equals(one) && otherVenue.equals(other))
          || (oneVenue.equals(other) && otherVenue.equals(one));
    }
  }

  /** The hall of a code; one that is no longer in the event is named by its code. */
  public HallRow hall(String code) {
    return halls.stream()
        .filter(hall -> hall.code().equals(code))
        .findFirst()
        .orElseGet(
            () ->
                new HallRow(
                    HallMark.at(halls.size(), code, code, code),
                    0,
                    List.of(),
                    code,
                    "",
                    ZoneId.of("UTC")));
  }

  /** A round; one that is no longer in the event is named by its code. */
  public RoundRow round(String code) {
    return rounds.getOrDefault(code, new RoundRow(code, code, 1, false, false));
  }

  /** The fixed points that concern a hall, in order of time. */
  public List<FixedRow> fixedIn(HallRow hall) {
    return fixedPoints.stream()
        .filter(point -> point.concerns(hall))
        .sorted(Comparator.comparing(FixedRow::from))
        .toList();
  }

  List<FixedBlock> fixedBlocks(HallRow hall, LocalDate day) {
    return fixedIn(hall).stream()
        .filter(point -> point.from().toLocalDate().equals(day))
        .map(
            point ->
                new FixedBlock(
                    point.name(),
                    point.from().toLocalTime(),
                    java.time.Duration.between(point.from(), point.to()).toMinutes()))
        .toList();
  }

  /** Minutes on the way between two venues; 0 where they are one. */
  public int walkMinutes(String oneVenue, String otherVenue) {
    if (oneVenue.equals(otherVenue)) {
      return 0;
    }
    return ways.stream()
        .filter(way -> way.joins(oneVenue, otherVenue))
        .map(WayRow::minutes)
        .findFirst()
        .orElse(MINUTES_BETWEEN_UNNAMED_VENUES);
  }

  /** The days on which a hall is open, in order; today where none ever is. */
  public List<LocalDate> days(LocalDate today) {
    Set<LocalDate> days =
        openings.stream()
            .map(opening -> opening.from().atZone(hall(opening.hall()).zone()).toLocalDate())
            .collect(Collectors.toSet());
    return days.isEmpty() ? List.of(today) : days.stream().sorted().toList();
  }

  /** What the top of the event's pages says. */
  public EventMark mark(Visitor.EventName event, LocalDate today) {
    return new EventMark(event.slug(), event.name(), days(today), disciplines);
  }

  /**
   * The day asked for, where it is one of the event's; else today's, else the next, else the first.
   */
  public LocalDate day(java.util.Optional<LocalDate> asked, LocalDate today) {
    List<LocalDate> days = days(today);
    return asked
        .filter(days::contains)
        .or(() -> days.stream().filter(day -> !day.isBefore(today)).findFirst())
        .orElse(days.get(0));
  }
}
