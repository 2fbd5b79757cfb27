package roundwright.scheduling.core;

import java.time.Instant;
import java.util.ArrayList;
import java.util.Comparator;
import java.util.HashMap;
import java.util.List;
import java.util.Map;
import java.util.Optional;
import roundwright.scheduling.model.Group;
import roundwright.scheduling.model.Plan;
import roundwright.scheduling.model.Role;

/**
 * What people were told: each person's commitments in a kept plan, in order of time, for the rules
 * to compare with where they now are. People no longer in the event are left out. Immutable.
 *
 * <p>Layout: by person; {@code key} is round times four plus kind, as of a board's commitments; a
 * round or hall that the event no longer has gets an index of its own beyond those it has.
 */
public final class KeptDays {
  /** A commitment whose start and end are no further apart than this, each, is the same one. */
  public static final int MOST_APART_MINUTES = 5;

  public final int[][] key;
  public final int[][] hall;
  public final int[][] start;
  public final int[][] end;

  /** What starts before this minute can no longer be changed; {@link Problem#NEVER} for nothing. */
  public final int pastBefore;

  private record Told(int key, int hall, int start, int end) {
    private static final Comparator<Told> IN_TIME =
        Comparator.comparingInt(Told::start)
            .thenComparingInt(Told::end)
            .thenComparingInt(Told::hall)
            .thenComparingInt(Told::key);
  }

  public KeptDays(Problem problem, Plan plan, Optional<Instant> at) {
    pastBefore = at.map(KeptDays::firstMinuteFrom).orElse(Problem.NEVER);
    Map<String, Integer> people = indices(problem.personList.stream().map(p -> p.id()).toList());
    Map<String, Integer> rounds = indices(problem.roundList.stream().map(r -> r.id()).toList());
    Map<String, Integer> halls = indices(problem.hallList.stream().map(h -> h.id()).toList());
    List<List<Told>> told = new ArrayList<>();
    people.forEach((id, index) -> told.add(new ArrayList<>()));
    for (Group group : plan.groups()) {
      int round = rounds.computeIfAbsent(group.round(), id -> rounds.size());
      int in = halls.computeIfAbsent(group.hall(), id -> halls.size());
      int from = LocalClock.epochMinute(group.start());
      int to = LocalClock.epochMinute(group.end());
      note(told, people, group.competitors(), new Told(round << 2 | Problem.SOLVING, in, from, to));
      for (Role role : Role.values()) {
        int kind = Problem.role(role);
        note(told, people, group.crew().in(role), new Told(round << 2 | kind, in, from, to));
      }
    }
    key = new int[people.size()][];
    hall = new int[people.size()][];
    start = new int[people.size()][];
    end = new int[people.size()][];
    for (int p = 0; p < key.length; p++) {
      List<Told> own = told.get(p);
      own.sort(Told.IN_TIME);
      key[p] = own.stream().mapToInt(Told::key).toArray();
      hall[p] = own.stream().mapToInt(Told::hall).toArray();
      start[p] = own.stream().mapToInt(Told::start).toArray();
      end[p] = own.stream().mapToInt(Told::end).toArray();
    }
  }

  private static int firstMinuteFrom(Instant at) {
    return Math.toIntExact(-Math.floorDiv(-at.getEpochSecond(), 60L));
  }

  private static Map<String, Integer> indices(List<String> ids) {
    Map<String, Integer> indices = new HashMap<>();
    ids.forEach(id -> indices.put(id, indices.size()));
    return indices;
  }

  private static void note(
      List<List<Told>> told, Map<String, Integer> people, List<String> ids, Told one) {
    for (String id : ids) {
      if (people.containsKey(id)) {
        told.get(people.get(id)).add(one);
      }
    }
  }
}
