package roundwright.scheduling.forecast;

/** What a group's length hangs on. */
public enum Bottleneck {
  /** All stations are busy all the time. */
  STATIONS,
  SCRAMBLERS,
  RUNNERS,
  /** The slowest competitor's own attempts, one after the other, with nobody in the way. */
  LONGEST_PATH;

  /** As a sentence names it, such as {@code longest path}. */
  public String word() {
    return name().toLowerCase(java.util.Locale.ROOT).replace('_', ' ');
  }
}
