package roundwright.server;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertTrue;

import java.io.IOException;
import java.net.http.HttpResponse;
import java.nio.file.Path;
import java.util.ArrayList;
import java.util.List;
import java.util.Map;
import java.util.Set;
import java.util.TreeMap;
import org.junit.jupiter.api.BeforeAll;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.api.extension.RegisterExtension;
import roundwright.scheduling.file.EventFile;
import roundwright.scheduling.file.FileProblems;
import roundwright.server.account.AccountWrites;
import roundwright.server.event.EventWrites;
import roundwright.server.ids.EventId;
import roundwright.server.ids.PersonId;
import roundwright.server.web.Access.Role;
import roundwright.server.web.Route;

/**
 * Calls every route there is as everybody there is, with this event's name, another's, and one that
 * is none: as page, as fragment, and as HEAD. A new route is in by being in the table.
 */
class AccessMatrixTest {
  @RegisterExtension static final Served SERVED = new Served();

  private static final String PASSWORD = "seven narrow river boats";
  private static final Map<String, Browser> PEOPLE = new TreeMap<>();

  @BeforeAll
  static void fill() throws IOException, FileProblems {
    PEOPLE.put("host", SERVED.hostBrowser());
    EventFile file = EventFile.read(Path.of("../demo-event/event.json"));
    EventWrites events = new EventWrites(SERVED.app().database());
    EventId own = events.importEvent("own", file);
    EventId other = events.importEvent("other", file);
    AccountWrites accounts = new AccountWrites(SERVED.app().database());
    accounts.organiser("Own Organiser", PASSWORD, own);
    accounts.organiser("Other Organiser", PASSWORD, other);
    PEOPLE.put("stranger", SERVED.browser());
    PEOPLE.put("own organiser", signedIn("Own Organiser"));
    PEOPLE.put("other organiser", signedIn("Other Organiser"));
    PEOPLE.put("p001 of own", linked(accounts, own, "p001"));
    PEOPLE.put("p002 of own", linked(accounts, own, "p002"));
    PEOPLE.put("p001 of other", linked(accounts, other, "p001"));
  }

  private static Browser signedIn(String name) {
    Browser browser = SERVED.browser();
    SERVED.signIn(browser, name, PASSWORD);
    return browser;
  }

  private static Browser linked(AccountWrites accounts, EventId event, String person) {
    String token =
        accounts.personalLink(
            new PersonId(event, person), SERVED.clock().instant().plusSeconds(86_400));
    Browser browser = SERVED.browser();
    assertEquals(303, browser.get("/link/" + token).statusCode());
    return browser;
  }

  private static String path(Route route, String event) {
    return route
        .path()
        .replace("{event}", event)
        .replace("{person}", "p001")
        .replace("{hall}", "great-floor")
        .replace("{token}", "AAAAAAAAAAAAAAAAAAAAAAAAAAA")
        .replace("<name>", "css/tokens.css");
  }

  /** Whether somebody may have a route of the event {@code own}. */
  private static boolean may(String who, Set<Role> roles) {
    return roles.contains(Role.PUBLIC)
        || (roles.contains(Role.SIGNED_IN) && (who.equals("host") || who.endsWith("organiser")))
        || (roles.contains(Role.ORGANISER) && (who.equals("host") || who.equals("own organiser")))
        || (roles.contains(Role.PERSON) && who.equals("p001 of own"));
  }

  private static HttpResponse<String> call(
      Browser browser, Route route, String path, String... headers) {
    if (route.method().name().equals("GET")) {
      return browser.get(path, headers);
    }
    // A token of the browser's own, so that what is tested is the role and not the form.
    Map<String, String> fields = Map.of("token", browser.tokenAt("/sign-in"));
    return browser.send(route.method().name(), path, Browser.encoded(fields), headers);
  }

  private static boolean open(HttpResponse<String> answer) {
    boolean toSignIn =
        answer.headers().firstValue("Location").orElse("").startsWith("/sign-in")
            || answer.headers().firstValue("HX-Redirect").orElse("").startsWith("/sign-in");
    return answer.statusCode() != 403 && !toSignIn;
  }

