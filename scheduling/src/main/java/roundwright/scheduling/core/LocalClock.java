package roundwright.scheduling.core;

import java.time.Instant;
import java.time.LocalDateTime;
import java.time.ZoneId;
import java.time.ZoneOffset;
import java.time.zone.ZoneOffsetTransition;
import java.time.zone.ZoneRules;

/**
 * Wall time in one zone over a stretch of epoch minutes, as a short table of offsets: a look-up
 * costs a comparison or two.
 */
public final class LocalClock {
  private static final int MINUTES_A_DAY = 1440;

  private final ZoneId zone;
  private final int[] since;
  private final int[] offsetMinutes;

  LocalClock(ZoneId zone, int fromMinute, int toMinute) {
    this.zone = zone;
    ZoneRules rules = zone.getRules();
    Instant from = Instant.ofEpochSecond(fromMinute * 60L);
    int[] sinceFound = new int[64];
    int[] offsetFound = new int[64];
    sinceFound[0] = Integer.MIN_VALUE;
    offsetFound[0] = rules.getOffset(from).getTotalSeconds() / 60;
    int found = 1;
    ZoneOffsetTransition next = rules.nextTransition(from);
    while (next != null && next.toEpochSecond() / 60 <= toMinute && found < sinceFound.length) {
      sinceFound[found] = Math.toIntExact(next.toEpochSecond() / 60);
      offsetFound[found] = next.getOffsetAfter().getTotalSeconds() / 60;
      found++;
      next = rules.nextTransition(next.getInstant());
    }
    since = java.util.Arrays.copyOf(sinceFound, found);
    offsetMinutes = java.util.Arrays.copyOf(offsetFound, found);
  }

  /** Minutes since 1970-01-01T00:00 on the wall. */
  public int wall(int minute) {
    int at = since.length - 1;
    while (minute < since[at]) {
      at--;
    }
    return minute + offsetMinutes[at];
  }

  /** Whether the wall time comes twice, since clocks are put back around it. */
  public boolean comesTwice(int minute) {
    for (int i = 1; i < since.length; i++) {
      int putBack = offsetMinutes[i - 1] - offsetMinutes[i];
      if (putBack > 0 && minute >= since[i] - putBack && minute < since[i] + putBack) {
        return true;
      }
    }
    return false;
  }

  /** The calendar date as days since 1970-01-01. */
  public int date(int minute) {
    return Math.floorDiv(wall(minute), MINUTES_A_DAY);
  }

  public int minuteOfDay(int minute) {
    return Math.floorMod(wall(minute), MINUTES_A_DAY);
  }

  /**
   * The epoch minute of a wall time; where a clock change skips it, the moment after the change.
   */
  public int minuteAt(LocalDateTime wall) {
    return epochMinute(wall.atZone(zone).toInstant());
  }

  /** The epoch minute of a wall time given as minutes after a date's midnight. */
  public int minuteAt(int date, int minuteOfDay) {
    return minuteAt(
        LocalDateTime.ofEpochSecond(date * 86_400L + minuteOfDay * 60L, 0, ZoneOffset.UTC));
  }

  public static int epochMinute(Instant instant) {
    return Math.toIntExact(Math.floorDiv(instant.getEpochSecond(), 60L));
  }

  public static Instant instant(int minute) {
    return Instant.ofEpochSecond(minute * 60L);
  }
}
