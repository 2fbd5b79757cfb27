package roundwright.server.pages;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertTrue;

import com.fasterxml.jackson.core.JsonProcessingException;
import com.fasterxml.jackson.databind.JsonNode;
import com.fasterxml.jackson.databind.json.JsonMapper;
import java.time.Duration;
import java.util.LinkedHashSet;
import java.util.List;
import java.util.Map;
import java.util.Set;
import org.junit.jupiter.api.AfterEach;
import org.junit.jupiter.api.BeforeEach;
import org.junit.jupiter.api.Tag;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.api.extension.RegisterExtension;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.ValueSource;
import org.openqa.selenium.By;
import org.openqa.selenium.JavascriptExecutor;
import org.openqa.selenium.WebElement;
import org.openqa.selenium.support.ui.ExpectedConditions;
import org.openqa.selenium.support.ui.WebDriverWait;
import roundwright.server.Served;
import roundwright.server.pages.Chromium.Screen;

/** What people do, from the first page to the last, in a real browser. */
@Tag("browser")
class PathsTest {
  @RegisterExtension static final Quillhaven QUILLHAVEN = new Quillhaven();

  private static final Screen LAPTOP = new Screen(1440, 900, "light");
  private static final Screen PHONE = new Screen(360, 740, "light");
  private static final int FIRST_VISIT_BYTES = 60 * 1024;
  private static final int NEXT_VISIT_BYTES = 15 * 1024;
  private static final int MOST_REQUESTS = 8;

  private Chromium chromium;

  @BeforeEach
  void start() {
    chromium = new Chromium();
  }

  @AfterEach
  void stop() {
    chromium.close();
  }

  private WebElement find(String css) {
    return chromium.driver().findElement(By.cssSelector(css));
  }

  private WebDriverWait patiently() {
    return new WebDriverWait(chromium.driver(), Duration.ofSeconds(20));
  }

  private void type(String field, String text) {
    WebElement element = find("#" + field);
    element.clear();
    element.sendKeys(text);
  }

  private void signIn() {
    chromium.open(QUILLHAVEN.root() + "/sign-in");
    type("name", Served.HOST_NAME);
    type("password", Served.HOST_PASSWORD);
    follow(".form .button-main");
  }

  /**
   * Clicks what leads to another page, and waits until that has come: a click alone may return
   * sooner.
   */
  private void follow(String css) {
    WebElement before = find("html");
    find(css).click();
    patiently().until(ExpectedConditions.stalenessOf(before));
    patiently()
        .until(
            driver ->
                "complete"
                    .equals(
                        ((JavascriptExecutor) driver).executeScript("return document.readyState")));
  }

  @Test
  void theFirstOrganiserOpensTheLinkAndSetsAPasswordOnce() {
    chromium.setScreen(LAPTOP);
    String link = QUILLHAVEN.setUpLink();
    chromium.open(link);
    type("name", "Wilhelmina Oake");
    type("password", "short");
    follow(".form .button-main");
    assertTrue(chromium.driver().getTitle().startsWith("Error:"), chromium.driver().getTitle());
    assertEquals("Wilhelmina Oake", find("#name").getAttribute("value"), "what was typed is kept");
    type("password", "seven lamps along the weir");
    follow(".form .button-main");
    assertTrue(chromium.driver().getCurrentUrl().endsWith("/events"));
    chromium.open(link);
    assertEquals("There is no such page", find("h1").getText(), "the link works once");
  }

  @Test
  void theOrganiserPlansSeesProgressStopsAndPublishes() {
    QUILLHAVEN.searchesWait(true);
    chromium.setScreen(LAPTOP);
    signIn();
    chromium.open(QUILLHAVEN.root() + "/events/" + Quillhaven.UNPLANNED + "/plan");
    assertTrue(chromium.driver().findElements(By.cssSelector(".lanes .ticket")).isEmpty());
    find(".engine .button-main").click();
    patiently()
        .until(ExpectedConditions.presenceOfElementLocated(By.cssSelector("#solve progress")));
    patiently().until(ExpectedConditions.presenceOfElementLocated(By.cssSelector(".engine-best")));
    chromium.open(QUILLHAVEN.root() + "/events");
    chromium.open(QUILLHAVEN.root() + "/events/" + Quillhaven.UNPLANNED + "/plan");
    assertEquals(
        "Looking for a better plan", find("#solve-title span").getText(), "it survives the tab");
    find("#solve .engine-time .button").click();
    patiently()
        .until(ExpectedConditions.presenceOfElementLocated(By.cssSelector(".lanes .ticket")));
    assertEquals("Stopped, the best is kept", find("#solve-title span").getText());

    follow(".plan-tools > .button");
    assertEquals("Publish edition 1?", find("h1").getText());
    follow(".publish .button-main");
    chromium.open(QUILLHAVEN.root() + "/events/" + Quillhaven.UNPLANNED);
    assertTrue(find(".sched-bar").getText().contains("Edition 1"), find(".sched-bar").getText());
    assertEquals(List.of(), chromium.complaints());
  }

  @Test
  void aCompetitorOnAPhoneFindsTheGroupInTwoTaps() {
    chromium.setScreen(PHONE);
    chromium.open(QUILLHAVEN.root() + "/events/" + Quillhaven.SLUG);
    type("name", "Unax");
    follow(".find .button-main");
    follow(".found-list a");
    String day = find("main").getText();
    assertTrue(day.matches("(?s).*\\d?\\d:\\d\\d.*"), day);
    assertTrue(day.contains("Competitor") || day.contains("Judge"), day);
  }

