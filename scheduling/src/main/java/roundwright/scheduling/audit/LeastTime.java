package roundwright.scheduling.audit;

import java.math.BigDecimal;
import java.math.RoundingMode;
import java.util.List;
import roundwright.scheduling.model.Discipline;
import roundwright.scheduling.model.Group;
import roundwright.scheduling.model.Round;

/**
 * The least time of a group in minutes: the asymptotic bounds of four resources (Denning & Buzen
 * 1978) times the event's slack, up to the next multiple of the grid. Exact.
 */
final class LeastTime {
  private LeastTime() {}

  static long minutes(Directory event, Group group) {
    Round round = event.round(group.round());
    Discipline discipline = event.discipline(round);
    WantedCrew crew = WantedCrew.of(event, group);
    BigDecimal scramble = crew.scramblers() == 0 ? BigDecimal.ZERO : discipline.scrambleSeconds();
    BigDecimal carries =
        crew.runners() == 0
            ? BigDecimal.ZERO
            : discipline.carrySeconds().multiply(BigDecimal.valueOf(2));
    BigDecimal works = BigDecimal.ZERO;
    BigDecimal longestPath = BigDecimal.ZERO;
    BigDecimal scrambles = BigDecimal.ZERO;
    BigDecimal carried = BigDecimal.ZERO;
    for (String person : group.competitors()) {
      BigDecimal expected = event.expectedSeconds(person, round);
      BigDecimal attempts = BigDecimal.valueOf(attempts(round, expected));
      BigDecimal work = work(round, discipline, expected, attempts);
      works = works.add(work);
      scrambles = scrambles.add(attempts.multiply(scramble));
      carried = carried.add(attempts.multiply(carries));
      longestPath = longestPath.max(work.add(attempts.multiply(scramble.add(carries))));
    }
    long steps =
        List.of(
                steps(event, works, Math.max(1, event.shared(round, group))),
                steps(event, longestPath, 1),
                steps(event, scrambles, Math.max(1, crew.scramblers())),
                steps(event, carried, Math.max(1, crew.runners())))
            .stream()
            .mapToLong(Long::longValue)
            .max()
            .orElseThrow();
    return steps * event.rules().startGridMinutes();
  }

  private static int attempts(Round round, BigDecimal expected) {
    int all = round.countedBy().attempts();
    return round
        .cutOff()
        .filter(cutOff -> expected.compareTo(cutOff.seconds()) >= 0)
        .map(cutOff -> Math.min(all, cutOff.attempts()))
        .orElse(all);
  }

  private static BigDecimal work(
      Round round, Discipline discipline, BigDecimal expected, BigDecimal attempts) {
    BigDecimal limit = round.timeLimitSeconds();
    BigDecimal handling = attempts.multiply(discipline.handlingSeconds());
    return switch (round.limitCovers()) {
      case ATTEMPT -> attempts.multiply(expected.min(limit)).add(handling);
      case ROUND -> attempts.multiply(expected).min(limit).add(handling);
    };
  }

  /** Steps of the grid that the seconds of work take so many servers, with slack; rounded up. */
  private static long steps(Directory event, BigDecimal seconds, int servers) {
    long divisor = servers * 60L * event.rules().startGridMinutes();
    return event
        .rules()
        .slack()
        .multiply(seconds)
        .divide(BigDecimal.valueOf(divisor), 0, RoundingMode.CEILING)
        .longValueExact();
  }
}
