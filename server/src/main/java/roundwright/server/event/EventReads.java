package roundwright.server.event;

import static roundwright.server.store.schema.Tables.AVAILABILITY;
import static roundwright.server.store.schema.Tables.BUSY_TIME;
import static roundwright.server.store.schema.Tables.CREW_SKILL;
import static roundwright.server.store.schema.Tables.DISCIPLINE;
import static roundwright.server.store.schema.Tables.DISCIPLINE_NEED;
import static roundwright.server.store.schema.Tables.ENTRY;
import static roundwright.server.store.schema.Tables.EVENT;
import static roundwright.server.store.schema.Tables.EVENT_RULES;
import static roundwright.server.store.schema.Tables.FIXED_POINT;
import static roundwright.server.store.schema.Tables.FIXED_POINT_HALL;
import static roundwright.server.store.schema.Tables.HALL;
import static roundwright.server.store.schema.Tables.HALL_FEATURE;
import static roundwright.server.store.schema.Tables.MEAL;
import static roundwright.server.store.schema.Tables.OPENING;
import static roundwright.server.store.schema.Tables.PERSON;
import static roundwright.server.store.schema.Tables.PIN;
import static roundwright.server.store.schema.Tables.ROUND;
import static roundwright.server.store.schema.Tables.ROUND_ENTRANT;
import static roundwright.server.store.schema.Tables.ROUND_HALL;
import static roundwright.server.store.schema.Tables.RULE;
import static roundwright.server.store.schema.Tables.VENUE;
import static roundwright.server.store.schema.Tables.WAY;

import java.math.BigDecimal;
import java.time.ZoneId;
import java.util.EnumMap;
import java.util.List;
import java.util.Locale;
import java.util.Map;
import java.util.Optional;
import java.util.OptionalInt;
import java.util.TreeSet;
import org.jooq.DSLContext;
import org.jooq.Result;
import roundwright.scheduling.cost.RuleName;
import roundwright.scheduling.file.EventFile;
import roundwright.scheduling.file.Extras;
import roundwright.scheduling.file.FileProblems;
import roundwright.scheduling.model.Discipline;
import roundwright.scheduling.model.Event;
import roundwright.scheduling.model.FixedPoint;
import roundwright.scheduling.model.Hall;
import roundwright.scheduling.model.Person;
import roundwright.scheduling.model.Pins;
import roundwright.scheduling.model.Role;
import roundwright.scheduling.model.Round;
import roundwright.scheduling.model.Rules;
import roundwright.scheduling.model.Seating;
import roundwright.scheduling.model.Venue;
import roundwright.scheduling.model.Way;
import roundwright.scheduling.model.Window;
import roundwright.server.ids.EventId;
import roundwright.server.store.Tx;
import roundwright.server.store.schema.tables.records.EventRecord;
import roundwright.server.store.schema.tables.records.HallRecord;
import roundwright.server.store.schema.tables.records.PersonRecord;
import roundwright.server.store.schema.tables.records.PinRecord;
import roundwright.server.store.schema.tables.records.RoundRecord;
import roundwright.server.web.Visitor.EventName;

/** Reads an event back as the engine's records: one query a table, whatever the event's size. */
public final class EventReads {
  private EventReads() {}

  /**
   * The whole event.
   *
   * @throws IllegalArgumentException where there is no such event
   */
  public static Event event(Tx tx, EventId id) {
    return new Reading(tx.sql(), id.number()).event();
  }

  /** The event of a name in addresses. */
  public static Optional<EventName> named(Tx tx, String slug) {
    return tx.sql()
        .fetchOptional(EVENT, EVENT.SLUG.eq(slug))
        .map(
            row ->
                new EventName(
                    new EventId(row.getId()), slug, row.getName(), ZoneId.of(row.getZone())));
  }

  /** The event with the file's own keys, as it would be written to a file. */
  public static EventFile file(Tx tx, EventId id) {
    String extras =
        tx.sql()
            .select(EVENT.EXTRAS)
            .from(EVENT)
            .where(EVENT.ID.eq(id.number()))
            .fetchSingle(EVENT.EXTRAS);
    try {
      return new EventFile(event(tx, id), extras == null ? Extras.NONE : Extras.of(extras));
    } catch (FileProblems e) {
      throw new IllegalStateException("Event " + id.number() + " was kept with broken keys", e);
    }
  }

