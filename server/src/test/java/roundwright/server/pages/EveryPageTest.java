package roundwright.server.pages;

import static org.junit.jupiter.api.Assertions.assertEquals;

import com.deque.html.axecore.results.Results;
import com.deque.html.axecore.results.Rule;
import com.deque.html.axecore.selenium.AxeBuilder;
import java.io.IOException;
import java.net.URI;
import java.net.http.HttpResponse;
import java.nio.file.Files;
import java.util.ArrayList;
import java.util.List;
import java.util.Map;
import java.util.Set;
import java.util.stream.Stream;
import org.junit.jupiter.api.AfterAll;
import org.junit.jupiter.api.BeforeAll;
import org.junit.jupiter.api.Tag;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.api.extension.RegisterExtension;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.MethodSource;
import roundwright.server.pages.Chromium.Screen;

/**
 * Every page there is, in a real browser, at three sizes and in both themes: axe, the console, the
 * content policy, sideways scroll, size of targets; its HTML by the Nu checker; and a picture of it
 * in {@code target/screenshots}. A page without a sample fails.
 */
@Tag("browser")
class EveryPageTest {
  @RegisterExtension static final Quillhaven QUILLHAVEN = new Quillhaven();

  private static final List<Screen> SCREENS =
      List.of(
          new Screen(360, 740, "light"),
          new Screen(360, 740, "dark"),
          new Screen(768, 1024, "light"),
          new Screen(768, 1024, "dark"),
          new Screen(1440, 900, "light"),
          new Screen(1440, 900, "dark"));
  private static final Screen NARROWEST = new Screen(320, 640, "light");

  private static Chromium chromium;

  @BeforeAll
  static void start() {
    QUILLHAVEN.beginLastingSearch();
    chromium = new Chromium();
  }

  @AfterAll
  static void stop() {
    if (chromium != null) {
      chromium.close();
    }
  }

  static Stream<Sample> samples() {
    return Sample.ALL.stream();
  }

  @Test
  void everyPageOfTheRouteTableHasASample() {
    assertEquals(Set.of(), Sample.missing(QUILLHAVEN.app().routes()));
  }

  @ParameterizedTest
  @MethodSource("samples")
  void aPageHoldsUpOnEveryScreen(Sample sample) throws IOException {
    chromium.forgetCookies();
    chromium.takeCookies(QUILLHAVEN.root(), QUILLHAVEN.browserOf(sample));
    chromium.complaints();
    List<String> wrong = new ArrayList<>();
    for (Screen screen : SCREENS) {
      chromium.setScreen(screen);
      if (screen.theme().equals("light")) {
        chromium.open(QUILLHAVEN.address(sample));
      }
      wrong.addAll(faults(sample, screen));
      if (screen.width() != 768) {
        Files.write(
            Quillhaven.target("screenshots").resolve(sample.name() + "-" + screen + ".png"),
            chromium.shot());
      }
    }
    chromium.setScreen(NARROWEST);
    chromium.open(QUILLHAVEN.address(sample));
    wrong.addAll(sidewaysScroll(NARROWEST));
    if (sample.forPhones()) {
      chromium.setScreen(SCREENS.get(0));
      chromium.ask("document.documentElement.style.fontSize = '200%'; return null");
      sidewaysScroll(SCREENS.get(0)).forEach(line -> wrong.add("at twice the text: " + line));
    }
    assertEquals("", String.join("\n", wrong));
  }

  private static List<String> faults(Sample sample, Screen screen) {
    List<String> wrong = new ArrayList<>();
    chromium.complaints().stream()
        .filter(line -> !(sample.status() >= 400 && line.contains("status of " + sample.status())))
        .forEach(line -> wrong.add(screen + ": console: " + line));
    wrong.addAll(axe(screen));
    wrong.addAll(sidewaysScroll(screen));
    wrong.addAll(smallTargets(screen, screen.width() < 400 ? 44 : 24));
    return wrong;
  }

  private static List<String> axe(Screen screen) {
    Results results = new AxeBuilder().analyze(chromium.driver());
    List<String> wrong = new ArrayList<>();
    for (Rule rule : results.getViolations()) {
      rule.getNodes()
          .forEach(
              node ->
                  wrong.add(
                      screen
                          + ": axe: "
                          + rule.getId()
                          + ": "
                          + rule.getHelp()
                          + ": "
                          + node.getHtml()));
    }
    return wrong;
  }

  private static List<String> sidewaysScroll(Screen screen) {
    long width = chromium.<Long>ask("return document.documentElement.scrollWidth");
    return width > screen.width()
        ? List.of(screen + ": the page is " + width + " wide")
        : List.of();
  }

  /** Links in the run of a sentence are excepted, as WCAG 2.5.8 does. */
  private static List<String> smallTargets(Screen screen, int least) {
    List<Map<String, Object>> small =
        chromium.ask(
            """
            const least = arguments[0];
            return [...document.querySelectorAll("a[href], button, input, select, summary")]
              .filter(e => e.type !== "hidden" && !e.classList.contains("skip"))
              .filter(e => e.checkVisibility())
              .filter(e => !(getComputedStyle(e).display === "inline"
                && e.parentElement.textContent.trim() !== e.textContent.trim()))
              .map(e => ({ what: e.outerHTML.slice(0, 120), box: e.getBoundingClientRect() }))
              .filter(e => Math.round(e.box.height) < least || Math.round(e.box.width) < least)
              .map(e => ({ what: e.what, size: `${e.box.width}x${e.box.height}` }));
            """,
            least);
    return small.stream()
        .map(
            one ->
                screen + ": smaller than " + least + ": " + one.get("size") + " " + one.get("what"))
        .toList();
  }

  @ParameterizedTest
  @MethodSource("samples")
  void thePageIsValidHtml(Sample sample) {
    URI address = URI.create(QUILLHAVEN.address(sample));
    String query = address.getQuery() == null ? "" : "?" + address.getQuery();
    HttpResponse<String> answer = QUILLHAVEN.browserOf(sample).get(address.getPath() + query);
    assertEquals(sample.status(), answer.statusCode());
    assertEquals(List.of(), NuChecker.errors(answer.body()));
  }
}
