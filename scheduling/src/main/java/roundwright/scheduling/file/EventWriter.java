package roundwright.scheduling.file;

import com.fasterxml.jackson.databind.node.ArrayNode;
import com.fasterxml.jackson.databind.node.ObjectNode;
import java.math.BigDecimal;
import java.time.Instant;
import java.time.LocalDateTime;
import java.time.ZoneId;
import java.time.format.DateTimeFormatter;
import java.time.temporal.ChronoUnit;
import java.util.Collection;
import java.util.LinkedHashMap;
import java.util.List;
import java.util.Map;
import java.util.Optional;
import java.util.OptionalInt;
import roundwright.scheduling.cost.RuleName;
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

/** Writes an event; leaves out every optional key whose value holds without it. */
final class EventWriter {
  private static final DateTimeFormatter LOCAL = DateTimeFormatter.ofPattern("uuuu-MM-dd'T'HH:mm");
  private static final DateTimeFormatter TIME_OF_DAY = DateTimeFormatter.ofPattern("HH:mm");

  private final Event event;
  private final Map<String, ZoneId> zoneOfHall;

  EventWriter(Event event) {
    this.event = event;
    this.zoneOfHall = zones(event);
  }

  /** The zone of each hall, by its id. */
  static Map<String, ZoneId> zones(Event event) {
    Map<String, ZoneId> zones = new LinkedHashMap<>();
    for (Venue venue : event.venues()) {
      for (Hall hall : venue.halls()) {
        zones.put(hall.id(), venue.zone());
      }
    }
    return zones;
  }

  static String local(Instant instant, ZoneId zone) {
    LocalDateTime local = instant.atZone(zone).toLocalDateTime();
    Optional<String> change = ClockChange.remedy(local, zone);
    if (change.isPresent()) {
      throw new IllegalArgumentException(
          "The time " + local + " cannot be written: " + change.get());
    }
    if (!local.truncatedTo(ChronoUnit.MINUTES).equals(local)) {
      throw new IllegalArgumentException(
          "The time " + local + " cannot be written: use whole minutes");
    }
    return LOCAL.format(local);
  }

  String json(Extras extras) {
    ObjectNode root = Fields.newObject();
    root.put("format", EventFile.FORMAT);
    root.put("name", event.name());
    root.put("zone", event.zone().getId());
    ArrayNode venues = root.putArray("venues");
    event.venues().forEach(venue -> venue(venues.addObject(), venue));
    if (!event.ways().isEmpty()) {
      ArrayNode travel = root.putArray("travel");
      event.ways().forEach(way -> way(travel.addObject(), way));
    }
    if (!event.fixedPoints().isEmpty()) {
      ArrayNode fixedPoints = root.putArray("fixedPoints");
      event.fixedPoints().forEach(point -> fixedPoint(fixedPoints.addObject(), point));
    }
    ArrayNode disciplines = root.putArray("disciplines");
    event.disciplines().forEach(discipline -> discipline(disciplines.addObject(), discipline));
    ArrayNode rounds = root.putArray("rounds");
    event.rounds().forEach(round -> round(rounds.addObject(), round));
    ArrayNode people = root.putArray("people");
    event.people().forEach(person -> person(people.addObject(), person));
    ObjectNode rules = rules(event.rules());
    if (!rules.isEmpty()) {
      root.set("rules", rules);
    }
    ObjectNode pins = pins(event.pins());
    if (!pins.isEmpty()) {
      root.set("pins", pins);
    }
    extras.addTo(root);
    return Layout.of(root);
  }

  private void venue(ObjectNode out, Venue venue) {
    out.put("id", venue.id());
    out.put("name", venue.name());
    if (!venue.zone().equals(event.zone())) {
      out.put("zone", venue.zone().getId());
    }
    ArrayNode halls = out.putArray("halls");
    venue.halls().forEach(hall -> hall(halls.addObject(), hall, venue.zone()));
  }

  private static void hall(ObjectNode out, Hall hall, ZoneId zone) {
    out.put("id", hall.id());
    out.put("name", hall.name());
    out.put("stations", hall.stations());
    ArrayNode open = out.putArray("open");
    hall.open().forEach(window -> window(open.addObject(), window, zone));
    whole(out, "occupancy", hall.occupancy());
    texts(out, "features", hall.features());
  }

  private static ObjectNode window(ObjectNode out, Window window, ZoneId zone) {
    return out.put("from", local(window.from(), zone)).put("to", local(window.to(), zone));
  }

  private static void way(ObjectNode out, Way way) {
    out.putArray("between").add(way.oneVenue()).add(way.otherVenue());
    out.put("minutes", way.minutes());
  }

