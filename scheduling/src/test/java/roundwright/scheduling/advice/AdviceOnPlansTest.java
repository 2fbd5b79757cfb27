package roundwright.scheduling.advice;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertTrue;

import java.math.BigDecimal;
import java.util.ArrayList;
import java.util.List;
import java.util.Map;
import java.util.Optional;
import java.util.TreeMap;
import java.util.stream.LongStream;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.MethodSource;
import roundwright.scheduling.Effort;
import roundwright.scheduling.Planner;
import roundwright.scheduling.Progress;
import roundwright.scheduling.RandomEvents;
import roundwright.scheduling.audit.Auditor;
import roundwright.scheduling.audit.Verdict;
import roundwright.scheduling.core.Dice;
import roundwright.scheduling.core.Problem;
import roundwright.scheduling.cost.Cost;
import roundwright.scheduling.cost.Level;
import roundwright.scheduling.cost.RuleName;
import roundwright.scheduling.crewing.Arrangement;
import roundwright.scheduling.crewing.Crewing;
import roundwright.scheduling.crewing.Standing;
import roundwright.scheduling.model.Event;
import roundwright.scheduling.model.Group;
import roundwright.scheduling.model.Plan;
import roundwright.scheduling.model.Role;
import roundwright.scheduling.rules.RuleBook;

/** Every answer about a plan is made, and the auditor is asked what came of it. */
class AdviceOnPlansTest {
  private static final BigDecimal TWENTIETH = new BigDecimal("0.05");
  private static final int QUESTIONS = 4;
  private static final Map<Long, Draft> DRAFTS = new TreeMap<>();

  static LongStream seeds() {
    return LongStream.rangeClosed(1, 14);
  }

  private static Event event(long seed) {
    return seed % 3 == 0
        ? RandomEvents.fair(seed, 40, 2, 1).event()
        : RandomEvents.wild(seed).event();
  }

  private static Plan plan(Event event, long seed) {
    return Planner.plan(event, Effort.ofSteps(600).withSeed(seed), Progress.NONE);
  }

  /** A plan as the engine leaves it after a short search, crews thinned out by hand. */
  private static Draft draft(long seed) {
    return DRAFTS.computeIfAbsent(seed, AdviceOnPlansTest::thinnedOut);
  }

  private static Draft thinnedOut(long seed) {
    Event event = event(seed);
    Plan plan = plan(event, seed);
    Draft draft = new Draft(event, plan);
    Dice dice = new Dice(seed);
    for (Group group : plan.groups()) {
      for (Role role : Role.values()) {
        List<String> crew = group.crew().in(role);
        boolean pinned =
            event.pins().duties().stream().anyMatch(pin -> pin.round().equals(group.round()));
        if (!crew.isEmpty() && !pinned && dice.below(3) == 0) {
          String gone = crew.get(dice.below(crew.size()));
          draft = new Change.TakeOffDuty(gone, group.id(), role).madeTo(draft);
        }
      }
    }
    return draft;
  }

  private static void assertClose(BigDecimal expected, BigDecimal actual, String about) {
    assertTrue(
        expected.subtract(actual).abs().compareTo(TWENTIETH) < 0,
        about + ": the auditor says " + expected + ", the advice " + actual);
  }

  private static void assertPriced(Draft before, Change change, Difference said, String about) {
    Difference made = Difference.between(before.price(), change.madeTo(before).price());
    assertEquals(made.breaches(), said.breaches(), about + " breaches of " + change);
    assertEquals(made.gaps(), said.gaps(), about + " gaps of " + change);
    assertClose(made.strain(), said.strain(), about + " strain of " + change);
  }

  @ParameterizedTest
  @MethodSource("seeds")
  void aPlanStandsOnTheBoardAtTheAuditorsPrice(long seed) {
    Draft draft = draft(seed);
    Standing standing = new Standing(draft.event(), draft.plan());
    Cost cost = draft.price();
    assertEquals(cost.breaches(), standing.ledger.hard() / RuleBook.BREACH, "seed " + seed);
    assertEquals(cost.gaps(), standing.ledger.hard() % RuleBook.BREACH, "seed " + seed);
    assertClose(cost.strain(), BigDecimal.valueOf(standing.ledger.strain(), 6), "seed " + seed);
  }

