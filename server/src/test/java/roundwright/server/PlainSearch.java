package roundwright.server;

import java.math.BigDecimal;
import java.time.Duration;
import java.time.Instant;
import java.util.ArrayList;
import java.util.HashMap;
import java.util.List;
import java.util.Map;
import java.util.Optional;
import roundwright.scheduling.Effort;
import roundwright.scheduling.Progress;
import roundwright.scheduling.cost.Cost;
import roundwright.scheduling.cost.Finding;
import roundwright.scheduling.cost.RuleName;
import roundwright.scheduling.model.Event;
import roundwright.scheduling.model.Group;
import roundwright.scheduling.model.Hall;
import roundwright.scheduling.model.Person;
import roundwright.scheduling.model.Plan;
import roundwright.scheduling.model.Round;

/**
 * A search that takes no time and is no good: the groups of each first round one after the other in
 * the hall that comes next, judged by whoever comes next in the list. What tests of pages need is a
 * plan, not a good one.
 */
public final class PlainSearch {
  private static final int GROUP_SIZE = 12;
  private static final int GROUP_MINUTES = 25;
  private static final int SLOT_MINUTES = 30;

  private PlainSearch() {}

  public static Plan plan(Event event, Effort effort, Progress progress) {
    List<Hall> halls = event.venues().stream().flatMap(venue -> venue.halls().stream()).toList();
    Map<String, Integer> slots = new HashMap<>();
    List<Group> groups = new ArrayList<>();
    List<Finding> findings = new ArrayList<>();
    for (Round round : event.rounds()) {
      if (round.number() > 1) {
        continue;
      }
      Hall hall = halls.get(groups.size() % halls.size());
      List<String> entrants = entrants(event, round);
      for (int from = 0; from < entrants.size(); from += GROUP_SIZE) {
        int slot = slots.merge(hall.id(), 1, Integer::sum) - 1;
        List<String> competitors =
            entrants.subList(from, Math.min(entrants.size(), from + GROUP_SIZE));
        Instant start =
            hall.open().get(0).from().plus(Duration.ofMinutes((long) SLOT_MINUTES * slot));
        String id = "g-" + effort.seed() + "-" + groups.size();
        groups.add(
            new Group(
                id,
                round.id(),
                from / GROUP_SIZE + 1,
                hall.id(),
                Math.min(hall.stations(), competitors.size()),
                start,
                start.plus(Duration.ofMinutes(GROUP_MINUTES)),
                competitors,
                new Group.Crew(List.of(judge(event, competitors)), List.of(), List.of())));
        findings.add(
            new Finding(
                RuleName.UNFILLED,
                BigDecimal.ONE,
                Optional.of(id),
                List.of(),
                "Group " + id + " wants another judge."));
      }
    }
    Cost score = new Cost(0, findings.size(), new BigDecimal("12.5"));
    progress.report(new Progress.Report(Progress.Stage.DONE, score, 0.5, 1, List.of("unfilled")));
    return new Plan(groups, Optional.of(score), findings);
  }

  private static List<String> entrants(Event event, Round round) {
    return event.people().stream()
        .filter(
            person ->
                person.entries().stream()
                    .anyMatch(entry -> entry.discipline().equals(round.discipline())))
        .map(Person::id)
        .toList();
  }

  private static String judge(Event event, List<String> competitors) {
    return event.people().stream()
        .filter(person -> person.crew().judges() && !competitors.contains(person.id()))
        .findFirst()
        .map(Person::id)
        .orElse(competitors.get(0));
  }
}
