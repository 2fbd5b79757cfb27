package roundwright.scheduling.core;

import java.math.BigDecimal;
import java.math.RoundingMode;
import java.util.ArrayList;
import java.util.Arrays;
import java.util.Comparator;
import java.util.HashMap;
import java.util.List;
import java.util.Map;
import roundwright.scheduling.model.Discipline;
import roundwright.scheduling.model.Event;
import roundwright.scheduling.model.FixedPoint;
import roundwright.scheduling.model.Hall;
import roundwright.scheduling.model.Person;
import roundwright.scheduling.model.Pins;
import roundwright.scheduling.model.Role;
import roundwright.scheduling.model.Round;
import roundwright.scheduling.model.Seating;
import roundwright.scheduling.model.Venue;
import roundwright.scheduling.model.Way;
import roundwright.scheduling.model.Window;

/**
 * An event as dense ints: what no plan changes. People, halls and rounds are numbered in order of
 * id, so that ties by id are ties by index. Times are epoch minutes; {@link #NEVER} and {@link
 * #FOREVER} stand for no bound. Immutable after construction (the arrays are not to be written);
 * shared freely between threads.
 *
 * <p>Layout: one array a property, index first. A <em>seat</em> is one entrant's place in one
 * round; the seats of a round are contiguous, from {@code seatStart[round]} to {@code
 * seatStart[round + 1]}, in order of person.
 */
public final class Problem {
  public static final int NEVER = Integer.MIN_VALUE / 4;
  public static final int FOREVER = Integer.MAX_VALUE / 4;
  public static final int SOLVING = 3;

  private static final int MINUTES_A_DAY = 1440;
  private static final int LARGEST_CREW_TABLE = 501;

  public final Event event;
  public final Pace pace;

  public final int halls;
  public final List<Hall> hallList;
  public final int[] hallVenue;
  public final LocalClock[] hallClock;
  public final int[] hallStations;
  public final int[][] hallFreeFrom;
  public final int[][] hallFreeTo;
  public final int[][] way;
  public final int venues;

  public final int rounds;
  public final List<Round> roundList;
  public final int[] roundDiscipline;
  public final int[] roundBefore;
  public final boolean[] roundLikely;
  public final boolean[] roundFixed;
  public final BigDecimal[] roundFill;
  public final boolean[][] suits;
  public final int[][] mostStations;
  public final int[][] capacity;
  public final int[] notBefore;
  public final int[] notAfter;
  public final int[] seatStart;

  public final int seats;
  public final int[] seatRound;
  public final int[] seatPerson;
  public final int[] seatRank;

  public final int people;
  public final List<Person> personList;
  public final int[][] presentFrom;
  public final int[][] presentTo;
  public final int[][] busyFrom;
  public final int[][] busyTo;
  public final double[] share;
  public final boolean[] newcomer;
  public final int[] maxDutyMinutes;
  public final int[] household;
  public final int households;
  public final boolean[] judges;
  public final boolean[] runs;
  public final boolean[][] scrambles;

  /** Of each person and discipline: a bit for each role they could take in its groups. */
  public final byte[] skills;

  public final int[][] personSeats;

  public final int disciplines;

  private final int[] scramblersFor = new int[LARGEST_CREW_TABLE];
  private final int[] runnersFor = new int[LARGEST_CREW_TABLE];
  private final Map<String, Integer> personIndex = new HashMap<>();
  private final Map<String, Integer> roundIndex = new HashMap<>();
  private final Map<String, Integer> hallIndex = new HashMap<>();
  private final Map<String, Integer> disciplineIndex = new HashMap<>();

