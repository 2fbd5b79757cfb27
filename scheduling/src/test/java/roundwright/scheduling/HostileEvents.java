package roundwright.scheduling;

import java.util.List;
import java.util.Map;
import java.util.Optional;
import java.util.Random;
import roundwright.scheduling.advice.Impossible.Kind;

/** Families of events that an organiser would rather not have, each made from a seed. */
public enum HostileEvents {
  /** The one scrambler of a discipline solves in it too. */
  ONE_SCRAMBLER,
  /** A discipline that one person entered. */
  LONE_ENTRANT,
  /** Everybody is in every discipline, each of them one group: nobody is left for its crew. */
  EVERYBODY_IN_EVERYTHING,
  /** Somebody who can do nothing but solve. */
  NO_SKILLS,
  /** The hall is open for exactly as long as the groups and their setups take. */
  NO_SLACK,
  /** The same with five minutes less. */
  LESS_THAN_NO_SLACK,
  /** Pins that no plan can keep all of. */
  CONTRADICTORY_PINS,
  /** A night in which the clocks are put back while the halls are open. */
  CLOCK_CHANGE_NIGHT,
  /** Three venues, each in a zone of its own, and each round in one of them. */
  THREE_ZONES,
  /** Rounds, halls and helpers, and no entry. */
  NOBODY_ENTERS;

  /** What the advice must say is impossible; nothing where a plan without breach or gap exists. */
  public Optional<Kind> named() {
    return switch (this) {
      case ONE_SCRAMBLER, EVERYBODY_IN_EVERYTHING -> Optional.of(Kind.TOO_FEW_SKILLED);
      case LESS_THAN_NO_SLACK -> Optional.of(Kind.HALLS_TOO_FULL);
      case CONTRADICTORY_PINS -> Optional.of(Kind.PINS_CONTRADICT);
      default -> Optional.empty();
    };
  }

  public Scene scene(long seed) {
    Random random = new Random(seed);
    return switch (this) {
      case ONE_SCRAMBLER -> oneScrambler(random);
      case LONE_ENTRANT -> loneEntrant(random);
      case EVERYBODY_IN_EVERYTHING -> everybodyInEverything(random);
      case NO_SKILLS -> noSkills(random);
      case NO_SLACK -> tight(random, 0);
      case LESS_THAN_NO_SLACK -> tight(random, 5);
      case CONTRADICTORY_PINS -> contradictoryPins(random);
      case CLOCK_CHANGE_NIGHT -> clockChangeNight(random);
      case THREE_ZONES -> threeZones(random);
      case NOBODY_ENTERS -> nobodyEnters(random);
    };
  }

  private static Scene oneScrambler(Random random) {
    Scene scene = house(random, "cube3", "cube4");
    crowd(scene, random, 10, List.of("cube3"), List.of("cube3"));
    crowd(scene, random, 8, List.of("cube4"), List.of("cube3"));
    return scene.person("lone").enters("cube4", 40).scrambles("cube4");
  }

  private static Scene loneEntrant(Random random) {
    Scene scene = house(random, "cube3", "cube4");
    crowd(scene, random, 12, List.of("cube3"), List.of("cube3", "cube4"));
    crowd(scene, random, 6, List.of(), List.of("cube3", "cube4"));
    return scene.person("lone").enters("cube4", 40);
  }

  private static Scene everybodyInEverything(Random random) {
    Scene scene = house(random, "cube3", "cube4", "cube5");
    List<String> all = List.of("cube3", "cube4", "cube5");
    crowd(scene, random, 8 + random.nextInt(3), all, all);
    return scene;
  }

  private static Scene noSkills(Random random) {
    Scene scene = house(random, "cube3");
    crowd(scene, random, 12, List.of(), List.of("cube3"));
    return scene.person("lone").enters("cube3", 20);
  }

