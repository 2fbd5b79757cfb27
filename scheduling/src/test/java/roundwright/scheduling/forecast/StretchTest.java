package roundwright.scheduling.forecast;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertTrue;

import java.util.List;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.CsvSource;
import roundwright.scheduling.RandomEvents;
import roundwright.scheduling.Scene;
import roundwright.scheduling.model.Event;

class StretchTest {
  /**
   * One alone with one attempt and nothing to handle: a log-normal quantile, exp(0.25 z - 0.25^2 /
   * 2) times the mean, with z from the table of the normal distribution in the NIST/SEMATECH
   * e-Handbook of Statistical Methods, section 1.3.6.7.1. Fifty days tell it to within two standard
   * errors, sqrt(p (1 - p) / 50) over the density there.
   */
  @ParameterizedTest
  @CsvSource({"50, 0.000, 0.09", "80, 0.842, 0.12", "95, 1.645, 0.22"})
  void oneAloneStretchesAsTheQuantileOfTheirTime(int percentile, double z, double within) {
    Event event =
        new Scene()
            .hall("main", 10)
            .discipline("cube3")
            .set("handlingSeconds", 0)
            .set("scrambleSeconds", 0)
            .set("carrySeconds", 0)
            .round("a", "cube3", 1)
            .set("countedBy", "best-of-1")
            .rule("slotPercentile", percentile)
            .person("ada")
            .enters("cube3", 300)
            .event();
    double sigma = GroupSimulation.SIGMA;
    double expected = StrictMath.exp(sigma * z - sigma * sigma / 2);
    assertEquals(expected, Stretch.ofRounds(event).get(0)[0], within);
  }

  @Test
  void groupsOfAllRoundsStretchBetweenTheBoundAndTwiceItAndGivenLengthsAreLeftAlone() {
    for (int seed = 1; seed <= 10; seed++) {
      Event event = RandomEvents.fair(seed, 40, 2, 1).event();
      List<double[]> stretches = Stretch.ofRounds(event);
      assertEquals(event.rounds().size(), stretches.size());
      for (int r = 0; r < stretches.size(); r++) {
        boolean given = event.rounds().get(r).minutesPerGroup().isPresent();
        assertTrue(!given || stretches.get(r).length == 0, "seed " + seed + " round " + r);
        for (double stretch : stretches.get(r)) {
          assertTrue(stretch > 0.9 && stretch < 2, "seed " + seed + ": " + stretch);
        }
      }
    }
  }
}
