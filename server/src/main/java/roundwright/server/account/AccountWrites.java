package roundwright.server.account;

import static roundwright.server.store.schema.Tables.ACCOUNT;
import static roundwright.server.store.schema.Tables.ACCOUNT_SESSION;
import static roundwright.server.store.schema.Tables.EVENT_ACCESS;
import static roundwright.server.store.schema.Tables.PERSONAL_LINK;
import static roundwright.server.store.schema.Tables.SETUP_LINK;

import java.text.Normalizer;
import java.time.Duration;
import java.time.Instant;
import java.util.Locale;
import java.util.Optional;
import roundwright.server.ids.AccountId;
import roundwright.server.ids.EventId;
import roundwright.server.ids.PersonId;
import roundwright.server.store.Database;
import roundwright.server.store.Journal;
import roundwright.server.store.Tx;
import roundwright.server.web.Tokens;

/** Makes accounts, sessions and links; each in one transaction. */
public final class AccountWrites {
  /** How long somebody stays signed in: a long weekend. */
  static final Duration SESSION = Duration.ofDays(3);

  private static final Duration SETUP_LINK_LIFE = Duration.ofDays(7);
  private static final int FREE_FAILURES = 5;
  private static final Duration LONGEST_BACK_OFF = Duration.ofMinutes(5);

  private final Database database;

  public AccountWrites(Database database) {
    this.database = database;
  }

  /** Names that differ only in case or in how their letters are put together are one. */
  static String folded(String name) {
    return Normalizer.normalize(name.strip(), Normalizer.Form.NFKC).toLowerCase(Locale.ROOT);
  }

  /**
   * Makes a single-use link for the first account, where there is no account yet; earlier such
   * links end.
   */
  public Optional<String> firstSetUpToken() {
    return database.write(
        tx -> {
          if (tx.sql().fetchExists(ACCOUNT)) {
            return Optional.empty();
          }
          String token = Tokens.draw();
          tx.sql()
              .update(SETUP_LINK)
              .set(SETUP_LINK.ENDS_AT, tx.now())
              .where(SETUP_LINK.USED_AT.isNull())
              .execute();
          tx.sql()
              .insertInto(SETUP_LINK)
              .set(SETUP_LINK.TOKEN_HASH, Tokens.hash(token))
              .set(SETUP_LINK.MADE_AT, tx.now())
              .set(SETUP_LINK.ENDS_AT, tx.now().plus(SETUP_LINK_LIFE))
              .execute();
          return Optional.of(token);
        });
  }

  /** Trades a set-up link for the host's account; empty where the link is spent. */
  Optional<AccountId> setUp(String token, String name, String passwordHash) {
    return database.write(
        tx -> {
          int used =
              tx.sql()
                  .update(SETUP_LINK)
                  .set(SETUP_LINK.USED_AT, tx.now())
                  .where(SETUP_LINK.TOKEN_HASH.eq(Tokens.hash(token)))
                  .and(SETUP_LINK.USED_AT.isNull())
                  .and(SETUP_LINK.ENDS_AT.gt(tx.now()))
                  .execute();
          return used == 1 ? Optional.of(add(tx, name, passwordHash, true)) : Optional.empty();
        });
  }

  /** Makes an account for whoever organises some events. */
  public AccountId organiser(String name, String password, EventId... events) {
    String hash = Passwords.hash(password);
    return database.write(
        tx -> {
          AccountId account = add(tx, name, hash, false);
          for (EventId event : events) {
            tx.sql()
                .insertInto(EVENT_ACCESS)
                .set(EVENT_ACCESS.EVENT_ID, event.number())
                .set(EVENT_ACCESS.ACCOUNT_ID, account.number())
                .set(EVENT_ACCESS.ROLE, "organiser")
                .execute();
          }
          return account;
        });
  }

