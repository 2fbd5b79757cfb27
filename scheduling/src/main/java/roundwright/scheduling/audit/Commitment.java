package roundwright.scheduling.audit;

import java.time.Duration;
import java.time.Instant;
import java.util.Comparator;
import java.util.Optional;
import roundwright.scheduling.model.Group;
import roundwright.scheduling.model.Role;

/**
 * Somebody's listing in a group: solving, or a duty.
 *
 * @param role of the duty; empty for solving
 */
record Commitment(String person, Group group, Optional<Role> role) {
  /** In time: by start, then end; then by hall id and number; the listing's place last. */
  static final Comparator<Commitment> IN_TIME =
      Comparator.comparing(Commitment::start)
          .thenComparing(Commitment::end)
          .thenComparing(Commitment::hall)
          .thenComparingInt(commitment -> commitment.group().number())
          .thenComparingInt(commitment -> commitment.role().map(Role::ordinal).orElse(-1));

  Instant start() {
    return group.start();
  }

  Instant end() {
    return group.end();
  }

  String hall() {
    return group.hall();
  }

  boolean isDuty() {
    return role.isPresent();
  }

  long minutes() {
    return Duration.between(start(), end()).toMinutes();
  }
}
