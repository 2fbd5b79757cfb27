package roundwright.scheduling.file;

import com.fasterxml.jackson.databind.JsonNode;
import java.math.BigDecimal;
import java.time.LocalDateTime;
import java.time.ZoneId;
import java.time.ZoneOffset;
import java.util.ArrayList;
import java.util.HashMap;
import java.util.HashSet;
import java.util.LinkedHashMap;
import java.util.List;
import java.util.Map;
import java.util.Optional;
import java.util.OptionalInt;
import java.util.Set;
import java.util.TreeSet;
import roundwright.scheduling.model.Discipline;
import roundwright.scheduling.model.Event;
import roundwright.scheduling.model.FixedPoint;
import roundwright.scheduling.model.Hall;
import roundwright.scheduling.model.Person;
import roundwright.scheduling.model.Pins;
import roundwright.scheduling.model.Role;
import roundwright.scheduling.model.Round;
import roundwright.scheduling.model.Rules;
import roundwright.scheduling.model.Venue;
import roundwright.scheduling.model.Way;
import roundwright.scheduling.model.Window;

/** Reads the tree of an event file; whatever is wrong is noted and read as something harmless. */
final class EventReader {
  private static final Range SECONDS = Range.of(0, 900);

  private final Problems problems;
  private final Ids venues = new Ids("venue");
  private final Ids halls = new Ids("hall");
  private final Ids disciplines = new Ids("discipline");
  private final Ids rounds = new Ids("round");
  private final Ids people = new Ids("person");
  private final Map<String, ZoneId> zoneOfHall = new LinkedHashMap<>();
  private final Map<String, Set<String>> peopleIn = new HashMap<>();
  private ZoneId zone = ZoneOffset.UTC;

  EventReader(Problems problems) {
    this.problems = problems;
  }

  Event read(JsonNode root) {
    Fields file = new Fields(problems, "", "", root);
    format(file, EventFile.FORMAT);
    String name = file.requiredText("name");
    file.missing("zone", "write the event's IANA zone, such as Europe/Lisbon");
    zone = file.zone("zone").orElse(ZoneOffset.UTC);
    List<Venue> readVenues = file.requiredObjects("venues").stream().map(this::venue).toList();
    List<Way> ways = ways(file.objects("travel").orElse(List.of()));
    List<FixedPoint> fixedPoints =
        file.objects("fixedPoints").orElse(List.of()).stream()
            .flatMap(fields -> fixedPoint(fields).stream())
            .toList();
    List<Discipline> readDisciplines =
        file.requiredObjects("disciplines").stream().map(this::discipline).toList();
    List<Fields> roundFields = file.requiredObjects("rounds");
    List<Person> readPeople = people(file.requiredObjects("people"));
    RoundReader roundReader = new RoundReader(zone, disciplines, halls, rounds, people, peopleIn);
    List<Round> readRounds = roundReader.rounds(roundFields);
    Rules rules = file.object("rules").map(RulesReader::rules).orElse(Rules.DEFAULT);
    Pins pins = file.object("pins").map(this::pins).orElse(Pins.NONE);
    file.done();
    return new Event(
        name,
        zone,
        readVenues,
        ways,
        fixedPoints,
        readDisciplines,
        readRounds,
        readPeople,
        rules,
        pins);
  }

  static void format(Fields file, String wanted) {
    file.missing("format", "write \"" + wanted + "\"");
    Optional<String> format = file.text("format");
    if (format.isPresent() && !format.get().equals(wanted)) {
      file.problem("format", Problems.quoted(format.get()), "only \"" + wanted + "\" is read here");
    }
  }

  private Venue venue(Fields fields) {
    String id = venues.define(fields);
    String name = fields.requiredText("name");
    ZoneId ownZone = fields.zone("zone").orElse(zone);
    List<Hall> readHalls =
        fields.requiredObjects("halls").stream().map(hall -> hall(hall, ownZone)).toList();
    fields.done();
    return new Venue(id, name, ownZone, readHalls);
  }

