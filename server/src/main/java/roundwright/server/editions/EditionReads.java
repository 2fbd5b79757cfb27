package roundwright.server.editions;

import static org.jooq.impl.DSL.field;
import static org.jooq.impl.DSL.inline;
import static org.jooq.impl.DSL.max;
import static org.jooq.impl.DSL.multiset;
import static org.jooq.impl.DSL.name;
import static org.jooq.impl.DSL.select;
import static org.jooq.impl.DSL.when;
import static roundwright.server.store.schema.Tables.BUSY_TIME;
import static roundwright.server.store.schema.Tables.DUTY;
import static roundwright.server.store.schema.Tables.EDITION;
import static roundwright.server.store.schema.Tables.PERSON;
import static roundwright.server.store.schema.Tables.PLACE;
import static roundwright.server.store.schema.Tables.PLAN_GROUP;

import java.time.LocalDate;
import java.time.ZoneId;
import java.util.ArrayList;
import java.util.List;
import java.util.Locale;
import java.util.Optional;
import org.jooq.Condition;
import org.jooq.Field;
import org.jooq.Record;
import org.jooq.Record2;
import org.jooq.Result;
import org.jooq.Table;
import org.jooq.impl.DSL;
import roundwright.server.editions.PersonPage.Kind;
import roundwright.server.editions.PersonPage.Stop;
import roundwright.server.editions.PublicPage.EditionMark;
import roundwright.server.editions.PublicPage.Hit;
import roundwright.server.editions.PublicPage.LookUp;
import roundwright.server.ids.EventId;
import roundwright.server.store.Database;
import roundwright.server.store.Tx;
import roundwright.server.ticket.Frame;
import roundwright.server.ticket.LaneMaker;
import roundwright.server.ticket.TicketReads;
import roundwright.server.web.Lanes;
import roundwright.server.web.Ticket;
import roundwright.server.web.Visitor.EventName;

/** What the newest edition says, read for each page in at most three queries. */
public final class EditionReads {
  private static final int MOST_HITS = 10;
  private static final Field<String> WHERE = field(name("who", "group_code"), String.class);
  private static final Field<String> PART = field(name("who", "part"), String.class);
  private static final Field<Integer> STATION = field(name("who", "station"), Integer.class);

  private final Database database;

  public EditionReads(Database database) {
    this.database = database;
  }

  /** The newest edition and the plan it published. */
  private record Newest(EditionMark edition, long planId) {}

  private static Field<Optional<Newest>> newest(EventId event, ZoneId zone) {
    return multiset(
            select(EDITION.NUMBER, EDITION.PUBLISHED_AT, EDITION.PLAN_ID)
                .from(EDITION)
                .where(EDITION.EVENT_ID.eq(event.number()))
                .and(EDITION.NUMBER.eq(newestNumber(event))))
        .convertFrom(
            rows ->
                rows.stream()
                    .findFirst()
                    .map(
                        row ->
                            new Newest(
                                new EditionMark(row.value1(), row.value2().atZone(zone)),
                                row.value3())));
  }

  private static Field<Integer> newestNumber(EventId event) {
    return field(
        select(max(EDITION.NUMBER)).from(EDITION).where(EDITION.EVENT_ID.eq(event.number())));
  }

  private static Field<Long> newestPlan(EventId event) {
    return field(
        select(EDITION.PLAN_ID)
            .from(EDITION)
            .where(EDITION.EVENT_ID.eq(event.number()))
            .orderBy(EDITION.NUMBER.desc())
            .limit(1));
  }

  /**
   * The public page: one day's rounds, and whatever was looked up.
   *
   * @param day the one asked for; else the first that is not over
   */
  public PublicPage publicPage(EventName event, Optional<LocalDate> day, LookUp lookUp) {
    return database.read(
        tx -> {
          TicketReads.With<Optional<Newest>> read =
              TicketReads.frame(tx, event.id(), newest(event.id(), event.zone()));
          Frame frame = read.frame();
          Optional<Newest> newest = read.more();
          LocalDate today = tx.now().atZone(event.zone()).toLocalDate();
          LocalDate shown = frame.day(day, today);
          Optional<Lanes> lanes =
              newest.map(
                  one ->
                      new LaneMaker(frame, event.zone())
                          .byRound(TicketReads.tickets(tx, one.planId(), frame), shown));
          return new PublicPage(
              frame.mark(event, today), newest.map(Newest::edition), shown, lanes, lookUp);
        });
  }

