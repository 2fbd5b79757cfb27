package roundwright.server.ticket;

import java.time.Duration;
import java.time.Instant;
import java.time.LocalDate;
import java.time.ZoneId;
import java.time.ZonedDateTime;
import java.util.ArrayList;
import java.util.LinkedHashMap;
import java.util.List;
import java.util.Map;
import java.util.stream.Stream;
import roundwright.server.ticket.Frame.HallRow;
import roundwright.server.web.Lanes;
import roundwright.server.web.Lanes.FixedBlock;
import roundwright.server.web.Lanes.Lane;
import roundwright.server.web.Lanes.VenueLanes;
import roundwright.server.web.Ticket;

/** Lays tickets out as one day's lanes. */
public final class LaneMaker {
  private static final int FIRST_HOUR = 9;
  private static final int HOURS = 9;
  private static final int MINUTES_OF_A_DAY = 24 * 60;

  private final Frame frame;
  private final ZoneId zone;

  /**
   * A maker for an event.
   *
   * @param zone the event's
   */
  public LaneMaker(Frame frame, ZoneId zone) {
    this.frame = frame;
    this.zone = zone;
  }

  /** A lane a hall, a ticket a group; tickets come in order of time. */
  public Lanes byGroup(List<Ticket> tickets, LocalDate day) {
    return lanes(tickets, day, false);
  }

  /** A lane a hall; groups of a round that follow each other are one ticket. */
  public Lanes byRound(List<Ticket> tickets, LocalDate day) {
    return lanes(tickets, day, true);
  }

  private Lanes lanes(List<Ticket> tickets, LocalDate day, boolean joined) {
    Map<String, List<Lane>> byVenue = new LinkedHashMap<>();
    Map<String, HallRow> venues = new LinkedHashMap<>();
    for (HallRow hall : frame.halls()) {
      venues.putIfAbsent(hall.venueCode(), hall);
      List<Ticket> here =
          tickets.stream()
              .filter(ticket -> ticket.hall().code().equals(hall.code()))
              .filter(ticket -> ticket.start().toLocalDate().equals(day))
              .toList();
      List<FixedBlock> fixed = frame.fixedBlocks(hall, day);
      byVenue
          .computeIfAbsent(hall.venueCode(), unused -> new ArrayList<>())
          .add(
              new Lane(
                  hall.mark(),
                  hall.stations(),
                  hall.features(),
                  fixed,
                  joined ? joined(here, fixed) : withJoins(here)));
    }
    List<VenueLanes> shown = new ArrayList<>();
    byVenue.forEach(
        (code, lanes) ->
            shown.add(
                new VenueLanes(
                    venues.get(code).mark().venue(), venues.get(code).address(), lanes)));
    return withAxis(day, shown);
  }

  private Lanes withAxis(LocalDate day, List<VenueLanes> venues) {
    List<Lane> lanes = venues.stream().flatMap(venue -> venue.lanes().stream()).toList();
    int from = starts(lanes).min().orElse(FIRST_HOUR * 60) / 60;
    int to = Math.min(MINUTES_OF_A_DAY, ends(lanes).max().orElse((FIRST_HOUR + HOURS) * 60));
    int hours = Math.max(1, (to + 59) / 60 - from);
    return new Lanes(day, from, hours, utc(day, from), venues);
  }

  private static java.util.stream.IntStream starts(List<Lane> lanes) {
    return lanes.stream()
        .flatMap(
            lane ->
                Stream.concat(
                    lane.tickets().stream().map(ticket -> ticket.start().toLocalTime()),
                    lane.fixedPoints().stream().map(FixedBlock::from)))
        .mapToInt(time -> time.getHour() * 60 + time.getMinute());
  }

  private static java.util.stream.IntStream ends(List<Lane> lanes) {
    return java.util.stream.IntStream.concat(
        lanes.stream()
            .flatMap(lane -> lane.tickets().stream())
            .mapToInt(
                ticket ->
                    ticket.start().getHour() * 60
                        + ticket.start().getMinute()
                        + (int) ticket.minutes()),
        lanes.stream()
            .flatMap(lane -> lane.fixedPoints().stream())
            .mapToInt(
                block ->
                    block.from().getHour() * 60
                        + block.from().getMinute()
                        + (int) block.minutes()));
  }

  private String utc(LocalDate day, int hour) {
    int seconds = day.atTime(Math.min(hour, 23), 0).atZone(zone).getOffset().getTotalSeconds();
    if (seconds == 0) {
      return "UTC";
    }
    int minutes = Math.abs(seconds) / 60;
    String sign = seconds > 0 ? "+" : "\u2212";
    return "UTC"
        + sign
        + minutes / 60
        + (minutes % 60 == 0 ? "" : ":" + String.format("%02d", minutes % 60));
  }

  private List<Ticket> withJoins(List<Ticket> tickets) {
    List<Ticket> marked = new ArrayList<>();
    for (int i = 0; i < tickets.size(); i++) {
      Ticket ticket = tickets.get(i);
      boolean joins = i + 1 < tickets.size() && joins(ticket, tickets.get(i + 1));
      marked.add(joins ? ticket.joining() : ticket);
    }
    return marked;
  }

  private boolean joins(Ticket ticket, Ticket after) {
    long gap = Duration.between(ticket.end(), after.start()).toMinutes();
    return sameRound(ticket, after) && gap >= 0 && gap <= frame.setupMinutes();
  }

  private static boolean sameRound(Ticket one, Ticket other) {
    return one.discipline().equals(other.discipline()) && one.round() == other.round();
  }

  /** Groups of one round in a hall with neither another round nor a fixed point between them. */
  private static List<Ticket> joined(List<Ticket> tickets, List<FixedBlock> fixed) {
    List<Ticket> rounds = new ArrayList<>();
    for (Ticket ticket : tickets) {
      int last = rounds.size() - 1;
      if (last >= 0
          && sameRound(rounds.get(last), ticket)
          && fixed.stream().noneMatch(block -> between(rounds.get(last), block, ticket))) {
        rounds.set(last, together(rounds.get(last), ticket));
      } else {
        rounds.add(ticket);
      }
    }
    return rounds;
  }

  private static boolean between(Ticket before, FixedBlock block, Ticket after) {
    return !block.from().isBefore(before.end().toLocalTime())
        && !block.from().isAfter(after.start().toLocalTime());
  }

  private static Ticket together(Ticket one, Ticket other) {
    ZonedDateTime end = one.end().isAfter(other.end()) ? one.end() : other.end();
    return new Ticket(
        one.group(),
        one.hall(),
        one.discipline(),
        one.round(),
        one.finalRound(),
        Math.min(one.number(), other.number()),
        Math.max(one.lastNumber(), other.lastNumber()),
        one.groups(),
        one.start(),
        end,
        one.state(),
        one.competitors() + other.competitors(),
        List.of(),
        one.breaches() + other.breaches(),
        one.gaps() + other.gaps(),
        false,
        one.pinned() || other.pinned());
  }

  /** The same ticket in the state that the clock gives it. */
  public static Ticket stateAt(Ticket ticket, Instant now) {
    boolean begun = !ticket.start().toInstant().isAfter(now);
    return ticket.in(begun ? Ticket.State.SOLVING : Ticket.State.NEXT);
  }
}
