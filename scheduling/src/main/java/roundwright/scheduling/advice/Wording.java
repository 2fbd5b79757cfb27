package roundwright.scheduling.advice;

import java.math.BigDecimal;
import java.math.RoundingMode;
import java.time.Instant;
import java.time.LocalDate;
import java.time.ZoneId;
import java.time.ZonedDateTime;
import java.time.format.DateTimeFormatter;
import java.util.Collection;
import java.util.HashMap;
import java.util.List;
import java.util.Locale;
import java.util.Map;
import roundwright.scheduling.core.LocalClock;
import roundwright.scheduling.core.Problem;
import roundwright.scheduling.model.Discipline;
import roundwright.scheduling.model.Event;
import roundwright.scheduling.model.Group;
import roundwright.scheduling.model.Hall;
import roundwright.scheduling.model.Person;
import roundwright.scheduling.model.Role;
import roundwright.scheduling.model.Round;
import roundwright.scheduling.model.Venue;
import roundwright.scheduling.model.Window;

/** The words of advice: plain English, the same on every machine. */
final class Wording {
  private static final DateTimeFormatter CLOCK = DateTimeFormatter.ofPattern("HH:mm", Locale.ROOT);
  private static final int MOST_NAMES = 6;
  private static final List<Role> ROLES = List.of(Role.JUDGE, Role.SCRAMBLER, Role.RUNNER);

  private final ZoneId zone;
  private final Map<String, Person> people = new HashMap<>();
  private final Map<String, Round> rounds = new HashMap<>();
  private final Map<String, Discipline> disciplines = new HashMap<>();
  private final Map<String, Hall> halls = new HashMap<>();
  private final Map<String, ZoneId> zones = new HashMap<>();

  Wording(Event event) {
    zone = event.zone();
    event.people().forEach(person -> people.put(person.id(), person));
    event.rounds().forEach(round -> rounds.put(round.id(), round));
    event.disciplines().forEach(discipline -> disciplines.put(discipline.id(), discipline));
    for (Venue venue : event.venues()) {
      for (Hall hall : venue.halls()) {
        halls.put(hall.id(), hall);
        zones.put(hall.id(), venue.zone());
      }
    }
  }

  String name(String person) {
    return people.containsKey(person) ? oneLine(people.get(person).name()) : person;
  }

  /** A few names in full; of many the first, and how many more. */
  String names(Collection<String> ids) {
    List<String> names = ids.stream().limit(MOST_NAMES).map(this::name).toList();
    return listed(names, ids.size() - names.size());
  }

  String rounds(Collection<String> ids) {
    List<String> names = ids.stream().limit(MOST_NAMES).map(this::round).toList();
    return listed(names, ids.size() - names.size());
  }

  String halls(Collection<String> ids) {
    List<String> names = ids.stream().limit(MOST_NAMES).map(this::hall).toList();
    return listed(names, ids.size() - names.size());
  }

  static String listed(List<String> names, int more) {
    if (more > 0) {
      return String.join(", ", names) + " and " + more + " more";
    }
    return names.size() < 2
        ? String.join("", names)
        : String.join(", ", names.subList(0, names.size() - 1))
            + " and "
            + names.get(names.size() - 1);
  }

  /** A round, such as {@code 3x3x3 round 1}. */
  String round(String id) {
    Round round = rounds.get(id);
    return discipline(round.discipline()) + " round " + round.number();
  }

  String discipline(String id) {
    return oneLine(disciplines.get(id).name());
  }

  String hall(String id) {
    return oneLine(halls.get(id).name());
  }

  /** A group with its time, such as {@code group 2 of 3x3x3 round 1 (Sat 8 May 09:30-10:05)}. */
  String group(Group group) {
    return "group "
        + group.number()
        + " of "
        + round(group.round())
        + " ("
        + span(group.start(), group.end(), zones.get(group.hall()))
        + ")";
  }

  static String span(Instant from, Instant to, ZoneId zone) {
    ZonedDateTime start = from.atZone(zone);
    ZonedDateTime end = to.atZone(zone);
    return start.toLocalDate().equals(end.toLocalDate())
        ? time(from, zone) + "-" + CLOCK.format(end)
        : time(from, zone) + " to " + time(to, zone);
  }

  /** A moment in a hall's zone. */
  String timeIn(String hall, int minute) {
    return time(LocalClock.instant(minute), zones.get(hall));
  }

  /** A moment in the event's zone. */
  String time(int minute) {
    return time(LocalClock.instant(minute), zone);
  }

  static String time(Instant instant, ZoneId zone) {
    ZonedDateTime local = instant.atZone(zone);
    return day(local.toLocalDate()) + " " + CLOCK.format(local);
  }

  static String day(LocalDate date) {
    return threeLetters(date.getDayOfWeek())
        + " "
        + date.getDayOfMonth()
        + " "
        + threeLetters(date.getMonth());
  }

  private static String threeLetters(Enum<?> name) {
    return name.name().charAt(0) + name.name().substring(1, 3).toLowerCase(Locale.ROOT);
  }

  /** When somebody is there, in the event's zone. */
  String presence(String person) {
    List<Window> windows = people.get(person).available().orElse(null);
    if (windows == null) {
      return "is always there";
    }
    if (windows.isEmpty()) {
      return "is never there";
    }
    List<String> spans =
        windows.stream()
            .limit(MOST_NAMES)
            .map(window -> span(window.from(), window.to(), zone))
            .toList();
    return "is there " + listed(spans, windows.size() - spans.size());
  }

  /** What a role does in a round, such as {@code scramble 4x4x4}. */
  String can(int role, String round) {
    return switch (role) {
      case 0 -> "judge";
      case 1 -> "scramble " + discipline(rounds.get(round).discipline());
      case Problem.SOLVING -> "solve";
      default -> "run";
    };
  }

  static Role role(int role) {
    return ROLES.get(role);
  }

  /** A number with its noun, such as {@code 1 minute} or {@code 3 minutes}. */
  static String count(long number, String noun) {
    if (number != 1 && noun.endsWith("person")) {
      return number + " " + noun.substring(0, noun.length() - 6) + "people";
    }
    return number + " " + (number == 1 ? noun : noun + "s");
  }

  static String oneDecimal(BigDecimal number) {
    return number.setScale(1, RoundingMode.HALF_UP).toPlainString();
  }

  /** Begins with a capital where a word of ours stands first; a name keeps its own spelling. */
  static String capital(String says) {
    boolean ours = says.startsWith("group ") || says.startsWith("the ");
    return ours ? Character.toUpperCase(says.charAt(0)) + says.substring(1) : says;
  }

  static String oneLine(String text) {
    return text.replaceAll("[\\p{Cntrl}\\u2028\\u2029]+", " ");
  }
}
