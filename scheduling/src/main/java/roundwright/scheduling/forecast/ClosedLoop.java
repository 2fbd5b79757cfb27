package roundwright.scheduling.forecast;

import java.util.ArrayList;
import java.util.List;

/**
 * So many customers going round for ever between a few service centres: in a group, puzzles between
 * scramblers, runners and stations. Service times are exponential and first come is first served,
 * so that the steady state has a product form.
 *
 * <p>Exact mean-value analysis (Reiser & Lavenberg 1980), with marginal probabilities at centres of
 * several servers. The probability that such a centre is empty follows from the throughput of the
 * loop without it (Reiser 1981) rather than from what is left over to 1, which loses all its digits
 * in a busy loop; every step then adds and multiplies positive numbers only.
 *
 * @param thinkSeconds outside all centres, per cycle
 */
public record ClosedLoop(List<Centre> centres, double thinkSeconds) {
  public ClosedLoop {
    centres = List.copyOf(centres);
    if (!(thinkSeconds >= 0)) {
      throw new IllegalArgumentException("Think time must be 0 or more, not " + thinkSeconds);
    }
  }

  /**
   * Where customers are served.
   *
   * @param serviceSeconds of one visit; 0 or more
   * @param visits per cycle; 0 or more
   * @param servers alike; 1 or more. As many as there are customers make it a mere delay
   */
  public record Centre(String name, double serviceSeconds, double visits, int servers) {
    public Centre {
      if (!(serviceSeconds >= 0) || !(visits >= 0) || servers < 1) {
        throw new IllegalArgumentException(
            "Centre "
                + name
                + " must have service and visits of 0 or more and servers of 1 or more, not "
                + serviceSeconds
                + ", "
                + visits
                + " and "
                + servers);
      }
    }

    double demandSeconds() {
      return serviceSeconds * visits;
    }
  }

  /**
   * The steady state with so many customers.
   *
   * @param throughput cycles per second
   * @param centres in the order of the loop's
   */
  public record SteadyState(double throughput, List<AtCentre> centres) {
    public SteadyState {
      centres = List.copyOf(centres);
    }
  }

  /**
   * One centre in steady state.
   *
   * @param residenceSeconds of one visit, waiting included
   * @param customers there on average, waiting or served
   * @param use of each server, 0 to 1
   * @param probabilities of 0, 1, 2 ... customers there
   */
  public record AtCentre(
      double residenceSeconds, double customers, double use, List<Double> probabilities) {
    public AtCentre {
      probabilities = List.copyOf(probabilities);
    }
  }

  /**
   * The exact steady state.
   *
   * @param customers 1 or more
   */
  public SteadyState steadyState(int customers) {
    Network whole = solved(customers, customers + 1);
    List<AtCentre> states = new ArrayList<>();
    for (int i = 0; i < centres.size(); i++) {
      Centre centre = centres.get(i);
      List<Double> probabilities = new ArrayList<>();
      for (double probability : whole.probabilities[i]) {
        probabilities.add(probability);
      }
      states.add(
          new AtCentre(
              whole.residence[i],
              whole.customers[i],
              whole.throughput * centre.demandSeconds() / centre.servers(),
              probabilities));
    }
    return new SteadyState(whole.throughput, states);
  }

  /** The exact throughput alone, in cycles per second; much faster than the whole state. */
  public double throughput(int customers) {
    return solved(customers, 0).throughput;
  }

  /**
   * What no loop of these demands can exceed, whatever the distribution of its times (Denning &
   * Buzen 1978), in cycles per second.
   */
  public double mostThroughput(int customers) {
    double most = customers / (thinkSeconds + totalDemandSeconds());
    for (Centre centre : centres) {
      most = Math.min(most, centre.servers() / centre.demandSeconds());
    }
    return most;
  }

  /** The least time of a cycle outside thinking that customers see on average, in seconds. */
  public double leastResponseSeconds(int customers) {
    double least = totalDemandSeconds();
    for (Centre centre : centres) {
      least = Math.max(least, customers * centre.demandSeconds() / centre.servers() - thinkSeconds);
    }
    return least;
  }