  @ParameterizedTest
  @MethodSource("seeds")
  void whatACommitmentCostsIsWhatThePlanSavesWithoutIt(long seed) {
    Draft draft = draft(seed);
    Dice dice = new Dice(seed + 1);
    Map<RuleName, BigDecimal> before = priced(draft.verdict());
    for (int question = 0; question < QUESTIONS / 2; question++) {
      String person = draft.event().people().get(dice.below(draft.event().people().size())).id();
      for (Why.Commitment commitment : Why.of(draft, person).commitments()) {
        String about = "seed " + seed + ", " + commitment;
        Draft without = without(draft, person, commitment);
        if (without.group(commitment.group()).competitors().isEmpty()) {
          continue;
        }
        Map<RuleName, BigDecimal> saved = new TreeMap<>(before);
        priced(without.verdict())
            .forEach((rule, price) -> saved.merge(rule, price.negate(), BigDecimal::add));
        saved.remove(RuleName.UNFILLED);
        saved.remove(RuleName.ENTRY_MISSING);
        saved.remove(RuleName.PIN_MOVED);
        commitment
            .byRule()
            .forEach((rule, price) -> saved.merge(rule, price.negate(), BigDecimal::add));
        saved.values().removeIf(left -> left.abs().compareTo(TWENTIETH) < 0);
        assertEquals(Map.of(), saved, about);
        commitment
            .alternative()
            .ifPresent(best -> assertPriced(draft, best.change(), best.difference(), about));
      }
    }
  }

  private static Draft without(Draft draft, String person, Why.Commitment commitment) {
    return commitment
        .role()
        .map(role -> new Change.TakeOffDuty(person, commitment.group(), role).madeTo(draft))
        .orElseGet(
            () ->
                draft.withCompetitors(
                    commitment.group(),
                    list -> {
                      list.remove(person);
                      return list;
                    }));
  }

  private static Map<RuleName, BigDecimal> priced(Verdict verdict) {
    Map<RuleName, BigDecimal> priced = new TreeMap<>(verdict.strains());
    verdict
        .amounts()
        .forEach(
            (rule, amount) -> {
              if (rule.level() == Level.BREACH || rule.level() == Level.GAP) {
                priced.put(rule, amount);
              }
            });
    return priced;
  }

  @ParameterizedTest
  @MethodSource("seeds")
  void anEmptyDutyIsFilledByEveryRemedyAndByNobodyWhereAShortageIsNamed(long seed) {
    Draft draft = draft(seed);
    Cost before = draft.price();
    List<WhyNot.Duties> empty = WhyNot.empty(draft);
    assertEquals(
        before.gaps(), empty.stream().mapToInt(WhyNot.Duties::wanted).sum(), "seed " + seed);
    for (WhyNot.Duties duties : empty.subList(0, Math.min(QUESTIONS, empty.size()))) {
      WhyNot answer = WhyNot.of(draft, duties.group(), duties.role());
      String about = "seed " + seed + ", " + answer;
      assertEquals(
          draft.event().people().size(),
          answer.counts().values().stream().mapToInt(Integer::intValue).sum(),
          about);
      assertEquals(duties.wanted(), answer.empty(), about);
      for (WhyNot.Remedy remedy : answer.remedies()) {
        assertPriced(draft, remedy.change(), remedy.difference(), about);
        assertTrue(remedy.difference().breaches() <= 0, about);
        assertTrue(remedy.difference().gaps() < 0, about);
      }
      if (answer.shortage().isPresent()) {
        assertShort(draft, answer.shortage().get(), about);
      } else {
        assertTrue(
            !answer.remedies().isEmpty(), about + ": nothing is short and nothing would help");
      }
    }
  }

  /** The duties named want more people than the auditor lets any of them have. */
  private static void assertShort(Draft draft, WhyNot.Shortage shortage, String about) {
    assertTrue(shortage.wanted() > shortage.people().size(), about);
    int pinned =
        (int)
            draft.event().pins().duties().stream()
                .filter(
                    pin ->
                        shortage.duties().stream()
                            .anyMatch(
                                duties -> draft.group(duties.group()).round().equals(pin.round())))
                .count();
    if (pinned > 0) {
      return;
    }
    Draft cleared = draft;
    List<Group> running = runningWith(draft, shortage);
    for (Group group : running) {
      for (Role role : Role.values()) {
        cleared = cleared.withCrew(group.id(), role, list -> new ArrayList<>());
      }
    }
    Auditor auditor = new Auditor(draft.event());
    for (var person : draft.event().people()) {
      boolean could = false;
      for (WhyNot.Duties duties : shortage.duties()) {
        Plan with =
            new Change.PutOnDuty(person.id(), duties.group(), duties.role()).madeTo(cleared).plan();
        could |= auditor.price(with).breaches() <= auditor.price(cleared.plan()).breaches();
      }
      if (could) {
        assertTrue(
            shortage.people().contains(person.id()),
            about + ": " + person.id() + " could have one of these duties too");
      }
    }
  }

