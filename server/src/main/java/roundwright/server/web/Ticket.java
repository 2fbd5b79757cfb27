package roundwright.server.web;

import java.time.Duration;
import java.time.ZonedDateTime;
import java.util.List;
import java.util.Locale;

/**
 * What a ticket says: one group, or, on the public schedule, those groups of a round that follow
 * each other in a hall without another round between them.
 *
 * @param group the group's lasting id; of several groups that of the first
 * @param discipline its plain name
 * @param round number of the round within the discipline
 * @param finalRound true for a discipline's last round where it has more than one
 * @param number of the group within its round; of several the smallest
 * @param lastNumber the same as {@code number}; of several groups the largest
 * @param groups how many groups the round has
 * @param start in the hall's venue's zone, as is the end
 * @param competitors how many
 * @param crew how many places are filled, by role, in the order judges, scramblers, runners; roles
 *     that are not wanted are left out
 * @param breaches findings of that level that name this group, as are gaps
 * @param joins true where the same round's next group follows in the same hall within the set-up
 *     time
 * @param pinned true where a pin holds hall or start
 */
public record Ticket(
    String group,
    HallMark hall,
    String discipline,
    int round,
    boolean finalRound,
    int number,
    int lastNumber,
    int groups,
    ZonedDateTime start,
    ZonedDateTime end,
    State state,
    int competitors,
    List<Crew> crew,
    long breaches,
    long gaps,
    boolean joins,
    boolean pinned) {
  public Ticket {
    crew = List.copyOf(crew);
  }

  /** Live states of a group, in order. */
  public enum State {
    PLANNED,
    NEXT,
    REPORT,
    SOLVING,
    CLOSED,
    HELD,
    DROPPED;

    /** The word in style names and keys of sentences. */
    public String word() {
      return name().toLowerCase(Locale.ROOT);
    }
  }

  /** One role's places. */
  public record Crew(String role, int filled, int wanted) {
    public int missing() {
      return Math.max(0, wanted - filled);
    }
  }

  /** The same ticket with what rules found against its group. */
  public Ticket withFound(long foundBreaches, long foundGaps) {
    return copy(state, foundBreaches, foundGaps, joins);
  }

  /** The same ticket in another state. */
  public Ticket in(State other) {
    return copy(other, breaches, gaps, joins);
  }

  /** The same ticket, joined to the next one of its round. */
  public Ticket joining() {
    return copy(state, breaches, gaps, true);
  }

  private Ticket copy(State other, long foundBreaches, long foundGaps, boolean joined) {
    return new Ticket(
        group,
        hall,
        discipline,
        round,
        finalRound,
        number,
        lastNumber,
        groups,
        start,
        end,
        other,
        competitors,
        crew,
        foundBreaches,
        foundGaps,
        joined,
        pinned);
  }

  public long minutes() {
    return Duration.between(start, end).toMinutes();
  }

  public int crewFilled() {
    return crew.stream().mapToInt(Crew::filled).sum();
  }

  public int crewWanted() {
    return crew.stream().mapToInt(Crew::wanted).sum();
  }

  /** The classes that place it on an axis of time. */
  public String slot() {
    return Lanes.slot(start.toLocalTime(), minutes());
  }

  /**
   * Key of the sentence that names its round and groups; its places are filled with round, number
   * and lastNumber.
   */
  public String partKey() {
    String round = finalRound ? "ticket.final" : "ticket.round";
    if (lastNumber - number + 1 >= groups) {
      return round;
    }
    return switch (lastNumber - number) {
      case 0 -> round + ".group";
      case 1 -> round + ".two";
      default -> round + ".groups";
    };
  }
}
