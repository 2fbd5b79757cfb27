package roundwright.server.account;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertFalse;
import static org.junit.jupiter.api.Assertions.assertNotEquals;
import static org.junit.jupiter.api.Assertions.assertTrue;

import java.net.HttpCookie;
import java.net.http.HttpResponse;
import java.time.Duration;
import java.util.Map;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.api.extension.RegisterExtension;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.CsvSource;
import roundwright.server.Browser;
import roundwright.server.Served;

class SignInTest {
  @RegisterExtension static final Served SERVED = new Served();

  @Test
  void the_first_link_makes_one_account_and_is_then_spent() {
    Browser host = SERVED.hostBrowser();
    assertEquals(200, host.get("/events").statusCode());
    assertTrue(SERVED.app().firstSetUpLink().isEmpty(), "a second account by link");
  }

  @Test
  void a_made_up_set_up_link_leads_nowhere() {
    assertEquals(404, SERVED.browser().get("/setup/AAAAAAAAAAAAAAAAAAAAAAAAAAA").statusCode());
  }

  @Test
  void without_signing_in_one_is_asked_to_and_then_led_back() {
    SERVED.hostBrowser();
    Browser browser = SERVED.browser();
    HttpResponse<String> asked = browser.get("/events");
    assertEquals(303, asked.statusCode());
    assertEquals("/sign-in?next=%2Fevents", asked.headers().firstValue("Location").orElseThrow());
    HttpResponse<String> in =
        browser.submit(
            "/sign-in?next=%2Fevents",
            "/sign-in",
            Map.of("name", Served.HOST_NAME, "password", Served.HOST_PASSWORD, "next", "/events"));
    assertEquals("/events", in.headers().firstValue("Location").orElseThrow());
    assertEquals(200, browser.get("/events").statusCode());
  }

  @ParameterizedTest
  @CsvSource({
    "/events/x/plan,/events/x/plan",
    "//elsewhere.example,/events",
    "https://elsewhere.example,/events",
    "/\\elsewhere,/events",
    "'',/events"
  })
  void nobody_is_led_to_another_server(String asked, String led) {
    assertEquals(led, AccountRoutes.ownPath(asked));
  }

  @Test
  void htmx_is_told_to_leave_for_the_sign_in_page() {
    HttpResponse<String> answer = SERVED.browser().fragment("/events");
    assertEquals("/sign-in", answer.headers().firstValue("HX-Redirect").orElse(""));
    assertEquals("", answer.body());
  }

  @Test
  void signing_out_ends_the_session_itself() {
    Browser host = SERVED.hostBrowser();
    HttpCookie session = session(host);
    host.submit("/events", "/sign-out", Map.of());
    Browser thief = SERVED.browser();
    assertEquals(
        303, thief.get("/events", "Cookie", "rw-session=" + session.getValue()).statusCode());
  }

  @Test
  void a_session_is_new_at_every_sign_in_and_hidden_from_scripts() {
    Browser host = SERVED.hostBrowser();
    HttpCookie first = session(host);
    SERVED.signIn(host, Served.HOST_NAME, Served.HOST_PASSWORD);
    assertNotEquals(first.getValue(), session(host).getValue());
    assertTrue(first.isHttpOnly());
    assertFalse(first.getSecure(), "on loopback alone cookies go unencrypted");
  }

  @Test
  void an_unknown_name_and_a_wrong_password_look_the_same() {
    SERVED.hostBrowser();
    Browser browser = SERVED.browser();
    String unknown = wrong(browser, "Nobody Here");
    String known = wrong(browser, Served.HOST_NAME);
    assertTrue(unknown.contains("Name and password do not fit"), unknown);
    assertEquals(
        unknown.replaceAll("value=\"[^\"]*\"", ""), known.replaceAll("value=\"[^\"]*\"", ""));
    assertTrue(known.contains("<title>Error: Sign in</title>"), known);
    SERVED.later(Duration.ofMinutes(6));
  }

  @Test
  void from_the_fifth_wrong_password_on_the_account_waits_but_is_never_locked() {
    SERVED.hostBrowser();
    Browser browser = SERVED.browser();
    for (int i = 0; i < 5; i++) {
      assertTrue(wrong(browser, Served.HOST_NAME).contains("do not fit"));
    }
    assertTrue(wrong(browser, Served.HOST_NAME).contains("try again in"));
    SERVED.later(Duration.ofMinutes(6));
    SERVED.signIn(browser, Served.HOST_NAME, Served.HOST_PASSWORD);
  }

  private static String wrong(Browser browser, String name) {
    HttpResponse<String> answer =
        browser.submit(
            "/sign-in", "/sign-in", Map.of("name", name, "password", "not this one at all"));
    assertEquals(422, answer.statusCode());
    return answer.body();
  }

  private static HttpCookie session(Browser browser) {
    return browser.cookies().stream()
        .filter(cookie -> cookie.getName().equals("rw-session"))
        .findFirst()
        .orElseThrow();
  }

  @ParameterizedTest
  @CsvSource({
    "elevenchars,account.password.short",
    "twelve chars,''",
    "aaaaaaaaaaaa,account.password.common",
    "abababababab,account.password.common",
    "Password1234,account.password.common",
    "Ottoline Vane1,account.password.common"
  })
  void a_password_is_long_and_not_guessed_easily(String password, String complaint) {
    assertEquals(complaint, Passwords.complaint(password, "Ottoline Vane"));
  }

  @Test
  void a_password_may_have_64_letters_of_any_script() {
    assertEquals("", Passwords.complaint("söме语ات".repeat(8), "x"));
    assertTrue(Passwords.fits("é pass phrase", Passwords.hash("e\u0301 pass phrase")));
    assertTrue(Passwords.hash("four small kettles").startsWith("$argon2id$v=19$m=19456,t=2,p=1$"));
  }
}
