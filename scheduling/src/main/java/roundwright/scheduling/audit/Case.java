package roundwright.scheduling.audit;

import java.util.Optional;
import roundwright.scheduling.model.Plan;

/** A plan before the auditor: the event, the plan in order, and what it changes of a kept one. */
record Case(Directory event, Book plan, Optional<Changes> changes, Wording words) {
  static Case of(Directory event, Plan plan, Optional<Kept> kept) {
    Book book = new Book(event, plan);
    return new Case(
        event, book, kept.map(given -> Changes.between(event, plan, given)), new Wording(event));
  }
}
