package roundwright.scheduling.advice;

import java.util.ArrayList;
import java.util.List;
import java.util.Map;
import java.util.TreeMap;
import roundwright.scheduling.core.Problem;

/** People who cannot be in all of their rounds, and rounds whose people cannot be together. */
final class TimeForPeople {
  private final PossibleTimes times;
  private final Problem problem;
  private final Wording words;
  private final Starts[] ofSeat;
  private final Map<Integer, List<Integer>> without = new TreeMap<>();
  private final List<Impossible> found = new ArrayList<>();

  TimeForPeople(PossibleTimes times, Wording words) {
    this.times = times;
    this.problem = times.problem;
    this.words = words;
    ofSeat = new Starts[problem.seats];
  }

  List<Impossible> find() {
    for (int r = 0; r < problem.rounds; r++) {
      if (times.placed[r] && !times.ofRound(r).isEmpty()) {
        seats(r);
        if (times.single[r]) {
          together(r);
        }
      }
    }
    without.forEach(this::neverThere);
    Map<List<Integer>, List<String>> same = new TreeMap<>(TimeForPeople::byNumbers);
    for (int p = 0; p < problem.people; p++) {
      pairs(p, same);
      inAll(p);
    }
    same.forEach(this::sameTime);
    return found;
  }

  private static int byNumbers(List<Integer> one, List<Integer> other) {
    int first = Integer.compare(one.get(0), other.get(0));
    return first != 0 ? first : Integer.compare(one.get(1), other.get(1));
  }

  private String id(int r) {
    return problem.roundList.get(r).id();
  }

  private String person(int p) {
    return problem.personList.get(p).id();
  }

  private void seats(int r) {
    for (int seat = problem.seatStart[r]; seat < problem.seatStart[r + 1]; seat++) {
      Starts own = times.ofSeat(seat);
      if (own.isEmpty()) {
        without.computeIfAbsent(problem.seatPerson[seat], first -> new ArrayList<>()).add(seat);
      } else {
        ofSeat[seat] = own;
      }
    }
  }

  private void neverThere(int p, List<Integer> seats) {
    List<String> rounds = seats.stream().map(seat -> id(problem.seatRound[seat])).toList();
    String name = words.name(person(p));
    found.add(
        new Impossible(
            Impossible.Kind.NEVER_THERE,
            1,
            List.of(person(p)),
            rounds,
            List.of(),
            name
                + " cannot be in "
                + Wording.listed(seats.stream().map(this::roundAndTime).toList(), 0)
                + ": "
                + name
                + " "
                + words.presence(person(p))
                + (problem.busyFrom[p].length == 0 || problem.presentFrom[p].length == 0
                    ? ""
                    : " and is wanted elsewhere for a part of it")
                + "; change that, move the round's limits, or take the entry out."));
  }

  private String roundAndTime(int seat) {
    int r = problem.seatRound[seat];
    int minutes = times.seatMinutes(r, seat);
    Starts round = times.starts(r, minutes, true);
    return words.round(id(r))
        + " ("
        + Wording.count(minutes, "minute")
        + " from "
        + words.time(round.first())
        + " to "
        + words.time(round.last() + minutes)
        + ")";
  }

  private void together(int r) {
    Starts all = times.ofRound(r);
    List<String> who = new ArrayList<>();
    for (int seat = problem.seatStart[r]; seat < problem.seatStart[r + 1]; seat++) {
      if (ofSeat[seat] == null) {
        return;
      }
      Starts with = all.and(ofSeat[seat]);
      if (!with.equals(all)) {
        who.add(person(problem.seatPerson[seat]));
      }
      all = with;
    }
    for (int seat = problem.seatStart[r]; seat < problem.seatStart[r + 1]; seat++) {
      ofSeat[seat] = all;
    }
    if (!all.isEmpty()) {
      return;
    }
    found.add(
        new Impossible(
            Impossible.Kind.NEVER_TOGETHER,
            1,
            who,
            List.of(id(r)),
            List.of(),
            words.round(id(r))
                + " is one group of "
                + Wording.count(times.longestMinutes[r], "minute")
                + ", and "
                + words.names(who)
                + " are never free for it together; change somebody's times, take somebody out"
                + " or allow more groups."));
  }

  private boolean known(int seat) {
    return ofSeat[seat] != null && !ofSeat[seat].isEmpty();
  }

  private void pairs(int p, Map<List<Integer>, List<String>> same) {
    int[] seats = problem.personSeats[p];
    for (int i = 0; i < seats.length; i++) {
      for (int j = i + 1; j < seats.length; j++) {
        int one = seats[i];
        int two = seats[j];
        if (known(one)
            && known(two)
            && !Starts.apart(ofSeat[one], minutes(one), ofSeat[two], minutes(two))) {
          same.computeIfAbsent(
                  List.of(problem.seatRound[one], problem.seatRound[two]),
                  first -> new ArrayList<>())
              .add(person(p));
        }
      }
    }
  }

  private int minutes(int seat) {
    return times.seatMinutes(problem.seatRound[seat], seat);
  }

  private void sameTime(List<Integer> rounds, List<String> people) {
    int one = rounds.get(0);
    int two = rounds.get(1);
    found.add(
        new Impossible(
            Impossible.Kind.SAME_TIME,
            1,
            people,
            List.of(id(one), id(two)),
            List.of(),
            words.names(people)
                + (people.size() == 1 ? " is" : " are")
                + " in both "
                + words.round(id(one))
                + " and "
                + words.round(id(two))
                + ", which for "
                + (people.size() == 1 ? "them" : "each of them")
                + " can only be at the same time"
                + between(one, two)
                + "; give one of the rounds another time, or take an entry out."));
  }

  private String between(int one, int two) {
    int from = Math.min(times.ofRound(one).first(), times.ofRound(two).first());
    int to =
        Math.max(
            times.ofRound(one).last() + times.longestMinutes[one],
            times.ofRound(two).last() + times.longestMinutes[two]);
    return " (from " + words.time(from) + " to " + words.time(to) + ")";
  }

  /** Groups of one person are one after the other, so they need as much time as all together. */
  private void inAll(int p) {
    List<Starts> starts = new ArrayList<>();
    List<Integer> minutes = new ArrayList<>();
    List<String> rounds = new ArrayList<>();
    long wanted = 0;
    for (int seat : problem.personSeats[p]) {
      if (known(seat)) {
        starts.add(ofSeat[seat]);
        minutes.add(minutes(seat));
        rounds.add(id(problem.seatRound[seat]));
        wanted += minutes(seat);
      }
    }
    long there = Starts.covered(starts, minutes);
    if (wanted > there) {
      found.add(
          new Impossible(
              Impossible.Kind.TOO_MANY_ENTRIES,
              1,
              List.of(person(p)),
              rounds,
              List.of(),
              words.name(person(p))
                  + " solves for at least "
                  + wanted
                  + " minutes in "
                  + words.rounds(rounds)
                  + ", and has "
                  + there
                  + " in which these can be; take an entry out or give the rounds more time."));
    }
  }
}
