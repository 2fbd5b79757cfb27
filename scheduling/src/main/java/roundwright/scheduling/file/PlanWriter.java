package roundwright.scheduling.file;

import com.fasterxml.jackson.databind.node.ArrayNode;
import com.fasterxml.jackson.databind.node.ObjectNode;
import java.math.RoundingMode;
import java.time.ZoneId;
import java.util.List;
import java.util.Map;
import roundwright.scheduling.cost.Cost;
import roundwright.scheduling.cost.Finding;
import roundwright.scheduling.model.Event;
import roundwright.scheduling.model.Group;
import roundwright.scheduling.model.Plan;

/** Writes a plan beside its event. */
final class PlanWriter {
  private static final int AMOUNT_DECIMALS = 3;

  private PlanWriter() {}

  static String json(Plan plan, Event event, Extras extras) {
    Map<String, ZoneId> zones = EventWriter.zones(event);
    ObjectNode root = Fields.newObject();
    root.put("format", PlanFile.FORMAT);
    ArrayNode groups = root.putArray("groups");
    for (Group group : plan.groups()) {
      group(groups.addObject(), group, zones.getOrDefault(group.hall(), event.zone()));
    }
    plan.score().ifPresent(score -> score(root.putObject("score"), score));
    if (!plan.findings().isEmpty()) {
      ArrayNode findings = root.putArray("findings");
      plan.findings().forEach(finding -> finding(findings.addObject(), finding));
    }
    extras.addTo(root);
    return Layout.of(root);
  }

  private static void group(ObjectNode out, Group group, ZoneId zone) {
    out.put("id", group.id());
    out.put("round", group.round());
    out.put("number", group.number());
    out.put("hall", group.hall());
    out.put("stations", group.stations());
    out.put("start", EventWriter.local(group.start(), zone));
    out.put("end", EventWriter.local(group.end(), zone));
    ids(out, "competitors", group.competitors());
    ObjectNode crew = out.putObject("crew");
    ids(crew, "judges", group.crew().judges());
    ids(crew, "scramblers", group.crew().scramblers());
    ids(crew, "runners", group.crew().runners());
  }

  private static void ids(ObjectNode out, String key, List<String> ids) {
    ArrayNode array = out.putArray(key);
    ids.forEach(array::add);
  }

  private static void score(ObjectNode out, Cost score) {
    out.put("breaches", score.breaches());
    out.put("gaps", score.gaps());
    out.set("strain", JsonText.NODES.numberNode(score.roundedStrain()));
  }

  private static void finding(ObjectNode out, Finding finding) {
    out.put("level", finding.level().word());
    out.put("rule", finding.rule().word());
    EventWriter.number(
        out, "amount", finding.amount().setScale(AMOUNT_DECIMALS, RoundingMode.HALF_UP));
    finding.group().ifPresent(group -> out.put("group", group));
    ids(out, "people", finding.people());
    out.put("says", finding.says());
  }
}
