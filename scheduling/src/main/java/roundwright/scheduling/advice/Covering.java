package roundwright.scheduling.advice;

import java.util.Arrays;
import java.util.Comparator;
import java.util.function.IntPredicate;
import java.util.stream.IntStream;
import roundwright.scheduling.core.Dice;
import roundwright.scheduling.core.Frame;
import roundwright.scheduling.core.Problem;
import roundwright.scheduling.flow.Assignment;

/**
 * Covers duties with as few people as it can (personnel task scheduling with a fixed charge a
 * person: Krishnamoorthy, Ernst and Baatar 2012). One person after the other is emptied; their
 * duties find others by a search over partial solutions, in which a duty that is placed throws out
 * those in its way and these may not come back for a while (Bloechliger and Zufferey 2008).
 *
 * <p>Layout: {@code taskAt[person * groups + group]} is the person's task there.
 */
final class Covering {
  private static final int NONE = -1;
  private static final int SAMPLED = 6;
  private static final int LEAST_TENURE = 8;
  private static final int LEAST_PATIENCE = 50;
  private static final int PATIENCE_EACH = 20;
  private static final int MOVES_PER_MOMENT = 200;
  private static final int MOST_AT_ONCE = 200;
  private static final int OPEN_COST = 1000;
  private static final int FORBIDDEN_COST = 1_000_000;

  private final Frame frame;
  private final Problem problem;
  private final Dice dice;
  private final Tasks tasks;
  private final int[] owner;
  private final long[] on;
  private final int[] taskAt;
  private final int[] minutes;
  private final int[] load;
  private final boolean[] active;
  private final int[] open;
  private final int[] openAt;
  private int openCount;
  private final long[] barredUntil;
  private long step;
  private final Pair pair;
  private final Assignment assignment = new Assignment();
  private final int[] running;
  private final int[] column;
  private final int[] pool = new int[Pair.MOST];
  private final int[] poolGroup = new int[Pair.MOST];
  private final int[] poolOwner = new int[Pair.MOST];
  private final boolean[] ones = new boolean[Pair.MOST];
  private final boolean[] others = new boolean[Pair.MOST];
  private final int[] taken = new int[Pair.MOST];

  private int[] best;
  private int uncovered;
  private int atLeast;

  Covering(Tasks tasks, Dice dice) {
    this.tasks = tasks;
    this.frame = tasks.frame;
    this.problem = tasks.problem;
    this.dice = dice;
    this.pair = new Pair(frame, dice);
    uncovered = tasks.uncovered;
    minutes = tasks.pinnedMinutes.clone();
    running = new int[tasks.count];
    column = new int[problem.people];
    owner = new int[tasks.count];
    Arrays.fill(owner, NONE);
    on = new long[problem.people * frame.words];
    taskAt = new int[problem.people * Math.max(1, frame.groups)];
    Arrays.fill(taskAt, NONE);
    load = new int[problem.people];
    active = new boolean[problem.people];
    open = new int[tasks.count];
    openAt = new int[tasks.count];
    Arrays.fill(openAt, NONE);
    barredUntil = new long[problem.people * tasks.candidates.length];
  }

  int uncovered() {
    return uncovered;
  }

  int duties() {
    return tasks.count + tasks.uncovered + tasks.pins();
  }

  int atLeast() {
    return atLeast;
  }

  /** Takes each duty with the person who covers it. */
  interface Taker {
    void take(int groupAndRole, int person);
  }

  void each(Taker taker) {
    tasks.eachPinned(taker);
    for (int task = 0; task < tasks.count; task++) {
      if (best[task] >= 0) {
        taker.take(tasks.kind[task], best[task]);
      }
    }
  }

  void search(long steps) {
    begin(steps);
    best = owner.clone();
    atLeast = tasks.bound(task -> best[task] >= 0);
    int people = used();
    while (step < steps && people > atLeast && emptyOne()) {
      if (!cover(steps)) {
        break;
      }
      best = owner.clone();
      people = used();
    }
  }

