package roundwright.scheduling.file;

import java.time.LocalDateTime;
import java.time.ZoneId;
import java.time.zone.ZoneOffsetTransition;
import java.util.Optional;

/** Local times that a change of clocks leaves without a meaning, or with two. */
final class ClockChange {
  private ClockChange() {}

  /** What to write instead of a local time that is skipped or repeated in a zone; else empty. */
  static Optional<String> remedy(LocalDateTime local, ZoneId zone) {
    ZoneOffsetTransition change = zone.getRules().getTransition(local);
    if (change == null) {
      return Optional.empty();
    }
    LocalDateTime first = change.isGap() ? change.getDateTimeBefore() : change.getDateTimeAfter();
    LocalDateTime after = change.isGap() ? change.getDateTimeAfter() : change.getDateTimeBefore();
    return Optional.of(
        "the change of clocks in "
            + zone
            + (change.isGap() ? " skips" : " repeats")
            + " this time: write "
            + first.minusMinutes(1)
            + " or earlier, or "
            + after
            + " or later");
  }
}
