package roundwright.scheduling.advice;

import java.util.ArrayList;
import java.util.Comparator;
import java.util.List;
import roundwright.scheduling.core.Board;
import roundwright.scheduling.core.Frame;
import roundwright.scheduling.core.LocalClock;
import roundwright.scheduling.core.Problem;
import roundwright.scheduling.cost.Cost;
import roundwright.scheduling.crewing.Standing;
import roundwright.scheduling.model.Group;
import roundwright.scheduling.model.Role;
import roundwright.scheduling.rules.Ledger;

/**
 * Single changes that would fill one empty duty: guessed cheaply on the board, then made for good
 * and priced by the auditor; what adds a breach or fills no gap is left out.
 */
final class Remedies {
  private static final int MOST_OF_A_KIND = 3;
  private static final int MOST_STARTS = 10;

  private final Draft draft;
  private final Standing standing;
  private final Board board;
  private final Frame frame;
  private final Problem problem;
  private final Ledger ledger;
  private final int group;
  private final int role;
  private final String groupId;
  private final Role duty;
  private final Cost before;
  private final List<WhyNot.Remedy> found = new ArrayList<>();

  Remedies(Draft draft, Standing standing, int group, int role) {
    this.draft = draft;
    this.standing = standing;
    this.group = group;
    this.role = role;
    board = standing.board;
    frame = standing.frame;
    problem = standing.problem;
    ledger = standing.ledger;
    groupId = standing.groupId(group);
    duty = Wording.role(role);
    before = draft.price();
  }

  boolean isEmpty() {
    return found.isEmpty();
  }

  /** Makes a change, prices it, and keeps it where it does what it is for. */
  boolean add(Change change) {
    Difference difference = Difference.between(before, change.madeTo(draft).price());
    boolean helps = difference.breaches() <= 0 && difference.gaps() < 0;
    if (helps && found.stream().noneMatch(known -> known.change().equals(change))) {
      String order = change.says(draft);
      found.add(
          new WhyNot.Remedy(
              change,
              difference,
              Character.toUpperCase(order.charAt(0))
                  + order.substring(1)
                  + ": "
                  + difference.says()
                  + "."));
    }
    return helps;
  }

  List<WhyNot.Remedy> best() {
    List<WhyNot.Remedy> best = new ArrayList<>(found);
    best.sort(Comparator.comparing(WhyNot.Remedy::difference));
    return best;
  }

  /** A guess with what it is likely to cost; less is better. */
  private record Guess(Change change, long price) {}

  private void addBest(List<Guess> guesses) {
    guesses.sort(Comparator.comparingLong(Guess::price));
    int kept = 0;
    for (int i = 0; i < guesses.size() && i < 2 * MOST_OF_A_KIND && kept < MOST_OF_A_KIND; i++) {
      kept += add(guesses.get(i).change) ? 1 : 0;
    }
  }

  private Change.PutOnDuty put(int person) {
    return new Change.PutOnDuty(standing.personId(person), groupId, duty);
  }

  /** Those who could simply take the duty, for least strain. */
  void whoIsFree() {
    List<Guess> free = new ArrayList<>();
    for (int p : frame.candidates[group * 3 + role]) {
      if (Obstacle.of(standing, p, group, role) == Obstacle.NONE) {
        free.add(new Guess(put(p), strainWith(p)));
      }
    }
    addBest(free);
  }

  /** All kinds but those that only move duties of the time. */
  void beyondDuties() {
    addBest(competitorsElsewhere());
    List<Guess> taught = new ArrayList<>();
    List<Guess> asked = new ArrayList<>();
    List<Guess> longer = new ArrayList<>();
    for (int p = 0; p < problem.people; p++) {
      switch (Obstacle.of(standing, p, group, role)) {
        case LACKS_THE_SKILL -> taught(p, taught);
        case AWAY -> asked(p, asked);
        case OVER_DAILY_MINUTES -> longer(p, longer);
        default -> {}
      }
    }
    addBest(taught);
    addBest(asked);
    addBest(longer);
    groupElsewhere();
  }

  private void taught(int p, List<Guess> guesses) {
    int minutes = frame.end[group] - frame.start[group];
    if (frame.isFree(p, group)
        && board.couldTake(p, group)
        && Obstacle.dutyMinutes(standing, p, frame.date[group]) + minutes
            <= problem.maxDutyMinutes[p]) {
      String discipline = problem.roundList.get(frame.round[group]).discipline();
      guesses.add(
          new Guess(
              new Change.Together(
                  List.of(new Change.Teach(standing.personId(p), duty, discipline), put(p))),
              strainWith(p)));
    }
  }

  private long strainWith(int p) {
    long change = ledger.priceWith(p, group << 2 | role) - ledger.priceNow(p);
    long breaches = Math.floorDiv(change + Ledger.BREACH_IN_TRIALS / 2, Ledger.BREACH_IN_TRIALS);
    return change - breaches * Ledger.BREACH_IN_TRIALS;
  }

