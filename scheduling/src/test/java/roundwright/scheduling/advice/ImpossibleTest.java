package roundwright.scheduling.advice;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertTrue;
import static org.junit.jupiter.params.provider.Arguments.arguments;

import java.util.EnumSet;
import java.util.List;
import java.util.Map;
import java.util.Set;
import java.util.function.UnaryOperator;
import java.util.stream.LongStream;
import java.util.stream.Stream;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.Arguments;
import org.junit.jupiter.params.provider.MethodSource;
import org.junit.jupiter.params.provider.ValueSource;
import roundwright.scheduling.Effort;
import roundwright.scheduling.Planner;
import roundwright.scheduling.Progress;
import roundwright.scheduling.RandomEvents;
import roundwright.scheduling.Scene;
import roundwright.scheduling.advice.Impossible.Kind;
import roundwright.scheduling.cost.Cost;
import roundwright.scheduling.cost.Finding;
import roundwright.scheduling.cost.Level;
import roundwright.scheduling.model.Event;
import roundwright.scheduling.model.Group;
import roundwright.scheduling.model.Plan;

/** What no plan can do is found from the event alone, and what a plan can do is never called so. */
class ImpossibleTest {
  private static final long STEPS = 2_000;

  /**
   * Ben solves cube3 and cube4, three people judge and run, di scrambles; everything is possible.
   */
  private static Scene possible() {
    return new Scene()
        .hall("main", 4)
        .open("09:00-18:00")
        .hall("side", 4)
        .open("09:00-18:00")
        .set("features", List.of("quiet"))
        .discipline("cube3")
        .discipline("cube4")
        .person("cy")
        .judges()
        .runs()
        .person("cyd")
        .judges()
        .runs()
        .person("cem")
        .judges()
        .runs()
        .person("di")
        .scrambles("cube3", "cube4")
        .person("ben")
        .enters("cube3", 20)
        .enters("cube4", 60)
        .round("cube3-a", "cube3", 1)
        .advance("percent", 100)
        .round("cube4-a", "cube4", 1)
        .advance("percent", 100);
  }

  private static Scene ada(Scene scene) {
    return scene.person("ada").enters("cube3", 30);
  }

  private static Arguments told(Kind kind, String name, String says, UnaryOperator<Scene> change) {
    return arguments(kind, name, says, change);
  }

  static Stream<Arguments> impossibleThings() {
    return Stream.of(ofTheDayPlan(), ofPeople(), ofCrewsAndPins()).flatMap(things -> things);
  }

  private static Stream<Arguments> ofTheDayPlan() {
    return Stream.of(
        told(
            Kind.NO_HALL,
            "a round that needs what no hall has",
            "No hall suits cube5 round 1, which needs a hall that is dark; let it be in another"
                + " hall or give one what it needs.",
            scene ->
                scene
                    .discipline("cube5")
                    .set("needs", List.of("dark"))
                    .round("cube5-a", "cube5", 1)
                    .person("eve")
                    .enters("cube5", 50)
                    .scrambles("cube5")
                    .person("fay")
                    .scrambles("cube5")),
        told(
            Kind.GROUPS_DO_NOT_FIT,
            "more groups than entrants",
            "cube3 round 2 is to have 3 groups and has 1 entrant; each group needs one, so ask for"
                + " at most 1.",
            scene -> scene.round("cube3-b", "cube3", 2).set("groups", 3)),
        told(
            Kind.NO_TIME,
            "a round whose limits leave no room for its slowest competitor",
            "cube4 round 2 needs 5 minutes at a stretch for its one group, and no hall that suits"
                + " it (main and side) is open so long from Sat 8 May 17:58; open one longer or"
                + " give the round another time or limit.",
            scene -> scene.round("cube4-b", "cube4", 2).set("notBefore", "2027-05-08T17:58")),
        told(
            Kind.ORDER_TOO_LONG,
            "a round that must be over before the one before it can be",
            "cube4 round 2 needs 5 minutes at a stretch and there is no such time: cube4 round 1"
                + " can be over by Sat 8 May 09:05 at the soonest; shorten a round, leave one out"
                + " or open a hall longer.",
            scene -> scene.round("cube4-b", "cube4", 2).set("notAfter", "2027-05-08T09:20")));
  }

