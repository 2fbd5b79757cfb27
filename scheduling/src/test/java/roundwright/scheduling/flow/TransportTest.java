package roundwright.scheduling.flow;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assumptions.assumeTrue;

import java.io.IOException;
import java.nio.file.Files;
import java.nio.file.Path;
import java.util.ArrayList;
import java.util.Arrays;
import java.util.List;
import java.util.Random;
import java.util.StringTokenizer;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.ValueSource;

class TransportTest {
  private static final long OUT = 1_000_000_000L;

  @ParameterizedTest
  @ValueSource(longs = {1, 2, 3, 4, 5, 6, 7, 8, 9, 10, 11, 12})
  void findsTheSameCostAsTryingEverything(long seed) {
    Random random = new Random(seed);
    for (int round = 0; round < 40; round++) {
      int rows = 1 + random.nextInt(6);
      int columns = 1 + random.nextInt(3);
      long[][] cost = new long[rows][columns];
      long[] out = new long[rows];
      long[][] units = new long[columns][];
      for (int r = 0; r < rows; r++) {
        out[r] = random.nextInt(30);
        for (int c = 0; c < columns; c++) {
          cost[r][c] = random.nextInt(5) == 0 ? Transport.FORBIDDEN : random.nextInt(40) - 15;
        }
      }
      for (int c = 0; c < columns; c++) {
        units[c] = random.longs(random.nextInt(4), -20, 20).sorted().toArray();
      }
      Transport transport = solve(cost, out, units);
      assertEquals(
          leastByTrying(cost, out, units, 0, new int[columns]),
          transport.total(),
          "seed " + seed + ", problem " + round);
      assertEquals(
          transport.total(),
          bound(transport.prices(), cost, out, units),
          "dual bound, seed " + seed + ", problem " + round);
    }
  }

  @ParameterizedTest
  @ValueSource(longs = {21, 22, 23})
  void provesALargerSolutionByItsPrices(long seed) {
    Random random = new Random(seed);
    int rows = 300;
    int columns = 17;
    long[][] cost = new long[rows][columns];
    long[] out = new long[rows];
    long[][] units = new long[columns][];
    for (int r = 0; r < rows; r++) {
      out[r] = OUT;
      for (int c = 0; c < columns; c++) {
        cost[r][c] = random.nextInt(1000);
      }
    }
    for (int c = 0; c < columns; c++) {
      units[c] = random.longs(20, 0, 5000).sorted().toArray();
    }
    Transport transport = solve(cost, out, units);
    assertEquals(transport.total(), bound(transport.prices(), cost, out, units), "seed " + seed);
  }

  /** OR-Library (Beasley 1990) assign500 and generated ones; values.tsv beside them. */
  @Test
  void meetsThePublishedAssignments() throws IOException {
    String outside = System.getenv("ROUNDWRIGHT_OUTSIDE");
    assumeTrue(outside != null, "ROUNDWRIGHT_OUTSIDE names no folder with published assignments");
    Path folder = Path.of(outside, "assignment");
    List<String> lines = Files.readAllLines(folder.resolve("values.tsv"));
    List<String> header = Arrays.asList(lines.get(0).split("\t", -1));
    int checked = 0;
    for (String line : lines.subList(1, lines.size())) {
      String[] cells = line.split("\t", -1);
      Path file = folder.resolve(cells[header.indexOf("file")]);
      String least = cells[header.indexOf("value")].split(",", -1)[0].replace("min ", "");
      long value = Long.parseLong(least.trim());
      assertEquals(value, leastAssignment(Files.readString(file)), file.toString());
      checked++;
    }
    assertEquals(5, checked);
  }

  private static long leastAssignment(String text) {
    StringTokenizer numbers = new StringTokenizer(text);
    int n = Integer.parseInt(numbers.nextToken());
    long[][] cost = new long[n][n];
    for (long[] row : cost) {
      for (int c = 0; c < n; c++) {
        row[c] = Long.parseLong(numbers.nextToken());
      }
    }
    long[] out = new long[n];
    Arrays.fill(out, OUT);
    long[][] units = new long[n][1];
    return solve(cost, out, units).total();
  }

  private static Transport solve(long[][] cost, long[] out, long[][] units) {
    Transport transport = new Transport();
    transport.begin(cost.length, units.length);
    for (int r = 0; r < cost.length; r++) {
      transport.outCost(r, out[r]);
      for (int c = 0; c < units.length; c++) {
        transport.cost(r, c, cost[r][c]);
      }
    }
    for (int c = 0; c < units.length; c++) {
      transport.units(c, units[c]);
    }
    transport.solve();
    return transport;
  }

  private static long leastByTrying(
      long[][] cost, long[] out, long[][] units, int row, int[] used) {
    if (row == cost.length) {
      return 0;
    }
    long least = out[row] + leastByTrying(cost, out, units, row + 1, used);
    for (int c = 0; c < units.length; c++) {
      if (used[c] < units[c].length && cost[row][c] < Transport.FORBIDDEN) {
        long unit = units[c][used[c]];
        used[c]++;
        least =
            Math.min(least, cost[row][c] + unit + leastByTrying(cost, out, units, row + 1, used));
        used[c]--;
      }
    }
    return least;
  }

  private static long bound(long[] prices, long[][] cost, long[] out, long[][] units) {
    long bound = 0;
    for (int r = 0; r < cost.length; r++) {
      long least = out[r];
      for (int c = 0; c < prices.length; c++) {
        if (cost[r][c] < Transport.FORBIDDEN) {
          least = Math.min(least, cost[r][c] + prices[c]);
        }
      }
      bound += least;
    }
    for (int c = 0; c < prices.length; c++) {
      List<Long> sums = new ArrayList<>(List.of(0L));
      for (long unit : units[c]) {
        sums.add(sums.get(sums.size() - 1) + unit - prices[c]);
      }
      bound += sums.stream().mapToLong(Long::longValue).min().getAsLong();
    }
    return bound;
  }
}
