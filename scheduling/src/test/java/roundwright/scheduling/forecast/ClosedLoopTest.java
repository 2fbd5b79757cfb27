package roundwright.scheduling.forecast;

import static org.junit.jupiter.api.Assertions.assertAll;
import static org.junit.jupiter.api.Assertions.assertArrayEquals;
import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertThrows;
import static org.junit.jupiter.api.Assertions.assertTrue;
import static org.junit.jupiter.api.Assumptions.assumeTrue;

import com.fasterxml.jackson.databind.JsonNode;
import com.fasterxml.jackson.databind.ObjectMapper;
import java.io.IOException;
import java.nio.file.Files;
import java.nio.file.Path;
import java.util.ArrayList;
import java.util.Arrays;
import java.util.List;
import java.util.Map;
import java.util.function.ToDoubleFunction;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.api.function.Executable;
import roundwright.scheduling.forecast.ClosedLoop.AtCentre;
import roundwright.scheduling.forecast.ClosedLoop.Centre;
import roundwright.scheduling.forecast.ClosedLoop.SteadyState;

/** Published and independently computed values of closed loops; the source stands beside each. */
final class ClosedLoopTest {
  private static ClosedLoop loop(double think, double[] service, double[] visits, int... servers) {
    List<Centre> centres = new ArrayList<>();
    for (int i = 0; i < service.length; i++) {
      centres.add(new Centre("centre " + i, service[i], visits[i], servers[i]));
    }
    return new ClosedLoop(centres, think);
  }

  private static double[] each(SteadyState state, ToDoubleFunction<AtCentre> figure) {
    return state.centres().stream().mapToDouble(figure).toArray();
  }

  private static double[] of(double... figures) {
    return figures;
  }

  @Test
  void interactive_system_of_jain() {
    // Jain, The Art of Computer Systems Performance Analysis, 1991, example 34.2, p. 577:
    // R = (0.373, 4.854, 0.300), Q = (1.991, 16.177, 0.500); more digits by octave-queueing's
    // qncsmva: X = 0.33325, U = (0.66649, 0.99974, 0.33325)
    SteadyState state = loop(4, of(0.125, 0.3, 0.2), of(16, 10, 5), 1, 1, 1).steadyState(20);
    assertArrayEquals(of(0.373, 4.854, 0.3), each(state, AtCentre::residenceSeconds), 0.001);
    assertArrayEquals(of(1.991, 16.177, 0.5), each(state, AtCentre::customers), 0.001);
    assertArrayEquals(of(0.66649, 0.99974, 0.33325), each(state, AtCentre::use), 0.001);
    assertEquals(0.33325, state.throughput(), 0.001);
  }

  @Test
  void central_server_of_bolch() {
    // Bolch, Greiner, de Meer and Trivedi, Queueing Networks and Markov Chains, example 8.3, p. 331
    SteadyState state =
        loop(0, of(0.02, 0.2, 0.4, 0.6), of(1, 0.4, 0.2, 0.1), 1, 1, 1, 1).steadyState(6);
    assertArrayEquals(of(0.198, 0.794, 0.794, 0.595), each(state, AtCentre::use), 0.001);
    assertArrayEquals(of(0.025, 0.57, 1.14, 1.244), each(state, AtCentre::residenceSeconds), 0.001);
    assertArrayEquals(of(0.244, 2.261, 2.261, 1.234), each(state, AtCentre::customers), 0.001);
    assertEquals(9.92, state.throughput(), 0.001);
  }

  @Test
  void asymptotic_bounds_of_bolch() {
    // the same book, example 9.6, p. 913: demands 9.2 and 8, think time 120, 20 customers
    ClosedLoop loop = loop(120, of(9.2, 8), of(1, 1), 1, 1);
    assertEquals(0.109, loop.mostThroughput(20), 0.001);
    assertEquals(64, loop.leastResponseSeconds(20), 0.001);
  }

  @Test
  void the_approximation_of_lazowska_is_not_what_an_exact_method_gives() {
    // Lazowska, Zahorjan, Graham and Sevcik, Quantitative System Performance, 1984, p. 117, give
    // the
    // approximate Q = (0.0973, 0.4021, 0.2359); exact by octave-queueing's qncsmva:
    // X = 0.15152, Q = (0.09757, 0.39466, 0.23503)
    SteadyState state = loop(15, of(0.605, 2.1, 1.35), of(1, 1, 1), 1, 1, 1).steadyState(3);
    assertEquals(0.15152, state.throughput(), 0.00001);
    assertArrayEquals(of(0.09757, 0.39466, 0.23503), each(state, AtCentre::customers), 0.00001);
    double[] approximate = {0.0973, 0.4021, 0.2359};
    double farthest = 0;
    for (int i = 0; i < approximate.length; i++) {
      double apart = Math.abs(state.centres().get(i).customers() - approximate[i]);
      farthest = Math.max(farthest, apart);
    }
    assertTrue(farthest > 0.005, "An exact method is no approximation: " + farthest);
  }

