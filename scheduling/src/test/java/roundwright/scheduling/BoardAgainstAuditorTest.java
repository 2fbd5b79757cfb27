package roundwright.scheduling;

import static org.junit.jupiter.api.Assertions.assertEquals;

import java.math.BigDecimal;
import java.time.Instant;
import java.util.ArrayList;
import java.util.List;
import java.util.Map;
import java.util.Optional;
import java.util.TreeMap;
import java.util.stream.LongStream;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.MethodSource;
import roundwright.scheduling.audit.Auditor;
import roundwright.scheduling.audit.Kept;
import roundwright.scheduling.audit.Verdict;
import roundwright.scheduling.core.Board;
import roundwright.scheduling.core.Dice;
import roundwright.scheduling.core.Frame;
import roundwright.scheduling.core.KeptDays;
import roundwright.scheduling.core.LocalClock;
import roundwright.scheduling.core.Problem;
import roundwright.scheduling.core.Slot;
import roundwright.scheduling.cost.Level;
import roundwright.scheduling.cost.RuleName;
import roundwright.scheduling.crewing.Arrangement;
import roundwright.scheduling.model.Event;
import roundwright.scheduling.model.Plan;
import roundwright.scheduling.rules.Ledger;
import roundwright.scheduling.rules.RuleBook;

/** The engine's running price of a board against the auditor's reading of the same plan. */
class BoardAgainstAuditorTest {
  private static final int MOVES = 3_000;
  private static final BigDecimal TWENTIETH = new BigDecimal("0.05");

  static LongStream seeds() {
    return LongStream.rangeClosed(1, 120);
  }

  @ParameterizedTest
  @MethodSource("seeds")
  void theBoardPricesEveryRuleLikeTheAuditorAfterThousandsOfMoves(long seed) {
    Event event =
        seed % 4 == 0 ? RandomEvents.fair(seed, 60, 2, 2).event() : RandomEvents.wild(seed).event();
    Problem problem = new Problem(event);
    Dice dice = new Dice(seed);
    Frame frame = new Frame(problem, slotsByChance(problem, dice));
    if (frame.groups == 0) {
      return;
    }
    Optional<Kept> kept =
        seed % 2 == 0 ? Optional.empty() : Optional.of(keptByChance(event, frame, dice));
    RuleBook book =
        kept.map(one -> new RuleBook(problem, new KeptDays(problem, one.plan(), one.at())))
            .orElseGet(() -> new RuleBook(problem));
    Ledger ledger = new Ledger(seatedByChance(frame, dice), book);
    for (int move = 0; move < MOVES; move++) {
      play(ledger, dice);
      ledger.settle();
      if (dice.below(3) == 0) {
        ledger.undo();
      } else {
        ledger.keep();
      }
    }
    String about = "seed " + seed;
    long hard = ledger.hard();
    long strain = ledger.strain();
    ledger.reprice();
    assertEquals(hard, ledger.hard(), about);
    assertEquals(strain, ledger.strain(), about);

    Plan plan = Written.plan(Arrangement.of(ledger));
    Auditor auditor = new Auditor(event);
    Verdict verdict =
        kept.map(one -> auditor.audit(plan, one)).orElseGet(() -> auditor.audit(plan));
    Map<RuleName, BigDecimal> apart = new TreeMap<>(priced(verdict));
    book.explain(ledger.board)
        .forEach((rule, price) -> apart.merge(rule, units(rule, price).negate(), BigDecimal::add));
    apart.values().removeIf(difference -> difference.abs().compareTo(TWENTIETH) < 0);
    assertEquals(Map.of(), apart, about + ": the auditor's figures less the board's");
    assertEquals(verdict.cost().breaches(), hard / RuleBook.BREACH, about);
    assertEquals(verdict.cost().gaps(), hard % RuleBook.BREACH, about);
    BigDecimal inAll = verdict.cost().strain().subtract(BigDecimal.valueOf(strain, 6)).abs();
    assertEquals(-1, inAll.compareTo(TWENTIETH), about + ": strain is " + inAll + " apart");
  }

