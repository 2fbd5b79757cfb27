package roundwright.server.web;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertFalse;
import static org.junit.jupiter.api.Assertions.assertTrue;

import java.time.Duration;
import org.junit.jupiter.api.Test;
import roundwright.server.TestClock;

class RateLimitTest {
  private final TestClock clock = new TestClock();
  private final RateLimit limit = new RateLimit(clock, 3, 0.5);

  private int taken(String client, int asked) {
    int taken = 0;
    for (int i = 0; i < asked; i++) {
      taken += limit.allows(client) ? 1 : 0;
    }
    return taken;
  }

  @Test
  void so_many_at_once_and_then_as_fast_as_it_refills() {
    assertEquals(3, taken("hall", 10));
    clock.moveOn(Duration.ofMillis(1900));
    assertFalse(limit.allows("hall"));
    clock.moveOn(Duration.ofMillis(100));
    assertTrue(limit.allows("hall"), "a refused asking costs nothing");
    clock.moveOn(Duration.ofHours(1));
    assertEquals(3, taken("hall", 10), "it fills up to what may be had at once and no further");
  }

  @Test
  void one_client_does_not_use_up_anothers() {
    taken("one", 10);
    assertEquals(3, taken("other", 10));
  }

  @Test
  void a_clock_set_back_gives_nothing_away() {
    taken("hall", 10);
    clock.moveOn(Duration.ofHours(-1));
    assertFalse(limit.allows("hall"));
  }
}
