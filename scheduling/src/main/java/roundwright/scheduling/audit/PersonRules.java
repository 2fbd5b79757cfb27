package roundwright.scheduling.audit;

import java.math.BigDecimal;
import java.math.MathContext;
import java.time.Duration;
import java.time.Instant;
import java.util.ArrayList;
import java.util.Comparator;
import java.util.List;
import java.util.Map;
import java.util.Optional;
import roundwright.scheduling.model.Group;
import roundwright.scheduling.model.Person;
import roundwright.scheduling.model.Round;
import roundwright.scheduling.model.Window;

/** Rules that look at all that one person must be at. */
final class PersonRules {
  private static final BigDecimal LOAD_UNIT_SQUARED = BigDecimal.valueOf(15L * 15L);
  private static final BigDecimal TEN = BigDecimal.TEN;

  private PersonRules() {}

  /** A commitment, or a busy time in no hall. */
  private record Item(Instant start, Instant end, Optional<Commitment> commitment) {}

  /** 1 for each commitment or busy time that starts before one could be there. */
  static void twoPlaces(Case given, Notes notes) {
    for (Map.Entry<String, List<Commitment>> person : given.plan().commitments().entrySet()) {
      List<Item> items = new ArrayList<>();
      for (Commitment commitment : person.getValue()) {
        items.add(new Item(commitment.start(), commitment.end(), Optional.of(commitment)));
      }
      for (Window busy : given.event().busy(person.getKey())) {
        items.add(new Item(busy.from(), busy.to(), Optional.empty()));
      }
      items.sort(Comparator.comparing(Item::start).thenComparing(Item::end));
      for (int i = 1; i < items.size(); i++) {
        Item item = items.get(i);
        for (Item before : items.subList(0, i)) {
          int wayMinutes = wayMinutes(given, before, item);
          if (item.start().isBefore(before.end().plus(Duration.ofMinutes(wayMinutes)))) {
            notes.add(
                BigDecimal.ONE,
                item.commitment().map(commitment -> commitment.group().id()),
                List.of(person.getKey()),
                () -> twoPlaces(given, person.getKey(), before, item, wayMinutes));
            break;
          }
        }
      }
    }
  }

  private static int wayMinutes(Case given, Item from, Item to) {
    return from.commitment().isPresent() && to.commitment().isPresent()
        ? given.event().wayMinutes(from.commitment().get().hall(), to.commitment().get().hall())
        : 0;
  }

  private static String twoPlaces(
      Case given, String person, Item before, Item item, int wayMinutes) {
    return given.words().name(person)
        + " "
        + what(given, item)
        + " and before that "
        + what(given, before)
        + (wayMinutes == 0
            ? "."
            : ", " + Wording.count(wayMinutes, "minute") + " away, without the time to get there.");
  }

  private static String what(Case given, Item item) {
    return item.commitment()
        .map(
            commitment ->
                Wording.doing(commitment.role())
                    + " in "
                    + given.words().groupAndTime(commitment.group()))
        .orElse("is wanted elsewhere");
  }

  /** 1 for each commitment outside the person's windows, a likely entrant's solving apart. */
  static void absent(Case given, Notes notes) {
    away(given, notes, false);
  }

  /** 1 for each merely likely entrant's solving outside their windows. */
  static void likelyAway(Case given, Notes notes) {
    away(given, notes, true);
  }

  private static void away(Case given, Notes notes, boolean likely) {
    for (Map.Entry<String, List<Commitment>> person : given.plan().commitments().entrySet()) {
      for (Commitment commitment : person.getValue()) {
        boolean away =
            !given.event().isThere(person.getKey(), commitment.start(), commitment.end());
        notes.add(
            away && isMerelyLikely(given, commitment) == likely ? 1 : 0,
            commitment.group(),
            List.of(person.getKey()),
            () ->
                given.words().name(person.getKey())
                    + (likely ? " likely " : " ")
                    + Wording.doing(commitment.role())
                    + " in "
                    + given.words().groupAndTime(commitment.group())
                    + " and is not there all the while.");
      }
    }
  }

  private static boolean isMerelyLikely(Case given, Commitment commitment) {
    Round round = given.event().round(commitment.group().round());
    return !commitment.isDuty()
        && given.event().areMerelyLikely(round)
        && given.event().isEntrant(commitment.person(), round);
  }

