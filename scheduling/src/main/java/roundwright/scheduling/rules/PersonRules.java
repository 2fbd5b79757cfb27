package roundwright.scheduling.rules;

import java.util.List;
import roundwright.scheduling.core.PersonRow;
import roundwright.scheduling.core.Problem;
import roundwright.scheduling.cost.RuleName;
import roundwright.scheduling.model.Rules;

/** The rules over one person's commitments. */
final class PersonRules {
  private PersonRules() {}

  static List<PersonRule> breaches() {
    return List.of(
        new EntryMissing(), new TwoPlaces(), new Absent(), new Unqualified(), new Overworked());
  }

  static List<PersonRule> strains(Problem problem) {
    return List.of(
        new Seeding(weight(problem, RuleName.SEEDING)),
        new Load(weight(problem, RuleName.LOAD)),
        new Breathing(weight(problem, RuleName.BREATHING), problem.event.rules()),
        new LongRun(weight(problem, RuleName.LONG_RUN), problem.event.rules()),
        new Waiting(weight(problem, RuleName.WAITING)),
        new Hops(weight(problem, RuleName.HOPS)),
        new NoMeal(weight(problem, RuleName.NO_MEAL), problem.event.rules()),
        new NewcomerFirst(weight(problem, RuleName.NEWCOMER_FIRST)),
        new GreenJudge(weight(problem, RuleName.GREEN_JUDGE)),
        new LikelyAway(weight(problem, RuleName.LIKELY_AWAY)));
  }

  private static long weight(Problem problem, RuleName rule) {
    return Weights.millionths(problem, rule);
  }

  /** Three for each of the person's seats that is in no group. */
  record EntryMissing() implements PersonRule {
    private static final int FOR_EACH = 3;

    @Override
    public RuleName name() {
      return RuleName.ENTRY_MISSING;
    }

    @Override
    public long price(PersonRow row) {
      return (long) FOR_EACH * (row.problem.personSeats[row.person].length - row.solvingCount);
    }
  }

  /** One for each commitment or busy time that starts before an earlier one lets the person go. */
  record TwoPlaces() implements PersonRule {
    @Override
    public RuleName name() {
      return RuleName.TWO_PLACES;
    }

    @Override
    public long price(PersonRow row) {
      if (!row.tight && !row.hindered) {
        return 0;
      }
      int[] busyFrom = row.problem.busyFrom[row.person];
      int[] busyTo = row.problem.busyTo[row.person];
      long found = 0;
      for (int i = 0; i < row.count; i++) {
        if (collidesWithEarlier(row, i) || startsInBusy(row, i, busyFrom, busyTo)) {
          found++;
        }
      }
      for (int b = 0; b < busyFrom.length; b++) {
        if (busyStartsInCommitment(row, busyFrom[b], busyTo[b])) {
          found++;
        }
      }
      return found;
    }

    private static boolean collidesWithEarlier(PersonRow row, int at) {
      int[] ways = row.problem.way[row.hall[at]];
      for (int i = at - 1; i >= 0; i--) {
        if (row.start[at] < row.end[i] + ways[row.hall[i]]) {
          return true;
        }
      }
      return false;
    }

    private static boolean startsInBusy(PersonRow row, int at, int[] busyFrom, int[] busyTo) {
      for (int b = 0; b < busyFrom.length; b++) {
        boolean before =
            busyFrom[b] < row.start[at]
                || (busyFrom[b] == row.start[at] && busyTo[b] <= row.end[at]);
        if (before && row.start[at] < busyTo[b]) {
          return true;
        }
      }
      return false;
    }

    private static boolean busyStartsInCommitment(PersonRow row, int from, int to) {
      for (int i = 0; i < row.count; i++) {
        boolean before = row.start[i] < from || (row.start[i] == from && row.end[i] < to);
        if (before && from < row.end[i]) {
          return true;
        }
      }
      return false;
    }
  }

  /** One for each commitment outside the person's windows, but for a likely entrant's solving. */
  record Absent() implements PersonRule {
    @Override
    public RuleName name() {
      return RuleName.ABSENT;
    }

    @Override
    public long price(PersonRow row) {
      if (!row.hindered) {
        return 0;
      }
      long found = 0;
      for (int i = 0; i < row.count; i++) {
        if (!merelyLikely(row, i) && away(row, i)) {
          found++;
        }
      }
      return found;
    }

    static boolean away(PersonRow row, int at) {
      return !row.frame.isFree(row.person, row.group[at])
          && !row.problem.present(row.person, row.start[at], row.end[at]);
    }

    static boolean merelyLikely(PersonRow row, int at) {
      return row.solving(at) && row.problem.roundLikely[row.frame.round[row.group[at]]];
    }
  }

  /** One for each duty without the skill, or beside another listing in the same group. */
  record Unqualified() implements PersonRule {
    @Override
    public RuleName name() {
      return RuleName.UNQUALIFIED;
    }

