package roundwright.scheduling.forecast;

import java.util.Arrays;

/**
 * One group by discrete events: each competitor's puzzle goes scrambler, runner, station, runner,
 * once for each attempt, and waits first come first served wherever all are busy. All puzzles stand
 * at the scramblers at time 0, in the order of the competitors. A resource of 0 servers takes no
 * time. A run allocates nothing; its cost is one heap operation for each step of an attempt.
 *
 * <p>Puzzles, resources and stages are ints; a puzzle has at most one event to come, so that the
 * heap holds puzzles, ordered by time and then by number.
 */
final class Carousel {
  static final int STATION = 0;
  static final int SCRAMBLER = 1;
  static final int RUNNER = 2;
  private static final int RESOURCES = 3;

  /** The resource of each step of an attempt. */
  private static final int[] ROUTE = {SCRAMBLER, RUNNER, STATION, RUNNER};

  /** How long a step takes; steps 0 to 3 are scrambling, carrying, solving, carrying back. */
  interface Times {
    double seconds(int puzzle, int attempt, int step);
  }

  private final int puzzles;
  private final int[] servers;
  private final int[] attempts;
  private final double[] pathSeconds;
  private final double[] busySeconds = new double[RESOURCES];
  private final int[] idle = new int[RESOURCES];
  private final int[][] queue;
  private final int[] queueHead = new int[RESOURCES];
  private final int[] queueLength = new int[RESOURCES];
  private final int[] attempt;
  private final int[] step;
  private final double[] due;
  private final int[] heap;
  private int heapSize;
  private double now;

  Carousel(int puzzles, int stations, int scramblers, int runners) {
    this.puzzles = puzzles;
    this.servers = new int[] {stations, scramblers, runners};
    this.attempts = new int[puzzles];
    this.pathSeconds = new double[puzzles];
    this.queue = new int[RESOURCES][puzzles];
    this.attempt = new int[puzzles];
    this.step = new int[puzzles];
    this.due = new double[puzzles];
    this.heap = new int[puzzles];
  }

  /** So many attempts in the next run. */
  void attempts(int puzzle, int count) {
    attempts[puzzle] = count;
  }

  /** Runs until the last puzzle is back and returns the seconds it took. */
  double run(Times times) {
    System.arraycopy(servers, 0, idle, 0, RESOURCES);
    Arrays.fill(busySeconds, 0);
    Arrays.fill(pathSeconds, 0);
    Arrays.fill(queueHead, 0);
    Arrays.fill(queueLength, 0);
    Arrays.fill(attempt, 0);
    Arrays.fill(step, 0);
    heapSize = 0;
    now = 0;
    for (int puzzle = 0; puzzle < puzzles; puzzle++) {
      if (attempts[puzzle] > 0) {
        arrive(puzzle, times);
      }
    }
    while (heapSize > 0) {
      int puzzle = soonest();
      now = due[puzzle];
      leave(ROUTE[step[puzzle]], times);
      if (++step[puzzle] == ROUTE.length) {
        step[puzzle] = 0;
        attempt[puzzle]++;
      }
      if (attempt[puzzle] < attempts[puzzle]) {
        arrive(puzzle, times);
      }
    }
    return now;
  }

  /** Seconds that all servers of a resource were busy in the last run. */
  double busySeconds(int resource) {
    return busySeconds[resource];
  }

  /** The longest that one puzzle was served in the last run, its waiting left out. */
  double longestPathSeconds() {
    double longest = 0;
    for (double seconds : pathSeconds) {
      longest = Math.max(longest, seconds);
    }
    return longest;
  }

  private void arrive(int puzzle, Times times) {
    int resource = ROUTE[step[puzzle]];
    if (servers[resource] == 0) {
      due[puzzle] = now;
      push(puzzle);
    } else if (idle[resource] > 0) {
      idle[resource]--;
      serve(puzzle, resource, times);
    } else {
      int place = (queueHead[resource] + queueLength[resource]++) % puzzles;
      queue[resource][place] = puzzle;
    }
  }

  private void serve(int puzzle, int resource, Times times) {
    double seconds = times.seconds(puzzle, attempt[puzzle], step[puzzle]);
    busySeconds[resource] += seconds;
    pathSeconds[puzzle] += seconds;
    due[puzzle] = now + seconds;
    push(puzzle);
  }

  private void leave(int resource, Times times) {
    if (servers[resource] == 0) {
      return;
    }
    if (queueLength[resource] == 0) {
      idle[resource]++;
      return;
    }
    int next = queue[resource][queueHead[resource]];
    queueHead[resource] = (queueHead[resource] + 1) % puzzles;
    queueLength[resource]--;
    serve(next, resource, times);
  }

  private boolean isSooner(int one, int other) {
    return due[one] < due[other] || (due[one] == due[other] && one < other);
  }

  private void push(int puzzle) {
    int at = heapSize++;
    while (at > 0 && isSooner(puzzle, heap[(at - 1) / 2])) {
      heap[at] = heap[(at - 1) / 2];
      at = (at - 1) / 2;
    }
    heap[at] = puzzle;
  }

  private int soonest() {
    int first = heap[0];
    int last = heap[--heapSize];
    int at = 0;
    while (2 * at + 1 < heapSize) {
      int child = 2 * at + 1;
      if (child + 1 < heapSize && isSooner(heap[child + 1], heap[child])) {
        child++;
      }
      if (!isSooner(heap[child], last)) {
        break;
      }
      heap[at] = heap[child];
      at = child;
    }
    heap[at] = last;
    return first;
  }
}
