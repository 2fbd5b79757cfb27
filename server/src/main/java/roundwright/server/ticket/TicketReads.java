package roundwright.server.ticket;

import static org.jooq.impl.DSL.field;
import static org.jooq.impl.DSL.inline;
import static org.jooq.impl.DSL.multiset;
import static org.jooq.impl.DSL.select;
import static org.jooq.impl.DSL.selectCount;
import static roundwright.server.store.schema.Tables.DISCIPLINE;
import static roundwright.server.store.schema.Tables.DUTY;
import static roundwright.server.store.schema.Tables.EVENT_RULES;
import static roundwright.server.store.schema.Tables.FIXED_POINT;
import static roundwright.server.store.schema.Tables.FIXED_POINT_HALL;
import static roundwright.server.store.schema.Tables.HALL;
import static roundwright.server.store.schema.Tables.HALL_FEATURE;
import static roundwright.server.store.schema.Tables.OPENING;
import static roundwright.server.store.schema.Tables.PIN;
import static roundwright.server.store.schema.Tables.PLACE;
import static roundwright.server.store.schema.Tables.PLAN_GROUP;
import static roundwright.server.store.schema.Tables.ROUND;
import static roundwright.server.store.schema.Tables.VENUE;
import static roundwright.server.store.schema.Tables.WAY;

import java.time.ZoneId;
import java.util.ArrayList;
import java.util.HashMap;
import java.util.List;
import java.util.Map;
import java.util.Optional;
import java.util.Set;
import org.jooq.Field;
import org.jooq.OrderField;
import org.jooq.Record;
import org.jooq.Record6;
import org.jooq.Record8;
import org.jooq.Result;
import org.jooq.impl.DSL;
import roundwright.server.ids.EventId;
import roundwright.server.store.Tx;
import roundwright.server.store.schema.tables.PlanGroup;
import roundwright.server.ticket.Frame.FixedRow;
import roundwright.server.ticket.Frame.HallRow;
import roundwright.server.ticket.Frame.OpeningRow;
import roundwright.server.ticket.Frame.RoundRow;
import roundwright.server.ticket.Frame.WayRow;
import roundwright.server.web.HallMark;
import roundwright.server.web.Ticket;

/** Reads an event's frame, and turns rows of {@code plan_group} into tickets. */
public final class TicketReads {
  private static final PlanGroup SISTER = PLAN_GROUP.as("sister");
  private static final Field<Integer> COMPETITORS =
      field(
              selectCount()
                  .from(PLACE)
                  .where(PLACE.PLAN_ID.eq(PLAN_GROUP.PLAN_ID))
                  .and(PLACE.GROUP_CODE.eq(PLAN_GROUP.CODE)))
          .as("competitors");
  private static final Field<Integer> SISTERS =
      field(
              selectCount()
                  .from(SISTER)
                  .where(SISTER.PLAN_ID.eq(PLAN_GROUP.PLAN_ID))
                  .and(SISTER.ROUND_CODE.eq(PLAN_GROUP.ROUND_CODE)))
          .as("sisters");
  private static final Field<Integer> JUDGES = onDuty("judge");
  private static final Field<Integer> SCRAMBLERS = onDuty("scrambler");
  private static final Field<Integer> RUNNERS = onDuty("runner");

  private TicketReads() {}

  private static Field<Integer> onDuty(String role) {
    return field(
            selectCount()
                .from(DUTY)
                .where(DUTY.PLAN_ID.eq(PLAN_GROUP.PLAN_ID))
                .and(DUTY.GROUP_CODE.eq(PLAN_GROUP.CODE))
                .and(DUTY.ROLE.eq(DSL.inline(role))))
        .as(role + "s_there");
  }

  /** The columns that {@link #ticket} needs, of a query over {@code plan_group}. */
  public static List<Field<?>> columns() {
    return List.of(
        PLAN_GROUP.CODE,
        PLAN_GROUP.ROUND_CODE,
        PLAN_GROUP.NUMBER,
        PLAN_GROUP.HALL_CODE,
        PLAN_GROUP.STARTS_AT,
        PLAN_GROUP.ENDS_AT,
        PLAN_GROUP.JUDGES_WANTED,
        PLAN_GROUP.SCRAMBLERS_WANTED,
        PLAN_GROUP.RUNNERS_WANTED,
        COMPETITORS,
        SISTERS,
        JUDGES,
        SCRAMBLERS,
        RUNNERS);
  }

