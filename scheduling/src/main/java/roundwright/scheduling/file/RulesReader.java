package roundwright.scheduling.file;

import java.math.BigDecimal;
import java.time.LocalTime;
import java.util.ArrayList;
import java.util.Arrays;
import java.util.EnumMap;
import java.util.List;
import java.util.Map;
import java.util.Optional;
import roundwright.scheduling.cost.Level;
import roundwright.scheduling.cost.RuleName;
import roundwright.scheduling.model.Rules;
import roundwright.scheduling.model.Seating;

/** Reads the rules of an event file. */
final class RulesReader {
  static final Range FILL = Range.of("0.5", "4");

  private static final Range MINUTES = Range.of(0, 600);
  private static final Range STATIONS_PER = Range.of(0, 100);
  private static final Range DAY_MINUTES = Range.of(1, 1440);

  private RulesReader() {}

  static Rules rules(Fields fields) {
    Rules otherwise = Rules.DEFAULT;
    Rules read =
        new Rules(
            fields.word("seating", Seating.values()).orElse(otherwise.seating()),
            fields.number("fill", FILL, otherwise.fill()),
            fields.number("stationsPerScrambler", STATIONS_PER, otherwise.stationsPerScrambler()),
            fields.number("stationsPerRunner", STATIONS_PER, otherwise.stationsPerRunner()),
            fields.whole("changeoverMinutes", MINUTES, otherwise.changeoverMinutes()),
            fields.whole("setupMinutes", MINUTES, otherwise.setupMinutes()),
            fields.whole("turnaroundMinutes", MINUTES, otherwise.turnaroundMinutes()),
            fields.whole("startGridMinutes", Range.of(1, 60), otherwise.startGridMinutes()),
            fields.number("slack", Range.of(1, 3), otherwise.slack()),
            fields.whole("slotPercentile", Range.of(50, 99), otherwise.slotPercentile()),
            fields.whole("breathingMinutes", Range.atLeast(0), otherwise.breathingMinutes()),
            fields.whole("restMinutes", Range.atLeast(0), otherwise.restMinutes()),
            fields.whole("longestRunMinutes", Range.atLeast(0), otherwise.longestRunMinutes()),
            fields.objects("meals").map(RulesReader::meals).orElse(otherwise.meals()),
            fields.object("weights").map(RulesReader::weights).orElse(Map.of()));
    fields.done();
    return read;
  }

  private static List<Rules.Meal> meals(List<Fields> list) {
    List<Rules.Meal> meals = new ArrayList<>();
    for (Fields fields : list) {
      Optional<LocalTime> from = fields.timeOfDay("from");
      Optional<LocalTime> to = fields.timeOfDay("to");
      int minutes = fields.requiredWhole("minutes", DAY_MINUTES);
      if (from.isPresent() && to.isPresent()) {
        if (from.get().isBefore(to.get())) {
          meals.add(new Rules.Meal(from.get(), to.get(), minutes));
        } else {
          fields.problem(
              "to",
              Problems.quoted(to.get().toString()),
              "it must be later than from, " + from.get());
        }
      }
      fields.done();
    }
    return meals;
  }

  private static Map<RuleName, BigDecimal> weights(Fields fields) {
    List<String> known =
        Arrays.stream(RuleName.values())
            .filter(rule -> rule.level() == Level.STRAIN)
            .map(RuleName::word)
            .toList();
    Map<RuleName, BigDecimal> weights = new EnumMap<>(RuleName.class);
    fields
        .numbers(Range.atLeast(0))
        .forEach(
            (word, weight) -> {
              if (known.contains(word)) {
                weights.put(RuleName.ofWord(word).orElseThrow(), weight);
              } else {
                fields.problem(
                    word,
                    weight.toPlainString(),
                    RuleName.ofWord(word).isPresent()
                        ? "this rule counts whole breaches or gaps and has no weight: leave it out"
                        : "no rule with a weight has this name" + Nearest.hint(word, known));
              }
            });
    return weights;
  }
}
