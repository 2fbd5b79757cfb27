package roundwright.scheduling.advice;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertFalse;
import static org.junit.jupiter.api.Assertions.assertThrows;
import static org.junit.jupiter.api.Assertions.assertTrue;

import java.math.BigDecimal;
import java.time.Duration;
import java.util.ArrayList;
import java.util.List;
import java.util.Optional;
import java.util.stream.LongStream;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.MethodSource;
import roundwright.scheduling.RandomEvents;
import roundwright.scheduling.RandomPlans;
import roundwright.scheduling.Scene;
import roundwright.scheduling.core.Dice;
import roundwright.scheduling.cost.Cost;
import roundwright.scheduling.cost.Level;
import roundwright.scheduling.model.Event;
import roundwright.scheduling.model.Group;
import roundwright.scheduling.model.Person;
import roundwright.scheduling.model.Role;

/** Plans by hand may be wrong in every way; advice on them is given all the same, and is sound. */
class AdviceOnBadPlansTest {
  private static final int QUESTIONS = 3;

  static LongStream seeds() {
    return LongStream.rangeClosed(1, 40);
  }

  private static Draft draft(long seed) {
    Event event = RandomEvents.wild(seed).event();
    return new Draft(event, RandomPlans.bad(event, seed));
  }

  @ParameterizedTest
  @MethodSource("seeds")
  void everybodyCanAskWhyAndDoWhatIsSaid(long seed) {
    Draft draft = draft(seed);
    for (Person person : draft.event().people()) {
      Why why = Why.of(draft, person.id());
      for (Why.Commitment commitment : why.commitments()) {
        assertFalse(commitment.says().isBlank(), "seed " + seed);
        commitment
            .alternative()
            .ifPresent(best -> assertFalse(best.change().madeTo(draft).plan().groups().isEmpty()));
      }
    }
  }

  @ParameterizedTest
  @MethodSource("seeds")
  void whatIsSaidToFillADutyFillsOne(long seed) {
    Draft draft = draft(seed);
    Cost before = draft.price();
    List<WhyNot.Duties> empty = WhyNot.empty(draft);
    for (WhyNot.Duties duties : empty.subList(0, Math.min(QUESTIONS, empty.size()))) {
      WhyNot answer = WhyNot.of(draft, duties.group(), duties.role());
      String about = "seed " + seed + ", " + answer.says();
      assertEquals(
          draft.event().people().size(),
          answer.counts().values().stream().mapToInt(Integer::intValue).sum(),
          about);
      for (WhyNot.Remedy remedy : answer.remedies()) {
        Cost after = remedy.change().madeTo(draft).price();
        assertTrue(after.breaches() <= before.breaches(), about + remedy);
        assertTrue(after.gaps() < before.gaps(), about + remedy);
      }
    }
  }

  @ParameterizedTest
  @MethodSource("seeds")
  void everyChangeByHandIsJudgedByWhatTheAuditorFinds(long seed) {
    Draft draft = draft(seed);
    for (Change change : changes(draft, new Dice(seed))) {
      WhatBreaks answer = WhatBreaks.of(draft, change);
      Cost before = draft.price();
      Cost after = change.madeTo(draft).price();
      String about = "seed " + seed + ", " + answer.says();
      assertEquals(after.breaches() - before.breaches(), answer.difference().breaches(), about);
      assertEquals(
          answer.difference().breaches(),
          sum(answer, Level.BREACH, true) - sum(answer, Level.BREACH, false),
          about);
      assertEquals(
          answer.difference().gaps(),
          sum(answer, Level.GAP, true) - sum(answer, Level.GAP, false),
          about);
    }
  }

  private static long sum(WhatBreaks answer, Level level, boolean comes) {
    return (comes ? answer.comes() : answer.goes())
        .stream()
            .filter(finding -> finding.level() == level)
            .map(finding -> finding.amount())
            .reduce(BigDecimal.ZERO, BigDecimal::add)
            .longValueExact();
  }

  /** One of each kind that can be made. */
  private static List<Change> changes(Draft draft, Dice dice) {
    List<Change> changes = new ArrayList<>();
    List<Group> groups = draft.plan().groups();
    if (groups.isEmpty()) {
      return changes;
    }
    Group group = groups.get(dice.below(groups.size()));
    Person person = draft.event().people().get(dice.below(draft.event().people().size()));
    changes.add(new Change.PutOnDuty(person.id(), group.id(), Role.RUNNER));
    changes.add(new Change.TakeOut(person.id()));
    changes.add(
        new Change.MoveGroup(
            group.id(), groups.get(0).hall(), group.start().plus(Duration.ofMinutes(35))));
    changes.add(new Change.Teach(person.id(), Role.JUDGE, ""));
    if (!group.crew().judges().isEmpty()) {
      changes.add(
          new Change.HandOver(group.crew().judges().get(0), person.id(), group.id(), Role.JUDGE));
    }
    for (Group other : groups) {
      if (other.round().equals(group.round()) && !other.id().equals(group.id())) {
        changes.add(
            new Change.SwapCompetitors(
                group.competitors().get(0), group.id(), other.competitors().get(0), other.id()));
      }
    }
    return changes;
  }

  @ParameterizedTest
  @MethodSource("seeds")
  void standInsRecruitsAndTheFewestPeopleAreFoundForAnyPlan(long seed) {
    Draft draft = draft(seed);
    for (Group group : draft.plan().groups()) {
      if (!group.crew().judges().isEmpty()) {
        String gone = group.crew().judges().get(0);
        for (StandIn one :
            StandIn.rank(draft, group.id(), Role.JUDGE, Optional.of(gone), group.start())) {
          one.change().madeTo(draft);
          assertFalse(one.told().isEmpty(), "seed " + seed);
        }
      }
    }
    FewestPeople fewest = FewestPeople.of(draft, seed, 2_000);
    assertTrue(fewest.people().size() >= fewest.atLeast(), "seed " + seed);
    for (Recruiting.Recruit recruit : Recruiting.of(draft).recruits()) {
      assertTrue(recruit.fills() > 0, "seed " + seed);
    }
  }

  @Test
  void aChangeThatCannotBeMadeIsRefusedByName() {
    Scene scene =
        new Scene()
            .hall("main", 2)
            .discipline("cube3")
            .round("a", "cube3", 1)
            .person("ada")
            .enters("cube3", 20)
            .group("g1", "a", 1, "main", "09:00-09:30")
            .solve("ada");
    Draft draft = new Draft(scene.event(), scene.plan());
    assertRefused(
        draft, new Change.TakeOffDuty("ada", "g1", Role.JUDGE), "ada is not listed there");
    assertRefused(
        draft, new Change.PutOnDuty("bob", "g1", Role.JUDGE), "The event has no person bob");
    assertRefused(draft, new Change.PutOnDuty("ada", "g2", Role.JUDGE), "The plan has no group g2");
    assertRefused(
        draft,
        new Change.MoveGroup("g1", "attic", draft.group("g1").start()),
        "The event has no hall attic");
  }

  private static void assertRefused(Draft draft, Change change, String says) {
    Exception refused = assertThrows(IllegalArgumentException.class, () -> change.madeTo(draft));
    assertEquals(says, refused.getMessage());
  }
}
