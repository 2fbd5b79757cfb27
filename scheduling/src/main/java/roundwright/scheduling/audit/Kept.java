package roundwright.scheduling.audit;

import java.time.Instant;
import java.util.Optional;
import roundwright.scheduling.model.Plan;

/**
 * The plan that people have been told, which another is to stay close to.
 *
 * @param plan its people, halls and rounds may have left the event since
 * @param at what starts before this moment can no longer be changed
 */
public record Kept(Plan plan, Optional<Instant> at) {
  public Kept(Plan plan) {
    this(plan, Optional.empty());
  }
}
