package roundwright.scheduling.model;

import java.math.BigDecimal;
import java.time.Instant;
import java.util.List;
import java.util.Optional;
import java.util.OptionalInt;

/**
 * One round of a discipline, with whatever the organiser has laid down about it; an empty optional
 * leaves the matter to the event's rules or to the engine.
 *
 * @param number 1, 2, 3 ... without a hole within the discipline
 * @param cutOff who is not under it in its attempts stops after them
 * @param advance who goes on to the next round
 * @param continues a further sitting of the round before: same entrants, results counted together
 * @param halls ids of the only halls it may be in
 * @param fill competitors per station in use
 * @param stations most stations that may be used at once
 * @param groups exactly so many groups
 * @param minutesPerGroup exactly so long
 * @param crew exactly this for each group
 * @param entrants ids of exactly these people
 */
public record Round(
    String id,
    String discipline,
    int number,
    CountedBy countedBy,
    BigDecimal timeLimitSeconds,
    LimitCovers limitCovers,
    Optional<CutOff> cutOff,
    Optional<Advance> advance,
    boolean continues,
    Optional<List<String>> halls,
    Optional<Seating> seating,
    Optional<BigDecimal> fill,
    OptionalInt stations,
    OptionalInt groups,
    OptionalInt minutesPerGroup,
    Optional<CrewSize> crew,
    Seeding seeding,
    Optional<Instant> notBefore,
    Optional<Instant> notAfter,
    Optional<List<String>> entrants) {
  /** The time limit of a round that names none. */
  public static final BigDecimal TIME_LIMIT_SECONDS = BigDecimal.valueOf(600);

  public Round {
    halls = halls.map(List::copyOf);
    entrants = entrants.map(List::copyOf);
  }

  /** How a round's result comes from its attempts. */
  public enum CountedBy {
    AVERAGE_OF_5(5),
    MEAN_OF_3(3),
    BEST_OF_5(5),
    BEST_OF_3(3),
    BEST_OF_2(2),
    BEST_OF_1(1);

    private final int attempts;

    CountedBy(int attempts) {
      this.attempts = attempts;
    }

    public int attempts() {
      return attempts;
    }

    /** The word used in files, such as {@code average-of-5}. */
    public String word() {
      return name().toLowerCase(java.util.Locale.ROOT).replace('_', '-');
    }
  }

  /** What the time limit covers: each attempt, or the sum of a round's attempts. */
  public enum LimitCovers {
    ATTEMPT,
    ROUND
  }

  /** Who is in the earlier groups. */
  public enum Seeding {
    SLOW_FIRST,
    FAST_FIRST,
    MIXED
  }

  /** A result of under {@code seconds} in the first {@code attempts}, or no further attempts. */
  public record CutOff(int attempts, BigDecimal seconds) {}

  /** Who goes on to the next round. */
  public sealed interface Advance {
    /** The fastest so many. */
    record Count(int people) implements Advance {}

    /** The fastest so many of a hundred, rounded down, at least one. */
    record Percent(BigDecimal percent) implements Advance {}

    /** Everybody under so many seconds. */
    record Under(BigDecimal seconds) implements Advance {}
  }

  /** A crew as the organiser wants it for each group of a round. */
  public record CrewSize(int judges, int scramblers, int runners) {}
}