  private static void fixedPoint(ObjectNode out, FixedPoint point) {
    out.put("name", point.name());
    list(out, "halls", point.halls());
    out.put("from", LOCAL.format(point.from()));
    out.put("to", LOCAL.format(point.to()));
  }

  private static void discipline(ObjectNode out, Discipline discipline) {
    out.put("id", discipline.id());
    out.put("name", discipline.name());
    number(out, "handlingSeconds", discipline.handlingSeconds(), Discipline.HANDLING_SECONDS);
    number(out, "scrambleSeconds", discipline.scrambleSeconds(), Discipline.SCRAMBLE_SECONDS);
    number(out, "carrySeconds", discipline.carrySeconds(), Discipline.CARRY_SECONDS);
    texts(out, "needs", discipline.needs());
    word(out, "measure", discipline.measure(), Discipline.Measure.TIME);
  }

  private void round(ObjectNode out, Round round) {
    out.put("id", round.id());
    out.put("discipline", round.discipline());
    out.put("number", round.number());
    out.put("countedBy", Fields.word(round.countedBy()));
    number(out, "timeLimitSeconds", round.timeLimitSeconds(), Round.TIME_LIMIT_SECONDS);
    word(out, "limitCovers", round.limitCovers(), Round.LimitCovers.ATTEMPT);
    round
        .cutOff()
        .ifPresent(
            cutOff -> {
              ObjectNode object = out.putObject("cutOff").put("attempts", cutOff.attempts());
              number(object, "seconds", cutOff.seconds());
            });
    round.advance().ifPresent(advance -> advance(out.putObject("advance"), advance));
    flag(out, "continues", round.continues());
    list(out, "halls", round.halls());
    round.seating().ifPresent(seating -> out.put("seating", Fields.word(seating)));
    round.fill().ifPresent(fill -> number(out, "fill", fill));
    whole(out, "stations", round.stations());
    whole(out, "groups", round.groups());
    whole(out, "minutesPerGroup", round.minutesPerGroup());
    round
        .crew()
        .ifPresent(
            crew ->
                out.putObject("crew")
                    .put("judges", crew.judges())
                    .put("scramblers", crew.scramblers())
                    .put("runners", crew.runners()));
    word(out, "seeding", round.seeding(), Round.Seeding.SLOW_FIRST);
    round.notBefore().ifPresent(time -> out.put("notBefore", local(time, event.zone())));
    round.notAfter().ifPresent(time -> out.put("notAfter", local(time, event.zone())));
    list(out, "entrants", round.entrants());
  }

  private static void advance(ObjectNode out, Round.Advance advance) {
    if (advance instanceof Round.Advance.Count count) {
      out.put("count", count.people());
    } else if (advance instanceof Round.Advance.Percent percent) {
      number(out, "percent", percent.percent());
    } else if (advance instanceof Round.Advance.Under under) {
      number(out, "underSeconds", under.seconds());
    }
  }

  private void person(ObjectNode out, Person person) {
    out.put("id", person.id());
    out.put("name", person.name());
    ArrayNode entries = out.putArray("entries");
    for (Person.Entry entry : person.entries()) {
      ObjectNode object = entries.addObject().put("discipline", entry.discipline());
      number(object, "expectedSeconds", entry.expectedSeconds());
    }
    Person.CrewSkills crew = person.crew();
    if (!crew.equals(Person.CrewSkills.NONE)) {
      ObjectNode object = out.putObject("crew");
      flag(object, "judges", crew.judges());
      flag(object, "runs", crew.runs());
      texts(object, "scrambles", crew.scrambles());
    }
    person
        .available()
        .ifPresent(
            windows -> {
              ArrayNode array = out.putArray("available");
              windows.forEach(window -> window(array.addObject(), window, event.zone()));
            });
    if (!person.busy().isEmpty()) {
      ArrayNode busy = out.putArray("busy");
      for (Person.Busy stretch : person.busy()) {
        ObjectNode object = window(busy.addObject(), stretch.window(), event.zone());
        if (!stretch.what().isEmpty()) {
          object.put("what", stretch.what());
        }
      }
    }
    person.household().ifPresent(household -> out.put("household", household));
    flag(out, "newcomer", person.newcomer());
    if (person.maxDutyMinutesPerDay() != Person.MAX_DUTY_MINUTES_PER_DAY) {
      out.put("maxDutyMinutesPerDay", person.maxDutyMinutesPerDay());
    }
    person.share().ifPresent(share -> number(out, "share", share));
  }

