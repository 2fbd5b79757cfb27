package roundwright.server.command;

import static org.junit.jupiter.api.Assertions.assertArrayEquals;
import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertFalse;
import static org.junit.jupiter.api.Assertions.assertTrue;

import com.fasterxml.jackson.databind.JsonNode;
import com.fasterxml.jackson.databind.ObjectMapper;
import java.io.IOException;
import java.io.PrintWriter;
import java.io.StringWriter;
import java.math.BigDecimal;
import java.nio.file.Files;
import java.nio.file.Path;
import java.util.List;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.api.io.TempDir;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.ValueSource;
import picocli.CommandLine;
import roundwright.scheduling.Progress;
import roundwright.scheduling.cost.Cost;

/** The commands as somebody types them, run in this process with their output caught. */
final class CommandLineTest {
  private static final String EVENT =
      """
      {
        "format": "roundwright-event/1", "name": "Evening", "zone": "Europe/Lisbon",
        "venues": [{"id": "v", "name": "House", "halls": [{
          "id": "h", "name": "Main Hall", "stations": 4,
          "open": [{"from": "2027-05-08T09:00", "to": "2027-05-08T18:00"}]}]}],
        "disciplines": [{"id": "cube3", "name": "3x3x3"}],
        "rounds": [{"id": "a", "discipline": "cube3", "number": 1, "countedBy": "average-of-5",
          "crew": {"judges": 1, "scramblers": 1, "runners": 0}}],
        "people": [
          {"id": "p1", "name": "Ada", "entries": [{"discipline": "cube3", "expectedSeconds": 20}]},
          {"id": "p2", "name": "Ben", "entries": [{"discipline": "cube3", "expectedSeconds": 25}]},
          {"id": "p3", "name": "Cy", "crew": {"judges": true}},
          {"id": "p4", "name": "Di", "crew": {"scrambles": ["cube3"]}}
        ]
      }
      """;
  private static final String PLAN =
      """
      {
        "format": "roundwright-plan/1",
        "groups": [{"id": "g", "round": "a", "number": 1, "hall": "h", "stations": 2,
          "start": "2027-05-08T09:00", "end": "2027-05-08T09:15", "competitors": ["p1", "p2"],
          "crew": {"judges": ["p3"], "scramblers": ["p4"], "runners": []}}]
      }
      """;

  @TempDir private Path folder;

  /** What a command said and ended with. */
  private record Outcome(int code, String out, String err) {}

  private Outcome run(Object... arguments) {
    StringWriter out = new StringWriter();
    StringWriter err = new StringWriter();
    CommandLine line = Roundwright.commandLine();
    line.setOut(new PrintWriter(out));
    line.setErr(new PrintWriter(err));
    String[] texts = new String[arguments.length];
    for (int i = 0; i < texts.length; i++) {
      texts[i] = arguments[i].toString();
    }
    int code = line.execute(texts);
    return new Outcome(code, out.toString(), err.toString());
  }

  private Path file(String name, String text) throws IOException {
    return Files.writeString(folder.resolve(name), text);
  }

  private static String without(String text, String part) {
    assertTrue(text.contains(part), part);
    return text.replace(part, "");
  }

  @Test
  void aRepairKeepsWhatPeopleWereToldAndSaysWhatChanges() throws IOException {
    Path event = file("event.json", EVENT);
    Path told = folder.resolve("told.json");
    assertEquals(0, run("plan", event, "--out", told, "--steps", 2000).code());
    Path same = folder.resolve("same.json");
    Outcome untouched = run("repair", event, told, "--out", same);
    assertEquals("", untouched.err());
    assertEquals(0, untouched.code(), untouched.out());
    assertTrue(untouched.out().contains("Commitments that change: 0; "), untouched.out());
    assertTrue(untouched.out().contains("People to be told: 0; at least 0."), untouched.out());
    Outcome checked = run("check", event, same, "--kept", told, "--json");
    assertFalse(checked.out().contains("changed"), checked.out());
  }

  @Test
  void aRepairRefusesScopesThatExcludeEachOtherAndDatesThatAreNone() throws IOException {
    Path event = file("event.json", EVENT);
    Path told = folder.resolve("told.json");
    run("plan", event, "--out", told, "--steps", 2000);
    Object[] common = {"repair", event, told, "--out", folder.resolve("plan.json")};
    assertTrue(
        run(with(common, "--crews-only", "--broken-only")).err().contains("give one of them"));
    assertTrue(run(with(common, "--day", "Saturday")).err().contains("give a date such as"));
    assertTrue(run(with(common, "--hall", "attic")).err().contains("give the id of a hall"));
    assertEquals(2, run(with(common, "--round", "none")).code());
  }

