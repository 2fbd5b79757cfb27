package roundwright.scheduling.advice;

import java.math.BigDecimal;
import java.util.ArrayList;
import java.util.Collections;
import java.util.List;
import java.util.Map;
import java.util.Optional;
import java.util.SortedMap;
import java.util.TreeMap;
import java.util.stream.Collectors;
import roundwright.scheduling.core.Board;
import roundwright.scheduling.core.Frame;
import roundwright.scheduling.core.Problem;
import roundwright.scheduling.cost.Level;
import roundwright.scheduling.cost.RuleName;
import roundwright.scheduling.crewing.Standing;
import roundwright.scheduling.model.Role;

/**
 * Why somebody is where a plan has them: what each of their commitments costs, read from the rows
 * that the search prices, and what else they could do.
 *
 * @param commitments in order of time
 * @param says one sentence about the person's whole plan
 */
public record Why(String person, List<Commitment> commitments, String says) {
  public Why {
    commitments = List.copyOf(commitments);
  }

  /**
   * One commitment.
   *
   * @param role empty for solving
   * @param byRule what the plan would save by each rule were the commitment not there, its own gap,
   *     missing entry or pin apart: breaches as they are, strain weighted. Commitments share costs,
   *     so these do not add up to the price of a person
   * @param alternative the best other thing to do, where there is any
   * @param says one sentence
   */
  public record Commitment(
      String group,
      Optional<Role> role,
      SortedMap<RuleName, BigDecimal> byRule,
      Optional<Alternative> alternative,
      String says) {
    /** Strain alone. */
    public BigDecimal strain() {
      return byRule.entrySet().stream()
          .filter(entry -> entry.getKey().level() == Level.STRAIN)
          .map(Map.Entry::getValue)
          .reduce(BigDecimal.ZERO, BigDecimal::add);
    }
  }

  /** Something else to do and how much dearer the plan would be. */
  public record Alternative(Change change, Difference difference) {}

  /** All commitments of a person. */
  public static Why of(Draft draft, String person) {
    return of(draft, person, Optional.empty());
  }

  /**
   * The commitments of a person, in one group where one is named.
   *
   * @throws IllegalArgumentException where the event has no such person or the plan no such group
   */
  public static Why of(Draft draft, String person, Optional<String> group) {
    return new Asked(draft, person).answer(group);
  }

  private static final class Asked {
    private final Draft draft;
    private final Standing standing;
    private final Board board;
    private final Frame frame;
    private final Wording words;
    private final String id;
    private final int person;
    private final Alternatives alternatives;

    Asked(Draft draft, String id) {
      this.draft = draft;
      this.id = id;
      standing = new Standing(draft.event(), draft.plan());
      board = standing.board;
      frame = standing.frame;
      words = new Wording(draft.event());
      person = standing.person(id);
      alternatives = new Alternatives(standing, person);
    }

    Why answer(Optional<String> onlyGroup) {
      int only = onlyGroup.map(standing::group).orElse(-1);
      List<Commitment> found = new ArrayList<>();
      List<Integer> all = new ArrayList<>();
      for (int i = 0; i < board.commitmentCount(person); i++) {
        all.add(board.commitment(person, i));
      }
      for (int commitment : all) {
        if (only < 0 || commitment >> 2 == only) {
          found.add(commitment(commitment));
        }
      }
      SortedMap<RuleName, BigDecimal> whole =
          priced(standing.book.explainPerson(board, person), Map.of());
      String about =
          words.name(id)
              + " has "
              + Wording.count(all.size(), "commitment")
              + ", which cost "
              + costs(whole)
              + ".";
      return new Why(id, found, about);
    }

    private Commitment commitment(int commitment) {
      int g = commitment >> 2;
      int kind = commitment & 3;
      Map<RuleName, Long> with = prices(g);
      Optional<Alternative> best = Optional.empty();
      String none = "it is pinned";
      Map<RuleName, Long> without;
      if (kind == Problem.SOLVING) {
        int seat = standing.problem.seatOf(person, frame.round[g]);
        boolean held = seat >= 0 && board.seatGroup[seat] == g;
        if (held) {
          standing.ledger.seat(seat, -1);
        }
        without = prices(g);
        standing.ledger.undo();
        best = held ? alternatives.toSeat(seat) : best;
        none = frame.groupsOf[frame.round[g]].length == 1 ? "the round has no other group" : none;
      } else {
        int place = placeOf(g, kind);
        standing.ledger.duty(place, -1);
        without = prices(g);
        standing.ledger.undo();
        best = alternatives.toDuty(place);
      }
      SortedMap<RuleName, BigDecimal> byRule = priced(with, without);
      byRule.remove(RuleName.UNFILLED);
      byRule.remove(RuleName.ENTRY_MISSING);
      Optional<Role> role =
          kind == Problem.SOLVING ? Optional.empty() : Optional.of(Wording.role(kind));
      return new Commitment(
          standing.groupId(g),
          role,
          Collections.unmodifiableSortedMap(byRule),
          best,
          says(g, role, byRule, best, none));
    }

    private int placeOf(int g, int role) {
      for (int at = frame.placeStart[g * 3 + role]; ; at++) {
        if (board.placePerson[at] == person) {
          return at;
        }
      }
    }

    private Map<RuleName, Long> prices(int g) {
      Map<RuleName, Long> prices = standing.book.explainPerson(board, person);
      standing
          .book
          .explainGroup(board, g)
          .forEach((rule, price) -> prices.merge(rule, price, Long::sum));
      return prices;
    }

    private static SortedMap<RuleName, BigDecimal> priced(
        Map<RuleName, Long> with, Map<RuleName, Long> without) {
      SortedMap<RuleName, BigDecimal> byRule = new TreeMap<>();
      with.forEach(
          (rule, price) -> {
            long change = price - without.getOrDefault(rule, 0L);
            if (change != 0) {
              byRule.put(
                  rule,
                  rule.level() == Level.STRAIN
                      ? BigDecimal.valueOf(change, 6)
                      : BigDecimal.valueOf(change));
            }
          });
      return byRule;
    }

    private static String costs(Map<RuleName, BigDecimal> byRule) {
      return byRule.isEmpty()
          ? "nothing"
          : byRule.entrySet().stream()
              .map(
                  entry ->
                      entry.getKey().word()
                          + " "
                          + (entry.getKey().level() == Level.STRAIN
                              ? Wording.oneDecimal(entry.getValue())
                              : entry.getValue().toPlainString()))
              .collect(Collectors.joining(", "));
    }

    private String says(
        int g,
        Optional<Role> role,
        Map<RuleName, BigDecimal> byRule,
        Optional<Alternative> alternative,
        String none) {
      String other =
          alternative
              .map(
                  best -> {
                    String price = best.difference.says();
                    boolean better =
                        best.difference.compareTo(new Difference(0, 0, BigDecimal.ZERO)) < 0;
                    return (better ? "better would be to " : "the best alternative is to ")
                        + best.change.says(draft)
                        + ": "
                        + price;
                  })
              .orElse(none);
      return words.name(id)
          + " "
          + role.map(duty -> "is " + duty.word() + " of").orElse("solves in")
          + " "
          + words.group(standing.groups.get(g))
          + ", which costs "
          + costs(byRule)
          + "; "
          + other
          + ".";
    }
  }
}