  private static AccountId add(Tx tx, String name, String passwordHash, boolean host) {
    long id =
        tx.sql()
            .insertInto(ACCOUNT)
            .set(ACCOUNT.NAME, name)
            .set(ACCOUNT.FOLDED_NAME, folded(name))
            .set(ACCOUNT.PASSWORD_HASH, passwordHash)
            .set(ACCOUNT.HOST, host)
            .set(ACCOUNT.CREATED_AT, tx.now())
            .returning(ACCOUNT.ID)
            .fetchSingle(ACCOUNT.ID);
    AccountId account = new AccountId(id);
    Journal.audit(
        tx,
        Optional.empty(),
        Optional.of(account),
        "account-made",
        "account " + id,
        Optional.empty(),
        Optional.of(host ? "host" : "organiser"));
    return account;
  }

  /** Begins a session and gives its token, which is kept only as its hash. */
  public String beginSession(AccountId account) {
    String token = Tokens.draw();
    database.change(
        tx -> {
          tx.sql()
              .deleteFrom(ACCOUNT_SESSION)
              .where(ACCOUNT_SESSION.ENDS_AT.le(tx.now()))
              .execute();
          tx.sql()
              .insertInto(ACCOUNT_SESSION)
              .set(ACCOUNT_SESSION.TOKEN_HASH, Tokens.hash(token))
              .set(ACCOUNT_SESSION.ACCOUNT_ID, account.number())
              .set(ACCOUNT_SESSION.STARTED_AT, tx.now())
              .set(ACCOUNT_SESSION.ENDS_AT, tx.now().plus(SESSION))
              .execute();
          tx.sql()
              .update(ACCOUNT)
              .set(ACCOUNT.FAILURES, 0)
              .setNull(ACCOUNT.NEXT_TRY_AT)
              .where(ACCOUNT.ID.eq(account.number()))
              .execute();
        });
    return token;
  }

  void endSession(String token) {
    database.change(
        tx ->
            tx.sql()
                .deleteFrom(ACCOUNT_SESSION)
                .where(ACCOUNT_SESSION.TOKEN_HASH.eq(Tokens.hash(token)))
                .execute());
  }

  /**
   * Notes a wrong password: from the fifth on, the account waits twice as long each time, up to
   * five minutes. It is never locked, or strangers could lock it.
   */
  void noteFailure(AccountId account) {
    database.change(
        tx -> {
          int failures =
              1
                  + tx.sql()
                      .select(ACCOUNT.FAILURES)
                      .from(ACCOUNT)
                      .where(ACCOUNT.ID.eq(account.number()))
                      .fetchSingle(ACCOUNT.FAILURES);
          tx.sql()
              .update(ACCOUNT)
              .set(ACCOUNT.FAILURES, failures)
              .set(ACCOUNT.NEXT_TRY_AT, nextTry(tx.now(), failures).orElse(null))
              .where(ACCOUNT.ID.eq(account.number()))
              .execute();
        });
  }

  private static Optional<Instant> nextTry(Instant now, int failures) {
    if (failures < FREE_FAILURES) {
      return Optional.empty();
    }
    long seconds = 1L << Math.min(failures - FREE_FAILURES + 1, 20);
    return Optional.of(now.plusSeconds(Math.min(seconds, LONGEST_BACK_OFF.toSeconds())));
  }

  /** Makes a personal link and gives its token; links the person has already stay good. */
  public String personalLink(PersonId person, Instant endsAt) {
    String token = Tokens.draw();
    database.change(
        tx ->
            tx.sql()
                .insertInto(PERSONAL_LINK)
                .set(PERSONAL_LINK.TOKEN_HASH, Tokens.hash(token))
                .set(PERSONAL_LINK.EVENT_ID, person.event().number())
                .set(PERSONAL_LINK.PERSON_CODE, person.code())
                .set(PERSONAL_LINK.MADE_AT, tx.now())
                .set(PERSONAL_LINK.ENDS_AT, endsAt)
                .execute());
    return token;
  }

  /** Ends all of a person's links. */
  public void revokeLinks(PersonId person) {
    database.change(
        tx ->
            tx.sql()
                .update(PERSONAL_LINK)
                .set(PERSONAL_LINK.REVOKED_AT, tx.now())
                .where(PERSONAL_LINK.EVENT_ID.eq(person.event().number()))
                .and(PERSONAL_LINK.PERSON_CODE.eq(person.code()))
                .and(PERSONAL_LINK.REVOKED_AT.isNull())
                .execute());
  }
}