  private static Stream<Arguments> ofPeople() {
    return Stream.of(
        told(
            Kind.NEVER_THERE,
            "somebody who comes after their round must be over",
            "ada cannot be in cube3 round 1 (5 minutes from Sat 8 May 09:00 to Sat 8 May 11:40) and"
                + " cube3 round 2 (5 minutes from Sat 8 May 09:20 to Sat 8 May 12:00): ada is there"
                + " Sat 8 May 13:00-15:00; change that, move the round's limits, or take the entry"
                + " out.",
            scene ->
                ada(scene)
                    .available("13:00-15:00")
                    .round("cube3-b", "cube3", 2)
                    .set("entrants", List.of("ada"))
                    .set("notAfter", "2027-05-08T12:00")),
        told(
            Kind.NEVER_TOGETHER,
            "a round of one group whose people are never there together",
            "cube5 round 1 is one group of 5 minutes, and ada and eve are never free for it"
                + " together; change somebody's times, take somebody out or allow more groups.",
            scene ->
                scene
                    .discipline("cube5")
                    .round("cube5-a", "cube5", 1)
                    .person("ada")
                    .enters("cube5", 30)
                    .available("09:00-10:00")
                    .person("eve")
                    .enters("cube5", 30)
                    .available("11:00-12:00")
                    .person("fay")
                    .scrambles("cube5")),
        told(
            Kind.SAME_TIME,
            "two rounds of one group each that can only be at one time",
            "ben is in both cube3 round 2 and cube4 round 2, which for them can only be at the same"
                + " time (from Sat 8 May 10:00 to Sat 8 May 10:08); give one of the rounds another"
                + " time, or take an entry out.",
            scene ->
                scene
                    .round("cube3-b", "cube3", 2)
                    .set("notBefore", "2027-05-08T10:00")
                    .set("notAfter", "2027-05-08T10:08")
                    .round("cube4-b", "cube4", 2)
                    .set("notBefore", "2027-05-08T10:00")
                    .set("notAfter", "2027-05-08T10:08")),
        told(
            Kind.TOO_MANY_ENTRIES,
            "somebody whose hours are too short for their rounds",
            "ada solves for at least 25 minutes in cube3 round 1, cube3 round 2, cube4 round 1,"
                + " cube4 round 2 and cube5 round 1, and has 12 in which these can be; take an"
                + " entry out or give the rounds more time.",
            scene ->
                ada(scene)
                    .enters("cube4", 40)
                    .enters("cube5", 40)
                    .available("12:00-12:12")
                    .discipline("cube5")
                    .person("fay")
                    .scrambles("cube5")
                    .round("cube5-a", "cube5", 1)
                    .round("cube3-a2", "cube3", 2)
                    .set("entrants", List.of("ada"))
                    .round("cube4-a2", "cube4", 2)
                    .set("entrants", List.of("ada"))));
  }

