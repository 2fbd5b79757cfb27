package roundwright.scheduling.forecast;

import java.math.BigDecimal;
import java.math.RoundingMode;
import java.util.Collection;
import java.util.EnumMap;
import java.util.HashMap;
import java.util.Map;
import roundwright.scheduling.model.Discipline;
import roundwright.scheduling.model.Event;
import roundwright.scheduling.model.Person;
import roundwright.scheduling.model.Round;
import roundwright.scheduling.model.Rules;
import roundwright.scheduling.model.Seating;

/**
 * The least time of the groups of one round: the asymptotic bounds of its four resources (Denning &
 * Buzen 1978) times the event's slack, up to the next multiple of the grid. Exact decimals, so that
 * no slot is a step too short or too long by a rounding.
 */
public final class LeastTime {
  /** What a competitor without an entry in the discipline counts with. */
  static final BigDecimal STRANGER_SECONDS = BigDecimal.valueOf(60);

  private static final BigDecimal TWO = BigDecimal.valueOf(2);

  private final Rules rules;
  private final Round round;
  private final Discipline discipline;
  private final Map<String, Demand> demands = new HashMap<>();
  private final Map<String, BigDecimal> expected = new HashMap<>();
  private final Demand strangersDemand;

  public LeastTime(Event event, Round round) {
    this.rules = event.rules();
    this.round = round;
    this.discipline =
        event.disciplines().stream()
            .filter(candidate -> candidate.id().equals(round.discipline()))
            .findFirst()
            .orElseThrow(
                () ->
                    new IllegalArgumentException(
                        "Round " + round.id() + " has no discipline " + round.discipline()));
    for (Person person : event.people()) {
      for (Person.Entry entry : person.entries()) {
        if (entry.discipline().equals(round.discipline())) {
          demands.put(person.id(), demand(entry.expectedSeconds()));
          expected.put(person.id(), entry.expectedSeconds());
        }
      }
    }
    this.strangersDemand = demand(STRANGER_SECONDS);
  }

  /**
   * What one competitor asks of a group.
   *
   * @param workSeconds at the station over all attempts
   */
  public record Demand(int attempts, BigDecimal workSeconds) {}

  /**
   * What the competitors of a group ask of it together.
   *
   * @param scramblers wanted
   * @param runners wanted
   * @param shared stations that they share: those in use, or in fixed seating one each
   * @param seconds that each resource would need if it alone were scarce
   */
  record Terms(
      int size,
      int attempts,
      BigDecimal workSeconds,
      int scramblers,
      int runners,
      int shared,
      Map<Bottleneck, Fraction> seconds) {}

  /** Seconds of work for so many servers. */
  record Fraction(BigDecimal seconds, int servers) {
    double value() {
      return seconds.doubleValue() / servers;
    }
  }

  /** What somebody asks of a group of this round; strangers count with sixty seconds. */
  public Demand demand(String person) {
    return demands.getOrDefault(person, strangersDemand);
  }

  BigDecimal expectedSeconds(String person) {
    return expected.getOrDefault(person, STRANGER_SECONDS);
  }

  private Demand demand(BigDecimal seconds) {
    int attempts = round.countedBy().attempts();
    if (round.cutOff().isPresent() && seconds.compareTo(round.cutOff().get().seconds()) >= 0) {
      attempts = Math.min(attempts, round.cutOff().get().attempts());
    }
    BigDecimal times = BigDecimal.valueOf(attempts);
    BigDecimal limit = round.timeLimitSeconds();
    BigDecimal solving =
        round.limitCovers() == Round.LimitCovers.ATTEMPT
            ? seconds.min(limit).multiply(times)
            : seconds.multiply(times).min(limit);
    return new Demand(attempts, solving.add(discipline.handlingSeconds().multiply(times)));
  }

  /**
   * The least minutes of a group.
   *
   * @param competitors ids, at least one
   * @param stations in use
   */
  public int minutes(Collection<String> competitors, int stations) {
    long steps = 0;
    for (Fraction fraction : terms(competitors, stations).seconds().values()) {
      BigDecimal perStep = BigDecimal.valueOf(60L * rules.startGridMinutes() * fraction.servers());
      steps =
          Math.max(
              steps,
              rules
                  .slack()
                  .multiply(fraction.seconds())
                  .divide(perStep, 0, RoundingMode.UP)
                  .longValueExact());
    }
    return Math.toIntExact(steps * rules.startGridMinutes());
  }

  Terms terms(Collection<String> competitors, int stations) {
    int size = competitors.size();
    Round.CrewSize crew = wantedCrew(size, stations);
    BigDecimal scramble = crew.scramblers() > 0 ? discipline.scrambleSeconds() : BigDecimal.ZERO;
    BigDecimal carries =
        crew.runners() > 0 ? discipline.carrySeconds().multiply(TWO) : BigDecimal.ZERO;
    BigDecimal around = scramble.add(carries);
    int attempts = 0;
    BigDecimal work = BigDecimal.ZERO;
    BigDecimal longest = BigDecimal.ZERO;
    for (String person : competitors) {
      Demand demand = demand(person);
      attempts += demand.attempts();
      work = work.add(demand.workSeconds());
      longest =
          longest.max(
              demand.workSeconds().add(around.multiply(BigDecimal.valueOf(demand.attempts()))));
    }
    int shared = seating() == Seating.FIXED ? size : stations;
    BigDecimal all = BigDecimal.valueOf(attempts);
    Map<Bottleneck, Fraction> seconds = new EnumMap<>(Bottleneck.class);
    seconds.put(Bottleneck.STATIONS, new Fraction(work, shared));
    seconds.put(
        Bottleneck.SCRAMBLERS,
        new Fraction(all.multiply(scramble), Math.max(1, crew.scramblers())));
    seconds.put(
        Bottleneck.RUNNERS, new Fraction(all.multiply(carries), Math.max(1, crew.runners())));
    seconds.put(Bottleneck.LONGEST_PATH, new Fraction(longest, 1));
    return new Terms(size, attempts, work, crew.scramblers(), crew.runners(), shared, seconds);
  }

  Seating seating() {
    return round.seating().orElse(rules.seating());
  }

  Discipline discipline() {
    return discipline;
  }

  Round round() {
    return round;
  }

  /** Up to the next multiple of the grid of starts. */
  int onGrid(double minutes) {
    int grid = rules.startGridMinutes();
    return (int) Math.ceil(minutes / grid - 1e-9) * grid;
  }

  int slotPercentile() {
    return rules.slotPercentile();
  }

  /** The crew that a group of such a size on so many stations wants. */
  public Round.CrewSize wantedCrew(int size, int stations) {
    int judges = Math.min(stations, size);
    return round
        .crew()
        .orElseGet(
            () ->
                new Round.CrewSize(
                    judges,
                    oneFor(rules.stationsPerScrambler(), judges),
                    oneFor(rules.stationsPerRunner(), judges)));
  }

  private static int oneFor(BigDecimal stations, int judges) {
    return stations.signum() == 0
        ? 0
        : BigDecimal.valueOf(judges).divide(stations, 0, RoundingMode.UP).intValueExact();
  }
}
