package roundwright.scheduling.timetable;

import java.util.ArrayList;
import java.util.Arrays;
import java.util.List;
import java.util.stream.IntStream;
import roundwright.scheduling.core.Problem;
import roundwright.scheduling.cost.RuleName;
import roundwright.scheduling.model.Round;

/**
 * What a layout is likely to cost once people are in it, without putting them there: everybody is
 * taken to solve where the seeding wants them. An estimate to steer by; the rules price what comes
 * of it. In strain units; each likely breach counts {@link #BREACH}.
 */
final class Outlook {
  static final double BREACH = 1500;

  /*
   * How much of each rule's price tells the price of a first arrangement, since crews bring waiting
   * of their own and people move between groups: least squares over some hundred layouts each of
   * events of 95 to 620 people. See DECISIONS.md.
   */
  private static final double EXTRA_GROUP = 0.5;
  private static final double LATE_FINISH = 3;
  private static final double WAITING = 0.6;
  private static final double LOAD = 1.3;
  private static final double BREATHING = 0.3;

  /** No rule prices it: dearer than what a minute of more slot costs, cheaper than any breach. */
  private static final double OVERRUN_MINUTE = 20;

  private static final double SHORT_PERSON_STRETCH = 15;
  private static final double PLACE_MOVED = 2;
  private static final double WRONG_SEEDING = 500;
  private static final double LESSON = 400;
  private static final int MOST_SAMPLED = 300;
  private static final int MOST_TRIES = 120;
  private static final double ROUND_OVER_TWO_DAYS = 150;
  private static final double MINUTES_AN_HOUR = 60.0;
  private static final int MINUTES_A_DAY = 1440;
  private static final double QUARTER_HOUR = 15.0;
  private static final int TO_ANOTHER_VENUE = 6;

  private final Problem problem;
  private final Decoder layout;
  private final Supply supply;
  private final double extraGroup;
  private final double lateFinish;
  private final double waiting;
  private final double hops;
  private final double load;
  private final double shares;
  private final int[] fewest;
  private final int[] dayOfSeat;
  private final int[] hallOfSeat;
  private final int[] placeOfSeat;
  private final int[] seededOfSeat;
  private final int[] order;
  private final int[] choices;
  private final List<Learned> learned = new ArrayList<>();
  private final int[][] crowd;
  private final boolean[] troubled;
  private final int[] aloneMinutes;
  private final int[] from;
  private final int[] to;
  private final int[] spanFrom;
  private final int[] spanTo;
  private final double breathing;
  private final int breathingMinutes;
  private final int days;
  private final int firstMinute;
  private final int[] alwaysThere;
  private final int[] notAlwaysThere;
  private final int stride;
  private int sampled;
  private int triesLeft;

  Outlook(Problem problem, Decoder layout, Supply supply) {
    this.problem = problem;
    this.layout = layout;
    this.supply = supply;
    extraGroup = EXTRA_GROUP * weight(RuleName.EXTRA_GROUP);
    lateFinish = LATE_FINISH * weight(RuleName.LATE_FINISH);
    waiting = WAITING * weight(RuleName.WAITING);
    hops = weight(RuleName.HOPS);
    load = LOAD * weight(RuleName.LOAD);
    breathing = BREATHING * weight(RuleName.BREATHING);
    breathingMinutes = problem.event.rules().breathingMinutes();
    shares = Math.max(1, Arrays.stream(problem.share).sum());
    fewest = new int[problem.rounds];
    for (int r = 0; r < problem.rounds; r++) {
      int largest = problem.largestCapacity(r);
      fewest[r] = largest == 0 ? 0 : (problem.entrants(r) + largest - 1) / largest;
    }
    int most = Arrays.stream(problem.personSeats).mapToInt(own -> own.length).max().orElse(0);
    dayOfSeat = new int[most];
    hallOfSeat = new int[most];
    placeOfSeat = new int[most];
    seededOfSeat = new int[most];
    order = new int[most];
    choices = new int[most];
    crowd = new int[problem.rounds][];
    troubled = new boolean[most];
    aloneMinutes = new int[problem.seats];
    for (int seat = 0; seat < problem.seats; seat++) {
      int r = problem.seatRound[seat];
      aloneMinutes[seat] =
          problem.roundList.get(r).minutesPerGroup().isPresent()
              ? 0
              : problem.pace.aloneMinutes(r, seat);
    }
    from = new int[most];
    to = new int[most];
    firstMinute = supply.firstMinute - MINUTES_A_DAY;
    days = supply.stretches * Supply.STRETCH_MINUTES / MINUTES_A_DAY + 40;
    spanFrom = new int[problem.venues * days];
    spanTo = new int[problem.venues * days];
    int[] entered =
        IntStream.range(0, problem.people).filter(p -> problem.personSeats[p].length > 0).toArray();
    alwaysThere = IntStream.of(entered).filter(this::isAlwaysThere).toArray();
    notAlwaysThere = IntStream.of(entered).filter(p -> !isAlwaysThere(p)).toArray();
    stride = Math.max(1, (alwaysThere.length + MOST_SAMPLED - 1) / MOST_SAMPLED);
  }

