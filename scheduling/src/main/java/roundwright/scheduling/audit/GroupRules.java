package roundwright.scheduling.audit;

import java.time.Duration;
import java.time.LocalTime;
import java.util.List;
import roundwright.scheduling.model.Group;
import roundwright.scheduling.model.Hall;
import roundwright.scheduling.model.Round;

/** Rules that look at one group's times and size. */
final class GroupRules {
  private GroupRules() {}

  /** 5 min by which a group starts before notBefore, and by which it ends after notAfter. */
  static void roundWindow(Case given, Notes notes) {
    for (Group group : given.plan().groups()) {
      Round round = given.event().round(group.round());
      Duration early =
          round
              .notBefore()
              .map(time -> Duration.between(group.start(), time))
              .orElse(Duration.ZERO);
      Duration late =
          round.notAfter().map(time -> Duration.between(time, group.end())).orElse(Duration.ZERO);
      notes.add(
          Notes.startedFives(early),
          group,
          List.of(),
          () ->
              given.words().groupAndTime(group)
                  + " starts "
                  + Wording.minutes(early)
                  + " before its round may.");
      notes.add(
          Notes.startedFives(late),
          group,
          List.of(),
          () ->
              given.words().groupAndTime(group)
                  + " ends "
                  + Wording.minutes(late)
                  + " after its round must.");
    }
  }

  /** People over what the stations in use can take; stations over the hall's or the round's. */
  static void oversize(Case given, Notes notes) {
    for (Group group : given.plan().groups()) {
      Round round = given.event().round(group.round());
      Hall hall = given.event().hall(group.hall());
      int size = group.competitors().size();
      long room = given.event().room(round, group.stations());
      notes.add(
          size - room,
          group,
          List.of(),
          () ->
              given.words().groupAndTime(group)
                  + " has "
                  + Wording.count(size, "competitor")
                  + " on "
                  + Wording.count(group.stations(), "station")
                  + ", which take "
                  + room
                  + ".");
      int most = given.event().mostStations(round, hall);
      notes.add(
          group.stations() - most,
          group,
          List.of(),
          () ->
              given.words().groupAndTime(group)
                  + " uses "
                  + Wording.count(group.stations(), "station")
                  + "; "
                  + given.words().hall(hall.id())
                  + " has "
                  + most
                  + " for it.");
    }
  }

  /** 5 min missing to the least time, or of difference from the minutes that are laid down. */
  static void tooShort(Case given, Notes notes) {
    for (Group group : given.plan().groups()) {
      Round round = given.event().round(group.round());
      Duration length = Duration.between(group.start(), group.end());
      if (round.minutesPerGroup().isPresent()) {
        int wanted = round.minutesPerGroup().getAsInt();
        notes.add(
            Notes.startedFives(length.minusMinutes(wanted).abs()),
            group,
            List.of(),
            () ->
                given.words().groupAndTime(group)
                    + " takes "
                    + Wording.minutes(length)
                    + " where it is to take "
                    + wanted
                    + ".");
      } else {
        long least = LeastTime.minutes(given.event(), group);
        notes.add(
            Notes.startedFives(Duration.ofMinutes(least).minus(length)),
            group,
            List.of(),
            () ->
                given.words().groupAndTime(group)
                    + " has "
                    + Wording.minutes(length)
                    + " and needs at least "
                    + least
                    + ".");
      }
    }
  }

  /** 1 for each group that starts off the grid with no pin to name its start. */
  static void offGrid(Case given, Notes notes) {
    int grid = given.event().rules().startGridMinutes();
    for (Group group : given.plan().groups()) {
      LocalTime start = group.start().atZone(given.event().zone(group.hall())).toLocalTime();
      boolean pinned =
          given.event().pins().groups().stream()
              .filter(pin -> pin.start().isPresent())
              .anyMatch(pin -> pin.round().equals(group.round()) && pin.number() == group.number());
      boolean off = start.toSecondOfDay() % (grid * 60) != 0;
      notes.add(
          off && !pinned ? 1 : 0,
          group,
          List.of(),
          () ->
              given.words().groupAndTime(group)
                  + " starts off the grid of "
                  + Wording.count(grid, "minute")
                  + ".");
    }
  }
}