  public Problem(Event event) {
    this.event = event;
    venues = event.venues().size();
    hallList = new ArrayList<>();
    Map<String, Venue> venueOf = new HashMap<>();
    for (Venue venue : event.venues()) {
      hallList.addAll(venue.halls());
      venue.halls().forEach(hall -> venueOf.put(hall.id(), venue));
    }
    hallList.sort(Comparator.comparing(Hall::id));
    halls = hallList.size();
    hallVenue = new int[halls];
    hallClock = new LocalClock[halls];
    hallStations = new int[halls];
    hallFreeFrom = new int[halls][];
    hallFreeTo = new int[halls][];
    way = new int[halls][halls];
    layOutHalls(venueOf);

    List<Discipline> disciplineList = new ArrayList<>(event.disciplines());
    disciplineList.sort(Comparator.comparing(Discipline::id));
    disciplines = disciplineList.size();
    for (int d = 0; d < disciplines; d++) {
      disciplineIndex.put(disciplineList.get(d).id(), d);
    }

    personList = new ArrayList<>(event.people());
    personList.sort(Comparator.comparing(Person::id));
    people = personList.size();
    presentFrom = new int[people][];
    presentTo = new int[people][];
    busyFrom = new int[people][];
    busyTo = new int[people][];
    share = new double[people];
    newcomer = new boolean[people];
    maxDutyMinutes = new int[people];
    household = new int[people];
    judges = new boolean[people];
    runs = new boolean[people];
    scrambles = new boolean[disciplines][people];
    households = layOutPeople();
    skills = new byte[people * disciplines];
    for (int p = 0; p < people; p++) {
      for (int d = 0; d < disciplines; d++) {
        int bits = (judges[p] ? 1 : 0) | (scrambles[d][p] ? 2 : 0) | (runs[p] ? 4 : 0);
        skills[p * disciplines + d] = (byte) bits;
      }
    }

    roundList = new ArrayList<>(event.rounds());
    roundList.sort(Comparator.comparing(Round::id));
    rounds = roundList.size();
    roundDiscipline = new int[rounds];
    roundBefore = new int[rounds];
    roundLikely = new boolean[rounds];
    roundFixed = new boolean[rounds];
    roundFill = new BigDecimal[rounds];
    suits = new boolean[rounds][halls];
    mostStations = new int[rounds][halls];
    capacity = new int[rounds][halls];
    notBefore = new int[rounds];
    notAfter = new int[rounds];
    seatStart = new int[rounds + 1];
    layOutRounds(disciplineList);

    Map<String, Entrants> entrants = Entrants.ofEachRound(event);
    seats = roundList.stream().mapToInt(r -> entrants.get(r.id()).people().size()).sum();
    seatRound = new int[seats];
    seatPerson = new int[seats];
    seatRank = new int[seats];
    personSeats = new int[people][];
    layOutSeats(entrants);
    pace = new Pace(this, disciplineList);

    for (int j = 0; j < LARGEST_CREW_TABLE; j++) {
      scramblersFor[j] = crewFor(j, event.rules().stationsPerScrambler());
      runnersFor[j] = crewFor(j, event.rules().stationsPerRunner());
    }
  }

  private static int crewFor(int judgesWanted, BigDecimal stationsPerOne) {
    return stationsPerOne.signum() == 0
        ? 0
        : BigDecimal.valueOf(judgesWanted)
            .divide(stationsPerOne, 0, RoundingMode.CEILING)
            .intValueExact();
  }

  private void layOutHalls(Map<String, Venue> venueOf) {
    int first = FOREVER;
    int last = NEVER;
    for (Hall hall : hallList) {
      for (Window window : hall.open()) {
        first = Math.min(first, LocalClock.epochMinute(window.from()));
        last = Math.max(last, LocalClock.epochMinute(window.to()));
      }
    }
    List<Venue> venueList = event.venues();
    for (int h = 0; h < halls; h++) {
      Hall hall = hallList.get(h);
      hallIndex.put(hall.id(), h);
      Venue venue = venueOf.get(hall.id());
      hallVenue[h] = venueList.indexOf(venue);
      hallClock[h] =
          new LocalClock(venue.zone(), first - 30 * MINUTES_A_DAY, last + 30 * MINUTES_A_DAY);
      hallStations[h] = hall.stations();
      layOutFreeWindows(h, hall);
    }
    for (int a = 0; a < halls; a++) {
      for (int b = 0; b < halls; b++) {
        way[a][b] = wayBetween(a, b);
      }
    }
  }

  private int wayBetween(int a, int b) {
    if (a == b) {
      return 0;
    }
    if (hallVenue[a] == hallVenue[b]) {
      return event.rules().changeoverMinutes();
    }
    String one = event.venues().get(hallVenue[a]).id();
    String other = event.venues().get(hallVenue[b]).id();
    for (Way named : event.ways()) {
      if ((named.oneVenue().equals(one) && named.otherVenue().equals(other))
          || (named.oneVenue().equals(other) && named.otherVenue().equals(one))) {
        return named.minutes();
      }
    }
    return Event.MINUTES_BETWEEN_UNNAMED_VENUES;
  }

  private void layOutFreeWindows(int h, Hall hall) {
    List<Window> closed = new ArrayList<>();
    for (FixedPoint point : event.fixedPoints()) {
      if (point.concerns(hall.id())) {
        int from = hallClock[h].minuteAt(point.from());
        int to = hallClock[h].minuteAt(point.to());
        if (from < to) {
          closed.add(new Window(LocalClock.instant(from), LocalClock.instant(to)));
        }
      }
    }
    List<int[]> free = new ArrayList<>();
    for (Window open : hall.open()) {
      int from = LocalClock.epochMinute(open.from());
      int to = LocalClock.epochMinute(open.to());
      for (Window gone : Window.merged(closed)) {
        int goneFrom = LocalClock.epochMinute(gone.from());
        int goneTo = LocalClock.epochMinute(gone.to());
        if (goneTo <= from || goneFrom >= to) {
          continue;
        }
        if (goneFrom > from) {
          free.add(new int[] {from, goneFrom});
        }
        from = goneTo;
      }
      if (from < to) {
        free.add(new int[] {from, to});
      }
    }
    hallFreeFrom[h] = free.stream().mapToInt(stretch -> stretch[0]).toArray();
    hallFreeTo[h] = free.stream().mapToInt(stretch -> stretch[1]).toArray();
  }

