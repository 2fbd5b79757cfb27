package roundwright.server.editions;

import java.time.Instant;
import java.time.LocalDate;
import java.time.ZoneId;
import java.time.ZonedDateTime;
import java.util.ArrayList;
import java.util.Comparator;
import java.util.List;
import java.util.Map;
import java.util.Optional;
import java.util.TreeMap;
import roundwright.server.editions.PersonPage.DayPart;
import roundwright.server.editions.PersonPage.Kind;
import roundwright.server.editions.PersonPage.Stop;
import roundwright.server.ticket.Frame;
import roundwright.server.ticket.Frame.FixedRow;
import roundwright.server.ticket.Frame.HallRow;
import roundwright.server.web.Visitor.EventName;

/**
 * Lays a person's commitments out: what is done, what is next, what comes after, and between them
 * the walks, fixed points and busy times.
 */
final class PersonPageMaker {
  private final Frame frame;
  private final EventName event;
  private final ZonedDateTime asOf;

  PersonPageMaker(Frame frame, EventName event, Instant now) {
    this.frame = frame;
    this.event = event;
    this.asOf = now.atZone(event.zone());
  }

  /**
   * Lays them out.
   *
   * @param commitments in order of time
   */
  PersonPage page(String name, boolean own, int edition, List<Stop> commitments, List<Stop> busy) {
    Optional<Stop> next = commitments.stream().filter(this::notOver).findFirst();
    List<Stop> done = commitments.stream().filter(stop -> !notOver(stop)).toList();
    Map<LocalDate, List<Stop>> days = new TreeMap<>();
    for (Stop stop : stops(commitments, busy)) {
      if (notOver(stop) && next.isPresent() && !stop.start().isBefore(next.get().start())) {
        days.computeIfAbsent(stop.start().toLocalDate(), unused -> new ArrayList<>()).add(stop);
      }
    }
    next.ifPresent(stop -> days.get(stop.start().toLocalDate()).remove(stop));
    List<DayPart> parts =
        days.entrySet().stream()
            .filter(day -> day.getValue().stream().anyMatch(stop -> stop.kind().commitment()))
            .map(day -> new DayPart(day.getKey(), day.getValue()))
            .toList();
    return new PersonPage(
        frame.mark(event, asOf.toLocalDate()), name, own, edition, asOf, next, parts, done);
  }

  private boolean notOver(Stop stop) {
    return stop.end().isAfter(asOf);
  }

  /** The commitments with what lies between them, in order of time. */
  private List<Stop> stops(List<Stop> commitments, List<Stop> busy) {
    List<Stop> all = new ArrayList<>(commitments);
    all.addAll(busy);
    for (int i = 1; i < commitments.size(); i++) {
      walk(commitments.get(i - 1), commitments.get(i)).ifPresent(all::add);
      all.addAll(fixedBetween(commitments.get(i - 1), commitments.get(i)));
    }
    all.sort(Comparator.comparing(Stop::start).thenComparing(Stop::kind));
    return all;
  }

  private Optional<Stop> walk(Stop before, Stop after) {
    HallRow from = hall(before);
    HallRow to = hall(after);
    int minutes = frame.walkMinutes(from.venueCode(), to.venueCode());
    if (minutes == 0 || !sameDay(before, after)) {
      return Optional.empty();
    }
    return Optional.of(Stop.walk(to.mark().venue(), after.start().minusMinutes(minutes), minutes));
  }

  private List<Stop> fixedBetween(Stop before, Stop after) {
    HallRow hall = hall(after);
    if (!sameDay(before, after)) {
      return List.of();
    }
    return frame.fixedIn(hall).stream()
        .filter(point -> !point.start(hall.zone()).isBefore(before.end().toInstant()))
        .filter(point -> !point.end(hall.zone()).isAfter(after.start().toInstant()))
        .map(point -> fixed(point, hall.zone()))
        .toList();
  }

  private static Stop fixed(FixedRow point, ZoneId zone) {
    return Stop.other(
        Kind.FIXED_POINT, point.name(), point.from().atZone(zone), point.to().atZone(zone));
  }

  private HallRow hall(Stop stop) {
    return frame.hall(stop.ticket().hall().code());
  }

  private static boolean sameDay(Stop one, Stop other) {
    return one.start().toLocalDate().equals(other.start().toLocalDate());
  }
}
