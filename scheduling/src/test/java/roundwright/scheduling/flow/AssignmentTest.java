package roundwright.scheduling.flow;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertThrows;
import static org.junit.jupiter.api.Assertions.assertTrue;

import java.util.Arrays;
import java.util.Random;
import java.util.stream.LongStream;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.MethodSource;

/** The least-cost assignment against every other one, and against transportation. */
class AssignmentTest {
  static LongStream seeds() {
    return LongStream.rangeClosed(1, 60);
  }

  private static int[][] costs(Random random, int rows, int columns) {
    int[][] costs = new int[rows][columns];
    for (int[] row : costs) {
      Arrays.setAll(row, c -> random.nextInt(100));
    }
    return costs;
  }

  /** Solves, and checks that no two rows share a column. */
  private static long solved(Assignment assignment, int[][] costs) {
    assignment.begin(costs.length, costs[0].length);
    for (int r = 0; r < costs.length; r++) {
      for (int c = 0; c < costs[r].length; c++) {
        assignment.cost(r, c, costs[r][c]);
      }
    }
    assignment.solve();
    boolean[] used = new boolean[costs[0].length];
    long total = 0;
    for (int r = 0; r < costs.length; r++) {
      int c = assignment.columnOf(r);
      assertTrue(!used[c], "column " + c + " twice");
      used[c] = true;
      total += costs[r][c];
    }
    return total;
  }

  private static long leastOfAll(int[][] costs, int row, boolean[] used) {
    if (row == costs.length) {
      return 0;
    }
    long least = Long.MAX_VALUE;
    for (int c = 0; c < used.length; c++) {
      if (!used[c]) {
        used[c] = true;
        least = Math.min(least, costs[row][c] + leastOfAll(costs, row + 1, used));
        used[c] = false;
      }
    }
    return least;
  }

  @ParameterizedTest
  @MethodSource("seeds")
  void costsAsLittleAsTheBestOfAllAssignments(long seed) {
    Random random = new Random(seed);
    Assignment assignment = new Assignment();
    for (int problem = 0; problem < 20; problem++) {
      int rows = 1 + random.nextInt(6);
      int[][] costs = costs(random, rows, rows + random.nextInt(3));
      assertEquals(
          leastOfAll(costs, 0, new boolean[costs[0].length]),
          solved(assignment, costs),
          "seed " + seed + ", problem " + problem);
    }
  }

  @ParameterizedTest
  @MethodSource("seeds")
  void costsAsMuchAsTransportationSays(long seed) {
    Random random = new Random(seed);
    int rows = 20 + random.nextInt(20);
    int[][] costs = costs(random, rows, rows + 5);
    Transport transport = new Transport();
    transport.begin(rows, rows + 5);
    for (int r = 0; r < rows; r++) {
      transport.outCost(r, Transport.FORBIDDEN);
      for (int c = 0; c < rows + 5; c++) {
        transport.cost(r, c, costs[r][c]);
        transport.units(c, new long[] {0});
      }
    }
    transport.solve();
    assertEquals(transport.total(), solved(new Assignment(), costs), "seed " + seed);
  }

  @Test
  void moreRowsThanColumnsAreRefused() {
    assertThrows(IllegalArgumentException.class, () -> new Assignment().begin(3, 2));
  }
}
