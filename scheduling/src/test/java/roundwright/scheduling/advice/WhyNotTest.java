package roundwright.scheduling.advice;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertTrue;

import java.time.Instant;
import java.util.List;
import java.util.Map;
import java.util.Optional;
import org.junit.jupiter.api.Test;
import roundwright.scheduling.Scene;
import roundwright.scheduling.model.Role;

/** An empty duty at nine in the morning, and all that can be said about it. */
class WhyNotTest {
  private static final Map<String, Integer> FOUR_SCRAMBLERS =
      Map.of("judges", 0, "scramblers", 4, "runners", 0);
  private static final Map<String, Integer> NOBODY =
      Map.of("judges", 0, "scramblers", 0, "runners", 0);

  /**
   * At nine ada solves cube3 with four scramblers wanted: sam and sol scramble, sue comes at noon,
   * sid and sia solve cube4 in the side hall, whose second group is at ten with eve.
   */
  private static Scene nine() {
    return new Scene()
        .hall("main", 4)
        .open("09:00-12:00")
        .hall("side", 4)
        .open("09:00-12:00")
        .discipline("cube3")
        .discipline("cube4")
        .person("ada")
        .enters("cube3", 20)
        .person("eve")
        .enters("cube4", 20)
        .person("sam")
        .scrambles("cube3")
        .person("sia")
        .enters("cube4", 30)
        .scrambles("cube3")
        .person("sid")
        .enters("cube4", 40)
        .scrambles("cube3")
        .person("sol")
        .scrambles("cube3")
        .person("sue")
        .scrambles("cube3")
        .available("12:00-18:00")
        .round("a", "cube3", 1)
        .advance("percent", 100)
        .set("crew", FOUR_SCRAMBLERS)
        .round("b", "cube4", 1)
        .set("crew", NOBODY)
        .set("groups", 2)
        .group("g1", "a", 1, "main", "09:00-09:30")
        .solve("ada")
        .scramble("sam", "sol")
        .group("g2", "b", 1, "side", "09:00-09:30")
        .set("stations", 2)
        .solve("sid", "sia")
        .group("g3", "b", 2, "side", "10:00-10:30")
        .set("stations", 2)
        .solve("eve");
  }

  private static Draft draft(Scene scene) {
    return new Draft(scene.event(), scene.plan());
  }

  @Test
  void fourScramblersAreWantedAndTwoCanBeHad() {
    WhyNot answer = WhyNot.of(draft(nine()), "g1", Role.SCRAMBLER);
    assertEquals(2, answer.empty());
    assertEquals(
        Map.of(
            Obstacle.LACKS_THE_SKILL, 2,
            Obstacle.AWAY, 1,
            Obstacle.SOLVING, 2,
            Obstacle.ON_ANOTHER_DUTY, 2),
        answer.counts());
    WhyNot.Shortage shortage = answer.shortage().orElseThrow();
    assertEquals(List.of(new WhyNot.Duties("g1", Role.SCRAMBLER, 4)), shortage.duties());
    assertEquals(List.of("sam", "sol"), shortage.people());
    assertEquals(
        "The 4 scramblers of group 1 of cube3 round 1 (Sat 8 May 09:00-09:30) are 4 duties at Sat"
            + " 8 May 09:00, and only 2 free people can take them: 5 have the skill, 1 is away, 2 solve"
            + " at the time; that holds while those who solve and the duties of other times stay;"
            + " of 7 people, 2 lack the skill, 1 is away, 2 solve at the time, 2 are on other"
            + " duties.",
        answer.says());
  }

  @Test
  void theChangesThatWouldFillItAreNamed() {
    List<Change> remedies =
        WhyNot.of(draft(nine()), "g1", Role.SCRAMBLER).remedies().stream()
            .map(WhyNot.Remedy::change)
            .toList();
    Change put = new Change.PutOnDuty("sia", "g1", Role.SCRAMBLER);
    assertTrue(
        remedies.contains(
            new Change.Together(List.of(new Change.MoveCompetitor("sia", "g2", "g3"), put))),
        "sia solves at ten instead: " + remedies);
    assertTrue(
        remedies.contains(
            new Change.Together(
                List.of(
                    new Change.Teach("eve", Role.SCRAMBLER, "cube3"),
                    new Change.PutOnDuty("eve", "g1", Role.SCRAMBLER)))),
        "eve learns to scramble: " + remedies);
    assertTrue(
        remedies.contains(
            new Change.Together(
                List.of(
                    new Change.WidenPresence(
                        "sue",
                        Instant.parse("2027-05-08T09:00:00Z"),
                        Instant.parse("2027-05-08T09:30:00Z")),
                    new Change.PutOnDuty("sue", "g1", Role.SCRAMBLER)))),
        "sue comes earlier: " + remedies);
    assertTrue(
        remedies.stream()
            .anyMatch(
                change ->
                    change instanceof Change.Together together
                        && together.changes().get(0) instanceof Change.MoveGroup moved
                        && moved.group().equals("g1")),
        "the group is at another time: " + remedies);
  }

