package roundwright.scheduling;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertTrue;

import java.io.IOException;
import java.io.UncheckedIOException;
import java.nio.file.Files;
import java.nio.file.Path;
import java.util.ArrayList;
import java.util.List;
import java.util.Set;
import java.util.TreeSet;
import java.util.function.Predicate;
import java.util.regex.Matcher;
import java.util.regex.Pattern;
import java.util.stream.Stream;
import org.junit.jupiter.api.Test;

/** Reads the sources of this module and holds them to the rules of the house. */
final class HouseTest {
  private static final Path MAIN = Path.of("src", "main", "java");
  private static final Path TESTS = Path.of("src", "test", "java");
  private static final int MOST_LINES = 550;
  private static final int MOST_LINES_OF_A_TEST = 800;
  private static final int MOST_LINES_OF_A_METHOD = 80;

  /** The only place that looks at a clock: it decides when to stop, and nothing else. */
  private static final Set<String> MAY_LOOK_AT_A_CLOCK = new TreeSet<>(Set.of("Spending.java"));

  private static final Pattern CLOCK =
      Pattern.compile(
          "Instant\\.now|LocalDate(Time)?\\.now|ZonedDateTime\\.now|currentTimeMillis|nanoTime"
              + "|Clock\\.system");
  private static final Pattern UNSEEDED =
      Pattern.compile(
          "Math\\.random|new (Secure|Splittable)?Random\\(\\)|ThreadLocalRandom|UUID\\.random"
              + "|Collections\\.shuffle\\(\\w+\\)|identityHashCode|IdentityHashMap|parallelStream");
  private static final Pattern LOOSE_ARITHMETIC =
      Pattern.compile("\\bMath\\.(exp|log|log10|pow|sin|cos|tan|cbrt|expm1|log1p)\\(");
  private static final Pattern UNORDERED_DECLARED =
      Pattern.compile(
          "(\\w+) =\\s+(?:new (?:Hash|Identity|Concurrent)\\w*(?:Map|Set)\\b|(?:Set|Map)\\."
              + "(?:of|copyOf|ofEntries)\\()");
  private static final Pattern UNORDERED_AT_ONCE =
      Pattern.compile(
          "(?:Set|Map)\\.(?:of|copyOf)\\([^;)][^;]*\\)\\s*\\.(?:stream|forEach|iterator)");
  private static final Pattern POOR_NAME =
      Pattern.compile("(Manager|Helper|Utils?|Impl|Data)\\.java$|^I[A-Z][a-z].*\\.java$");
  private static final Pattern MEMBER_START =
      Pattern.compile("^(  |    )[\\w@<].*\\{$|^(  |    )\\w.*\\($");
  private static final Pattern TYPE =
      Pattern.compile("^\\s*(?:[\\w-]+ )*(?:class|record|interface|enum) .*");
  private static final Pattern PUBLIC_TYPE =
      Pattern.compile("^(?:  )?public (?:[\\w-]+ )*(?:class|record|interface|enum) \\w+.*");

  private record Source(Path path, List<String> lines) {
    String name() {
      return path.getFileName().toString();
    }

    String text() {
      return String.join("\n", lines);
    }
  }

  private static List<Source> sources(Path root) {
    try (Stream<Path> paths = Files.walk(root)) {
      List<Source> sources = new ArrayList<>();
      for (Path path : paths.filter(path -> path.toString().endsWith(".java")).sorted().toList()) {
        sources.add(new Source(path, Files.readAllLines(path)));
      }
      assertTrue(sources.size() > 10, "Sources are read from " + root.toAbsolutePath());
      return sources;
    } catch (IOException unreadable) {
      throw new UncheckedIOException(unreadable);
    }
  }

  private static void assertNone(String rule, List<String> offences) {
    assertEquals("", String.join("\n", offences), rule);
  }

  private static List<String> linesThat(Predicate<String> condition, List<Source> sources) {
    List<String> found = new ArrayList<>();
    for (Source source : sources) {
      for (int i = 0; i < source.lines().size(); i++) {
        String line = source.lines().get(i);
        if (!line.strip().startsWith("*") && condition.test(line)) {
          found.add(source.path() + ":" + (i + 1) + " " + line.strip());
        }
      }
    }
    return found;
  }

  @Test
  void files_can_be_read_in_one_sitting() {
    List<String> offences = new ArrayList<>();
    for (Source source : sources(MAIN)) {
      if (source.lines().size() > MOST_LINES) {
        offences.add(source.path() + " has " + source.lines().size() + " lines");
      }
    }
    for (Source source : sources(TESTS)) {
      if (source.lines().size() > MOST_LINES_OF_A_TEST) {
        offences.add(source.path() + " has " + source.lines().size() + " lines");
      }
    }
    assertNone("Split by subject", offences);
  }

