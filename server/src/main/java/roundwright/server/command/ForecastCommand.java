package roundwright.server.command;

import java.io.PrintWriter;
import java.nio.file.Path;
import java.util.HashMap;
import java.util.List;
import java.util.Locale;
import java.util.Map;
import java.util.concurrent.Callable;
import picocli.CommandLine.Command;
import picocli.CommandLine.Model.CommandSpec;
import picocli.CommandLine.Parameters;
import picocli.CommandLine.Spec;
import roundwright.scheduling.forecast.Bottleneck;
import roundwright.scheduling.forecast.GroupForecast;
import roundwright.scheduling.forecast.RoundForecast;
import roundwright.scheduling.model.Event;
import roundwright.scheduling.model.Hall;

/** Says how long each round will take and what that hangs on. */
@Command(
    name = "forecast",
    mixinStandardHelpOptions = true,
    header = "Says how long each round will take, and what that hangs on.",
    description = {
      "For each round: how many groups it needs in its largest suitable hall, how",
      "long the longest of them takes, and what there is too little of."
    },
    exitCodeListHeading = "%nExit codes:%n",
    exitCodeList = {"0:done", "2:the file is wrong"},
    footer = {"", "Example: roundwright forecast event.json"})
final class ForecastCommand implements Callable<Integer> {
  @Parameters(paramLabel = "EVENT.json", description = "The event file.")
  private Path eventFile;

  @Spec private CommandSpec spec;

  @Override
  public Integer call() throws Refusal {
    Event event = Given.event(eventFile);
    Map<String, String> disciplines = new HashMap<>();
    event.disciplines().forEach(one -> disciplines.put(one.id(), one.name()));
    List<RoundForecast> forecasts = RoundForecast.of(event);
    PrintWriter out = spec.commandLine().getOut();
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
    out.flush();
    return 0;
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
