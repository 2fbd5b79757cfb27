package roundwright.scheduling;

import java.math.BigDecimal;
import java.util.ArrayList;
import java.util.List;
import java.util.Locale;
import java.util.Map;
import java.util.Random;
import roundwright.scheduling.cost.Level;
import roundwright.scheduling.cost.RuleName;

/** Events made by chance from a seed, through the file format, so that each is a good file. */
public final class RandomEvents {
  private static final int LARGE = 1000;
  private static final List<String> COUNTED_BY =
      List.of("average-of-5", "mean-of-3", "best-of-5", "best-of-3", "best-of-2", "best-of-1");
  private static final List<String> ZONES =
      List.of("Europe/Lisbon", "Europe/Madrid", "Asia/Kathmandu", "America/St_Johns");

  private final Random random;
  private final Scene scene = new Scene();
  private final List<String> halls = new ArrayList<>();
  private final List<String> disciplines = new ArrayList<>();
  private final List<String> rounds = new ArrayList<>();
  private final List<String> people = new ArrayList<>();

  private RandomEvents(long seed) {
    this.random = new Random(seed);
  }

  /** A small event that uses every optional key now and then, sensible or not. */
  public static Scene wild(long seed) {
    return new RandomEvents(seed).wild();
  }

  /**
   * A believable event: one zone, days of ten hours, lunch, most people in several disciplines and
   * on crews, some newcomers, households and late arrivals.
   */
  public static Scene fair(long seed, int people, int halls, int days) {
    return new RandomEvents(seed).fair(people, halls, days);
  }

  private boolean chance(double probability) {
    return random.nextDouble() < probability;
  }

  private int between(int least, int most) {
    return least + random.nextInt(most - least + 1);
  }

  private <T> T any(List<T> list) {
    return list.get(random.nextInt(list.size()));
  }

  private BigDecimal tenths(int least, int most) {
    return BigDecimal.valueOf(between(least, most), 1);
  }

  private String stretch(int day, int earliestHour, int latestHour) {
    int from = between(earliestHour * 60, latestHour * 60 - 10);
    int to = between(from + 5, latestHour * 60);
    return clock(day, from) + "-" + clock(day, to);
  }

  private static String clock(int day, int minute) {
    return day + "/" + String.format(Locale.ROOT, "%02d:%02d", minute / 60, minute % 60);
  }

  private Scene wild() {
    scene.zone(any(ZONES));
    int venues = between(1, 3);
    for (int v = 0; v < venues; v++) {
      scene.venue("v" + v);
      if (chance(0.4)) {
        scene.set("zone", any(ZONES));
      }
      for (int h = between(1, 3); h > 0; h--) {
        String id = "h" + halls.size();
        halls.add(id);
        scene.hall(id, between(1, 12));
        if (chance(0.7)) {
          scene.open(stretch(1, 7, 20), stretch(1, 7, 20), stretch(2, 7, 20));
        }
        if (chance(0.5)) {
          scene.set("features", chance(0.5) ? List.of("quiet") : List.of("quiet", "dark"));
        }
        if (chance(0.3)) {
          scene.set("occupancy", between(1, 20));
        }
      }
      if (v > 0 && chance(0.6)) {
        scene.travel("v" + v, "v" + (v - 1), between(0, 40));
      }
    }
    for (int f = between(0, 3); f > 0; f--) {
      scene.fixedPoint(stretch(between(1, 2), 9, 18));
      if (chance(0.5)) {
        scene.set("halls", List.of(any(halls)));
      }
    }
    for (int d = between(1, 5); d > 0; d--) {
      wildDiscipline("d" + d);
    }
    for (int p = between(3, 30); p > 0; p--) {
      wildPerson(p);
    }
    for (String discipline : disciplines) {
      wildRounds(discipline);
    }
    wildRules();
    wildPins();
    return scene;
  }

  private void wildDiscipline(String id) {
    disciplines.add(id);
    scene.discipline(id);
    if (chance(0.5)) {
      scene.set("handlingSeconds", tenths(0, 900)).set("scrambleSeconds", tenths(0, 600));
    }
    if (chance(0.5)) {
      scene.set("carrySeconds", tenths(0, 300));
    }
    if (chance(0.2)) {
      scene.set("needs", List.of(chance(0.9) ? "quiet" : "dark"));
    }
  }

