package roundwright.scheduling.repair;

import java.time.Instant;
import java.time.LocalDate;
import java.time.ZoneId;
import java.util.Collections;
import java.util.Optional;
import java.util.Set;
import java.util.TreeSet;
import roundwright.scheduling.model.Group;

/**
 * What of a kept plan a repair may touch; all else stays exactly as it is.
 *
 * @param day only groups that start on this date in their hall's zone
 * @param hall only groups in this hall
 * @param rounds only groups of these rounds; all where empty
 * @param depth how much of those groups
 */
public record Scope(
    Optional<LocalDate> day, Optional<String> hall, Set<String> rounds, Depth depth) {
  /** Everything of every group. */
  public static final Scope ALL =
      new Scope(Optional.empty(), Optional.empty(), Set.of(), Depth.EVERYTHING);

  /** How much of a group may change. */
  public enum Depth {
    /** Times, halls, competitors and crews. */
    EVERYTHING,
    /** Only who is on which duty. */
    CREWS,
    /** Only what breaks a rule or is empty. */
    BROKEN
  }

  public Scope {
    rounds = Collections.unmodifiableSortedSet(new TreeSet<>(rounds));
  }

  boolean holds(Group group, ZoneId zone) {
    Instant start = group.start();
    return day.map(date -> date.equals(start.atZone(zone).toLocalDate())).orElse(true)
        && hall.map(group.hall()::equals).orElse(true)
        && (rounds.isEmpty() || rounds.contains(group.round()));
  }
}
