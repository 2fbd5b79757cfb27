package roundwright.scheduling;

import java.math.BigDecimal;
import java.time.LocalDate;
import java.time.LocalDateTime;
import java.time.LocalTime;
import java.util.ArrayList;
import java.util.Arrays;
import java.util.LinkedHashMap;
import java.util.List;
import java.util.Map;
import java.util.Optional;
import roundwright.scheduling.audit.Auditor;
import roundwright.scheduling.audit.Kept;
import roundwright.scheduling.audit.Verdict;
import roundwright.scheduling.cost.RuleName;
import roundwright.scheduling.file.EventFile;
import roundwright.scheduling.file.FileProblems;
import roundwright.scheduling.file.PlanFile;
import roundwright.scheduling.model.Event;
import roundwright.scheduling.model.Plan;

/**
 * A small event and a plan for it, told in the words of the trade: {@code new Scene().hall("main",
 * 10).discipline("cube3").round("a", "cube3", 1).person("ada").enters("cube3", 20).group("g1", "a",
 * 1, "main", "09:00-09:30").solve("ada")}. Each call is about the thing named last; {@link #set}
 * gives that thing any further key of the file format. Everything goes through the file reader, so
 * that defaults are the format's own.
 *
 * <p>Times are {@code 09:00} on 8 May 2027 or {@code 2/09:00} on the day after; a stretch is {@code
 * 09:00-10:00}. Halls are open on both days around the clock unless told otherwise; the zone is
 * UTC.
 */
public final class Scene {
  private static final LocalDate FIRST_DAY = LocalDate.of(2027, 5, 8);

  private final Map<String, Object> event = new LinkedHashMap<>();
  private final List<Map<String, Object>> groups = new ArrayList<>();
  private final Map<String, Object> rules = new LinkedHashMap<>();
  private final Map<String, Object> weights = new LinkedHashMap<>();
  private final Map<String, Object> pins = new LinkedHashMap<>();
  private Map<String, Object> latest = event;
  private Optional<String> kept = Optional.empty();

  public Scene() {
    event.put("format", "roundwright-event/1");
    event.put("name", "Scene");
    event.put("zone", "UTC");
    for (String key :
        List.of("venues", "travel", "fixedPoints", "disciplines", "rounds", "people")) {
      event.put(key, new ArrayList<>());
    }
  }

  /** The file's text for a time such as {@code 2/09:00}. */
  public static String time(String short_) {
    if (short_.length() > 8) {
      return short_;
    }
    int slash = short_.indexOf('/');
    long day = slash < 0 ? 1 : Long.parseLong(short_.substring(0, slash));
    LocalTime time = LocalTime.parse(short_.substring(slash + 1));
    return LocalDateTime.of(FIRST_DAY.plusDays(day - 1), time).toString();
  }

  private static Map<String, Object> stretch(String stretch) {
    int dash = stretch.length() > 24 ? stretch.length() / 2 : stretch.indexOf('-');
    Map<String, Object> window = new LinkedHashMap<>();
    window.put("from", time(stretch.substring(0, dash)));
    window.put("to", time(stretch.substring(dash + 1)));
    return window;
  }

  private static List<Object> stretches(String... stretches) {
    return new ArrayList<>(Arrays.stream(stretches).map(Scene::stretch).toList());
  }

  @SuppressWarnings("unchecked")
  private static List<Object> list(Map<String, Object> of, String key) {
    return (List<Object>) of.computeIfAbsent(key, unused -> new ArrayList<>());
  }

  private Scene add(String key) {
    latest = new LinkedHashMap<>();
    list(event, key).add(latest);
    return this;
  }

  /** Gives the thing named last a further key of the file format. */
  public Scene set(String key, Object value) {
    latest.put(key, value);
    return this;
  }

  public Scene zone(String zone) {
    event.put("zone", zone);
    return this;
  }

  public Scene venue(String id) {
    return add("venues").set("id", id).set("name", id).set("halls", new ArrayList<>());
  }