  /** One reading under way. */
  private static final class Reading {
    private final DSLContext sql;
    private final long id;

    Reading(DSLContext sql, long id) {
      this.sql = sql;
      this.id = id;
    }

    Event event() {
      EventRecord event = sql.fetchOne(EVENT, EVENT.ID.eq(id));
      if (event == null) {
        throw new IllegalArgumentException("There is no event " + id);
      }
      return new Event(
          event.getName(),
          ZoneId.of(event.getZone()),
          venues(),
          ways(),
          fixedPoints(),
          disciplines(),
          rounds(),
          people(),
          rules(),
          pins());
    }

    private List<Venue> venues() {
      Map<String, List<String>> features =
          sql.selectFrom(HALL_FEATURE)
              .where(HALL_FEATURE.EVENT_ID.eq(id))
              .fetchGroups(HALL_FEATURE.HALL_CODE, HALL_FEATURE.FEATURE);
      Map<String, List<Window>> open =
          sql.selectFrom(OPENING)
              .where(OPENING.EVENT_ID.eq(id))
              .orderBy(OPENING.OPENS_AT)
              .fetchGroups(
                  OPENING.HALL_CODE, row -> new Window(row.getOpensAt(), row.getClosesAt()));
      Map<String, List<Hall>> halls =
          sql.selectFrom(HALL)
              .where(HALL.EVENT_ID.eq(id))
              .orderBy(HALL.POSITION)
              .fetchGroups(HALL.VENUE_CODE, row -> hall(row, open, features));
      return sql.selectFrom(VENUE)
          .where(VENUE.EVENT_ID.eq(id))
          .orderBy(VENUE.POSITION)
          .fetch(
              row ->
                  new Venue(
                      row.getCode(),
                      row.getName(),
                      ZoneId.of(row.getZone()),
                      halls.getOrDefault(row.getCode(), List.of())));
    }

    private static Hall hall(
        HallRecord row, Map<String, List<Window>> open, Map<String, List<String>> features) {
      return new Hall(
          row.getCode(),
          row.getName(),
          row.getStations(),
          open.getOrDefault(row.getCode(), List.of()),
          optional(row.getOccupancy()),
          new TreeSet<>(features.getOrDefault(row.getCode(), List.of())));
    }

    private List<Way> ways() {
      return sql.selectFrom(WAY)
          .where(WAY.EVENT_ID.eq(id))
          .orderBy(WAY.POSITION)
          .fetch(row -> new Way(row.getOneVenue(), row.getOtherVenue(), row.getMinutes()));
    }

    private List<FixedPoint> fixedPoints() {
      Map<Integer, List<String>> halls =
          sql.selectFrom(FIXED_POINT_HALL)
              .where(FIXED_POINT_HALL.EVENT_ID.eq(id))
              .orderBy(FIXED_POINT_HALL.POSITION)
              .fetchGroups(FIXED_POINT_HALL.FIXED_POINT, FIXED_POINT_HALL.HALL_CODE);
      return sql.selectFrom(FIXED_POINT)
          .where(FIXED_POINT.EVENT_ID.eq(id))
          .orderBy(FIXED_POINT.POSITION)
          .fetch(
              row ->
                  new FixedPoint(
                      row.getName(),
                      row.getInEveryHall()
                          ? Optional.empty()
                          : Optional.of(halls.getOrDefault(row.getPosition(), List.of())),
                      row.getStartsAt(),
                      row.getEndsAt()));
    }

    private List<Discipline> disciplines() {
      Map<String, List<String>> needs =
          sql.selectFrom(DISCIPLINE_NEED)
              .where(DISCIPLINE_NEED.EVENT_ID.eq(id))
              .fetchGroups(DISCIPLINE_NEED.DISCIPLINE_CODE, DISCIPLINE_NEED.FEATURE);
      return sql.selectFrom(DISCIPLINE)
          .where(DISCIPLINE.EVENT_ID.eq(id))
          .orderBy(DISCIPLINE.POSITION)
          .fetch(
              row ->
                  new Discipline(
                      row.getCode(),
                      row.getName(),
                      plain(row.getHandlingSeconds()),
                      plain(row.getScrambleSeconds()),
                      plain(row.getCarrySeconds()),
                      new TreeSet<>(needs.getOrDefault(row.getCode(), List.of())),
                      of(Discipline.Measure.class, row.getMeasure())));
    }

