package roundwright.scheduling.advice;

import java.util.Optional;
import java.util.function.Supplier;
import roundwright.scheduling.core.Board;
import roundwright.scheduling.core.Frame;
import roundwright.scheduling.core.Problem;
import roundwright.scheduling.crewing.Standing;
import roundwright.scheduling.model.Role;
import roundwright.scheduling.rules.Ledger;

/** Tries every other thing that one person could do instead of a commitment, and keeps the best. */
final class Alternatives {
  private final Standing standing;
  private final Ledger ledger;
  private final Board board;
  private final Frame frame;
  private final Problem problem;
  private final int person;
  private final String id;
  private long bestHard;
  private long bestStrain;
  private Optional<Supplier<Change>> best = Optional.empty();

  Alternatives(Standing standing, int person) {
    this.standing = standing;
    this.person = person;
    ledger = standing.ledger;
    board = standing.board;
    frame = standing.frame;
    problem = standing.problem;
    id = standing.personId(person);
  }

  private void begin() {
    best = Optional.empty();
  }

  /** Prices what was just done, takes it back, and remembers it if it is the best yet. */
  private void judge(Supplier<Change> change) {
    ledger.settle();
    long hard = ledger.hardChange();
    long strain = ledger.strainChange();
    ledger.undo();
    if (best.isEmpty() || hard < bestHard || (hard == bestHard && strain < bestStrain)) {
      bestHard = hard;
      bestStrain = strain;
      best = Optional.of(change);
    }
  }

  private Optional<Why.Alternative> found() {
    return best.map(
        change -> new Why.Alternative(change.get(), Difference.ofLedger(bestHard, bestStrain)));
  }

  /** Leave the duty, give it to somebody, or change it with somebody's. */
  Optional<Why.Alternative> toDuty(int place) {
    begin();
    int g = frame.placeGroup[place];
    Role role = Wording.role(frame.placeRole[place]);
    if (frame.placePin[place] == person) {
      return Optional.empty();
    }
    ledger.duty(place, -1);
    judge(() -> new Change.TakeOffDuty(id, standing.groupId(g), role));
    for (int other : frame.candidates[g * 3 + frame.placeRole[place]]) {
      if (other != person && board.couldTake(other, g)) {
        ledger.duty(place, other);
        judge(() -> new Change.HandOver(id, standing.personId(other), standing.groupId(g), role));
      }
    }
    for (int at = 0; at < frame.places; at++) {
      swap(place, at);
    }
    return found();
  }

  private void swap(int place, int at) {
    int other = board.placePerson[at];
    int there = frame.placeGroup[at];
    int here = frame.placeGroup[place];
    if (other < 0
        || other == person
        || here == there
        || frame.placePin[at] >= 0
        || !able(person, at)
        || !able(other, place)
        || !board.couldTakeBut(person, there, here)
        || !board.couldTakeBut(other, here, there)) {
      return;
    }
    ledger.duty(place, -1);
    ledger.duty(at, person);
    ledger.duty(place, other);
    judge(
        () ->
            new Change.SwapDuties(
                id,
                standing.groupId(here),
                Wording.role(frame.placeRole[place]),
                standing.personId(other),
                standing.groupId(there),
                Wording.role(frame.placeRole[at])));
  }

  private boolean able(int who, int place) {
    int g = frame.placeGroup[place];
    return frame.isFree(who, g) && problem.skilled(who, frame.round[g], frame.placeRole[place]);
  }

  /** Solve in another group, alone or changing with somebody. */
  Optional<Why.Alternative> toSeat(int seat) {
    begin();
    int from = board.seatGroup[seat];
    if (frame.seatPin[seat] == from) {
      return Optional.empty();
    }
    for (int to : frame.groupsOf[problem.seatRound[seat]]) {
      if (to == from) {
        continue;
      }
      if (board.size[from] > 1) {
        ledger.seat(seat, to);
        judge(() -> new Change.MoveCompetitor(id, standing.groupId(from), standing.groupId(to)));
      }
      int[] members = new int[board.size[to]];
      for (int i = 0; i < members.length; i++) {
        members[i] = board.member(to, i);
      }
      java.util.Arrays.sort(members);
      for (int other : members) {
        if (frame.seatPin[other] == to) {
          continue;
        }
        ledger.seat(seat, to);
        ledger.seat(other, from);
        String otherId = standing.personId(problem.seatPerson[other]);
        judge(
            () ->
                new Change.SwapCompetitors(
                    id, standing.groupId(from), otherId, standing.groupId(to)));
      }
    }
    return found();
  }
}
