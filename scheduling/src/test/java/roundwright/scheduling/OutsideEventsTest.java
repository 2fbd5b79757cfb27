package roundwright.scheduling;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertTrue;
import static org.junit.jupiter.api.Assumptions.assumeTrue;

import java.io.IOException;
import java.nio.file.Files;
import java.nio.file.Path;
import java.util.stream.Stream;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.Arguments;
import org.junit.jupiter.params.provider.CsvSource;
import org.junit.jupiter.params.provider.MethodSource;
import roundwright.scheduling.audit.Auditor;
import roundwright.scheduling.audit.Verdict;
import roundwright.scheduling.cost.RuleName;
import roundwright.scheduling.model.Event;
import roundwright.scheduling.model.Plan;

/** Published problems, planned as whole events: the least length of the day is known. */
class OutsideEventsTest {
  private static int planned(Event event, long steps, String about) {
    Plan plan = Planner.plan(event, Effort.ofSteps(steps), Progress.NONE);
    Verdict verdict = new Auditor(event).audit(plan);
    assertEquals(0, verdict.cost().breaches(), about + ": " + verdict.amounts());
    int minutes = OutsideEvents.minutes(plan);
    assertEquals(minutes, verdict.amounts().get(RuleName.LATE_FINISH).intValueExact(), about);
    return minutes;
  }

  /** Colours by the DIMACS table; each was proved again by an exact method. */
  static Stream<Arguments> graphs() {
    return Stream.of(
        Arguments.of("myciel3", OutsideEvents.Graph.mycielski(3), 11, 20, 4, 4),
        Arguments.of("myciel4", OutsideEvents.Graph.mycielski(4), 23, 71, 5, 5),
        Arguments.of("queen5_5", OutsideEvents.Graph.queen(5), 25, 160, 5, 5),
        Arguments.of("queen6_6", OutsideEvents.Graph.queen(6), 36, 290, 7, 7));
  }

  @ParameterizedTest
  @MethodSource("graphs")
  void roundsThatShareSomebodyTakeAsManySlotsAsTheGraphHasColours(
      String name, OutsideEvents.Graph graph, int vertices, int edges, int colours, int most) {
    assertEquals(vertices, graph.vertices(), name);
    assertEquals(edges, graph.edges().size(), name);
    int slots = planned(graph.event(), 300_000, name) / OutsideEvents.SLOT_MINUTES;
    assertTrue(slots >= colours && slots <= most, name + ": " + slots + " for " + colours);
  }

  private static Path published(String family, String name) {
    String folder = System.getenv("ROUNDWRIGHT_OUTSIDE");
    assumeTrue(folder != null, "ROUNDWRIGHT_OUTSIDE names no folder of published instances");
    Path file = Path.of(folder, family, name);
    assumeTrue(Files.exists(file), "There is no " + file);
    return file;
  }

  /** Makespans of Taillard's instances (1993), each proved again by an exact method. */
  @ParameterizedTest
  @CsvSource({
    "1, 193", "2, 236", "3, 271", "4, 250", "5, 295", "6, 189",
  })
  void anOpenShopOfFourHallsAndFourPeopleComesNearItsMakespan(int number, int makespan)
      throws IOException {
    String name = "ta4x4_" + number + "os.txt";
    int minutes = planned(OutsideEvents.read(published("open-shop", name)), 1_000_000, name);
    assertTrue(
        minutes >= makespan && minutes <= makespan * 1.01,
        name + ": " + minutes + " for " + makespan);
  }

  /** The fewest periods, proved by an exact method: see values.tsv beside the instance. */
  @Test
  void anExamTimetableTakesTheFewestPeriods() throws IOException {
    Event event = OutsideEvents.read(published("exam-timetabling", "sta-f-83.stu"));
    assertEquals(13, planned(event, 300_000, "sta-f-83") / OutsideEvents.SLOT_MINUTES);
  }
}
