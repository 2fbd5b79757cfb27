package roundwright.server.command;

import java.io.PrintWriter;
import java.nio.file.Path;
import java.util.HashMap;
import java.util.List;
import java.util.Locale;
import java.util.Map;
import java.util.Optional;
import java.util.concurrent.Callable;
import java.util.stream.Collectors;
import picocli.CommandLine.ArgGroup;
import picocli.CommandLine.Command;
import picocli.CommandLine.Model.CommandSpec;
import picocli.CommandLine.Option;
import picocli.CommandLine.Parameters;
import picocli.CommandLine.Spec;
import roundwright.scheduling.cost.Finding;
import roundwright.scheduling.forecast.Bottleneck;
import roundwright.scheduling.forecast.EntrantChances;
import roundwright.scheduling.forecast.Entrants;
import roundwright.scheduling.forecast.GroupForecast;
import roundwright.scheduling.forecast.Overruns;
import roundwright.scheduling.forecast.RoundForecast;
import roundwright.scheduling.forecast.WhatIf;
import roundwright.scheduling.model.Event;
import roundwright.scheduling.model.Hall;
import roundwright.scheduling.model.Plan;
import roundwright.scheduling.model.Round;

/** Says how long each round will take and what that hangs on. */
@Command(
    name = "forecast",
    mixinStandardHelpOptions = true,
    header = "Says how long each round will take, and what that hangs on.",
    description = {
      "For each round: how many groups it needs in its largest suitable hall, how",
      "long the longest of them takes, and what there is too little of. With an",
      "option, that instead."
    },
    exitCodeListHeading = "%nExit codes:%n",
    exitCodeList = {"0:done", "2:the file is wrong"},
    footer = {"", "Example: roundwright forecast event.json"})
final class ForecastCommand implements Callable<Integer> {
  /** The same days every time it is asked. */
  private static final long SEED = 1;

  @Parameters(paramLabel = "EVENT.json", description = "The event file.")
  private Path eventFile;

  @ArgGroup(exclusive = true, multiplicity = "0..1")
  private Instead instead = new Instead();

  /** What to tell in place of the rounds. */
  static final class Instead {
    @Option(
        names = "--what-if",
        paramLabel = "ROUND",
        description = "What more or fewer stations, hands or groups would do to this round.")
    private Optional<String> whatIf = Optional.empty();

    @Option(names = "--chances", description = "Everybody's chance to be in each later round.")
    private boolean chances;

    @Option(
        names = "--slots-of",
        paramLabel = "PLAN.json",
        description = "Groups of this plan that are likely to overrun, and what would help.")
    private Optional<Path> slotsOf = Optional.empty();
  }

  @Spec private CommandSpec spec;

  @Override
  public Integer call() throws Refusal {
    Event event = Given.event(eventFile);
    PrintWriter out = spec.commandLine().getOut();
    if (instead.whatIf.isPresent()) {
      whatIf(event, instead.whatIf.get(), out);
    } else if (instead.chances) {
      chances(event, out);
    } else if (instead.slotsOf.isPresent()) {
      slots(event, Given.plan(instead.slotsOf.get(), event), out);
    } else {
      rounds(event, out);
    }
    out.flush();
    return 0;
  }

  private static void whatIf(Event event, String id, PrintWriter out) throws Refusal {
    Round round = null;
    for (Round one : event.rounds()) {
      round = one.id().equals(id) ? one : round;
    }
    if (round == null) {
      throw new Refusal(
          "--what-if: there is no round \""
              + id
              + "\"; the rounds are "
              + event.rounds().stream().map(Round::id).collect(Collectors.joining(", ")));
    }
    Optional<WhatIf> table = WhatIf.of(event, round, SEED);
    if (table.isEmpty()) {
      out.println("Round " + id + " has nobody in it, or no hall suits it.");
      return;
    }
    int percentile = event.rules().slotPercentile();
    out.printf(
        Locale.ROOT,
        "%-20s %6s %8s %10s %7s %6s %8s %4s %4s %8s  %s%n",
        "if",
        "groups",
        "stations",
        "scramblers",
        "runners",
        "median",
        percentile + " in 100",
        "slot",
        "crew",
        "together",
        "hangs on");
    for (WhatIf.Line line : table.get().lines()) {
      out.printf(
          Locale.ROOT,
          "%-20s %6d %8d %10d %7d %6.1f %8.1f %4d %4d %8d  %s%n",
          line.change(),
          line.groups(),
          line.stations(),
          line.scramblers(),
          line.runners(),
          line.medianMinutes(),
          line.percentileMinutes(),
          line.slotMinutes(),
          line.crewPeople(),
          line.togetherMinutes(),
          line.bottleneck().word());
    }
    out.println();
    out.println("Minutes of the longest group; together with the setting up between groups.");
  }