  /** The order of time; groups alike in it by hall and number. */
  public static List<OrderField<?>> inOrder() {
    return List.of(
        PLAN_GROUP.STARTS_AT, PLAN_GROUP.ENDS_AT, PLAN_GROUP.HALL_CODE, PLAN_GROUP.NUMBER);
  }

  /** A row with {@link #columns()} as a ticket that nothing has been found against. */
  public static Ticket ticket(Record row, Frame frame) {
    HallRow hall = frame.hall(row.get(PLAN_GROUP.HALL_CODE));
    RoundRow round = frame.round(row.get(PLAN_GROUP.ROUND_CODE));
    int number = row.get(PLAN_GROUP.NUMBER);
    return new Ticket(
        row.get(PLAN_GROUP.CODE),
        hall.mark(),
        round.discipline(),
        round.number(),
        round.last(),
        number,
        number,
        row.get(SISTERS),
        row.get(PLAN_GROUP.STARTS_AT).atZone(hall.zone()),
        row.get(PLAN_GROUP.ENDS_AT).atZone(hall.zone()),
        Ticket.State.PLANNED,
        row.get(COMPETITORS),
        crew(row),
        0,
        0,
        false,
        frame.pinnedGroups().contains(round.code() + "/" + number));
  }

  private static List<Ticket.Crew> crew(Record row) {
    List<Ticket.Crew> crew = new ArrayList<>();
    add(crew, "judge", row.get(JUDGES), row.get(PLAN_GROUP.JUDGES_WANTED));
    add(crew, "scrambler", row.get(SCRAMBLERS), row.get(PLAN_GROUP.SCRAMBLERS_WANTED));
    add(crew, "runner", row.get(RUNNERS), row.get(PLAN_GROUP.RUNNERS_WANTED));
    return crew;
  }

  private static void add(List<Ticket.Crew> crew, String role, int there, int wanted) {
    if (there > 0 || wanted > 0) {
      crew.add(new Ticket.Crew(role, there, wanted));
    }
  }

  /** A plan's groups in order of time. */
  public static List<Ticket> tickets(Tx tx, long planId, Frame frame) {
    return tx.sql()
        .select(columns())
        .from(PLAN_GROUP)
        .where(PLAN_GROUP.PLAN_ID.eq(planId))
        .orderBy(inOrder())
        .fetch(row -> ticket(row, frame));
  }

  /** The event's frame, in one query. */
  public static Frame frame(Tx tx, EventId event) {
    return frame(tx, event, inline(0)).frame();
  }

  /** A frame, and what was read along with it. */
  public record With<T>(Frame frame, T more) {}