  @Test
  void machines_and_repairers_are_a_loop_with_thinking() {
    // Ross, Introduction to Probability Models, exercise: 3 machines, 2 repairers, mean 10 up and 8
    // in repair: nobody busy 250/1522, both busy 336/761
    SteadyState state = loop(10, of(8), of(1), 2).steadyState(3);
    List<Double> p = state.centres().get(0).probabilities();
    assertEquals(250 / 1522.0, p.get(0), 1e-6);
    assertEquals(336 / 761.0, p.get(2) + p.get(3), 1e-6);
    assertEquals(1068 / 761.0, state.centres().get(0).customers(), 1e-6);
    // birth and death chains solved independently
    state = loop(12, of(8), of(1), 1).steadyState(2);
    p = state.centres().get(0).probabilities();
    assertArrayEquals(
        of(0.31034, 0.41379, 0.27586), p.stream().mapToDouble(Double::doubleValue).toArray(), 1e-5);
    assertEquals(0.965517, state.centres().get(0).customers(), 1e-6);
    assertEquals(0.086207, state.throughput(), 1e-6);
    assertEquals(11.2, state.centres().get(0).residenceSeconds(), 1e-6);
    state = loop(60, of(15), of(1), 2).steadyState(12);
    assertEquals(4.527626, state.centres().get(0).customers(), 1e-6);
    assertEquals(0.12454, state.throughput(), 1e-6);
    assertEquals(36.354914, state.centres().get(0).residenceSeconds(), 1e-5);
    assertEquals(0.02638, state.centres().get(0).probabilities().get(0), 1e-5);
    assertEquals(0.00037, state.centres().get(0).probabilities().get(12), 1e-5);
  }

  @Test
  void groups_as_loops_of_scramblers_runners_and_stations() {
    // exact values computed independently, exponential times; the bound holds for any distribution
    ClosedLoop loop = loop(0, of(30, 15, 75), of(1, 2, 1), 1, 1, 4);
    SteadyState state = loop.steadyState(8);
    assertEquals(0.02796, state.throughput(), 0.0001);
    assertArrayEquals(
        of(103.07961, 51.53981, 79.93182), each(state, AtCentre::residenceSeconds), 0.0001);
    assertArrayEquals(of(2.88243, 2.88243, 2.23514), each(state, AtCentre::customers), 0.0001);
    assertEquals(0.033333, loop.mostThroughput(8), 0.0001);
    state = loop(0, of(30, 15, 75), of(1, 2, 1), 2, 1, 6).steadyState(12);
    assertEquals(0.03325, state.throughput(), 0.0001);
    assertArrayEquals(
        of(39.5996, 122.68095, 75.9116), each(state, AtCentre::residenceSeconds), 0.0001);
    state = loop(0, of(60, 10, 40), of(1, 2, 1), 1, 2, 5).steadyState(10);
    assertEquals(0.01667, state.throughput(), 0.0001);
    assertArrayEquals(
        of(539.42309, 10.28569, 40.00599), each(state, AtCentre::residenceSeconds), 0.0001);
  }

  @Test
  void a_large_busy_loop_keeps_its_digits() {
    // with one bottleneck the throughput tends to its capacity, 24 / 75 per second, from below,
    // and the customers add up
    ClosedLoop loop = loop(0, of(20, 5, 75), of(1, 2, 1), 12, 8, 24);
    SteadyState state = loop.steadyState(200);
    assertEquals(24 / 75.0, state.throughput(), 1e-9);
    assertEquals(200, state.centres().stream().mapToDouble(AtCentre::customers).sum(), 1e-6);
    for (AtCentre centre : state.centres()) {
      double sum = centre.probabilities().stream().mapToDouble(Double::doubleValue).sum();
      assertEquals(1, sum, 1e-9);
    }
    assertEquals(state.throughput(), loop.throughput(200), 1e-12);
  }

  @Test
  void the_throughput_stays_under_the_bounds_and_grows_with_customers() {
    ClosedLoop loop = loop(7, of(20, 0, 75), of(1, 3, 1), 3, 1, 5);
    double before = 0;
    for (int customers = 1; customers <= 60; customers++) {
      double throughput = loop.throughput(customers);
      assertTrue(throughput >= before * (1 - 1e-12), "With " + customers + " customers");
      assertTrue(throughput <= loop.mostThroughput(customers) * (1 + 1e-12));
      before = throughput;
    }
  }

  @Test
  void impossible_loops_are_refused_with_their_values() {
    assertThrows(IllegalArgumentException.class, () -> new Centre("c", -1, 1, 1));
    assertThrows(IllegalArgumentException.class, () -> new Centre("c", 1, 1, 0));
    assertThrows(IllegalArgumentException.class, () -> new ClosedLoop(List.of(), Double.NaN));
    ClosedLoop loop = loop(1, of(1), of(1), 1);
    assertThrows(IllegalArgumentException.class, () -> loop.throughput(0));
  }

