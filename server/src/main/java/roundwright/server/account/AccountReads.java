package roundwright.server.account;

import static org.jooq.impl.DSL.exists;
import static org.jooq.impl.DSL.field;
import static org.jooq.impl.DSL.inline;
import static org.jooq.impl.DSL.selectOne;
import static roundwright.server.store.schema.Tables.ACCOUNT;
import static roundwright.server.store.schema.Tables.ACCOUNT_SESSION;
import static roundwright.server.store.schema.Tables.EVENT;
import static roundwright.server.store.schema.Tables.EVENT_ACCESS;
import static roundwright.server.store.schema.Tables.PERSONAL_LINK;
import static roundwright.server.store.schema.Tables.SETUP_LINK;

import java.time.Instant;
import java.time.ZoneId;
import java.util.List;
import java.util.Optional;
import org.jooq.Field;
import org.jooq.Record;
import roundwright.server.ids.AccountId;
import roundwright.server.ids.EventId;
import roundwright.server.ids.PersonId;
import roundwright.server.store.Database;
import roundwright.server.store.Tx;
import roundwright.server.web.Access;
import roundwright.server.web.Tokens;
import roundwright.server.web.Visitor;

/** Looks up who is who. */
public final class AccountReads implements Access.Visitors {
  private final Database database;

  public AccountReads(Database database) {
    this.database = database;
  }

  /** What signing in needs to know of an account. */
  record Credentials(
      AccountId id, String passwordHash, int failures, Optional<Instant> nextTryAt) {}

  /** An event as its organiser's list shows it. */
  public record OwnEvent(String slug, String name) {}

  /** Where a personal link leads. */
  record LinkTarget(String eventSlug, PersonId person, Instant endsAt) {}

  @Override
  public Visitor find(
      Optional<String> sessionToken,
      List<String> linkTokens,
      Optional<String> eventSlug,
      Optional<String> personCode) {
    if (sessionToken.isEmpty() && eventSlug.isEmpty()) {
      return Visitor.NOBODY;
    }
    return database.read(
        tx -> {
          Field<Boolean> organises =
              field(
                  ACCOUNT
                      .HOST
                      .isTrue()
                      .or(
                          exists(
                              selectOne()
                                  .from(EVENT_ACCESS)
                                  .where(EVENT_ACCESS.EVENT_ID.eq(EVENT.ID))
                                  .and(EVENT_ACCESS.ACCOUNT_ID.eq(ACCOUNT.ID)))));
          Record found =
              tx.sql()
                  .select(
                      ACCOUNT.ID,
                      ACCOUNT.NAME,
                      ACCOUNT.HOST,
                      EVENT.ID,
                      EVENT.SLUG,
                      EVENT.NAME,
                      EVENT.ZONE,
                      organises.as("organises"),
                      holdsLink(tx, personCode, linkTokens).as("holds"))
                  .from(selectOne().asTable("asking"))
                  .leftJoin(EVENT)
                  .on(EVENT.SLUG.eq(eventSlug.orElse("")))
                  .leftJoin(ACCOUNT_SESSION)
                  .on(ACCOUNT_SESSION.TOKEN_HASH.eq(sessionToken.map(Tokens::hash).orElse("")))
                  .and(ACCOUNT_SESSION.ENDS_AT.gt(tx.now()))
                  .leftJoin(ACCOUNT)
                  .on(ACCOUNT.ID.eq(ACCOUNT_SESSION.ACCOUNT_ID))
                  .fetchSingle();
          Optional<Visitor.Account> account =
              Optional.ofNullable(found.get(ACCOUNT.ID))
                  .map(
                      id ->
                          new Visitor.Account(
                              new AccountId(id), found.get(ACCOUNT.NAME), found.get(ACCOUNT.HOST)));
          Optional<Visitor.EventName> event =
              Optional.ofNullable(found.get(EVENT.ID))
                  .map(
                      id ->
                          new Visitor.EventName(
                              new EventId(id),
                              found.get(EVENT.SLUG),
                              found.get(EVENT.NAME),
                              ZoneId.of(found.get(EVENT.ZONE))));
          boolean organiser =
              account.isPresent()
                  && event.isPresent()
                  && Boolean.TRUE.equals(found.get("organises", Boolean.class));
          Optional<PersonId> person =
              event.isPresent() && Boolean.TRUE.equals(found.get("holds", Boolean.class))
                  ? Optional.of(new PersonId(event.get().id(), personCode.orElseThrow()))
                  : Optional.empty();
          return new Visitor(account, event, organiser, person);
        });
  }