  /** The event's frame and one column more, in one query. */
  public static <T> With<T> frame(Tx tx, EventId event, Field<T> more) {
    long id = event.number();
    return tx.sql()
        .select(
            multiset(
                    select(
                            HALL.CODE,
                            HALL.NAME,
                            HALL.STATIONS,
                            VENUE.CODE,
                            VENUE.NAME,
                            VENUE.ADDRESS,
                            VENUE.ZONE,
                            multiset(
                                    select(HALL_FEATURE.FEATURE)
                                        .from(HALL_FEATURE)
                                        .where(HALL_FEATURE.EVENT_ID.eq(HALL.EVENT_ID))
                                        .and(HALL_FEATURE.HALL_CODE.eq(HALL.CODE))
                                        .orderBy(HALL_FEATURE.FEATURE))
                                .convertFrom(rows -> rows.map(row -> row.value1())))
                        .from(HALL)
                        .join(VENUE)
                        .on(VENUE.EVENT_ID.eq(HALL.EVENT_ID))
                        .and(VENUE.CODE.eq(HALL.VENUE_CODE))
                        .where(HALL.EVENT_ID.eq(id))
                        .orderBy(HALL.POSITION))
                .convertFrom(TicketReads::halls),
            multiset(
                    select(
                            ROUND.CODE,
                            ROUND.DISCIPLINE_CODE,
                            DISCIPLINE.NAME,
                            ROUND.NUMBER,
                            ROUND.CONTINUES,
                            DSL.coalesce(ROUND.SEATING, EVENT_RULES.SEATING))
                        .from(ROUND)
                        .join(DISCIPLINE)
                        .on(DISCIPLINE.EVENT_ID.eq(ROUND.EVENT_ID))
                        .and(DISCIPLINE.CODE.eq(ROUND.DISCIPLINE_CODE))
                        .join(EVENT_RULES)
                        .on(EVENT_RULES.EVENT_ID.eq(ROUND.EVENT_ID))
                        .where(ROUND.EVENT_ID.eq(id))
                        .orderBy(ROUND.DISCIPLINE_CODE, ROUND.NUMBER))
                .convertFrom(TicketReads::rounds),
            multiset(
                    select(
                            FIXED_POINT.NAME,
                            FIXED_POINT.STARTS_AT,
                            FIXED_POINT.ENDS_AT,
                            FIXED_POINT.IN_EVERY_HALL,
                            multiset(
                                    select(FIXED_POINT_HALL.HALL_CODE)
                                        .from(FIXED_POINT_HALL)
                                        .where(FIXED_POINT_HALL.EVENT_ID.eq(id))
                                        .and(FIXED_POINT_HALL.FIXED_POINT.eq(FIXED_POINT.POSITION)))
                                .convertFrom(rows -> rows.map(row -> row.value1())))
                        .from(FIXED_POINT)
                        .where(FIXED_POINT.EVENT_ID.eq(id))
                        .orderBy(FIXED_POINT.POSITION))
                .convertFrom(rows -> rows.map(org.jooq.Records.mapping(FixedRow::new))),
            multiset(
                    select(OPENING.HALL_CODE, OPENING.OPENS_AT)
                        .from(OPENING)
                        .where(OPENING.EVENT_ID.eq(id)))
                .convertFrom(rows -> rows.map(org.jooq.Records.mapping(OpeningRow::new))),
            multiset(
                    select(WAY.ONE_VENUE, WAY.OTHER_VENUE, WAY.MINUTES)
                        .from(WAY)
                        .where(WAY.EVENT_ID.eq(id)))
                .convertFrom(rows -> rows.map(org.jooq.Records.mapping(WayRow::new))),
            field(selectCount().from(DISCIPLINE).where(DISCIPLINE.EVENT_ID.eq(id))),
            field(
                select(EVENT_RULES.SETUP_MINUTES)
                    .from(EVENT_RULES)
                    .where(EVENT_RULES.EVENT_ID.eq(id))),
            multiset(
                    select(PIN.ROUND_CODE, PIN.GROUP_NUMBER)
                        .from(PIN)
                        .where(PIN.EVENT_ID.eq(id))
                        .and(PIN.KIND.eq("group")))
                .convertFrom(
                    rows -> Set.copyOf(rows.map(row -> row.value1() + "/" + row.value2()))),
            more)
        .fetchSingle(
            row ->
                new With<>(
                    new Frame(
                        row.value1(),
                        row.value2(),
                        row.value3(),
                        row.value4(),
                        row.value5(),
                        row.value6(),
                        row.value7(),
                        row.value8()),
                    row.value9()));
  }

  private static List<HallRow> halls(
      Result<Record8<String, String, Integer, String, String, String, String, List<String>>> rows) {
    List<HallRow> halls = new ArrayList<>();
    for (var row : rows) {
      halls.add(
          new HallRow(
              HallMark.at(halls.size(), row.value1(), row.value2(), row.value5()),
              row.value3(),
              row.value8(),
              row.value4(),
              Optional.ofNullable(row.value6()).orElse(""),
              ZoneId.of(row.value7())));
    }
    return halls;
  }

  /** Rows come by discipline and number, so the row after says whether a round is the last. */
  private static Map<String, RoundRow> rounds(
      Result<Record6<String, String, String, Integer, Boolean, String>> rows) {
    Map<String, RoundRow> rounds = new HashMap<>();
    for (int i = 0; i < rows.size(); i++) {
      var row = rows.get(i);
      boolean lastOfDiscipline =
          i + 1 == rows.size() || !rows.get(i + 1).value2().equals(row.value2());
      boolean last = lastOfDiscipline && row.value4() > 1 && !row.value5();
      rounds.put(
          row.value1(),
          new RoundRow(
              row.value1(), row.value3(), row.value4(), last, row.value6().equals("fixed")));
    }
    return rounds;
  }
}
