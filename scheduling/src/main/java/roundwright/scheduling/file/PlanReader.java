package roundwright.scheduling.file;

import com.fasterxml.jackson.databind.JsonNode;
import java.math.BigDecimal;
import java.time.Instant;
import java.time.ZoneId;
import java.util.ArrayList;
import java.util.List;
import java.util.Map;
import java.util.Optional;
import java.util.Set;
import java.util.stream.Collectors;
import roundwright.scheduling.cost.Cost;
import roundwright.scheduling.cost.Finding;
import roundwright.scheduling.cost.Level;
import roundwright.scheduling.cost.RuleName;
import roundwright.scheduling.model.Event;
import roundwright.scheduling.model.Group;
import roundwright.scheduling.model.Person;
import roundwright.scheduling.model.Plan;
import roundwright.scheduling.model.Round;

/** Reads the tree of a plan file beside its event. */
final class PlanReader {
  private final Problems problems;
  private final ZoneId eventZone;
  private final Map<String, ZoneId> zoneOfHall;
  private final Set<String> rounds;
  private final Set<String> people;
  private final boolean kept;
  private final Ids groups = new Ids("group");

  /**
   * @param kept whether people, halls and rounds may have left the event
   */
  PlanReader(Problems problems, Event event, boolean kept) {
    this.problems = problems;
    this.eventZone = event.zone();
    this.zoneOfHall = EventWriter.zones(event);
    this.rounds = event.rounds().stream().map(Round::id).collect(Collectors.toSet());
    this.people = event.people().stream().map(Person::id).collect(Collectors.toSet());
    this.kept = kept;
  }

  Plan read(JsonNode root) {
    Fields file = new Fields(problems, "", "", root);
    EventReader.format(file, PlanFile.FORMAT);
    List<Group> readGroups = new ArrayList<>();
    for (Fields fields : file.requiredObjects("groups")) {
      group(fields).ifPresent(readGroups::add);
    }
    Optional<Cost> score = file.object("score").map(PlanReader::score);
    List<Finding> findings = new ArrayList<>();
    for (Fields fields : file.objects("findings").orElse(List.of())) {
      finding(fields).ifPresent(findings::add);
    }
    file.done();
    return new Plan(readGroups, score, findings);
  }

  private Optional<Group> group(Fields fields) {
    String id = groups.define(fields);
    String round = known(fields, "round", "round", rounds);
    int number = fields.requiredWhole("number", Range.atLeast(1));
    String hall = known(fields, "hall", "hall", zoneOfHall.keySet());
    int stations = fields.requiredWhole("stations", Range.atLeast(1));
    ZoneId zone = zoneOfHall.getOrDefault(hall, eventZone);
    Optional<Instant> start = fields.requiredInstant("start", zone);
    Optional<Instant> end = fields.requiredInstant("end", zone);
    if (start.isPresent() && end.isPresent() && !start.get().isBefore(end.get())) {
      fields.problem(
          "end", fields.shown("end"), "it must be later than the start, " + fields.shown("start"));
    }
    fields.missing("competitors", "name at least one person");
    List<String> competitors = people(fields, "competitors");
    if (fields.isEmptyList("competitors")) {
      fields.problem("competitors", "[]", "name at least one person or take the group out");
    }
    Group.Crew crew = fields.object("crew").map(this::crew).orElse(Group.Crew.NONE);
    fields.done();
    if (start.isEmpty() || end.isEmpty()) {
      return Optional.empty();
    }
    return Optional.of(
        new Group(id, round, number, hall, stations, start.get(), end.get(), competitors, crew));
  }

  private Group.Crew crew(Fields fields) {
    Group.Crew read =
        new Group.Crew(
            people(fields, "judges"), people(fields, "scramblers"), people(fields, "runners"));
    fields.done();
    return read;
  }

  private List<String> people(Fields fields, String key) {
    List<String> ids = fields.idList(key, false).orElse(List.of());
    for (int i = 0; i < ids.size(); i++) {
      check(fields, key + "[" + i + "]", "person", ids.get(i), people);
    }
    return ids;
  }

  private String known(Fields fields, String key, String kind, Set<String> ids) {
    String id = fields.id(key);
    check(fields, key, kind, id, ids);
    return id;
  }

  private void check(Fields fields, String place, String kind, String id, Set<String> ids) {
    if (!kept && !id.isEmpty() && !ids.contains(id)) {
      fields.problem(
          place,
          Problems.quoted(id),
          "no " + kind + " of the event has this id" + Nearest.hint(id, ids));
    }
  }

  private static Cost score(Fields fields) {
    Cost read =
        new Cost(
            fields.requiredWhole("breaches", Range.atLeast(0)),
            fields.requiredWhole("gaps", Range.atLeast(0)),
            fields.requiredNumber("strain", Range.atLeast(0)));
    fields.done();
    return read;
  }

  /** A finding, or none where its rule is another program's: findings decide nothing. */
  private static Optional<Finding> finding(Fields fields) {
    fields.requiredWord("level", Level.values());
    String rule = fields.requiredText("rule");
    BigDecimal amount = fields.number("amount", Range.atLeast(0), BigDecimal.ZERO);
    Optional<String> group = fields.isNull("group") ? Optional.empty() : fields.optionalId("group");
    List<String> touched = fields.idList("people", false).orElse(List.of());
    String says = fields.text("says").orElse("");
    fields.done();
    return RuleName.ofWord(rule).map(name -> new Finding(name, amount, group, touched, says));
  }
}