  @Test
  void every_route_is_open_to_its_roles_and_closed_to_everybody_else() {
    List<String> wrong = new ArrayList<>();
    int calls = 0;
    for (Route route : SERVED.app().routes()) {
      if (route.path().equals("/sign-out")) {
        continue;
      }
      for (Map.Entry<String, Browser> who : PEOPLE.entrySet()) {
        String path = path(route, "own");
        for (String[] headers : List.of(new String[0], new String[] {"HX-Request", "true"})) {
          HttpResponse<String> answer = call(who.getValue(), route, path, headers);
          calls++;
          if (open(answer) != may(who.getKey(), route.roles())) {
            wrong.add(
                who.getKey() + " " + route.method() + " " + path + ": " + answer.statusCode());
          }
          if (answer.statusCode() == 500) {
            wrong.add(who.getKey() + " " + route.method() + " " + path + ": failed");
          }
        }
      }
    }
    assertTrue(calls > 200, "only " + calls + " calls");
    assertEquals(List.of(), wrong);
  }

  @Test
  void another_events_organiser_and_people_get_403_and_an_unknown_event_404() {
    List<String> wrong = new ArrayList<>();
    for (Route route : SERVED.app().routes()) {
      if (!route.path().contains("{event}") || route.roles().contains(Role.PUBLIC)) {
        continue;
      }
      expect(wrong, route, "other organiser", "own", 403);
      expect(wrong, route, "own organiser", "other", 403);
      expect(wrong, route, "own organiser", "no-such-event", 404);
      boolean person = route.roles().contains(Role.PERSON);
      expect(wrong, route, "p001 of other", "own", person ? 403 : 303);
      expect(wrong, route, "p002 of own", "own", person ? 403 : 303);
      expect(wrong, route, "stranger", "own", person ? 403 : 303);
      expect(wrong, route, "stranger", "no-such-event", person ? 404 : 303);
    }
    assertEquals(List.of(), wrong);
  }

  private static void expect(
      List<String> wrong, Route route, String who, String event, int status) {
    String path = path(route, event);
    int given = call(PEOPLE.get(who), route, path).statusCode();
    if (given != status) {
      wrong.add(who + " " + route.method() + " " + path + ": " + given + " instead of " + status);
    }
  }

  @Test
  void a_head_tells_no_more_than_a_get() {
    List<String> wrong = new ArrayList<>();
    for (Route route : SERVED.app().routes()) {
      if (!route.method().name().equals("GET")) {
        continue;
      }
      for (Map.Entry<String, Browser> who : PEOPLE.entrySet()) {
        String path = path(route, "own");
        int get = who.getValue().get(path).statusCode();
        HttpResponse<String> head = who.getValue().send("HEAD", path, "");
        if (get != head.statusCode() || !head.body().isEmpty()) {
          wrong.add(who.getKey() + " " + path + ": " + get + " but HEAD " + head.statusCode());
        }
      }
    }
    assertEquals(List.of(), wrong);
  }

  @Test
  void a_method_that_a_path_has_not_is_refused() {
    Browser host = PEOPLE.get("host");
    assertEquals(405, host.submit("/events", "/events/own/halls/x", Map.of()).statusCode());
    assertEquals(404, host.submit("/events", "/events/own/cellar", Map.of()).statusCode());
  }

  @Test
  void private_answers_are_never_stored() {
    for (Route route : SERVED.app().routes()) {
      if (route.method().name().equals("GET") && !route.roles().contains(Role.PUBLIC)) {
        assertEquals(
            "no-store",
            call(PEOPLE.get("host"), route, path(route, "own"))
                .headers()
                .firstValue("Cache-Control")
                .orElse(""),
            route.path());
      }
    }
  }

  @Test
  void a_revoked_link_opens_nothing_any_more() {
    AccountWrites accounts = new AccountWrites(SERVED.app().database());
    PersonId person =
        SERVED
            .app()
            .database()
            .read(tx -> roundwright.server.event.EventReads.named(tx, "own"))
            .map(event -> new PersonId(event.id(), "p009"))
            .orElseThrow();
    Browser phone = linked(accounts, person.event(), person.code());
    assertEquals(200, phone.get("/events/own/my/p009").statusCode());
    assertEquals(403, phone.get("/events/own/my/p010").statusCode());
    accounts.revokeLinks(person);
    assertEquals(403, phone.get("/events/own/my/p009").statusCode());
  }

  @Test
  void a_guardian_holds_the_links_of_several_children_in_one_browser() {
    AccountWrites accounts = new AccountWrites(SERVED.app().database());
    EventId own =
        SERVED
            .app()
            .database()
            .read(tx -> roundwright.server.event.EventReads.named(tx, "own"))
            .orElseThrow()
            .id();
    Browser phone = linked(accounts, own, "p020");
    String second =
        accounts.personalLink(
            new PersonId(own, "p021"), SERVED.clock().instant().plusSeconds(86_400));
    phone.get("/link/" + second);
    assertEquals(200, phone.get("/events/own/my/p020").statusCode());
    assertEquals(200, phone.get("/events/own/my/p021").statusCode());
  }
}
