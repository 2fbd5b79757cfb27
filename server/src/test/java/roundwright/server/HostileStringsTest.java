package roundwright.server;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertTrue;
import static roundwright.server.store.schema.Tables.PLAN;

import com.fasterxml.jackson.databind.ObjectMapper;
import com.fasterxml.jackson.databind.node.ArrayNode;
import com.fasterxml.jackson.databind.node.ObjectNode;
import java.io.IOException;
import java.io.StringReader;
import java.net.URLEncoder;
import java.net.http.HttpResponse;
import java.nio.charset.StandardCharsets;
import java.nio.file.Path;
import java.util.ArrayList;
import java.util.Iterator;
import java.util.List;
import java.util.Map;
import java.util.Set;
import java.util.regex.Pattern;
import java.util.stream.IntStream;
import nu.validator.htmlparser.dom.HtmlDocumentBuilder;
import org.junit.jupiter.api.BeforeAll;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.api.extension.RegisterExtension;
import org.w3c.dom.NamedNodeMap;
import org.w3c.dom.Node;
import org.xml.sax.InputSource;
import org.xml.sax.SAXException;
import roundwright.scheduling.file.EventFile;
import roundwright.scheduling.file.FileProblems;
import roundwright.server.account.AccountWrites;
import roundwright.server.event.EventReads;
import roundwright.server.event.EventWrites;
import roundwright.server.ids.EventId;
import roundwright.server.ids.PersonId;
import roundwright.server.web.Visitor.EventName;

/** Fifty hostile strings in every text of an event, seen on every page: inert. */
class HostileStringsTest {
  @RegisterExtension static final Served SERVED = new Served();

  /** A mark in each string, so that its trace on a page is told from everything else. */
  private static final String MARK = "zq7";

  private static final List<String> STRINGS =
      List.of(
          "<script>" + MARK + "()</script>",
          "</title><script>" + MARK + "()</script>",
          "<img src=x onerror=" + MARK + "()>",
          "\"><svg onload=" + MARK + "()>",
          "' onmouseover='" + MARK + "()",
          "\" onfocus=\"" + MARK + "()\" autofocus=\"",
          "<!--" + MARK,
          "-->" + MARK + "<b>",
          "]]>" + MARK,
          "<![CDATA[" + MARK,
          "${7*7}" + MARK,
          "#{common.skip}" + MARK,
          "@{/" + MARK + "}",
          "*{" + MARK + "}",
          "~{layout/page}" + MARK,
          "__${7*7}__" + MARK,
          "[[${7*7}]]" + MARK,
          "[(${7*7})]" + MARK,
          "th:text=\"" + MARK + "\"",
          "{{" + MARK + "}}",
          "javascript:" + MARK + "()",
          "data:text/html," + MARK,
          "&lt;b&gt;" + MARK,
          "&#60;script&#62;" + MARK,
          "%3Cscript%3E" + MARK,
          "'; drop table person; -- " + MARK,
          "\" or 1=1 " + MARK,
          "\\\"" + MARK,
          "\\u003cscript\\u003e" + MARK,
          "=cmd|' /C x'!A0" + MARK,
          "+1+1" + MARK,
          "-1" + MARK,
          "@SUM(1)" + MARK,
          "../../" + MARK,
          "{0}{1}" + MARK,
          "{0,choice,0#" + MARK + "}",
          "'{'" + MARK,
          "\u202Egnirts " + MARK,
          "\u2028" + MARK,
          "\uFEFF" + MARK,
          "a\u0300\u0301\u0302\u0303" + MARK,
          "😀👩‍👩‍👧 " + MARK,
          "  " + MARK + "  ",
          "<a href=//x.example>" + MARK + "</a>",
          "<base href=//x.example>" + MARK,
          "<meta http-equiv=refresh content=0>" + MARK,
          "<form action=//x.example>" + MARK,
          "<iframe src=//x.example>" + MARK,
          "<style>*{display:none}</style>" + MARK,
          "data-hx-get=\"//x.example\" " + MARK);

  private static final Pattern COMMENT = Pattern.compile("(?s)<!--(?:(?!-->).)*" + MARK);

  private static Browser stranger;
  private static Browser host;
  private static Browser phone;

  @BeforeAll
  static void fill() throws IOException, FileProblems, InterruptedException {
    EventId id = new EventWrites(SERVED.app().database()).importEvent("hostile", hostile());
    stranger = SERVED.browser();
    host = SERVED.hostBrowser();
    host.submit(
        "/events/hostile/plan", "/events/hostile/solve", Map.of("seconds", "1", "version", "0"));
    for (int i = 0; i < 300 && !planned(id); i++) {
      Thread.sleep(20);
    }
    host.submit("/events/hostile/publish", "/events/hostile/publish", Map.of("version", "1"));
    String link =
        new AccountWrites(SERVED.app().database())
            .personalLink(new PersonId(id, "p001"), SERVED.clock().instant().plusSeconds(86_400));
    phone = SERVED.browser();
    phone.get("/link/" + link);
  }

  private static boolean planned(EventId id) {
    return SERVED
        .app()
        .database()
        .read(
            tx ->
                tx.sql()
                    .fetchExists(
                        PLAN, PLAN.EVENT_ID.eq(id.number()).and(PLAN.BREACHES.isNotNull())));
  }