  private int used() {
    return (int)
        IntStream.range(0, problem.people).filter(p -> tasks.mustServe[p] || load[p] > 0).count();
  }

  /** Everybody may serve, those who already do first; what then stays open cannot be covered. */
  private void begin(long steps) {
    int[] order =
        IntStream.range(0, tasks.count)
            .boxed()
            .sorted(
                Comparator.comparingInt((Integer t) -> frame.start[tasks.kind[t] / 3])
                    .thenComparingInt(t -> tasks.candidates[tasks.kind[t]].length)
                    .thenComparingInt(t -> t))
            .mapToInt(Integer::intValue)
            .toArray();
    Arrays.fill(active, true);
    for (int task : order) {
      int free = NONE;
      for (int p : tasks.candidates[tasks.kind[task]]) {
        if (conflicts(p, tasks.kind[task] / 3) == 0
            && fits(p, tasks.kind[task] / 3)
            && (free == NONE || (load[p] > 0 && load[free] == 0))) {
          free = p;
        }
      }
      if (free == NONE) {
        addOpen(task);
      } else {
        give(task, free);
      }
    }
    if (!cover(steps / 4)) {
      uncovered += openCount;
      while (openCount > 0) {
        takeOpen(open[openCount - 1]);
      }
    }
    for (int p = 0; p < problem.people; p++) {
      active[p] = tasks.mustServe[p] || load[p] > 0;
    }
  }

  private void give(int task, int person) {
    int g = tasks.kind[task] / 3;
    owner[task] = person;
    on[person * frame.words + (g >>> 6)] |= 1L << g;
    taskAt[person * frame.groups + g] = task;
    minutes[tasks.at(person, g)] += tasks.length(g);
    load[person]++;
  }

  private void take(int task) {
    int person = owner[task];
    int g = tasks.kind[task] / 3;
    owner[task] = NONE;
    on[person * frame.words + (g >>> 6)] &= ~(1L << g);
    taskAt[person * frame.groups + g] = NONE;
    minutes[tasks.at(person, g)] -= tasks.length(g);
    load[person]--;
  }

  private void addOpen(int task) {
    openAt[task] = openCount;
    open[openCount++] = task;
  }

  private void takeOpen(int task) {
    int last = open[--openCount];
    open[openAt[task]] = last;
    openAt[last] = openAt[task];
    openAt[task] = NONE;
  }

  private int conflicts(int person, int g) {
    int found = 0;
    for (int w = 0; w < frame.words; w++) {
      found += Long.bitCount(on[person * frame.words + w] & frame.conflicts[g * frame.words + w]);
    }
    return found;
  }

  private boolean fits(int person, int g) {
    return minutes[tasks.at(person, g)] + tasks.length(g) <= problem.maxDutyMinutes[person];
  }

  /** Takes the person with the fewest duties out; false where nobody may be. */
  private boolean emptyOne() {
    int fewest = NONE;
    for (int p = 0; p < problem.people; p++) {
      if (active[p] && !tasks.mustServe[p] && (fewest == NONE || load[p] < load[fewest])) {
        fewest = p;
      }
    }
    if (fewest != NONE) {
      empty(fewest);
    }
    return fewest != NONE;
  }

  private void empty(int person) {
    active[person] = false;
    for (int g = 0; g < frame.groups && load[person] > 0; g++) {
      int task = taskAt[person * frame.groups + g];
      if (task != NONE) {
        take(task);
        addOpen(task);
      }
    }
  }

  /** Until nothing is open or the steps are used. */
  private boolean cover(long steps) {
    int fewestOpen = openCount;
    long since = step;
    long patience = LEAST_PATIENCE;
    for (boolean one : active) {
      patience += one ? PATIENCE_EACH : 0;
    }
    while (openCount > 0) {
      if (step >= steps) {
        return false;
      }
      step++;
      if (step % MOVES_PER_MOMENT == 0) {
        matchMoment();
      } else if (step % 2 == 0) {
        placeOne();
      } else {
        shareAnew();
      }
      if (openCount < fewestOpen) {
        fewestOpen = openCount;
        since = step;
      } else if (step - since > patience) {
        exchange();
        fewestOpen = openCount;
        since = step;
      }
    }
    return true;
  }

