package roundwright.scheduling.advice;

import java.util.ArrayList;
import java.util.Arrays;
import java.util.LinkedHashMap;
import java.util.List;
import java.util.Map;
import java.util.stream.IntStream;
import roundwright.scheduling.core.Problem;
import roundwright.scheduling.model.Discipline;
import roundwright.scheduling.model.Round;

/** Rounds without a hall, without room for their entrants, or without time. */
final class RoomForRounds {
  private final PossibleTimes times;
  private final Problem problem;
  private final Wording words;
  private final List<Impossible> found = new ArrayList<>();

  RoomForRounds(PossibleTimes times, Wording words) {
    this.times = times;
    this.problem = times.problem;
    this.words = words;
  }

  List<Impossible> find() {
    for (int r = 0; r < problem.rounds; r++) {
      groupsThatFit(r);
      if (problem.entrants(r) > 0) {
        if (times.placed[r]) {
          timeFor(r);
        } else {
          noHall(r);
        }
      }
    }
    hallsTooFull();
    return found;
  }

  private String id(int r) {
    return problem.roundList.get(r).id();
  }

  private void add(Impossible.Kind kind, List<String> rounds, int[] halls, String says) {
    List<String> hallIds = IntStream.of(halls).mapToObj(h -> problem.hallList.get(h).id()).toList();
    found.add(new Impossible(kind, 1, List.of(), rounds, hallIds, says));
  }

  private void noHall(int r) {
    Round round = problem.roundList.get(r);
    Discipline discipline =
        problem.event.disciplines().stream()
            .filter(one -> one.id().equals(round.discipline()))
            .findFirst()
            .orElseThrow();
    int[] suitable = IntStream.range(0, problem.halls).filter(h -> problem.suits[r][h]).toArray();
    String name = words.round(round.id());
    if (suitable.length > 0) {
      add(
          Impossible.Kind.NO_HALL,
          List.of(round.id()),
          suitable,
          name
              + " finds no hall that may hold even one competitor at its stations; raise its fill"
              + " or its stations.");
      return;
    }
    List<String> wants = new ArrayList<>();
    round
        .halls()
        .ifPresent(
            only ->
                wants.add(
                    only.isEmpty()
                        ? "may be in no hall at all"
                        : "may only be in " + words.halls(only)));
    if (!discipline.needs().isEmpty()) {
      wants.add("needs a hall that is " + Wording.listed(List.copyOf(discipline.needs()), 0));
    }
    add(
        Impossible.Kind.NO_HALL,
        List.of(round.id()),
        new int[0],
        "No hall suits "
            + name
            + ", which "
            + String.join(" and ", wants)
            + "; let it be in another hall or give one what it needs.");
  }

  private void groupsThatFit(int r) {
    Round round = problem.roundList.get(r);
    if (round.groups().isEmpty()) {
      return;
    }
    int groups = round.groups().getAsInt();
    int entrants = problem.entrants(r);
    int largest = problem.largestCapacity(r);
    String name = words.round(round.id());
    if (entrants < groups) {
      add(
          Impossible.Kind.GROUPS_DO_NOT_FIT,
          List.of(round.id()),
          new int[0],
          name
              + " is to have "
              + Wording.count(groups, "group")
              + " and has "
              + Wording.count(entrants, "entrant")
              + "; each group needs one, so ask for "
              + (entrants == 0 ? "none" : "at most " + entrants)
              + ".");
    } else if (times.placed[r] && entrants > (long) groups * largest) {
      add(
          Impossible.Kind.GROUPS_DO_NOT_FIT,
          List.of(round.id()),
          new int[0],
          name
              + " has "
              + Wording.count(entrants, "entrant")
              + " and is to have "
              + Wording.count(groups, "group")
              + ", of which the largest hall that suits it holds "
              + largest
              + " each; allow "
              + (entrants + largest - 1) / largest
              + " groups or more stations.");
    }
  }

  private void timeFor(int r) {
    int minutes = times.longestMinutes[r];
    int[] halls = times.suitableHalls(r);
    String slowest =
        times.single[r]
            ? "its one group"
            : "the group of " + words.name(person(times.slowestSeat[r]));
    if (times.starts(r, minutes, false).isEmpty()) {
      add(
          Impossible.Kind.NO_TIME,
          List.of(id(r)),
          halls,
          words.round(id(r))
              + " needs "
              + Wording.count(minutes, "minute")
              + " at a stretch for "
              + slowest
              + ", and no hall that suits it ("
              + words.halls(IntStream.of(halls).mapToObj(this::hall).toList())
              + ") is open so long"
              + limits(r)
              + "; open one longer or give the round another time or limit.");
    } else if (times.starts(r, minutes, true).isEmpty()) {
      orderTooLong(r, minutes);
    }
  }