    @Override
    public long price(PersonRow row) {
      if (!row.unskilled && !row.listedTwice) {
        return 0;
      }
      long found = 0;
      for (int i = 0; i < row.count; i++) {
        if (!row.solving(i) && (isLaterListing(row, i) || !skilled(row, i))) {
          found++;
        }
      }
      return found;
    }

    private static boolean skilled(PersonRow row, int at) {
      return row.problem.skilled(row.person, row.frame.round[row.group[at]], row.kind[at]);
    }

    private static boolean isLaterListing(PersonRow row, int at) {
      if (at > 0 && row.group[at - 1] == row.group[at]) {
        return true;
      }
      for (int i = at + 1; i < row.count && row.group[i] == row.group[at]; i++) {
        if (row.solving(i)) {
          return true;
        }
      }
      return false;
    }
  }

  /** Each started five minutes of duty over the person's most, by date. */
  record Overworked() implements PersonRule {
    @Override
    public RuleName name() {
      return RuleName.OVERWORKED;
    }

    @Override
    public long price(PersonRow row) {
      int most = row.problem.maxDutyMinutes[row.person];
      if (row.dutyMinutes <= most) {
        return 0;
      }
      long found = 0;
      for (int i = 0; i < row.count; i++) {
        if (row.firstOfDate(i)) {
          int minutes = 0;
          for (int j = i; j < row.count; j++) {
            if (row.date[j] == row.date[i] && !row.solving(j)) {
              minutes += row.end[j] - row.start[j];
            }
          }
          found += Weights.startedFives(minutes - most);
        }
      }
      return found;
    }
  }

  /** How many places a competitor's group is from where the seeding wants them. */
  record Seeding(long weight) implements PersonRule {
    @Override
    public RuleName name() {
      return RuleName.SEEDING;
    }

    @Override
    public long price(PersonRow row) {
      return row.board.placesAway[row.person] * weight;
    }
  }

  /** The square of the quarters of an hour on duty over the whole event, by share. */
  record Load(long weight) implements PersonRule {
    private static final double MINUTES_SQUARED = 225.0;

    @Override
    public RuleName name() {
      return RuleName.LOAD;
    }

    @Override
    public long price(PersonRow row) {
      long minutes = row.dutyMinutes;
      return Math.round(
          minutes * minutes * (double) weight / MINUTES_SQUARED / row.problem.share[row.person]);
    }
  }

  /** One for each group solved in right after something else. */
  record Breathing(long weight, int minutes) implements PersonRule {
    Breathing(long weight, Rules rules) {
      this(weight, rules.breathingMinutes());
    }

    @Override
    public RuleName name() {
      return RuleName.BREATHING;
    }

    @Override
    public long price(PersonRow row) {
      long found = 0;
      for (int i = 0; i < row.count; i++) {
        if (row.solving(i) && breathless(row, i)) {
          found++;
        }
      }
      return found * weight;
    }

    private boolean breathless(PersonRow row, int at) {
      for (int i = at - 1; i >= 0; i--) {
        if (row.end[i] <= row.start[at] && row.end[i] > row.start[at] - minutes) {
          return true;
        }
      }
      return false;
    }
  }

  /** Tens of minutes of duty over the longest run, for each chain without a rest. */
  record LongRun(long weight, int restMinutes, int longestRunMinutes) implements PersonRule {
    private static final int UNIT_MINUTES = 10;

    LongRun(long weight, Rules rules) {
      this(weight, rules.restMinutes(), rules.longestRunMinutes());
    }

    @Override
    public RuleName name() {
      return RuleName.LONG_RUN;
    }

    @Override
    public long price(PersonRow row) {
      if (row.dutyMinutes <= longestRunMinutes) {
        return 0;
      }
      long over = 0;
      int duty = 0;
      int latestEnd = Problem.NEVER;
      for (int i = 0; i < row.count; i++) {
        if (row.start[i] - latestEnd >= restMinutes) {
          over += Math.max(0, duty - longestRunMinutes);
          duty = 0;
        }
        duty += row.solving(i) ? 0 : row.end[i] - row.start[i];
        latestEnd = Math.max(latestEnd, row.end[i]);
      }
      over += Math.max(0, duty - longestRunMinutes);
      return over * weight / UNIT_MINUTES;
    }
  }

  /** Hours from the first start to the largest end, by date. */
  record Waiting(long weight) implements PersonRule {
    private static final int MINUTES_AN_HOUR = 60;

    @Override
    public RuleName name() {
      return RuleName.WAITING;
    }

    @Override
    public long price(PersonRow row) {
      return row.minutesOnSite * weight / MINUTES_AN_HOUR;
    }
  }

  /** One for each change of hall between neighbours of a date, six for a change of venue. */
  record Hops(long weight) implements PersonRule {
    private static final int TO_ANOTHER_VENUE = 6;

