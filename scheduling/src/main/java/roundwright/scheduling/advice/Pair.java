package roundwright.scheduling.advice;

import java.util.Arrays;
import roundwright.scheduling.core.Dice;
import roundwright.scheduling.core.Frame;

/**
 * The most duties, of a few, that two people can cover between them: exact, by going through the
 * duties in order of start with the last one that each of the two has (the neighbourhood of two
 * workers of Smet, Wauters, Mihaylov and Vanden Berghe 2014). Of equally good ways chance takes
 * one.
 */
final class Pair {
  static final int MOST = 40;

  private static final int DUTY = 1024;
  private static final int CHANCE = 24;
  private static final int IMPOSSIBLE = -1;

  private final Frame frame;
  private final Dice dice;
  private final int[] value = new int[(MOST + 1) * (MOST + 1)];
  private final int[] parent = new int[(MOST + 1) * (MOST + 1)];

  Pair(Frame frame, Dice dice) {
    this.frame = frame;
    this.dice = dice;
  }

  /**
   * Shares duties out.
   *
   * @param groups of the duties, ascending
   * @param ones whether the first of the two could take each
   * @param others whether the second could
   * @param taken filled with 0 for the first, 1 for the second, -1 for neither
   */
  void share(int[] groups, boolean[] ones, boolean[] others, int count, int[] taken) {
    int width = count + 1;
    Arrays.fill(value, 0, width * width, IMPOSSIBLE);
    value[0] = 0;
    for (int i = 1; i <= count; i++) {
      int worth = DUTY + dice.below(CHANCE);
      for (int a = 0; a < i; a++) {
        for (int b = 0; b < i; b++) {
          int before = value[a * width + b];
          if (before == IMPOSSIBLE) {
            continue;
          }
          if (ones[i - 1] && isFree(groups, a, i)) {
            reach(i * width + b, before + worth, a);
          }
          if (others[i - 1] && isFree(groups, b, i)) {
            reach(a * width + i, before + worth, b);
          }
        }
      }
    }
    int best = 0;
    for (int state = 0; state < width * width; state++) {
      best = value[state] > value[best] ? state : best;
    }
    Arrays.fill(taken, 0, count, -1);
    int a = best / width;
    int b = best % width;
    while (a > 0 || b > 0) {
      int before = parent[a * width + b];
      if (a > b) {
        taken[a - 1] = 0;
        a = before;
      } else {
        taken[b - 1] = 1;
        b = before;
      }
    }
  }

  private boolean isFree(int[] groups, int last, int next) {
    return last == 0 || !frame.conflict(groups[last - 1], groups[next - 1]);
  }

  private void reach(int state, int worth, int from) {
    if (worth > value[state]) {
      value[state] = worth;
      parent[state] = from;
    }
  }
}
