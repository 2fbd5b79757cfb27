package roundwright.server.store;

/** There is no such thing as was asked for. */
public final class Missing extends RuntimeException {
  private static final long serialVersionUID = 1;

  public Missing(String what) {
    super("There is no " + what);
  }
}