  private static Object[] with(Object[] common, Object... more) {
    return java.util.stream.Stream.concat(
            java.util.Arrays.stream(common), java.util.Arrays.stream(more))
        .toArray();
  }

  @Test
  void a_plan_is_written_and_checks_clean() throws IOException {
    Path event = file("event.json", EVENT);
    Path plan = folder.resolve("plan.json");
    Outcome planned = run("plan", event, "--out", plan, "--steps", 2000);
    assertEquals("", planned.err());
    assertEquals(0, planned.code(), planned.out());
    assertTrue(planned.out().contains("Wrote " + plan + ": 1 groups, 0 breaches, 0 gaps, strain"));
    Outcome checked = run("check", event, plan);
    assertEquals(0, checked.code(), checked.out());
    assertTrue(checked.out().startsWith("0 breaches, 0 gaps, strain "));
  }

  @Test
  void the_same_seed_and_steps_give_the_same_bytes() throws IOException {
    Path event = file("event.json", EVENT);
    Path one = folder.resolve("one.json");
    Path two = folder.resolve("two.json");
    run("plan", event, "--out", one, "--steps", 3000, "--seed", 7);
    run("plan", event, "--out", two, "--steps", 3000, "--seed", 7);
    assertArrayEquals(Files.readAllBytes(one), Files.readAllBytes(two));
  }

  @Test
  void a_plan_with_gaps_is_written_and_told_by_its_exit_code() throws IOException {
    Path event = file("event.json", without(EVENT, ", \"crew\": {\"scrambles\": [\"cube3\"]}"));
    Path plan = folder.resolve("plan.json");
    Outcome planned = run("plan", event, "--out", plan, "--seconds", 0.5);
    assertEquals(3, planned.code(), planned.err());
    assertTrue(planned.out().contains("Still wrong: unfilled 1."), planned.out());
    assertTrue(Files.exists(plan));
    assertEquals(0, run("check", event, plan).code());
  }

  @Test
  void what_no_plan_can_do_is_said_before_the_search_and_by_advise() throws IOException {
    Path event = file("event.json", without(EVENT, ", \"crew\": {\"scrambles\": [\"cube3\"]}"));
    String says =
        "Nobody can scramble 3x3x3, and a group of 3x3x3 round 1 needs 1 at once; find 1 person"
            + " more who can, or teach somebody.";
    Outcome planned = run("plan", event, "--out", folder.resolve("plan.json"), "--steps", 2000);
    assertEquals(3, planned.code(), planned.err());
    int said = planned.out().indexOf("  " + says);
    assertTrue(said > 0 && said < planned.out().indexOf("Wrote "), planned.out());
    Outcome advised = run("advise", event);
    assertEquals(1, advised.code(), advised.err());
    assertTrue(advised.out().contains("  " + says), advised.out());
    Outcome fine = run("advise", file("fine.json", EVENT));
    assertEquals(0, fine.code(), fine.err());
    assertTrue(fine.out().startsWith("Nothing is known"), fine.out());
  }

  @Test
  void why_tells_what_a_duty_costs_and_what_else_there_is() throws IOException {
    Path event = file("event.json", EVENT);
    Path plan = file("plan.json", PLAN);
    Outcome asked = run("why", event, plan, "--person", "Cy");
    assertEquals(0, asked.code(), asked.err());
    // one duty of 15 minutes: load 1 x 0.5, waiting 1/4 hour x 4
    assertEquals(
        List.of(
            "Cy has 1 commitment, which cost load 0.5, waiting 1.0.",
            "  Cy is judge of group 1 of 3x3x3 round 1 (Sat 8 May 09:00-09:15), which costs load"
                + " 0.5, waiting 1.0; the best alternative is to take Cy off duty as judge of group"
                + " 1 of 3x3x3 round 1 (Sat 8 May 09:00-09:15): 1 gap more, strain 1.5 less."),
        asked.out().lines().toList());
    assertRefused(
        "--person is \"Cyd\"; give the id or name of somebody in the event",
        run("why", event, plan, "--person", "Cyd"));
    assertRefused("Ask about --person, or about --group and --duty", run("why", event, plan));
    assertRefused(
        "--group is \"b/1\"; give the id of a group of the plan, or its round and number such as"
            + " a/1",
        run("why", event, plan, "--group", "b/1", "--duty", "judge"));
    assertRefused(
        "--duty is \"timer\"; give one of judge, scrambler, runner",
        run("why", event, plan, "--group", "a/1", "--duty", "timer"));
  }

