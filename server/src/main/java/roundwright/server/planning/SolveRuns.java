package roundwright.server.planning;

import static roundwright.server.store.schema.Tables.DRAFT;
import static roundwright.server.store.schema.Tables.SOLVE_RUN;

import java.math.BigDecimal;
import java.math.RoundingMode;
import java.time.Duration;
import java.util.List;
import java.util.Locale;
import java.util.Optional;
import java.util.OptionalDouble;
import java.util.OptionalLong;
import java.util.concurrent.Executors;
import java.util.concurrent.LinkedBlockingQueue;
import java.util.concurrent.RejectedExecutionException;
import java.util.concurrent.ScheduledExecutorService;
import java.util.concurrent.ScheduledFuture;
import java.util.concurrent.ThreadPoolExecutor;
import java.util.concurrent.TimeUnit;
import java.util.concurrent.atomic.AtomicBoolean;
import org.slf4j.Logger;
import org.slf4j.LoggerFactory;
import roundwright.scheduling.Effort;
import roundwright.scheduling.Progress;
import roundwright.scheduling.cost.Cost;
import roundwright.scheduling.cost.Level;
import roundwright.scheduling.model.Event;
import roundwright.scheduling.model.Plan;
import roundwright.server.ids.AccountId;
import roundwright.server.ids.DraftId;
import roundwright.server.ids.EventId;
import roundwright.server.store.Database;
import roundwright.server.store.StaleVersion;
import roundwright.server.store.Tx;
import roundwright.server.store.schema.tables.records.DraftRecord;
import roundwright.server.store.schema.tables.records.SolveRunRecord;
import roundwright.server.web.Tokens;

/**
 * Searches, one after the other, on one thread of low priority and outside every transaction: a
 * snapshot of the event goes in, the best plan is written back to the draft if that is still as it
 * was. How far a search is stands in its row, so any process can show it and ask it to stop.
 *
 * <p>Two threads: one searches, one writes the search's latest report down twice a second and looks
 * whether somebody wants it to stop. {@link #close} stops the search and keeps what it has.
 */
public final class SolveRuns implements AutoCloseable {
  /** A run that gave no sign for so long has lost its process. */
  static final Duration SILENCE = Duration.ofSeconds(30);

  private static final Logger LOG = LoggerFactory.getLogger(SolveRuns.class);
  private static final int MOST_WAITING = 8;
  private static final long PULSE_MILLIS = 500;

  private final Database database;
  private final Search search;
  private final EventSource events;
  private final AtomicBoolean closing = new AtomicBoolean();
  private final ThreadPoolExecutor searching =
      new ThreadPoolExecutor(
          1,
          1,
          0,
          TimeUnit.SECONDS,
          new LinkedBlockingQueue<>(MOST_WAITING),
          task -> thread(task, "search", Thread.MIN_PRIORITY));
  private final ScheduledExecutorService pulse =
      Executors.newSingleThreadScheduledExecutor(
          task -> thread(task, "search-pulse", Thread.NORM_PRIORITY));

  /** Reads an event as the engine's records. */
  @FunctionalInterface
  public interface EventSource {
    Event event(Tx tx, EventId id);
  }

  public SolveRuns(Database database, Search search, EventSource events) {
    this.database = database;
    this.search = search;
    this.events = events;
  }

  // Pages go first where the system heeds priorities; nothing depends on it.
  @SuppressWarnings("ThreadPriorityCheck")
  private static Thread thread(Runnable task, String name, int priority) {
    Thread thread = new Thread(task, name);
    thread.setPriority(priority);
    thread.setDaemon(true);
    return thread;
  }

  /** What asking for a search came to. */
  public enum Asked {
    TAKEN,
    /** The event has one waiting or running already. */
    ONE_IS_UNDER_WAY,
    /** Too many of other events' are waiting. */
    TOO_MANY
  }

