package roundwright.scheduling.model;

/** What a crew member does in a group; in the order in which a crew is listed. */
public enum Role {
  JUDGE,
  SCRAMBLER,
  RUNNER;

  /** The word used in files. */
  public String word() {
    return name().toLowerCase(java.util.Locale.ROOT);
  }
}