  /** A hall of the venue named last; of one called "house" where there is none. */
  @SuppressWarnings("unchecked")
  public Scene hall(String id, int stations) {
    if (list(event, "venues").isEmpty()) {
      venue("house");
    }
    List<Object> venues = list(event, "venues");
    Map<String, Object> venue = (Map<String, Object>) venues.get(venues.size() - 1);
    latest = new LinkedHashMap<>();
    list(venue, "halls").add(latest);
    return set("id", id)
        .set("name", id)
        .set("stations", stations)
        .set("open", stretches("00:00-3/00:00"));
  }

  public Scene open(String... stretches) {
    return set("open", stretches(stretches));
  }

  public Scene travel(String oneVenue, String otherVenue, int minutes) {
    return add("travel").set("between", List.of(oneVenue, otherVenue)).set("minutes", minutes);
  }

  public Scene fixedPoint(String stretch) {
    add("fixedPoints").set("name", "Fixed");
    latest.putAll(stretch(stretch));
    return this;
  }

  public Scene discipline(String id) {
    return add("disciplines").set("id", id).set("name", id);
  }

  /** A round of one attempt; give it another {@code countedBy} where that matters. */
  public Scene round(String id, String discipline, int number) {
    return add("rounds")
        .set("id", id)
        .set("discipline", discipline)
        .set("number", number)
        .set("countedBy", "best-of-1");
  }

  public Scene advance(String by, Object value) {
    return set("advance", Map.of(by, value));
  }

  public Scene person(String id) {
    return add("people").set("id", id).set("name", id).set("entries", new ArrayList<>());
  }

  public Scene enters(String discipline, Object expectedSeconds) {
    Map<String, Object> entry = new LinkedHashMap<>();
    entry.put("discipline", discipline);
    entry.put("expectedSeconds", expectedSeconds);
    list(latest, "entries").add(entry);
    return this;
  }

  @SuppressWarnings("unchecked")
  private Map<String, Object> crew() {
    return (Map<String, Object>)
        latest.computeIfAbsent("crew", unused -> new LinkedHashMap<String, Object>());
  }

  public Scene judges() {
    crew().put("judges", true);
    return this;
  }

  public Scene runs() {
    crew().put("runs", true);
    return this;
  }

  public Scene scrambles(String... disciplines) {
    crew().put("scrambles", List.of(disciplines));
    return this;
  }

  public Scene available(String... stretches) {
    return set("available", stretches(stretches));
  }

  public Scene busy(String... stretches) {
    return set("busy", stretches(stretches));
  }

  public Scene rule(String key, Object value) {
    rules.put(key, value);
    return this;
  }

  public Scene weight(RuleName rule, Object weight) {
    weights.put(rule.word(), weight);
    return this;
  }

  /** A pin; {@code kind} is groups, competitors or duties, then keys and values. */
  public Scene pin(String kind, Object... keysAndValues) {
    Map<String, Object> pin = new LinkedHashMap<>();
    for (int i = 0; i < keysAndValues.length; i += 2) {
      pin.put((String) keysAndValues[i], keysAndValues[i + 1]);
    }
    list(pins, kind).add(pin);
    return this;
  }

  /** A group of the plan, using one station unless {@link #set} says otherwise. */
  public Scene group(String id, String round, int number, String hall, String stretch) {
    latest = new LinkedHashMap<>();
    groups.add(latest);
    set("id", id).set("round", round).set("number", number).set("hall", hall).set("stations", 1);
    return at(stretch).solve().listed("judges").listed("scramblers").listed("runners");
  }

  /** Turns to a group of the plan again. */
  public Scene in(String group) {
    latest =
        groups.stream()
            .filter(candidate -> candidate.get("id").equals(group))
            .findFirst()
            .orElseThrow();
    return this;
  }

  /** Moves the group named last. */
  public Scene at(String stretch) {
    Map<String, Object> window = stretch(stretch);
    return set("start", window.get("from")).set("end", window.get("to"));
  }

  public Scene drop(String group) {
    in(group);
    groups.remove(latest);
    return this;
  }

  /** Empties the group named last. */
  public Scene nobody() {
    latest.remove("competitors");
    latest.remove("crew");
    return solve().listed("judges").listed("scramblers").listed("runners");
  }