  @Test
  void an_empty_duty_is_explained_and_advice_says_what_would_fill_it() throws IOException {
    Path event = file("event.json", EVENT);
    Path plan = file("plan.json", PLAN.replace("[\"p3\"]", "[]"));
    Outcome asked = run("why", event, plan, "--group", "a/1", "--duty", "judge");
    assertEquals(0, asked.code(), asked.err());
    assertTrue(
        asked.out().startsWith("Group 1 of 3x3x3 round 1 (Sat 8 May 09:00-09:15) could have its"),
        asked.out());
    assertTrue(asked.out().contains("of 4 people, 3 lack the skill, 1 could do it."), asked.out());
    String put =
        "  Put Cy on duty as judge of group 1 of 3x3x3 round 1 (Sat 8 May 09:00-09:15): 1 gap fewer,"
            + " strain 1.5 more.";
    assertTrue(asked.out().contains(put), asked.out());
    Outcome advised = run("advise", event, plan);
    assertEquals(1, advised.code(), advised.err());
    assertTrue(advised.out().contains(put), advised.out());
    assertTrue(
        advised.out().contains("2 people could cover all 2 duties, and no fewer could."),
        advised.out());
  }

  @Test
  void answers_as_json_hold_the_same_facts_on_one_line() throws IOException {
    Path event = file("event.json", EVENT);
    Path plan = file("plan.json", PLAN);
    Path gap = file("gap.json", PLAN.replace("[\"p3\"]", "[]"));
    String why = run("why", event, plan, "--person", "Cy", "--json").out();
    assertTrue(
        why.startsWith(
            "{\"person\":\"p3\",\"commitments\":[{\"group\":\"g\",\"does\":\"judge\",\"byRule\":"
                + "{\"load\":0.5,\"waiting\":1.0},\"alternative\":{\"breaches\":0,\"gaps\":1,"
                + "\"strain\":-1.5},\"says\":"),
        why);
    JsonNode empty =
        tree(run("why", event, gap, "--group", "a/1", "--duty", "judge", "--json").out());
    assertEquals(1, empty.get("empty").asInt());
    assertEquals(3, empty.get("people").get("lacks-the-skill").asInt());
    assertEquals(-1, empty.get("remedies").get(0).get("gaps").asInt());
    JsonNode advice = tree(run("advise", event, gap, "--json").out());
    assertEquals(0, advice.get("impossible").size());
    assertEquals(1, advice.get("empty").size());
    assertEquals(2, advice.get("fewest").get("fewest").asInt());
    Outcome moved =
        run("advise", event, plan, "--group", "a/1", "--start", "2027-05-08T08:50", "--json");
    assertEquals(2, tree(moved.out()).get("breaks").get("byRule").get("hall-closed").asInt());
  }

  private static JsonNode tree(String line) throws IOException {
    assertEquals(1, line.lines().count(), line);
    return new ObjectMapper().readTree(line);
  }

  @Test
  void advice_on_one_question_names_stand_ins_and_what_breaks() throws IOException {
    String more = EVENT.replace("\"Cy\", \"crew\"", "\"Cy\", \"household\": null, \"crew\"");
    Path event =
        file(
            "event.json",
            more.replace(
                "{\"id\": \"p4\"",
                "{\"id\": \"p5\", \"name\": \"Ed\", \"crew\": {\"judges\": true}}, {\"id\": \"p4\""));
    Path plan = file("plan.json", PLAN);
    Outcome standIn =
        run("advise", event, plan, "--group", "a/1", "--duty", "judge", "--falls-out", "Cy");
    assertEquals(0, standIn.code(), standIn.err());
    assertEquals("Ed can stand in: the price stays the same; tell Ed.", standIn.out().strip());
    Outcome leaves = run("advise", event, plan, "--falls-out", "Cy");
    assertEquals(
        List.of(
            "Take Cy out of the event: 1 gap more, strain 1.5 less (unfilled +1, load -0.5, waiting"
                + " -1.0).",
            "  new:  Group 1 of 3x3x3 round 1 (Sat 8 May 09:00-09:15) has 0 of the 1 judge it"
                + " wants."),
        leaves.out().lines().toList());
    Outcome moved = run("advise", event, plan, "--group", "a/1", "--start", "2027-05-08T08:50");
    assertTrue(
        moved
            .out()
            .startsWith(
                "Move group 1 of 3x3x3 round 1 (Sat 8 May 09:00-09:15) to Sat 8 May 08:50: 2 breaches"
                    + " more (hall-closed +2)."),
        moved.out());
    assertRefused(
        "Name the plan that the question is about after the event",
        run("advise", event, "--falls-out", "Cy"));
    assertRefused(
        "--hall is \"attic\"; give the id of a hall: h",
        run("advise", event, plan, "--group", "a/1", "--hall", "attic"));
  }