  /** (Duty minutes over the event / 15) squared / share. */
  static void load(Case given, Notes notes) {
    for (Map.Entry<String, List<Commitment>> person : given.plan().commitments().entrySet()) {
      long minutes = dutyMinutes(person.getValue());
      BigDecimal divisor =
          LOAD_UNIT_SQUARED.multiply(given.event().person(person.getKey()).effectiveShare());
      notes.add(
          BigDecimal.valueOf(minutes).pow(2).divide(divisor, MathContext.DECIMAL128),
          Optional.empty(),
          List.of(person.getKey()),
          () ->
              given.words().name(person.getKey())
                  + " has "
                  + Wording.count(minutes, "minute")
                  + " of duty at the event.");
    }
  }

  static long dutyMinutes(List<Commitment> commitments) {
    return commitments.stream().filter(Commitment::isDuty).mapToLong(Commitment::minutes).sum();
  }

  /** 1 per group solved in that starts too soon after another commitment has ended. */
  static void breathing(Case given, Notes notes) {
    Duration breathing = Duration.ofMinutes(given.event().rules().breathingMinutes());
    for (Map.Entry<String, List<Commitment>> person : given.plan().commitments().entrySet()) {
      for (Commitment solving : person.getValue()) {
        if (solving.isDuty()) {
          continue;
        }
        for (Commitment other : person.getValue()) {
          Duration pause = Duration.between(other.end(), solving.start());
          if (!pause.isNegative() && pause.compareTo(breathing) < 0) {
            notes.add(
                1,
                solving.group(),
                List.of(person.getKey()),
                () ->
                    given.words().name(person.getKey())
                        + " solves in "
                        + given.words().groupAndTime(solving.group())
                        + " "
                        + Wording.minutes(pause)
                        + " after "
                        + given.words().group(other.group())
                        + ".");
            break;
          }
        }
      }
    }
  }

  /** Tenths of the duty minutes over the longest run, per chain of close commitments. */
  static void longRun(Case given, Notes notes) {
    Duration rest = Duration.ofMinutes(given.event().rules().restMinutes());
    for (Map.Entry<String, List<Commitment>> person : given.plan().commitments().entrySet()) {
      List<Commitment> chain = new ArrayList<>();
      Instant latestEnd = Instant.MIN;
      for (Commitment commitment : person.getValue()) {
        if (!chain.isEmpty() && !commitment.start().isBefore(latestEnd.plus(rest))) {
          longRun(given, notes, person.getKey(), chain);
          chain = new ArrayList<>();
        }
        chain.add(commitment);
        latestEnd = commitment.end().isAfter(latestEnd) ? commitment.end() : latestEnd;
      }
      longRun(given, notes, person.getKey(), chain);
    }
  }

  private static void longRun(Case given, Notes notes, String person, List<Commitment> chain) {
    long minutes = dutyMinutes(chain);
    int longest = given.event().rules().longestRunMinutes();
    Group first = chain.get(0).group();
    notes.add(
        BigDecimal.valueOf(minutes - longest).divide(TEN),
        Optional.of(first.id()),
        List.of(person),
        () ->
            given.words().name(person)
                + " has "
                + Wording.count(minutes, "minute")
                + " of duty without a rest from "
                + given.words().time(first.start(), given.event().zone(first.hall()))
                + "; "
                + longest
                + " are enough.");
  }

  /** 1 per duty of a newcomer that starts before the end of the first group they solve in. */
  static void greenJudge(Case given, Notes notes) {
    for (Map.Entry<String, List<Commitment>> entry : given.plan().commitments().entrySet()) {
      Person person = given.event().person(entry.getKey());
      Optional<Commitment> first =
          entry.getValue().stream().filter(commitment -> !commitment.isDuty()).findFirst();
      if (!person.newcomer() || first.isEmpty()) {
        continue;
      }
      for (Commitment duty : entry.getValue()) {
        boolean green = duty.isDuty() && duty.start().isBefore(first.get().end());
        notes.add(
            green ? 1 : 0,
            duty.group(),
            List.of(person.id()),
            () ->
                given.words().name(person.id())
                    + " is new and "
                    + Wording.doing(duty.role())
                    + " in "
                    + given.words().groupAndTime(duty.group())
                    + " before having solved in "
                    + given.words().group(first.get().group())
                    + ".");
      }
    }
  }
}
