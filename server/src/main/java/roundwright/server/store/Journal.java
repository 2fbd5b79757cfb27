package roundwright.server.store;

import static roundwright.server.store.schema.Tables.AUDIT;
import static roundwright.server.store.schema.Tables.EVENT;
import static roundwright.server.store.schema.Tables.JOURNAL;

import java.util.Optional;
import org.jooq.impl.DSL;
import roundwright.server.ids.AccountId;
import roundwright.server.ids.EventId;

/**
 * Numbered changes for live pages, and the trail of who did what; both written in the transaction
 * of the change itself.
 */
public final class Journal {
  private Journal() {}

  /** Adds an event's next numbered change and gives its number. */
  public static long note(Tx tx, EventId event, String kind, String subject) {
    long number =
        tx.sql()
            .update(EVENT)
            .set(EVENT.JOURNAL_NUMBER, EVENT.JOURNAL_NUMBER.plus(1))
            .where(EVENT.ID.eq(event.number()))
            .execute();
    if (number != 1) {
      throw new IllegalStateException("There is no event " + event.number());
    }
    long drawn =
        tx.sql()
            .select(EVENT.JOURNAL_NUMBER)
            .from(EVENT)
            .where(EVENT.ID.eq(event.number()))
            .fetchSingle(EVENT.JOURNAL_NUMBER);
    tx.sql()
        .insertInto(JOURNAL)
        .set(JOURNAL.EVENT_ID, event.number())
        .set(JOURNAL.NUMBER, drawn)
        .set(JOURNAL.HAPPENED_AT, tx.now())
        .set(JOURNAL.KIND, kind)
        .set(JOURNAL.SUBJECT, subject)
        .execute();
    return drawn;
  }

  /** The number of an event's newest change. */
  public static long newest(Tx tx, EventId event) {
    return tx.sql()
        .select(DSL.coalesce(DSL.max(JOURNAL.NUMBER), DSL.inline(0L)))
        .from(JOURNAL)
        .where(JOURNAL.EVENT_ID.eq(event.number()))
        .fetchSingle()
        .value1();
  }

  /**
   * Adds to the trail.
   *
   * @param act what was done, a word of the code's
   * @param subject what to: ids and numbers, no names
   */
  public static void audit(
      Tx tx,
      Optional<EventId> event,
      Optional<AccountId> account,
      String act,
      String subject,
      Optional<String> before,
      Optional<String> after) {
    tx.sql()
        .insertInto(AUDIT)
        .set(AUDIT.EVENT_ID, event.map(EventId::number).orElse(null))
        .set(AUDIT.HAPPENED_AT, tx.now())
        .set(AUDIT.ACCOUNT_ID, account.map(AccountId::number).orElse(null))
        .set(AUDIT.ACT, act)
        .set(AUDIT.SUBJECT, subject)
        .set(AUDIT.BEFORE_STATE, before.orElse(null))
        .set(AUDIT.AFTER_STATE, after.orElse(null))
        .execute();
  }
}
