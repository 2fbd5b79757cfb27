package roundwright.scheduling;

import java.util.OptionalDouble;
import java.util.OptionalLong;

/**
 * How long and how the engine may search. With a budget of steps the same seed, steps, threads and
 * event give the same plan on every machine; a budget of seconds only decides when to stop.
 *
 * @param seed of the one random generator everything is drawn from
 * @param steps moves tried at most, where bounded
 * @param seconds of elapsed time at most, where bounded; checked often, passed by little
 * @param threads independent searches, the best of which is kept; 1 or more
 */
public record Effort(long seed, OptionalLong steps, OptionalDouble seconds, int threads) {
  public Effort {
    if (threads < 1) {
      throw new IllegalArgumentException("Threads must be 1 or more, not " + threads);
    }
    if (steps.isEmpty() && seconds.isEmpty()) {
      throw new IllegalArgumentException("Give a budget of steps or of seconds");
    }
  }

  public static Effort ofSeconds(double seconds) {
    return new Effort(1, OptionalLong.empty(), OptionalDouble.of(seconds), 1);
  }

  public static Effort ofSteps(long steps) {
    return new Effort(1, OptionalLong.of(steps), OptionalDouble.empty(), 1);
  }

  public Effort withSeed(long newSeed) {
    return new Effort(newSeed, steps, seconds, threads);
  }
}
