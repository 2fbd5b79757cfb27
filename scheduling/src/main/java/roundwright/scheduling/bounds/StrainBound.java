package roundwright.scheduling.bounds;

import java.util.Locale;
import java.util.Map;
import java.util.Optional;
import roundwright.scheduling.core.Frame;
import roundwright.scheduling.core.Problem;
import roundwright.scheduling.cost.RuleName;
import roundwright.scheduling.crewing.Standing;
import roundwright.scheduling.model.Event;
import roundwright.scheduling.model.Plan;
import roundwright.scheduling.rules.RuleBook;

/**
 * The least strain that any plan without breaches can have with the same day plan, groups of the
 * same sizes and as many people in each crew. What follows from these alone is exact; the rest is
 * bounded from below by parts that no plan can escape:
 *
 * <ul>
 *   <li>seeding and newcomers' first groups, by an exact transportation for each round;
 *   <li>load and waiting together, by a convex flow: see {@link DutyFlow}.
 * </ul>
 *
 * Rules that a plan may escape altogether (hops, breathing, meals and so on) count nothing.
 *
 * @param strain the plan's own
 * @param least no such plan has less
 * @param exact part of both that the day plan, sizes and crew numbers decide
 * @param seeding least weighted seeding and newcomer-first
 * @param loadAndWaiting least weighted load and waiting
 */
public record StrainBound(
    double strain, double least, double exact, double seeding, double loadAndWaiting) {
  private static final double MILLIONTHS = 1e6;
  private static final double PERCENT = 100;

  /**
   * The bound for a plan; none for one with breaches, which may have less strain for breaking
   * rules.
   *
   * @throws IllegalArgumentException where the plan names what the event does not have
   */
  public static Optional<StrainBound> of(Event event, Plan plan) {
    Standing standing = new Standing(event, plan);
    if (!standing.unseated.isEmpty() || standing.ledger.hard() >= RuleBook.BREACH) {
      return Optional.empty();
    }
    Map<RuleName, Long> priced = standing.book.explain(standing.board);
    double exact = 0;
    for (RuleName rule : priced.keySet()) {
      if (isDecided(rule)) {
        exact += priced.get(rule) / MILLIONTHS;
      }
    }
    double seeding = 0;
    SeedingFlow seats = new SeedingFlow(standing);
    for (int round = 0; round < standing.problem.rounds; round++) {
      seeding += seats.least(round) / MILLIONTHS;
    }
    double duties = new DutyFlow(standing).least();
    double strain = standing.ledger.strain() / MILLIONTHS;
    return Optional.of(new StrainBound(strain, exact + seeding + duties, exact, seeding, duties));
  }

  private static boolean isDecided(RuleName rule) {
    return switch (rule) {
      case EXTRA_GROUP, LATE_FINISH, UNEVEN_GROUPS, SPARE_CREW -> true;
      default -> false;
    };
  }

  /** One sentence. */
  public String says() {
    double below = strain <= 0 ? 0 : (strain - least) / strain * PERCENT;
    return String.format(
        Locale.ROOT,
        "Strain %.1f; with this day plan, groups of these sizes and this crew no plan has less than"
            + " %.1f, %.1f %% below.",
        strain,
        Math.floor(least * 10) / 10,
        Math.max(0, below));
  }

  /** The weight of a rule in the event. */
  static double weight(Problem problem, RuleName rule) {
    return problem.event.rules().weight(rule).doubleValue();
  }

  /** Whether somebody could be in a group: there, or merely likely to be in its round at all. */
  static boolean couldSolve(Frame frame, int person, int group) {
    return frame.isFree(person, group)
        || (frame.problem.roundLikely[frame.round[group]]
            && !frame.problem.busy(person, frame.start[group], frame.end[group]));
  }
}
