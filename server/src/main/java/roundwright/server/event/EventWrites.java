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
import java.util.ArrayList;
import java.util.List;
import java.util.Locale;
import java.util.Optional;
import java.util.OptionalInt;
import org.jooq.DSLContext;
import org.jooq.Table;
import org.jooq.TableRecord;
import org.jooq.UpdatableRecord;
import roundwright.scheduling.file.EventFile;
import roundwright.scheduling.file.Extras;
import roundwright.scheduling.model.Discipline;
import roundwright.scheduling.model.Event;
import roundwright.scheduling.model.FixedPoint;
import roundwright.scheduling.model.Hall;
import roundwright.scheduling.model.Person;
import roundwright.scheduling.model.Pins;
import roundwright.scheduling.model.Round;
import roundwright.scheduling.model.Rules;
import roundwright.scheduling.model.Venue;
import roundwright.scheduling.model.Way;
import roundwright.scheduling.model.Window;
import roundwright.server.ids.EventId;
import roundwright.server.store.Database;
import roundwright.server.store.Journal;
import roundwright.server.store.Tx;
import roundwright.server.store.schema.tables.records.PersonRecord;
import roundwright.server.store.schema.tables.records.PinRecord;
import roundwright.server.store.schema.tables.records.RoundRecord;
import roundwright.server.ticket.NameFold;

/** Brings events in; each in one transaction. */
public final class EventWrites {
  private static final int LONGEST_NAME = 500;

  private final Database database;

  public EventWrites(Database database) {
    this.database = database;
  }

  /**
   * Adds an event from its file. Of the file's own keys, {@code x-listed}, {@code x-minor} and
   * {@code x-public-name} of a person say what strangers may see, {@code x-address} is a venue's;
   * all are kept for the export.
   *
   * @param slug the event's name in addresses
   * @throws IllegalArgumentException where the slug is taken or a name is too long to keep
   */
  public EventId importEvent(String slug, EventFile file) {
    checkLengths(file.event(), file.extras());
    return database.write(tx -> new Import(tx, slug, file).run());
  }

  private static void checkLengths(Event event, Extras extras) {
    checkLength("The event's name", event.name());
    event.venues().forEach(venue -> checkLength("venue " + venue.id(), venue.name()));
    event
        .venues()
        .forEach(
            venue ->
                extras
                    .ofVenue(venue.id(), "x-address")
                    .ifPresent(address -> checkLength("address of " + venue.id(), address)));
    event.venues().stream()
        .flatMap(venue -> venue.halls().stream())
        .forEach(hall -> checkLength("hall " + hall.id(), hall.name()));
    event.disciplines().forEach(one -> checkLength("discipline " + one.id(), one.name()));
    event.fixedPoints().forEach(point -> checkLength("a fixed point", point.name()));
    for (Person person : event.people()) {
      checkLength("person " + person.id(), person.name());
      person.busy().forEach(busy -> checkLength("busy time of " + person.id(), busy.what()));
    }
  }

  private static void checkLength(String of, String text) {
    if (text.length() > LONGEST_NAME) {
      throw new IllegalArgumentException(
          of
              + " has a text of "
              + text.length()
              + " letters; "
              + LONGEST_NAME
              + " can be kept. Shorten it.");
    }
  }

  /** One import under way. */
  private static final class Import {
    private final Tx tx;
    private final DSLContext sql;
    private final String slug;
    private final EventFile file;
    private final Event event;
    private final List<TableRecord<?>> rows = new ArrayList<>();
    private long eventId;

    Import(Tx tx, String slug, EventFile file) {
      this.tx = tx;
      this.sql = tx.sql();
      this.slug = slug;
      this.file = file;
      this.event = file.event();
    }