  /** Whether the browser holds a good personal link of the person in the path. */
  private static Field<Boolean> holdsLink(
      Tx tx, Optional<String> personCode, List<String> linkTokens) {
    if (personCode.isEmpty() || linkTokens.isEmpty()) {
      return inline(false);
    }
    return field(
        exists(
            selectOne()
                .from(PERSONAL_LINK)
                .where(PERSONAL_LINK.EVENT_ID.eq(EVENT.ID))
                .and(PERSONAL_LINK.PERSON_CODE.eq(personCode.get()))
                .and(PERSONAL_LINK.TOKEN_HASH.in(linkTokens.stream().map(Tokens::hash).toList()))
                .and(PERSONAL_LINK.REVOKED_AT.isNull())
                .and(PERSONAL_LINK.ENDS_AT.gt(tx.now()))));
  }

  Optional<Credentials> credentials(String name) {
    return database.read(
        tx ->
            tx.sql()
                .select(ACCOUNT.ID, ACCOUNT.PASSWORD_HASH, ACCOUNT.FAILURES, ACCOUNT.NEXT_TRY_AT)
                .from(ACCOUNT)
                .where(ACCOUNT.FOLDED_NAME.eq(AccountWrites.folded(name)))
                .fetchOptional(
                    row ->
                        new Credentials(
                            new AccountId(row.get(ACCOUNT.ID)),
                            row.get(ACCOUNT.PASSWORD_HASH),
                            row.get(ACCOUNT.FAILURES),
                            Optional.ofNullable(row.get(ACCOUNT.NEXT_TRY_AT)))));
  }

  /** True while a set-up link may still be used. */
  boolean setUpOpen(String token) {
    return database.read(
        tx ->
            tx.sql()
                .fetchExists(
                    SETUP_LINK,
                    SETUP_LINK
                        .TOKEN_HASH
                        .eq(Tokens.hash(token))
                        .and(SETUP_LINK.USED_AT.isNull())
                        .and(SETUP_LINK.ENDS_AT.gt(tx.now()))));
  }

  Optional<LinkTarget> linkTarget(String token) {
    return database.read(
        tx ->
            tx.sql()
                .select(EVENT.SLUG, EVENT.ID, PERSONAL_LINK.PERSON_CODE, PERSONAL_LINK.ENDS_AT)
                .from(PERSONAL_LINK)
                .join(EVENT)
                .on(EVENT.ID.eq(PERSONAL_LINK.EVENT_ID))
                .where(PERSONAL_LINK.TOKEN_HASH.eq(Tokens.hash(token)))
                .and(PERSONAL_LINK.REVOKED_AT.isNull())
                .and(PERSONAL_LINK.ENDS_AT.gt(tx.now()))
                .fetchOptional(
                    row ->
                        new LinkTarget(
                            row.get(EVENT.SLUG),
                            new PersonId(
                                new EventId(row.get(EVENT.ID)), row.get(PERSONAL_LINK.PERSON_CODE)),
                            row.get(PERSONAL_LINK.ENDS_AT))));
  }

  /** The events that an account may organise, by name. */
  public List<OwnEvent> ownEvents(Visitor.Account account) {
    return database.read(
        tx ->
            tx.sql()
                .select(EVENT.SLUG, EVENT.NAME)
                .from(EVENT)
                .where(
                    account.host()
                        ? org.jooq.impl.DSL.noCondition()
                        : EVENT.ID.in(
                            tx.sql()
                                .select(EVENT_ACCESS.EVENT_ID)
                                .from(EVENT_ACCESS)
                                .where(EVENT_ACCESS.ACCOUNT_ID.eq(account.id().number()))))
                .orderBy(EVENT.NAME, EVENT.SLUG)
                .fetch(row -> new OwnEvent(row.get(EVENT.SLUG), row.get(EVENT.NAME))));
  }
}
