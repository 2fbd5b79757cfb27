package roundwright.scheduling.core;

/**
 * One person's commitments in order of time, spread into arrays for the rules to read. Loaded over
 * and over; {@link #count} entries of each array are valid.
 *
 * <p>Layout: what several rules ask, and what tells a rule that it has nothing to look for, is
 * gathered once while loading; most rows then cost most rules one comparison.
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

  /** How many of the commitments are groups the person solves in. */
  public int solvingCount;

  /** Minutes on duty over the whole event. */
  public int dutyMinutes;

  /** Hours on site in minutes: from first start to largest end, over all dates. */
  public int minutesOnSite;

  /** Whether a commitment may begin before an earlier one lets the person go. */
  public boolean tight;

  /** Whether the person is listed twice in a group. */
  public boolean listedTwice;

  /** Whether the person is on a duty that they have not the skill for. */
  public boolean unskilled;

  /** Whether a commitment is not inside the person's windows, or meets a busy time. */
  public boolean hindered;

  public void load(Board from, int wantedPerson) {
    board = from;
    frame = from.frame;
    problem = from.problem;
    person = wantedPerson;
    count = from.commitmentCount(wantedPerson);
    if (count > group.length) {
      grow();
    }
    solvingCount = 0;
    dutyMinutes = 0;
    minutesOnSite = 0;
    tight = false;
    listedTwice = false;
    unskilled = false;
    hindered = false;
    int latestEnd = Problem.NEVER;
    int dateFrom = 0;
    int dateTo = 0;
    int skills = wantedPerson * problem.disciplines;
    for (int i = 0; i < count; i++) {
      int commitment = from.commitment(wantedPerson, i);
      int g = commitment >> 2;
      int begins = frame.start[g];
      int ends = frame.end[g];
      group[i] = g;
      kind[i] = commitment & 3;
      start[i] = begins;
      end[i] = ends;
      hall[i] = frame.hall[g];
      date[i] = frame.date[g];
      hindered |= !frame.isFree(wantedPerson, g);
      listedTwice |= i > 0 && group[i - 1] == g;
      tight |= begins < latestEnd + frame.longestWay;
      latestEnd = Math.max(latestEnd, ends);
      if (kind[i] == Problem.SOLVING) {
        solvingCount++;
      } else {
        dutyMinutes += ends - begins;
        unskilled |= (problem.skills[skills + frame.discipline[g]] >> kind[i] & 1) == 0;
      }
      if (i > 0 && date[i] == date[i - 1]) {
        first[i] = false;
        dateTo = Math.max(dateTo, ends);
      } else {
        minutesOnSite += dateTo - dateFrom;
        first[i] = frame.datesInOrder || noneBeforeOfDate(i);
        dateFrom = begins;
        dateTo = ends;
      }
    }
    minutesOnSite += dateTo - dateFrom;
    if (!frame.datesInOrder) {
      minutesOnSite = minutesOnSiteOfMixedDates();
    }
  }

  /** Halls far apart have different dates at one time, which may then follow in any order. */
  private int minutesOnSiteOfMixedDates() {
    int minutes = 0;
    for (int i = 0; i < count; i++) {
      if (first[i]) {
        int last = end[i];
        for (int j = i + 1; j < count; j++) {
          last = date[j] == date[i] ? Math.max(last, end[j]) : last;
        }
        minutes += last - start[i];
      }
    }
    return minutes;
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
