package roundwright.server.planning;

import java.math.BigDecimal;
import java.math.RoundingMode;
import roundwright.scheduling.model.Group;
import roundwright.scheduling.model.Round;
import roundwright.scheduling.model.Rules;

/** The crew that a group wants, as the event-file page defines it. */
record Wanted(int judges, int scramblers, int runners) {
  /**
   * The wanted crew of a group.
   *
   * @param round null for one that is no longer in the event: then only judges are wanted
   */
  static Wanted in(Group group, Round round, Rules rules) {
    int judges = Math.min(group.stations(), group.competitors().size());
    if (round == null) {
      return new Wanted(judges, 0, 0);
    }
    return round
        .crew()
        .map(crew -> new Wanted(crew.judges(), crew.scramblers(), crew.runners()))
        .orElseGet(
            () ->
                new Wanted(
                    judges,
                    perStations(judges, rules.stationsPerScrambler()),
                    perStations(judges, rules.stationsPerRunner())));
  }

  private static int perStations(int judges, BigDecimal stationsEach) {
    return stationsEach.signum() == 0
        ? 0
        : BigDecimal.valueOf(judges).divide(stationsEach, 0, RoundingMode.CEILING).intValueExact();
  }
}