  /**
   * People who agreed to be listed and whose public name holds what was asked for.
   *
   * @param folded what was asked for, without case and accents
   */
  public LookUp lookUp(EventId event, String typed, String folded) {
    List<Hit> hits =
        database.read(
            tx ->
                tx.sql()
                    .select(PERSON.CODE, PERSON.SHOWN_NAME)
                    .from(PERSON)
                    .where(PERSON.EVENT_ID.eq(event.number()))
                    .and(PERSON.LISTED.isTrue())
                    .and(PERSON.FOLDED_NAME.contains(folded))
                    .orderBy(
                        when(PERSON.FOLDED_NAME.startsWith(folded), inline(0)).otherwise(1),
                        PERSON.FOLDED_NAME,
                        PERSON.CODE)
                    .limit(MOST_HITS + 1)
                    .fetch(row -> new Hit(row.value1(), row.value2())));
    return new LookUp(typed, hits.stream().limit(MOST_HITS).toList(), hits.size() > MOST_HITS);
  }

  /** A person's own page: everything, under their full name; empty where there is nobody. */
  public Optional<PersonPage> own(EventName event, String person) {
    return page(event, person, true, PERSON.NAME, DSL.noCondition());
  }

  /** A person's days as strangers may see them: only of people who agreed to be listed. */
  public Optional<PersonPage> found(EventName event, String person) {
    return page(event, person, false, PERSON.SHOWN_NAME, PERSON.LISTED.isTrue());
  }

  private Optional<PersonPage> page(
      EventName event, String code, boolean own, Field<String> shownName, Condition visible) {
    return database.read(
        tx -> {
          Frame frame = TicketReads.frame(tx, event.id());
          Field<List<Stop>> commitments = commitments(event.id(), code, frame);
          Field<List<Stop>> busy = busy(event, code);
          Record row =
              tx.sql()
                  .select(shownName, EDITION.NUMBER, commitments, busy)
                  .from(PERSON)
                  .leftJoin(EDITION)
                  .on(EDITION.EVENT_ID.eq(PERSON.EVENT_ID))
                  .and(EDITION.NUMBER.eq(newestNumber(event.id())))
                  .where(PERSON.EVENT_ID.eq(event.id().number()))
                  .and(PERSON.CODE.eq(code))
                  .and(visible)
                  .fetchOne();
          if (row == null) {
            return Optional.empty();
          }
          Integer edition = row.get(EDITION.NUMBER);
          return Optional.of(
              new PersonPageMaker(frame, event, tx.now())
                  .page(
                      row.get(shownName),
                      own,
                      edition == null ? 0 : edition,
                      row.get(commitments),
                      own ? row.get(busy) : List.of()));
        });
  }

  /** What the person must be at in the newest edition, in order of time. */
  private static Field<List<Stop>> commitments(EventId event, String code, Frame frame) {
    Table<?> who =
        select(
                PLACE.PLAN_ID,
                PLACE.GROUP_CODE,
                inline("competitor").as("part"),
                PLACE.POSITION.plus(1).as("station"))
            .from(PLACE)
            .where(PLACE.PERSON_CODE.eq(code))
            .and(PLACE.PLAN_ID.eq(newestPlan(event)))
            .unionAll(
                select(DUTY.PLAN_ID, DUTY.GROUP_CODE, DUTY.ROLE, inline(0))
                    .from(DUTY)
                    .where(DUTY.PERSON_CODE.eq(code))
                    .and(DUTY.PLAN_ID.eq(newestPlan(event))))
            .asTable("who");
    List<Field<?>> columns = new ArrayList<>(TicketReads.columns());
    columns.addAll(List.of(PART, STATION));
    return multiset(
            select(columns)
                .from(PLAN_GROUP)
                .join(who)
                .on(field(name("who", "plan_id"), Long.class).eq(PLAN_GROUP.PLAN_ID))
                .and(WHERE.eq(PLAN_GROUP.CODE))
                .orderBy(TicketReads.inOrder()))
        .as("commitments")
        .convertFrom(rows -> rows.map(row -> stop(row, frame)));
  }

