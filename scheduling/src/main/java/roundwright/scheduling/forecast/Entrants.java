package roundwright.scheduling.forecast;

import java.math.BigDecimal;
import java.math.RoundingMode;
import java.util.ArrayList;
import java.util.Comparator;
import java.util.LinkedHashMap;
import java.util.List;
import java.util.Map;
import roundwright.scheduling.model.Event;
import roundwright.scheduling.model.Person;
import roundwright.scheduling.model.Round;

/**
 * Who will be in each round, as the event-file page defines it: those named, those entered, those
 * of the round that it continues, or the likely ones.
 */
public final class Entrants {
  private final Map<String, List<String>> idsByRound = new LinkedHashMap<>();
  private final Map<String, Boolean> likelyByRound = new LinkedHashMap<>();

  private Entrants() {}

  public static Entrants of(Event event) {
    Entrants entrants = new Entrants();
    List<Round> inOrder = new ArrayList<>(event.rounds());
    inOrder.sort(Comparator.comparingInt(Round::number));
    for (Round round : inOrder) {
      Map<String, BigDecimal> expected = expectedSeconds(event, round.discipline());
      Round before = null;
      for (Round other : event.rounds()) {
        if (other.discipline().equals(round.discipline()) && other.number() == round.number() - 1) {
          before = other;
        }
      }
      if (round.entrants().isPresent()) {
        entrants.put(round, round.entrants().get(), false);
      } else if (before == null) {
        entrants.put(round, List.copyOf(expected.keySet()), false);
      } else if (round.continues()) {
        entrants.put(round, entrants.ids(before.id()), entrants.areMerelyLikely(before.id()));
      } else {
        entrants.put(round, likely(before, entrants.ids(before.id()), expected), true);
      }
    }
    return entrants;
  }

  private static Map<String, BigDecimal> expectedSeconds(Event event, String discipline) {
    Map<String, BigDecimal> expected = new LinkedHashMap<>();
    for (Person person : event.people()) {
      for (Person.Entry entry : person.entries()) {
        if (entry.discipline().equals(discipline)) {
          expected.put(person.id(), entry.expectedSeconds());
        }
      }
    }
    return expected;
  }

  private static List<String> likely(
      Round former, List<String> entrants, Map<String, BigDecimal> expected) {
    List<String> sorted = new ArrayList<>(entrants);
    sorted.sort(
        Comparator.comparing((String id) -> expected.getOrDefault(id, LeastTime.STRANGER_SECONDS))
            .thenComparing(Comparator.naturalOrder()));
    int going = 0;
    if (former.advance().isPresent()) {
      Round.Advance advance = former.advance().get();
      if (advance instanceof Round.Advance.Count count) {
        going = count.people();
      } else if (advance instanceof Round.Advance.Percent percent) {
        BigDecimal exact =
            percent.percent().multiply(BigDecimal.valueOf(sorted.size())).movePointLeft(2);
        going = Math.max(1, exact.setScale(0, RoundingMode.FLOOR).intValueExact());
      } else if (advance instanceof Round.Advance.Under under) {
        while (going < sorted.size()
            && expected
                    .getOrDefault(sorted.get(going), LeastTime.STRANGER_SECONDS)
                    .compareTo(under.seconds())
                < 0) {
          going++;
        }
      }
    }
    return List.copyOf(sorted.subList(0, Math.min(going, sorted.size())));
  }

  private void put(Round round, List<String> ids, boolean likely) {
    idsByRound.put(round.id(), ids);
    likelyByRound.put(round.id(), likely);
  }

  /** Ids of the people in a round; for likely ones, the fastest first. */
  public List<String> ids(String round) {
    return idsByRound.get(round);
  }

  /** Whether a former round decides who is in this one, directly or through one it continues. */
  public boolean areMerelyLikely(String round) {
    return likelyByRound.get(round);
  }
}