  @Test
  void a_file_with_three_mistakes_gives_three_lines_and_plans_nothing() throws IOException {
    Path event =
        file(
            "event.json",
            EVENT
                .replace("\"stations\": 4", "\"stations\": 0")
                .replace("\"number\": 1", "\"number\": 2")
                .replace("\"judges\": true", "\"judges\": 1"));
    Outcome planned = run("plan", event, "--out", folder.resolve("plan.json"));
    assertEquals(2, planned.code());
    assertEquals("", planned.out());
    List<String> lines = planned.err().lines().toList();
    assertEquals(3, lines.size(), planned.err());
    assertEquals(
        "roundwright: "
            + event
            + ": venues[0].halls[0].stations (h) is 0; write a whole number from 1 to 500",
        lines.get(0));
    assertFalse(Files.exists(folder.resolve("plan.json")));
  }

  @Test
  void the_figures_as_json_are_one_line() throws IOException {
    Path event = file("event.json", EVENT);
    Path plan = file("plan.json", PLAN);
    // load: two duties of 15 minutes, 1 each, at 0.5; waiting: 4 people x 1/4 hour at 4;
    // late-finish 15 at 1
    String figures =
        "{\"breaches\":{},\"gaps\":0,\"strain\":20.0,"
            + "\"byRule\":{\"load\":1.0,\"waiting\":4.0,\"late-finish\":15.0}}";
    Outcome checked = run("check", event, plan, "--json");
    assertEquals(figures + System.lineSeparator(), checked.out());
    assertEquals(0, checked.code());
    Path late = file("late.json", PLAN.replace("09:00", "08:50").replace("[\"p3\"]", "[]"));
    checked = run("check", event, late, "--json");
    assertTrue(
        checked.out().startsWith("{\"breaches\":{\"hall-closed\":2},\"gaps\":1,"), checked.out());
    assertEquals(1, checked.code());
  }

  @Test
  void a_kept_plan_and_a_moment_count_as_the_page_says() throws IOException {
    Path event = file("event.json", EVENT);
    Path kept = file("kept.json", PLAN);
    Path plan = file("plan.json", PLAN.replace("09:00", "09:10").replace("09:15", "09:25"));
    Outcome checked = run("check", event, plan, "--kept", kept, "--json");
    // four people, one commitment each: changed 4 x 15, told 4 x 30
    assertTrue(checked.out().contains("\"changed\":60.0,\"told\":120.0"), checked.out());
    assertEquals(0, checked.code());
    checked = run("check", event, plan, "--kept", kept, "--at", "2027-05-08T09:05", "--json");
    assertTrue(checked.out().startsWith("{\"breaches\":{\"past-changed\":4}"), checked.out());
    assertEquals(1, checked.code());
  }

  @Test
  void a_check_for_people_names_rules_people_and_amounts() throws IOException {
    Path event = file("event.json", EVENT);
    Path plan = file("plan.json", PLAN.replace("[\"p1\", \"p2\"]", "[\"p1\"]"));
    Outcome checked = run("check", event, plan);
    assertEquals(1, checked.code());
    assertTrue(checked.out().contains("  entry-missing 3\n"), checked.out());
    assertTrue(checked.out().contains("    Ben is in no group of 3x3x3 round 1.\n"));
    assertTrue(checked.out().contains("  waiting"));
  }

  @Test
  void a_forecast_is_a_table_of_rounds() throws IOException {
    Outcome forecast = run("forecast", file("event.json", EVENT));
    assertEquals(0, forecast.code());
    // path 5 x (25 + 45 + 25) = 475 s x 1.2 = 570 s: 10 minutes on two stations
    assertTrue(
        forecast
            .out()
            .contains("3x3x3 round 1                     2       1         2        10       10"),
        forecast.out());
  }

