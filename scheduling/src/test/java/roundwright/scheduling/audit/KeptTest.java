package roundwright.scheduling.audit;

import static org.junit.jupiter.api.Assertions.assertEquals;

import org.junit.jupiter.api.Test;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.CsvSource;
import roundwright.scheduling.Scene;
import roundwright.scheduling.cost.RuleName;
import roundwright.scheduling.file.FileProblems;
import roundwright.scheduling.file.PlanFile;
import roundwright.scheduling.model.Plan;

/** What a plan changes of a kept one. */
final class KeptTest {
  private static Scene kept() {
    return new Scene()
        .hall("main", 10)
        .hall("annex", 10)
        .discipline("cube3")
        .round("a", "cube3", 1)
        .person("p")
        .enters("cube3", 20)
        .person("q")
        .judges()
        .runs()
        .group("g1", "a", 1, "main", "09:00-09:30")
        .solve("p")
        .judge("q")
        .keep();
  }

  @Test
  void without_a_kept_plan_nothing_is_changed() {
    Scene scene = new Scene().hall("main", 1).discipline("d").round("a", "d", 1).person("p");
    scene.group("g", "a", 1, "main", "09:00-09:30").solve("p");
    assertEquals("0", scene.amount(RuleName.CHANGED));
    assertEquals("0", scene.amount(RuleName.TOLD));
  }

  @ParameterizedTest
  @CsvSource({
    "main,  09:00-09:30, 0, 0",
    "main,  09:05-09:35, 0, 0",
    "main,  08:55-09:25, 0, 0",
    "main,  09:05-09:25, 0, 0",
    "main,  09:06-09:30, 2, 2",
    "main,  09:00-09:36, 2, 2",
    "main,  08:54-09:30, 2, 2",
    "annex, 09:00-09:30, 2, 2",
  })
  void up_to_five_minutes_in_the_same_hall_are_no_change(
      String hall, String stretch, String changed, String told) {
    Scene scene = kept().in("g1").at(stretch).set("hall", hall);
    assertEquals(changed, scene.amount(RuleName.CHANGED));
    assertEquals(told, scene.amount(RuleName.TOLD));
  }

  @Test
  void another_number_or_id_is_no_change_but_another_role_is_two() {
    Scene scene = kept().in("g1").set("number", 7).set("id", "g9");
    assertEquals("0", scene.amount(RuleName.CHANGED));
    scene.nobody().solve("p").run("q");
    assertEquals("2", scene.amount(RuleName.CHANGED));
    assertEquals("1", scene.amount(RuleName.TOLD));
  }

  @Test
  void what_is_new_or_gone_counts_once_each() {
    Scene scene = kept().group("g2", "a", 2, "main", "11:00-11:30").solve("p").judge("q");
    assertEquals("2", scene.amount(RuleName.CHANGED));
    scene.drop("g1");
    // both are moved now: one gone and one new each
    assertEquals("2", scene.amount(RuleName.CHANGED));
    assertEquals("2", scene.in("g2").nobody().solve("p").amount(RuleName.CHANGED));
    assertEquals("2", scene.amount(RuleName.TOLD));
  }

  @Test
  void partners_are_found_one_to_one_as_many_as_possible() {
    Scene scene =
        new Scene()
            .hall("main", 10)
            .discipline("cube3")
            .round("a", "cube3", 1)
            .person("p")
            .group("g1", "a", 1, "main", "09:05-09:35")
            .solve("p")
            .group("g2", "a", 2, "main", "09:10-09:40")
            .solve("p")
            .keep()
            .in("g1")
            .at("09:05-09:35")
            .in("g2")
            .at("09:00-09:30");
    // taking the nearest first would leave 9:10 without a partner for 9:00
    assertEquals("0", scene.amount(RuleName.CHANGED));
    assertEquals("1", scene.in("g1").at("09:04-09:34").amount(RuleName.CHANGED));
  }

  @Test
  void the_past_counts_both_what_is_gone_and_what_is_new() {
    Scene scene = kept().in("g1").at("09:10-09:40");
    assertEquals("0", scene.amountAt(RuleName.PAST_CHANGED, "09:00"));
    assertEquals("2", scene.amountAt(RuleName.PAST_CHANGED, "09:01"));
    assertEquals("2", scene.amountAt(RuleName.PAST_CHANGED, "09:10"));
    assertEquals("4", scene.amountAt(RuleName.PAST_CHANGED, "09:11"));
    assertEquals("0", scene.amount(RuleName.PAST_CHANGED));
  }

  @Test
  void people_who_have_left_are_left_out_and_halls_and_rounds_are_not() {
    Scene scene =
        new Scene()
            .zone("Europe/Lisbon")
            .venue("house")
            .hall("main", 10)
            .venue("school")
            .set("zone", "Europe/Madrid")
            .hall("gym", 10)
            .discipline("cube3")
            .round("a", "cube3", 1)
            .person("p")
            .group("g1", "a", 1, "main", "09:00-09:30")
            .solve("p");
    Auditor auditor = new Auditor(scene.event());
    Verdict verdict =
        auditor.audit(
            scene.plan(),
            new Kept(
                keptPlan(
                    scene,
                    "\"round\": \"a\", \"hall\": \"barn\", \"competitors\": [\"p\", \"gone\"]")));
    assertEquals("1", verdict.amounts().get(RuleName.CHANGED).toPlainString());
    assertEquals("1", verdict.amounts().get(RuleName.TOLD).toPlainString());
    verdict =
        auditor.audit(
            scene.plan(),
            new Kept(
                keptPlan(scene, "\"round\": \"z\", \"hall\": \"main\", \"competitors\": [\"p\"]")));
    assertEquals("2", verdict.amounts().get(RuleName.CHANGED).toPlainString());
  }

  private static Plan keptPlan(Scene scene, String keys) {
    try {
      return PlanFile.readKept(
              "{\"format\": \"roundwright-plan/1\", \"groups\": [{\"id\": \"k\", \"number\": 1,"
                  + " \"stations\": 1, \"start\": \"2027-05-08T09:00\","
                  + " \"end\": \"2027-05-08T09:30\", "
                  + keys
                  + "}]}",
              scene.event())
          .plan();
    } catch (FileProblems problems) {
      throw new AssertionError(problems);
    }
  }
}
