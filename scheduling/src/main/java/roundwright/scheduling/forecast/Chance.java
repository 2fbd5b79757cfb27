package roundwright.scheduling.forecast;

/**
 * Times drawn by chance: SplitMix64 (Steele, Lea and Flood 2014) as in the search, which this
 * package may not know, and normal deviates by the polar method (Marsaglia and Bray 1964). The same
 * seed gives the same numbers on every Java version. Not thread-safe.
 */
final class Chance {
  private static final long GOLDEN_GAMMA = 0x9E3779B97F4A7C15L;

  private long state;
  private double spare;
  private boolean hasSpare;

  Chance(long seed) {
    this.state = seed;
  }

  private long nextLong() {
    state += GOLDEN_GAMMA;
    long z = state;
    z = (z ^ (z >>> 30)) * 0xBF58476D1CE4E5B9L;
    z = (z ^ (z >>> 27)) * 0x94D049BB133111EBL;
    return z ^ (z >>> 31);
  }

  /** Above 0 and below 1. */
  double uniform() {
    return ((nextLong() >>> 12) + 0.5) * 0x1p-52;
  }

  double normal() {
    if (hasSpare) {
      hasSpare = false;
      return spare;
    }
    double x;
    double y;
    double square;
    do {
      x = 2 * uniform() - 1;
      y = 2 * uniform() - 1;
      square = x * x + y * y;
    } while (square >= 1 || square == 0);
    double factor = Math.sqrt(-2 * StrictMath.log(square) / square);
    spare = y * factor;
    hasSpare = true;
    return x * factor;
  }

  /** Log-normal with that mean; a spread of 0 is the mean itself. */
  double logNormal(double mean, double sigma) {
    return sigma == 0 ? mean : mean * StrictMath.exp(sigma * normal() - sigma * sigma / 2);
  }

  double exponential(double mean) {
    return -mean * StrictMath.log(uniform());
  }
}
