package roundwright.server;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertTrue;

import java.io.IOException;
import java.nio.file.Files;
import java.nio.file.Path;
import java.time.Clock;
import java.util.ArrayList;
import java.util.List;
import java.util.Locale;
import java.util.Map;
import java.util.Optional;
import java.util.Set;
import java.util.TreeSet;
import java.util.regex.Matcher;
import java.util.regex.Pattern;
import java.util.stream.Collectors;
import java.util.stream.Stream;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.api.io.TempDir;
import roundwright.server.web.Messages;
import roundwright.server.web.Route;

/** Reads the sources for what no compiler sees. */
class HouseTest {
  private static final Path ROOT = Path.of("..").toAbsolutePath().normalize();
  private static final int LONGEST_FILE_LINES = 620;
  private static final int LONGEST_LINE_LETTERS = 100;

  /** Generated: places and lengths on an axis of time, more than any one page uses. */
  private static final String CLOCK_SHEET = "clock.css";

  private static List<Path> files(String folder, String ending) throws IOException {
    try (Stream<Path> all = Files.walk(ROOT.resolve(folder))) {
      return all.filter(path -> path.toString().endsWith(ending)).sorted().toList();
    }
  }

  private static String read(Path file) {
    try {
      return Files.readString(file);
    } catch (IOException e) {
      throw new AssertionError(e);
    }
  }

  private static List<String> found(List<Path> files, Pattern pattern) {
    List<String> found = new ArrayList<>();
    for (Path file : files) {
      Matcher matcher = pattern.matcher(read(file));
      while (matcher.find()) {
        found.add(ROOT.relativize(file) + ": " + matcher.group());
      }
    }
    return found;
  }

  private static List<Path> templates() throws IOException {
    List<Path> templates = files("templates", ".html");
    assertTrue(templates.size() > 5, "no templates read");
    return templates;
  }

  @Test
  void no_template_writes_text_unescaped() throws IOException {
    assertEquals(List.of(), found(templates(), Pattern.compile("utext|\\[\\(")));
  }

  @Test
  void no_template_has_handlers_styles_or_scripts_of_its_own() throws IOException {
    Pattern own =
        Pattern.compile(
            "\\son[a-z]+\\s*=|\\sstyle\\s*=|th:style|th:on[a-z]+|<style|javascript:"
                + "|data-hx-on|hx-vals=.js:|<script(?![^>]*th:src)[^>]*>");
    assertEquals(List.of(), found(templates(), own));
  }

  @Test
  void every_post_form_carries_its_token() throws IOException {
    Pattern form = Pattern.compile("(?s)<form[^>]*method=\"post\".*?</form>");
    List<String> without =
        found(templates(), form).stream()
            .filter(text -> !text.contains("name=\"token\" th:value=\"${formToken}\""))
            .toList();
    assertEquals(List.of(), without);
    assertTrue(found(templates(), form).size() >= 5, "the forms were not found");
  }

  @Test
  void every_address_in_a_template_has_its_route(@TempDir Path folder) throws IOException {
    List<Route> routes;
    try (App app =
        App.start(
            Settings.local(folder.resolve("database"), 0), PlainSearch::plan, Clock.systemUTC())) {
      routes = app.routes();
    }
    Pattern address =
        Pattern.compile(
            "(?<method>method=\"post\"[^>]*?|data-hx-post=[^>]*?)?"
                + "(?:@\\{~?|(?:href|action|src)=\")(?<path>/[A-Za-z0-9/{}_-]*)");
    List<String> astray = new ArrayList<>();
    int read = 0;
    for (Path template : templates()) {
      Matcher matcher = address.matcher(read(template));
      while (matcher.find()) {
        read++;
        String method = matcher.group("method") == null ? "GET" : "POST";
        String path = matcher.group("path").replaceAll("\\{[a-z]+}", "x");
        boolean known =
            routes.stream()
                .anyMatch(
                    route ->
                        (route.method().name().equals(method) || method.equals("GET"))
                            && path.matches(
                                route
                                    .path()
                                    .replaceAll("\\{[a-z]+}", "[^/]+")
                                    .replaceAll("<[a-z]+>", ".+")));
        if (!known) {
          astray.add(ROOT.relativize(template) + ": " + method + " " + path);
        }
      }
    }
    assertTrue(read > 15, "the addresses were not found: " + read);
    assertEquals(List.of(), astray);
  }