    private List<Round> rounds() {
      Map<String, List<String>> halls =
          sql.selectFrom(ROUND_HALL)
              .where(ROUND_HALL.EVENT_ID.eq(id))
              .orderBy(ROUND_HALL.POSITION)
              .fetchGroups(ROUND_HALL.ROUND_CODE, ROUND_HALL.HALL_CODE);
      Map<String, List<String>> entrants =
          sql.selectFrom(ROUND_ENTRANT)
              .where(ROUND_ENTRANT.EVENT_ID.eq(id))
              .orderBy(ROUND_ENTRANT.POSITION)
              .fetchGroups(ROUND_ENTRANT.ROUND_CODE, ROUND_ENTRANT.PERSON_CODE);
      return sql.selectFrom(ROUND)
          .where(ROUND.EVENT_ID.eq(id))
          .orderBy(ROUND.POSITION)
          .fetch(row -> round(row, halls, entrants));
    }

    private static Round round(
        RoundRecord row, Map<String, List<String>> halls, Map<String, List<String>> entrants) {
      return new Round(
          row.getCode(),
          row.getDisciplineCode(),
          row.getNumber(),
          of(Round.CountedBy.class, row.getCountedBy()),
          plain(row.getTimeLimitSeconds()),
          of(Round.LimitCovers.class, row.getLimitCovers()),
          Optional.ofNullable(row.getCutOffAttempts())
              .map(attempts -> new Round.CutOff(attempts, plain(row.getCutOffSeconds()))),
          Optional.ofNullable(row.getAdvanceBy())
              .map(word -> advance(word, plain(row.getAdvanceAmount()))),
          row.getContinues(),
          given(row.getHallsGiven(), halls, row.getCode()),
          Optional.ofNullable(row.getSeating()).map(word -> of(Seating.class, word)),
          Optional.ofNullable(row.getFill()).map(Reading::plain),
          optional(row.getStations()),
          optional(row.getGroupCount()),
          optional(row.getMinutesPerGroup()),
          Optional.ofNullable(row.getCrewJudges())
              .map(
                  judges ->
                      new Round.CrewSize(judges, row.getCrewScramblers(), row.getCrewRunners())),
          of(Round.Seeding.class, row.getSeeding()),
          Optional.ofNullable(row.getNotBefore()),
          Optional.ofNullable(row.getNotAfter()),
          given(row.getEntrantsGiven(), entrants, row.getCode()));
    }

    private static Round.Advance advance(String word, BigDecimal amount) {
      return switch (word) {
        case "count" -> new Round.Advance.Count(amount.intValueExact());
        case "percent" -> new Round.Advance.Percent(amount);
        default -> new Round.Advance.Under(amount);
      };
    }

    private static Optional<List<String>> given(
        boolean given, Map<String, List<String>> lists, String code) {
      return given ? Optional.of(lists.getOrDefault(code, List.of())) : Optional.empty();
    }

    private List<Person> people() {
      Map<String, List<Person.Entry>> entries =
          sql.selectFrom(ENTRY)
              .where(ENTRY.EVENT_ID.eq(id))
              .orderBy(ENTRY.POSITION)
              .fetchGroups(
                  ENTRY.PERSON_CODE,
                  row ->
                      new Person.Entry(row.getDisciplineCode(), plain(row.getExpectedSeconds())));
      Map<String, List<String>> scrambles =
          sql.selectFrom(CREW_SKILL)
              .where(CREW_SKILL.EVENT_ID.eq(id))
              .orderBy(CREW_SKILL.POSITION)
              .fetchGroups(CREW_SKILL.PERSON_CODE, CREW_SKILL.DISCIPLINE_CODE);
      Map<String, List<Window>> available =
          sql.selectFrom(AVAILABILITY)
              .where(AVAILABILITY.EVENT_ID.eq(id))
              .orderBy(AVAILABILITY.FROM_AT)
              .fetchGroups(
                  AVAILABILITY.PERSON_CODE, row -> new Window(row.getFromAt(), row.getToAt()));
      Map<String, List<Person.Busy>> busy =
          sql.selectFrom(BUSY_TIME)
              .where(BUSY_TIME.EVENT_ID.eq(id))
              .orderBy(BUSY_TIME.POSITION)
              .fetchGroups(
                  BUSY_TIME.PERSON_CODE,
                  row ->
                      new Person.Busy(new Window(row.getFromAt(), row.getToAt()), row.getWhat()));
      return sql.selectFrom(PERSON)
          .where(PERSON.EVENT_ID.eq(id))
          .orderBy(PERSON.POSITION)
          .fetch(row -> person(row, entries, scrambles, available, busy));
    }

