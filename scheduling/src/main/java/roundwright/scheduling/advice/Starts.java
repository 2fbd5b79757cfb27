package roundwright.scheduling.advice;

import java.util.ArrayList;
import java.util.Comparator;
import java.util.List;
import java.util.Optional;

/**
 * The minutes at which something may start, as closed stretches in order of time that neither touch
 * nor overlap. Immutable.
 */
record Starts(List<Stretch> stretches) {
  static final Starts NONE = new Starts(List.of());

  Starts {
    stretches = List.copyOf(stretches);
  }

  /** From the first minute to the last, both possible. */
  record Stretch(int first, int last) {}

  static Starts of(List<Stretch> any) {
    List<Stretch> sorted = new ArrayList<>(any);
    sorted.removeIf(stretch -> stretch.first > stretch.last);
    sorted.sort(Comparator.comparingInt(Stretch::first).thenComparingInt(Stretch::last));
    List<Stretch> merged = new ArrayList<>();
    for (Stretch stretch : sorted) {
      int end = merged.size() - 1;
      if (end >= 0 && stretch.first <= merged.get(end).last + 1) {
        int last = Math.max(merged.get(end).last, stretch.last);
        merged.set(end, new Stretch(merged.get(end).first, last));
      } else {
        merged.add(stretch);
      }
    }
    return new Starts(merged);
  }

  boolean isEmpty() {
    return stretches.isEmpty();
  }

  int first() {
    return stretches.get(0).first;
  }

  int last() {
    return stretches.get(stretches.size() - 1).last;
  }

  Starts and(Starts other) {
    List<Stretch> both = new ArrayList<>();
    int i = 0;
    int j = 0;
    while (i < stretches.size() && j < other.stretches.size()) {
      Stretch one = stretches.get(i);
      Stretch two = other.stretches.get(j);
      both.add(new Stretch(Math.max(one.first, two.first), Math.min(one.last, two.last)));
      if (one.last < two.last) {
        i++;
      } else {
        j++;
      }
    }
    return of(both);
  }

  /** Those for which a stretch of so many minutes stays clear of the time from..to. */
  Starts clearOf(int from, int to, int minutes) {
    List<Stretch> clear = new ArrayList<>();
    for (Stretch stretch : stretches) {
      clear.add(new Stretch(stretch.first, Math.min(stretch.last, from - minutes)));
      clear.add(new Stretch(Math.max(stretch.first, to), stretch.last));
    }
    return of(clear);
  }

  /** Minutes of the time that stretches of a length may cover. */
  static long covered(List<Starts> all, List<Integer> minutes) {
    List<Stretch> covered = new ArrayList<>();
    for (int i = 0; i < all.size(); i++) {
      for (Stretch stretch : all.get(i).stretches) {
        covered.add(new Stretch(stretch.first, stretch.last + minutes.get(i) - 1));
      }
    }
    return of(covered).stretches.stream().mapToLong(one -> (long) one.last - one.first + 1).sum();
  }

  /** Whether one of each can be had, the one over before the other starts. */
  static boolean apart(Starts one, int oneMinutes, Starts other, int otherMinutes) {
    return one.first() + oneMinutes <= other.last() || other.first() + otherMinutes <= one.last();
  }

  Optional<Stretch> longest() {
    return stretches.stream()
        .max(Comparator.comparingInt((Stretch stretch) -> stretch.last - stretch.first));
  }
}
