package roundwright.scheduling.repair;

import java.time.Instant;
import java.time.ZoneId;
import java.util.ArrayList;
import java.util.Collections;
import java.util.HashMap;
import java.util.List;
import java.util.Map;
import java.util.Optional;
import java.util.stream.IntStream;
import roundwright.scheduling.core.Board;
import roundwright.scheduling.core.Dice;
import roundwright.scheduling.core.GroupRow;
import roundwright.scheduling.core.KeptDays;
import roundwright.scheduling.core.LocalClock;
import roundwright.scheduling.core.Problem;
import roundwright.scheduling.core.Slot;
import roundwright.scheduling.crewing.Arrangement;
import roundwright.scheduling.crewing.Crewing;
import roundwright.scheduling.crewing.Halt;
import roundwright.scheduling.model.Event;
import roundwright.scheduling.model.Group;
import roundwright.scheduling.model.Plan;
import roundwright.scheduling.model.Venue;
import roundwright.scheduling.rules.Ledger;
import roundwright.scheduling.rules.RuleBook;

/**
 * The repair of a kept plan for an event that has changed: the day plan laid out anew with each
 * group where it stood if it can be and a search for those that cannot, everybody carried over, and
 * what is then broken or empty mended with the fewest changes: first exactly, moment by moment, and
 * by search only where that leaves something to mend. One use each; not thread-safe.
 */
public final class Mending {
  /** Changes before comfort: one outweighs what a day can gain in any other rule. */
  private static final int CHANGES_FIRST = 50;

  private static final long SEARCH_MOVES_PER_PLACE = 200;
  private static final int MOST_SEARCHES = 3;

  private final Event event;
  private final Plan kept;
  private final Scope scope;
  private final Problem problem;
  private final KeptDays days;
  private final RuleBook book;
  private final long seed;
  private final Halt halt;

  /**
   * @param event as it now is
   * @param at what starts before this moment stays as it is
   * @param seed of all chance
   * @param halt ends the search with what it has
   */
  public Mending(Event event, Plan kept, Optional<Instant> at, Scope scope, long seed, Halt halt) {
    this.event = event;
    this.kept = kept;
    this.scope = scope;
    this.seed = seed;
    this.halt = halt;
    problem = new Problem(event);
    days = new KeptDays(problem, kept, at);
    book = new RuleBook(problem, days, CHANGES_FIRST);
  }

  /** The repaired plan as an arrangement over its day plan. */
  public Arrangement mended() {
    if (scope.depth() == Scope.Depth.CREWS) {
      return mended(asItStood());
    }
    Arrangement moved = mended(relocated(standees()));
    if (moved.hard > 0 && !halt.now()) {
      Optional<List<Standee>> longer = longer(moved.board());
      if (longer.isPresent()) {
        moved = Collections.min(List.of(moved, mended(relocated(longer.get()))));
      }
    }
    return moved.hard == 0 || halt.now()
        ? moved
        : Collections.min(List.of(moved, mended(asItStood())));
  }

  /** The kept groups with slots as long as those who are now in them need; empty if all have. */
  private Optional<List<Standee>> longer(Board board) {
    Map<Long, Integer> needed = new HashMap<>();
    GroupRow row = new GroupRow();
    for (int g = 0; g < board.frame.groups; g++) {
      row.load(board, g);
      int least = row.leastMinutes();
      if (!board.frame.frozen[g] && least > board.frame.end[g] - board.frame.start[g]) {
        needed.put(key(board.frame.round[g], board.frame.number[g]), least);
      }
    }
    List<Standee> standees = new ArrayList<>(standees());
    standees.replaceAll(
        one -> {
          Integer minutes = needed.get(key(one.slot().round(), one.slot().number()));
          return minutes == null ? one : one.lasting(minutes);
        });
    return needed.isEmpty() ? Optional.empty() : Optional.of(standees);
  }

  private static long key(int round, int number) {
    return (long) round << 32 | number;
  }

  /** Moving may break more than staying: the one layout that is never worse than what was kept. */
  private List<Standee> asItStood() {
    return new Shifting(problem, Shifting.Way.STAY, days.pastBefore).lay(standees());
  }