  private static Stream<Arguments> ofCrewsAndPins() {
    return Stream.of(
        told(
            Kind.TOO_FEW_SKILLED,
            "a discipline that nobody scrambles",
            "Nobody can scramble cube5, and a group of cube5 round 1 needs 1 at once; find 1 person"
                + " more who can, or teach somebody.",
            scene ->
                scene
                    .discipline("cube5")
                    .round("cube5-a", "cube5", 1)
                    .person("eve")
                    .enters("cube5", 50)),
        told(
            Kind.TOO_FEW_SKILLED,
            "a single group whose only scrambler solves in it",
            "Only eve can scramble cube5, and a group of cube5 round 1 needs 1 at once and has"
                + " nobody besides those who solve in it; find 1 person more who can, or teach"
                + " somebody.",
            scene ->
                scene
                    .discipline("cube5")
                    .round("cube5-a", "cube5", 1)
                    .person("eve")
                    .enters("cube5", 50)
                    .scrambles("cube5")),
        told(
            Kind.PINS_CONTRADICT,
            "two pins of one group to two halls",
            "Group 1 of cube3 round 1 is pinned to two halls; take one of the pins out.",
            scene ->
                scene
                    .pin("groups", "round", "cube3-a", "number", 1, "hall", "main")
                    .pin("groups", "round", "cube3-a", "number", 1, "hall", "side")),
        told(
            Kind.PINS_CONTRADICT,
            "a duty pinned to somebody who cannot do it",
            "cy is pinned to scramble cube3 in group 1 of cube3 round 1 and has not said they can;"
                + " take the pin out or ask them.",
            scene ->
                scene.pin(
                    "duties",
                    "person",
                    "cy",
                    "round",
                    "cube3-a",
                    "number",
                    1,
                    "role",
                    "scrambler")),
        told(
            Kind.PINS_CONTRADICT,
            "a start when the hall is closed",
            "Group 1 of cube3 round 1 is pinned to Sat 8 May 17:58, takes 5 minutes or more, and"
                + " main is not open so long then; pin it to another time.",
            scene ->
                scene.pin(
                    "groups",
                    "round",
                    "cube3-a",
                    "number",
                    1,
                    "hall",
                    "main",
                    "start",
                    "2027-05-08T17:58")));
  }

  @Test
  void nothingIsSaidOfAnEventThatCanBePlannedWithoutBreachOrGap() {
    Event event = possible().event();
    assertEquals(List.of(), Impossible.of(event));
    assertEquals(0, cost(event, 1).breaches());
    assertEquals(0, cost(event, 1).gaps());
  }

  @ParameterizedTest(name = "{1}")
  @MethodSource("impossibleThings")
  void namesWhatCannotBeDoneAndTheRemedy(
      Kind kind, String name, String says, UnaryOperator<Scene> change) {
    Event event = change.apply(possible()).event();
    List<Impossible> found = Impossible.of(event);
    assertTrue(
        found.stream().anyMatch(one -> one.kind() == kind && one.says().equals(says)),
        name + ": " + found);
    Cost cost = cost(event, 1);
    for (Impossible one : found) {
      assertPaid(one, cost, name);
    }
  }

  @Test
  void moreMinutesOfGroupsThanHallsAreOpenForAreTooMany() {
    Scene scene =
        new Scene().hall("main", 2).open("09:00-10:00").discipline("cube3").person("cy").judges();
    scene.person("cem").judges().runs().person("cyd").runs().scrambles("cube3");
    scene.person("di").scrambles("cube3").round("cube3-a", "cube3", 1).set("minutesPerGroup", 25);
    for (int i = 0; i < 7; i++) {
      scene.person("e" + i).enters("cube3", 20);
    }
    scene.rule("fill", 1).rule("stationsPerScrambler", 0).rule("stationsPerRunner", 0);
    scene.person("ed").judges();
    // 7 entrants on 2 stations are 4 groups of 25 minutes with 3 setups of 5 between them
    List<Impossible> found = Impossible.of(scene.event());
    assertEquals(List.of(Kind.HALLS_TOO_FULL), found.stream().map(Impossible::kind).toList());
    assertEquals(
        "cube3 round 1 needs at least 115 minutes of main, open for 60; open halls longer,"
            + " add stations, or take a round out.",
        found.get(0).says());
    assertPaid(found.get(0), cost(scene.event(), 1), "four groups");
  }

