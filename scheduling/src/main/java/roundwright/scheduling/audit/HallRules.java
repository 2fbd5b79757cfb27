package roundwright.scheduling.audit;

import java.time.Duration;
import java.time.Instant;
import java.time.LocalDate;
import java.util.ArrayList;
import java.util.Comparator;
import java.util.HashSet;
import java.util.List;
import java.util.Map;
import java.util.Optional;
import java.util.Set;
import java.util.SortedMap;
import java.util.TreeMap;
import roundwright.scheduling.model.Group;
import roundwright.scheduling.model.Hall;
import roundwright.scheduling.model.Round;
import roundwright.scheduling.model.Window;

/** Rules that look at a hall or a venue. */
final class HallRules {
  private static final Duration CLOSE_TO_CLOSING = Duration.ofMinutes(15);

  private HallRules() {}

  /** 5 min by which a group starts before the latest end so far in its hall plus the setup. */
  static void hallClash(Case given, Notes notes) {
    Duration setup = Duration.ofMinutes(given.event().rules().setupMinutes());
    for (List<Group> inHall : given.plan().groupsByHall()) {
      Optional<Group> latest = Optional.empty();
      for (Group group : inHall) {
        if (latest.isPresent()) {
          Group before = latest.get();
          Duration missing = Duration.between(group.start(), before.end().plus(setup));
          notes.add(
              Notes.startedFives(missing),
              group,
              List.of(),
              () ->
                  given.words().groupAndTime(group)
                      + " starts "
                      + Wording.minutes(missing)
                      + " too soon after "
                      + given.words().groupAndTime(before)
                      + " in "
                      + given.words().hall(group.hall())
                      + ".");
        }
        if (latest.isEmpty() || group.end().isAfter(latest.get().end())) {
          latest = Optional.of(group);
        }
      }
    }
  }

  /** 5 min of a group's minutes outside its hall's windows or in a fixed point. */
  static void hallClosed(Case given, Notes notes) {
    for (Group group : given.plan().groups()) {
      Hall hall = given.event().hall(group.hall());
      Duration closed = Duration.between(group.start(), group.end());
      for (Window open : hall.open()) {
        closed = closed.minus(shared(group.start(), group.end(), open));
        for (Window fixed : given.event().fixedPoints(hall.id())) {
          Instant from = later(group.start(), fixed.from());
          Instant to = earlier(group.end(), fixed.to());
          closed = closed.plus(shared(from, to, open));
        }
      }
      Duration outside = closed;
      notes.add(
          Notes.startedFives(outside),
          group,
          List.of(),
          () ->
              given.words().groupAndTime(group)
                  + " is in "
                  + given.words().hall(group.hall())
                  + " for "
                  + Wording.minutes(outside)
                  + " in which the hall is closed or taken by a fixed point.");
    }
  }

  /** The length that a stretch of time has in common with a window. */
  private static Duration shared(Instant from, Instant to, Window window) {
    Duration length = Duration.between(later(from, window.from()), earlier(to, window.to()));
    return length.isNegative() ? Duration.ZERO : length;
  }

  private static Instant later(Instant one, Instant other) {
    return one.isAfter(other) ? one : other;
  }

  private static Instant earlier(Instant one, Instant other) {
    return one.isBefore(other) ? one : other;
  }

  /** 1 for each group in a hall without the features it needs or not among its round's. */
  static void hallUnsuited(Case given, Notes notes) {
    for (Group group : given.plan().groups()) {
      Round round = given.event().round(group.round());
      boolean suited = given.event().isSuitable(round, given.event().hall(group.hall()));
      notes.add(
          suited ? 0 : 1,
          group,
          List.of(),
          () ->
              given.words().groupAndTime(group)
                  + " is in "
                  + given.words().hall(group.hall())
                  + ", which does not suit it.");
    }
  }

  /** Minutes from the first start to the last end, per venue and day there. */
  static void lateFinish(Case given, Notes notes) {
    SortedMap<String, SortedMap<LocalDate, List<Group>>> days = new TreeMap<>();
    for (Group group : given.plan().groups()) {
      days.computeIfAbsent(given.event().venueOf(group.hall()).id(), venue -> new TreeMap<>())
          .computeIfAbsent(given.event().day(group), day -> new ArrayList<>())
          .add(group);
    }
    for (SortedMap<LocalDate, List<Group>> ofVenue : days.values()) {
      for (Map.Entry<LocalDate, List<Group>> day : ofVenue.entrySet()) {
        Group first = day.getValue().get(0);
        Instant end =
            day.getValue().stream().map(Group::end).max(Comparator.naturalOrder()).orElseThrow();
        notes.add(
            Duration.between(first.start(), end).toMinutes(),
            List.of(),
            () ->
                "The day at "
                    + Wording.oneLine(given.event().venueOf(first.hall()).name())
                    + " lasts from "
                    + given.words().time(first.start(), given.event().zone(first.hall()))
                    + " to "
                    + given.words().time(end, given.event().zone(first.hall()))
                    + ".");
      }
    }
  }

  /** Notice: a group with more people in it than the hall's occupancy allows. */
  static void occupancyPassed(Case given, Notes notes) {
    for (Group group : given.plan().groups()) {
      Hall hall = given.event().hall(group.hall());
      Set<String> people = new HashSet<>();
      Book.eachListing(group, (person, role) -> people.add(person));
      notes.add(
          hall.occupancy().isPresent() ? people.size() - hall.occupancy().getAsInt() : 0,
          group,
          List.of(),
          () ->
              given.words().groupAndTime(group)
                  + " brings "
                  + Wording.count(people.size(), "person")
                  + " into "
                  + given.words().hall(hall.id())
                  + ", whose limit is "
                  + hall.occupancy().getAsInt()
                  + ".");
    }
  }

  /** Notice: a hall's last group that ends within a quarter of an hour of closing. */
  static void closeToClosing(Case given, Notes notes) {
    for (List<Group> inHall : given.plan().groupsByHall()) {
      for (Window open : given.event().hall(inHall.get(0).hall()).open()) {
        Optional<Group> last =
            inHall.stream()
                .filter(group -> open.holds(group.start(), group.end()))
                .max(Comparator.comparing(Group::end));
        if (last.isEmpty()) {
          continue;
        }
        Group group = last.get();
        Duration left = Duration.between(group.end(), open.to());
        notes.add(
            left.compareTo(CLOSE_TO_CLOSING) < 0 ? 1 : 0,
            group,
            List.of(),
            () ->
                given.words().groupAndTime(group)
                    + " ends "
                    + Wording.minutes(left)
                    + " before "
                    + given.words().hall(group.hall())
                    + " closes.");
      }
    }
  }
}