  @Test
  void a_forecast_answers_what_if_and_who_goes_on_and_what_overruns() throws IOException {
    Path event = file("event.json", EVENT);
    Outcome whatIf = run("forecast", event, "--what-if", "a");
    assertEquals(0, whatIf.code());
    List<String> lines = whatIf.out().lines().toList();
    assertTrue(lines.get(0).startsWith("if ") && lines.get(0).contains("80 in 100"), lines.get(0));
    assertTrue(lines.get(1).startsWith("as planned                1        2"), lines.get(1));
    assertTrue(lines.stream().anyMatch(line -> line.startsWith("1 group more")), whatIf.out());
    Outcome unknown = run("forecast", event, "--what-if", "none");
    assertRefused("--what-if: there is no round \"none\"; the rounds are a", unknown);
    assertTrue(run("forecast", event, "--chances").out().contains("No round waits"));
    String twoRounds =
        EVENT.replace(
            "\"crew\": {\"judges\": 1, \"scramblers\": 1, \"runners\": 0}}]",
            "\"advance\": {\"count\": 1}},"
                + " {\"id\": \"b\", \"discipline\": \"cube3\", \"number\": 2,"
                + " \"countedBy\": \"average-of-5\"}]");
    List<String> going =
        run("forecast", file("two.json", twoRounds), "--chances").out().lines().toList();
    assertEquals("b: 1 person on most days", going.get(0));
    // Ada's average is nearly always the better one
    assertTrue(going.get(1).matches("  +[89]\\d %  Ada \\(p1\\)"), going.get(1));
    assertTrue(going.get(2).matches("  +1?\\d %  Ben \\(p2\\)"), going.get(2));
    Outcome slots = run("forecast", event, "--slots-of", file("plan.json", PLAN));
    assertEquals(0, slots.code());
    assertTrue(slots.out().contains("likely to overrun"), slots.out());
    assertEquals(2, run("forecast", event, "--chances", "--what-if", "a").code());
  }

  @Test
  void wrong_files_are_refused_on_one_line_each_with_what_to_do() throws IOException {
    Path event = file("event.json", EVENT);
    Path plan = file("plan.json", PLAN);
    Path missing = folder.resolve("none.json");
    Path nowhere = folder.resolve("no").resolve("plan.json");
    assertRefused(
        missing + ": there is no such file; check its name and folder",
        run("plan", missing, "--out", plan));
    assertRefused(folder + ": is a folder; name a file in it", run("check", event, folder));
    assertRefused(
        folder + ": is a folder; name a file in it with --out",
        run("plan", event, "--out", folder));
    assertRefused(
        nowhere + ": there is no folder " + nowhere.getParent() + "; make it first",
        run("plan", event, "--out", nowhere));
    Outcome swapped = run("check", plan, event);
    assertEquals(2, swapped.code());
    assertRefused(
        plan + ": format is \"roundwright-plan/1\"; only \"roundwright-event/1\" is read here",
        swapped.err().lines().findFirst().orElseThrow());
    assertRefused(
        "--at says when the plan was kept; name that plan with --kept",
        run("check", event, plan, "--at", "2027-05-08T09:00"));
    assertRefused(
        "--at is \"nine\"; write a local date and time in whole minutes, without offset,"
            + " such as 2027-05-08T09:00",
        run("check", event, file("p.json", PLAN), "--kept", file("k.json", PLAN), "--at", "nine"));
  }

  private static void assertRefused(String message, Outcome outcome) {
    assertEquals(2, outcome.code());
    assertRefused(message, outcome.err().strip());
  }

  private static void assertRefused(String message, String line) {
    assertEquals("roundwright: " + message, line);
  }

  @Test
  void wrong_arguments_are_refused_on_one_line_with_where_to_look() throws IOException {
    Path event = file("event.json", EVENT);
    Path plan = folder.resolve("plan.json");
    assertRefused(
        "Missing required option: '--out=PLAN.json'. Try: roundwright plan --help",
        run("plan", event));
    assertRefused("Unmatched argument at index 0: 'plann'. Try: roundwright --help", run("plann"));
    assertRefused("--steps is 0; give 1 or more", run("plan", event, "--out", plan, "--steps", 0));
    assertRefused(
        "--threads is 0; give 1 to 64", run("plan", event, "--out", plan, "--threads", 0));
    assertRefused(
        "--seconds is -1.0; give more than 0, at most 86400",
        run("plan", event, "--out", plan, "--seconds=-1"));
    assertFalse(Files.exists(plan));
  }

