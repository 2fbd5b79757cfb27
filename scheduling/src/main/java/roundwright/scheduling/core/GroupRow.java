package roundwright.scheduling.core;

/** One group with who is in it, for the rules to read. Loaded over and over. */
public final class GroupRow {
  public Board board;
  public Frame frame;
  public Problem problem;
  public int group;
  public int round;
  public int size;
  public int stations;
  public final int[] wanted = new int[3];
  public final int[] filled = new int[3];

  public void load(Board from, int wantedGroup) {
    board = from;
    frame = from.frame;
    problem = from.problem;
    group = wantedGroup;
    round = frame.round[group];
    size = from.size[group];
    stations = frame.stations[group];
    for (int role = 0; role < 3; role++) {
      wanted[role] = problem.wanted(round, role, stations, size);
      filled[role] = from.filled[group * 3 + role];
    }
  }

  /** Stations that work at once: those in use, or in fixed seating one for each competitor. */
  public int active() {
    return problem.roundFixed[round] ? size : stations;
  }

  /** The least minutes the group takes with the crew it wants. */
  public int leastMinutes() {
    if (board.leastMinutes[group] < 0) {
      board.leastMinutes[group] = leastMinutesAnew();
    }
    return board.leastMinutes[group];
  }

  private int leastMinutesAnew() {
    long longest = 0;
    for (int i = 0; i < size; i++) {
      longest =
          Math.max(
              longest,
              problem.pace.pathMicros(round, board.member(group, i), wanted[1], wanted[2]));
    }
    return problem.pace.leastMinutes(
        round,
        board.workInAll[group],
        board.attemptsInAll[group],
        longest,
        active(),
        wanted[1],
        wanted[2]);
  }
}
