package roundwright.scheduling.advice;

import java.time.Instant;
import java.util.ArrayList;
import java.util.Comparator;
import java.util.List;
import java.util.Optional;
import java.util.stream.Collectors;
import roundwright.scheduling.core.Board;
import roundwright.scheduling.core.Frame;
import roundwright.scheduling.core.LocalClock;
import roundwright.scheduling.core.Problem;
import roundwright.scheduling.crewing.Standing;
import roundwright.scheduling.model.Role;

/**
 * Somebody who could take a duty at a given moment of the day, with all that follows from it.
 *
 * @param person id
 * @param change puts them on the duty, and others on what they leave where somebody is free
 * @param leaves ids of the groups whose duty they leave, later in the day
 * @param told ids of all who must be told, in the order in which to tell them
 * @param difference of the plan's price
 * @param says one sentence
 */
public record StandIn(
    String person,
    Change change,
    List<String> leaves,
    List<String> told,
    Difference difference,
    String says) {
  private static final Comparator<StandIn> BEST_FIRST =
      Comparator.comparingLong((StandIn one) -> one.difference.breaches())
          .thenComparingLong(one -> one.difference.gaps())
          .thenComparingInt(one -> one.told.size())
          .thenComparing(one -> one.difference.strain())
          .thenComparing(StandIn::person);

  public StandIn {
    leaves = List.copyOf(leaves);
    told = List.copyOf(told);
  }

  /**
   * Everybody who could, the best first: fewest breaches, then gaps, then people to tell, then
   * least strain. Whoever solves at the time, or is already on duty somewhere at that moment, could
   * not.
   *
   * @param instead id of the person who falls out; empty where the duty has nobody
   * @param now what began before this moment cannot be undone; a group that runs is joined from
   *     then
   * @throws IllegalArgumentException where the plan has no such group, or nobody of that id on that
   *     duty
   */
  public static List<StandIn> rank(
      Draft draft, String group, Role role, Optional<String> instead, Instant now) {
    return new Search(draft, group, role, instead, LocalClock.epochMinute(now)).rank();
  }

  private static final class Search {
    private final Draft draft;
    private final Standing standing;
    private final Board board;
    private final Frame frame;
    private final Problem problem;
    private final Wording words;
    private final int group;
    private final int role;
    private final Optional<String> instead;
    private final int now;
    private final int from;
    private final int place;

    Search(Draft draft, String group, Role role, Optional<String> instead, int now) {
      this.draft = draft;
      this.instead = instead;
      this.now = now;
      standing = new Standing(draft.event(), draft.plan());
      board = standing.board;
      frame = standing.frame;
      problem = standing.problem;
      words = new Wording(draft.event());
      this.group = standing.group(group);
      this.role = Problem.role(role);
      from = Math.max(now, frame.start[this.group]);
      place = instead.map(id -> placeOf(standing.person(id))).orElseGet(this::emptyPlace);
    }

    private int placeOf(int person) {
      int gk = group * 3 + role;
      for (int at = frame.placeStart[gk]; at < frame.placeStart[gk + 1]; at++) {
        if (board.placePerson[at] == person) {
          return at;
        }
      }
      throw new IllegalArgumentException(
          standing.personId(person) + " has no such duty in " + standing.groupId(group));
    }

    private int emptyPlace() {
      int at = standing.emptyPlace(group, role);
      if (at < 0) {
        throw new IllegalArgumentException(
            "Group " + standing.groupId(group) + " has no empty duty of that kind");
      }
      return at;
    }

    List<StandIn> rank() {
      List<StandIn> found = new ArrayList<>();
      for (int p = 0; p < problem.people && from < frame.end[group]; p++) {
        if (problem.skilled(p, frame.round[group], role)
            && problem.present(p, from, frame.end[group])
            && !problem.busy(p, from, frame.end[group])
            && !instead.equals(Optional.of(standing.personId(p)))) {
          consider(p).ifPresent(found::add);
        }
      }
      found.sort(BEST_FIRST);
      return found;
    }

    /** The duties in the way; empty optional where something in the way cannot be left. */
    private Optional<List<Integer>> inTheWay(int p) {
      List<Integer> places = new ArrayList<>();
      for (int i = 0; i < board.commitmentCount(p); i++) {
        int commitment = board.commitment(p, i);
        int g = commitment >> 2;
        int way = problem.way[frame.hall[group]][frame.hall[g]];
        boolean apart = frame.start[g] >= frame.end[group] + way || frame.end[g] + way <= from;
        if (g != group && apart) {
          continue;
        }
        int at = dutyPlace(p, commitment, places);
        if (g == group || at < 0 || frame.start[g] < now || frame.placePin[at] == p) {
          return Optional.empty();
        }
        places.add(at);
      }
      return Optional.of(places);
    }

    /** The place of a duty, but for those already known; -1 where it is solving. */
    private int dutyPlace(int p, int commitment, List<Integer> but) {
      if ((commitment & 3) == Problem.SOLVING) {
        return -1;
      }
      int gk = (commitment >> 2) * 3 + (commitment & 3);
      for (int at = frame.placeStart[gk]; at < frame.placeStart[gk + 1]; at++) {
        if (board.placePerson[at] == p && !but.contains(at)) {
          return at;
        }
      }
      return -1;
    }

    private Optional<StandIn> consider(int p) {
      Optional<List<Integer>> inTheWay = inTheWay(p);
      if (inTheWay.isEmpty()) {
        return Optional.empty();
      }
      List<Change> changes = new ArrayList<>();
      List<String> leaves = new ArrayList<>();
      List<String> told = new ArrayList<>(List.of(standing.personId(p)));
      List<Integer> left = inTheWay.get();
      left.forEach(at -> standing.ledger.duty(at, -1));
      standing.ledger.duty(place, p);
      for (int at : left) {
        int g = frame.placeGroup[at];
        Role duty = Wording.role(frame.placeRole[at]);
        leaves.add(standing.groupId(g));
        int other = somebodyFree(at);
        if (other >= 0) {
          standing.ledger.duty(at, other);
          told.add(standing.personId(other));
          changes.add(
              new Change.HandOver(
                  standing.personId(p), standing.personId(other), standing.groupId(g), duty));
        } else {
          changes.add(new Change.TakeOffDuty(standing.personId(p), standing.groupId(g), duty));
        }
      }
      changes.add(
          instead
              .<Change>map(
                  gone ->
                      new Change.HandOver(
                          gone, standing.personId(p), standing.groupId(group), Wording.role(role)))
              .orElse(
                  new Change.PutOnDuty(
                      standing.personId(p), standing.groupId(group), Wording.role(role))));
      standing.ledger.settle();
      Difference difference =
          Difference.ofLedger(standing.ledger.hardChange(), standing.ledger.strainChange());
      standing.ledger.undo();
      Change change = changes.size() == 1 ? changes.get(0) : new Change.Together(changes);
      return Optional.of(
          new StandIn(
              standing.personId(p),
              change,
              leaves,
              told,
              difference,
              says(p, leaves, told, difference)));
    }

    /** Whoever takes a duty for least strain and without a breach, or -1. */
    private int somebodyFree(int at) {
      int g = frame.placeGroup[at];
      int best = -1;
      long least = Long.MAX_VALUE;
      for (int other : frame.candidates[g * 3 + frame.placeRole[at]]) {
        boolean gone = instead.equals(Optional.of(standing.personId(other)));
        if (!gone && board.couldTake(other, g)) {
          long change =
              standing.ledger.priceWith(other, g << 2 | frame.placeRole[at])
                  - standing.ledger.priceNow(other);
          if (change < least && change < roundwright.scheduling.rules.Ledger.BREACH_IN_TRIALS / 2) {
            least = change;
            best = other;
          }
        }
      }
      return best;
    }

    private String says(int p, List<String> leaves, List<String> told, Difference difference) {
      String name = words.name(standing.personId(p));
      String leaving =
          leaves.isEmpty()
              ? ""
              : " and leaves a duty in "
                  + leaves.stream()
                      .map(id -> words.group(draft.group(id)))
                      .collect(Collectors.joining(" and in "));
      return name
          + " can stand in"
          + leaving
          + ": "
          + difference.says()
          + "; tell "
          + words.names(told)
          + ".";
    }
  }
}
