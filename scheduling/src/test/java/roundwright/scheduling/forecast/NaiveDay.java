package roundwright.scheduling.forecast;

import java.util.ArrayDeque;
import java.util.ArrayList;
import java.util.Deque;
import java.util.List;
import java.util.PriorityQueue;
import java.util.Random;
import roundwright.scheduling.model.Round;

/**
 * A group's day told once more, as plainly as can be and by another source of chance, to hold
 * forecasts against. Shares with them no more than the event's records.
 */
final class NaiveDay {
  private static final class Puzzle {
    final Deque<Double> solves = new ArrayDeque<>();
    int step;
  }

  private record Done(double at, int order, Puzzle puzzle) {}

  private static final int[] ROUTE = {0, 1, 2, 1};

  private final PriorityQueue<Done> agenda =
      new PriorityQueue<>(
          java.util.Comparator.comparingDouble(Done::at).thenComparingInt(Done::order));
  private final List<Deque<Puzzle>> lines =
      List.of(new ArrayDeque<>(), new ArrayDeque<>(), new ArrayDeque<>());
  private final int[] free;
  private final double[] seconds;
  private int order;

  private NaiveDay(int scramblers, int runners, int stations, double[] seconds) {
    this.free = new int[] {scramblers, runners, stations};
    this.seconds = seconds;
  }

  static double minutes(LeastTime leastTime, List<String> people, int stations, Random random) {
    Round.CrewSize crew = leastTime.wantedCrew(people.size(), stations);
    double[] seconds = {
      leastTime.discipline().scrambleSeconds().doubleValue(),
      leastTime.discipline().carrySeconds().doubleValue(),
      leastTime.discipline().handlingSeconds().doubleValue()
    };
    int shared = leastTime.terms(people, stations).shared();
    NaiveDay day = new NaiveDay(crew.scramblers(), crew.runners(), shared, seconds);
    List<Puzzle> puzzles = new ArrayList<>();
    for (String person : people) {
      Puzzle puzzle = new Puzzle();
      double expected = leastTime.expectedSeconds(person).doubleValue();
      puzzle.solves.addAll(solves(leastTime.round(), expected, random));
      puzzles.add(puzzle);
    }
    return day.run(puzzles) / 60;
  }

  private static List<Double> solves(Round round, double expected, Random random) {
    double sigma = 0.25;
    double limit = round.timeLimitSeconds().doubleValue();
    List<Double> solves = new ArrayList<>();
    boolean under = round.cutOff().isEmpty();
    double used = 0;
    while (solves.size() < round.countedBy().attempts()) {
      boolean stop = !under && solves.size() == round.cutOff().get().attempts();
      boolean spent = round.limitCovers() == Round.LimitCovers.ROUND && used >= limit;
      if (stop || spent) {
        break;
      }
      double drawn =
          Math.exp(Math.log(expected) - sigma * sigma / 2 + sigma * random.nextGaussian());
      double most = round.limitCovers() == Round.LimitCovers.ROUND ? limit - used : limit;
      double took = Math.min(drawn, most);
      under = under || (drawn < most && drawn < round.cutOff().get().seconds().doubleValue());
      used += took;
      solves.add(took);
    }
    return solves;
  }

  private double run(List<Puzzle> puzzles) {
    puzzles.forEach(puzzle -> arrive(puzzle, 0));
    double end = 0;
    while (!agenda.isEmpty()) {
      Done done = agenda.poll();
      end = done.at();
      int place = ROUTE[done.puzzle().step];
      free[place]++;
      if (!lines.get(place).isEmpty()) {
        start(lines.get(place).poll(), place, end);
      }
      done.puzzle().step = (done.puzzle().step + 1) % 4;
      if (done.puzzle().step != 0 || !done.puzzle().solves.isEmpty()) {
        arrive(done.puzzle(), end);
      }
    }
    return end;
  }

  private void arrive(Puzzle puzzle, double now) {
    int place = ROUTE[puzzle.step];
    if (free[place] > 0) {
      start(puzzle, place, now);
    } else {
      lines.get(place).add(puzzle);
    }
  }

  private void start(Puzzle puzzle, int place, double now) {
    free[place]--;
    double took = seconds[place] + (place == 2 ? puzzle.solves.poll() : 0);
    agenda.add(new Done(now + took, order++, puzzle));
  }
}
