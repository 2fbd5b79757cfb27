package roundwright.server.web;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertTrue;

import java.net.URI;
import java.net.http.HttpResponse;
import java.nio.file.Path;
import java.util.Optional;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.api.io.TempDir;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.CsvSource;
import roundwright.server.App;
import roundwright.server.Browser;
import roundwright.server.PlainSearch;
import roundwright.server.Settings;
import roundwright.server.TestClock;

class BehindProxyTest {
  @TempDir Path folder;

  @ParameterizedTest
  @CsvSource({
    "127.0.0.1,'',false",
    "localhost,'',false",
    "::1,'',false",
    "0.0.0.0,'',true",
    "192.0.2.7,'',true",
    "127.0.0.1,https://rounds.example,true",
    "127.0.0.1,http://127.0.0.1:9000,false"
  })
  void cookies_go_unencrypted_on_this_machine_alone(String host, String shown, boolean secure) {
    Address address =
        new Address(host, shown.isEmpty() ? Optional.empty() : Optional.of(URI.create(shown)));
    assertEquals(secure, address.secureCookies());
    assertEquals(secure ? "__Host-rw-form" : "rw-form", address.cookieName("rw-form"));
  }

  @Test
  void behind_an_encrypting_proxy_cookies_are_bound_to_the_host_and_browsers_told_to_stay() {
    Settings local = Settings.local(folder.resolve("database"), 0);
    Settings settings =
        new Settings(
            local.host(),
            0,
            Optional.of(URI.create("https://rounds.example")),
            local.databaseUrl(),
            local.databaseUser(),
            local.databasePassword(),
            Optional.empty(),
            local.stopSeconds(),
            local.solveSeconds());
    try (App app = App.start(settings, PlainSearch::plan, new TestClock())) {
      HttpResponse<String> page = new Browser(app).get("/sign-in");
      String cookie = page.headers().firstValue("Set-Cookie").orElseThrow();
      assertTrue(cookie.startsWith("__Host-rw-form="), cookie);
      for (String part : new String[] {"Secure", "HttpOnly", "SameSite=Lax", "Path=/"}) {
        assertTrue(cookie.contains(part), cookie);
      }
      assertTrue(!cookie.contains("Domain"), cookie);
      assertEquals(
          "max-age=31536000", page.headers().firstValue("Strict-Transport-Security").orElse(""));
      assertEquals("https://rounds.example/events", app.url("/events"));
    }
  }

  @Test
  void a_port_that_is_taken_is_told_in_one_plain_sentence() {
    Settings first = Settings.local(folder.resolve("one"), 0);
    try (App app = App.start(first, PlainSearch::plan, new TestClock())) {
      Settings second = Settings.local(folder.resolve("two"), app.port());
      try {
        App.start(second, PlainSearch::plan, new TestClock()).close();
        throw new AssertionError("the port was free");
      } catch (IllegalStateException e) {
        assertTrue(e.getMessage().contains("choose one with --port"), e.getMessage());
      }
    }
  }
}