  @Test
  void moreJudgingThanTheJudgesMayDoADayIsTooMuch() {
    Scene scene = new Scene().hall("main", 2).open("09:00-18:00").discipline("cube3");
    scene.round("cube3-a", "cube3", 1).set("countedBy", "average-of-5");
    for (int i = 0; i < 12; i++) {
      scene.person("e" + i).enters("cube3", 75);
    }
    scene.person("cy").judges().set("maxDutyMinutesPerDay", 60);
    scene.person("di").judges().set("maxDutyMinutesPerDay", 65);
    for (String id : List.of("fay", "gil", "hal")) {
      scene.person(id).runs().scrambles("cube3");
    }
    // 12 x 5 x (75 + 45) seconds are 120 minutes; with a slack of 1.2, 144, on the grid 145
    List<Impossible> found = Impossible.of(scene.event());
    assertEquals(List.of(Kind.TOO_LITTLE_DUTY_TIME), found.stream().map(Impossible::kind).toList());
    assertEquals(
        "Judging takes at least 145 minutes of duty, and the 2 who can have 125, what they solve"
            + " and their most a day reckoned in; find more people, let them serve longer, or use"
            + " fewer stations or rounds.",
        found.get(0).says());
    assertPaid(found.get(0), cost(scene.event(), 1), "two judges");
    Event longer = scene.person("ed").judges().set("maxDutyMinutesPerDay", 20).event();
    assertEquals(List.of(), Impossible.of(longer));
  }

  static LongStream wildSeeds() {
    return LongStream.rangeClosed(1, 40);
  }

  @ParameterizedTest
  @MethodSource("wildSeeds")
  void whateverIsCalledImpossibleIsPaidForInThePlanThatIsFound(long seed) {
    Event event = RandomEvents.wild(seed).event();
    Plan plan = Planner.plan(event, Effort.ofSteps(STEPS).withSeed(seed), Progress.NONE);
    Map<String, String> roundOfGroup =
        plan.groups().stream().collect(java.util.stream.Collectors.toMap(Group::id, Group::round));
    for (Impossible one : Impossible.of(event)) {
      assertPaid(one, plan.score().orElseThrow(), "seed " + seed);
      assertTrue(
          plan.findings().stream().anyMatch(finding -> isAbout(finding, one, roundOfGroup)),
          "seed " + seed + ": no breach or gap is about " + one);
    }
  }

  /** A breach or gap that names the people or is about a group of the rounds, or a whole round. */
  private static boolean isAbout(
      Finding finding, Impossible one, Map<String, String> roundOfGroup) {
    Set<Level> paying =
        one.kind().leavesGaps() ? EnumSet.of(Level.BREACH, Level.GAP) : EnumSet.of(Level.BREACH);
    if (!paying.contains(finding.level())) {
      return false;
    }
    boolean names = finding.people().stream().anyMatch(one.people()::contains);
    boolean sameRound =
        finding.group().map(roundOfGroup::get).map(one.rounds()::contains).orElse(false);
    boolean ofTheEvent = one.people().isEmpty() && one.rounds().isEmpty();
    return ofTheEvent
        || names
        || sameRound
        || (finding.group().isEmpty() && finding.people().isEmpty());
  }

  @ParameterizedTest
  @ValueSource(longs = {3, 5, 7, 8})
  void nothingIsSaidOfBelievableEventsWithPeopleEnough(long seed) {
    Event event = RandomEvents.fair(seed, 220, 3, 2).event();
    assertEquals(List.of(), Impossible.of(event), "seed " + seed);
  }

  private static Cost cost(Event event, long seed) {
    return Planner.plan(event, Effort.ofSteps(STEPS).withSeed(seed), Progress.NONE)
        .score()
        .orElseThrow();
  }

  private static void assertPaid(Impossible one, Cost cost, String about) {
    long paid = cost.breaches() + (one.kind().leavesGaps() ? cost.gaps() : 0);
    assertTrue(one.atLeast() >= 1 && one.atLeast() <= paid, about + ": " + one + " but " + cost);
  }
}
