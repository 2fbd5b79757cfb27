package roundwright.scheduling.core;

/**
 * One person's commitments in order of time, spread into arrays for the rules to read. Loaded over
 * and over; {@link #count} entries of each array are valid.
 */
public final class PersonRow {
  private static final int FIRST_LENGTH = 64;

  public Frame frame;
  public Problem problem;
  public int person;
  public int count;
  public int[] group = new int[FIRST_LENGTH];
  public int[] kind = new int[FIRST_LENGTH];
  public int[] start = new int[FIRST_LENGTH];
  public int[] end = new int[FIRST_LENGTH];
  public int[] hall = new int[FIRST_LENGTH];
  public int[] date = new int[FIRST_LENGTH];
  private boolean[] first = new boolean[FIRST_LENGTH];
  public Board board;

  public void load(Board from, int wantedPerson) {
    board = from;
    frame = from.frame;
    problem = from.problem;
    person = wantedPerson;
    count = from.commitmentCount(wantedPerson);
    if (count > group.length) {
      grow();
    }
    for (int i = 0; i < count; i++) {
      int commitment = from.commitment(wantedPerson, i);
      int g = commitment >> 2;
      group[i] = g;
      kind[i] = commitment & 3;
      start[i] = frame.start[g];
      end[i] = frame.end[g];
      hall[i] = frame.hall[g];
      date[i] = frame.date[g];
      first[i] = noneBeforeOfDate(i);
    }
  }

  private void grow() {
    int length = Integer.highestOneBit(count) * 2;
    group = new int[length];
    kind = new int[length];
    start = new int[length];
    end = new int[length];
    hall = new int[length];
    date = new int[length];
    first = new boolean[length];
  }

  public boolean solving(int at) {
    return kind[at] == Problem.SOLVING;
  }

  /** Whether no commitment before has the date of this one. */
  public boolean firstOfDate(int at) {
    return first[at];
  }

  private boolean noneBeforeOfDate(int at) {
    for (int i = at - 1; i >= 0; i--) {
      if (date[i] == date[at]) {
        return false;
      }
    }
    return true;
  }
}