  public Scene solve(String... people) {
    list(latest, "competitors").addAll(List.of(people));
    return this;
  }

  private Scene listed(String role, String... people) {
    list(crew(), role).addAll(List.of(people));
    return this;
  }

  public Scene judge(String... people) {
    return listed("judges", people);
  }

  public Scene scramble(String... people) {
    return listed("scramblers", people);
  }

  public Scene run(String... people) {
    return listed("runners", people);
  }

  /** Keeps the plan as it is now; what follows is another plan, to be held to it. */
  public Scene keep() {
    kept = Optional.of(planJson());
    return this;
  }

  public String eventJson() {
    Map<String, Object> whole = new LinkedHashMap<>(event);
    Map<String, Object> allRules = new LinkedHashMap<>(rules);
    allRules.put("weights", weights);
    whole.put("rules", allRules);
    whole.put("pins", pins);
    return json(whole);
  }

  private String planJson() {
    Map<String, Object> whole = new LinkedHashMap<>();
    whole.put("format", "roundwright-plan/1");
    whole.put("groups", groups);
    return json(whole);
  }

  private static String json(Object value) {
    if (value instanceof Map<?, ?> map) {
      return map.entrySet().stream()
          .map(entry -> json(entry.getKey()) + ":" + json(entry.getValue()))
          .collect(java.util.stream.Collectors.joining(",", "{", "}"));
    }
    if (value instanceof List<?> list) {
      return list.stream()
          .map(Scene::json)
          .collect(java.util.stream.Collectors.joining(",", "[", "]"));
    }
    return value instanceof String text ? "\"" + text + "\"" : String.valueOf(value);
  }

  public Event event() {
    try {
      return EventFile.read(eventJson()).event();
    } catch (FileProblems problems) {
      throw new AssertionError("The scene's event has problems:\n" + problems.getMessage());
    }
  }

  public Plan plan() {
    try {
      return PlanFile.read(planJson(), event()).plan();
    } catch (FileProblems problems) {
      throw new AssertionError("The scene's plan has problems:\n" + problems.getMessage());
    }
  }

  public Verdict verdict() {
    return verdict(Optional.empty());
  }

  /** How many people there are so far. */
  public int people() {
    return list(event, "people").size();
  }

  /** Ids of those with an entry in a discipline, in the order of the file. */
  @SuppressWarnings("unchecked")
  public List<String> entered(String discipline) {
    List<String> entered = new ArrayList<>();
    for (Object person : list(event, "people")) {
      for (Object entry : list((Map<String, Object>) person, "entries")) {
        if (((Map<String, Object>) entry).get("discipline").equals(discipline)) {
          entered.add((String) ((Map<String, Object>) person).get("id"));
        }
      }
    }
    return entered;
  }

  /** The verdict with a moment before which nothing can be changed. */
  public Verdict verdictAt(String time) {
    return verdict(Optional.of(time(time)));
  }

  private Verdict verdict(Optional<String> at) {
    Event read = event();
    Auditor auditor = new Auditor(read);
    if (kept.isEmpty()) {
      return auditor.audit(plan());
    }
    try {
      Plan keptPlan = PlanFile.readKept(kept.get(), read).plan();
      return auditor.audit(
          plan(),
          at.isEmpty()
              ? new Kept(keptPlan)
              : new Kept(keptPlan, Optional.of(EventFile.moment("at", at.get(), read))));
    } catch (FileProblems problems) {
      throw new AssertionError("The scene's kept plan has problems:\n" + problems.getMessage());
    }
  }

  /** What a rule counts, in plain digits; 0 where it counts nothing. */
  public String amount(RuleName rule) {
    return plain(verdict().amounts().getOrDefault(rule, BigDecimal.ZERO));
  }

  /** What a rule counts with a moment before which nothing can be changed. */
  public String amountAt(RuleName rule, String time) {
    return plain(verdictAt(time).amounts().getOrDefault(rule, BigDecimal.ZERO));
  }

  private static String plain(BigDecimal amount) {
    return amount.signum() == 0 ? "0" : amount.stripTrailingZeros().toPlainString();
  }
}
