package roundwright.scheduling.audit;

import java.math.BigDecimal;
import java.math.MathContext;
import java.time.Duration;
import java.time.Instant;
import java.time.LocalDate;
import java.time.ZoneId;
import java.util.ArrayList;
import java.util.Comparator;
import java.util.List;
import java.util.Optional;
import roundwright.scheduling.model.Rules;
import roundwright.scheduling.model.Window;

/** Rules that look at one person's day. */
final class DayRules {
  private static final BigDecimal SECONDS_PER_HOUR = BigDecimal.valueOf(3600);

  private DayRules() {}

  /**
   * Somebody's day.
   *
   * @param commitments those that start on it, in time
   */
  private record Day(String person, LocalDate date, List<Commitment> commitments) {
    Commitment first() {
      return commitments.get(0);
    }

    Instant largestEnd() {
      return commitments.stream().map(Commitment::end).max(Comparator.naturalOrder()).orElseThrow();
    }
  }

  private static List<Day> days(Case given) {
    List<Day> days = new ArrayList<>();
    given
        .plan()
        .commitments()
        .forEach(
            (person, commitments) ->
                given
                    .plan()
                    .days(commitments)
                    .forEach((date, ofDay) -> days.add(new Day(person, date, ofDay))));
    return days;
  }

  /** 5 min of duty over the most that the person does in a day. */
  static void overworked(Case given, Notes notes) {
    for (Day day : days(given)) {
      long minutes = PersonRules.dutyMinutes(day.commitments());
      int most = given.event().person(day.person()).maxDutyMinutesPerDay();
      notes.add(
          Notes.startedFives(Duration.ofMinutes(minutes - most)),
          List.of(day.person()),
          () ->
              given.words().name(day.person())
                  + " has "
                  + Wording.count(minutes, "minute")
                  + " of duty on "
                  + given.words().day(day.date())
                  + " and does "
                  + most
                  + " at most.");
    }
  }

  /** Hours from the first start to the largest end. */
  static void waiting(Case given, Notes notes) {
    for (Day day : days(given)) {
      Duration length = Duration.between(day.first().start(), day.largestEnd());
      ZoneId zone = given.event().zone(day.first().hall());
      notes.add(
          BigDecimal.valueOf(length.toSeconds()).divide(SECONDS_PER_HOUR, MathContext.DECIMAL128),
          Optional.empty(),
          List.of(day.person()),
          () ->
              given.words().name(day.person())
                  + " is needed from "
                  + given.words().time(day.first().start(), zone)
                  + " to "
                  + given.words().time(day.largestEnd(), zone)
                  + ".");
    }
  }

  /** 1 for each pair of neighbouring commitments in different halls, 6 in different venues. */
  static void hops(Case given, Notes notes) {
    for (Day day : days(given)) {
      for (int i = 1; i < day.commitments().size(); i++) {
        Commitment from = day.commitments().get(i - 1);
        Commitment to = day.commitments().get(i);
        boolean sameVenue =
            given.event().venueOf(from.hall()).id().equals(given.event().venueOf(to.hall()).id());
        int hop = from.hall().equals(to.hall()) ? 0 : sameVenue ? 1 : 6;
        notes.add(
            hop,
            to.group(),
            List.of(day.person()),
            () ->
                given.words().name(day.person())
                    + " goes from "
                    + given.words().hall(from.hall())
                    + " to "
                    + given.words().hall(to.hall())
                    + " for "
                    + given.words().groupAndTime(to.group())
                    + ".");
      }
    }
  }

  /** 1 per day and meal, touched by a commitment, that leaves no free stretch long enough. */
  static void noMeal(Case given, Notes notes) {
    for (Day day : days(given)) {
      ZoneId zone = given.event().zone(day.first().hall());
      List<Commitment> all = given.plan().commitments().get(day.person());
      for (Rules.Meal meal : given.event().rules().meals()) {
        Instant from = day.date().atTime(meal.from()).atZone(zone).toInstant();
        Instant to = day.date().atTime(meal.to()).atZone(zone).toInstant();
        boolean touched =
            all.stream()
                .anyMatch(
                    commitment ->
                        commitment.start().isBefore(to) && from.isBefore(commitment.end()));
        if (!touched || longestFree(given, day.person(), all, from, to) >= meal.minutes()) {
          continue;
        }
        notes.add(
            1,
            List.of(day.person()),
            () ->
                given.words().name(day.person())
                    + " finds no "
                    + Wording.count(meal.minutes(), "minute")
                    + " to eat on "
                    + given.words().day(day.date())
                    + " between "
                    + meal.from()
                    + " and "
                    + meal.to()
                    + ".");
      }
    }
  }

  /** Minutes of the longest stretch between two instants without commitment or busy time. */
  private static long longestFree(
      Case given, String person, List<Commitment> commitments, Instant from, Instant to) {
    List<Window> taken = new ArrayList<>(given.event().busy(person));
    commitments.forEach(commitment -> taken.add(new Window(commitment.start(), commitment.end())));
    Instant free = from;
    long longest = 0;
    for (Window window : Window.merged(taken)) {
      Instant next = window.from().isBefore(to) ? window.from() : to;
      longest = Math.max(longest, Duration.between(free, next).toMinutes());
      free = window.to().isAfter(free) ? window.to() : free;
    }
    return Math.max(longest, Duration.between(free, to).toMinutes());
  }
}
