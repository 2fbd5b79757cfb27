package roundwright.server.web;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertFalse;
import static org.junit.jupiter.api.Assertions.assertTrue;

import java.net.http.HttpResponse;
import java.util.Map;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.api.extension.RegisterExtension;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.CsvSource;
import org.junit.jupiter.params.provider.ValueSource;
import roundwright.server.Browser;
import roundwright.server.Served;

class GuardTest {
  @RegisterExtension static final Served SERVED = new Served();

  private static final Map<String, String> FIELDS = Map.of("name", "x", "password", "y");

  @ParameterizedTest
  @ValueSource(strings = {"/sign-in", "/static/css/tokens.css", "/no-such-page", "/events"})
  void every_answer_carries_the_security_headers(String path) {
    HttpResponse<String> answer = SERVED.browser().get(path);
    assertEquals(
        "default-src 'self'; object-src 'none'; base-uri 'none'; frame-ancestors 'none'",
        answer.headers().firstValue("Content-Security-Policy").orElse(""));
    assertEquals("nosniff", answer.headers().firstValue("X-Content-Type-Options").orElse(""));
    assertEquals("no-referrer", answer.headers().firstValue("Referrer-Policy").orElse(""));
  }

  @ParameterizedTest
  @CsvSource({
    "Sec-Fetch-Site,same-origin,422",
    "Sec-Fetch-Site,cross-site,403",
    "Sec-Fetch-Site,same-site,403",
    "Origin,https://elsewhere.example,403",
    "Origin,null,422",
    "X-Other,x,422"
  })
  void a_change_is_taken_only_from_a_page_of_ours(String header, String text, int status) {
    assertEquals(
        status, SERVED.browser().submit("/sign-in", "/sign-in", FIELDS, header, text).statusCode());
  }

  @Test
  void our_own_origin_is_ours() {
    String own = "http://127.0.0.1:" + SERVED.app().port();
    assertEquals(
        422, SERVED.browser().submit("/sign-in", "/sign-in", FIELDS, "Origin", own).statusCode());
  }

  @ParameterizedTest
  @ValueSource(strings = {"", "AAAA", "AAAAAAAAAAAAAAAAAAAAAAAAAAAAAAAAAAAAAAAAAAA", "%%%"})
  void a_change_without_the_forms_token_is_refused(String token) {
    Browser browser = SERVED.browser();
    browser.get("/sign-in");
    String body = Browser.encoded(Map.of("name", "x", "password", "y", "token", token));
    assertEquals(403, browser.send("POST", "/sign-in", body).statusCode());
  }

  @Test
  void another_browsers_token_is_refused() {
    String token = SERVED.browser().tokenAt("/sign-in");
    Browser other = SERVED.browser();
    other.tokenAt("/sign-in");
    String body = Browser.encoded(Map.of("name", "x", "password", "y", "token", token));
    assertEquals(403, other.send("POST", "/sign-in", body).statusCode());
  }

  @Test
  void tokens_are_masked_afresh_on_every_page() {
    Browser browser = SERVED.browser();
    assertFalse(browser.tokenAt("/sign-in").equals(browser.tokenAt("/sign-in")));
  }

  @Test
  void a_header_cannot_turn_a_reading_into_a_change() {
    assertEquals(
        400, SERVED.browser().get("/sign-in", "X-HTTP-Method-Override", "POST").statusCode());
  }

  @ParameterizedTest
  @ValueSource(
      strings = {
        "/static/..%2f..%2fMain.class",
        "/static/%2e%2e/messages",
        "/static/css/..;/tokens.css",
        "/static//css/tokens.css",
        "/static/css%2ftokens.css",
        "/events/..;/sign-in",
        "//events"
      })
  void path_tricks_lead_nowhere(String path) {
    int status = SERVED.browser().get(path).statusCode();
    assertTrue(status == 400 || status == 404, path + " gave " + status);
  }

  @Test
  void a_body_beyond_the_bound_is_refused() {
    Browser browser = SERVED.browser();
    String body = "token=" + "x".repeat(300 * 1024);
    assertEquals(413, browser.send("POST", "/sign-in", body).statusCode());
  }

  @Test
  void an_asset_is_kept_for_ever_under_its_hash_and_checked_otherwise() {
    Browser browser = SERVED.browser();
    HttpResponse<String> plain = browser.get("/static/css/tokens.css");
    String tag = plain.headers().firstValue("ETag").orElseThrow();
    assertEquals("no-cache", plain.headers().firstValue("Cache-Control").orElseThrow());
    String hash = tag.replace("\"", "");
    assertTrue(
        browser
            .get("/static/css/tokens.css?v=" + hash)
            .headers()
            .firstValue("Cache-Control")
            .orElseThrow()
            .contains("immutable"));
    assertEquals(304, browser.get("/static/css/tokens.css", "If-None-Match", tag).statusCode());
    assertEquals(200, browser.get("/static/js/htmx.js").statusCode());
  }
}
