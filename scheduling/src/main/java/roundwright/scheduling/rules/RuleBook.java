package roundwright.scheduling.rules;

import java.util.EnumMap;
import java.util.List;
import java.util.Map;
import java.util.Optional;
import java.util.stream.Stream;
import roundwright.scheduling.core.Board;
import roundwright.scheduling.core.Frame;
import roundwright.scheduling.core.GroupRow;
import roundwright.scheduling.core.KeptDays;
import roundwright.scheduling.core.PersonRow;
import roundwright.scheduling.core.Problem;
import roundwright.scheduling.cost.RuleName;

/**
 * All rules of one event. A price has two parts: what is <em>hard</em>, breaches times {@link
 * #BREACH} plus gaps, and strain in millionths; the first is compared before the second. A strain
 * rule of weight 0 is left out.
 */
public final class RuleBook {
  /** More than any plan has gaps, so that one breach weighs more than all of them. */
  public static final long BREACH = 1L << 32;

  private final PersonRule[] personBreaches;
  private final PersonRule[] personStrains;
  private final GroupRule[] groupBreaches;
  private final GroupRule groupGaps;
  private final GroupRule[] groupStrains;
  private final List<FrameRule> frameBreaches;
  private final List<FrameRule> frameStrains;
  private final boolean hasKept;

  public RuleBook(Problem problem) {
    this(problem, Optional.empty(), 1);
  }

  /** The rules of an event whose people have been told a plan. */
  public RuleBook(Problem problem, KeptDays kept) {
    this(problem, kept, 1);
  }

  /**
   * The same for a search that is to change little, whatever comfort it costs.
   *
   * @param times how many times their weight changes count
   */
  public RuleBook(Problem problem, KeptDays kept, int times) {
    this(problem, Optional.of(kept), times);
  }

  private RuleBook(Problem problem, Optional<KeptDays> kept, int times) {
    var rules = problem.event.rules();
    hasKept = kept.isPresent();
    personBreaches =
        Stream.concat(
                PersonRules.breaches().stream(),
                kept.stream().flatMap(days -> KeptRules.breaches(days).stream()))
            .toArray(PersonRule[]::new);
    personStrains =
        Stream.concat(
                PersonRules.strains(problem).stream(),
                kept.stream().flatMap(days -> KeptRules.strains(problem, days, times).stream()))
            .filter(rule -> rules.weight(rule.name()).signum() > 0)
            .toArray(PersonRule[]::new);
    groupBreaches = GroupRules.breaches().toArray(GroupRule[]::new);
    groupGaps = GroupRules.gaps();
    groupStrains =
        GroupRules.strains(problem).stream()
            .filter(rule -> rules.weight(rule.name()).signum() > 0)
            .toArray(GroupRule[]::new);
    frameBreaches = FrameRules.breaches(kept.isPresent());
    frameStrains = FrameRules.strains(problem);
  }

  /** Whether people have been told a plan. */
  boolean hasKept() {
    return hasKept;
  }

  long hard(PersonRow row) {
    long breaches = 0;
    for (PersonRule rule : personBreaches) {
      breaches += rule.price(row);
    }
    return breaches * BREACH;
  }

  long strain(PersonRow row) {
    long strain = 0;
    for (PersonRule rule : personStrains) {
      strain += rule.price(row);
    }
    return strain;
  }

  long hard(GroupRow row) {
    long breaches = 0;
    for (GroupRule rule : groupBreaches) {
      breaches += rule.price(row);
    }
    return breaches * BREACH + groupGaps.price(row);
  }

  long strain(GroupRow row) {
    long strain = 0;
    for (GroupRule rule : groupStrains) {
      strain += rule.price(row);
    }
    return strain;
  }

  public long hard(Frame frame) {
    long breaches = 0;
    for (FrameRule rule : frameBreaches) {
      breaches += rule.price(frame);
    }
    return breaches * BREACH;
  }

  public long strain(Frame frame) {
    long strain = 0;
    for (FrameRule rule : frameStrains) {
      strain += rule.price(frame);
    }
    return strain;
  }

  /** The price by rule: breaches and gaps as they are, strain in weighted millionths. */
  public Map<RuleName, Long> explain(Board board) {
    Map<RuleName, Long> found = new EnumMap<>(RuleName.class);
    for (int p = 0; p < board.problem.people; p++) {
      explainPerson(board, p).forEach((rule, price) -> found.merge(rule, price, Long::sum));
    }
    for (int g = 0; g < board.frame.groups; g++) {
      explainGroup(board, g).forEach((rule, price) -> found.merge(rule, price, Long::sum));
    }
    frameBreaches.forEach(rule -> found.merge(rule.name(), rule.price(board.frame), Long::sum));
    frameStrains.forEach(rule -> found.merge(rule.name(), rule.price(board.frame), Long::sum));
    found.values().removeIf(amount -> amount == 0);
    return found;
  }

  /** The price by rule of one person's own row. */
  public Map<RuleName, Long> explainPerson(Board board, int person) {
    Map<RuleName, Long> found = new EnumMap<>(RuleName.class);
    PersonRow row = new PersonRow();
    row.load(board, person);
    for (PersonRule rule : personBreaches) {
      found.merge(rule.name(), rule.price(row), Long::sum);
    }
    for (PersonRule rule : personStrains) {
      found.merge(rule.name(), rule.price(row), Long::sum);
    }
    return found;
  }

  /** The price by rule of one group's own row. */
  public Map<RuleName, Long> explainGroup(Board board, int group) {
    Map<RuleName, Long> found = new EnumMap<>(RuleName.class);
    GroupRow row = new GroupRow();
    row.load(board, group);
    for (GroupRule rule : groupBreaches) {
      found.merge(rule.name(), rule.price(row), Long::sum);
    }
    found.merge(groupGaps.name(), groupGaps.price(row), Long::sum);
    for (GroupRule rule : groupStrains) {
      found.merge(rule.name(), rule.price(row), Long::sum);
    }
    return found;
  }
}