  /**
   * Marks the runs that lost their process as interrupted.
   *
   * @param all true where no other process can be running some: on an embedded database
   */
  public void markInterrupted(boolean all) {
    database.change(
        tx ->
            tx.sql()
                .update(SOLVE_RUN)
                .set(SOLVE_RUN.STATE, "interrupted")
                .set(SOLVE_RUN.TROUBLE, "restart")
                .set(SOLVE_RUN.ENDED_AT, tx.now())
                .where(SOLVE_RUN.STATE.in("waiting", "running"))
                .and(all ? org.jooq.impl.DSL.noCondition() : silent(tx))
                .execute());
  }

  private static org.jooq.Condition silent(Tx tx) {
    return SOLVE_RUN.BEAT_AT.lt(tx.now().minus(SILENCE));
  }

  /**
   * Asks for a search that replaces a draft's plan; makes the event's first draft where there is
   * none.
   *
   * @param version the draft's as whoever asks saw it
   * @param seed empty: the one after that of the event's last search
   * @throws StaleVersion where the draft has changed since
   */
  public Asked ask(
      DraftId draft, int version, int seconds, Optional<Long> seed, Optional<AccountId> account) {
    Optional<Long> run =
        database.write(
            tx -> {
              DraftRecord row = PlanningWrites.rowOrFirst(tx, draft, account);
              if (row.getVersion() != version) {
                throw new StaleVersion("Draft " + draft.number());
              }
              // Two askings at once: the later waits here for the earlier and then sees its run.
              tx.sql()
                  .update(DRAFT)
                  .set(DRAFT.VERSION, DRAFT.VERSION)
                  .where(DRAFT.EVENT_ID.eq(draft.event().number()))
                  .execute();
              boolean underWay =
                  tx.sql()
                      .fetchExists(
                          SOLVE_RUN,
                          SOLVE_RUN
                              .EVENT_ID
                              .eq(draft.event().number())
                              .and(SOLVE_RUN.STATE.in("waiting", "running"))
                              .andNot(silent(tx)));
              return underWay
                  ? Optional.empty()
                  : Optional.of(
                      insert(
                          tx,
                          draft,
                          row.getId(),
                          seconds,
                          seed.orElseGet(() -> nextSeed(tx, draft))));
            });
    if (run.isEmpty()) {
      return Asked.ONE_IS_UNDER_WAY;
    }
    try {
      searching.execute(() -> new Run(run.get(), draft, account).run());
      return Asked.TAKEN;
    } catch (RejectedExecutionException tooMany) {
      end(run.get(), "refused", "busy");
      return Asked.TOO_MANY;
    }
  }

  private static long nextSeed(Tx tx, DraftId draft) {
    Long last =
        tx.sql()
            .select(SOLVE_RUN.SEED)
            .from(SOLVE_RUN)
            .where(SOLVE_RUN.EVENT_ID.eq(draft.event().number()))
            .orderBy(SOLVE_RUN.ID.desc())
            .limit(1)
            .fetchOne(SOLVE_RUN.SEED);
    return last == null ? 1 : last + 1;
  }

  private static long insert(Tx tx, DraftId draft, long draftRow, int seconds, long seed) {
    return tx.sql()
        .insertInto(SOLVE_RUN)
        .set(SOLVE_RUN.EVENT_ID, draft.event().number())
        .set(SOLVE_RUN.DRAFT_ID, draftRow)
        .set(SOLVE_RUN.DRAFT_VERSION, 0)
        .set(SOLVE_RUN.STATE, "waiting")
        .set(SOLVE_RUN.SEED, seed)
        .set(SOLVE_RUN.WANTED_SECONDS, seconds)
        .set(SOLVE_RUN.ASKED_AT, tx.now())
        .set(SOLVE_RUN.BEAT_AT, tx.now())
        .returning(SOLVE_RUN.ID)
        .fetchSingle(SOLVE_RUN.ID);
  }

  /** Asks a draft's search to stop and keep the best it has. */
  public void stop(DraftId draft) {
    database.change(
        tx ->
            tx.sql()
                .update(SOLVE_RUN)
                .set(SOLVE_RUN.STOP_WANTED, true)
                .where(SOLVE_RUN.DRAFT_ID.eq(PlanningWrites.row(tx, draft).getId()))
                .and(SOLVE_RUN.STATE.in("waiting", "running"))
                .execute());
  }

