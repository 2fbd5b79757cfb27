package roundwright.scheduling.forecast;

import java.math.RoundingMode;
import java.util.ArrayList;
import java.util.Arrays;
import java.util.Collections;
import java.util.Comparator;
import java.util.LinkedHashMap;
import java.util.List;
import java.util.Map;
import java.util.stream.IntStream;
import roundwright.scheduling.model.Event;
import roundwright.scheduling.model.Person;
import roundwright.scheduling.model.Round;

/**
 * Each person's chance to be in each round, from many days by chance: everybody's attempts are
 * drawn, counted as the round counts them, and those who go on solve again. Ranked by the round's
 * result, then by the best attempt, then by what was expected; who has no result at all does not go
 * on. Of a round that continues another, each sitting's result counts alike: their mean, or the
 * better of two that are counted by the best attempt.
 */
public final class EntrantChances {
  private final Map<String, Map<String, Double>> chancesByRound = new LinkedHashMap<>();
  private final Map<String, double[]> sizesByRound = new LinkedHashMap<>();

  private EntrantChances() {}

  /** With the usual spread, over three hundred days. */
  public static EntrantChances of(Event event, long seed) {
    return of(event, GroupSimulation.SIGMA, 300, seed);
  }

  /**
   * Over so many days.
   *
   * @param sigma spread of the logarithm of solve times; 0: everybody does what is expected
   */
  public static EntrantChances of(Event event, double sigma, int days, long seed) {
    if (days < 1 || !(sigma >= 0)) {
      throw new IllegalArgumentException(
          "Days must be 1 or more and the spread 0 or more, not " + days + " and " + sigma);
    }
    EntrantChances chances = new EntrantChances();
    Map<String, List<Round>> byDiscipline = new LinkedHashMap<>();
    for (Round round : event.rounds()) {
      byDiscipline.computeIfAbsent(round.discipline(), id -> new ArrayList<>()).add(round);
    }
    long disciplineSeed = seed;
    for (List<Round> rounds : byDiscipline.values()) {
      rounds.sort(Comparator.comparingInt(Round::number));
      new Ladder(event, rounds, sigma).climb(days, new Chance(disciplineSeed++), chances);
    }
    return chances;
  }

  /** Chance over 0 of each person, 0 to 1, the likeliest first. */
  public Map<String, Double> of(String round) {
    return Collections.unmodifiableMap(chancesByRound.getOrDefault(round, Map.of()));
  }

  /** How many are in the round at most on so many of a hundred days. */
  public int entrants(String round, double percentile) {
    double[] sizes = sizesByRound.get(round);
    int place = (int) Math.ceil(percentile * sizes.length / 100 - 1e-9);
    return (int) sizes[Math.max(1, place) - 1];
  }

  /** The rounds of one discipline, one after the other; people are ints in order of id. */
  private static final class Ladder {
    private final List<Round> rounds;
    private final List<Solving> solvings = new ArrayList<>();
    private final List<String> ids = new ArrayList<>();
    private final double[] expected;
    private final double[] result;
    private final double[] best;
    private final List<int[]> named = new ArrayList<>();

    Ladder(Event event, List<Round> rounds, double sigma) {
      this.rounds = rounds;
      LeastTime leastTime = new LeastTime(event, rounds.get(0));
      event.people().stream().map(Person::id).sorted().forEach(ids::add);
      expected =
          ids.stream().mapToDouble(id -> leastTime.expectedSeconds(id).doubleValue()).toArray();
      result = new double[ids.size()];
      best = new double[ids.size()];
      Entrants entrants = Entrants.of(event);
      for (int i = 0; i < rounds.size(); i++) {
        Round round = rounds.get(i);
        solvings.add(new Solving(round, sigma));
        boolean known = i == 0 || round.entrants().isPresent();
        named.add(known ? numbers(entrants.ids(round.id())) : null);
      }
    }

    private int[] numbers(List<String> people) {
      return people.stream()
          .mapToInt(id -> Collections.binarySearch(ids, id))
          .filter(person -> person >= 0)
          .toArray();
    }

    void climb(int days, Chance chance, EntrantChances chances) {
      int[][] times = new int[rounds.size()][ids.size()];
      double[][] sizes = new double[rounds.size()][days];
      for (int day = 0; day < days; day++) {
        int[] in = {};
        for (int i = 0; i < rounds.size(); i++) {
          if (named.get(i) != null) {
            in = named.get(i);
          } else if (!rounds.get(i).continues()) {
            in = goingOn(rounds.get(i - 1), in);
          }
          for (int person : in) {
            times[i][person]++;
          }
          sizes[i][day] = in.length;
          solve(i, in, chance);
        }
      }
      for (int i = 0; i < rounds.size(); i++) {
        Arrays.sort(sizes[i]);
        chances.sizesByRound.put(rounds.get(i).id(), sizes[i]);
        chances.chancesByRound.put(rounds.get(i).id(), likeliestFirst(times[i], days));
      }
    }

    private Map<String, Double> likeliestFirst(int[] times, int days) {
      Map<String, Double> chances = new LinkedHashMap<>();
      IntStream.range(0, times.length)
          .filter(person -> times[person] > 0)
          .boxed()
          .sorted(
              Comparator.comparingInt((Integer person) -> -times[person])
                  .thenComparingDouble(person -> expected[person])
                  .thenComparing(Comparator.naturalOrder()))
          .forEach(person -> chances.put(ids.get(person), (double) times[person] / days));
      return chances;
    }

    private void solve(int index, int[] in, Chance chance) {
      Round round = rounds.get(index);
      Solving solving = solvings.get(index);
      boolean together = round.continues() && index > 0 && named.get(index) == null;
      for (int person : in) {
        solving.draw(expected[person], chance);
        double counted = solving.counted();
        if (!together) {
          result[person] = counted;
          best[person] = solving.best();
          continue;
        }
        result[person] =
            solving.isCountedByBest()
                ? Math.min(result[person], counted)
                : (result[person] + counted) / 2;
        best[person] = Math.min(best[person], solving.best());
      }
    }

    private int[] goingOn(Round former, int[] in) {
      int[] ranked =
          Arrays.stream(in)
              .boxed()
              .sorted(
                  Comparator.comparingDouble((Integer person) -> result[person])
                      .thenComparingDouble(person -> best[person])
                      .thenComparingDouble(person -> expected[person])
                      .thenComparing(Comparator.naturalOrder()))
              .mapToInt(Integer::intValue)
              .toArray();
      int most = 0;
      double under = Double.POSITIVE_INFINITY;
      if (former.advance().isPresent()) {
        Round.Advance advance = former.advance().get();
        most = ranked.length;
        if (advance instanceof Round.Advance.Count count) {
          most = count.people();
        } else if (advance instanceof Round.Advance.Percent percent) {
          most = Math.max(1, floor(percent, in.length));
        } else if (advance instanceof Round.Advance.Under limit) {
          under = limit.seconds().doubleValue();
        }
      }
      int going = 0;
      while (going < Math.min(most, ranked.length)
          && best[ranked[going]] < Double.POSITIVE_INFINITY
          && (under == Double.POSITIVE_INFINITY || result[ranked[going]] < under)) {
        going++;
      }
      return Arrays.copyOf(ranked, going);
    }

    private static int floor(Round.Advance.Percent percent, int people) {
      return percent
          .percent()
          .multiply(java.math.BigDecimal.valueOf(people))
          .movePointLeft(2)
          .setScale(0, RoundingMode.FLOOR)
          .intValueExact();
    }
  }
}