  @Test
  void every_closed_loop_in_the_folder_of_outside_values() throws IOException {
    String folder = System.getenv("ROUNDWRIGHT_OUTSIDE");
    assumeTrue(
        folder != null && Files.isDirectory(Path.of(folder)),
        "Set ROUNDWRIGHT_OUTSIDE to the folder of published values to compare with them");
    JsonNode cases =
        new ObjectMapper().readTree(Path.of(folder, "queueing", "closed-loop-cases.json").toFile());
    List<Executable> comparisons = new ArrayList<>();
    for (JsonNode one : cases) {
      comparisons.add(() -> compare(one));
    }
    assertTrue(comparisons.size() >= 13, "The folder holds its cases");
    assertAll(comparisons);
  }

  private static void compare(JsonNode one) {
    JsonNode in = one.get("input");
    JsonNode out = one.get("computed_here");
    double tolerance = one.get("tolerance").asDouble();
    int compared = 0;
    if (in.has("S")) {
      compared = compareNetwork(in, one, out, tolerance);
    } else if (in.has("D")) {
      double[] demands = doubles(in.get("D"));
      double[] ones = new double[demands.length];
      int[] servers = new int[demands.length];
      Arrays.fill(ones, 1);
      Arrays.fill(servers, 1);
      ClosedLoop loop = loop(in.get("think").asDouble(), demands, ones, servers);
      int customers = in.get("N").asInt();
      assertEquals(out.get("X_upper").asDouble(), loop.mostThroughput(customers), tolerance);
      assertEquals(out.get("R_lower").asDouble(), loop.leastResponseSeconds(customers), tolerance);
      compared = 2;
    } else if (in.has("machines")) {
      ClosedLoop loop =
          loop(
              in.get("mean_up").asDouble(),
              of(in.get("mean_repair").asDouble()),
              of(1),
              in.get("repairers").asInt());
      SteadyState state = loop.steadyState(in.get("machines").asInt());
      // the values are printed with five digits, so that is all that can be compared
      double printed = Math.max(tolerance, 6e-6);
      assertArrayEquals(
          doubles(out.get("p")),
          state.centres().get(0).probabilities().stream()
              .mapToDouble(Double::doubleValue)
              .toArray(),
          printed);
      assertEquals(out.get("mean_down").asDouble(), state.centres().get(0).customers(), printed);
      compared = 2;
    } else if (in.has("load")) {
      double wait = Erlang.waitProbability(in.get("servers").asInt(), in.get("load").asDouble());
      assertEquals(out.asDouble(), wait, tolerance);
      compared = 1;
    } else if (in.has("lam")) {
      double load = in.get("lam").asDouble() / in.get("mu").asDouble();
      assertEquals(out.get("c").asInt(), Erlang.fewestServers(load, 0.10));
      for (Map.Entry<String, JsonNode> entry : out.get("P").properties()) {
        int servers = Integer.parseInt(entry.getKey());
        assertEquals(entry.getValue().asDouble(), Erlang.waitProbability(servers, load), tolerance);
        compared++;
      }
    }
    assertTrue(compared > 0, "Nothing compared in " + one);
  }

  private static int compareNetwork(JsonNode in, JsonNode one, JsonNode out, double tolerance) {
    int[] servers = new int[in.get("servers").size()];
    for (int i = 0; i < servers.length; i++) {
      servers[i] = in.get("servers").get(i).asInt();
    }
    ClosedLoop loop =
        loop(in.get("think").asDouble(), doubles(in.get("S")), doubles(in.get("V")), servers);
    SteadyState state = loop.steadyState(in.get("N").asInt());
    assertEquals(out.get("X").asDouble(), state.throughput(), tolerance);
    assertArrayEquals(doubles(out.get("R")), each(state, AtCentre::residenceSeconds), tolerance);
    assertArrayEquals(doubles(out.get("Q")), each(state, AtCentre::customers), tolerance);
    assertArrayEquals(doubles(out.get("U")), each(state, AtCentre::use), tolerance);
    JsonNode published = one.get("published");
    for (String figure : List.of("R", "Q", "U")) {
      if (published.has(figure)) {
        ToDoubleFunction<AtCentre> of =
            switch (figure) {
              case "R" -> AtCentre::residenceSeconds;
              case "Q" -> AtCentre::customers;
              default -> AtCentre::use;
            };
        assertArrayEquals(doubles(published.get(figure)), each(state, of), tolerance);
      }
    }
    return 4;
  }

  private static double[] doubles(JsonNode array) {
    double[] figures = new double[array.size()];
    for (int i = 0; i < figures.length; i++) {
      figures[i] = array.get(i).asDouble();
    }
    return figures;
  }
}