  private Hall hall(Fields fields, ZoneId venueZone) {
    fields.owner("");
    String id = halls.define(fields);
    zoneOfHall.put(id, venueZone);
    String name = fields.requiredText("name");
    int stations = fields.requiredWhole("stations", Range.of(1, 500));
    fields.missing("open", "say when the hall is open: [{\"from\": …, \"to\": …}]");
    Optional<List<Window>> open = fields.windows("open", venueZone);
    if (open.isPresent() && fields.isEmptyList("open")) {
      fields.problem("open", "[]", "give at least one window in which the hall is open");
    }
    OptionalInt occupancy = fields.whole("occupancy", Range.atLeast(1));
    List<String> features = fields.words("features");
    fields.done();
    return new Hall(id, name, stations, open.orElse(List.of()), occupancy, new TreeSet<>(features));
  }

  private List<Way> ways(List<Fields> list) {
    List<Way> ways = new ArrayList<>();
    Set<Set<String>> pairs = new HashSet<>();
    for (Fields fields : list) {
      fields.missing("between", "name two venues");
      List<String> between = fields.references("between", venues).orElse(List.of());
      int minutes = fields.requiredWhole("minutes", Range.of(0, 600));
      if (fields.isList("between") && fields.length("between") != 2) {
        fields.problem("between", fields.shown("between"), "name two different venues");
      } else if (between.size() == 2) {
        if (!pairs.add(Set.copyOf(between))) {
          fields.problem(
              "between", fields.shown("between"), "these two have a way already: keep one");
        }
        ways.add(new Way(between.get(0), between.get(1), minutes));
      }
      fields.done();
    }
    return ways;
  }

  private Optional<FixedPoint> fixedPoint(Fields fields) {
    String name = fields.requiredText("name");
    Optional<List<String>> concerned = fields.references("halls", halls);
    fields.missing("from", "write a local date and time such as 2027-05-08T12:30");
    fields.missing("to", "write a local date and time such as 2027-05-08T13:15");
    Optional<LocalDateTime> from = fields.local("from");
    Optional<LocalDateTime> to = fields.local("to");
    fields.done();
    Set<String> zonesSeen = new HashSet<>();
    for (String hall : concerned.orElse(List.copyOf(zoneOfHall.keySet()))) {
      ZoneId hallZone = zoneOfHall.get(hall);
      if (hallZone != null && zonesSeen.add(hallZone.getId())) {
        from.ifPresent(local -> fields.instant("from", local, hallZone));
        to.ifPresent(local -> fields.instant("to", local, hallZone));
      }
    }
    if (from.isEmpty() || to.isEmpty()) {
      return Optional.empty();
    }
    if (!from.get().isBefore(to.get())) {
      fields.problem(
          "to", Problems.quoted(to.get().toString()), "it must be later than from, " + from.get());
      return Optional.empty();
    }
    return Optional.of(new FixedPoint(name, concerned, from.get(), to.get()));
  }

  private Discipline discipline(Fields fields) {
    String id = disciplines.define(fields);
    Discipline read =
        new Discipline(
            id,
            fields.requiredText("name"),
            fields.number("handlingSeconds", SECONDS, Discipline.HANDLING_SECONDS),
            fields.number("scrambleSeconds", SECONDS, Discipline.SCRAMBLE_SECONDS),
            fields.number("carrySeconds", SECONDS, Discipline.CARRY_SECONDS),
            new TreeSet<>(fields.words("needs")),
            fields.word("measure", Discipline.Measure.values()).orElse(Discipline.Measure.TIME));
    fields.done();
    return read;
  }

  private List<Person> people(List<Fields> list) {
    List<Person> read = new ArrayList<>();
    for (Fields fields : list) {
      read.add(person(fields));
    }
    return read;
  }