  @ParameterizedTest
  @ValueSource(strings = {"", "plan", "check", "forecast", "advise", "why", "serve"})
  void each_command_helps_and_ends_well(String command) {
    Outcome help = command.isEmpty() ? run("--help") : run(command, "--help");
    assertEquals(0, help.code());
    assertTrue(help.out().contains("Usage: roundwright " + command), help.out());
    assertTrue(help.out().lines().allMatch(line -> line.length() <= 80), help.out());
  }

  @Test
  void the_version_is_told_and_no_command_at_all_gets_help() {
    assertEquals("Roundwright 0.1.0" + System.lineSeparator(), run("--version").out());
    Outcome nothing = run();
    assertEquals(2, nothing.code());
    assertTrue(nothing.err().contains("Commands:"));
  }

  private static Progress.Report report(double seconds, String strain, String... wrong) {
    return new Progress.Report(
        Progress.Stage.FIRST_PLAN,
        new Cost(wrong.length, 0, new BigDecimal(strain)),
        seconds,
        10,
        List.of(wrong));
  }

  @Test
  void a_terminal_sees_one_line_written_again() {
    StringWriter out = new StringWriter();
    ProgressLines lines = new ProgressLines(new PrintWriter(out), true);
    lines.report(report(0.1, "1234.56", "two-places"));
    lines.report(report(0.2, "7"));
    lines.finish();
    String first = "   0.1 s  first plan  1 breach, 0 gaps, strain 1234.6; still wrong: two-places";
    String second = "   0.2 s  first plan  0 breaches, 0 gaps, strain 7.0";
    String blanks = " ".repeat(first.length() - second.length());
    assertEquals(
        "\r" + first + "\r" + second + blanks + "\r" + " ".repeat(second.length()) + "\r",
        out.toString());
  }

  @Test
  void a_pipe_sees_plain_lines_now_and_then() {
    StringWriter out = new StringWriter();
    ProgressLines lines = new ProgressLines(new PrintWriter(out), false);
    lines.report(report(0.1, "9"));
    lines.report(report(1.9, "8"));
    lines.report(report(2.2, "7"));
    lines.finish();
    assertEquals(
        List.of(
            "   0.1 s  first plan  0 breaches, 0 gaps, strain 9.0",
            "   2.2 s  first plan  0 breaches, 0 gaps, strain 7.0"),
        out.toString().lines().toList());
  }

  @Test
  void a_search_stops_when_asked_to() {
    ProgressLines lines = new ProgressLines(new PrintWriter(new StringWriter()), false);
    assertFalse(lines.stopWanted());
    lines.stop();
    assertTrue(lines.stopWanted());
  }

  @Test
  void an_event_is_brought_in_once_under_a_name() throws IOException {
    Path event = Files.writeString(folder.resolve("event.json"), EVENT);
    Path database = folder.resolve("database");
    Outcome first = run("import", event, "--as", "evening", "--database", database);
    assertEquals(0, first.code(), first.err());
    assertTrue(first.out().contains("Evening is in, with 4 people"), first.out());
    Outcome second = run("import", event, "--as", "evening", "--database", database);
    assertEquals(2, second.code());
    assertTrue(second.err().contains("Choose another address"), second.err());
    Outcome named = run("import", event, "--as", "Evening!", "--database", database);
    assertEquals(2, named.code());
    assertTrue(named.err().contains("small letters, digits and hyphens"), named.err());
    Outcome missing = run("import", folder.resolve("none"), "--as", "x", "--database", database);
    assertTrue(missing.err().contains("there is no such file"), missing.err());
  }

  @Test
  void a_folder_of_tables_is_brought_in_and_its_mistakes_are_named() throws IOException {
    Path database = folder.resolve("database");
    Outcome good = run("import", "../demo-event", "--as", "demo", "--database", database);
    assertEquals(0, good.code(), good.err());
    Path tables = Files.createDirectory(folder.resolve("tables"));
    Files.writeString(tables.resolve("event.csv"), "name,zone\nX,Nowhere\n");
    Outcome bad = run("import", tables, "--as", "bad", "--database", database);
    assertEquals(2, bad.code());
    assertTrue(bad.err().contains("event.csv"), bad.err());
  }
}
