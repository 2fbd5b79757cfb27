package roundwright.scheduling.rules;

import java.util.Arrays;
import java.util.List;
import roundwright.scheduling.core.KeptDays;
import roundwright.scheduling.core.PersonRow;
import roundwright.scheduling.core.Problem;
import roundwright.scheduling.cost.RuleName;

/** The rules over what a person was told in a kept plan and where they now are. */
final class KeptRules {
  private static final int FREE = -1;

  private KeptRules() {}

  static List<PersonRule> breaches(KeptDays kept) {
    return kept.pastBefore == Problem.NEVER ? List.of() : List.of(new PastChanged(kept));
  }

  /**
   * @param times how many times their weight the two rules count
   */
  static List<PersonRule> strains(Problem problem, KeptDays kept, int times) {
    return List.of(
        new Changed(kept, times * Weights.millionths(problem, RuleName.CHANGED)),
        new Told(kept, times * Weights.millionths(problem, RuleName.TOLD)));
  }

  /**
   * Commitments then and now, one partner each: same round, role and hall, start and end near. As
   * many pairs as possible by augmenting paths (Kuhn 1955), which few people's days need.
   */
  private static final class Partners {
    private final KeptDays kept;
    private int[] ofNow = new int[0];
    private int[] ofThen = new int[0];
    private boolean[] tried = new boolean[0];
    private PersonRow row;

    Partners(KeptDays kept) {
      this.kept = kept;
    }

    void find(PersonRow of) {
      row = of;
      int then = kept.key[row.person].length;
      if (ofNow.length < row.count) {
        ofNow = new int[2 * row.count];
        tried = new boolean[2 * row.count];
      }
      if (ofThen.length < then) {
        ofThen = new int[2 * then];
      }
      Arrays.fill(ofNow, 0, row.count, FREE);
      Arrays.fill(ofThen, 0, then, FREE);
      for (int i = 0; i < then; i++) {
        Arrays.fill(tried, 0, row.count, false);
        augment(i);
      }
    }

    private boolean augment(int then) {
      for (int now = 0; now < row.count; now++) {
        if (!tried[now] && alike(then, now)) {
          tried[now] = true;
          if (ofNow[now] == FREE || augment(ofNow[now])) {
            ofNow[now] = then;
            ofThen[then] = now;
            return true;
          }
        }
      }
      return false;
    }

    private int keyNow(int now) {
      return row.frame.round[row.group[now]] << 2 | row.kind[now];
    }

    private boolean alike(int then, int now) {
      int p = row.person;
      return kept.key[p][then] == keyNow(now)
          && kept.hall[p][then] == row.hall[now]
          && Math.abs(kept.start[p][then] - row.start[now]) <= KeptDays.MOST_APART_MINUTES
          && Math.abs(kept.end[p][then] - row.end[now]) <= KeptDays.MOST_APART_MINUTES;
    }

    /**
     * Those without a partner, a moved one once: each of now takes one of then of its key along.
     */
    int changed() {
      int[] keys = kept.key[row.person];
      int changed = 0;
      for (int now = 0; now < row.count; now++) {
        if (ofNow[now] == FREE) {
          changed++;
          for (int then = 0; then < keys.length; then++) {
            if (ofThen[then] == FREE && keys[then] == keyNow(now)) {
              ofThen[then] = now;
              break;
            }
          }
        }
      }
      int left = 0;
      for (int then = 0; then < keys.length; then++) {
        left += ofThen[then] == FREE ? 1 : 0;
      }
      return changed + left;
    }

    int past() {
      int found = 0;
      for (int now = 0; now < row.count; now++) {
        found += ofNow[now] == FREE && row.start[now] < kept.pastBefore ? 1 : 0;
      }
      int[] starts = kept.start[row.person];
      for (int then = 0; then < starts.length; then++) {
        found += ofThen[then] == FREE && starts[then] < kept.pastBefore ? 1 : 0;
      }
      return found;
    }
  }

  /** A search on several threads prices with one book, so each thread has its own scratch. */
  private static ThreadLocal<Partners> partners(KeptDays kept) {
    return ThreadLocal.withInitial(() -> new Partners(kept));
  }

  /** One for each commitment that is not what the person was told; a moved one counts once. */
  record Changed(ThreadLocal<Partners> partners, long weight) implements PersonRule {
    Changed(KeptDays kept, long weight) {
      this(KeptRules.partners(kept), weight);
    }

    @Override
    public RuleName name() {
      return RuleName.CHANGED;
    }

    @Override
    public long price(PersonRow row) {
      Partners found = partners.get();
      found.find(row);
      return found.changed() * weight;
    }
  }

  /** One for a person with such a commitment. */
  record Told(ThreadLocal<Partners> partners, long weight) implements PersonRule {
    Told(KeptDays kept, long weight) {
      this(KeptRules.partners(kept), weight);
    }

    @Override
    public RuleName name() {
      return RuleName.TOLD;
    }

    @Override
    public long price(PersonRow row) {
      Partners found = partners.get();
      found.find(row);
      return found.changed() > 0 ? weight : 0;
    }
  }

  /** One for each such commitment, of then or of now, that has begun. */
  record PastChanged(ThreadLocal<Partners> partners) implements PersonRule {
    PastChanged(KeptDays kept) {
      this(KeptRules.partners(kept));
    }

    @Override
    public RuleName name() {
      return RuleName.PAST_CHANGED;
    }

    @Override
    public long price(PersonRow row) {
      Partners found = partners.get();
      found.find(row);
      return found.past();
    }
  }
}