  @Test
  void theLookUpFindsNoMoreThanTenAndNobodyWhoDoesNotWishIt() {
    chromium.setScreen(PHONE);
    chromium.open(QUILLHAVEN.root() + "/events/" + Quillhaven.SLUG + "?name=ann");
    int found = chromium.driver().findElements(By.cssSelector(".found-list li")).size();
    assertTrue(found <= 10, "found " + found);
    chromium.open(QUILLHAVEN.root() + "/events/" + Quillhaven.SLUG + "?name=Ribalonga");
    assertTrue(
        chromium.driver().findElements(By.cssSelector(".found-list li")).stream()
            .noneMatch(hit -> hit.getText().equals("Tomé Ribalonga")),
        "he is not to be listed");
  }

  @Test
  void aMinorIsFoundByGivenNameOnly() {
    chromium.setScreen(PHONE);
    String event = QUILLHAVEN.root() + "/events/" + Quillhaven.SLUG;
    chromium.open(event + "?name=Zawadi");
    assertTrue(
        chromium.driver().findElements(By.cssSelector(".found-list li")).stream()
            .anyMatch(hit -> hit.getText().equals("Zawadi")),
        find(".found").getText());
    chromium.open(event + "?name=Bahariya");
    assertTrue(
        chromium.driver().findElements(By.cssSelector(".found-list li")).stream()
            .noneMatch(hit -> hit.getText().contains("Zawadi")),
        find(".found").getText());
  }

  @Test
  void aBoardThatIsCutOffSaysSoAndComesBack() {
    chromium.setScreen(LAPTOP);
    chromium.open(QUILLHAVEN.root() + "/events/" + Quillhaven.SLUG + "/halls/great-floor");
    refreshBoard();
    assertTrue(find("main").getAttribute("class").contains("board"));
    setOffline(true);
    refreshBoard();
    assertTrue(!find(".stale-word").isDisplayed(), "one lost answer is not the end");
    refreshBoard();
    assertTrue(find("main").getAttribute("class").contains("board-stale"));
    assertTrue(find(".stale-word").getText().contains("10:41"), find(".stale-word").getText());
    setOffline(false);
    refreshBoard();
    assertTrue(!find("main").getAttribute("class").contains("board-stale"));
  }

  /** What the page's script does by itself every 15 seconds. */
  private void refreshBoard() {
    chromium.driver().executeAsyncScript("refresh().then(arguments[0])");
  }

  private void setOffline(boolean offline) {
    chromium.driver().executeCdpCommand("Network.enable", Map.of());
    chromium
        .driver()
        .executeCdpCommand(
            "Network.emulateNetworkConditions",
            Map.of(
                "offline",
                offline,
                "latency",
                0,
                "downloadThroughput",
                -1,
                "uploadThroughput",
                -1));
  }

  @Test
  void everythingAnOrganiserDoesCanBeDoneByKeyboard() {
    chromium.setScreen(LAPTOP);
    signIn();
    chromium.open(QUILLHAVEN.root() + "/events/" + Quillhaven.SLUG + "/plan");
    Set<String> met = new LinkedHashSet<>();
    for (int i = 0; i < 40; i++) {
      chromium.driver().switchTo().activeElement().sendKeys(org.openqa.selenium.Keys.TAB);
      met.add(chromium.ask("return document.activeElement.className"));
    }
    assertTrue(met.contains("skip"), met.toString());
    assertTrue(met.stream().anyMatch(one -> one.contains("ticket-lane")), met.toString());
    Boolean ring =
        chromium.ask(
            "return parseFloat(getComputedStyle(document.activeElement).outlineWidth) >= 2");
    assertTrue(ring, "the focus is seen");
  }

  @ParameterizedTest
  @ValueSource(strings = {"event", "event-found", "found", "pocket", "sign-in"})
  void aPhonePageIsSmallAndSmallerTheSecondTime(String name) {
    Sample sample =
        Sample.ALL.stream().filter(one -> one.name().equals(name)).findFirst().orElseThrow();
    chromium.takeCookies(QUILLHAVEN.root(), QUILLHAVEN.browserOf(sample));
    chromium.open("about:blank");
    chromium.setScreen(PHONE);
    chromium.driver().executeCdpCommand("Network.clearBrowserCache", Map.of());
    chromium.networkLog();
    chromium.open(QUILLHAVEN.address(sample));
    Traffic first = traffic();
    chromium.open("about:blank");
    chromium.networkLog();
    chromium.open(QUILLHAVEN.address(sample));
    Traffic second = traffic();
    System.out.println(
        name + ": first " + first + ", second " + second + " (bytes over the wire, requests)");
    assertTrue(first.requests() <= MOST_REQUESTS, first.toString());
    assertTrue(first.bytes() <= FIRST_VISIT_BYTES, first.toString());
    assertTrue(second.bytes() <= NEXT_VISIT_BYTES, second.toString());
  }

  private record Traffic(long bytes, int requests) {}

  /** What came over the wire, headers included, as the browser counted it. */
  private Traffic traffic() {
    // The face is fetched only once the text that needs it is laid out.
    chromium.driver().executeAsyncScript("document.fonts.ready.then(arguments[0])");
    long bytes = 0;
    int requests = 0;
    for (String line : chromium.networkLog()) {
      JsonNode message = message(line);
      if (message.path("method").asText().equals("Network.requestWillBeSent")) {
        requests++;
      }
      if (message.path("method").asText().equals("Network.loadingFinished")) {
        bytes += message.path("params").path("encodedDataLength").asLong();
      }
    }
    assertTrue(requests > 0, "the network log is empty");
    return new Traffic(bytes, requests);
  }

  private static JsonNode message(String line) {
    try {
      return new JsonMapper().readTree(line).path("message");
    } catch (JsonProcessingException e) {
      throw new AssertionError(line, e);
    }
  }
}