  private List<Standee> relocated(List<Standee> standees) {
    Shifting shifting = new Shifting(problem, Shifting.Way.MAKE_ROOM, days.pastBefore);
    List<Standee> laid = shifting.lay(standees);
    boolean[] free = new boolean[laid.size()];
    for (int g = 0; g < free.length; g++) {
      free[g] = shifting.mayMove(laid.get(g));
    }
    return new Relocating(problem, laid, free, days.pastBefore, seed, halt).found();
  }

  /** At least so much changes in any plan without breaches that fills as many duties. */
  public LeastChange leastChange(Arrangement arrangement) {
    return LeastChange.of(arrangement.board(), days);
  }

  private Arrangement mended(List<Standee> laid) {
    List<Standee> peopled = withoutEmpty(laid);
    Board board = new Carrying(problem, peopled).board(scope.depth());
    Dice dice = new Dice(seed);
    Crewing crewing = Crewing.from(Arrangement.of(new Ledger(board, book)), book, dice);
    crewing.mend(halt);
    for (int search = 0; search < MOST_SEARCHES && crewing.hard() > 0 && !halt.now(); search++) {
      long hard = crewing.hard();
      crewing.anneal(budget(board.frame.places), (h, s, m) -> {});
      crewing.mend(halt);
      if (crewing.hard() >= hard) {
        break;
      }
    }
    return crewing.arrangement();
  }

  private Crewing.Budget budget(int places) {
    double most = SEARCH_MOVES_PER_PLACE * Math.max(1, places);
    return new Crewing.Budget() {
      @Override
      public double used(long moves) {
        return halt.now() ? 1 : moves / most;
      }

      @Override
      public double likelyMoves() {
        return most;
      }
    };
  }

  private List<Standee> standees() {
    Map<String, Integer> rounds = new HashMap<>();
    problem.roundList.forEach(round -> rounds.put(round.id(), rounds.size()));
    Map<String, Integer> halls = new HashMap<>();
    problem.hallList.forEach(hall -> halls.put(hall.id(), halls.size()));
    List<Standee> standees = new ArrayList<>();
    for (Group group : kept.groups()) {
      Integer round = rounds.get(group.round());
      int start = LocalClock.epochMinute(group.start());
      if (round == null || (problem.entrants(round) == 0 && start >= days.pastBefore)) {
        continue;
      }
      int hall = halls.getOrDefault(group.hall(), -1);
      Slot slot =
          new Slot(
              round,
              group.number(),
              hall,
              group.stations(),
              start,
              LocalClock.epochMinute(group.end()));
      boolean frozen =
          hall >= 0 && (start < days.pastBefore || !scope.holds(group, zone(group.hall())));
      standees.add(new Standee(Optional.of(group), slot, frozen));
    }
    return standees;
  }

  private ZoneId zone(String hall) {
    return event.venues().stream()
        .filter(venue -> venue.halls().stream().anyMatch(one -> one.id().equals(hall)))
        .findFirst()
        .map(Venue::zone)
        .orElse(event.zone());
  }

  /** No group that is still to come and has lost everybody, where the others have the room. */
  private List<Standee> withoutEmpty(List<Standee> laid) {
    List<Standee> left = new ArrayList<>(laid);
    for (int round = 0; round < problem.rounds; round++) {
      int wanted = round;
      List<Standee> own =
          new ArrayList<>(left.stream().filter(one -> one.slot().round() == wanted).toList());
      List<Standee> lost = own.stream().filter(this::hasLostEverybody).toList();
      int room =
          own.stream().mapToInt(one -> problem.largestSize(wanted, one.slot().stations())).sum();
      for (Standee one : lost) {
        int held = problem.largestSize(round, one.slot().stations());
        if (own.size() > 1 && room - held >= problem.entrants(round)) {
          room -= held;
          own.remove(one);
          left.remove(one);
        }
      }
    }
    return left;
  }

  private boolean hasLostEverybody(Standee one) {
    return one.kept().isPresent()
        && one.slot().start() >= days.pastBefore
        && one.kept().get().competitors().stream()
            .noneMatch(
                id ->
                    IntStream.of(seats(one.slot().round()))
                        .anyMatch(seat -> personId(seat).equals(id)));
  }

  private int[] seats(int round) {
    return IntStream.range(problem.seatStart[round], problem.seatStart[round + 1]).toArray();
  }

  private String personId(int seat) {
    return problem.personList.get(problem.seatPerson[seat]).id();
  }
}
