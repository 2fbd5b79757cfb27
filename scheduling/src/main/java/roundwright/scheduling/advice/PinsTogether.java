package roundwright.scheduling.advice;

import java.util.ArrayList;
import java.util.List;
import java.util.Optional;
import roundwright.scheduling.core.LocalClock;
import roundwright.scheduling.core.Problem;
import roundwright.scheduling.model.Pins;
import roundwright.scheduling.model.Role;
import roundwright.scheduling.model.Round;

/** Pins that cannot be kept, by themselves or together. */
final class PinsTogether {
  private final PossibleTimes times;
  private final Problem problem;
  private final Wording words;
  private final Pins pins;
  private final List<Impossible> found = new ArrayList<>();

  PinsTogether(PossibleTimes times, Wording words) {
    this.times = times;
    this.problem = times.problem;
    this.words = words;
    this.pins = problem.pins();
  }

  /** A person pinned into a group, to solve or on duty. */
  private record Place(String person, String round, int number, Optional<Role> role) {}

  List<Impossible> find() {
    List<Place> places = new ArrayList<>();
    pins.competitors()
        .forEach(
            pin ->
                places.add(new Place(pin.person(), pin.round(), pin.number(), Optional.empty())));
    pins.duties()
        .forEach(
            pin ->
                places.add(
                    new Place(pin.person(), pin.round(), pin.number(), Optional.of(pin.role()))));
    pins.groups().forEach(pin -> number(pin.round(), pin.number(), List.of()));
    places.forEach(place -> number(place.round, place.number, List.of(place.person)));
    for (int i = 0; i < pins.groups().size(); i++) {
      group(pins.groups().get(i));
      for (int j = i + 1; j < pins.groups().size(); j++) {
        groups(pins.groups().get(i), pins.groups().get(j));
      }
    }
    for (int i = 0; i < places.size(); i++) {
      place(places.get(i));
      for (int j = i + 1; j < places.size(); j++) {
        if (places.get(i).person.equals(places.get(j).person)) {
          places(places.get(i), places.get(j));
        }
      }
    }
    return found;
  }

  private void add(List<String> people, List<String> rounds, String says) {
    found.add(
        new Impossible(
            Impossible.Kind.PINS_CONTRADICT,
            1,
            people,
            rounds.stream().distinct().toList(),
            List.of(),
            Wording.capital(says)));
  }

  private String name(String round, int number) {
    return "group " + number + " of " + words.round(round);
  }

  private void number(String round, int number, List<String> people) {
    int r = problem.round(round);
    Round given = problem.roundList.get(r);
    int most = problem.entrants(r);
    if (given.groups().isPresent()) {
      most = Math.min(most, given.groups().getAsInt());
    }
    if (problem.mustBeWhole(r)) {
      most = Math.min(most, 1);
    }
    if (number > most) {
      add(
          people,
          List.of(round),
          name(round, number)
              + " is pinned"
              + (people.isEmpty() ? "" : " for " + words.names(people))
              + ", and the round has "
              + (most == 0 ? "no groups" : "at most " + Wording.count(most, "group"))
              + "; take the pin out"
              + (most == 0 ? "." : " or name a lower number."));
    }
  }

  private int minutes(String round) {
    int r = problem.round(round);
    return times.placed[r] ? times.shortestMinutes[r] : 1;
  }

  private static boolean overlap(int one, int oneMinutes, int other, int otherMinutes) {
    return one < other + otherMinutes && other < one + oneMinutes;
  }

  private void group(Pins.GroupPin pin) {
    int r = problem.round(pin.round());
    String name = name(pin.round(), pin.number());
    if (pin.hall().isPresent() && !problem.suits[r][problem.hall(pin.hall().get())]) {
      add(
          List.of(),
          List.of(pin.round()),
          name
              + " is pinned to "
              + words.hall(pin.hall().get())
              + ", which does not suit it; pin it to another hall.");
    }
    if (pin.start().isEmpty()) {
      return;
    }
    int start = LocalClock.epochMinute(pin.start().get());
    int end = start + minutes(pin.round());
    boolean open = false;
    for (int h = 0; h < problem.halls; h++) {
      boolean meant = pin.hall().map(problem::hall).orElse(h) == h;
      for (int w = 0; meant && w < problem.hallFreeFrom[h].length; w++) {
        open |= problem.hallFreeFrom[h][w] <= start && end <= problem.hallFreeTo[h][w];
      }
    }
    if (!open || start < problem.notBefore[r] || end > problem.notAfter[r]) {
      add(
          List.of(),
          List.of(pin.round()),
          name
              + " is pinned to "
              + words.time(start)
              + ", takes "
              + Wording.count(minutes(pin.round()), "minute")
              + " or more, and "
              + (open
                  ? "its round has other limits of time"
                  : pin.hall().map(words::hall).orElse("every hall") + " is not open so long then")
              + "; pin it to another time.");
    }
  }

