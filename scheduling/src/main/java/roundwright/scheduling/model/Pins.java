package roundwright.scheduling.model;

import java.time.Instant;
import java.util.List;
import java.util.Optional;

/** What the organiser has fixed and every plan must keep. */
public record Pins(List<GroupPin> groups, List<CompetitorPin> competitors, List<DutyPin> duties) {
  public static final Pins NONE = new Pins(List.of(), List.of(), List.of());

  public Pins {
    groups = List.copyOf(groups);
    competitors = List.copyOf(competitors);
    duties = List.copyOf(duties);
  }

  /** A group's hall, its start, or both. A start beside no hall is told in the event's zone. */
  public record GroupPin(
      String round, int number, Optional<String> hall, Optional<Instant> start) {}

  /** Who solves in which group. */
  public record CompetitorPin(String person, String round, int number) {}

  /** Who has a duty in which group. */
  public record DutyPin(String person, String round, int number, Role role) {}
}