  /** Two people share their duties and some open ones anew, as well as they can. */
  private void shareAnew() {
    int[] able = tasks.candidates[tasks.kind[open[dice.below(openCount)]]];
    int one = able[dice.below(able.length)];
    int other = dice.below(problem.people);
    if (!active[one] || !active[other] || one == other) {
      return;
    }
    int count = gather(one, 0);
    count = gather(other, count);
    int opened = Math.min(openCount, Pair.MOST - count);
    if (opened <= 0) {
      return;
    }
    int offset = dice.below(openCount);
    for (int i = 0; i < opened; i++) {
      pool[count++] = open[(offset + i) % openCount];
    }
    sortByGroup(count);
    for (int i = 0; i < count; i++) {
      int gk = tasks.kind[pool[i]];
      poolGroup[i] = gk / 3;
      ones[i] = tasks.isCandidate(gk, one);
      others[i] = tasks.isCandidate(gk, other);
      poolOwner[i] = owner[pool[i]];
    }
    int before = openCount;
    pair.share(poolGroup, ones, others, count, taken);
    for (int i = 0; i < count; i++) {
      taken[i] = taken[i] < 0 ? NONE : taken[i] == 0 ? one : other;
    }
    hand(count, taken);
    if (openCount > before) {
      hand(count, poolOwner);
    }
  }

  /** Adds a person's tasks to the pool; of those beyond what it holds none. */
  private int gather(int person, int from) {
    int count = from;
    for (int w = 0; w < frame.words; w++) {
      long groups = on[person * frame.words + w];
      while (groups != 0 && count < Pair.MOST) {
        int g = (w << 6) + Long.numberOfTrailingZeros(groups);
        groups &= groups - 1;
        pool[count++] = taskAt[person * frame.groups + g];
      }
    }
    return count;
  }

  private void sortByGroup(int count) {
    for (int i = 1; i < count; i++) {
      int task = pool[i];
      int at = i;
      while (at > 0 && tasks.kind[pool[at - 1]] > tasks.kind[task]) {
        pool[at] = pool[at - 1];
        at--;
      }
      pool[at] = task;
    }
  }

  private boolean isDropped(int task) {
    return owner[task] == NONE && openAt[task] == NONE;
  }

  /** Gives the pool's tasks to their new owners, as far as their hours allow. */
  private void hand(int count, int[] to) {
    for (int i = 0; i < count; i++) {
      if (owner[pool[i]] != NONE) {
        take(pool[i]);
        addOpen(pool[i]);
      }
    }
    for (int i = 0; i < count; i++) {
      int g = poolGroup[i];
      if (to[i] != NONE && conflicts(to[i], g) == 0 && fits(to[i], g)) {
        takeOpen(pool[i]);
        give(pool[i], to[i]);
      }
    }
  }

  /**
   * All duties that run when some open one begins find people anew, so that as few others as can be
   * are thrown out.
   */
  private void matchMoment() {
    int first = tasks.kind[open[dice.below(openCount)]] / 3;
    int minute = frame.start[first];
    if (dice.below(2) == 0) {
      minute += dice.below(tasks.length(first));
    }
    int rows = 0;
    for (int task = 0; task < tasks.count; task++) {
      int g = tasks.kind[task] / 3;
      if (tasks.runs(g, minute) && !isDropped(task)) {
        running[rows++] = task;
      }
    }
    int columns = 0;
    for (int p = 0; p < problem.people; p++) {
      if (active[p]) {
        column[columns++] = p;
      }
    }
    if (rows > MOST_AT_ONCE) {
      return;
    }
    for (int row = 0; row < rows; row++) {
      if (owner[running[row]] != NONE) {
        take(running[row]);
        addOpen(running[row]);
      }
    }
    assignment.begin(rows, columns + rows);
    for (int row = 0; row < rows; row++) {
      int gk = tasks.kind[running[row]];
      for (int c = 0; c < columns; c++) {
        assignment.cost(row, c, matchCost(gk, column[c]));
      }
      for (int c = columns; c < columns + rows; c++) {
        assignment.cost(row, c, OPEN_COST);
      }
    }
    assignment.solve();
    for (int row = 0; row < rows; row++) {
      int c = assignment.columnOf(row);
      if (c < columns && tasks.isCandidate(tasks.kind[running[row]], column[c])) {
        place(running[row], column[c]);
      }
    }
  }