  private void wildPerson(int index) {
    String id = "p" + index;
    people.add(id);
    scene.person(id);
    for (String discipline : disciplines) {
      if (chance(0.6)) {
        scene.enters(discipline, chance(0.3) ? between(1, 6) * 10 : tenths(1, 2000));
      }
      if (chance(0.3)) {
        scene.scrambles(discipline);
      }
    }
    if (chance(0.7)) {
      scene.judges();
    }
    if (chance(0.6)) {
      scene.runs();
    }
    if (chance(0.3)) {
      scene.available(stretch(1, 6, 21), stretch(1, 6, 21), stretch(2, 6, 21));
    } else if (chance(0.05)) {
      scene.available();
    }
    if (chance(0.2)) {
      scene.busy(stretch(1, 8, 18), stretch(between(1, 2), 8, 18));
    }
    if (chance(0.4)) {
      scene.set("household", "f" + between(1, 4));
    }
    scene.set("newcomer", chance(0.3));
    if (chance(0.3)) {
      scene.set("maxDutyMinutesPerDay", between(0, 300));
    }
    if (chance(0.2)) {
      scene.set("share", tenths(1, 100));
    }
  }

  private void wildRounds(String discipline) {
    int count = between(1, 3);
    boolean[] continues = new boolean[count + 1];
    for (int n = 1; n < count; n++) {
      continues[n] = chance(0.25);
    }
    for (int n = 0; n < count; n++) {
      String id = discipline + "-" + (n + 1);
      rounds.add(id);
      scene.round(id, discipline, n + 1).set("countedBy", any(COUNTED_BY));
      scene.set("continues", n > 0 && continues[n]);
      if ((n + 1 < count && !continues[n + 1]) || chance(0.05)) {
        scene.advance("count", between(1, 12));
        if (chance(0.4)) {
          scene.advance("percent", tenths(10, 1000));
        } else if (chance(0.3)) {
          scene.advance("underSeconds", tenths(1, 2000));
        }
      }
      wildRound(discipline);
    }
  }

  private void wildRound(String discipline) {
    if (chance(0.3)) {
      scene.set("timeLimitSeconds", tenths(10, 2000));
    }
    if (chance(0.3)) {
      scene.set("limitCovers", "round");
    }
    if (chance(0.4)) {
      scene.set("cutOff", Map.of("attempts", between(1, 4), "seconds", between(1, 6) * 10));
    }
    if (chance(0.3)) {
      scene.set("halls", chance(0.5) ? List.of(any(halls)) : List.of(halls.get(0)));
    }
    if (chance(0.3)) {
      scene.set("seating", chance(0.5) ? "fixed" : "rotating");
    }
    if (chance(0.3)) {
      scene.set("fill", BigDecimal.valueOf(between(50, 400), 2));
    }
    if (chance(0.3)) {
      scene.set("stations", between(1, 10));
    }
    if (chance(0.2)) {
      scene.set("groups", between(1, 4));
    }
    if (chance(0.2)) {
      scene.set("minutesPerGroup", between(1, 60));
    }
    if (chance(0.2)) {
      scene.set(
          "crew",
          Map.of("judges", between(0, 4), "scramblers", between(0, 2), "runners", between(0, 2)));
    }
    scene.set("seeding", any(List.of("slow-first", "fast-first", "mixed")));
    if (chance(0.2)) {
      scene.set("notBefore", Scene.time(clock(1, between(480, 900))));
    }
    if (chance(0.2)) {
      scene.set("notAfter", Scene.time(clock(1, between(600, 1200))));
    }
    if (chance(0.1)) {
      scene.set("entrants", scene.entered(discipline).stream().filter(p -> chance(0.7)).toList());
    }
  }

