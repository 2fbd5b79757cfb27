package roundwright.scheduling.model;

/** How competitors and stations meet. */
public enum Seating {
  /** Stations are shared: whoever's puzzle is ready takes a free one. */
  ROTATING,
  /** Each competitor has a station of their own. */
  FIXED
}
