package roundwright.scheduling;

import roundwright.scheduling.model.Event;

/** The sizes of event that the engine is measured on. */
public enum EventSize {
  TINY(25, 1, 1, 2, 2_000_000),
  CLUB(95, 1, 1, 5, 3_000_000),
  OPEN(230, 2, 2, 10, 4_000_000),
  NATIONAL(620, 3, 3, 30, 8_000_000),
  CONTINENTAL(2060, 5, 4, 60, 10_000_000);

  final int people;
  final int halls;
  final int days;

  /** How long a search such an event is given. */
  final int seconds;

  /** About as many steps as one quiet core makes in that time. */
  final long steps;

  EventSize(int people, int halls, int days, int seconds, long steps) {
    this.people = people;
    this.halls = halls;
    this.days = days;
    this.seconds = seconds;
    this.steps = steps;
  }

  /** A believable event of this size; the same for the same seed. */
  Event event(long seed) {
    return RandomEvents.fair(seed, people, halls, days).event();
  }
}
