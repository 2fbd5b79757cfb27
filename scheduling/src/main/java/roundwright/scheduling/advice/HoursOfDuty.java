package roundwright.scheduling.advice;

import java.util.ArrayList;
import java.util.List;
import java.util.TreeSet;
import java.util.stream.IntStream;
import roundwright.scheduling.core.Problem;
import roundwright.scheduling.model.Round;

/**
 * All minutes of duty that an event's crews take at the least, against those that people have.
 * Whatever the groups: judges times length is no less than the work at the stations, scramblers
 * times length no less than all scrambles, and runners times length no less than all carrying,
 * since each is a term of the least time.
 */
final class HoursOfDuty {
  private static final int EVERY_ROLE = 3;

  private final PossibleTimes times;
  private final Problem problem;

  HoursOfDuty(PossibleTimes times) {
    this.times = times;
    this.problem = times.problem;
  }

  /** One for each role, and one for all together, that takes more than people have. */
  List<Impossible> find() {
    List<Impossible> found = new ArrayList<>();
    for (int role = 0; role <= EVERY_ROLE; role++) {
      long wanted = 0;
      for (int r = 0; r < problem.rounds; r++) {
        wanted += times.placed[r] ? wanted(r, role) : 0;
      }
      long there = 0;
      int people = 0;
      for (int p = 0; p < problem.people; p++) {
        if (can(p, role)) {
          people++;
          there += minutes(p);
        }
      }
      if (people > 0 && wanted > there) {
        found.add(tell(role, wanted, people, there));
      }
    }
    return found;
  }

  private static Impossible tell(int role, long wanted, int people, long there) {
    String crews =
        switch (role) {
          case 0 -> "Judging";
          case 1 -> "Scrambling";
          case 2 -> "Running";
          default -> "All crews together";
        };
    return new Impossible(
        Impossible.Kind.TOO_LITTLE_DUTY_TIME,
        1,
        List.of(),
        List.of(),
        List.of(),
        crews
            + (role == EVERY_ROLE ? " take at least " : " takes at least ")
            + Wording.count(wanted, "minute")
            + " of duty, and "
            + (people == 1 ? "the one person who can has " : "the " + people + " who can have ")
            + there
            + ", what they solve and their most a day reckoned in; find more people, let them serve"
            + " longer, or use fewer stations or rounds.");
  }

  private boolean can(int p, int role) {
    boolean scrambles = false;
    for (int d = 0; d < problem.disciplines; d++) {
      scrambles |= problem.scrambles[d][p];
    }
    return switch (role) {
      case 0 -> problem.judges[p];
      case 1 -> scrambles;
      case 2 -> problem.runs[p];
      default -> problem.judges[p] || problem.runs[p] || scrambles;
    };
  }

  private long wanted(int r, int role) {
    if (role == EVERY_ROLE) {
      return wanted(r, 0) + wanted(r, 1) + wanted(r, 2);
    }
    int each = problem.wanted(r, role, 1, 1);
    Round round = problem.roundList.get(r);
    if (each == 0 || round.crew().isPresent() || round.minutesPerGroup().isPresent()) {
      return (long) each * times.minutesInAll[r];
    }
    long work = 0;
    int attempts = 0;
    for (int seat = problem.seatStart[r]; seat < problem.seatStart[r + 1]; seat++) {
      work += problem.pace.workMicros[seat];
      attempts += problem.pace.attempts[seat];
    }
    return switch (role) {
      case 0 -> problem.pace.leastMinutes(r, work, 0, 0, 1, 0, 0);
      case 1 -> problem.pace.leastMinutes(r, 0, attempts, 0, 1, 1, 0);
      default -> problem.pace.leastMinutes(r, 0, attempts, 0, 1, 0, 1);
    };
  }

  /** What somebody has for duty: there, a hall open, not busy and not solving; so much a day. */
  private long minutes(int p) {
    List<Starts.Stretch> open = new ArrayList<>();
    TreeSet<Integer> dates = new TreeSet<>();
    for (int h = 0; h < problem.halls; h++) {
      for (int w = 0; w < problem.hallFreeFrom[h].length; w++) {
        open.add(new Starts.Stretch(problem.hallFreeFrom[h][w], problem.hallFreeTo[h][w] - 1));
        IntStream.rangeClosed(
                problem.hallClock[h].date(problem.hallFreeFrom[h][w]),
                problem.hallClock[h].date(problem.hallFreeTo[h][w]))
            .forEach(dates::add);
      }
    }
    Starts there = times.withPerson(Starts.of(open), p, 1, true);
    long minutes =
        there.stretches().stream().mapToLong(one -> (long) one.last() - one.first() + 1).sum();
    for (int seat : problem.personSeats[p]) {
      int r = problem.seatRound[seat];
      minutes -= times.placed[r] && !problem.roundLikely[r] ? times.seatMinutes(r, seat) : 0;
    }
    return Math.max(0, Math.min(minutes, (long) problem.maxDutyMinutes[p] * dates.size()));
  }
}