    private static Person person(
        PersonRecord row,
        Map<String, List<Person.Entry>> entries,
        Map<String, List<String>> scrambles,
        Map<String, List<Window>> available,
        Map<String, List<Person.Busy>> busy) {
      String code = row.getCode();
      return new Person(
          code,
          row.getName(),
          entries.getOrDefault(code, List.of()),
          new Person.CrewSkills(
              row.getJudges(), row.getRuns(), scrambles.getOrDefault(code, List.of())),
          row.getAvailabilityGiven()
              ? Optional.of(available.getOrDefault(code, List.of()))
              : Optional.empty(),
          busy.getOrDefault(code, List.of()),
          Optional.ofNullable(row.getHousehold()),
          row.getNewcomer(),
          row.getMaxDutyMinutesPerDay(),
          Optional.ofNullable(row.getShare()).map(Reading::plain));
    }

    private Rules rules() {
      List<Rules.Meal> meals =
          sql.selectFrom(MEAL)
              .where(MEAL.EVENT_ID.eq(id))
              .orderBy(MEAL.POSITION)
              .fetch(row -> new Rules.Meal(row.getFromTime(), row.getToTime(), row.getMinutes()));
      Map<RuleName, BigDecimal> weights = new EnumMap<>(RuleName.class);
      sql.selectFrom(RULE)
          .where(RULE.EVENT_ID.eq(id))
          .forEach(row -> weights.put(of(RuleName.class, row.getName()), plain(row.getWeight())));
      return sql.selectFrom(EVENT_RULES)
          .where(EVENT_RULES.EVENT_ID.eq(id))
          .fetchSingle(
              row ->
                  new Rules(
                      of(Seating.class, row.getSeating()),
                      plain(row.getFill()),
                      plain(row.getStationsPerScrambler()),
                      plain(row.getStationsPerRunner()),
                      row.getChangeoverMinutes(),
                      row.getSetupMinutes(),
                      row.getTurnaroundMinutes(),
                      row.getStartGridMinutes(),
                      plain(row.getSlack()),
                      row.getSlotPercentile(),
                      row.getBreathingMinutes(),
                      row.getRestMinutes(),
                      row.getLongestRunMinutes(),
                      meals,
                      weights));
    }

    private Pins pins() {
      Map<String, Result<PinRecord>> byKind =
          sql.selectFrom(PIN)
              .where(PIN.EVENT_ID.eq(id))
              .orderBy(PIN.POSITION)
              .fetchGroups(PIN.KIND);
      Result<PinRecord> none = sql.newResult(PIN);
      return new Pins(
          byKind
              .getOrDefault("group", none)
              .map(
                  row ->
                      new Pins.GroupPin(
                          row.getRoundCode(),
                          row.getGroupNumber(),
                          Optional.ofNullable(row.getHallCode()),
                          Optional.ofNullable(row.getStartsAt()))),
          byKind
              .getOrDefault("competitor", none)
              .map(
                  row ->
                      new Pins.CompetitorPin(
                          row.getPersonCode(), row.getRoundCode(), row.getGroupNumber())),
          byKind
              .getOrDefault("duty", none)
              .map(
                  row ->
                      new Pins.DutyPin(
                          row.getPersonCode(),
                          row.getRoundCode(),
                          row.getGroupNumber(),
                          of(Role.class, row.getRole()))));
    }

    private static OptionalInt optional(Integer number) {
      return number == null ? OptionalInt.empty() : OptionalInt.of(number);
    }

    /** As event files have it: the column's trailing noughts say nothing. */
    private static BigDecimal plain(BigDecimal number) {
      if (number.signum() == 0) {
        return BigDecimal.ZERO;
      }
      BigDecimal stripped = number.stripTrailingZeros();
      return stripped.scale() < 0 ? stripped.setScale(0) : stripped;
    }

    private static <E extends Enum<E>> E of(Class<E> kind, String word) {
      return Enum.valueOf(kind, word.toUpperCase(Locale.ROOT).replace('-', '_'));
    }
  }
}
