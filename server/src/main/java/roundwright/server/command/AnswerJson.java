package roundwright.server.command;

import com.fasterxml.jackson.databind.node.ArrayNode;
import com.fasterxml.jackson.databind.node.JsonNodeFactory;
import com.fasterxml.jackson.databind.node.ObjectNode;
import java.math.BigDecimal;
import java.math.RoundingMode;
import java.util.Collection;
import java.util.List;
import java.util.Locale;
import java.util.Map;
import java.util.Optional;
import roundwright.scheduling.advice.Difference;
import roundwright.scheduling.advice.FewestPeople;
import roundwright.scheduling.advice.Impossible;
import roundwright.scheduling.advice.Recruiting;
import roundwright.scheduling.advice.StandIn;
import roundwright.scheduling.advice.WhatBreaks;
import roundwright.scheduling.advice.Why;
import roundwright.scheduling.advice.WhyNot;
import roundwright.scheduling.cost.Finding;
import roundwright.scheduling.cost.RuleName;
import roundwright.scheduling.model.Role;

/** Answers as JSON, one line: the same facts as the sentences, which stand beside them. */
final class AnswerJson {
  private static final JsonNodeFactory NODES = JsonNodeFactory.instance;

  private AnswerJson() {}

  private static ObjectNode object() {
    return NODES.objectNode();
  }

  private static void put(ObjectNode into, String key, Collection<String> texts) {
    ArrayNode list = into.putArray(key);
    texts.forEach(list::add);
  }

  private static String word(Enum<?> name) {
    return name.name().toLowerCase(Locale.ROOT).replace('_', '-');
  }

  private static void put(ObjectNode into, Difference difference) {
    into.put("breaches", difference.breaches())
        .put("gaps", difference.gaps())
        .put("strain", rounded(difference.strain()));
  }

  private static BigDecimal rounded(BigDecimal strain) {
    return strain.setScale(1, RoundingMode.HALF_UP);
  }

  private static void put(ObjectNode into, Map<RuleName, BigDecimal> byRule) {
    ObjectNode rules = into.putObject("byRule");
    byRule.forEach((rule, price) -> rules.put(rule.word(), rounded(price)));
  }

  static ObjectNode of(Impossible one) {
    ObjectNode into = object().put("kind", word(one.kind())).put("atLeast", one.atLeast());
    put(into, "people", one.people());
    put(into, "rounds", one.rounds());
    put(into, "halls", one.halls());
    return into.put("says", one.says());
  }

  static ObjectNode of(Why why) {
    ObjectNode into = object().put("person", why.person());
    ArrayNode commitments = into.putArray("commitments");
    for (Why.Commitment one : why.commitments()) {
      ObjectNode commitment =
          commitments
              .addObject()
              .put("group", one.group())
              .put("does", one.role().map(Role::word).orElse("competitor"));
      put(commitment, one.byRule());
      one.alternative()
          .ifPresent(best -> put(commitment.putObject("alternative"), best.difference()));
      commitment.put("says", one.says());
    }
    return into.put("says", why.says());
  }

  static ObjectNode of(WhyNot answer) {
    ObjectNode into =
        object()
            .put("group", answer.group())
            .put("duty", answer.role().word())
            .put("empty", answer.empty());
    ObjectNode counts = into.putObject("people");
    answer.counts().forEach((obstacle, people) -> counts.put(word(obstacle), people));
    answer
        .shortage()
        .ifPresent(
            shortage -> {
              ObjectNode node = into.putObject("shortage").put("wanted", shortage.wanted());
              put(node, "people", shortage.people());
              ArrayNode duties = node.putArray("duties");
              for (WhyNot.Duties one : shortage.duties()) {
                duties
                    .addObject()
                    .put("group", one.group())
                    .put("duty", one.role().word())
                    .put("wanted", one.wanted());
              }
            });
    ArrayNode remedies = into.putArray("remedies");
    for (WhyNot.Remedy remedy : answer.remedies()) {
      ObjectNode node = remedies.addObject();
      put(node, remedy.difference());
      node.put("says", remedy.says());
    }
    return into.put("says", answer.says());
  }

  static ObjectNode of(StandIn one) {
    ObjectNode into = object().put("person", one.person());
    put(into, "leaves", one.leaves());
    put(into, "told", one.told());
    put(into, one.difference());
    return into.put("says", one.says());
  }

  static ObjectNode of(WhatBreaks answer) {
    ObjectNode into = object();
    put(into, answer.difference());
    put(into, answer.byRule());
    findings(into.putArray("comes"), answer.comes());
    findings(into.putArray("goes"), answer.goes());
    return into.put("says", answer.says());
  }

  private static void findings(ArrayNode into, List<Finding> findings) {
    for (Finding finding : findings) {
      ObjectNode node = into.addObject().put("rule", finding.rule().word());
      node.put("amount", finding.amount());
      Optional<String> group = finding.group();
      group.ifPresent(id -> node.put("group", id));
      put(node, "people", finding.people());
      node.put("says", finding.says());
    }
  }

  static ObjectNode of(Recruiting.Recruit recruit) {
    ObjectNode into = object().put("fills", recruit.fills());
    var crew = recruit.person().crew();
    into.put("judges", crew.judges()).put("runs", crew.runs());
    put(into, "scrambles", crew.scrambles());
    return into.put("says", recruit.says());
  }

  static ObjectNode of(FewestPeople answer) {
    ObjectNode into =
        object()
            .put("fewest", answer.people().size())
            .put("atLeast", answer.atLeast())
            .put("uncovered", answer.uncovered());
    put(into, "people", answer.people());
    return into.put("says", answer.says());
  }
}