  private static Stop stop(Record row, Frame frame) {
    Ticket ticket = TicketReads.ticket(row, frame);
    boolean ownStation = frame.round(row.get(PLAN_GROUP.ROUND_CODE)).fixedSeating();
    return Stop.commitment(
        Kind.valueOf(row.get(PART).toUpperCase(Locale.ROOT)),
        ticket,
        ownStation ? row.get(STATION) : 0);
  }

  private static Field<List<Stop>> busy(EventName event, String code) {
    return multiset(
            select(BUSY_TIME.WHAT, BUSY_TIME.FROM_AT, BUSY_TIME.TO_AT)
                .from(BUSY_TIME)
                .where(BUSY_TIME.EVENT_ID.eq(event.id().number()))
                .and(BUSY_TIME.PERSON_CODE.eq(code)))
        .as("busy")
        .convertFrom(
            rows ->
                rows.map(
                    row ->
                        Stop.other(
                            Kind.BUSY,
                            row.value1(),
                            row.value2().atZone(event.zone()),
                            row.value3().atZone(event.zone()))));
  }

  /** A hall's board as the newest edition and the clock have it; empty where there is no hall. */
  public Optional<Board> board(EventName event, String hallCode) {
    return database.read(
        tx -> {
          Frame frame = TicketReads.frame(tx, event.id());
          Optional<Frame.HallRow> hall =
              frame.halls().stream().filter(one -> one.code().equals(hallCode)).findFirst();
          if (hall.isEmpty()) {
            return Optional.empty();
          }
          Field<List<String>> names = names(event.id());
          Result<Record> rows = coming(tx, event.id(), hallCode, names);
          List<Ticket> coming = rows.map(row -> TicketReads.ticket(row, frame));
          LocalDate today = tx.now().atZone(event.zone()).toLocalDate();
          return Optional.of(
              new Board(
                  frame.mark(event, today),
                  hall.get().mark(),
                  tx.now().atZone(hall.get().zone()),
                  coming.stream().findFirst().map(ticket -> LaneMaker.stateAt(ticket, tx.now())),
                  coming.isEmpty() ? List.of() : rows.get(0).get(names),
                  coming.stream().skip(1).findFirst()));
        });
  }

  private static Result<Record> coming(
      Tx tx, EventId event, String hallCode, Field<List<String>> names) {
    List<Field<?>> columns = new ArrayList<>(TicketReads.columns());
    columns.add(names);
    return tx.sql()
        .select(columns)
        .from(EDITION)
        .join(PLAN_GROUP)
        .on(PLAN_GROUP.PLAN_ID.eq(EDITION.PLAN_ID))
        .where(EDITION.EVENT_ID.eq(event.number()))
        .and(EDITION.NUMBER.eq(newestNumber(event)))
        .and(PLAN_GROUP.HALL_CODE.eq(hallCode))
        .and(PLAN_GROUP.ENDS_AT.gt(tx.now()))
        .orderBy(TicketReads.inOrder())
        .limit(2)
        .fetch();
  }

  private static Field<List<String>> names(EventId event) {
    return multiset(
            select(PERSON.SHOWN_NAME, PERSON.FOLDED_NAME)
                .from(PLACE)
                .join(PERSON)
                .on(PERSON.EVENT_ID.eq(event.number()))
                .and(PERSON.CODE.eq(PLACE.PERSON_CODE))
                .where(PLACE.PLAN_ID.eq(PLAN_GROUP.PLAN_ID))
                .and(PLACE.GROUP_CODE.eq(PLAN_GROUP.CODE))
                .orderBy(PERSON.FOLDED_NAME, PERSON.CODE))
        .as("names")
        .convertFrom(rows -> rows.map(Record2::value1));
  }
}
