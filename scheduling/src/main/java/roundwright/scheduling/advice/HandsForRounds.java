package roundwright.scheduling.advice;

import java.util.ArrayList;
import java.util.List;
import roundwright.scheduling.core.Problem;
import roundwright.scheduling.model.Round;

/** Rounds for whose crews too few people have the skill and the time. */
final class HandsForRounds {
  private final PossibleTimes times;
  private final Problem problem;
  private final Wording words;
  private final List<Impossible> found = new ArrayList<>();

  HandsForRounds(PossibleTimes times, Wording words) {
    this.times = times;
    this.problem = times.problem;
    this.words = words;
  }

  List<Impossible> find() {
    for (int r = 0; r < problem.rounds; r++) {
      for (int role = 0; role < 3 && times.placed[r]; role++) {
        role(r, role);
      }
    }
    return found;
  }

  /** Who has a skill, how many of them have the time, and who of these solves in the round. */
  private record Hands(List<String> skilled, int thereInTime, int freeOfSolving, int solving) {}

  private Hands hands(int r, int role) {
    Starts starts = times.starts(r, times.shortestMinutes[r], true);
    List<String> skilled = new ArrayList<>();
    int there = 0;
    int free = 0;
    int solving = 0;
    for (int p = 0; p < problem.people; p++) {
      if (!problem.skilled(p, r, role)) {
        continue;
      }
      skilled.add(problem.personList.get(p).id());
      boolean solves = problem.seatOf(p, r) >= 0;
      solving += solves ? 1 : 0;
      int minutes = times.shortestMinutes[r];
      if (problem.maxDutyMinutes[p] >= minutes
          && !times.withPerson(starts, p, minutes, true).isEmpty()) {
        there++;
        free += times.single[r] && solves ? 0 : 1;
      }
    }
    return new Hands(skilled, there, free, solving);
  }

  private void role(int r, int role) {
    int each = problem.wanted(r, role, 1, 1);
    int most = wantedByLargest(r, role);
    if (most == 0) {
      return;
    }
    Hands hands = hands(r, role);
    int skilled = hands.skilled.size();
    int largest = problem.largestCapacity(r);
    int groups = (problem.entrants(r) + largest - 1) / largest;
    if (skilled < each) {
      // With fewer groups than hold everybody, somebody is too many for each group left out.
      tell(r, role, hands, (long) each - skilled + groups - 1, each, skilled, "");
    } else if (skilled < most) {
      tell(r, role, hands, 1, most, skilled, "");
    } else if (hands.thereInTime < most) {
      tell(r, role, hands, 1, most, hands.thereInTime, " when the round can be");
    } else if (hands.freeOfSolving < most) {
      tell(r, role, hands, 1, most, hands.freeOfSolving, " besides those who solve in it");
    } else if (!times.single[r] && skilled == each && hands.solving > 0) {
      tell(r, role, hands, hands.solving, each, skilled - 1, " while one of them solves in it");
    }
  }

  /** What the group with most entrants wants at the least. */
  private int wantedByLargest(int r, int role) {
    Round round = problem.roundList.get(r);
    int groups = times.single[r] ? 1 : round.groups().orElse(problem.entrants(r));
    int size = (problem.entrants(r) + groups - 1) / groups;
    return problem.wanted(r, role, problem.fewestStations(r, size), size);
  }

  private void tell(
      int r, int role, Hands hands, long atLeast, int wanted, int have, String which) {
    String round = problem.roundList.get(r).id();
    String can = words.can(role, round);
    String who =
        hands.skilled.isEmpty()
            ? "Nobody can " + can
            : "Only " + words.names(hands.skilled) + " can " + can;
    found.add(
        new Impossible(
            Impossible.Kind.TOO_FEW_SKILLED,
            atLeast,
            hands.skilled,
            List.of(round),
            List.of(),
            who
                + ", and a group of "
                + words.round(round)
                + " needs "
                + wanted
                + " at once"
                + (have == hands.skilled.size()
                    ? ""
                    : " and has " + (have == 0 ? "nobody" : "only " + have) + which)
                + "; find "
                + Wording.count((long) wanted - have, "person")
                + " more who can"
                + (role == 1 ? ", or teach somebody." : ".")));
  }
}
