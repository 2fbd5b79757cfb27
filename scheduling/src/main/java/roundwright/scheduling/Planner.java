package roundwright.scheduling;

import java.math.BigDecimal;
import java.util.ArrayList;
import java.util.Collections;
import java.util.EnumMap;
import java.util.List;
import java.util.Map;
import java.util.concurrent.ExecutionException;
import java.util.concurrent.ExecutorService;
import java.util.concurrent.Executors;
import java.util.concurrent.Future;
import roundwright.scheduling.audit.Auditor;
import roundwright.scheduling.audit.Verdict;
import roundwright.scheduling.core.Board;
import roundwright.scheduling.core.Dice;
import roundwright.scheduling.core.Frame;
import roundwright.scheduling.core.Problem;
import roundwright.scheduling.core.Slot;
import roundwright.scheduling.cost.Cost;
import roundwright.scheduling.cost.Level;
import roundwright.scheduling.cost.RuleName;
import roundwright.scheduling.crewing.Arrangement;
import roundwright.scheduling.crewing.Crewing;
import roundwright.scheduling.model.Event;
import roundwright.scheduling.model.Plan;
import roundwright.scheduling.rules.RuleBook;
import roundwright.scheduling.timetable.Timetabling;

/**
 * From an event to a plan: a few day plans, each tried with a first arrangement of groups and
 * crews, the best of them annealed for the rest of the budget. Every plan that leaves has been
 * priced by the auditor. One call at a time for each instance.
 */
public final class Planner {
  private static final int MOST_DAY_PLANS = 48;
  private static final int ENOUGH_DAY_PLANS = 6;
  private static final double FEWEST_LAYOUTS = 50;
  private static final double MOST_LAYOUTS = 1_000_000;
  private static final double FIRST_DAY_PLAN_PART = 0.12;
  private static final double DAY_PLAN_PART = 0.03;
  private static final double DAY_PLAN_POLISH_PART = 0.04;
  private static final double DAY_PLANS_UNTIL = 0.3;
  private static final double DAY_PLANS_UNTIL_IF_BROKEN = 0.8;
  private static final double POLISH_AT = 0.97;
  private static final double MOVES_PER_LAYOUT = 8.0;
  private static final double WARMER = 1.6;
  private static final double FIRST_PRESSURE = 0.1;
  private static final double MORE_PRESSURE = 0.08;
  private static final double LESS_PRESSURE = 0.05;
  private static final double MOST_PRESSURE = 0.6;
  private static final double LIKELY_MOVES_A_SECOND = 400_000;

  private final Event event;
  private final Problem problem;
  private final RuleBook book;
  private final Spending spending;
  private final Effort effort;

  private Planner(Event event, Effort effort, Progress progress) {
    this.spending = new Spending(effort, progress);
    this.event = event;
    this.problem = new Problem(event);
    this.book = new RuleBook(problem);
    this.effort = effort;
  }

  /**
   * The best plan that the effort finds, priced and explained by the auditor. It may have breaches
   * and gaps: whoever asked decides what to do about them.
   */
  public static Plan plan(Event event, Effort effort, Progress progress) {
    return new Planner(event, effort, progress).plan();
  }

  private Plan plan() {
    Arrangement best = anneal(bestDayPlan());
    spending.report(Progress.Stage.DONE, best.hard, best.strain, List.of());
    return signed(Written.plan(best));
  }

  private Plan signed(Plan plan) {
    Verdict verdict = new Auditor(event).audit(plan);
    return new Plan(plan.groups(), java.util.Optional.of(verdict.cost()), verdict.findings());
  }

  private Arrangement bestDayPlan() {
    Timetabling timetabling = new Timetabling(problem);
    Arrangement best = null;
    double pressure = FIRST_PRESSURE;
    double warmth = 1;
    for (int attempt = 0; attempt < MOST_DAY_PLANS; attempt++) {
      if (best != null && enoughDayPlans(best, attempt)) {
        break;
      }
      Dice dice = new Dice(effort.seed() * 1_000_003 + attempt);
      Frame frame = layOut(timetabling, pressure, attempt, dice, warmth, best);
      Crewing crewing = new Crewing(frame, book, dice);
      boolean whole = crewing.firstPlan(best == null ? spending::overdue : spending::over);
      if (!whole && best != null) {
        break;
      }
      if (attempt > 0) {
        double before = spending.usedTime();
        crewing.polish(
            () -> spending.over() || spending.usedTime() - before > DAY_PLAN_POLISH_PART);
      }
      Arrangement found = crewing.arrangement();
      if (found.hard > 0) {
        boolean gaps = Lessons.learn(found.board(), timetabling);
        pressure = gaps ? Math.min(MOST_PRESSURE, pressure + MORE_PRESSURE) : pressure;
      } else {
        pressure = Math.max(0, pressure - LESS_PRESSURE);
      }
      if (book.hard(frame) > 0) {
        timetabling.forget();
      }
      boolean better = best == null || found.compareTo(best) < 0;
      warmth = better ? 1 : warmth * WARMER;
      best = better ? found : best;
      spending.report(Progress.Stage.FIRST_PLAN, best.hard, best.strain, stillWrong(best));
    }
    return best;
  }

