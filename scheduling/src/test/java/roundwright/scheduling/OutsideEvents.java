package roundwright.scheduling;

import java.io.IOException;
import java.nio.file.Files;
import java.nio.file.Path;
import java.time.Duration;
import java.time.Instant;
import java.util.ArrayList;
import java.util.Arrays;
import java.util.List;
import java.util.Map;
import java.util.TreeSet;
import roundwright.scheduling.cost.Level;
import roundwright.scheduling.cost.RuleName;
import roundwright.scheduling.model.Event;
import roundwright.scheduling.model.Group;
import roundwright.scheduling.model.Plan;

/**
 * Published problems as events: every round is one group in a hall of its own or a machine's, there
 * are no duties, no ways and no pauses, and nothing but the length of the day has a price. What
 * must come out is the least such length.
 */
final class OutsideEvents {
  static final int SLOT_MINUTES = 10;

  private static final int STATIONS = 500;

  private OutsideEvents() {}

  private static Scene scene() {
    Scene scene = new Scene();
    for (RuleName rule : RuleName.values()) {
      if (rule.level() == Level.STRAIN) {
        scene.weight(rule, rule == RuleName.LATE_FINISH ? 1 : 0);
      }
    }
    return scene
        .rule("changeoverMinutes", 0)
        .rule("setupMinutes", 0)
        .rule("breathingMinutes", 0)
        .rule("startGridMinutes", 1)
        .rule("fill", 4)
        .rule("meals", List.of());
  }

  private static void round(Scene scene, String id, String hall, int minutes) {
    scene
        .round("r" + id, "d" + id, 1)
        .set("halls", List.of(hall))
        .set("groups", 1)
        .set("minutesPerGroup", minutes)
        .set("crew", Map.of("judges", 0, "scramblers", 0, "runners", 0));
  }

  /** Rounds of one length, each in its own hall, and the rounds that each person is entered in. */
  private static Event slots(int rounds, List<int[]> people) {
    Scene scene = scene().rule("startGridMinutes", SLOT_MINUTES);
    for (int r = 0; r < rounds; r++) {
      scene.hall("h" + r, STATIONS).open("00:00-2/00:00");
      scene.discipline("d" + r);
    }
    for (int r = 0; r < rounds; r++) {
      round(scene, String.valueOf(r), "h" + r, SLOT_MINUTES);
    }
    boolean[] entered = new boolean[rounds];
    for (int p = 0; p < people.size(); p++) {
      scene.person("p" + p);
      for (int r : people.get(p)) {
        scene.enters("d" + r, 10);
        entered[r] = true;
      }
    }
    for (int r = 0; r < rounds; r++) {
      if (!entered[r]) {
        scene.person("alone" + r).enters("d" + r, 10);
      }
    }
    return scene.event();
  }

  /** A vertex is a round, an edge a person entered in both; slots in use are colours. */
  record Graph(int vertices, List<int[]> edges) {
    Event event() {
      return slots(vertices, edges);
    }

    /** The DIMACS format, in which an edge may be given twice. */
    static Graph read(Path file) throws IOException {
      int vertices = 0;
      TreeSet<Integer> seen = new TreeSet<>();
      List<int[]> edges = new ArrayList<>();
      for (String line : Files.readAllLines(file)) {
        String[] words = line.strip().split("\\s+", -1);
        if (words[0].equals("p")) {
          vertices = Integer.parseInt(words[2]);
        } else if (words[0].equals("e")) {
          int a = Integer.parseInt(words[1]) - 1;
          int b = Integer.parseInt(words[2]) - 1;
          if (a != b && seen.add(Math.min(a, b) * vertices + Math.max(a, b))) {
            edges.add(new int[] {a, b});
          }
        }
      }
      return new Graph(vertices, edges);
    }

    /** The squares of a board, joined where a queen goes from one to the other. */
    static Graph queen(int side) {
      List<int[]> edges = new ArrayList<>();
      for (int a = 0; a < side * side; a++) {
        for (int b = a + 1; b < side * side; b++) {
          int down = b / side - a / side;
          int across = Math.abs(b % side - a % side);
          if (down == 0 || across == 0 || down == across) {
            edges.add(new int[] {a, b});
          }
        }
      }
      return new Graph(side * side, edges);
    }

    /**
     * Mycielski's graphs (Mycielski 1955), DIMACS's numbering: from one edge, each time a shadow
     * for every vertex, joined to its neighbours, and one vertex joined to all shadows.
     */
    static Graph mycielski(int number) {
      Graph graph = new Graph(2, List.of(new int[] {0, 1}));
      for (int i = 1; i < number; i++) {
        int n = graph.vertices;
        List<int[]> edges = new ArrayList<>(graph.edges);
        for (int[] edge : graph.edges) {
          edges.add(new int[] {edge[0], n + edge[1]});
          edges.add(new int[] {edge[1], n + edge[0]});
        }
        for (int v = 0; v < n; v++) {
          edges.add(new int[] {n + v, 2 * n});
        }
        graph = new Graph(2 * n + 1, edges);
      }
      return graph;
    }
  }

  /** A line a student with the numbers of their exams: an exam is a round. */
  static Event exams(Path file) throws IOException {
    List<int[]> students = new ArrayList<>();
    for (String line : Files.readAllLines(file)) {
      if (!line.isBlank()) {
        students.add(
            Arrays.stream(line.strip().split("\\s+"))
                .mapToInt(word -> Integer.parseInt(word) - 1)
                .distinct()
                .toArray());
      }
    }
    int exams = students.stream().flatMapToInt(Arrays::stream).max().orElse(-1) + 1;
    return slots(exams, students);
  }

  /** A machine is a hall, a job a person, each job on each machine a round of that one person. */
  static Event openShop(List<int[]> minutes) {
    Scene scene = scene();
    int machines = minutes.get(0).length;
    for (int m = 0; m < machines; m++) {
      scene.hall("h" + m, 1).open("00:00-2/00:00");
    }
    for (int j = 0; j < minutes.size(); j++) {
      for (int m = 0; m < machines; m++) {
        String id = j + "-" + m;
        scene.discipline("d" + id);
        round(scene, id, "h" + m, minutes.get(j)[m]);
      }
    }
    for (int j = 0; j < minutes.size(); j++) {
      scene.person("p" + j);
      for (int m = 0; m < machines; m++) {
        scene.enters("d" + j + "-" + m, 10);
      }
    }
    return scene.event();
  }

  static Event openShop(Path file) throws IOException {
    List<int[]> jobs = new ArrayList<>();
    for (String line : Files.readAllLines(file)) {
      if (!line.isBlank()) {
        jobs.add(Arrays.stream(line.strip().split("\\s+")).mapToInt(Integer::parseInt).toArray());
      }
    }
    return openShop(jobs.subList(1, jobs.size()));
  }

  /** Of any of the three families, by the file's name. */
  static Event read(Path file) throws IOException {
    String name = file.toString();
    if (name.endsWith(".col")) {
      return Graph.read(file).event();
    }
    return name.endsWith(".stu") ? exams(file) : openShop(file);
  }

  /** From the first start to the last end. */
  static int minutes(Plan plan) {
    Instant first = plan.groups().stream().map(Group::start).min(Instant::compareTo).get();
    Instant last = plan.groups().stream().map(Group::end).max(Instant::compareTo).get();
    return Math.toIntExact(Duration.between(first, last).toMinutes());
  }
}