  private static Scene contradictoryPins(Random random) {
    Scene scene = house(random, "cube3", "cube4");
    crowd(scene, random, 14, List.of("cube3"), List.of("cube3"));
    crowd(scene, random, 14, List.of("cube4"), List.of("cube3", "cube4"));
    for (String hall : List.of("main", "side")) {
      scene.pin("groups", "round", "cube3-1", "number", 1, "hall", hall);
    }
    scene.pin("duties", "person", "p1", "round", "cube4-1", "number", 1, "role", "scrambler");
    return scene.pin("competitors", "person", "p2", "round", "cube4-1", "number", 1);
  }

  private static Scene clockChangeNight(Random random) {
    Scene scene =
        new Scene().zone("Europe/Lisbon").hall("main", 4).open("2027-10-30T22:00-2027-10-31T05:00");
    rounds(scene, "cube3", "cube4");
    scene.rule("meals", List.of());
    crowd(scene, random, 9, List.of("cube3"), List.of("cube3", "cube4"));
    crowd(scene, random, 9, List.of("cube4"), List.of("cube3", "cube4"));
    return scene;
  }

  private static Scene threeZones(Random random) {
    Scene scene = new Scene().zone("Europe/Lisbon");
    List<String> zones = List.of("Europe/Lisbon", "Asia/Kathmandu", "America/St_Johns");
    for (int v = 0; v < zones.size(); v++) {
      scene.venue("v" + v).set("zone", zones.get(v)).hall("h" + v, 4).open("09:00-18:00");
    }
    rounds(scene, "cube3");
    scene.set("halls", List.of("h0"));
    rounds(scene, "cube4");
    scene.set("halls", List.of("h1"));
    rounds(scene, "cube5");
    scene.set("halls", List.of("h2"));
    List<String> all = List.of("cube3", "cube4", "cube5");
    for (String discipline : all) {
      crowd(scene, random, 5, List.of(discipline), all);
    }
    crowd(scene, random, 5, List.of(), all);
    return scene;
  }

  private static Scene nobodyEnters(Random random) {
    Scene scene = house(random, "cube3", "cube4");
    crowd(scene, random, 6, List.of(), List.of("cube3", "cube4"));
    return scene;
  }

  private static Scene house(Random random, String... disciplines) {
    Scene scene =
        new Scene()
            .hall("main", 6 + random.nextInt(2))
            .open("09:00-18:00")
            .hall("side", 6)
            .open("09:00-18:00");
    rounds(scene, disciplines);
    return scene;
  }

  private static void rounds(Scene scene, String... disciplines) {
    for (String discipline : disciplines) {
      scene.discipline(discipline).round(discipline + "-1", discipline, 1);
    }
  }

  /** So many people who judge, run and scramble, numbered on from those there are. */
  private static void crowd(
      Scene scene, Random random, int people, List<String> enters, List<String> scrambles) {
    int before = scene.people();
    for (int i = 0; i < people; i++) {
      scene.person("p" + (before + i)).judges().runs();
      scene.scrambles(scrambles.toArray(String[]::new));
      for (String discipline : enters) {
        scene.enters(discipline, 10 + random.nextInt(30));
      }
    }
  }

  private static Scene tight(Random random, int lessMinutes) {
    int rounds = 3 + random.nextInt(4);
    int minutes = 10 + 5 * random.nextInt(5);
    int open = rounds * minutes + (rounds - 1) * 5 - lessMinutes;
    String end = String.format(java.util.Locale.ROOT, "%02d:%02d", 9 + open / 60, open % 60);
    Scene scene = new Scene().hall("main", 4).open("09:00-" + end);
    for (int r = 0; r < rounds; r++) {
      rounds(scene, "d" + r);
      scene.set("minutesPerGroup", minutes);
      scene.set("crew", Map.of("judges", 1, "scramblers", 1, "runners", 0));
    }
    for (int r = 0; r < rounds; r++) {
      crowd(scene, random, 2, List.of("d" + r), List.of());
    }
    String[] all = new String[rounds];
    java.util.Arrays.setAll(all, r -> "d" + r);
    crowd(scene, random, 3, List.of(), List.of(all));
    return scene;
  }
}
