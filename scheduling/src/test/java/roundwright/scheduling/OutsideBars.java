package roundwright.scheduling;

import java.io.IOException;
import java.io.PrintStream;
import java.io.UncheckedIOException;
import java.nio.file.Files;
import java.nio.file.Path;
import java.util.List;
import java.util.Locale;
import java.util.Map;
import roundwright.scheduling.model.Event;
import roundwright.scheduling.model.Plan;

/**
 * The open sets of published problems, each planned for a minute: what is reached beside what is
 * published and what our bars allow. Values come from the values.tsv beside the instances.
 */
final class OutsideBars {
  private static final PrintStream OUT = System.out;
  private static final double SECONDS = 60;
  private static final int SMALL_GRAPH = 130;

  /** Where a bar is not the published value itself: periods, and colours of one hard graph. */
  private static final Map<String, Integer> OWN_BARS =
      Map.of(
          "hec-s-92.stu", 18,
          "tre-s-92.stu", 21,
          "ear-f-83.stu", 24,
          "rye-s-93.stu", 23,
          "le450_15c.col", 20);

  private OutsideBars() {}

  static void print(List<String> names) {
    String folder = System.getenv("ROUNDWRIGHT_OUTSIDE");
    if (folder == null) {
      OUT.println("ROUNDWRIGHT_OUTSIDE names no folder of published instances; nothing measured.");
      return;
    }
    for (String family : List.of("graph-colouring", "exam-timetabling", "open-shop")) {
      Path from = Path.of(folder, family);
      try {
        for (String line : Files.readAllLines(from.resolve("values.tsv"))) {
          String[] columns = line.split("\t", -1);
          boolean asked = names.isEmpty() || names.contains(columns[0]);
          if (asked && !columns[0].equals("file")) {
            measure(from.resolve(columns[0]), columns[0], columns[2], published(columns[3]));
          }
        }
      } catch (IOException unreadable) {
        throw new UncheckedIOException(unreadable);
      }
    }
  }

  /** The first whole number in words such as "min periods 17; given periods 18". */
  private static int published(String value) {
    return Integer.parseInt(value.replaceAll("^\\D*(\\d+).*$", "$1"));
  }

  private static int allowed(String name, String size, int published) {
    if (OWN_BARS.containsKey(name)) {
      return OWN_BARS.get(name);
    }
    if (name.startsWith("ta7x7")) {
      return published + published / 100;
    }
    boolean largeGraph =
        name.endsWith(".col")
            && Integer.parseInt(size.replaceAll("^n=(\\d+).*$", "$1")) > SMALL_GRAPH;
    return largeGraph ? published + 1 : published;
  }

  private static void measure(Path file, String name, String size, int published)
      throws IOException {
    Event event = OutsideEvents.read(file);
    Plan plan = Planner.plan(event, Effort.ofSeconds(SECONDS), Progress.NONE);
    int unit = name.endsWith("os.txt") ? 1 : OutsideEvents.SLOT_MINUTES;
    int reached = OutsideEvents.minutes(plan) / unit;
    long broken = plan.score().orElseThrow().breaches();
    int allowed = allowed(name, size, published);
    OUT.printf(
        Locale.ROOT,
        "%-17s reached %3d, published %3d, allowed %3d, %d breaches: %s%n",
        name,
        reached,
        published,
        allowed,
        broken,
        broken == 0 && reached <= allowed ? "met" : "missed");
  }
}
