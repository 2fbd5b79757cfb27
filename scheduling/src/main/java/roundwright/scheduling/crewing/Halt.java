package roundwright.scheduling.crewing;

/** Asked often by every search; once it says so, the search ends with what it has. */
@FunctionalInterface
public interface Halt {
  boolean now();
}