  private Person person(Fields fields) {
    String id = people.define(fields);
    String name = fields.requiredText("name");
    List<Person.Entry> entries = new ArrayList<>();
    for (Fields entry : fields.objects("entries").orElse(List.of())) {
      entry(entry, id).ifPresent(entries::add);
    }
    Person.CrewSkills crew =
        fields.object("crew").map(this::crewSkills).orElse(Person.CrewSkills.NONE);
    Optional<List<Window>> available = fields.windows("available", zone);
    List<Person.Busy> busy = new ArrayList<>();
    for (Fields stretch : fields.objects("busy").orElse(List.of())) {
      Optional<Window> window = stretch.window(zone);
      String what = stretch.text("what").orElse("");
      window.ifPresent(found -> busy.add(new Person.Busy(found, what)));
      stretch.done();
    }
    Optional<String> household =
        fields.isNull("household") ? Optional.empty() : fields.optionalId("household");
    Person read =
        new Person(
            id,
            name,
            entries,
            crew,
            available,
            busy,
            household,
            fields.flag("newcomer"),
            fields.whole(
                "maxDutyMinutesPerDay", Range.of(0, 1440), Person.MAX_DUTY_MINUTES_PER_DAY),
            fields.number("share", Range.of("0.1", "10")));
    fields.done();
    return read;
  }

  private Optional<Person.Entry> entry(Fields fields, String person) {
    String discipline = fields.reference("discipline", disciplines);
    BigDecimal expected = fields.requiredNumber("expectedSeconds", Range.over(0, 7200));
    fields.done();
    if (discipline.isEmpty()) {
      return Optional.empty();
    }
    if (!peopleIn.computeIfAbsent(discipline, unused -> new HashSet<>()).add(person)
        && !person.isEmpty()) {
      fields.problem(
          "discipline",
          Problems.quoted(discipline),
          "this person has an entry in it already: take one out");
    }
    return Optional.of(new Person.Entry(discipline, expected));
  }

  private Person.CrewSkills crewSkills(Fields fields) {
    Person.CrewSkills read =
        new Person.CrewSkills(
            fields.flag("judges"),
            fields.flag("runs"),
            fields.references("scrambles", disciplines).orElse(List.of()));
    fields.done();
    return read;
  }

  private Pins pins(Fields fields) {
    List<Pins.GroupPin> groups =
        fields.objects("groups").orElse(List.of()).stream().map(this::groupPin).toList();
    List<Pins.CompetitorPin> competitors = new ArrayList<>();
    for (Fields pin : fields.objects("competitors").orElse(List.of())) {
      competitors.add(
          new Pins.CompetitorPin(
              pin.reference("person", people), pin.reference("round", rounds), number(pin)));
      pin.done();
    }
    List<Pins.DutyPin> duties = new ArrayList<>();
    for (Fields pin : fields.objects("duties").orElse(List.of())) {
      duties.add(
          new Pins.DutyPin(
              pin.reference("person", people),
              pin.reference("round", rounds),
              number(pin),
              pin.requiredWord("role", Role.values())));
      pin.done();
    }
    fields.done();
    return new Pins(groups, competitors, duties);
  }

  private static int number(Fields pin) {
    return pin.requiredWhole("number", Range.atLeast(1));
  }

  private Pins.GroupPin groupPin(Fields fields) {
    String round = fields.reference("round", rounds);
    int number = number(fields);
    Optional<String> hall = fields.optionalId("hall");
    hall.ifPresent(id -> halls.refer(fields, "hall", id));
    ZoneId pinZone = hall.map(zoneOfHall::get).orElse(zone);
    Pins.GroupPin pin = new Pins.GroupPin(round, number, hall, fields.instant("start", pinZone));
    if (!fields.has("hall") && !fields.has("start")) {
      fields.missing("hall", "a pin names a hall, a start, or both");
    }
    fields.done();
    return pin;
  }
}