  private void groups(Pins.GroupPin one, Pins.GroupPin two) {
    boolean same = one.round().equals(two.round()) && one.number() == two.number();
    List<String> rounds = List.of(one.round(), two.round());
    if (same && (differ(one.hall(), two.hall()) || differ(one.start(), two.start()))) {
      add(
          List.of(),
          rounds,
          name(one.round(), one.number())
              + " is pinned to two "
              + (differ(one.hall(), two.hall()) ? "halls" : "starts")
              + "; take one of the pins out.");
    }
    boolean inOneHall = one.hall().isPresent() && one.hall().equals(two.hall());
    if (same || !inOneHall || one.start().isEmpty() || two.start().isEmpty()) {
      return;
    }
    int setup = problem.event.rules().setupMinutes();
    int first = LocalClock.epochMinute(one.start().get());
    int second = LocalClock.epochMinute(two.start().get());
    if (overlap(first, minutes(one.round()) + setup, second, minutes(two.round()) + setup)) {
      add(
          List.of(),
          rounds,
          name(one.round(), one.number())
              + " and "
              + name(two.round(), two.number())
              + " are pinned to "
              + words.hall(one.hall().get())
              + " at "
              + words.time(first)
              + " and "
              + words.time(second)
              + ", too close to each other; move one of them.");
    }
  }

  private static <T> boolean differ(Optional<T> one, Optional<T> two) {
    return one.isPresent() && two.isPresent() && !one.equals(two);
  }

  private Optional<Integer> start(Place place) {
    return pins.groups().stream()
        .filter(pin -> pin.round().equals(place.round) && pin.number() == place.number)
        .flatMap(pin -> pin.start().stream())
        .map(LocalClock::epochMinute)
        .findFirst();
  }

  private String what(Place place) {
    String can = words.can(place.role.map(Problem::role).orElse(Problem.SOLVING), place.round);
    return can + " in " + name(place.round, place.number);
  }

  private void place(Place place) {
    int p = problem.person(place.person);
    int r = problem.round(place.round);
    List<String> who = List.of(place.person);
    List<String> round = List.of(place.round);
    String pinned = words.name(place.person) + " is pinned to " + what(place);
    if (place.role.isEmpty() && problem.seatOf(p, r) < 0) {
      add(who, round, pinned + " and is no entrant; take the pin out or enter them.");
    }
    if (place.role.isPresent() && !problem.skilled(p, r, Problem.role(place.role.get()))) {
      add(who, round, pinned + " and has not said they can; take the pin out or ask them.");
    }
    if (place.role.isPresent() && times.single[r] && problem.seatOf(p, r) >= 0) {
      add(who, round, pinned + ", the one group of the round they solve in; pin somebody else.");
    }
    Optional<Integer> start = start(place);
    if (start.isPresent()) {
      int end = start.get() + minutes(place.round);
      boolean away =
          !problem.present(p, start.get(), end)
              && !(place.role.isEmpty() && problem.roundLikely[r]);
      if (away || problem.busy(p, start.get(), end)) {
        add(
            who,
            round,
            pinned
                + ", pinned to "
                + words.time(start.get())
                + ", and is "
                + (away ? "not there" : "wanted elsewhere")
                + " then; pin another time or somebody else.");
      }
    }
  }

  private void places(Place one, Place two) {
    List<String> who = List.of(one.person);
    List<String> rounds = List.of(one.round, two.round);
    String both = words.name(one.person) + " is pinned to " + what(one) + " and to " + what(two);
    boolean sameGroup = one.round.equals(two.round) && one.number == two.number;
    boolean bothSolve = one.role.isEmpty() && two.role.isEmpty();
    if (sameGroup && !one.role.equals(two.role)) {
      add(who, rounds, both + ", the same group; take one of the pins out.");
    } else if (!sameGroup && bothSolve && one.round.equals(two.round)) {
      add(who, rounds, both + ", two groups of one round; take one of the pins out.");
    }
    Optional<Integer> first = start(one);
    Optional<Integer> second = start(two);
    if (!sameGroup
        && first.isPresent()
        && second.isPresent()
        && overlap(first.get(), minutes(one.round), second.get(), minutes(two.round))) {
      add(who, rounds, both + ", which are pinned to one time; take one of the pins out.");
    }
  }
}