  private boolean isAlwaysThere(int person) {
    return problem.busyFrom[person].length == 0
        && problem.present(person, supply.firstMinute, supply.lastMinute());
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
      if (crowd[r] == null || crowd[r].length < shape.groups) {
        crowd[r] = new int[shape.groups];
      }
      Arrays.fill(crowd[r], 0);
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
    return price + pricePeople() + priceCrowds() + priceOverlaps();
  }

  /** Of people who are always there every few stand for all; whoever is not counts alone. */
  private double pricePeople() {
    double special = 0;
    double plain = 0;
    for (int p : notAlwaysThere) {
      special += pricePerson(p, 1);
    }
    for (int i = sampled; i < alwaysThere.length; i += stride) {
      plain += pricePerson(alwaysThere[i], stride);
    }
    return special + plain * stride;
  }

  /** Lets other people stand for all from now on. */
  void sampleOthers() {
    sampled = (sampled + 1) % stride;
  }

  /** What was learned from plans that broke: rounds better kept apart, shapes better not taken. */
  private double priceOverlaps() {
    double price = 0;
    for (int i = 0; i < learned.size(); i++) {
      Learned one = learned.get(i);
      Shape a = layout.shape[one.round];
      if (one.shape != null) {
        price += one.shape == a ? one.price : 0;
        continue;
      }
      Shape b = layout.shape[one.other];
      int meeting = 0;
      for (int g = 0; g < a.groups; g++) {
        int startA = layout.start[one.round][g];
        int endA = startA + a.minutes[g];
        for (int h = 0; h < b.groups; h++) {
          int startB = layout.start[one.other][h];
          int way = problem.way[a.hall[g]][b.hall[h]];
          meeting += startA < startB + b.minutes[h] + way && startB < endA + way ? 1 : 0;
        }
      }
      price += one.price * meeting / (a.groups * b.groups);
    }
    return price;
  }

  /** A price on two rounds' meeting in time, or on a round's shape. */
  private static final class Learned {
    final int round;
    final int other;
    final Shape shape;
    double price;

    Learned(int round, int other, Shape shape) {
      this.round = round;
      this.other = other;
      this.shape = shape;
    }
  }

  void raiseMeeting(int a, int b) {
    raise(Math.min(a, b), Math.max(a, b), null);
  }

  void raiseShape(Shape shape) {
    raise(shape.round, -1, shape);
  }

  private void raise(int round, int other, Shape shape) {
    for (Learned one : learned) {
      if (one.round == round && one.other == other && one.shape == shape) {
        one.price += LESSON;
        return;
      }
    }
    Learned one = new Learned(round, other, shape);
    one.price = LESSON;
    learned.add(one);
  }

  void forgetLessons() {
    learned.clear();
  }

  /** People in trouble who would find the group full that they could be in. */
  private double priceCrowds() {
    int beyond = 0;
    for (int r = 0; r < problem.rounds; r++) {
      Shape shape = layout.shape[r];
      for (int i = 0; shape != null && i < shape.groups; i++) {
        beyond += Math.max(0, crowd[r][i] - shape.capacity[i]);
      }
    }
    return beyond * BREACH / 2;
  }

  static double overrunPrice(Shape shape) {
    return OVERRUN_MINUTE * shape.shortMinutes();
  }