  private boolean enoughDayPlans(Arrangement best, int attempts) {
    boolean enough = best.hard == 0 && attempts >= ENOUGH_DAY_PLANS;
    return enough
        || spending.over()
        || spending.usedTime() > (best.hard == 0 ? DAY_PLANS_UNTIL : DAY_PLANS_UNTIL_IF_BROKEN);
  }

  /**
   * The first day plan is laid out in no time, so that there is something to stop with; the second
   * takes its time, and those after it go on from there unless it was no good by itself.
   */
  private Frame layOut(
      Timetabling timetabling,
      double pressure,
      int attempt,
      Dice dice,
      double warmth,
      Arrangement best) {
    double part = attempt == 0 ? 0 : timetabling.begun() ? DAY_PLAN_PART : FIRST_DAY_PLAN_PART;
    double usedBefore = spending.usedTime();
    double steps = effort.steps().orElse(Long.MAX_VALUE);
    double most = Math.max(FEWEST_LAYOUTS, Math.min(MOST_LAYOUTS, steps / MOVES_PER_LAYOUT) * part);
    List<String> wrong = best == null ? List.of() : stillWrong(best);
    List<Slot> slots =
        timetabling.search(
            pressure,
            dice,
            warmth,
            layouts -> {
              if (best != null) {
                spending.reportNowAndThen(
                    Progress.Stage.TIMETABLE, 0, best.hard, best.strain, wrong);
              }
              double byTime = part == 0 ? 0 : (spending.usedTime() - usedBefore) / part;
              return spending.over() ? 1 : Math.max(layouts / most, byTime);
            });
    if (attempt == 0) {
      timetabling.forget();
    }
    return new Frame(problem, slots);
  }

  private List<String> stillWrong(Arrangement arrangement) {
    if (arrangement.hard == 0) {
      return List.of();
    }
    Board board = arrangement.board();
    Map<RuleName, Long> wrong = new EnumMap<>(RuleName.class);
    wrong.putAll(book.explain(board));
    wrong.keySet().removeIf(rule -> rule.level() == Level.STRAIN);
    return wrong.keySet().stream().map(RuleName::word).toList();
  }

  private Arrangement anneal(Arrangement from) {
    List<Arrangement> found = new ArrayList<>();
    if (effort.threads() == 1) {
      found.add(annealOne(from, 0));
    } else {
      found.addAll(annealSeveral(from));
    }
    return Collections.min(found);
  }

  private List<Arrangement> annealSeveral(Arrangement from) {
    ExecutorService pool = Executors.newFixedThreadPool(effort.threads());
    try {
      List<Future<Arrangement>> running = new ArrayList<>();
      for (int thread = 0; thread < effort.threads(); thread++) {
        int number = thread;
        running.add(pool.submit(() -> annealOne(from, number)));
      }
      List<Arrangement> found = new ArrayList<>();
      for (Future<Arrangement> one : running) {
        found.add(one.get());
      }
      return found;
    } catch (InterruptedException interrupted) {
      Thread.currentThread().interrupt();
      return List.of(from);
    } catch (ExecutionException failed) {
      throw new IllegalStateException("A search ended badly", failed.getCause());
    } finally {
      pool.shutdownNow();
    }
  }

  private Arrangement annealOne(Arrangement from, int thread) {
    Crewing crewing =
        Crewing.from(from, book, new Dice(effort.seed() * 1_000_003 + MOST_DAY_PLANS + thread));
    double usedBefore = spending.usedTime();
    long most = effort.steps().orElse(Long.MAX_VALUE);
    Crewing.Budget budget =
        new Crewing.Budget() {
          @Override
          public double used(long moves) {
            double byTime = (spending.usedTime() - usedBefore) / (POLISH_AT - usedBefore);
            return spending.over() ? 1 : Math.max((double) moves / most, byTime);
          }

          @Override
          public double likelyMoves() {
            return effort.steps().isPresent()
                ? (double) most
                : LIKELY_MOVES_A_SECOND * effort.seconds().getAsDouble();
          }
        };
    List<String> wrong = stillWrong(from);
    long tried =
        crewing.anneal(
            budget,
            (hard, strain, moves) -> {
              if (thread == 0) {
                List<String> still = hard == 0 ? List.of() : wrong;
                spending.reportNowAndThen(Progress.Stage.CREWING, moves, hard, strain, still);
              }
            });
    spending.spent(tried);
    crewing.polish(spending::over);
    return Collections.min(List.of(from, crewing.arrangement()));
  }

  static Cost cost(long hard, long strain) {
    return new Cost(hard / RuleBook.BREACH, hard % RuleBook.BREACH, BigDecimal.valueOf(strain, 6));
  }
}
