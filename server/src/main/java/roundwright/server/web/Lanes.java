package roundwright.server.web;

import java.time.LocalDate;
import java.time.LocalTime;
import java.util.List;

/**
 * One day of an event as lanes: a lane a hall, time running on.
 *
 * @param fromHour first hour of the axis
 * @param hours how many hours the axis has, at least 1
 * @param utc the zone's distance from UTC on that day, such as {@code UTC+1}
 */
public record Lanes(LocalDate day, int fromHour, int hours, String utc, List<VenueLanes> venues) {
  private static final long TO_THE_MINUTE = 360;
  private static final long LONGEST = 600;

  public Lanes {
    venues = List.copyOf(venues);
  }

  /**
   * Classes of {@code clock.css} that place something on an axis of time, such as {@code h9 m20
   * for25}; what lasts longer than it has classes for is rounded up to those there are.
   */
  static String slot(LocalTime from, long minutes) {
    long length = minutes <= TO_THE_MINUTE ? minutes : Math.min(LONGEST, (minutes + 4) / 5 * 5);
    return "h" + from.getHour() + " m" + from.getMinute() + " for" + length;
  }

  /** The full hours of the axis, its end included. */
  public List<Integer> fullHours() {
    return java.util.stream.IntStream.rangeClosed(fromHour, fromHour + hours).boxed().toList();
  }

  /** Every ticket of the day in order of start, then hall. */
  public List<Ticket> down() {
    return venues.stream()
        .flatMap(venue -> venue.lanes().stream())
        .flatMap(lane -> lane.tickets().stream())
        .sorted(
            java.util.Comparator.comparing(Ticket::start).thenComparing(one -> one.hall().letter()))
        .toList();
  }

  /** The fixed points of the day, each once, in order of time. */
  public List<FixedBlock> fixedPoints() {
    return venues.stream()
        .flatMap(venue -> venue.lanes().stream())
        .flatMap(lane -> lane.fixedPoints().stream())
        .distinct()
        .sorted(java.util.Comparator.comparing(FixedBlock::from))
        .toList();
  }

  public List<HallMark> halls() {
    return venues.stream().flatMap(venue -> venue.lanes().stream()).map(Lane::hall).toList();
  }

  /**
   * A venue's lanes.
   *
   * @param address empty where none is known
   */
  public record VenueLanes(String name, String address, List<Lane> lanes) {
    public VenueLanes {
      lanes = List.copyOf(lanes);
    }
  }

  /** A hall's lane. */
  public record Lane(
      HallMark hall,
      int stations,
      List<String> features,
      List<FixedBlock> fixedPoints,
      List<Ticket> tickets) {
    public Lane {
      features = List.copyOf(features);
      fixedPoints = List.copyOf(fixedPoints);
      tickets = List.copyOf(tickets);
    }
  }

  /** A fixed point in a hall on that day. */
  public record FixedBlock(String name, LocalTime from, long minutes) {
    public LocalTime to() {
      return from.plusMinutes(minutes);
    }

    public String slot() {
      return Lanes.slot(from, minutes);
    }
  }
}