  private void asked(int p, List<Guess> guesses) {
    int start = frame.start[group];
    int end = frame.end[group];
    if (problem.busy(p, start, end) || !board.couldTake(p, group)) {
      return;
    }
    int missing = end - start;
    for (int w = 0; w < problem.presentFrom[p].length; w++) {
      int early = Math.max(0, problem.presentFrom[p][w] - start);
      int late = Math.max(0, end - problem.presentTo[p][w]);
      missing = Math.min(missing, early + late);
    }
    Change widen =
        new Change.WidenPresence(
            standing.personId(p), LocalClock.instant(start), LocalClock.instant(end));
    guesses.add(new Guess(new Change.Together(List.of(widen, put(p))), missing));
  }

  private void longer(int p, List<Guess> guesses) {
    int minutes =
        Obstacle.dutyMinutes(standing, p, frame.date[group])
            + frame.end[group]
            - frame.start[group];
    guesses.add(
        new Guess(
            new Change.Together(
                List.of(new Change.RaiseDutyMinutes(standing.personId(p), minutes), put(p))),
            minutes - problem.maxDutyMinutes[p]));
  }

  /** Somebody with the skill solves at the time: in another group they would be free. */
  private List<Guess> competitorsElsewhere() {
    List<Guess> guesses = new ArrayList<>();
    int place = standing.emptyPlace(group, role);
    for (int p : frame.candidates[group * 3 + role]) {
      int seat = onlySeatInTheWay(p);
      if (place < 0 || seat < 0 || frame.seatPin[seat] >= 0) {
        continue;
      }
      int from = board.seatGroup[seat];
      for (int to : frame.groupsOf[problem.seatRound[seat]]) {
        if (to == from || frame.conflict(to, group)) {
          continue;
        }
        ledger.seat(seat, to);
        ledger.duty(place, p);
        guess(new Change.MoveCompetitor(id(p), groupId(from), groupId(to)), p, guesses);
        for (int i = 0; i < board.size[to]; i++) {
          int other = board.member(to, i);
          if (frame.seatPin[other] < 0 && problem.seatPerson[other] != p) {
            swap(seat, other, place, p, guesses);
          }
        }
      }
    }
    return guesses;
  }

  private void swap(int seat, int other, int place, int p, List<Guess> guesses) {
    int from = board.seatGroup[seat];
    int to = board.seatGroup[other];
    ledger.seat(seat, to);
    ledger.seat(other, from);
    ledger.duty(place, p);
    guess(
        new Change.SwapCompetitors(
            id(p), groupId(from), id(problem.seatPerson[other]), groupId(to)),
        p,
        guesses);
  }

  private void guess(Change move, int p, List<Guess> guesses) {
    ledger.settle();
    if (Difference.ofLedger(ledger.hardChange(), 0).breaches() <= 0 && ledger.hardChange() < 0) {
      guesses.add(new Guess(new Change.Together(List.of(move, put(p))), ledger.strainChange()));
    }
    ledger.undo();
  }

  private String id(int person) {
    return standing.personId(person);
  }

  private String groupId(int g) {
    return standing.groupId(g);
  }

  /** The seat that alone keeps somebody from the group, or -1. */
  private int onlySeatInTheWay(int p) {
    int found = -1;
    for (int i = 0; i < board.commitmentCount(p); i++) {
      int commitment = board.commitment(p, i);
      if (frame.conflict(commitment >> 2, group)) {
        int seat = problem.seatOf(p, frame.round[commitment >> 2]);
        boolean solving = (commitment & 3) == Problem.SOLVING;
        if (!solving || found >= 0 || seat < 0 || board.seatGroup[seat] != commitment >> 2) {
          return -1;
        }
        found = seat;
      }
    }
    return found;
  }

  /** The group at another start or in another hall, with somebody for the duty there. */
  private void groupElsewhere() {
    Group own = standing.groups.get(group);
    List<Change.MoveGroup> places = new OtherPlaces(standing, group).nearest(MOST_STARTS);
    int kept = 0;
    for (Change.MoveGroup place : places) {
      Draft moved = place.madeTo(draft);
      if (kept == MOST_OF_A_KIND || moved.price().breaches() > before.breaches()) {
        continue;
      }
      Standing there = new Standing(moved.event(), moved.plan());
      int g = there.group(own.id());
      for (Moment moment : Moment.of(there, g)) {
        Moment.Outcome outcome = moment.fill(moment.columnOf(g, role));
        if (!outcome.path().isEmpty()) {
          kept += add(new Change.Together(List.of(place, moment.change(outcome.path())))) ? 1 : 0;
          break;
        }
      }
    }
  }
}
