package roundwright.server.planning;

import static org.jooq.impl.DSL.coalesce;
import static org.jooq.impl.DSL.inline;
import static org.jooq.impl.DSL.max;
import static roundwright.server.store.schema.Tables.DRAFT;
import static roundwright.server.store.schema.Tables.EDITION;

import java.util.Optional;
import roundwright.scheduling.model.Event;
import roundwright.scheduling.model.Plan;
import roundwright.server.ids.AccountId;
import roundwright.server.ids.DraftId;
import roundwright.server.ids.EventId;
import roundwright.server.store.Database;
import roundwright.server.store.Journal;
import roundwright.server.store.Missing;
import roundwright.server.store.StaleVersion;
import roundwright.server.store.Tx;
import roundwright.server.store.schema.tables.records.DraftRecord;

/** Makes drafts, changes them and publishes them; each in one transaction. */
public final class PlanningWrites {
  /** The number of an event's first draft. */
  static final int FIRST = 1;

  private final Database database;

  public PlanningWrites(Database database) {
    this.database = database;
  }

  /**
   * Makes a draft.
   *
   * @param copied the draft it begins as, or empty for one with nothing planned
   */
  public DraftId newDraft(
      EventId event, String name, Optional<DraftId> copied, Optional<AccountId> account) {
    return database.write(
        tx -> {
          long plan =
              copied.isPresent()
                  ? row(tx, copied.get()).getPlanId()
                  : PlanRows.insertEmpty(tx, event);
          return add(tx, event, name, plan, account);
        });
  }

  static DraftId add(Tx tx, EventId event, String name, long plan, Optional<AccountId> account) {
    int number =
        1
            + tx.sql()
                .select(coalesce(max(DRAFT.NUMBER), inline(0)))
                .from(DRAFT)
                .where(DRAFT.EVENT_ID.eq(event.number()))
                .fetchSingle()
                .value1();
    tx.sql()
        .insertInto(DRAFT)
        .set(DRAFT.EVENT_ID, event.number())
        .set(DRAFT.NUMBER, number)
        .set(DRAFT.NAME, name)
        .set(DRAFT.PLAN_ID, plan)
        .set(DRAFT.CHANGED_AT, tx.now())
        .execute();
    Journal.note(tx, event, "draft-made", "draft " + number);
    Journal.audit(
        tx,
        Optional.of(event),
        account,
        "draft-made",
        "draft " + number,
        Optional.empty(),
        Optional.of("plan " + plan));
    return new DraftId(event, number);
  }

  static DraftRecord row(Tx tx, DraftId draft) {
    DraftRecord row =
        tx.sql()
            .fetchOne(
                DRAFT,
                DRAFT.EVENT_ID.eq(draft.event().number()).and(DRAFT.NUMBER.eq(draft.number())));
    if (row == null) {
      throw new Missing("draft " + draft.number());
    }
    return row;
  }

  /** The draft, made with nothing planned where it is to be the event's first. */
  static DraftRecord rowOrFirst(Tx tx, DraftId draft, Optional<AccountId> account) {
    boolean first =
        draft.number() == FIRST
            && !tx.sql().fetchExists(DRAFT, DRAFT.EVENT_ID.eq(draft.event().number()));
    if (first) {
      add(tx, draft.event(), "", PlanRows.insertEmpty(tx, draft.event()), account);
    }
    return row(tx, draft);
  }

  /**
   * Gives a draft a plan.
   *
   * @param version the draft's as the plan's maker knew it
   * @return false, and nothing written, where the draft is no longer at that version
   */
  static boolean replacePlan(
      Tx tx, DraftId draft, int version, Event event, Plan plan, Optional<AccountId> account) {
    DraftRecord before = row(tx, draft);
    if (before.getVersion() != version) {
      return false;
    }
    long id = PlanRows.insert(tx, draft.event(), event, plan);
    int changed =
        tx.sql()
            .update(DRAFT)
            .set(DRAFT.PLAN_ID, id)
            .set(DRAFT.VERSION, version + 1)
            .set(DRAFT.CHANGED_AT, tx.now())
            .where(DRAFT.ID.eq(before.getId()))
            .and(DRAFT.VERSION.eq(version))
            .execute();
    if (changed == 0) {
      throw new StaleVersion("Draft " + draft.number());
    }
    Journal.note(tx, draft.event(), "draft-changed", "draft " + draft.number());
    Journal.audit(
        tx,
        Optional.of(draft.event()),
        account,
        "draft-planned",
        "draft " + draft.number(),
        Optional.of("plan " + before.getPlanId()),
        Optional.of("plan " + id));
    return true;
  }

  /**
   * Publishes a draft as the event's next edition, which is never changed afterwards.
   *
   * @param version the draft's as whoever publishes it saw it
   * @return the edition's number
   * @throws StaleVersion where the draft has changed since
   */
  public int publish(DraftId draft, int version, Optional<AccountId> account) {
    return database.write(
        tx -> {
          DraftRecord row = row(tx, draft);
          if (row.getVersion() != version) {
            throw new StaleVersion("Draft " + draft.number());
          }
          int number =
              1
                  + tx.sql()
                      .select(coalesce(max(EDITION.NUMBER), inline(0)))
                      .from(EDITION)
                      .where(EDITION.EVENT_ID.eq(draft.event().number()))
                      .fetchSingle()
                      .value1();
          tx.sql()
              .insertInto(EDITION)
              .set(EDITION.EVENT_ID, draft.event().number())
              .set(EDITION.NUMBER, number)
              .set(EDITION.PLAN_ID, row.getPlanId())
              .set(EDITION.DRAFT_ID, row.getId())
              .set(EDITION.PUBLISHED_AT, tx.now())
              .set(EDITION.PUBLISHED_BY, account.map(AccountId::number).orElse(null))
              .execute();
          Journal.note(tx, draft.event(), "edition-published", "edition " + number);
          Journal.audit(
              tx,
              Optional.of(draft.event()),
              account,
              "edition-published",
              "edition " + number,
              Optional.empty(),
              Optional.of("plan " + row.getPlanId()));
          return number;
        });
  }
}
