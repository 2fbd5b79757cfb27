package roundwright.server.pages;

import static roundwright.server.pages.Quillhaven.SEARCHING;
import static roundwright.server.pages.Quillhaven.SLUG;
import static roundwright.server.pages.Quillhaven.UNPLANNED;

import java.util.LinkedHashSet;
import java.util.List;
import java.util.Set;
import roundwright.server.web.Route;

/**
 * A page as somebody sees it.
 *
 * @param name of its pictures
 * @param route the path of the route it belongs to; empty for error pages that no route makes
 * @param path what is asked for
 * @param viewer who asks
 * @param status that it is answered with
 */
record Sample(String name, String route, String path, Viewer viewer, int status) {

  /** Who looks at a page. */
  enum Viewer {
    ANYBODY,
    /** Holds the personal link. */
    COMPETITOR,
    ORGANISER
  }

  /** GET routes that answer with no page of their own, and why. */
  private static final Set<String> NO_PAGES =
      Set.of(
          "/", // leads to the list of events
          "/health",
          "/static/<name>",
          "/events/{event}/event.json", // a file
          "/link/{token}", // leads to the pocket page
          "/events/{event}/solve"); // a part of the day plan, for scripts only

  /** Stands for the first start's single-use link, on a server of its own without accounts. */
  static final String SET_UP = "SET-UP";

  /** Stands for the id of one of the plan's groups. */
  static final String A_GROUP = "A-GROUP";

  static final List<Sample> ALL =
      List.of(
          anybody("set-up", "/setup/{token}", SET_UP),
          anybody("sign-in", "/sign-in", "/sign-in"),
          organiser("events", "/events", "/events"),
          anybody("event", "/events/{event}", "/events/" + SLUG),
          anybody("event-found", "/events/{event}", "/events/" + SLUG + "?name=ill"),
          anybody("event-nobody", "/events/{event}", "/events/" + SLUG + "?name=Zzyzx"),
          anybody("event-too-short", "/events/{event}", "/events/" + SLUG + "?name=il"),
          anybody("event-unplanned", "/events/{event}", "/events/" + UNPLANNED),
          anybody("found", "/events/{event}/people/{person}", "/events/" + SLUG + "/people/p020"),
          anybody(
              "found-long-name",
              "/events/{event}/people/{person}",
              "/events/" + SLUG + "/people/p001"),
          anybody(
              "found-unplanned",
              "/events/{event}/people/{person}",
              "/events/" + UNPLANNED + "/people/p020"),
          new Sample(
              "pocket",
              "/events/{event}/my/{person}",
              "/events/" + SLUG + "/my/p015",
              Viewer.COMPETITOR,
              200),
          anybody(
              "board", "/events/{event}/halls/{hall}", "/events/" + SLUG + "/halls/great-floor"),
          anybody(
              "board-quiet",
              "/events/{event}/halls/{hall}",
              "/events/" + SLUG + "/halls/reading-room"),
          anybody(
              "board-nothing",
              "/events/{event}/halls/{hall}",
              "/events/" + UNPLANNED + "/halls/long-room"),
          organiser("plan", "/events/{event}/plan", "/events/" + SLUG + "/plan"),
          organiser(
              "plan-sunday", "/events/{event}/plan", "/events/" + SLUG + "/plan?day=2027-05-16"),
          organiser("plan-unplanned", "/events/{event}/plan", "/events/" + UNPLANNED + "/plan"),
          organiser("plan-searching", "/events/{event}/plan", "/events/" + SEARCHING + "/plan"),
          organiser("crews", "/events/{event}/crews", "/events/" + SLUG + "/crews"),
          organiser("crew", "/events/{event}/crews", "/events/" + SLUG + "/crews?group=A-GROUP"),
          organiser("crews-unplanned", "/events/{event}/crews", "/events/" + UNPLANNED + "/crews"),
          organiser("publish", "/events/{event}/publish", "/events/" + SLUG + "/publish"),
          new Sample("error-404", "", "/nowhere", Viewer.ANYBODY, 404),
          new Sample("error-403", "", "/events/" + SLUG + "/my/p001", Viewer.COMPETITOR, 403));

  private static Sample anybody(String name, String route, String path) {
    return new Sample(name, route, path, Viewer.ANYBODY, 200);
  }

  private static Sample organiser(String name, String route, String path) {
    return new Sample(name, route, path, Viewer.ORGANISER, 200);
  }

  /** GET routes of pages for which there is no sample: none, or the tests would pass them by. */
  static Set<String> missing(List<Route> routes) {
    Set<String> missing = new LinkedHashSet<>();
    for (Route route : routes) {
      boolean page = route.method().name().equals("GET") && !NO_PAGES.contains(route.path());
      if (page && ALL.stream().noneMatch(sample -> sample.route().equals(route.path()))) {
        missing.add(route.path());
      }
    }
    return missing;
  }

  /** True for what is read on phones at the event. */
  boolean forPhones() {
    return viewer != Viewer.ORGANISER;
  }

  @Override
  public String toString() {
    return name;
  }
}
