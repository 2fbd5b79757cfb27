package roundwright.server.pages;

import java.net.HttpCookie;
import java.nio.file.Files;
import java.nio.file.Path;
import java.util.Base64;
import java.util.List;
import java.util.Map;
import java.util.logging.Level;
import org.openqa.selenium.Cookie;
import org.openqa.selenium.chrome.ChromeDriver;
import org.openqa.selenium.chrome.ChromeDriverService;
import org.openqa.selenium.chrome.ChromeOptions;
import org.openqa.selenium.logging.LogEntry;
import org.openqa.selenium.logging.LogType;
import org.openqa.selenium.logging.LoggingPreferences;
import roundwright.server.Browser;

/** A real browser: Debian's chromium and chromedriver by path, with a fresh profile. */
public final class Chromium implements AutoCloseable {
  private static final Path BROWSER = Path.of("/usr/bin/chromium");
  private static final Path DRIVER = Path.of("/usr/bin/chromedriver");
  private static final int TALLEST_SHOT = 4000;

  private final ChromeDriver driver;

  /** A window's size and the theme that the system wishes for. */
  public record Screen(int width, int height, String theme) {
    @Override
    public String toString() {
      return width + "x" + height + "-" + theme;
    }
  }

  public Chromium() {
    if (!Files.isExecutable(BROWSER) || !Files.isExecutable(DRIVER)) {
      throw new IllegalStateException(
          "The browser tests need "
              + BROWSER
              + " and "
              + DRIVER
              + ". On Debian: apt-get install chromium chromium-driver");
    }
    ChromeOptions options = new ChromeOptions();
    options.setBinary(BROWSER.toFile());
    options.addArguments(
        "--headless",
        "--no-sandbox",
        "--disable-gpu",
        "--disable-quic",
        "--no-first-run",
        "--disable-background-networking",
        "--disable-component-update",
        "--disable-sync",
        "--disable-dev-shm-usage",
        "--hide-scrollbars");
    LoggingPreferences logs = new LoggingPreferences();
    logs.enable(LogType.BROWSER, Level.ALL);
    logs.enable(LogType.PERFORMANCE, Level.ALL);
    options.setCapability("goog:loggingPrefs", logs);
    driver =
        new ChromeDriver(
            new ChromeDriverService.Builder().usingDriverExecutable(DRIVER.toFile()).build(),
            options);
  }

  public ChromeDriver driver() {
    return driver;
  }

  public void setScreen(Screen screen) {
    driver.executeCdpCommand(
        "Emulation.setDeviceMetricsOverride",
        Map.of(
            "width",
            screen.width(),
            "height",
            screen.height(),
            "deviceScaleFactor",
            1,
            "mobile",
            false));
    driver.executeCdpCommand(
        "Emulation.setEmulatedMedia",
        Map.of(
            "features",
            List.of(
                Map.of("name", "prefers-color-scheme", "value", screen.theme()),
                Map.of("name", "prefers-reduced-motion", "value", "reduce"))));
  }

  /** Gives the browser what another one was given, on the page's own host. */
  public void takeCookies(String root, Browser other) {
    driver.get(root + "/sign-in");
    for (HttpCookie cookie : other.cookies()) {
      driver.manage().addCookie(new Cookie(cookie.getName(), cookie.getValue(), "/"));
    }
  }

  public void forgetCookies() {
    driver.manage().deleteAllCookies();
  }

  public void open(String url) {
    driver.get(url);
  }

  /** What the console has said since it was last asked: errors, refused loads and violations. */
  public List<String> complaints() {
    return driver.manage().logs().get(LogType.BROWSER).getAll().stream()
        .filter(entry -> entry.getLevel().intValue() >= Level.WARNING.intValue())
        .map(LogEntry::getMessage)
        .toList();
  }

  /** What the browser's network has done since it was last asked, as lines of JSON. */
  public List<String> networkLog() {
    return driver.manage().logs().get(LogType.PERFORMANCE).getAll().stream()
        .map(LogEntry::getMessage)
        .toList();
  }

  @SuppressWarnings("TypeParameterUnusedInFormals")
  public <T> T ask(String script, Object... arguments) {
    @SuppressWarnings("unchecked")
    T answer = (T) driver.executeScript(script, arguments);
    return answer;
  }

  /** The whole page as a picture, however long it is. */
  public byte[] shot() {
    Long width = ask("return window.innerWidth");
    Long tall = ask("return Math.max(window.innerHeight, document.documentElement.scrollHeight)");
    Map<String, Object> picture =
        driver.executeCdpCommand(
            "Page.captureScreenshot",
            Map.of(
                "format",
                "png",
                "captureBeyondViewport",
                true,
                "clip",
                Map.of(
                    "x",
                    0,
                    "y",
                    0,
                    "width",
                    width,
                    "height",
                    Math.min(tall, TALLEST_SHOT),
                    "scale",
                    1)));
    return Base64.getDecoder().decode((String) picture.get("data"));
  }

  @Override
  public void close() {
    driver.quit();
  }
}