  @Test
  void every_sentence_asked_for_is_there() throws IOException {
    Set<String> known = sentences().keySet();
    List<String> unknown = new ArrayList<>();
    Pattern inTemplate =
        Pattern.compile("#\\{(?<a>[a-z][a-z0-9.-]*)[({}]|say\\('(?<b>[a-z][a-z0-9.-]*)'[,)]");
    int read = 0;
    for (Path template : templates()) {
      Matcher matcher = inTemplate.matcher(read(template));
      while (matcher.find()) {
        read++;
        String key = matcher.group("a") == null ? matcher.group("b") : matcher.group("a");
        if (!known.contains(key)) {
          unknown.add(ROOT.relativize(template) + ": " + key);
        }
      }
    }
    Pattern inJava =
        Pattern.compile("\"(?<key>(?:form|account|planning|editions|event)\\.[a-z.-]+[a-z])\"");
    for (Path source : files("server/src/main/java", ".java")) {
      Matcher matcher = inJava.matcher(read(source));
      while (matcher.find()) {
        String key = matcher.group("key");
        boolean fileName = key.endsWith(".csv") || key.endsWith(".json");
        if (!fileName && !known.contains(key)) {
          unknown.add(ROOT.relativize(source) + ": " + key);
        }
      }
    }
    assertTrue(read > 50, "the keys were not found: " + read);
    assertEquals(List.of(), unknown);
  }

  @Test
  void every_rule_has_a_name_on_pages() throws IOException {
    List<String> missing =
        Stream.of(roundwright.scheduling.cost.RuleName.values())
            .map(rule -> "rule." + rule.word())
            .filter(key -> !sentences().containsKey(key))
            .toList();
    assertEquals(List.of(), missing);
  }

  @Test
  void every_sentence_is_used() throws IOException {
    String all =
        Stream.concat(templates().stream(), files("server/src/main/java", ".java").stream())
            .map(HouseTest::read)
            .collect(Collectors.joining("\n"));
    List<String> unused = new ArrayList<>();
    for (String key : new TreeSet<>(sentences().keySet())) {
      // Keys are also put together from a beginning and a word: 'rule.' + finding.rule.
      boolean used = all.contains(key);
      for (int dot = key.indexOf('.'); dot > 0 && !used; dot = key.indexOf('.', dot + 1)) {
        used =
            all.contains("'" + key.substring(0, dot + 1) + "'")
                || all.contains("\"" + key.substring(0, dot + 1) + "\"")
                || all.contains("\"" + key.substring(0, dot) + "\"");
      }
      if (!used) {
        unused.add(key);
      }
    }
    assertEquals(List.of(), unused);
  }

  private static Map<String, String> sentences() {
    return new Messages(Optional.of(ROOT)).patterns(Locale.ENGLISH);
  }

  @Test
  void every_file_of_sentences_is_read() throws IOException {
    Set<String> there =
        files("templates/messages/en", ".properties").stream()
            .map(path -> path.getFileName().toString().replace(".properties", ""))
            .collect(Collectors.toSet());
    assertEquals(there, Set.copyOf(Messages.SUBJECTS));
  }

