package roundwright.scheduling.audit;

import java.math.BigDecimal;
import java.math.RoundingMode;
import java.time.Duration;
import java.time.Instant;
import java.time.LocalDate;
import java.time.ZoneId;
import java.time.ZonedDateTime;
import java.time.format.DateTimeFormatter;
import java.util.Collection;
import java.util.Locale;
import java.util.Optional;
import java.util.stream.Collectors;
import roundwright.scheduling.model.Group;
import roundwright.scheduling.model.Role;
import roundwright.scheduling.model.Round;

/** The words of findings: plain English, the same on every machine. */
final class Wording {
  private static final DateTimeFormatter CLOCK = DateTimeFormatter.ofPattern("HH:mm", Locale.ROOT);

  private final Directory event;

  Wording(Directory event) {
    this.event = event;
  }

  String name(String person) {
    return oneLine(event.person(person).name());
  }

  String names(Collection<String> people) {
    return people.stream().map(this::name).collect(Collectors.joining(", "));
  }

  /** A round, such as {@code 3x3x3 round 1}; by its id where it has left the event. */
  String round(String id) {
    Optional<Round> round = event.roundIfKnown(id);
    return round
        .map(known -> oneLine(event.discipline(known).name()) + " round " + known.number())
        .orElse("round " + id);
  }

  /** A group, such as {@code group 2 of 3x3x3 round 1}. */
  String group(Group group) {
    return "group " + group.number() + " of " + round(group.round());
  }

  /** A group with its time, such as {@code group 2 of 3x3x3 round 1 (Sat 8 May 09:30-10:05)}. */
  String groupAndTime(Group group) {
    return group(group) + " (" + span(group) + ")";
  }

  String span(Group group) {
    ZoneId zone = event.zone(group.hall());
    return time(group.start(), zone) + "-" + CLOCK.format(group.end().atZone(zone));
  }

  String hall(String id) {
    return oneLine(event.hall(id).name());
  }

  String time(Instant instant, ZoneId zone) {
    ZonedDateTime local = instant.atZone(zone);
    return day(local.toLocalDate()) + " " + CLOCK.format(local);
  }

  String day(LocalDate date) {
    return threeLetters(date.getDayOfWeek())
        + " "
        + date.getDayOfMonth()
        + " "
        + threeLetters(date.getMonth());
  }

  private static String threeLetters(Enum<?> name) {
    return name.name().charAt(0) + name.name().substring(1, 3).toLowerCase(Locale.ROOT);
  }

  static String doing(Optional<Role> role) {
    return role.map(
            duty ->
                switch (duty) {
                  case JUDGE -> "judges";
                  case SCRAMBLER -> "scrambles";
                  case RUNNER -> "runs";
                })
        .orElse("solves");
  }

  /** A number with its noun, such as {@code 1 minute} or {@code 3 minutes}. */
  static String count(long number, String noun) {
    return number + " " + (number == 1 ? noun : noun.equals("person") ? "people" : noun + "s");
  }

  static String minutes(Duration length) {
    return count((length.toSeconds() + 59) / 60, "minute");
  }

  static String oneDecimal(BigDecimal number) {
    return number.setScale(1, RoundingMode.HALF_UP).toPlainString();
  }

  static String oneLine(String text) {
    return text.replaceAll("[\\p{Cntrl}\\u2028\\u2029]+", " ");
  }
}
