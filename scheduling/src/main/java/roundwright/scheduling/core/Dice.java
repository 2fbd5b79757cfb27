package roundwright.scheduling.core;

/**
 * The one source of chance: SplitMix64 (Steele, Lea and Flood 2014), written out so that a seed
 * gives the same numbers on every Java version. Not thread-safe: one for each search.
 */
public final class Dice {
  private static final long GOLDEN_GAMMA = 0x9E3779B97F4A7C15L;

  private long state;

  public Dice(long seed) {
    this.state = seed;
  }

  public long nextLong() {
    state += GOLDEN_GAMMA;
    long z = state;
    z = (z ^ (z >>> 30)) * 0xBF58476D1CE4E5B9L;
    z = (z ^ (z >>> 27)) * 0x94D049BB133111EBL;
    return z ^ (z >>> 31);
  }

  /**
   * A number of 0 to {@code bound - 1}; the bias of the multiplication is below one in a million.
   */
  public int below(int bound) {
    return (int) (((nextLong() >>> 32) * bound) >>> 32);
  }
}
