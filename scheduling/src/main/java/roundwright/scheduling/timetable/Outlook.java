package roundwright.scheduling.timetable;

import java.util.Arrays;
import roundwright.scheduling.core.Problem;
import roundwright.scheduling.cost.RuleName;

/**
 * What a layout is likely to cost once people are in it, without putting them there: everybody is
 * taken to solve where the seeding wants them. An estimate to steer by; the rules price what comes
 * of it. In strain units; each likely breach counts {@link #BREACH}.
 */
final class Outlook {
  static final double BREACH = 20_000;

  private static final double SHORT_PERSON_STRETCH = 15;
  private static final double MUST_MOVE_GROUP = 3;
  private static final double ROUND_OVER_TWO_DAYS = 150;
  private static final double MINUTES_AN_HOUR = 60.0;
  private static final int MINUTES_A_DAY = 1440;
  private static final double QUARTER_HOUR = 15.0;
  private static final int TO_ANOTHER_VENUE = 6;

  private final Problem problem;
  private final Decoder layout;
  private final double extraGroup;
  private final double lateFinish;
  private final double waiting;
  private final double hops;
  private final double load;
  private final double likelyAway;
  private final double shares;
  private final int[] fewest;
  private final int[] dayOfSeat;
  private final int[] from;
  private final int[] to;
  private final int[] spanFrom;
  private final int[] spanTo;
  private final int days;
  private final int firstMinute;

  Outlook(Problem problem, Decoder layout, Supply supply) {
    this.problem = problem;
    this.layout = layout;
    extraGroup = weight(RuleName.EXTRA_GROUP);
    lateFinish = weight(RuleName.LATE_FINISH);
    waiting = weight(RuleName.WAITING);
    hops = weight(RuleName.HOPS);
    load = weight(RuleName.LOAD);
    likelyAway = weight(RuleName.LIKELY_AWAY);
    shares = Math.max(1, Arrays.stream(problem.share).sum());
    fewest = new int[problem.rounds];
    for (int r = 0; r < problem.rounds; r++) {
      int largest = problem.largestCapacity(r);
      fewest[r] = largest == 0 ? 0 : (problem.entrants(r) + largest - 1) / largest;
    }
    int most = Arrays.stream(problem.personSeats).mapToInt(own -> own.length).max().orElse(0);
    dayOfSeat = new int[most];
    from = new int[most];
    to = new int[most];
    firstMinute = supply.firstMinute - MINUTES_A_DAY;
    days = supply.stretches * Supply.STRETCH_MINUTES / MINUTES_A_DAY + 40;
    spanFrom = new int[problem.venues * days];
    spanTo = new int[problem.venues * days];
  }

  private double weight(RuleName rule) {
    return problem.event.rules().weight(rule).doubleValue();
  }

  double price() {
    double price = layout.shortage / (double) Supply.PARTS * SHORT_PERSON_STRETCH;
    double dutyMinutes = 0;
    Arrays.fill(spanFrom, Integer.MAX_VALUE);
    for (int r = 0; r < problem.rounds; r++) {
      Shape shape = layout.shape[r];
      if (shape == null) {
        continue;
      }
      price += priceRound(r, shape);
      for (int i = 0; i < shape.groups; i++) {
        int crew = shape.crew[i][0] + shape.crew[i][1] + shape.crew[i][2];
        dutyMinutes += (double) crew * shape.minutes[i];
      }
    }
    for (int i = 0; i < spanFrom.length; i++) {
      if (spanFrom[i] != Integer.MAX_VALUE) {
        price += lateFinish * (spanTo[i] - spanFrom[i]);
      }
    }
    double quarters = dutyMinutes / QUARTER_HOUR;
    price += load * quarters * quarters / shares;
    for (int p = 0; p < problem.people; p++) {
      price += pricePerson(p);
    }
    return price;
  }

  private double priceRound(int r, Shape shape) {
    double price = 0;
    if (problem.roundList.get(r).groups().isEmpty() && fewest[r] > 0) {
      price += extraGroup * Math.max(0, shape.groups - fewest[r]);
    }
    int firstDay = Integer.MAX_VALUE;
    int lastDay = Integer.MIN_VALUE;
    for (int i = 0; i < shape.groups; i++) {
      int start = layout.start[r][i];
      int end = start + shape.minutes[i];
      int day = day(shape.hall[i], start);
      firstDay = Math.min(firstDay, day);
      lastDay = Math.max(lastDay, day);
      int span = problem.hallVenue[shape.hall[i]] * days + day;
      spanTo[span] = spanFrom[span] == Integer.MAX_VALUE ? end : Math.max(spanTo[span], end);
      spanFrom[span] = Math.min(spanFrom[span], start);
      price += BREACH * fives(closedMinutes(shape.hall[i], start, end));
      price += BREACH * fives(problem.notBefore[r] - start);
      price += BREACH * fives(end - problem.notAfter[r]);
      if (i > 0 && start < layout.start[r][i - 1]) {
        price += BREACH;
      }
    }
    int before = problem.roundBefore[r];
    if (before >= 0 && layout.shape[before] != null) {
      int ready = layout.lastEnd[before] + problem.event.rules().turnaroundMinutes();
      price += BREACH * fives(ready - layout.firstStart[r]);
    }
    return price + (lastDay > firstDay ? ROUND_OVER_TWO_DAYS : 0);
  }

