package roundwright.server;

import java.io.IOException;
import java.io.UncheckedIOException;
import java.nio.file.Files;
import java.nio.file.Path;
import java.time.Duration;
import java.util.Comparator;
import java.util.Map;
import java.util.stream.Stream;
import org.junit.jupiter.api.extension.AfterAllCallback;
import org.junit.jupiter.api.extension.BeforeAllCallback;
import org.junit.jupiter.api.extension.ExtensionContext;
import roundwright.server.planning.Search;

/** A real server on a real database file of its own, for all tests of a class. */
public final class Served implements BeforeAllCallback, AfterAllCallback {
  public static final String HOST_NAME = "Ottoline Vane";
  public static final String HOST_PASSWORD = "four small copper kettles";

  private final TestClock clock = new TestClock();
  private final Search search;
  private Path folder;
  private App app;

  /** A server whose plans are found at once. */
  public Served() {
    this(PlainSearch::plan);
  }

  public Served(Search search) {
    this.search = search;
  }

  @Override
  public void beforeAll(ExtensionContext context) throws IOException {
    folder = Files.createTempDirectory("roundwright-test");
    app = App.start(Settings.local(folder.resolve("database"), 0), search, clock);
  }

  @Override
  public void afterAll(ExtensionContext context) throws IOException {
    app.close();
    try (Stream<Path> files = Files.walk(folder)) {
      files.sorted(Comparator.reverseOrder()).forEach(Served::delete);
    }
  }

  private static void delete(Path file) {
    try {
      Files.delete(file);
    } catch (IOException e) {
      throw new UncheckedIOException(e);
    }
  }

  public App app() {
    return app;
  }

  public TestClock clock() {
    return clock;
  }

  public Browser browser() {
    return new Browser(app);
  }

  /** A browser in which the server's host has signed in, who is made where there is none yet. */
  public Browser hostBrowser() {
    Browser browser = browser();
    app.firstSetUpLink()
        .ifPresentOrElse(
            link -> {
              String path = link.substring(link.indexOf("/setup/"));
              browser.submit(path, path, Map.of("name", HOST_NAME, "password", HOST_PASSWORD));
            },
            () -> signIn(browser, HOST_NAME, HOST_PASSWORD));
    return browser;
  }

  public void signIn(Browser browser, String name, String password) {
    int status =
        browser
            .submit("/sign-in", "/sign-in", Map.of("name", name, "password", password))
            .statusCode();
    if (status != 303) {
      throw new AssertionError("Signing in as " + name + " gave " + status);
    }
  }

  /** Moves the server's clock on. */
  public void later(Duration stretch) {
    clock.moveOn(stretch);
  }
}