  private void end(long run, String state, String trouble) {
    database.change(tx -> end(tx, run, state, trouble));
  }

  private static void end(Tx tx, long run, String state, String trouble) {
    tx.sql()
        .update(SOLVE_RUN)
        .set(SOLVE_RUN.STATE, state)
        .set(SOLVE_RUN.TROUBLE, trouble.isEmpty() ? null : trouble)
        .set(SOLVE_RUN.ENDED_AT, tx.now())
        .where(SOLVE_RUN.ID.eq(run))
        .execute();
  }

  /** Stops what is searching, keeping its best, and marks what waits. */
  @Override
  public void close() {
    closing.set(true);
    searching.shutdown();
    try {
      if (!searching.awaitTermination(SILENCE.toSeconds(), TimeUnit.SECONDS)) {
        LOG.warn("A search did not stop in time; its plan is lost");
      }
    } catch (InterruptedException e) {
      Thread.currentThread().interrupt();
    }
    pulse.shutdownNow();
  }

  /** One search. */
  private final class Run implements Progress {
    private final long id;
    private final DraftId draft;
    private final Optional<AccountId> account;
    private volatile Report latest;
    private volatile Cost first;
    private volatile boolean stop;

    Run(long id, DraftId draft, Optional<AccountId> account) {
      this.id = id;
      this.draft = draft;
      this.account = account;
    }

    /** What the search starts from. */
    private record Snapshot(Event event, int draftVersion, Effort effort) {}

    void run() {
      ScheduledFuture<?> beat = null;
      try {
        if (closing.get()) {
          end(id, "interrupted", "restart");
          return;
        }
        Optional<Snapshot> snapshot = database.write(this::begin);
        if (snapshot.isEmpty()) {
          return;
        }
        beat =
            pulse.scheduleWithFixedDelay(
                this::writeDown, PULSE_MILLIS, PULSE_MILLIS, TimeUnit.MILLISECONDS);
        Plan plan = search.plan(snapshot.get().event(), snapshot.get().effort(), this);
        beat.cancel(false);
        keep(snapshot.get(), plan);
      } catch (RuntimeException e) {
        String reference = Tokens.draw().substring(0, 8);
        LOG.error("Reference {}: search {} failed", reference, id, e);
        endQuietly();
      } finally {
        if (beat != null) {
          beat.cancel(false);
        }
      }
    }

    private void endQuietly() {
      try {
        end(id, "refused", "failed");
      } catch (RuntimeException e) {
        LOG.error("Search {} could not be marked as failed", id, e);
      }
    }

    private Optional<Snapshot> begin(Tx tx) {
      SolveRunRecord row = tx.sql().fetchSingle(SOLVE_RUN, SOLVE_RUN.ID.eq(id));
      if (row.getStopWanted()) {
        end(tx, id, "stopped", "");
        return Optional.empty();
      }
      int version = PlanningWrites.row(tx, draft).getVersion();
      tx.sql()
          .update(SOLVE_RUN)
          .set(SOLVE_RUN.STATE, "running")
          .set(SOLVE_RUN.DRAFT_VERSION, version)
          .set(SOLVE_RUN.STARTED_AT, tx.now())
          .set(SOLVE_RUN.BEAT_AT, tx.now())
          .where(SOLVE_RUN.ID.eq(id))
          .execute();
      Effort effort =
          new Effort(
              row.getSeed(), OptionalLong.empty(), OptionalDouble.of(row.getWantedSeconds()), 1);
      return Optional.of(new Snapshot(events.event(tx, draft.event()), version, effort));
    }

    @Override
    public void report(Report report) {
      if (first == null) {
        first = report.best();
      }
      latest = report;
    }

    @Override
    public boolean stopWanted() {
      return stop || closing.get();
    }

    private void writeDown() {
      try {
        stop = database.write(this::beat) || stop;
      } catch (RuntimeException e) {
        LOG.warn("Search {} could not write its progress down", id, e);
      }
    }

