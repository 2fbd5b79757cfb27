package roundwright.scheduling.rules;

import java.util.Arrays;
import java.util.Comparator;
import java.util.LinkedHashMap;
import java.util.List;
import java.util.Map;
import java.util.stream.IntStream;
import roundwright.scheduling.core.Frame;
import roundwright.scheduling.core.LocalClock;
import roundwright.scheduling.core.Problem;
import roundwright.scheduling.cost.RuleName;
import roundwright.scheduling.model.Pins;
import roundwright.scheduling.model.Round;

/** The rules over the day plan alone. */
final class FrameRules {
  private FrameRules() {}

  /**
   * @param anyNumbers with a kept plan groups keep their numbers, whatever their order now is
   */
  static List<FrameRule> breaches(boolean anyNumbers) {
    return List.of(
        new HallClash(),
        new HallClosed(),
        new HallUnsuited(),
        new RoundOrder(),
        new RoundWindow(),
        new OffGrid(),
        new WrongCount(anyNumbers),
        new PinMoved());
  }

  static List<FrameRule> strains(Problem problem) {
    return List.of(
        new ExtraGroup(Weights.millionths(problem, RuleName.EXTRA_GROUP)),
        new LateFinish(Weights.millionths(problem, RuleName.LATE_FINISH)));
  }

  /** Minutes by which a group starts before its hall is free again. */
  record HallClash() implements FrameRule {
    @Override
    public RuleName name() {
      return RuleName.HALL_CLASH;
    }

    @Override
    public long price(Frame frame) {
      int setup = frame.problem.event.rules().setupMinutes();
      int[] latestEnd = new int[frame.problem.halls];
      Arrays.fill(latestEnd, Problem.NEVER);
      long found = 0;
      for (int g : inOrderOfStart(frame)) {
        int hall = frame.hall[g];
        found += Weights.startedFives(latestEnd[hall] + setup - frame.start[g]);
        latestEnd[hall] = Math.max(latestEnd[hall], frame.end[g]);
      }
      return found;
    }
  }

  /** Groups by start, then hall, then number; the frame's own order puts the end before both. */
  private static int[] inOrderOfStart(Frame frame) {
    return IntStream.range(0, frame.groups)
        .boxed()
        .sorted(
            Comparator.comparingInt((Integer g) -> frame.start[g])
                .thenComparingInt(g -> frame.hall[g])
                .thenComparingInt(g -> frame.number[g]))
        .mapToInt(Integer::intValue)
        .toArray();
  }

  /** A group's minutes while its hall is closed or kept by a fixed point. */
  record HallClosed() implements FrameRule {
    @Override
    public RuleName name() {
      return RuleName.HALL_CLOSED;
    }

    @Override
    public long price(Frame frame) {
      long found = 0;
      for (int g = 0; g < frame.groups; g++) {
        int[] from = frame.problem.hallFreeFrom[frame.hall[g]];
        int[] to = frame.problem.hallFreeTo[frame.hall[g]];
        int inside = 0;
        for (int i = 0; i < from.length; i++) {
          inside += Math.max(0, Math.min(frame.end[g], to[i]) - Math.max(frame.start[g], from[i]));
        }
        found += Weights.startedFives(frame.end[g] - frame.start[g] - inside);
      }
      return found;
    }
  }

  /** One for each group in a hall that is not for it. */
  record HallUnsuited() implements FrameRule {
    @Override
    public RuleName name() {
      return RuleName.HALL_UNSUITED;
    }

    @Override
    public long price(Frame frame) {
      return IntStream.range(0, frame.groups)
          .filter(g -> !frame.problem.suits[frame.round[g]][frame.hall[g]])
          .count();
    }
  }

  /** Minutes by which a round begins before the round before it and the turnaround are over. */
  record RoundOrder() implements FrameRule {
    @Override
    public RuleName name() {
      return RuleName.ROUND_ORDER;
    }

    @Override
    public long price(Frame frame) {
      int turnaround = frame.problem.event.rules().turnaroundMinutes();
      long found = 0;
      for (int r = 0; r < frame.problem.rounds; r++) {
        int before = frame.problem.roundBefore[r];
        if (before >= 0 && frame.groupsOf[r].length > 0 && frame.groupsOf[before].length > 0) {
          int ready = Arrays.stream(frame.groupsOf[before]).map(g -> frame.end[g]).max().getAsInt();
          int first = Arrays.stream(frame.groupsOf[r]).map(g -> frame.start[g]).min().getAsInt();
          found += Weights.startedFives(ready + turnaround - first);
        }
      }
      return found;
    }
  }

  /** Minutes by which groups pass their round's window. */
  record RoundWindow() implements FrameRule {
    @Override
    public RuleName name() {
      return RuleName.ROUND_WINDOW;
    }

    @Override
    public long price(Frame frame) {
      long found = 0;
      for (int g = 0; g < frame.groups; g++) {
        int round = frame.round[g];
        found += Weights.startedFives(frame.problem.notBefore[round] - frame.start[g]);
        found += Weights.startedFives(frame.end[g] - frame.problem.notAfter[round]);
      }
      return found;
    }
  }