  /** All groups at the moment named: whose crews an answer may change. */
  private static List<Group> runningWith(Draft draft, WhyNot.Shortage shortage) {
    return draft.plan().groups().stream()
        .filter(group -> !group.start().isAfter(shortage.at()))
        .filter(group -> group.end().isAfter(shortage.at()))
        .toList();
  }

  @ParameterizedTest
  @MethodSource("seeds")
  void aStandInCostsWhatIsSaidAndEverybodyWhoseDayChangesIsTold(long seed) {
    Draft draft = draft(seed);
    Dice dice = new Dice(seed + 2);
    List<Group> crewed =
        draft.plan().groups().stream()
            .filter(group -> !group.crew().judges().isEmpty())
            .filter(group -> isUnpinned(draft, group))
            .toList();
    for (int question = 0; question < QUESTIONS && !crewed.isEmpty(); question++) {
      Group group = crewed.get(dice.below(crewed.size()));
      String gone = group.crew().judges().get(0);
      List<StandIn> ranked =
          StandIn.rank(draft, group.id(), Role.JUDGE, Optional.of(gone), group.start());
      for (StandIn one : ranked.subList(0, Math.min(6, ranked.size()))) {
        String about = "seed " + seed + ", " + one;
        assertPriced(draft, one.change(), one.difference(), about);
        Plan made = one.change().madeTo(draft).plan();
        for (var person : draft.event().people()) {
          boolean changed = !crews(draft.plan(), person.id()).equals(crews(made, person.id()));
          boolean told = one.told().contains(person.id()) || person.id().equals(gone);
          assertEquals(changed, told && changed, about + ": " + person.id() + " is not told");
        }
      }
      for (int i = 1; i < ranked.size(); i++) {
        assertTrue(
            ranked.get(i - 1).difference().breaches() <= ranked.get(i).difference().breaches(),
            "seed " + seed);
      }
    }
  }

  private static boolean isUnpinned(Draft draft, Group group) {
    return draft.event().pins().duties().stream()
        .noneMatch(pin -> pin.round().equals(group.round()));
  }

  private static List<String> crews(Plan plan, String person) {
    List<String> found = new ArrayList<>();
    for (Group group : plan.groups()) {
      for (Role role : Role.values()) {
        if (group.crew().in(role).contains(person)) {
          found.add(group.id() + role);
        }
      }
    }
    return found;
  }

  @ParameterizedTest
  @MethodSource("seeds")
  void theEngineLeavesNoDutyEmptyThatOthersOfItsTimeCouldFill(long seed) {
    Event event = event(seed);
    Plan plan = plan(event, seed);
    for (WhyNot.Duties duties : WhyNot.empty(new Draft(event, plan))) {
      WhyNot answer = WhyNot.of(new Draft(event, plan), duties.group(), duties.role());
      assertTrue(answer.shortage().isPresent(), "seed " + seed + ", " + answer);
    }
  }

  @ParameterizedTest
  @MethodSource("seeds")
  void aRecruitFillsAsManyDutiesAsIsSaidWithoutANewBreach(long seed) {
    Draft draft = draft(seed);
    Cost before = draft.price();
    Recruiting answer = Recruiting.of(draft);
    assertTrue(answer.gaps() <= before.gaps(), "seed " + seed);
    for (Recruiting.Recruit recruit : answer.recruits()) {
      String about = "seed " + seed + ", " + recruit.says();
      Event with = draft.withOneMore(recruit.person()).event();
      Cost after = new Auditor(with).price(recruit.plan());
      assertEquals(answer.gaps() - recruit.fills(), after.gaps(), about);
      assertTrue(after.breaches() <= before.breaches(), about + ": " + after);
      Standing anew = new Standing(with, recruit.plan());
      Crewing crewing = Crewing.from(Arrangement.of(anew.ledger), anew.book, new Dice(seed));
      crewing.polish(() -> false);
      assertTrue(
          crewing.hard() % RuleBook.BREACH <= answer.gaps() - recruit.fills(),
          about + ": crewed anew " + crewing.hard() % RuleBook.BREACH + " gaps are left");
    }
    if (answer.gaps() > 0 && answer.recruits().isEmpty()) {
      assertTrue(
          WhyNot.empty(draft).stream()
              .allMatch(
                  duties ->
                      minutes(draft.group(duties.group()))
                          > roundwright.scheduling.model.Person.MAX_DUTY_MINUTES_PER_DAY),
          "seed " + seed + ": nobody would help");
    }
  }