  @Test
  void no_template_holds_a_sentence_that_is_shown() throws IOException {
    Pattern element =
        Pattern.compile(
            "<(?<tag>[a-z0-9]+)(?<rest>(?:[^>\"]|\"[^\"]*\")*)>(?<text>[^<]*\\p{L}[^<]*)<");
    List<String> bare = new ArrayList<>();
    for (Path template : templates()) {
      String text = read(template).replaceAll("(?s)<!--.*?-->", "");
      Matcher matcher = element.matcher(text);
      while (matcher.find()) {
        boolean filled = matcher.group("rest").matches("(?s).*th:(text|replace|insert|utext).*");
        boolean key = matcher.group("tag").equals("kbd");
        if (!filled && !key && !matcher.group("text").isBlank()) {
          bare.add(ROOT.relativize(template) + ": " + matcher.group());
        }
      }
    }
    assertTrue(element.matcher("<p class=\"a\">Some text<b").find());
    assertEquals(List.of(), bare);
  }

  @Test
  void every_class_of_the_style_sheets_is_used_somewhere() throws IOException {
    String users =
        Stream.of(templates(), files("static", ".js"), files("server/src/main/java", ".java"))
            .flatMap(List::stream)
            .map(HouseTest::read)
            .collect(Collectors.joining("\n"));
    Pattern selector = Pattern.compile("\\.(-?[a-zA-Z][a-zA-Z0-9_-]*)(?=[^{}]*\\{)");
    List<String> unused = new ArrayList<>();
    int read = 0;
    for (Path sheet : files("static/css", ".css")) {
      if (sheet.getFileName().toString().equals(CLOCK_SHEET)) {
        continue;
      }
      String rules =
          read(sheet).replaceAll("(?s)/\\*.*?\\*/", "").replaceAll("url\\([^)]*\\)|\"[^\"]*\"", "");
      Set<String> names = new TreeSet<>();
      Matcher matcher = selector.matcher(rules);
      while (matcher.find()) {
        names.add(matcher.group(1));
      }
      read += names.size();
      for (String name : names) {
        String stem = name.contains("-") ? name.substring(0, name.lastIndexOf('-') + 1) : name;
        boolean used =
            Pattern.compile("(?<![A-Za-z0-9_-])" + Pattern.quote(name) + "(?![A-Za-z0-9_-])")
                    .matcher(users)
                    .find()
                || (name.contains("-")
                    && (users.contains("'" + stem + "'")
                        || users.contains("\"" + stem + "\"")
                        || users.contains(" " + stem + "' +")
                        || users.contains(" " + stem + "'")));
        if (!used) {
          unused.add(ROOT.relativize(sheet) + ": ." + name);
        }
      }
    }
    assertTrue(read > 40, "the classes were not found: " + read);
    assertEquals(List.of(), unused);
  }

  @Test
  void no_source_is_overlong() throws IOException {
    List<String> overlong = new ArrayList<>();
    for (Path source : files("server/src/main/java", ".java")) {
      List<String> lines = read(source).lines().toList();
      if (lines.size() > LONGEST_FILE_LINES) {
        overlong.add(ROOT.relativize(source) + ": " + lines.size() + " lines");
      }
      lines.stream()
          .filter(line -> line.length() > LONGEST_LINE_LETTERS && !line.startsWith("import "))
          .forEach(line -> overlong.add(ROOT.relativize(source) + ": " + line));
    }
    assertEquals(List.of(), overlong);
  }

  @Test
  void no_name_says_that_nobody_knew_what_it_is() throws IOException {
    Pattern vague = Pattern.compile("(?i).*(util|helper|manager|impl|misc)s?(\\.java|/.*)?$");
    List<String> names =
        files("server/src/main/java", ".java").stream()
            .map(path -> ROOT.relativize(path).toString())
            .filter(name -> vague.matcher(name).matches())
            .toList();
    assertEquals(List.of(), names);
  }

  @Test
  void time_comes_from_the_clock_that_was_handed_in() throws IOException {
    Pattern ownClock =
        Pattern.compile(
            "Instant\\.now\\(\\)|LocalDate(Time)?\\.now\\(\\)|currentTimeMillis|new Random\\(\\)"
                + "|Math\\.random");
    assertEquals(List.of(), found(files("server/src/main/java", ".java"), ownClock));
  }
}