  private static void chances(Event event, PrintWriter out) {
    EntrantChances chances = EntrantChances.of(event, SEED);
    Map<String, String> names = new HashMap<>();
    event.people().forEach(person -> names.put(person.id(), person.name()));
    Entrants entrants = Entrants.of(event);
    if (event.rounds().stream().noneMatch(round -> entrants.areMerelyLikely(round.id()))) {
      out.println("No round waits for the results of another.");
    }
    for (Round round : event.rounds()) {
      if (!entrants.areMerelyLikely(round.id())) {
        continue;
      }
      int few = chances.entrants(round.id(), 10);
      int many = chances.entrants(round.id(), 90);
      String size = few == many ? Integer.toString(few) : few + " to " + many;
      out.println(round.id() + ": " + size + (many == 1 ? " person" : " people") + " on most days");
      chances
          .of(round.id())
          .forEach(
              (person, chance) ->
                  out.printf(
                      Locale.ROOT,
                      "  %3.0f %%  %s (%s)%n",
                      chance * 100,
                      names.get(person),
                      person));
    }
  }

  private static void slots(Event event, Plan plan, PrintWriter out) {
    List<Finding> overruns = Overruns.of(event, plan);
    if (overruns.isEmpty()) {
      out.println("No group is likely to overrun.");
    }
    overruns.forEach(overrun -> out.println(overrun.says()));
  }

  private static void rounds(Event event, PrintWriter out) {
    Map<String, String> disciplines = new HashMap<>();
    event.disciplines().forEach(one -> disciplines.put(one.id(), one.name()));
    List<RoundForecast> forecasts = RoundForecast.of(event);
    out.printf(
        Locale.ROOT,
        "%-26s %8s %7s %9s %9s %8s  %s%n",
        "round",
        "entrants",
        "groups",
        "stations",
        "minutes",
        "together",
        "hangs on");
    int together = 0;
    for (RoundForecast forecast : forecasts) {
      String name =
          disciplines.get(forecast.round().discipline()) + " round " + forecast.round().number();
      int minutes = forecast.slotMinutes();
      int all = minutes * forecast.groups().size();
      together += all;
      out.printf(
          Locale.ROOT,
          "%-26s %8s %7d %9d %9d %8d  %s%n",
          name.length() > 26 ? name.substring(0, 26) : name,
          (forecast.likely() ? "~" : "") + forecast.entrants(),
          forecast.groups().size(),
          forecast.longest().map(GroupForecast::stations).orElse(0),
          minutes,
          all,
          hangsOn(forecast));
    }
    out.println();
    out.println(
        "Together "
            + together
            + " minutes of groups, setting up not counted. ~ are likely entrants; minutes are those"
            + " of the round's longest group.");
  }

  private static String hangsOn(RoundForecast forecast) {
    if (forecast.hall().isEmpty()) {
      return "no hall suits it";
    }
    if (forecast.groups().isEmpty()) {
      return "nobody enters";
    }
    if (forecast.round().minutesPerGroup().isPresent()) {
      return "minutes laid down";
    }
    GroupForecast longest = forecast.longest().orElseThrow();
    Hall hall = forecast.hall().get();
    return longest.bottleneck() == Bottleneck.STATIONS
        ? "stations of " + hall.name()
        : longest.bottleneck().word();
  }
}