  private static ObjectNode rules(Rules rules) {
    Rules otherwise = Rules.DEFAULT;
    ObjectNode out = Fields.newObject();
    word(out, "seating", rules.seating(), otherwise.seating());
    number(out, "fill", rules.fill(), otherwise.fill());
    number(
        out,
        "stationsPerScrambler",
        rules.stationsPerScrambler(),
        otherwise.stationsPerScrambler());
    number(out, "stationsPerRunner", rules.stationsPerRunner(), otherwise.stationsPerRunner());
    whole(out, "changeoverMinutes", rules.changeoverMinutes(), otherwise.changeoverMinutes());
    whole(out, "setupMinutes", rules.setupMinutes(), otherwise.setupMinutes());
    whole(out, "turnaroundMinutes", rules.turnaroundMinutes(), otherwise.turnaroundMinutes());
    whole(out, "startGridMinutes", rules.startGridMinutes(), otherwise.startGridMinutes());
    number(out, "slack", rules.slack(), otherwise.slack());
    whole(out, "slotPercentile", rules.slotPercentile(), otherwise.slotPercentile());
    whole(out, "breathingMinutes", rules.breathingMinutes(), otherwise.breathingMinutes());
    whole(out, "restMinutes", rules.restMinutes(), otherwise.restMinutes());
    whole(out, "longestRunMinutes", rules.longestRunMinutes(), otherwise.longestRunMinutes());
    if (!rules.meals().equals(otherwise.meals())) {
      ArrayNode meals = out.putArray("meals");
      for (Rules.Meal meal : rules.meals()) {
        meals
            .addObject()
            .put("from", TIME_OF_DAY.format(meal.from()))
            .put("to", TIME_OF_DAY.format(meal.to()))
            .put("minutes", meal.minutes());
      }
    }
    if (!rules.weights().isEmpty()) {
      ObjectNode weights = out.putObject("weights");
      for (Map.Entry<RuleName, BigDecimal> weight : rules.weights().entrySet()) {
        number(weights, weight.getKey().word(), weight.getValue());
      }
    }
    return out;
  }

  private ObjectNode pins(Pins pins) {
    ObjectNode out = Fields.newObject();
    if (!pins.groups().isEmpty()) {
      ArrayNode groups = out.putArray("groups");
      for (Pins.GroupPin pin : pins.groups()) {
        ObjectNode object = groups.addObject();
        object.put("round", pin.round()).put("number", pin.number());
        pin.hall().ifPresent(hall -> object.put("hall", hall));
        ZoneId zone = pin.hall().map(zoneOfHall::get).orElse(event.zone());
        pin.start().ifPresent(start -> object.put("start", local(start, zone)));
      }
    }
    if (!pins.competitors().isEmpty()) {
      ArrayNode competitors = out.putArray("competitors");
      for (Pins.CompetitorPin pin : pins.competitors()) {
        ObjectNode object = competitors.addObject().put("person", pin.person());
        object.put("round", pin.round()).put("number", pin.number());
      }
    }
    if (!pins.duties().isEmpty()) {
      ArrayNode duties = out.putArray("duties");
      for (Pins.DutyPin pin : pins.duties()) {
        ObjectNode object = duties.addObject().put("person", pin.person());
        object.put("round", pin.round()).put("number", pin.number());
        object.put("role", pin.role().word());
      }
    }
    return out;
  }

  static void texts(ObjectNode out, String key, Collection<String> texts) {
    if (!texts.isEmpty()) {
      ArrayNode array = out.putArray(key);
      texts.forEach(array::add);
    }
  }

  private static void list(ObjectNode out, String key, Optional<List<String>> ids) {
    if (ids.isPresent()) {
      ArrayNode array = out.putArray(key);
      ids.get().forEach(array::add);
    }
  }

  private static void flag(ObjectNode out, String key, boolean flag) {
    if (flag) {
      out.put(key, true);
    }
  }

  private static void word(ObjectNode out, String key, Enum<?> word, Enum<?> otherwise) {
    if (word != otherwise) {
      out.put(key, Fields.word(word));
    }
  }

  private static void whole(ObjectNode out, String key, OptionalInt number) {
    number.ifPresent(value -> out.put(key, value));
  }

  private static void whole(ObjectNode out, String key, int number, int otherwise) {
    if (number != otherwise) {
      out.put(key, number);
    }
  }

  private static void number(ObjectNode out, String key, BigDecimal number, BigDecimal otherwise) {
    if (number.compareTo(otherwise) != 0) {
      number(out, key, number);
    }
  }

  static void number(ObjectNode out, String key, BigDecimal number) {
    out.set(key, JsonText.NODES.numberNode(Fields.plain(number)));
  }
}