    EventId run() {
      if (sql.fetchExists(EVENT, EVENT.SLUG.eq(slug))) {
        throw new IllegalArgumentException(
            "There is an event at /events/" + slug + " already. Choose another address for it.");
      }
      eventId =
          sql.insertInto(EVENT)
              .set(EVENT.SLUG, slug)
              .set(EVENT.NAME, event.name())
              .set(EVENT.ZONE, event.zone().getId())
              .set(EVENT.EXTRAS, file.extras().isEmpty() ? null : file.extras().json())
              .set(EVENT.CREATED_AT, tx.now())
              .returning(EVENT.ID)
              .fetchSingle(EVENT.ID);
      venues();
      fixedPoints();
      disciplines();
      people();
      rounds();
      rules();
      pins();
      flush();
      EventId id = new EventId(eventId);
      Journal.note(tx, id, "event-imported", slug);
      Journal.audit(
          tx,
          Optional.of(id),
          Optional.empty(),
          "event-imported",
          slug,
          Optional.empty(),
          Optional.empty());
      return id;
    }

    private <R extends UpdatableRecord<R>> R row(Table<R> table) {
      R row = sql.newRecord(table);
      rows.add(row);
      return row;
    }

    /** Rows go in as batches; those of one table are next to each other, parents first. */
    private void flush() {
      sql.batchInsert(rows).execute();
      rows.clear();
    }

    private void venues() {
      int position = 0;
      int hallPosition = 0;
      for (Venue venue : event.venues()) {
        row(VENUE)
            .setEventId(eventId)
            .setCode(venue.id())
            .setPosition(position++)
            .setName(venue.name())
            .setAddress(file.extras().ofVenue(venue.id(), "x-address").orElse(null))
            .setZone(venue.zone().getId());
      }
      for (Venue venue : event.venues()) {
        for (Hall hall : venue.halls()) {
          row(HALL)
              .setEventId(eventId)
              .setCode(hall.id())
              .setVenueCode(venue.id())
              .setPosition(hallPosition++)
              .setName(hall.name())
              .setStations(hall.stations())
              .setOccupancy(boxed(hall.occupancy()));
        }
      }
      event.venues().stream().flatMap(venue -> venue.halls().stream()).forEach(this::hallParts);
      position = 0;
      for (Way way : event.ways()) {
        row(WAY)
            .setEventId(eventId)
            .setPosition(position++)
            .setOneVenue(way.oneVenue())
            .setOtherVenue(way.otherVenue())
            .setMinutes(way.minutes());
      }
      flush();
    }

    private void hallParts(Hall hall) {
      for (String feature : hall.features()) {
        row(HALL_FEATURE).setEventId(eventId).setHallCode(hall.id()).setFeature(feature);
      }
      for (Window window : hall.open()) {
        row(OPENING)
            .setEventId(eventId)
            .setHallCode(hall.id())
            .setOpensAt(window.from())
            .setClosesAt(window.to());
      }
    }

    private void fixedPoints() {
      int number = 0;
      for (FixedPoint point : event.fixedPoints()) {
        row(FIXED_POINT)
            .setEventId(eventId)
            .setPosition(number)
            .setName(point.name())
            .setInEveryHall(point.halls().isEmpty())
            .setStartsAt(point.from())
            .setEndsAt(point.to());
        int position = 0;
        for (String hall : point.halls().orElse(List.of())) {
          row(FIXED_POINT_HALL)
              .setEventId(eventId)
              .setFixedPoint(number)
              .setPosition(position++)
              .setHallCode(hall);
        }
        number++;
      }
      flush();
    }

    private void disciplines() {
      int position = 0;
      for (Discipline discipline : event.disciplines()) {
        row(DISCIPLINE)
            .setEventId(eventId)
            .setCode(discipline.id())
            .setPosition(position++)
            .setName(discipline.name())
            .setHandlingSeconds(discipline.handlingSeconds())
            .setScrambleSeconds(discipline.scrambleSeconds())
            .setCarrySeconds(discipline.carrySeconds())
            .setMeasure(word(discipline.measure()));
        for (String need : discipline.needs()) {
          row(DISCIPLINE_NEED)
              .setEventId(eventId)
              .setDisciplineCode(discipline.id())
              .setFeature(need);
        }
      }
      flush();
    }