  /** What people might have been told: another arrangement of the same day, disturbed or not. */
  private static Kept keptByChance(Event event, Frame frame, Dice dice) {
    Ledger told = new Ledger(seatedByChance(frame, dice), new RuleBook(frame.problem));
    Plan plan = Written.plan(Arrangement.of(told));
    Plan disturbed = RandomPlans.disturbed(plan, event, dice.below(1_000_000));
    Instant noon = LocalClock.instant(frame.start[frame.groups / 2]);
    return new Kept(
        dice.below(4) == 0 ? plan : disturbed,
        dice.below(2) == 0 ? Optional.empty() : Optional.of(noon));
  }

  /** Groups anywhere near the halls' times, overlapping, off the grid and out of order. */
  private static List<Slot> slotsByChance(Problem problem, Dice dice) {
    List<Slot> slots = new ArrayList<>();
    for (int r = 0; r < problem.rounds; r++) {
      int groups = Math.min(problem.entrants(r), 1 + dice.below(4));
      for (int number = 1; number <= groups; number++) {
        int hall = dice.below(problem.halls);
        int opening = LocalClock.epochMinute(problem.hallList.get(hall).open().get(0).from());
        int start = opening + dice.below(700) - 60;
        start -= dice.below(4) == 0 ? 0 : Math.floorMod(start, 5);
        int stations = 1 + dice.below(problem.hallStations[hall] + 1);
        slots.add(new Slot(r, number, hall, stations, start, start + 10 + dice.below(60)));
      }
    }
    return slots;
  }

  private static Board seatedByChance(Frame frame, Dice dice) {
    Board board = new Board(frame);
    for (int seat = 0; seat < frame.problem.seats; seat++) {
      int[] groups = frame.groupsOf[frame.problem.seatRound[seat]];
      int first = seat - frame.problem.seatStart[frame.problem.seatRound[seat]];
      int group = first < groups.length ? groups[first] : groups[dice.below(groups.length)];
      board.seat(seat, frame.seatPin[seat] >= 0 ? frame.seatPin[seat] : group);
    }
    for (int g = 0; g < frame.groups; g++) {
      fillIfEmpty(board, g);
    }
    for (int place = 0; place < frame.places; place++) {
      board.duty(
          place,
          frame.placePin[place] >= 0 ? frame.placePin[place] : dice.below(frame.problem.people));
    }
    return board;
  }

  /** A plan has no group without competitors, so one that the pins left empty borrows somebody. */
  private static void fillIfEmpty(Board board, int group) {
    int round = board.frame.round[group];
    for (int seat = board.problem.seatStart[round];
        board.size[group] == 0 && seat < board.problem.seatStart[round + 1];
        seat++) {
      if (board.frame.seatPin[seat] < 0 && board.size[board.seatGroup[seat]] > 1) {
        board.seat(seat, group);
      }
    }
  }

  private static void play(Ledger ledger, Dice dice) {
    Frame frame = ledger.frame;
    for (int change = 1 + dice.below(3); change > 0; change--) {
      if (frame.places > 0 && dice.below(2) == 0) {
        int place = dice.below(frame.places);
        if (frame.placePin[place] < 0) {
          ledger.duty(
              place,
              dice.below(frame.problem.people + 20) - 20 < 0
                  ? -1
                  : dice.below(frame.problem.people));
        }
      } else {
        int seat = dice.below(frame.problem.seats);
        int[] groups = frame.groupsOf[frame.problem.seatRound[seat]];
        int to = groups[dice.below(groups.length)];
        if (frame.seatPin[seat] < 0 && ledger.board.size[ledger.board.seatGroup[seat]] > 1) {
          ledger.seat(seat, to);
        }
      }
    }
  }

  private static Map<RuleName, BigDecimal> priced(Verdict verdict) {
    Map<RuleName, BigDecimal> found = new TreeMap<>(verdict.amounts());
    found.keySet().removeIf(rule -> rule.level() == Level.NOTICE);
    found.putAll(verdict.strains());
    return found;
  }

  private static BigDecimal units(RuleName rule, long price) {
    return rule.level() == Level.STRAIN ? BigDecimal.valueOf(price, 6) : BigDecimal.valueOf(price);
  }
}