  private double totalDemandSeconds() {
    return centres.stream().mapToDouble(Centre::demandSeconds).sum();
  }

  /** One subset of the centres while customers are added one by one. */
  private static final class Network {
    final double[] residence;
    final double[] customers;
    final double[][] probabilities;
    double throughput;

    Network(int centres) {
      residence = new double[centres];
      customers = new double[centres];
      probabilities = new double[centres][];
    }
  }

  /**
   * Solves the loop and, for the sake of their throughput, its subsets without centres of several
   * servers. A subset is a set of bits, one for each centre; a subset's own subsets are smaller
   * numbers, so that solving in order of number has them ready.
   *
   * @param wanted how many marginal probabilities to keep even where they are not needed
   */
  private Network solved(int population, int wanted) {
    if (population < 1) {
      throw new IllegalArgumentException("Customers must be 1 or more, not " + population);
    }
    int count = centres.size();
    int several = 0;
    for (int i = 0; i < count; i++) {
      int servers = centres.get(i).servers();
      boolean used = centres.get(i).demandSeconds() > 0;
      if (used && (wanted > 0 || (servers > 1 && servers < population))) {
        several |= 1 << i;
      }
    }
    int all = (1 << count) - 1;
    Network[] networks = new Network[all + 1];
    for (int subset = 0; subset <= all; subset++) {
      if ((subset | several) == all) {
        networks[subset] = emptyNetwork(subset, several, population, wanted);
      }
    }
    for (int n = 1; n <= population; n++) {
      for (int subset = 0; subset <= all; subset++) {
        if (networks[subset] != null) {
          addCustomer(networks, subset, several, n);
        }
      }
    }
    return networks[all];
  }

  private Network emptyNetwork(int subset, int several, int population, int wanted) {
    Network network = new Network(centres.size());
    for (int i = 0; i < centres.size(); i++) {
      if (wanted > 0 || (subset & several & (1 << i)) != 0) {
        int kept = Math.max(wanted, Math.min(centres.get(i).servers(), population));
        network.probabilities[i] = new double[kept];
        network.probabilities[i][0] = 1;
      }
    }
    return network;
  }

  /** The step of the recursion from n - 1 to n customers. */
  private void addCustomer(Network[] networks, int subset, int several, int n) {
    Network network = networks[subset];
    double cycle = thinkSeconds;
    for (int i = 0; i < centres.size(); i++) {
      if ((subset & (1 << i)) != 0) {
        network.residence[i] = residence(network, i, n);
        cycle += centres.get(i).visits() * network.residence[i];
      }
    }
    network.throughput = n / cycle;
    for (int i = 0; i < centres.size(); i++) {
      if ((subset & (1 << i)) == 0) {
        continue;
      }
      Centre centre = centres.get(i);
      if (centre.demandSeconds() == 0) {
        continue;
      }
      network.customers[i] = network.throughput * centre.visits() * network.residence[i];
      double[] probabilities = network.probabilities[i];
      if ((several & (1 << i)) == 0) {
        continue;
      }
      for (int j = Math.min(n, probabilities.length - 1); j > 0; j--) {
        probabilities[j] =
            probabilities[j - 1]
                * network.throughput
                * centre.demandSeconds()
                / Math.min(j, centre.servers());
      }
      // without any centre and any thinking the throughput is infinite, and this one never empty
      probabilities[0] *= network.throughput / networks[subset & ~(1 << i)].throughput;
    }
  }

  private double residence(Network network, int index, int n) {
    Centre centre = centres.get(index);
    int servers = centre.servers();
    if (servers >= n || centre.demandSeconds() == 0) {
      return centre.serviceSeconds();
    }
    double ahead = 1 + network.customers[index];
    if (servers > 1) {
      double[] probabilities = network.probabilities[index];
      for (int j = 0; j < servers - 1; j++) {
        ahead += (servers - 1 - j) * probabilities[j];
      }
    }
    return centre.serviceSeconds() / servers * ahead;
  }
}
