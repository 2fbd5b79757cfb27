package roundwright.server;

import java.time.Clock;
import java.time.Duration;
import java.time.Instant;
import java.time.ZoneId;
import java.time.ZoneOffset;
import java.util.concurrent.atomic.AtomicReference;

/** A clock that stands until it is moved on. */
public final class TestClock extends Clock {
  private final AtomicReference<Instant> now =
      new AtomicReference<>(Instant.parse("2027-05-01T08:00:00Z"));

  public void moveOn(Duration stretch) {
    now.updateAndGet(instant -> instant.plus(stretch));
  }

  @Override
  public Instant instant() {
    return now.get();
  }

  @Override
  public ZoneId getZone() {
    return ZoneOffset.UTC;
  }

  @Override
  public Clock withZone(ZoneId zone) {
    throw new UnsupportedOperationException("Nothing here reads the clock's zone");
  }
}