  private double priceRound(int r, Shape shape) {
    double price = overrunPrice(shape);
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

  private double pricePerson(int person, int standsFor) {
    int[] own = problem.personSeats[person];
    int wrong = 0;
    for (int s = 0; s < own.length; s++) {
      int r = problem.seatRound[own[s]];
      take(s, r, seededPlace(own[s], r, layout.shape[r]));
      troubled[s] = !suits(person, own[s], s, r);
      wrong += troubled[s] ? 1 : 0;
      for (int t = 0; t < s; t++) {
        if (clash(s, t)) {
          troubled[s] = true;
          troubled[t] = true;
          wrong++;
        }
      }
    }
    double price = wrong == 0 ? 0 : priceMoving(person, own, wrong);
    for (int s = 0; s < own.length; s++) {
      if (wrong > 0 && troubled[s]) {
        crowd[problem.seatRound[own[s]]][placeOfSeat[s]] += standsFor;
      }
      price += priceDay(own, s);
    }
    return price + breathing * breathless(own.length);
  }

  /** Groups that begin soon after another of the person's ends. */
  private int breathless(int count) {
    int found = 0;
    for (int s = 0; s < count; s++) {
      for (int t = 0; t < count; t++) {
        if (to[t] <= from[s] && to[t] > from[s] - breathingMinutes) {
          found++;
          break;
        }
      }
    }
    return found;
  }

  private void take(int s, int round, int place) {
    Shape shape = layout.shape[round];
    placeOfSeat[s] = place;
    from[s] = layout.start[round][place];
    to[s] = from[s] + shape.minutes[place];
    hallOfSeat[s] = shape.hall[place];
    dayOfSeat[s] = problem.hallClock[hallOfSeat[s]].date(from[s]);
  }

  private boolean clash(int s, int t) {
    int way = problem.way[hallOfSeat[s]][hallOfSeat[t]];
    return from[s] < to[t] + way && from[t] < to[s] + way;
  }

  /** Whether the person is there, and the slot long enough for them alone. */
  private boolean suits(int person, int seat, int s, int round) {
    return (problem.roundLikely[round] || problem.present(person, from[s], to[s]))
        && !problem.busy(person, from[s], to[s])
        && aloneMinutes[seat] <= to[s] - from[s];
  }

  private int seededPlace(int seat, int r, Shape shape) {
    return problem.roundList.get(r).seeding() == Round.Seeding.MIXED
        ? problem.seatRank[seat] % shape.groups
        : (int) ((long) problem.seatRank[seat] * shape.groups / problem.entrants(r));
  }

  /**
   * What comes of seeded groups that cannot all be: other groups, or breaches where there are none.
   * First only the seats in trouble look for another place, then all of them.
   */
  private double priceMoving(int person, int[] own, int wrong) {
    for (int s = 0; s < own.length; s++) {
      seededOfSeat[s] = placeOfSeat[s];
    }
    boolean found = search(person, own, true) || search(person, own, false);
    if (!found) {
      for (int s = 0; s < own.length; s++) {
        take(s, problem.seatRound[own[s]], seededOfSeat[s]);
      }
      return BREACH + wrong * WRONG_SEEDING;
    }
    double moved = 0;
    for (int s = 0; s < own.length; s++) {
      moved += Math.abs(placeOfSeat[s] - seededOfSeat[s]);
    }
    return moved * PLACE_MOVED;
  }

  private boolean search(int person, int[] own, boolean onlyTroubled) {
    for (int s = 0; s < own.length; s++) {
      choices[s] =
          onlyTroubled && !troubled[s] ? 1 : layout.shape[problem.seatRound[own[s]]].groups;
      int at = s;
      while (at > 0 && choices[order[at - 1]] > choices[s]) {
        order[at] = order[at - 1];
        at--;
      }
      order[at] = s;
    }
    triesLeft = MOST_TRIES;
    return findPlaces(person, own, 0);
  }

  private boolean findPlaces(int person, int[] own, int done) {
    if (done == own.length) {
      return true;
    }
    int s = order[done];
    int round = problem.seatRound[own[s]];
    int groups = layout.shape[round].groups;
    int seeded = seededOfSeat[s];
    int steps = choices[s] == 1 ? 1 : 2 * groups;
    for (int step = 0; step < steps; step++) {
      int place = step % 2 == 0 ? seeded + step / 2 : seeded - 1 - step / 2;
      if (place < 0 || place >= groups) {
        continue;
      }
      if (triesLeft-- <= 0) {
        return false;
      }
      take(s, round, place);
      if (suits(person, own[s], s, round)
          && clashesWithNone(s, done)
          && findPlaces(person, own, done + 1)) {
        return true;
      }
    }
    return false;
  }

  private boolean clashesWithNone(int s, int done) {
    for (int i = 0; i < done; i++) {
      if (clash(s, order[i])) {
        return false;
      }
    }
    return true;
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
        halls |= 1L << hallOfSeat[t];
        venues |= 1L << problem.hallVenue[hallOfSeat[t]];
      }
    }
    int otherVenues = Long.bitCount(venues) - 1;
    int otherHalls = Long.bitCount(halls) - 1 - otherVenues;
    return waiting * (last - first) / MINUTES_AN_HOUR
        + hops * (TO_ANOTHER_VENUE * otherVenues + otherHalls);
  }
}
