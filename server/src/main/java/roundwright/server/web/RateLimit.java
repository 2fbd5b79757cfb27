package roundwright.server.web;

import java.time.Clock;
import java.util.Map;
import java.util.concurrent.ConcurrentHashMap;
import java.util.concurrent.atomic.AtomicBoolean;

/**
 * So many askings a client at once, and so many more a second after that (a token bucket). Wide
 * enough for a hall of phones behind one address.
 */
public final class RateLimit {
  private static final int MOST_CLIENTS = 10_000;

  private final Clock clock;
  private final double atOnce;
  private final double perSecond;
  private final Map<String, Bucket> buckets = new ConcurrentHashMap<>();

  private record Bucket(double left, long atMillis) {}

  public RateLimit(Clock clock, double atOnce, double perSecond) {
    this.clock = clock;
    this.atOnce = atOnce;
    this.perSecond = perSecond;
  }

  /** Takes one asking of a client's, or says that there is none left. */
  public boolean allows(String client) {
    long now = clock.millis();
    if (buckets.size() > MOST_CLIENTS) {
      buckets.entrySet().removeIf(bucket -> refilled(bucket.getValue(), now) >= atOnce);
    }
    AtomicBoolean allowed = new AtomicBoolean();
    buckets.compute(
        client,
        (name, bucket) -> {
          double left = bucket == null ? atOnce : refilled(bucket, now);
          allowed.set(left >= 1);
          return new Bucket(left >= 1 ? left - 1 : left, now);
        });
    return allowed.get();
  }

  private double refilled(Bucket bucket, long now) {
    double seconds = Math.max(0, now - bucket.atMillis()) / 1000.0;
    return Math.min(atOnce, bucket.left() + seconds * perSecond);
  }
}