    private boolean beat(Tx tx) {
      write(tx);
      return tx.sql()
          .select(SOLVE_RUN.STOP_WANTED)
          .from(SOLVE_RUN)
          .where(SOLVE_RUN.ID.eq(id))
          .fetchSingle(SOLVE_RUN.STOP_WANTED);
    }

    private void write(Tx tx) {
      Report report = latest;
      if (report == null) {
        tx.sql()
            .update(SOLVE_RUN)
            .set(SOLVE_RUN.BEAT_AT, tx.now())
            .where(SOLVE_RUN.ID.eq(id))
            .execute();
        return;
      }
      tx.sql()
          .update(SOLVE_RUN)
          .set(SOLVE_RUN.BEAT_AT, tx.now())
          .set(SOLVE_RUN.STAGE, report.stage().name().toLowerCase(Locale.ROOT))
          .set(SOLVE_RUN.ELAPSED_SECONDS, BigDecimal.valueOf(report.elapsedSeconds()))
          .set(SOLVE_RUN.STEPS, report.steps())
          .set(SOLVE_RUN.FIRST_BREACHES, first.breaches())
          .set(SOLVE_RUN.FIRST_GAPS, first.gaps())
          .set(SOLVE_RUN.FIRST_STRAIN, rounded(first.strain()))
          .set(SOLVE_RUN.BEST_BREACHES, report.best().breaches())
          .set(SOLVE_RUN.BEST_GAPS, report.best().gaps())
          .set(SOLVE_RUN.BEST_STRAIN, rounded(report.best().strain()))
          .set(SOLVE_RUN.STILL_WRONG, String.join("\n", report.stillWrong()))
          .where(SOLVE_RUN.ID.eq(id))
          .execute();
    }

    private static BigDecimal rounded(BigDecimal strain) {
      return strain.setScale(9, RoundingMode.HALF_UP);
    }

    private void keep(Snapshot snapshot, Plan plan) {
      database.change(
          tx -> {
            write(tx);
            if (worseThanDraft(tx, snapshot, plan)) {
              end(tx, id, outcome(), "no-better");
              return;
            }
            boolean kept =
                PlanningWrites.replacePlan(
                    tx, draft, snapshot.draftVersion(), snapshot.event(), plan, account);
            if (kept) {
              end(tx, id, outcome(), "");
            } else {
              // The draft was changed meanwhile: what was found becomes a draft of its own.
              long planId = PlanRows.insert(tx, draft.event(), snapshot.event(), plan);
              PlanningWrites.add(tx, draft.event(), "", planId, account);
              end(tx, id, "done", "own-draft");
            }
            plan.score().ifPresent(score -> writeScore(tx, score, plan));
          });
    }

    private String outcome() {
      return stopWanted() ? "stopped" : "done";
    }

    /** A short search must not put a worse plan in the place of the one that a long one found. */
    private boolean worseThanDraft(Tx tx, Snapshot snapshot, Plan plan) {
      DraftRecord row = PlanningWrites.row(tx, draft);
      Optional<Cost> before = PlanRows.score(tx, row.getPlanId());
      return row.getVersion() == snapshot.draftVersion()
          && before.isPresent()
          && plan.score().isPresent()
          && plan.score().get().compareTo(before.get()) > 0;
    }

    /** The auditor's price, which is the one that counts. */
    private void writeScore(Tx tx, Cost score, Plan plan) {
      List<String> wrong =
          plan.findings().stream()
              .filter(finding -> finding.level().compareTo(Level.STRAIN) < 0)
              .map(finding -> finding.rule().word())
              .distinct()
              .toList();
      tx.sql()
          .update(SOLVE_RUN)
          .set(SOLVE_RUN.BEST_BREACHES, score.breaches())
          .set(SOLVE_RUN.BEST_GAPS, score.gaps())
          .set(SOLVE_RUN.BEST_STRAIN, rounded(score.strain()))
          .set(SOLVE_RUN.STILL_WRONG, String.join("\n", wrong))
          .where(SOLVE_RUN.ID.eq(id))
          .execute();
    }
  }
}