  private static long minutes(Group group) {
    return java.time.Duration.between(group.start(), group.end()).toMinutes();
  }

  @ParameterizedTest
  @MethodSource("seeds")
  void theFewestPeopleCoverEveryDutyThatCanBeCovered(long seed) {
    Draft draft = draft(seed);
    Draft bare = draft;
    for (Group group : draft.plan().groups()) {
      for (Role role : Role.values()) {
        bare = bare.withCrew(group.id(), role, list -> new ArrayList<>());
      }
    }
    FewestPeople answer = FewestPeople.of(draft, seed, 20_000);
    Cost after = new Auditor(draft.event()).price(answer.plan());
    String about = "seed " + seed + ", " + answer.says();
    assertEquals(answer.uncovered(), after.gaps(), about);
    assertTrue(answer.people().size() >= answer.atLeast(), about);
    if (draft.event().pins().duties().isEmpty()) {
      assertEquals(bare.price().breaches(), after.breaches(), about);
      assertTrue(after.gaps() <= draft.price().gaps(), about);
    }
  }

  @ParameterizedTest
  @MethodSource("seeds")
  void whatBreaksIsWhatTheBoardFindsToo(long seed) {
    Draft draft = draft(seed);
    Dice dice = new Dice(seed + 3);
    Plan plan = draft.plan();
    if (plan.groups().isEmpty()) {
      return;
    }
    for (int question = 0; question < QUESTIONS; question++) {
      Group group = plan.groups().get(dice.below(plan.groups().size()));
      String person = draft.event().people().get(dice.below(draft.event().people().size())).id();
      Change change = new Change.PutOnDuty(person, group.id(), Role.JUDGE);
      WhatBreaks answer = WhatBreaks.of(draft, change);
      Draft made = change.madeTo(draft);
      Standing before = new Standing(draft.event(), draft.plan());
      Standing after = new Standing(made.event(), made.plan());
      Map<RuleName, BigDecimal> apart = new TreeMap<>(answer.byRule());
      subtract(apart, after.book.explain(after.board), BigDecimal.ONE.negate());
      subtract(apart, before.book.explain(before.board), BigDecimal.ONE);
      apart.values().removeIf(left -> left.abs().compareTo(TWENTIETH) < 0);
      assertEquals(Map.of(), apart, "seed " + seed + ", " + answer.says());
    }
  }

  private static void subtract(
      Map<RuleName, BigDecimal> from, Map<RuleName, Long> prices, BigDecimal times) {
    prices.forEach(
        (rule, price) -> {
          BigDecimal units =
              rule.level() == Level.STRAIN
                  ? BigDecimal.valueOf(price, 6)
                  : BigDecimal.valueOf(price);
          from.merge(rule, units.multiply(times), BigDecimal::add);
        });
  }

  @ParameterizedTest
  @MethodSource("seeds")
  void obstaclesCountEverybodyOnceForEveryDuty(long seed) {
    Draft draft = draft(seed);
    Standing standing = new Standing(draft.event(), draft.plan());
    Auditor auditor = new Auditor(draft.event());
    Dice dice = new Dice(seed + 4);
    for (int question = 0; question < QUESTIONS && standing.frame.groups > 0; question++) {
      int group = dice.below(standing.frame.groups);
      int person = dice.below(standing.problem.people);
      Obstacle obstacle = Obstacle.of(standing, person, group, Problem.role(Role.JUDGE));
      Plan with =
          new Change.PutOnDuty(standing.personId(person), standing.groupId(group), Role.JUDGE)
              .madeTo(draft)
              .plan();
      boolean breaks = auditor.price(with).breaches() > auditor.price(draft.plan()).breaches();
      assertEquals(
          breaks, obstacle != Obstacle.NONE, "seed " + seed + ", " + obstacle + " of " + with);
    }
  }
}
