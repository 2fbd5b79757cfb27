package roundwright.server.command;

import java.io.PrintWriter;
import java.math.BigDecimal;
import java.nio.file.Path;
import java.util.List;
import java.util.Locale;
import java.util.Map;
import java.util.Optional;
import java.util.TreeMap;
import java.util.concurrent.Callable;
import java.util.stream.Collectors;
import picocli.CommandLine.Command;
import picocli.CommandLine.Model.CommandSpec;
import picocli.CommandLine.Option;
import picocli.CommandLine.Parameters;
import picocli.CommandLine.Spec;
import roundwright.scheduling.audit.Auditor;
import roundwright.scheduling.audit.Kept;
import roundwright.scheduling.audit.Verdict;
import roundwright.scheduling.bounds.StrainBound;
import roundwright.scheduling.cost.Finding;
import roundwright.scheduling.cost.Level;
import roundwright.scheduling.cost.RuleName;
import roundwright.scheduling.forecast.Overruns;
import roundwright.scheduling.model.Event;
import roundwright.scheduling.model.Plan;

/** Judges any plan for an event, rule by rule. */
@Command(
    name = "check",
    mixinStandardHelpOptions = true,
    sortOptions = false,
    header = "Judges any plan for an event, rule by rule.",
    description = {
      "Breaches are rules broken, gaps are duties that nobody fills, strain is",
      "discomfort. Any plan will do, also one made by hand."
    },
    exitCodeListHeading = "%nExit codes:%n",
    exitCodeList = {"0:no rule is broken", "1:some rule is broken", "2:a file is wrong"},
    footer = {"", "Example: roundwright check event.json plan.json"})
final class CheckCommand implements Callable<Integer> {
  private static final int MOST_OVERRUNS = 10;

  private static final int MOST_FINDINGS_OF_A_RULE = 20;

  @Parameters(index = "0", paramLabel = "EVENT.json", description = "The event file.")
  private Path eventFile;

  @Parameters(index = "1", paramLabel = "PLAN.json", description = "The plan file.")
  private Path planFile;

  @Option(
      names = "--kept",
      paramLabel = "KEPT.json",
      description = "The plan that people know: what differs from it counts as changed.")
  private Optional<Path> keptFile = Optional.empty();

  @Option(
      names = "--at",
      paramLabel = "T",
      description =
          "With --kept: what starts before T can no longer change. A local time of the event,"
              + " such as 2027-05-08T09:00.")
  private Optional<String> at = Optional.empty();

  @Option(names = "--json", description = "Print the figures as JSON and nothing else.")
  private boolean json;

  @Spec private CommandSpec spec;

  @Override
  public Integer call() throws Refusal {
    if (at.isPresent() && keptFile.isEmpty()) {
      throw new Refusal("--at says when the plan was kept; name that plan with --kept");
    }
    Event event = Given.event(eventFile);
    Plan plan = Given.plan(planFile, event);
    Auditor auditor = new Auditor(event);
    Verdict verdict;
    if (keptFile.isPresent()) {
      Plan kept = Given.keptPlan(keptFile.get(), event);
      verdict =
          auditor.audit(
              plan,
              at.isPresent()
                  ? new Kept(kept, Optional.of(Named.moment("--at", at.get(), event)))
                  : new Kept(kept));
    } else {
      verdict = auditor.audit(plan);
    }
    PrintWriter out = spec.commandLine().getOut();
    if (json) {
      out.println(json(verdict));
    } else {
      tell(verdict, event, out);
      StrainBound.of(event, plan).ifPresent(bound -> out.printf("%n%s%n", bound.says()));
      tellOverruns(event, plan, out);
    }
    out.flush();
    return verdict.cost().breaches() == 0 ? 0 : 1;
  }

  /** The figures as the file format's page lays them down. */
  static String json(Verdict verdict) {
    return "{\"breaches\":"
        + object(verdict.breaches())
        + ",\"gaps\":"
        + verdict.cost().gaps()
        + ",\"strain\":"
        + verdict.cost().roundedStrain().toPlainString()
        + ",\"byRule\":"
        + object(verdict.roundedStrains())
        + "}";
  }

  private static String object(Map<RuleName, ? extends Number> figures) {
    return figures.entrySet().stream()
        .map(entry -> "\"" + entry.getKey().word() + "\":" + plain(entry.getValue()))
        .collect(Collectors.joining(",", "{", "}"));
  }

  private static String plain(Number number) {
    return number instanceof BigDecimal decimal ? decimal.toPlainString() : number.toString();
  }

  /** What the simulation says of the slots; no price, so not among the figures. */
  private void tellOverruns(Event event, Plan plan, PrintWriter out) {
    List<Finding> overruns = Overruns.of(event, plan);
    if (overruns.isEmpty()) {
      return;
    }
    out.println();
    out.println("Likely to overrun");
    overruns.stream().limit(MOST_OVERRUNS).forEach(one -> out.println("  " + one.says()));
    if (overruns.size() > MOST_OVERRUNS) {
      out.printf(
          "  and %d more; see them all: roundwright forecast %s --slots-of %s%n",
          overruns.size() - MOST_OVERRUNS, eventFile, planFile);
    }
  }

  private static void tell(Verdict verdict, Event event, PrintWriter out) {
    out.println(verdict.cost());
    level(verdict, Level.BREACH, "Breaches", out);
    level(verdict, Level.GAP, "Gaps", out);
    if (!verdict.strains().isEmpty()) {
      out.println();
      out.println("Strain                     amount  x  weight  =  strain");
      verdict
          .roundedStrains()
          .forEach(
              (rule, strain) ->
                  out.printf(
                      Locale.ROOT,
                      "  %-20s %12.1f  x  %6s  =  %s%n",
                      rule.word(),
                      verdict.amounts().get(rule),
                      event.rules().weight(rule).stripTrailingZeros().toPlainString(),
                      strain.toPlainString()));
    }
    level(verdict, Level.NOTICE, "Worth knowing", out);
  }

  private static void level(Verdict verdict, Level level, String heading, PrintWriter out) {
    Map<RuleName, List<Finding>> byRule =
        verdict.findings().stream()
            .filter(finding -> finding.level() == level)
            .collect(Collectors.groupingBy(Finding::rule, TreeMap::new, Collectors.toList()));
    if (byRule.isEmpty()) {
      return;
    }
    out.println();
    out.println(heading);
    byRule.forEach(
        (rule, findings) -> {
          out.println("  " + rule.word() + " " + verdict.amounts().get(rule).toPlainString());
          findings.stream()
              .limit(MOST_FINDINGS_OF_A_RULE)
              .forEach(finding -> out.println("    " + finding.says()));
          if (findings.size() > MOST_FINDINGS_OF_A_RULE) {
            out.println("    and " + (findings.size() - MOST_FINDINGS_OF_A_RULE) + " more");
          }
        });
  }
}