    @Override
    public RuleName name() {
      return RuleName.HOPS;
    }

    @Override
    public long price(PersonRow row) {
      long found = 0;
      for (int i = 1; i < row.count; i++) {
        if (row.hall[i - 1] == row.hall[i] && row.date[i - 1] == row.date[i]) {
          continue;
        }
        int before = i - 1;
        while (before >= 0 && row.date[before] != row.date[i]) {
          before--;
        }
        if (before >= 0 && row.hall[before] != row.hall[i]) {
          boolean sameVenue =
              row.problem.hallVenue[row.hall[before]] == row.problem.hallVenue[row.hall[i]];
          found += sameVenue ? 1 : TO_ANOTHER_VENUE;
        }
      }
      return found * weight;
    }
  }

  /**
   * One for each date and meal that the person's day touches without leaving the minutes for it.
   */
  static final class NoMeal implements PersonRule {
    private final long weight;
    private final int[] minutes;

    NoMeal(long weight, Rules rules) {
      this.weight = weight;
      this.minutes = rules.meals().stream().mapToInt(Rules.Meal::minutes).toArray();
    }

    @Override
    public RuleName name() {
      return RuleName.NO_MEAL;
    }

    @Override
    public long price(PersonRow row) {
      boolean busy = row.problem.busyFrom[row.person].length > 0;
      long found = 0;
      for (int i = 0; i < row.count; i++) {
        if (row.firstOfDate(i)) {
          for (int m = 0; m < minutes.length; m++) {
            if ((busy || !row.frame.mealLeft[row.group[i]][m]) && goesWithout(row, i, m)) {
              found++;
            }
          }
        }
      }
      return found * weight;
    }

    private boolean goesWithout(PersonRow row, int firstOfDate, int meal) {
      int from = row.frame.mealFrom[row.group[firstOfDate]][meal];
      int to = row.frame.mealTo[row.group[firstOfDate]][meal];
      boolean touched = false;
      for (int i = 0; i < row.count && row.start[i] < to; i++) {
        touched |= row.end[i] > from;
      }
      return touched && !hasStretch(row, from, to, minutes[meal]);
    }

    private static boolean hasStretch(PersonRow row, int from, int to, int minutes) {
      int[] busyFrom = row.problem.busyFrom[row.person];
      int[] busyTo = row.problem.busyTo[row.person];
      int freeSince = from;
      int i = 0;
      int b = 0;
      while (i < row.count || b < busyFrom.length) {
        boolean commitmentNext =
            b >= busyFrom.length || (i < row.count && row.start[i] <= busyFrom[b]);
        int start = commitmentNext ? row.start[i] : busyFrom[b];
        int end = commitmentNext ? row.end[i] : busyTo[b];
        if (Math.min(start, to) - freeSince >= minutes) {
          return true;
        }
        freeSince = Math.max(freeSince, end);
        if (commitmentNext) {
          i++;
        } else {
          b++;
        }
      }
      return to - freeSince >= minutes;
    }
  }

  /** One for each first round whose earliest of several groups a newcomer solves in. */
  record NewcomerFirst(long weight) implements PersonRule {
    @Override
    public RuleName name() {
      return RuleName.NEWCOMER_FIRST;
    }

    @Override
    public long price(PersonRow row) {
      if (!row.problem.newcomer[row.person]) {
        return 0;
      }
      long found = 0;
      for (int i = 0; i < row.count; i++) {
        if (row.solving(i) && row.frame.earliestOfSeveral[row.group[i]]) {
          found++;
        }
      }
      return found * weight;
    }
  }

  /** One for each duty of a newcomer who has not solved yet. */
  record GreenJudge(long weight) implements PersonRule {
    @Override
    public RuleName name() {
      return RuleName.GREEN_JUDGE;
    }

    @Override
    public long price(PersonRow row) {
      if (!row.problem.newcomer[row.person]) {
        return 0;
      }
      int first = 0;
      while (first < row.count && !row.solving(first)) {
        first++;
      }
      if (first == row.count) {
        return 0;
      }
      long found = 0;
      for (int i = 0; i < row.count; i++) {
        if (!row.solving(i) && row.start[i] < row.end[first]) {
          found++;
        }
      }
      return found * weight;
    }
  }

  /** One for each group that a merely likely entrant could not be there for. */
  record LikelyAway(long weight) implements PersonRule {
    @Override
    public RuleName name() {
      return RuleName.LIKELY_AWAY;
    }

    @Override
    public long price(PersonRow row) {
      if (!row.hindered) {
        return 0;
      }
      long found = 0;
      for (int i = 0; i < row.count; i++) {
        if (Absent.merelyLikely(row, i) && Absent.away(row, i)) {
          found++;
        }
      }
      return found * weight;
    }
  }
}