  @Test
  void aDutyThatOnlyAChainOfMovesFillsNamesTheChain() {
    // sam scrambles both and is where only kim could be too; tom can only take sam's duty
    Scene scene =
        new Scene()
            .hall("main", 4)
            .hall("side", 4)
            .discipline("cube3")
            .discipline("cube4")
            .person("ada")
            .enters("cube3", 20)
            .person("eve")
            .enters("cube4", 20)
            .person("sam")
            .scrambles("cube3", "cube4")
            .person("tom")
            .scrambles("cube4")
            .round("a", "cube3", 1)
            .set("crew", Map.of("judges", 0, "scramblers", 1, "runners", 0))
            .round("b", "cube4", 1)
            .set("crew", Map.of("judges", 0, "scramblers", 1, "runners", 0))
            .group("g1", "a", 1, "main", "09:00-09:30")
            .solve("ada")
            .group("g2", "b", 1, "side", "09:10-09:40")
            .solve("eve")
            .scramble("sam");
    WhyNot answer = WhyNot.of(draft(scene), "g1", Role.SCRAMBLER);
    assertEquals(Optional.empty(), answer.shortage());
    assertTrue(
        answer.remedies().stream()
            .anyMatch(
                remedy ->
                    remedy
                        .change()
                        .equals(
                            new Change.Together(
                                List.of(
                                    new Change.MoveDuty(
                                        "sam", "g2", Role.SCRAMBLER, "g1", Role.SCRAMBLER),
                                    new Change.PutOnDuty("tom", "g2", Role.SCRAMBLER))))),
        answer.toString());
  }

  @Test
  void theBestRecruitScramblesAtNine() {
    Recruiting answer = Recruiting.of(draft(nine()));
    assertEquals(2, answer.gaps());
    assertEquals(
        List.of(
            "One person more who can scramble cube3, Sat 8 May 09:00-09:30, would fill 1 of the"
                + " empty duties."),
        answer.recruits().stream().map(Recruiting.Recruit::says).toList());
  }

  @Test
  void aStandInLeavesALaterDutyToSomebodyFreeAndBothAreTold() {
    Scene scene =
        nine()
            .person("kim")
            .scrambles("cube3")
            .round("c", "cube3", 2)
            .set("entrants", List.of("ada"))
            .set("crew", Map.of("judges", 0, "scramblers", 1, "runners", 0))
            .group("g4", "c", 1, "main", "09:25-09:55")
            .solve("ada")
            .scramble("kim");
    scene.in("g3").at("11:00-11:30");
    List<StandIn> ranked =
        StandIn.rank(
            draft(scene),
            "g1",
            Role.SCRAMBLER,
            Optional.of("sam"),
            Instant.parse("2027-05-08T08:50:00Z"));
    assertEquals(List.of("kim"), ranked.stream().map(StandIn::person).toList());
    assertEquals(List.of("g4"), ranked.get(0).leaves());
    assertEquals(List.of("kim"), ranked.get(0).told());
    assertEquals(1, ranked.get(0).difference().gaps());
    List<StandIn> tooLate =
        StandIn.rank(
            draft(scene),
            "g1",
            Role.SCRAMBLER,
            Optional.of("sam"),
            Instant.parse("2027-05-08T09:26:00Z"));
    assertEquals(List.of(), tooLate);
  }

  @Test
  void whatAHandMadeChangeBreaksIsToldWithPeopleAndRules() {
    WhatBreaks answer =
        WhatBreaks.of(draft(nine()), new Change.PutOnDuty("sid", "g1", Role.SCRAMBLER));
    assertEquals(1, answer.difference().breaches());
    assertEquals(-1, answer.difference().gaps());
    assertTrue(
        answer
            .says()
            .startsWith(
                "Put sid on duty as scrambler of group 1 of cube3 round 1 (Sat 8 May 09:00-09:30): 1"
                    + " breach more, 1 gap fewer"),
        answer.says());
    assertEquals(
        List.of("two-places"),
        answer.comes().stream()
            .filter(finding -> finding.rule().level() == roundwright.scheduling.cost.Level.BREACH)
            .map(finding -> finding.rule().word())
            .toList());
    assertTrue(answer.comes().get(0).people().contains("sid"), answer.comes().toString());
  }

  @Test
  void takingSomebodyOutOfTheEventLeavesTheirDutiesEmpty() {
    WhatBreaks answer = WhatBreaks.of(draft(nine()), new Change.TakeOut("sam"));
    assertEquals(1, answer.difference().gaps());
    assertEquals(0, answer.difference().breaches());
  }
}
