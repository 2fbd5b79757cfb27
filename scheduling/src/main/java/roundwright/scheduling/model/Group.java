package roundwright.scheduling.model;

import java.time.Instant;
import java.util.List;

/**
 * Some of a round's entrants, called together.
 *
 * @param id the same for life
 * @param number within the round
 * @param stations in use
 * @param competitors ids; in fixed seating in order of station; somebody may be listed twice in a
 *     plan made by hand
 */
public record Group(
    String id,
    String round,
    int number,
    String hall,
    int stations,
    Instant start,
    Instant end,
    List<String> competitors,
    Crew crew) {
  public Group {
    competitors = List.copyOf(competitors);
  }

  /** The people on duty, by role; ids. */
  public record Crew(List<String> judges, List<String> scramblers, List<String> runners) {
    public static final Crew NONE = new Crew(List.of(), List.of(), List.of());

    public Crew {
      judges = List.copyOf(judges);
      scramblers = List.copyOf(scramblers);
      runners = List.copyOf(runners);
    }

    public List<String> in(Role role) {
      return switch (role) {
        case JUDGE -> judges;
        case SCRAMBLER -> scramblers;
        case RUNNER -> runners;
      };
    }
  }
}