    private void people() {
      int position = 0;
      for (Person person : event.people()) {
        person(person, position++);
      }
      flush();
      event.people().forEach(this::personParts);
      flush();
    }

    private void person(Person person, int position) {
      Extras extras = file.extras();
      Optional<String> publicName =
          extras.ofPerson(person.id(), "x-public-name").filter(text -> !text.isBlank());
      boolean listed = extras.ofPerson(person.id(), "x-listed").orElse("").equals("true");
      boolean minor = extras.ofPerson(person.id(), "x-minor").orElse("").equals("true");
      String shown = ShownName.of(person.name(), publicName, listed, minor);
      checkLength("public name of " + person.id(), shown);
      PersonRecord row = row(PERSON);
      row.setEventId(eventId).setCode(person.id()).setPosition(position).setName(person.name());
      row.setPublicName(publicName.orElse(null)).setShownName(shown);
      row.setFoldedName(NameFold.of(shown)).setListed(listed).setMinor(minor);
      row.setJudges(person.crew().judges()).setRuns(person.crew().runs());
      row.setAvailabilityGiven(person.available().isPresent());
      row.setHousehold(person.household().orElse(null)).setNewcomer(person.newcomer());
      row.setMaxDutyMinutesPerDay(person.maxDutyMinutesPerDay());
      row.setShare(person.share().orElse(null));
    }

    private void personParts(Person person) {
      int position = 0;
      for (Person.Entry entry : person.entries()) {
        row(ENTRY)
            .setEventId(eventId)
            .setPersonCode(person.id())
            .setPosition(position++)
            .setDisciplineCode(entry.discipline())
            .setExpectedSeconds(entry.expectedSeconds());
      }
      position = 0;
      for (String discipline : person.crew().scrambles()) {
        row(CREW_SKILL)
            .setEventId(eventId)
            .setPersonCode(person.id())
            .setPosition(position++)
            .setDisciplineCode(discipline);
      }
      for (Window window : person.available().orElse(List.of())) {
        row(AVAILABILITY)
            .setEventId(eventId)
            .setPersonCode(person.id())
            .setFromAt(window.from())
            .setToAt(window.to());
      }
      position = 0;
      for (Person.Busy busy : person.busy()) {
        row(BUSY_TIME)
            .setEventId(eventId)
            .setPersonCode(person.id())
            .setPosition(position++)
            .setFromAt(busy.window().from())
            .setToAt(busy.window().to())
            .setWhat(busy.what());
      }
    }

    private void rounds() {
      int position = 0;
      for (Round round : event.rounds()) {
        round(round, position++);
      }
      flush();
      for (Round round : event.rounds()) {
        position = 0;
        for (String hall : round.halls().orElse(List.of())) {
          row(ROUND_HALL)
              .setEventId(eventId)
              .setRoundCode(round.id())
              .setPosition(position++)
              .setHallCode(hall);
        }
        position = 0;
        for (String person : round.entrants().orElse(List.of())) {
          row(ROUND_ENTRANT)
              .setEventId(eventId)
              .setRoundCode(round.id())
              .setPosition(position++)
              .setPersonCode(person);
        }
      }
      flush();
    }

