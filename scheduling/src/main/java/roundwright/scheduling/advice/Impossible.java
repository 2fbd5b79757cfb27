package roundwright.scheduling.advice;

import java.util.ArrayList;
import java.util.List;
import roundwright.scheduling.core.Problem;
import roundwright.scheduling.model.Event;

/**
 * Something that no plan for an event can do: whatever is planned, it has at least so many
 * breaches, or breaches and gaps, on account of it. Found from the event alone, in far less time
 * than a plan takes. Several of them may be paid for by one and the same breach, so their numbers
 * do not add up.
 *
 * @param kind what sort of thing it is
 * @param atLeast breaches, or breaches and gaps where {@link Kind#leavesGaps()}, of any plan
 * @param people ids of the people concerned, by id
 * @param rounds ids of the rounds concerned
 * @param halls ids of the halls concerned
 * @param says one sentence with names, times and what to do
 */
public record Impossible(
    Kind kind,
    long atLeast,
    List<String> people,
    List<String> rounds,
    List<String> halls,
    String says) {
  public Impossible {
    people = List.copyOf(people);
    rounds = List.copyOf(rounds);
    halls = List.copyOf(halls);
  }

  /** What sort of thing cannot be done. */
  public enum Kind {
    /** A round that no hall suits. */
    NO_HALL,
    /** More entrants, or fewer, than the number of groups laid down can take. */
    GROUPS_DO_NOT_FIT,
    /** A round with no stretch of time long enough. */
    NO_TIME,
    /** Rounds of a discipline that follow each other for longer than there is time. */
    ORDER_TOO_LONG,
    /** More minutes of groups than halls are open. */
    HALLS_TOO_FULL,
    /** Somebody who is away or busy whenever a round of theirs may be. */
    NEVER_THERE,
    /** A round of one group whose entrants are never there together. */
    NEVER_TOGETHER,
    /** Two rounds that can only be at the same time, with somebody in both. */
    SAME_TIME,
    /** Somebody with more minutes of groups than they have time. */
    TOO_MANY_ENTRIES,
    /** A round for whose crews too few people can be had. */
    TOO_FEW_SKILLED,
    /** More minutes of duty than all who could do it have. */
    TOO_LITTLE_DUTY_TIME,
    /** Pins that cannot all be kept. */
    PINS_CONTRADICT;

    /** Whether gaps may take the place of breaches. */
    public boolean leavesGaps() {
      return this == TOO_FEW_SKILLED || this == TOO_LITTLE_DUTY_TIME;
    }
  }

  /** Everything found that no plan for the event can do, the day plan's troubles first. */
  public static List<Impossible> of(Event event) {
    Problem problem = new Problem(event);
    PossibleTimes times = new PossibleTimes(problem);
    Wording words = new Wording(event);
    List<Impossible> found = new ArrayList<>();
    found.addAll(new RoomForRounds(times, words).find());
    found.addAll(new TimeForPeople(times, words).find());
    found.addAll(new HandsForRounds(times, words).find());
    found.addAll(new HoursOfDuty(times).find());
    found.addAll(new PinsTogether(times, words).find());
    return found;
  }
}
