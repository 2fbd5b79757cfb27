package roundwright.scheduling.cost;

/** How heavily something that a rule finds weighs: levels are compared one before the other. */
public enum Level {
  /** A rule broken. */
  BREACH,
  /** A wanted duty that nobody fills. */
  GAP,
  /** Discomfort, weighted. */
  STRAIN,
  /** Worth saying, costs nothing. */
  NOTICE;

  /** The word used in plan files. */
  public String word() {
    return name().toLowerCase(java.util.Locale.ROOT);
  }
}