    private void round(Round round, int position) {
      RoundRecord row = row(ROUND);
      row.setEventId(eventId).setCode(round.id()).setPosition(position);
      row.setDisciplineCode(round.discipline()).setNumber(round.number());
      row.setCountedBy(round.countedBy().word()).setTimeLimitSeconds(round.timeLimitSeconds());
      row.setLimitCovers(word(round.limitCovers()));
      row.setCutOffAttempts(round.cutOff().map(Round.CutOff::attempts).orElse(null));
      row.setCutOffSeconds(round.cutOff().map(Round.CutOff::seconds).orElse(null));
      row.setAdvanceBy(round.advance().map(Import::advanceWord).orElse(null));
      row.setAdvanceAmount(round.advance().map(Import::advanceAmount).orElse(null));
      row.setContinues(round.continues()).setHallsGiven(round.halls().isPresent());
      row.setSeating(round.seating().map(Import::word).orElse(null));
      row.setFill(round.fill().orElse(null)).setStations(boxed(round.stations()));
      row.setGroupCount(boxed(round.groups()));
      row.setMinutesPerGroup(boxed(round.minutesPerGroup()));
      row.setCrewJudges(round.crew().map(Round.CrewSize::judges).orElse(null));
      row.setCrewScramblers(round.crew().map(Round.CrewSize::scramblers).orElse(null));
      row.setCrewRunners(round.crew().map(Round.CrewSize::runners).orElse(null));
      row.setSeeding(word(round.seeding()));
      row.setNotBefore(round.notBefore().orElse(null));
      row.setNotAfter(round.notAfter().orElse(null));
      row.setEntrantsGiven(round.entrants().isPresent());
    }

    private static String advanceWord(Round.Advance advance) {
      if (advance instanceof Round.Advance.Count) {
        return "count";
      }
      return advance instanceof Round.Advance.Percent ? "percent" : "under";
    }

    private static BigDecimal advanceAmount(Round.Advance advance) {
      if (advance instanceof Round.Advance.Count count) {
        return BigDecimal.valueOf(count.people());
      }
      if (advance instanceof Round.Advance.Percent percent) {
        return percent.percent();
      }
      return ((Round.Advance.Under) advance).seconds();
    }

    private void rules() {
      Rules rules = event.rules();
      row(EVENT_RULES)
          .setEventId(eventId)
          .setSeating(word(rules.seating()))
          .setFill(rules.fill())
          .setStationsPerScrambler(rules.stationsPerScrambler())
          .setStationsPerRunner(rules.stationsPerRunner())
          .setChangeoverMinutes(rules.changeoverMinutes())
          .setSetupMinutes(rules.setupMinutes())
          .setTurnaroundMinutes(rules.turnaroundMinutes())
          .setStartGridMinutes(rules.startGridMinutes())
          .setSlack(rules.slack())
          .setSlotPercentile(rules.slotPercentile())
          .setBreathingMinutes(rules.breathingMinutes())
          .setRestMinutes(rules.restMinutes())
          .setLongestRunMinutes(rules.longestRunMinutes());
      int position = 0;
      for (Rules.Meal meal : rules.meals()) {
        row(MEAL)
            .setEventId(eventId)
            .setPosition(position++)
            .setFromTime(meal.from())
            .setToTime(meal.to())
            .setMinutes(meal.minutes());
      }
      rules
          .weights()
          .forEach(
              (rule, weight) ->
                  row(RULE).setEventId(eventId).setName(rule.word()).setWeight(weight));
    }

    private void pins() {
      int position = 0;
      for (Pins.GroupPin pin : event.pins().groups()) {
        pin("group", position++, pin.round(), pin.number())
            .setHallCode(pin.hall().orElse(null))
            .setStartsAt(pin.start().orElse(null));
      }
      position = 0;
      for (Pins.CompetitorPin pin : event.pins().competitors()) {
        pin("competitor", position++, pin.round(), pin.number()).setPersonCode(pin.person());
      }
      position = 0;
      for (Pins.DutyPin pin : event.pins().duties()) {
        pin("duty", position++, pin.round(), pin.number())
            .setPersonCode(pin.person())
            .setRole(pin.role().word());
      }
    }

    private PinRecord pin(String kind, int position, String round, int number) {
      return row(PIN)
          .setEventId(eventId)
          .setKind(kind)
          .setPosition(position)
          .setRoundCode(round)
          .setGroupNumber(number);
    }

    private static Integer boxed(OptionalInt number) {
      return number.isPresent() ? number.getAsInt() : null;
    }

    private static String word(Enum<?> constant) {
      return constant.name().toLowerCase(Locale.ROOT).replace('_', '-');
    }
  }
}