  private void wildRules() {
    Map<String, Object> candidates =
        Map.ofEntries(
            Map.entry("seating", "fixed"),
            Map.entry("fill", BigDecimal.valueOf(between(50, 400), 2)),
            Map.entry("stationsPerScrambler", tenths(0, 60)),
            Map.entry("stationsPerRunner", tenths(0, 60)),
            Map.entry("changeoverMinutes", between(0, 20)),
            Map.entry("setupMinutes", between(0, 20)),
            Map.entry("turnaroundMinutes", between(0, 40)),
            Map.entry("startGridMinutes", between(1, 60)),
            Map.entry("slack", tenths(10, 30)),
            Map.entry("breathingMinutes", between(0, 30)),
            Map.entry("restMinutes", between(0, 40)),
            Map.entry("longestRunMinutes", between(0, 120)));
    for (String key : candidates.keySet().stream().sorted().toList()) {
      if (chance(0.3)) {
        scene.rule(key, candidates.get(key));
      }
    }
    if (chance(0.3)) {
      scene.rule(
          "meals",
          List.of(
              Map.of("from", "12:00", "to", "13:00", "minutes", between(1, 60)),
              Map.of("from", "17:30", "to", "19:45", "minutes", between(1, 90))));
    }
    for (RuleName rule : RuleName.values()) {
      if (rule.level() == Level.STRAIN && chance(0.2)) {
        scene.weight(rule, chance(0.3) ? 0 : tenths(1, 200));
      }
    }
  }

  private void wildPins() {
    for (int i = between(0, 3); i > 0; i--) {
      String round = any(rounds);
      int number = between(1, 3);
      switch (between(0, 4)) {
        case 0 -> scene.pin("groups", "round", round, "number", number, "hall", any(halls));
        case 1 ->
            scene.pin(
                "groups",
                "round",
                round,
                "number",
                number,
                "start",
                Scene.time(clock(1, between(480, 1000))));
        case 2 -> scene.pin("competitors", "person", any(people), "round", round, "number", number);
        default ->
            scene.pin(
                "duties",
                "person",
                any(people),
                "round",
                round,
                "number",
                number,
                "role",
                any(List.of("judge", "scrambler", "runner")));
      }
    }
  }

  private Scene fair(int peopleCount, int hallCount, int days) {
    scene.zone("Europe/Lisbon").venue("v0");
    for (int h = 0; h < hallCount; h++) {
      if (h == 3) {
        scene.travel("v0", "v1", 15).venue("v1");
      }
      String[] open = new String[days];
      for (int day = 1; day <= days; day++) {
        open[day - 1] = day + "/09:00-" + day + "/19:00";
      }
      scene.hall("h" + h, peopleCount < LARGE ? between(14, 24) : between(28, 44)).open(open);
      if (h == hallCount - 1) {
        scene.set("features", List.of("quiet"));
      }
    }
    for (int day = 1; day <= days; day++) {
      scene.fixedPoint(day + "/12:30-" + day + "/13:15");
    }
    int disciplineCount = Math.min(12, 3 + peopleCount / 40);
    for (int d = 0; d < disciplineCount; d++) {
      disciplines.add("d" + d);
      scene.discipline("d" + d);
    }
    for (int p = 0; p < peopleCount; p++) {
      fairPerson(p, days);
    }
    for (int d = 0; d < disciplineCount; d++) {
      int entered = scene.entered("d" + d).size();
      int count = d < 2 && entered > 40 ? 3 : entered > 24 ? 2 : 1;
      for (int n = 1; n <= count; n++) {
        scene.round("d" + d + "-" + n, "d" + d, n);
        scene.set("countedBy", d % 3 == 2 ? "mean-of-3" : "average-of-5");
        if (n < count) {
          scene.advance("percent", n + 1 == count ? 30 : 60);
        }
      }
    }
    return scene;
  }

  private void fairPerson(int index, int days) {
    scene.person(String.format(Locale.ROOT, "p%04d", index));
    double speed = 0.6 + random.nextDouble() * 1.4;
    boolean helperOnly = index % 17 == 16;
    for (int d = 0; d < disciplines.size() && !helperOnly; d++) {
      if (chance(d == 0 ? 0.9 : 0.45)) {
        int tenthsOfSeconds = (int) (speed * (150 + 90 * d)) + random.nextInt(60);
        scene.enters("d" + d, BigDecimal.valueOf(tenthsOfSeconds, 1));
      }
    }
    if (chance(0.85)) {
      scene.judges();
    }
    if (chance(0.8)) {
      scene.runs();
    }
    scene.scrambles(disciplines.stream().filter(id -> chance(0.35)).toArray(String[]::new));
    if (chance(0.1)) {
      scene.available("1/10:30-" + days + "/18:00");
    }
    if (chance(0.05)) {
      scene.busy("1/09:00-1/10:00");
    }
    if (chance(0.2)) {
      scene.set("household", "f" + index / 10);
    }
    scene.set("newcomer", chance(0.12));
  }
}