  private static double fives(int minutes) {
    return minutes <= 0 ? 0 : (minutes + 4) / 5;
  }

  private int day(int hall, int minute) {
    int day = (problem.hallClock[hall].wall(minute) - firstMinute) / MINUTES_A_DAY;
    return Math.max(0, Math.min(days - 1, day));
  }

  private int closedMinutes(int hall, int start, int end) {
    int inside = 0;
    for (int w = 0; w < problem.hallFreeFrom[hall].length; w++) {
      inside +=
          Math.max(
              0,
              Math.min(end, problem.hallFreeTo[hall][w])
                  - Math.max(start, problem.hallFreeFrom[hall][w]));
    }
    return end - start - inside;
  }

  private double pricePerson(int person) {
    int[] own = problem.personSeats[person];
    double price = 0;
    for (int s = 0; s < own.length; s++) {
      int r = problem.seatRound[own[s]];
      Shape shape = layout.shape[r];
      int place = place(own[s], r, shape);
      from[s] = layout.start[r][place];
      to[s] = from[s] + shape.minutes[place];
      dayOfSeat[s] = problem.hallClock[shape.hall[place]].date(from[s]);
      if (!problem.present(person, from[s], to[s])) {
        price += priceAway(person, r, shape);
      }
      for (int t = 0; t < s; t++) {
        if (from[s] < to[t] && from[t] < to[s]) {
          price += priceClash(own[s], own[t]);
        }
      }
    }
    for (int s = 0; s < own.length; s++) {
      price += priceDay(own, s);
    }
    return price;
  }

  private int place(int seat, int r, Shape shape) {
    return problem.roundList.get(r).seeding() == roundwright.scheduling.model.Round.Seeding.MIXED
        ? problem.seatRank[seat] % shape.groups
        : (int) ((long) problem.seatRank[seat] * shape.groups / problem.entrants(r));
  }

  /** What comes of a seeded group outside the person's windows. */
  private double priceAway(int person, int r, Shape shape) {
    for (int i = 0; i < shape.groups; i++) {
      int start = layout.start[r][i];
      if (problem.present(person, start, start + shape.minutes[i])) {
        return MUST_MOVE_GROUP;
      }
    }
    return problem.roundLikely[r] ? likelyAway : BREACH;
  }

  /** What comes of two seeded groups at one time: another group of either, or a breach. */
  private double priceClash(int seat, int other) {
    int a = problem.seatRound[seat];
    int b = problem.seatRound[other];
    Shape shapeA = layout.shape[a];
    Shape shapeB = layout.shape[b];
    for (int i = 0; i < shapeA.groups; i++) {
      for (int j = 0; j < shapeB.groups; j++) {
        int startA = layout.start[a][i];
        int startB = layout.start[b][j];
        if (startA >= startB + shapeB.minutes[j] || startB >= startA + shapeA.minutes[i]) {
          return MUST_MOVE_GROUP;
        }
      }
    }
    return BREACH;
  }

  /** Waiting and ways of the day that begins at a seat, charged once for each day. */
  private double priceDay(int[] own, int s) {
    for (int t = 0; t < s; t++) {
      if (dayOfSeat[t] == dayOfSeat[s]) {
        return 0;
      }
    }
    int first = from[s];
    int last = to[s];
    long halls = 0;
    long venues = 0;
    for (int t = s; t < own.length; t++) {
      if (dayOfSeat[t] == dayOfSeat[s]) {
        first = Math.min(first, from[t]);
        last = Math.max(last, to[t]);
        int r = problem.seatRound[own[t]];
        int hall = layout.shape[r].hall[place(own[t], r, layout.shape[r])];
        halls |= 1L << hall;
        venues |= 1L << problem.hallVenue[hall];
      }
    }
    int otherVenues = Long.bitCount(venues) - 1;
    int otherHalls = Long.bitCount(halls) - 1 - otherVenues;
    return waiting * (last - first) / MINUTES_AN_HOUR
        + hops * (TO_ANOTHER_VENUE * otherVenues + otherHalls);
  }
}
