package roundwright.server.store;

/** Somebody else changed the same thing meanwhile. */
public final class StaleVersion extends RuntimeException {
  private static final long serialVersionUID = 1;

  public StaleVersion(String what) {
    super(what + " was changed by somebody else meanwhile; load it again");
  }
}