  private int matchCost(int gk, int person) {
    if (!tasks.isCandidate(gk, person)) {
      return FORBIDDEN_COST;
    }
    int out = conflicts(person, gk / 3) + (fits(person, gk / 3) ? 0 : 1);
    return out * OPEN_COST + dice.below(OPEN_COST / 2);
  }

  private void placeOne() {
    int bestTask = NONE;
    int bestPerson = NONE;
    int least = Integer.MAX_VALUE;
    int ties = 0;
    int looks = Math.min(SAMPLED, openCount);
    int offset = dice.below(openCount);
    for (int look = 0; look < looks; look++) {
      int task = open[(offset + look) % openCount];
      int gk = tasks.kind[task];
      for (int p : tasks.candidates[gk]) {
        if (!active[p] || barredUntil[p * tasks.candidates.length + gk] > step) {
          continue;
        }
        int out = conflicts(p, gk / 3);
        out += out == 0 && !fits(p, gk / 3) ? 1 : 0;
        if (out < least) {
          least = out;
          ties = 0;
        }
        if (out == least && dice.below(++ties) == 0) {
          bestTask = task;
          bestPerson = p;
        }
      }
    }
    if (bestTask != NONE) {
      place(bestTask, bestPerson);
    }
  }

  private void place(int task, int person) {
    int g = tasks.kind[task] / 3;
    takeOpen(task);
    for (int w = 0; w < frame.words; w++) {
      long inTheWay = on[person * frame.words + w] & frame.conflicts[g * frame.words + w];
      while (inTheWay != 0) {
        int other = (w << 6) + Long.numberOfTrailingZeros(inTheWay);
        inTheWay &= inTheWay - 1;
        throwOut(person, other);
      }
    }
    int from = frame.groups == 0 ? 0 : dice.below(frame.groups);
    for (int i = 0; i < frame.groups && !fits(person, g); i++) {
      int other = (from + i) % frame.groups;
      if (tasks.sameDate(other, g) && taskAt[person * frame.groups + other] != NONE) {
        throwOut(person, other);
      }
    }
    give(task, person);
  }

  private void throwOut(int person, int g) {
    int task = taskAt[person * frame.groups + g];
    take(task);
    addOpen(task);
    int tenure = LEAST_TENURE + dice.below(10) + openCount;
    barredUntil[person * tasks.candidates.length + tasks.kind[task]] = step + tenure;
  }

  /**
   * Of a few who serve, the one with the fewest duties steps back for somebody an open one asks.
   */
  private void exchange() {
    int[] able = tasks.candidates[tasks.kind[open[dice.below(openCount)]]];
    int[] idle = IntStream.of(able).filter(p -> !active[p]).toArray();
    int in = idle.length == 0 ? any(p -> !active[p]) : idle[dice.below(idle.length)];
    int out = NONE;
    for (int i = 0; i < SAMPLED / 2; i++) {
      int one = any(p -> active[p] && !tasks.mustServe[p]);
      out = out == NONE || (one != NONE && load[one] < load[out]) ? one : out;
    }
    if (in != NONE && out != NONE) {
      empty(out);
      active[in] = true;
    }
  }

  private int any(IntPredicate wanted) {
    int[] found = IntStream.range(0, problem.people).filter(wanted).toArray();
    return found.length == 0 ? NONE : found[dice.below(found.length)];
  }
}
