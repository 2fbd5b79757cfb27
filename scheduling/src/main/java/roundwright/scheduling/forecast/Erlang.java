package roundwright.scheduling.forecast;

/** Waiting in front of several servers with arrivals by chance (Erlang 1917). */
public final class Erlang {
  private Erlang() {}

  /**
   * The probability that a customer has to wait (Erlang C), by the stable recursion over servers of
   * the probability that one is turned away (Erlang B).
   *
   * @param servers 1 or more
   * @param load arrivals times service time: servers busy on average; at least 0
   * @return 1 where the load is as much as the servers or more, and the queue grows for ever
   */
  public static double waitProbability(int servers, double load) {
    if (servers < 1 || !(load >= 0)) {
      throw new IllegalArgumentException(
          "Servers must be 1 or more and load 0 or more, not " + servers + " and " + load);
    }
    if (load >= servers) {
      return 1;
    }
    double turnedAway = 1;
    for (int i = 1; i <= servers; i++) {
      turnedAway = load * turnedAway / (i + load * turnedAway);
    }
    return servers * turnedAway / (servers - load * (1 - turnedAway));
  }

  /** The fewest servers with which at most such a part of the customers has to wait. */
  public static int fewestServers(double load, double mostWaiting) {
    if (!(mostWaiting > 0)) {
      throw new IllegalArgumentException(
          "The part that may wait must be over 0, not " + mostWaiting);
    }
    int servers = 1;
    while (waitProbability(servers, load) > mostWaiting) {
      servers++;
    }
    return servers;
  }
}