  @Test
  void methods_fit_a_screen() {
    List<String> offences = new ArrayList<>();
    List<Source> sources = new ArrayList<>(sources(MAIN));
    sources.addAll(sources(TESTS));
    for (Source source : sources) {
      List<String> lines = source.lines();
      for (int i = 0; i < lines.size(); i++) {
        Matcher start = MEMBER_START.matcher(lines.get(i));
        if (!start.matches() || TYPE.matcher(lines.get(i)).matches()) {
          continue;
        }
        String indent = lines.get(i).startsWith("    ") ? "    " : "  ";
        int end = i + 1;
        while (end < lines.size() && !lines.get(end).equals(indent + "}")) {
          end++;
        }
        boolean nested = indent.length() == 4 && !isMemberOfNestedType(lines, i);
        if (!nested && end < lines.size() && end - i + 1 > MOST_LINES_OF_A_METHOD) {
          offences.add(
              source.path()
                  + ":"
                  + (i + 1)
                  + " has "
                  + (end - i + 1)
                  + " lines: "
                  + lines.get(i).strip());
        }
      }
    }
    assertNone("Take a part out and name it", offences);
  }

  /** Whether the nearest line above that is indented less begins a type. */
  private static boolean isMemberOfNestedType(List<String> lines, int index) {
    for (int i = index - 1; i >= 0; i--) {
      String line = lines.get(i);
      if (!line.isBlank() && !line.startsWith("   ")) {
        return TYPE.matcher(line).matches();
      }
    }
    return false;
  }

  @Test
  void nothing_looks_at_a_clock_but_the_spending_of_a_budget() {
    assertNone(
        "A plan may not depend on when it was made: pass the time in",
        linesThat(
            line -> CLOCK.matcher(line).find(),
            sources(MAIN).stream()
                .filter(source -> !MAY_LOOK_AT_A_CLOCK.contains(source.name()))
                .toList()));
  }

  @Test
  void nothing_is_left_to_chance_without_a_seed() {
    assertNone(
        "The same seed must give the same plan: draw from the generator that is passed in",
        linesThat(line -> UNSEEDED.matcher(line).find(), sources(MAIN)));
  }

  @Test
  void arithmetic_is_the_same_on_every_machine() {
    assertNone(
        "Math's transcendental functions may differ by platform: use StrictMath",
        linesThat(line -> LOOSE_ARITHMETIC.matcher(line).find(), sources(MAIN)));
  }

  @Test
  void nothing_goes_through_a_set_or_map_in_no_order() {
    List<String> offences = new ArrayList<>();
    for (Source source : sources(MAIN)) {
      String text = source.text();
      Set<String> names = new TreeSet<>();
      Matcher declared = UNORDERED_DECLARED.matcher(text);
      while (declared.find()) {
        names.add(declared.group(1));
      }
      for (String name : names) {
        Pattern through =
            Pattern.compile(
                "\\b"
                    + name
                    + "\\s*\\.(keySet|values|entrySet|forEach|stream|iterator|toArray)\\("
                    + "|: (this\\.)?"
                    + name
                    + "\\)"
                    + "|(addAll|copyOf|new ArrayList<>|new LinkedHash\\w+<>)\\("
                    + name
                    + "\\)");
        Matcher matcher = through.matcher(text);
        while (matcher.find()) {
          offences.add(source.path() + ":" + lineOf(text, matcher.start()) + " " + matcher.group());
        }
      }
      Matcher atOnce = UNORDERED_AT_ONCE.matcher(text);
      while (atOnce.find()) {
        offences.add(source.path() + ":" + lineOf(text, atOnce.start()) + " " + atOnce.group());
      }
    }
    assertNone("Their order differs from run to run: use a Tree or a Linked one", offences);
  }

  private static long lineOf(String text, int position) {
    return text.substring(0, position).chars().filter(c -> c == '\n').count() + 1;
  }

  @Test
  void names_say_what_a_thing_is() {
    assertNone(
        "Name it by what it is in the hall",
        sources(MAIN).stream()
            .map(Source::name)
            .filter(name -> POOR_NAME.matcher(name).find())
            .toList());
  }

  @Test
  void every_package_and_every_public_type_says_what_it_is() {
    List<String> offences = new ArrayList<>();
    Set<Path> folders = new TreeSet<>();
    for (Source source : sources(MAIN)) {
      folders.add(source.path().getParent());
      for (int i = 0; i < source.lines().size(); i++) {
        if (PUBLIC_TYPE.matcher(source.lines().get(i)).matches() && !isDocumented(source, i)) {
          offences.add(source.path() + ":" + (i + 1) + " " + source.lines().get(i).strip());
        }
      }
    }
    for (Path folder : folders) {
      if (!Files.exists(folder.resolve("package-info.java"))) {
        offences.add(folder + " has no package-info.java");
      }
    }
    assertNone("Define it in one sentence", offences);
  }

  private static boolean isDocumented(Source source, int line) {
    int above = line - 1;
    while (above >= 0 && source.lines().get(above).strip().startsWith("@")) {
      above--;
    }
    return above >= 0 && source.lines().get(above).strip().endsWith("*/");
  }

  @Test
  void nothing_is_left_undone_or_printed() {
    List<Source> sources = new ArrayList<>(sources(MAIN));
    assertNone(
        "Do it, or report it through what is returned",
        linesThat(
            line ->
                line.contains("TO" + "DO")
                    || line.contains("FIX" + "ME")
                    || line.contains("printStackTrace")
                    || line.contains("System.out")
                    || line.contains("System.err"),
            sources));
  }
}
