package roundwright.scheduling;

import roundwright.scheduling.model.Event;

/** The sizes of event that the engine is measured on. */
public enum EventSize {
  TINY(25, 1, 1, 2),
  CLUB(95, 1, 1, 5),
  OPEN(230, 2, 2, 10),
  NATIONAL(620, 3, 3, 30),
  CONTINENTAL(2060, 5, 4, 60);

  final int people;
  final int halls;
  final int days;

  /** How long a search such an event is given. */
  final int seconds;

  EventSize(int people, int halls, int days, int seconds) {
    this.people = people;
    this.halls = halls;
    this.days = days;
    this.seconds = seconds;
  }

  /** A believable event of this size; the same for the same seed. */
  Event event(long seed) {
    return RandomEvents.fair(seed, people, halls, days).event();
  }
}