  /** The demo event with a hostile string in place of every text that somebody typed. */
  private static EventFile hostile() throws IOException, FileProblems {
    ObjectMapper json = new ObjectMapper();
    ObjectNode event = (ObjectNode) json.readTree(Path.of("../demo-event/event.json").toFile());
    Iterator<Integer> next = IntStream.iterate(0, i -> i + 1).iterator();
    event.put("name", STRINGS.get(0));
    spoil((ArrayNode) event.get("venues"), next, "name", "x-address");
    event.get("venues").forEach(venue -> spoil((ArrayNode) venue.get("halls"), next, "name"));
    spoil((ArrayNode) event.get("disciplines"), next, "name");
    spoil((ArrayNode) event.get("fixedPoints"), next, "name");
    spoil((ArrayNode) event.get("people"), next, "name", "x-public-name");
    event
        .get("people")
        .forEach(
            person -> {
              ((ObjectNode) person).put("x-listed", true);
              if (person.has("busy")) {
                spoil((ArrayNode) person.get("busy"), next, "what");
              }
            });
    return EventFile.read(json.writeValueAsString(event));
  }

  private static void spoil(ArrayNode list, Iterator<Integer> next, String... keys) {
    for (int i = 0; i < list.size(); i++) {
      for (String key : keys) {
        ((ObjectNode) list.get(i)).put(key, STRINGS.get(next.next() % STRINGS.size()));
      }
    }
  }

  private static List<String> pages() {
    return List.of(
        "/events/hostile",
        "/events/hostile?day=2027-05-16",
        "/events/hostile/people/p001",
        "/events/hostile/halls/great-floor",
        "/events/hostile/halls/reading-room");
  }

  private static List<String> hostPages() {
    List<String> pages =
        new ArrayList<>(
            List.of(
                "/events",
                "/events/hostile/plan",
                "/events/hostile/plan?day=2027-05-16",
                "/events/hostile/crews",
                "/events/hostile/publish"));
    EventName event =
        SERVED.app().database().read(tx -> EventReads.named(tx, "hostile")).orElseThrow();
    new roundwright.server.planning.PlanningReads(SERVED.app().database())
            .planPage(event, java.util.Optional.empty(), java.util.Optional.empty())
            .orElseThrow()
            .lanes()
            .down()
            .stream()
            .limit(12)
            .forEach(ticket -> pages.add("/events/hostile/crews?group=" + ticket.group()));
    return pages;
  }

  @Test
  void no_string_comes_alive_on_any_page() {
    int seen = 0;
    for (String path : pages()) {
      seen += inert(path, stranger.get(path));
    }
    for (String path : hostPages()) {
      seen += inert(path, host.get(path));
    }
    seen += inert("pocket", phone.get("/events/hostile/my/p001"));
    assertTrue(seen > 300, "the strings were seen only " + seen + " times");
  }

  private static int inert(String path, HttpResponse<String> page) {
    assertEquals(200, page.statusCode(), path);
    assertEquals("", firstLive(page.body()), path);
    return page.body().split(MARK, -1).length - 1;
  }

  /** The first thing on a page that only a string could have brought to life; empty for none. */
  private static String firstLive(String body) {
    // The parser leaves comments out.
    if (COMMENT.matcher(body).find()) {
      return "a comment";
    }
    HtmlDocumentBuilder parser = new HtmlDocumentBuilder();
    try {
      return firstLive(parser.parse(new InputSource(new StringReader(body))));
    } catch (IOException | SAXException e) {
      throw new AssertionError(e);
    }
  }

  private static String firstLive(Node node) {
    String own = live(node);
    for (Node child = node.getFirstChild();
        child != null && own.isEmpty();
        child = child.getNextSibling()) {
      own = firstLive(child);
    }
    return own;
  }

  private static String live(Node node) {
    if (node.getNodeType() == Node.TEXT_NODE) {
      return node.getNodeValue().contains("49" + MARK) ? "a sum worked out" : "";
    }
    String name = node.getNodeName();
    boolean strange =
        Set.of("iframe", "base", "style", "img").contains(name)
            || (name.equals("script") && !node.getTextContent().isEmpty());
    if (strange) {
      return "element " + name;
    }
    NamedNodeMap attributes = node.getAttributes();
    for (int i = 0; attributes != null && i < attributes.getLength(); i++) {
      String attribute = attributes.item(i).getNodeName();
      String text = attributes.item(i).getNodeValue().strip();
      boolean address = Set.of("href", "src", "action", "data-hx-get").contains(attribute);
      if (attribute.startsWith("on")
          || attribute.equals("http-equiv")
          || attribute.equals("style")
          || attribute.contains(MARK)
          || (address && !text.matches("[/#?](?!/).*"))) {
        return name + " with " + attribute + "=" + text;
      }
    }
    return "";
  }

  @Test
  void what_is_looked_up_comes_back_inert() {
    for (String asked : STRINGS) {
      HttpResponse<String> page =
          stranger.get("/events/hostile?name=" + URLEncoder.encode(asked, StandardCharsets.UTF_8));
      inert(asked, page);
    }
  }

  @Test
  void what_is_typed_into_a_form_comes_back_inert() {
    for (String typed : STRINGS) {
      HttpResponse<String> page =
          SERVED
              .browser()
              .submit(
                  "/sign-in", "/sign-in", Map.of("name", typed, "password", "x", "next", typed));
      assertEquals(422, page.statusCode());
      assertEquals("", firstLive(page.body()), typed);
    }
  }

  @Test
  void the_check_finds_what_is_alive() {
    for (String live :
        List.of(
            "<p><script>zq7()</script>",
            "<img src=x onerror=zq7()>",
            "<i title='' onmouseover='zq7()'>",
            "<p>49zq7</p>",
            "<p><!--zq7 -->",
            "<a href='//x.example'>zq7</a>",
            "<a href=\"javascript:zq7()\">")) {
      assertTrue(!firstLive(live).isEmpty(), live);
    }
    assertEquals("", firstLive("&lt;script&gt;zq7()&lt;/script&gt;"));
  }
}
