package roundwright.scheduling.core;

import java.math.BigDecimal;
import java.math.RoundingMode;
import java.util.List;
import roundwright.scheduling.model.Discipline;
import roundwright.scheduling.model.Round;

/**
 * The least time of a group in exact long arithmetic: the asymptotic bounds of a closed loop of
 * stations, scramblers and runners (Denning and Buzen 1978) times the event's slack. Seconds are
 * held as whole microseconds; finer ones are rounded up.
 */
public final class Pace {
  private static final long MICROS = 1_000_000L;
  private static final int FINEST_SLACK_DECIMALS = 4;
  private static final long FINEST_PARTS = 10_000;

  /** Of each seat: attempts, and the whole work at the station in microseconds. */
  public final int[] attempts;

  public final long[] workMicros;

  private final long[] scrambleMicros;
  private final long[] carryMicros;
  private final long slackNumerator;
  private final long slackDenominator;
  private final long gridMicros;
  private final int gridMinutes;

  Pace(Problem problem, List<Discipline> disciplineList) {
    attempts = new int[problem.seats];
    workMicros = new long[problem.seats];
    scrambleMicros = new long[problem.rounds];
    carryMicros = new long[problem.rounds];
    for (int r = 0; r < problem.rounds; r++) {
      Discipline discipline = disciplineList.get(problem.roundDiscipline[r]);
      scrambleMicros[r] = micros(discipline.scrambleSeconds());
      carryMicros[r] = micros(discipline.carrySeconds());
      for (int seat = problem.seatStart[r]; seat < problem.seatStart[r + 1]; seat++) {
        measure(problem, seat, problem.roundList.get(r), discipline);
      }
    }
    BigDecimal slack =
        problem
            .event
            .rules()
            .slack()
            .setScale(FINEST_SLACK_DECIMALS, RoundingMode.CEILING)
            .stripTrailingZeros();
    int decimals = Math.max(0, slack.scale());
    slackNumerator = slack.movePointRight(decimals).longValueExact();
    slackDenominator = BigDecimal.TEN.pow(decimals).longValueExact();
    gridMinutes = problem.grid();
    gridMicros = gridMinutes * 60L * MICROS;
  }

  private Pace(Pace pace, long slackNumerator, long slackDenominator) {
    attempts = pace.attempts;
    workMicros = pace.workMicros;
    scrambleMicros = pace.scrambleMicros;
    carryMicros = pace.carryMicros;
    gridMicros = pace.gridMicros;
    gridMinutes = pace.gridMinutes;
    this.slackNumerator = slackNumerator;
    this.slackDenominator = slackDenominator;
  }

  private void measure(Problem problem, int seat, Round round, Discipline discipline) {
    BigDecimal expected =
        Entrants.expectedSeconds(
            problem.personList.get(problem.seatPerson[seat]), round.discipline());
    int count = round.countedBy().attempts();
    if (round.cutOff().isPresent() && expected.compareTo(round.cutOff().get().seconds()) >= 0) {
      count = Math.min(count, round.cutOff().get().attempts());
    }
    BigDecimal times = BigDecimal.valueOf(count);
    BigDecimal solving =
        round.limitCovers() == Round.LimitCovers.ROUND
            ? times.multiply(expected).min(round.timeLimitSeconds())
            : times.multiply(expected.min(round.timeLimitSeconds()));
    attempts[seat] = count;
    workMicros[seat] = micros(solving.add(times.multiply(discipline.handlingSeconds())));
  }

  private static long micros(BigDecimal seconds) {
    return seconds.movePointRight(6).setScale(0, RoundingMode.CEILING).longValueExact();
  }

  /** One competitor's way through the loop when nobody is in theirs. */
  public long pathMicros(int round, int seat, int scramblers, int runners) {
    long path = workMicros[seat];
    if (scramblers > 0) {
      path += attempts[seat] * scrambleMicros[round];
    }
    if (runners > 0) {
      path += attempts[seat] * 2L * carryMicros[round];
    }
    return path;
  }

  /** Least minutes of a group that holds one competitor and has scramblers and runners. */
  public int aloneMinutes(int round, int seat) {
    return leastMinutes(round, 0, 0, pathMicros(round, seat, 1, 1), 1, 0, 0);
  }

  /**
   * Least minutes of a group, a multiple of the start grid.
   *
   * @param active stations in use, or in fixed seating the size
   * @param attemptsInAll over the group's competitors
   */
  public int leastMinutes(
      int round,
      long workInAllMicros,
      int attemptsInAll,
      long longestPathMicros,
      int active,
      int scramblers,
      int runners) {
    long grids = Math.max(1, slots(workInAllMicros, Math.max(1, active)));
    grids = Math.max(grids, slots(longestPathMicros, 1));
    if (scramblers > 0) {
      grids = Math.max(grids, slots(attemptsInAll * scrambleMicros[round], scramblers));
    }
    if (runners > 0) {
      grids = Math.max(grids, slots(attemptsInAll * 2L * carryMicros[round], runners));
    }
    return Math.toIntExact(grids * gridMinutes);
  }

  private long slots(long micros, int servers) {
    long least = Math.multiplyExact(micros, slackNumerator);
    long slot = Math.multiplyExact(gridMicros, slackDenominator) * servers;
    return (least + slot - 1) / slot;
  }

  /** The same pace with another slack, where that is the larger one. */
  public Pace withSlack(double slack) {
    long parts = (long) Math.ceil(slack * FINEST_PARTS);
    return parts * slackDenominator <= slackNumerator * FINEST_PARTS
        ? this
        : new Pace(this, parts, FINEST_PARTS);
  }
}
