package roundwright.scheduling.file;

import java.math.BigDecimal;
import java.time.ZoneId;
import java.util.ArrayList;
import java.util.Comparator;
import java.util.LinkedHashMap;
import java.util.List;
import java.util.Map;
import java.util.Optional;
import java.util.Set;
import roundwright.scheduling.model.Round;
import roundwright.scheduling.model.Seating;

/** Reads the rounds of an event file, each by itself and then as the chain of its discipline. */
final class RoundReader {
  private static final Range SECONDS = Range.of(1, 7200);
  private static final List<String> WAYS_ON = List.of("count", "percent", "underSeconds");

  private final ZoneId zone;
  private final Ids disciplines;
  private final Ids halls;
  private final Ids rounds;
  private final Ids people;
  private final Map<String, Set<String>> peopleIn;

  /**
   * @param peopleIn ids of those with an entry, by discipline
   */
  RoundReader(
      ZoneId zone,
      Ids disciplines,
      Ids halls,
      Ids rounds,
      Ids people,
      Map<String, Set<String>> peopleIn) {
    this.zone = zone;
    this.disciplines = disciplines;
    this.halls = halls;
    this.rounds = rounds;
    this.people = people;
    this.peopleIn = peopleIn;
  }

  List<Round> rounds(List<Fields> list) {
    List<Round> read = new ArrayList<>();
    Map<String, List<Link>> chains = new LinkedHashMap<>();
    for (Fields fields : list) {
      Round round = round(fields);
      read.add(round);
      if (disciplines.defines(round.discipline()) && !fields.isWrong("number")) {
        chains
            .computeIfAbsent(round.discipline(), unused -> new ArrayList<>())
            .add(new Link(fields, round));
      }
      fields.done();
    }
    chains.values().forEach(RoundReader::chain);
    return read;
  }

  private record Link(Fields fields, Round round) {}

  private Round round(Fields fields) {
    String id = rounds.define(fields);
    String discipline = fields.reference("discipline", disciplines);
    int number = fields.requiredWhole("number", Range.atLeast(1));
    Round.CountedBy countedBy = fields.requiredWord("countedBy", Round.CountedBy.values());
    BigDecimal limit = fields.number("timeLimitSeconds", SECONDS, Round.TIME_LIMIT_SECONDS);
    Round.LimitCovers covers =
        fields.word("limitCovers", Round.LimitCovers.values()).orElse(Round.LimitCovers.ATTEMPT);
    Optional<Round.CutOff> cutOff = fields.object("cutOff").map(RoundReader::cutOff);
    Optional<Round.Advance> advance = fields.object("advance").flatMap(RoundReader::advance);
    boolean continues = fields.flag("continues");
    if (continues && fields.has("number") && number == 1) {
      fields.problem("continues", "true", "round number 1 has no round before it to continue");
    }
    Optional<List<String>> entrants = fields.references("entrants", people);
    entrants.ifPresent(ids -> withEntry(fields, ids, discipline));
    return new Round(
        id,
        discipline,
        number,
        countedBy,
        limit,
        covers,
        cutOff,
        advance,
        continues,
        fields.references("halls", halls),
        fields.word("seating", Seating.values()),
        fields.number("fill", RulesReader.FILL),
        fields.whole("stations", Range.of(1, 500)),
        fields.whole("groups", Range.of(1, 200)),
        fields.whole("minutesPerGroup", Range.of(1, 600)),
        fields.object("crew").map(RoundReader::crewSize),
        fields.word("seeding", Round.Seeding.values()).orElse(Round.Seeding.SLOW_FIRST),
        fields.instant("notBefore", zone),
        fields.instant("notAfter", zone),
        entrants);
  }

  private void withEntry(Fields fields, List<String> ids, String discipline) {
    Set<String> entered = peopleIn.getOrDefault(discipline, Set.of());
    for (int i = 0; i < ids.size(); i++) {
      String id = ids.get(i);
      if (people.defines(id) && disciplines.defines(discipline) && !entered.contains(id)) {
        fields.problem(
            "entrants[" + i + "]",
            Problems.quoted(id),
            "this person has no entry in " + discipline + ": add the entry or take them out");
      }
    }
  }

  private static Round.CutOff cutOff(Fields fields) {
    Round.CutOff read =
        new Round.CutOff(
            fields.requiredWhole("attempts", Range.of(1, 4)),
            fields.requiredNumber("seconds", Range.over(0)));
    fields.done();
    return read;
  }

  private static Round.CrewSize crewSize(Fields fields) {
    Range range = Range.of(0, 500);
    Round.CrewSize read =
        new Round.CrewSize(
            fields.requiredWhole("judges", range),
            fields.requiredWhole("scramblers", range),
            fields.requiredWhole("runners", range));
    fields.done();
    return read;
  }

  private static Optional<Round.Advance> advance(Fields fields) {
    List<String> given = WAYS_ON.stream().filter(fields::has).toList();
    if (given.size() > 1) {
      fields.problem("", String.join(" and ", given), "keep only one of them");
    }
    Optional<Round.Advance> count =
        fields.whole("count", Range.atLeast(1)).stream()
            .<Round.Advance>mapToObj(Round.Advance.Count::new)
            .findFirst();
    Optional<Round.Advance> percent =
        fields.number("percent", Range.of(1, 100)).map(Round.Advance.Percent::new);
    Optional<Round.Advance> under =
        fields.number("underSeconds", Range.over(0)).map(Round.Advance.Under::new);
    if (given.isEmpty()) {
      fields.missing("count", "say who goes on by one of count, percent or underSeconds");
    }
    fields.done();
    return count.or(() -> percent).or(() -> under);
  }

  /** A discipline's rounds are numbered without a hole, and all but the last say who goes on. */
  private static void chain(List<Link> links) {
    List<Link> sorted = new ArrayList<>(links);
    sorted.sort(Comparator.comparingInt(link -> link.round().number()));
    for (int i = 0; i < sorted.size(); i++) {
      Link link = sorted.get(i);
      int number = link.round().number();
      int before = i == 0 ? 0 : sorted.get(i - 1).round().number();
      if (number == before) {
        link.fields()
            .problem(
                "number",
                String.valueOf(number),
                "another round of this discipline has that number: number them 1, 2, 3 …");
      } else if (number > before + 1) {
        link.fields()
            .problem(
                "number",
                String.valueOf(number),
                "this discipline has no round number " + (number - 1) + ": leave no hole");
      }
      boolean nextContinues = i + 1 < sorted.size() && sorted.get(i + 1).round().continues();
      if (i + 1 < sorted.size() && !nextContinues) {
        link.fields()
            .missing(
                "advance",
                "say who goes on (count, percent or underSeconds): only the last round of a"
                    + " discipline and one that the next continues go without");
      }
    }
  }
}