  /** One for each group whose start is off the grid, but for those pinned to theirs. */
  record OffGrid() implements FrameRule {
    @Override
    public RuleName name() {
      return RuleName.OFF_GRID;
    }

    @Override
    public long price(Frame frame) {
      long found = 0;
      for (int g = 0; g < frame.groups; g++) {
        LocalClock clock = frame.problem.hallClock[frame.hall[g]];
        if (clock.minuteOfDay(frame.start[g]) % frame.problem.grid() != 0
            && !startPinned(frame, g)) {
          found++;
        }
      }
      return found;
    }

    private static boolean startPinned(Frame frame, int group) {
      String round = frame.problem.roundList.get(frame.round[group]).id();
      return frame.problem.pins().groups().stream()
          .anyMatch(
              pin ->
                  pin.round().equals(round)
                      && pin.number() == frame.number[group]
                      && pin.start().isPresent());
    }
  }

  /**
   * One for each round with another number of groups than it must have, or numbered out of order.
   */
  record WrongCount(boolean anyNumbers) implements FrameRule {
    @Override
    public RuleName name() {
      return RuleName.WRONG_COUNT;
    }

    @Override
    public long price(Frame frame) {
      return IntStream.range(0, frame.problem.rounds).filter(r -> wrong(frame, r)).count();
    }

    private boolean wrong(Frame frame, int round) {
      Round given = frame.problem.roundList.get(round);
      int[] groups = frame.groupsOf[round];
      if (given.groups().isPresent() && given.groups().getAsInt() != groups.length) {
        return true;
      }
      if (groups.length == 0) {
        return frame.problem.entrants(round) > 0;
      }
      boolean split = groups.length > 1 && frame.problem.mustBeWhole(round);
      boolean misnumbered =
          anyNumbers
              ? IntStream.of(groups).map(g -> frame.number[g]).distinct().count() < groups.length
              : IntStream.range(0, groups.length).anyMatch(i -> frame.number[groups[i]] != i + 1);
      return split || misnumbered;
    }
  }

  /** One for each pin that names a group, hall or start the day plan does not have. */
  record PinMoved() implements FrameRule {
    @Override
    public RuleName name() {
      return RuleName.PIN_MOVED;
    }

    @Override
    public long price(Frame frame) {
      Problem problem = frame.problem;
      Pins pins = problem.pins();
      long moved = pins.groups().stream().filter(pin -> !kept(frame, pin)).count();
      for (Pins.CompetitorPin pin : pins.competitors()) {
        int round = problem.round(pin.round());
        int seat = problem.seatOf(problem.person(pin.person()), round);
        int group = frame.group(round, pin.number());
        moved += seat < 0 || group < 0 || frame.seatPin[seat] != group ? 1 : 0;
      }
      for (Pins.DutyPin pin : pins.duties()) {
        moved += frame.group(problem.round(pin.round()), pin.number()) < 0 ? 1 : 0;
      }
      return moved;
    }

    private static boolean kept(Frame frame, Pins.GroupPin pin) {
      int group = frame.group(frame.problem.round(pin.round()), pin.number());
      return group >= 0
          && pin.hall().map(id -> frame.problem.hall(id) == frame.hall[group]).orElse(true)
          && pin.start()
              .map(start -> LocalClock.epochMinute(start) == frame.start[group])
              .orElse(true);
    }
  }

  /** One for each group beyond the fewest that the largest suitable hall allows. */
  record ExtraGroup(long weight) implements FrameRule {
    @Override
    public RuleName name() {
      return RuleName.EXTRA_GROUP;
    }

    @Override
    public long price(Frame frame) {
      long extra = 0;
      for (int r = 0; r < frame.problem.rounds; r++) {
        int largest = frame.problem.largestCapacity(r);
        if (frame.problem.roundList.get(r).groups().isEmpty() && largest > 0) {
          int fewest = (frame.problem.entrants(r) + largest - 1) / largest;
          extra += Math.max(0, frame.groupsOf[r].length - fewest);
        }
      }
      return extra * weight;
    }
  }

  /** Minutes from the first start to the last end, by venue and date there. */
  record LateFinish(long weight) implements FrameRule {
    @Override
    public RuleName name() {
      return RuleName.LATE_FINISH;
    }

    @Override
    public long price(Frame frame) {
      Map<Long, int[]> spans = new LinkedHashMap<>();
      for (int g : inOrderOfStart(frame)) {
        long venueDay = ((long) frame.problem.hallVenue[frame.hall[g]] << 32) + frame.date[g];
        int[] span =
            spans.computeIfAbsent(venueDay, first -> new int[] {frame.start[g], frame.end[g]});
        span[1] = Math.max(span[1], frame.end[g]);
      }
      return spans.values().stream().mapToLong(span -> span[1] - span[0]).sum() * weight;
    }
  }
}
