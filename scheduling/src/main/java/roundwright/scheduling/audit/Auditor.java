package roundwright.scheduling.audit;

import java.math.BigDecimal;
import java.util.ArrayList;
import java.util.List;
import java.util.Optional;
import java.util.SortedMap;
import java.util.TreeMap;
import roundwright.scheduling.cost.Cost;
import roundwright.scheduling.cost.Finding;
import roundwright.scheduling.cost.Level;
import roundwright.scheduling.cost.RuleName;
import roundwright.scheduling.model.Event;
import roundwright.scheduling.model.Plan;

/**
 * Prices any plan for one event by every rule of the event-file page, exactly: whole numbers and
 * decimals, and 34 digits where a division does not come out. May be used by several threads.
 *
 * <p>A plan that names a person, hall or round the event does not have is refused with an {@link
 * IllegalArgumentException}; a kept plan may.
 */
public final class Auditor {
  private final Directory event;

  public Auditor(Event event) {
    this.event = new Directory(event);
  }

  /** The verdict on a plan by itself. */
  public Verdict audit(Plan plan) {
    return judge(plan, Optional.empty(), true);
  }

  /** The verdict on a plan that is to stay close to another. */
  public Verdict audit(Plan plan, Kept kept) {
    return judge(plan, Optional.of(kept), true);
  }

  /** The score alone, without the work of saying why. */
  public Cost price(Plan plan) {
    return judge(plan, Optional.empty(), false).cost();
  }

  /** The score alone of a plan that is to stay close to another. */
  public Cost price(Plan plan, Kept kept) {
    return judge(plan, Optional.of(kept), false).cost();
  }

  private Verdict judge(Plan plan, Optional<Kept> kept, boolean telling) {
    Case given = Case.of(event, plan, kept);
    SortedMap<RuleName, BigDecimal> amounts = new TreeMap<>();
    SortedMap<RuleName, BigDecimal> strains = new TreeMap<>();
    List<Finding> findings = new ArrayList<>();
    long breaches = 0;
    long gaps = 0;
    BigDecimal strain = BigDecimal.ZERO;
    for (RuleName rule : RuleName.values()) {
      BigDecimal weight = event.rules().weight(rule);
      if (weight.signum() == 0 || (rule.level() == Level.NOTICE && !telling)) {
        continue;
      }
      Notes notes = new Notes(rule, telling);
      check(rule).judge(given, notes);
      findings.addAll(notes.findings());
      BigDecimal amount = notes.total();
      if (amount.signum() == 0) {
        continue;
      }
      amounts.put(rule, amount);
      switch (rule.level()) {
        case BREACH -> breaches += amount.longValueExact();
        case GAP -> gaps += amount.longValueExact();
        case STRAIN -> {
          strains.put(rule, amount.multiply(weight));
          strain = strain.add(strains.get(rule));
        }
        case NOTICE -> {}
      }
    }
    return new Verdict(new Cost(breaches, gaps, strain), amounts, strains, findings);
  }

  /** One rule's look at a case. */
  private interface Check {
    void judge(Case given, Notes notes);
  }

  /** Each rule's own method; a rule without one does not compile. */
  private static Check check(RuleName rule) {
    return switch (rule) {
      case ENTRY_MISSING -> RoundRules::entryMissing;
      case TWO_PLACES -> PersonRules::twoPlaces;
      case ABSENT -> PersonRules::absent;
      case UNQUALIFIED -> CrewRules::unqualified;
      case HALL_CLASH -> HallRules::hallClash;
      case HALL_CLOSED -> HallRules::hallClosed;
      case HALL_UNSUITED -> HallRules::hallUnsuited;
      case ROUND_ORDER -> RoundRules::roundOrder;
      case ROUND_WINDOW -> GroupRules::roundWindow;
      case OVERSIZE -> GroupRules::oversize;
      case TOO_SHORT -> GroupRules::tooShort;
      case OVERWORKED -> DayRules::overworked;
      case OFF_GRID -> GroupRules::offGrid;
      case WRONG_COUNT -> RoundRules::wrongCount;
      case PIN_MOVED -> PinRules::pinMoved;
      case PAST_CHANGED -> KeptRules::pastChanged;
      case UNFILLED -> CrewRules::unfilled;
      case UNEVEN_GROUPS -> RoundRules::unevenGroups;
      case EXTRA_GROUP -> RoundRules::extraGroup;
      case SPARE_CREW -> CrewRules::spareCrew;
      case SEEDING -> RoundRules::seeding;
      case LOAD -> PersonRules::load;
      case BREATHING -> PersonRules::breathing;
      case LONG_RUN -> PersonRules::longRun;
      case KIN -> CrewRules::kin;
      case WAITING -> DayRules::waiting;
      case HOPS -> DayRules::hops;
      case NO_MEAL -> DayRules::noMeal;
      case NEWCOMER_FIRST -> RoundRules::newcomerFirst;
      case GREEN_JUDGE -> PersonRules::greenJudge;
      case LIKELY_AWAY -> PersonRules::likelyAway;
      case LATE_FINISH -> HallRules::lateFinish;
      case CHANGED -> KeptRules::changed;
      case TOLD -> KeptRules::told;
      case OCCUPANCY_PASSED -> HallRules::occupancyPassed;
      case CLOSE_TO_CLOSING -> HallRules::closeToClosing;
      case LIKELY_ENTRANT_AWAY -> RoundRules::likelyEntrantAway;
      // Told by whoever has a forecast: from the records alone there is none.
      case LIKELY_OVERRUN -> (given, notes) -> {};
    };
  }
}
