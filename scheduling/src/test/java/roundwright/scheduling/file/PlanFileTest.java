package roundwright.scheduling.file;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertThrows;
import static org.junit.jupiter.api.Assertions.assertTrue;

import java.io.IOException;
import java.math.BigDecimal;
import java.nio.file.Path;
import java.time.Instant;
import java.util.List;
import java.util.Optional;
import java.util.stream.Stream;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.api.io.TempDir;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.Arguments;
import org.junit.jupiter.params.provider.MethodSource;
import roundwright.scheduling.cost.Cost;
import roundwright.scheduling.model.Event;
import roundwright.scheduling.model.Group;
import roundwright.scheduling.model.Plan;

final class PlanFileTest {
  private static final String PLAN = Broken.resource("every-key-plan.json");

  private static Event event() {
    try {
      return EventFile.read(Broken.resource("every-key.json")).event();
    } catch (FileProblems problems) {
      throw new AssertionError("The event of these tests is good", problems);
    }
  }

  @Test
  void a_plan_comes_back_the_same_to_the_last_character(@TempDir Path folder)
      throws IOException, FileProblems {
    PlanFile first = PlanFile.read(PLAN, event());
    Path path = folder.resolve("plan.json");
    first.write(path, event());
    PlanFile second = PlanFile.read(path, event());
    assertEquals(first, second);
    assertEquals(first.json(event()), second.json(event()));
    assertTrue(first.json(event()).contains("\"x-letter\": \"A\""));
    assertTrue(first.json(event()).contains("\"x-made-by\": {\"hand\": true}"));
  }

  @Test
  void times_are_in_the_zone_of_the_hall() throws FileProblems {
    Plan plan = PlanFile.read(PLAN, event()).plan();
    assertEquals(Instant.parse("2027-05-08T08:30:00Z"), plan.groups().get(0).start());
    assertEquals(Instant.parse("2027-05-08T09:30:00Z"), plan.groups().get(1).start());
    assertEquals(List.of("p002", "p002"), plan.groups().get(1).competitors());
  }

  @Test
  void score_and_findings_and_crews_may_be_left_out() throws FileProblems {
    String json =
        """
        {
          "format": "roundwright-plan/1",
          "groups": [
            {
              "id": "g", "round": "blind-a", "number": 1, "hall": "gym", "stations": 3,
              "start": "2027-05-08T11:30", "end": "2027-05-08T12:05", "competitors": ["p001"]
            }
          ]
        }
        """;
    Plan plan = PlanFile.read(json, event()).plan();
    assertEquals(Optional.empty(), plan.score());
    assertEquals(Group.Crew.NONE, plan.groups().get(0).crew());
    assertEquals(plan, PlanFile.read(new PlanFile(plan).json(event()), event()).plan());
  }

  @Test
  void strain_is_written_with_one_decimal() {
    Plan plan =
        new Plan(List.of(), Optional.of(new Cost(0, 2, new BigDecimal("12.05"))), List.of());
    assertTrue(
        new PlanFile(plan)
            .json(event())
            .contains("\"score\": {\"breaches\": 0, \"gaps\": 2, \"strain\": 12.1}"));
  }

  @Test
  void a_finding_of_another_program_is_passed_over() throws FileProblems {
    String json = PLAN.replace("\"rule\": \"unfilled\"", "\"rule\": \"moonlight\"");
    assertEquals(1, PlanFile.read(json, event()).plan().findings().size());
  }

  @Test
  void a_kept_plan_may_name_people_halls_and_rounds_that_have_left() throws FileProblems {
    String json =
        PLAN.replace("\"hall\": \"gym\"", "\"hall\": \"barn\"")
            .replace("\"round\": \"cube3-a\"", "\"round\": \"cube9-a\"")
            .replace("p003", "p909");
    assertThrows(FileProblems.class, () -> PlanFile.read(json, event()));
    Plan plan = PlanFile.readKept(json, event()).plan();
    assertEquals(Instant.parse("2027-05-08T10:30:00Z"), plan.groups().get(1).start());
    assertEquals(List.of("p909"), plan.groups().get(0).crew().runners());
    PlanFile again = new PlanFile(plan);
    assertEquals(plan, PlanFile.readKept(again.json(event()), event()).plan());
  }

  static Stream<Arguments> brokenFiles() {
    return Broken.rows("broken-plans.json", PLAN);
  }

  @ParameterizedTest(name = "{0}")
  @MethodSource("brokenFiles")
  void each_broken_plan_says_what_is_wrong_where_and_what_to_do(String json, String message) {
    FileProblems problems = assertThrows(FileProblems.class, () -> PlanFile.read(json, event()));
    assertEquals(message, problems.getMessage());
  }
}