  private int layOutPeople() {
    Map<String, Integer> known = new HashMap<>();
    for (int p = 0; p < people; p++) {
      Person person = personList.get(p);
      personIndex.put(person.id(), p);
      List<Window> present =
          person
              .available()
              .orElse(List.of(new Window(LocalClock.instant(NEVER), LocalClock.instant(FOREVER))));
      presentFrom[p] = froms(present);
      presentTo[p] = tos(present);
      List<Window> busy = Window.merged(person.busy().stream().map(Person.Busy::window).toList());
      busyFrom[p] = froms(busy);
      busyTo[p] = tos(busy);
      share[p] = person.effectiveShare().doubleValue();
      newcomer[p] = person.newcomer();
      maxDutyMinutes[p] = person.maxDutyMinutesPerDay();
      household[p] =
          person
              .household()
              .map(name -> known.computeIfAbsent(name, unseen -> known.size()))
              .orElse(-1);
      judges[p] = person.crew().judges();
      runs[p] = person.crew().runs();
      for (String discipline : person.crew().scrambles()) {
        scrambles[disciplineIndex.get(discipline)][p] = true;
      }
    }
    return known.size();
  }

  private static int[] froms(List<Window> windows) {
    return windows.stream().mapToInt(window -> LocalClock.epochMinute(window.from())).toArray();
  }

  private static int[] tos(List<Window> windows) {
    return windows.stream().mapToInt(window -> LocalClock.epochMinute(window.to())).toArray();
  }

  private void layOutRounds(List<Discipline> disciplineList) {
    for (int r = 0; r < rounds; r++) {
      Round round = roundList.get(r);
      roundIndex.put(round.id(), r);
      roundDiscipline[r] = disciplineIndex.get(round.discipline());
      roundFixed[r] = round.seating().orElse(event.rules().seating()) == Seating.FIXED;
      roundFill[r] = round.fill().orElse(event.rules().fill());
      notBefore[r] = round.notBefore().map(LocalClock::epochMinute).orElse(NEVER);
      notAfter[r] = round.notAfter().map(LocalClock::epochMinute).orElse(FOREVER);
      Discipline discipline = disciplineList.get(roundDiscipline[r]);
      for (int h = 0; h < halls; h++) {
        Hall hall = hallList.get(h);
        suits[r][h] =
            hall.features().containsAll(discipline.needs())
                && round.halls().map(only -> only.contains(hall.id())).orElse(true);
        mostStations[r][h] = Math.min(hall.stations(), round.stations().orElse(hall.stations()));
        capacity[r][h] = largestSize(r, mostStations[r][h]);
      }
    }
    for (int r = 0; r < rounds; r++) {
      roundBefore[r] = -1;
      for (int q = 0; q < rounds; q++) {
        if (roundDiscipline[q] == roundDiscipline[r]
            && roundList.get(q).number() == roundList.get(r).number() - 1) {
          roundBefore[r] = q;
        }
      }
    }
  }

  private void layOutSeats(Map<String, Entrants> entrants) {
    List<List<Integer>> seatsOf = new ArrayList<>();
    for (int p = 0; p < people; p++) {
      seatsOf.add(new ArrayList<>());
    }
    int seat = 0;
    for (int r = 0; r < rounds; r++) {
      Round round = roundList.get(r);
      Entrants entered = entrants.get(round.id());
      roundLikely[r] = entered.merelyLikely();
      seatStart[r] = seat;
      for (Person person : entered.people()) {
        seatRound[seat] = r;
        seatPerson[seat] = personIndex.get(person.id());
        seatsOf.get(seatPerson[seat]).add(seat);
        seat++;
      }
      rank(r, seat, round);
    }
    seatStart[rounds] = seat;
    for (int p = 0; p < people; p++) {
      personSeats[p] = seatsOf.get(p).stream().mapToInt(Integer::intValue).toArray();
    }
  }

