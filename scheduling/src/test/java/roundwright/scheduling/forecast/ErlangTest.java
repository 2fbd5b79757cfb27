package roundwright.scheduling.forecast;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertThrows;

import org.junit.jupiter.api.Test;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.CsvSource;

/** Published and independently computed values of Erlang C. */
final class ErlangTest {
  @ParameterizedTest
  @CsvSource({
    // ten servers at a load of six: "about 0.10" in a published course solution
    "10, 6, 0.101299, 0.000001",
    // three servers at a load of two: 4/9 exactly, as the formula gives by hand
    "3, 2, 0.444444, 0.000001",
    // thirty arrivals an hour, twelve served an hour and server; computed independently
    "3, 2.5, 0.7022, 0.0001",
    "4, 2.5, 0.3199, 0.0001",
    "5, 2.5, 0.1304, 0.0001",
    "6, 2.5, 0.0474, 0.0001",
    "7, 2.5, 0.0154, 0.0001",
    // one server: whoever comes waits while it is busy
    "1, 0.3, 0.3, 0.000000001",
    "2, 2, 1, 0",
    "4, 0, 0, 0",
  })
  void the_part_that_waits(int servers, double load, double part, double tolerance) {
    assertEquals(part, Erlang.waitProbability(servers, load), tolerance);
  }

  @Test
  void the_fewest_servers_for_a_promise() {
    assertEquals(6, Erlang.fewestServers(2.5, 0.10));
    assertEquals(5, Erlang.fewestServers(2.5, 0.1305));
    assertEquals(3, Erlang.fewestServers(2.5, 1 - 1e-9));
  }

  @Test
  void impossible_values_are_refused() {
    assertThrows(IllegalArgumentException.class, () -> Erlang.waitProbability(0, 1));
    assertThrows(IllegalArgumentException.class, () -> Erlang.waitProbability(1, -1));
    assertThrows(IllegalArgumentException.class, () -> Erlang.fewestServers(1, 0));
  }
}