  private void orderTooLong(int r, int minutes) {
    int before = problem.roundBefore[r];
    boolean late = before >= 0 && times.placed[before] && times.ready[r] > Problem.NEVER;
    List<String> rounds = new ArrayList<>();
    String why = "";
    if (late) {
      rounds.add(id(before));
      why =
          words.round(id(before))
              + " can be over by "
              + words.time(times.ready[r] - problem.event.rules().turnaroundMinutes())
              + " at the soonest";
    }
    rounds.add(id(r));
    if (times.deadline[r] < Problem.FOREVER) {
      int after =
          IntStream.range(0, problem.rounds)
              .filter(q -> problem.roundBefore[q] == r)
              .findFirst()
              .orElseThrow();
      rounds.add(id(after));
      why +=
          (why.isEmpty() ? "" : ", ")
              + words.round(id(after))
              + " wants it over by "
              + words.time(times.deadline[r]);
    }
    add(
        Impossible.Kind.ORDER_TOO_LONG,
        rounds,
        times.suitableHalls(r),
        words.round(id(r))
            + " needs "
            + Wording.count(minutes, "minute")
            + " at a stretch and there is no such time: "
            + why
            + "; shorten a round, leave one out or open a hall longer.");
  }

  private String hall(int h) {
    return problem.hallList.get(h).id();
  }

  private String person(int seat) {
    return problem.personList.get(problem.seatPerson[seat]).id();
  }

  private String limits(int r) {
    boolean from = problem.notBefore[r] > Problem.NEVER;
    boolean to = problem.notAfter[r] < Problem.FOREVER;
    if (!from && !to) {
      return "";
    }
    return (from ? " from " + words.time(problem.notBefore[r]) : "")
        + (to ? " until " + words.time(problem.notAfter[r]) : "");
  }

  /** For each set of halls that is all some rounds may use: their minutes against the halls'. */
  private void hallsTooFull() {
    Map<List<Integer>, Boolean> sets = new LinkedHashMap<>();
    for (int r = 0; r < problem.rounds; r++) {
      if (times.placed[r]) {
        sets.put(IntStream.of(times.suitableHalls(r)).boxed().toList(), true);
      }
    }
    sets.put(IntStream.range(0, problem.halls).boxed().toList(), true);
    for (List<Integer> halls : sets.keySet()) {
      hallsTooFull(halls.stream().mapToInt(Integer::intValue).toArray());
    }
  }

  private void hallsTooFull(int[] halls) {
    int[] inside =
        IntStream.range(0, problem.rounds)
            .filter(r -> times.placed[r])
            .filter(
                r ->
                    Arrays.stream(times.suitableHalls(r))
                        .allMatch(h -> Arrays.binarySearch(halls, h) >= 0))
            .toArray();
    int from = IntStream.of(inside).map(r -> problem.notBefore[r]).min().orElse(0);
    int to = IntStream.of(inside).map(r -> problem.notAfter[r]).max().orElse(0);
    long there = 0;
    int windows = 0;
    for (int h : halls) {
      for (int w = 0; w < problem.hallFreeFrom[h].length; w++) {
        int minutes =
            Math.min(to, problem.hallFreeTo[h][w]) - Math.max(from, problem.hallFreeFrom[h][w]);
        there += Math.max(0, minutes);
        windows += minutes > 0 ? 1 : 0;
      }
    }
    long groups = IntStream.of(inside).map(r -> times.fewestGroups[r]).sum();
    long setups = Math.max(0, groups - windows) * problem.event.rules().setupMinutes();
    long wanted = IntStream.of(inside).mapToLong(r -> times.minutesInAll[r]).sum() + setups;
    if (inside.length > 0 && wanted > there) {
      List<String> rounds = IntStream.of(inside).mapToObj(this::id).toList();
      add(
          Impossible.Kind.HALLS_TOO_FULL,
          rounds,
          halls,
          words.rounds(rounds)
              + (rounds.size() == 1 ? " needs at least " : " together need at least ")
              + wanted
              + " minutes of "
              + words.halls(IntStream.of(halls).mapToObj(this::hall).toList())
              + ", open for "
              + there
              + "; open halls longer, add stations, or take a round out.");
    }
  }
}