  private void rank(int r, int end, Round round) {
    int start = seatStart[r];
    Integer[] order = new Integer[end - start];
    Arrays.setAll(order, i -> start + i);
    Comparator<Integer> byTime =
        Comparator.comparing(
            seat -> Entrants.expectedSeconds(personList.get(seatPerson[seat]), round.discipline()));
    if (round.seeding() == Round.Seeding.SLOW_FIRST) {
      byTime = byTime.reversed();
    }
    Arrays.sort(order, byTime.thenComparing(seat -> seatPerson[seat]));
    for (int i = 0; i < order.length; i++) {
      seatRank[order[i]] = i;
    }
  }

  /** Most people a group with so many stations in use may hold. */
  public int largestSize(int round, int stations) {
    return roundFixed[round]
        ? stations
        : roundFill[round]
            .multiply(BigDecimal.valueOf(stations))
            .setScale(0, RoundingMode.FLOOR)
            .intValue();
  }

  /** Fewest stations that may hold so many people. */
  public int fewestStations(int round, int size) {
    return roundFixed[round]
        ? size
        : BigDecimal.valueOf(size)
            .divide(roundFill[round], 0, RoundingMode.CEILING)
            .intValueExact();
  }

  public int entrants(int round) {
    return seatStart[round + 1] - seatStart[round];
  }

  /** How many of a role a group wants, by its stations in use and its size. */
  public int wanted(int round, int role, int stations, int size) {
    Round.CrewSize given = roundList.get(round).crew().orElse(null);
    if (given != null) {
      return switch (role) {
        case 0 -> given.judges();
        case 1 -> given.scramblers();
        default -> given.runners();
      };
    }
    int judgesWanted = Math.min(stations, size);
    return switch (role) {
      case 0 -> judgesWanted;
      case 1 -> scramblersFor[judgesWanted];
      default -> runnersFor[judgesWanted];
    };
  }

  public boolean skilled(int person, int round, int role) {
    return (skills[person * disciplines + roundDiscipline[round]] >> role & 1) != 0;
  }

  /** Whether one of the person's windows holds the whole stretch. */
  public boolean present(int person, int start, int end) {
    int[] from = presentFrom[person];
    for (int i = 0; i < from.length; i++) {
      if (from[i] <= start && end <= presentTo[person][i]) {
        return true;
      }
    }
    return false;
  }

  public boolean busy(int person, int start, int end) {
    int[] from = busyFrom[person];
    for (int i = 0; i < from.length; i++) {
      if (from[i] < end && start < busyTo[person][i]) {
        return true;
      }
    }
    return false;
  }

  /** The seat of a person in a round, or -1 where they are no entrant. */
  public int seatOf(int person, int round) {
    for (int seat : personSeats[person]) {
      if (seatRound[seat] == round) {
        return seat;
      }
    }
    return -1;
  }

  public int person(String id) {
    return personIndex.get(id);
  }

  public int round(String id) {
    return roundIndex.get(id);
  }

  public int hall(String id) {
    return hallIndex.get(id);
  }

  public Pins pins() {
    return event.pins();
  }

  public int grid() {
    return event.rules().startGridMinutes();
  }

  public static int role(Role role) {
    return switch (role) {
      case JUDGE -> 0;
      case SCRAMBLER -> 1;
      case RUNNER -> 2;
    };
  }

  /** The halls a round may be in; where none suits, those it names, else all: a lesser evil. */
  public int[] usableHalls(int round) {
    int[] found = pick(round, h -> suits[round][h]);
    if (found.length > 0) {
      return found;
    }
    List<String> named = roundList.get(round).halls().orElse(List.of());
    found = pick(round, h -> named.contains(hallList.get(h).id()));
    return found.length > 0 ? found : pick(round, h -> true);
  }

  private int[] pick(int round, java.util.function.IntPredicate wanted) {
    return java.util.stream.IntStream.range(0, halls)
        .filter(wanted)
        .filter(h -> capacity[round][h] > 0 || mostStations[round][h] > 0)
        .toArray();
  }

  /** The largest capacity of a suitable hall; 0 where there is none. */
  public int largestCapacity(int round) {
    int largest = 0;
    for (int h = 0; h < halls; h++) {
      if (suits[round][h]) {
        largest = Math.max(largest, capacity[round][h]);
      }
    }
    return largest;
  }

  /**
   * Whether the round must be a single group: a discipline's last, without advance, that fits a
   * suitable hall and has no number of groups of its own.
   */
  public boolean mustBeWhole(int round) {
    Round given = roundList.get(round);
    return given.advance().isEmpty()
        && given.groups().isEmpty()
        && isLast(round)
        && entrants(round) <= largestCapacity(round);
  }

  private boolean isLast(int round) {
    for (int r = 0; r < rounds; r++) {
      if (roundBefore[r] == round) {
        return false;
      }
    }
    return true;
  }
}
