package roundwright.scheduling.rules;

import java.util.List;
import roundwright.scheduling.core.GroupRow;
import roundwright.scheduling.core.Problem;
import roundwright.scheduling.cost.RuleName;

/** The rules over one group and who is in it. */
final class GroupRules {
  private GroupRules() {}

  static List<GroupRule> breaches() {
    return List.of(new Peopled(), new Oversize(), new TooShort());
  }

  static GroupRule gaps() {
    return new Unfilled();
  }

  static List<GroupRule> strains(Problem problem) {
    return List.of(
        new UnevenGroups(Weights.millionths(problem, RuleName.UNEVEN_GROUPS)),
        new SpareCrew(Weights.millionths(problem, RuleName.SPARE_CREW)),
        new Kin(Weights.millionths(problem, RuleName.KIN)));
  }

  /** A group without competitors is none: so dear that the search leaves no such group behind. */
  record Peopled() implements GroupRule {
    static final long EMPTY = 50;

    @Override
    public RuleName name() {
      return RuleName.WRONG_COUNT;
    }

    @Override
    public long price(GroupRow row) {
      return row.size == 0 ? EMPTY : 0;
    }
  }

  /** People beyond what the stations in use may hold, and stations beyond what there are. */
  record Oversize() implements GroupRule {
    @Override
    public RuleName name() {
      return RuleName.OVERSIZE;
    }

    @Override
    public long price(GroupRow row) {
      int most = row.problem.mostStations[row.round][row.frame.hall[row.group]];
      return (long) Math.max(0, row.size - row.frame.mostPeople[row.group])
          + Math.max(0, row.stations - most);
    }
  }

  /** Each started five minutes missing to the least time, or of difference from a given length. */
  record TooShort() implements GroupRule {
    @Override
    public RuleName name() {
      return RuleName.TOO_SHORT;
    }

    @Override
    public long price(GroupRow row) {
      int minutes = row.frame.end[row.group] - row.frame.start[row.group];
      var given = row.problem.roundList.get(row.round).minutesPerGroup();
      if (given.isPresent()) {
        return Weights.startedFives(Math.abs(minutes - given.getAsInt()));
      }
      return row.size == 0 ? 0 : Weights.startedFives(row.leastMinutes() - minutes);
    }
  }

  /** One for each wanted duty that nobody fills. */
  record Unfilled() implements GroupRule {
    @Override
    public RuleName name() {
      return RuleName.UNFILLED;
    }

    @Override
    public long price(GroupRow row) {
      long found = 0;
      for (int role = 0; role < 3; role++) {
        found += Math.max(0, row.wanted[role] - row.filled[role]);
      }
      return found;
    }
  }

  /** The square of how far beyond one person a group's size is from its fair part. */
  record UnevenGroups(long weight) implements GroupRule {
    @Override
    public RuleName name() {
      return RuleName.UNEVEN_GROUPS;
    }

    @Override
    public long price(GroupRow row) {
      if (row.problem.roundFixed[row.round]) {
        return 0;
      }
      double beyond = Math.abs(row.size - row.frame.fairSize[row.group]) - 1;
      return beyond <= 0 ? 0 : Math.round(beyond * beyond * weight);
    }
  }

  /** One for each crew member beyond the wanted number. */
  record SpareCrew(long weight) implements GroupRule {
    @Override
    public RuleName name() {
      return RuleName.SPARE_CREW;
    }

    @Override
    public long price(GroupRow row) {
      long found = 0;
      for (int role = 0; role < 3; role++) {
        found += Math.max(0, row.filled[role] - row.wanted[role]);
      }
      return found * weight;
    }
  }

  /** One for each judge and competitor of one household. */
  record Kin(long weight) implements GroupRule {
    @Override
    public RuleName name() {
      return RuleName.KIN;
    }

    @Override
    public long price(GroupRow row) {
      int pairs = row.board.kinPairs[row.group];
      return pairs == 0 ? 0 : (pairs - withThemselves(row)) * weight;
    }

    private static int withThemselves(GroupRow row) {
      int found = 0;
      for (int i = 0; i < row.size; i++) {
        int person = row.problem.seatPerson[row.board.member(row.group, i)];
        if (row.problem.household[person] < 0) {
          continue;
        }
        for (int c = 0; c < row.board.commitmentCount(person); c++) {
          found += row.board.commitment(person, c) == row.group << 2 ? 1 : 0;
        }
      }
      return found;
    }
  }
}
