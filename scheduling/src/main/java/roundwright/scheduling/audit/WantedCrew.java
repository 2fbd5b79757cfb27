package roundwright.scheduling.audit;

import java.math.BigDecimal;
import java.math.RoundingMode;
import roundwright.scheduling.model.Group;
import roundwright.scheduling.model.Role;
import roundwright.scheduling.model.Round;

/** The crew that a group wants. */
record WantedCrew(int judges, int scramblers, int runners) {
  static WantedCrew of(Directory event, Group group) {
    Round round = event.round(group.round());
    if (round.crew().isPresent()) {
      Round.CrewSize crew = round.crew().get();
      return new WantedCrew(crew.judges(), crew.scramblers(), crew.runners());
    }
    int judges = Math.min(group.stations(), group.competitors().size());
    return new WantedCrew(
        judges,
        oneFor(judges, event.rules().stationsPerScrambler()),
        oneFor(judges, event.rules().stationsPerRunner()));
  }

  private static int oneFor(int judges, BigDecimal stations) {
    return stations.signum() == 0
        ? 0
        : BigDecimal.valueOf(judges).divide(stations, 0, RoundingMode.CEILING).intValueExact();
  }

  int in(Role role) {
    return switch (role) {
      case JUDGE -> judges;
      case SCRAMBLER -> scramblers;
      case RUNNER -> runners;
    };
  }
}
