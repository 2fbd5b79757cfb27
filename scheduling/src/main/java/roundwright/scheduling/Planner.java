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
import roundwright.scheduling.core.Dice;
import roundwright.scheduling.core.Problem;
import roundwright.scheduling.cost.Cost;
import roundwright.scheduling.cost.Level;
import roundwright.scheduling.cost.RuleName;
import roundwright.scheduling.crewing.Arrangement;
import roundwright.scheduling.crewing.Crewing;
import roundwright.scheduling.model.Event;
import roundwright.scheduling.model.Plan;
import roundwright.scheduling.rules.RuleBook;

/**
 * From an event to a plan: a day plan chosen by the first arrangements over it, that arrangement
 * annealed for the rest of the budget. Several threads make independent searches, the best of which
 * is kept. Every plan that leaves has been priced by the auditor. One call at a time for each
 * instance.
 */
public final class Planner {
  private static final long SEED_STRIDE = 1_000_003;
  private static final double DAY_PLAN_PART = 0.5;
  private static final double DAY_PLAN_PART_IF_BROKEN = 0.8;
  private static final double MORE_MOVES_IF_BROKEN = 8;
  private static final double POLISH_AT = 0.97;
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
    Arrangement best = effort.threads() == 1 ? search(0) : Collections.min(searchSeveral());
    spending.report(Progress.Stage.DONE, best.hard, best.strain, List.of());
    Plan plan = Written.plan(best);
    return Written.signed(event, plan, new Auditor(event).audit(plan));
  }

  private List<Arrangement> searchSeveral() {
    ExecutorService pool = Executors.newFixedThreadPool(effort.threads());
    try {
      List<Future<Arrangement>> running = new ArrayList<>();
      for (int thread = 0; thread < effort.threads(); thread++) {
        int number = thread;
        running.add(pool.submit(() -> search(number)));
      }
      List<Arrangement> found = new ArrayList<>();
      for (Future<Arrangement> one : running) {
        found.add(one.get());
      }
      return found;
    } catch (InterruptedException interrupted) {
      Thread.currentThread().interrupt();
      throw new IllegalStateException("The search was interrupted", interrupted);
    } catch (ExecutionException failed) {
      throw new IllegalStateException("A search ended badly", failed.getCause());
    } finally {
      pool.shutdownNow();
    }
  }

  private Arrangement search(int thread) {
    Dice dice = new Dice(effort.seed() * SEED_STRIDE + thread);
    Arrangement first =
        new DayPlanSearch(problem, book, dice, new DayPlanBudget(thread == 0)).best();
    return anneal(first, dice, thread == 0);
  }

  /** The day plan's part of the effort: by the clock, and by moves as many as the annealing's. */
  private final class DayPlanBudget implements DayPlanSearch.Budget {
    private final boolean reporting;
    private Arrangement reported;
    private List<String> wrong = List.of();

    DayPlanBudget(boolean reporting) {
      this.reporting = reporting;
    }

    @Override
    public double used(double moves, boolean broken) {
      double most = effort.steps().orElse(Long.MAX_VALUE) * (broken ? MORE_MOVES_IF_BROKEN : 1);
      double bySteps = moves / most;
      double part = broken ? DAY_PLAN_PART_IF_BROKEN : DAY_PLAN_PART;
      return Math.max(bySteps, spending.usedTime() / part);
    }

    @Override
    public boolean over() {
      return spending.over();
    }

    @Override
    public boolean overdue() {
      return spending.overdue();
    }

    @Override
    public void found(Arrangement best, Progress.Stage stage) {
      if (!reporting) {
        return;
      }
      if (reported == null || best.compareTo(reported) != 0) {
        wrong = stillWrong(best);
        reported = best;
        spending.report(stage, best.hard, best.strain, wrong);
      } else {
        spending.reportNowAndThen(stage, 0, best.hard, best.strain, wrong);
      }
    }
  }

  private List<String> stillWrong(Arrangement arrangement) {
    if (arrangement.hard == 0) {
      return List.of();
    }
    Map<RuleName, Long> wrong = new EnumMap<>(RuleName.class);
    wrong.putAll(book.explain(arrangement.board()));
    wrong.keySet().removeIf(rule -> rule.level() == Level.STRAIN);
    return wrong.keySet().stream().map(RuleName::word).toList();
  }

  private Arrangement anneal(Arrangement from, Dice dice, boolean reporting) {
    Crewing crewing = Crewing.from(from, book, dice);
    crewing.polish(spending::over);
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
              if (reporting) {
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
