package roundwright.server.planning;

import roundwright.scheduling.Effort;
import roundwright.scheduling.Progress;
import roundwright.scheduling.model.Event;
import roundwright.scheduling.model.Plan;

/** Whoever finds plans: the engine, or in tests something that takes no time. */
@FunctionalInterface
public interface Search {
  /** The best plan found, priced and explained; asked to stop, it gives the best so far. */
  Plan plan(Event event, Effort effort, Progress progress);
}
