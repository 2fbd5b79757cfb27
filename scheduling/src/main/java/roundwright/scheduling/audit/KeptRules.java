package roundwright.scheduling.audit;

import java.time.Instant;
import java.util.List;
import java.util.Map;
import java.util.stream.Stream;

/** Rules that hold a plan to a kept one; without a kept plan they find nothing. */
final class KeptRules {
  private KeptRules() {}

  /** 1 for each commitment without a partner, of either plan, that starts before the moment. */
  static void pastChanged(Case given, Notes notes) {
    if (given.changes().isEmpty() || given.changes().get().at().isEmpty()) {
      return;
    }
    Instant at = given.changes().get().at().get();
    for (Changes.Change change : given.changes().get().all()) {
      Stream.concat(change.gone().stream(), change.fresh().stream())
          .filter(commitment -> commitment.start().isBefore(at))
          .forEach(
              commitment ->
                  notes.add(
                      1,
                      commitment.group(),
                      List.of(change.person()),
                      () ->
                          says(given, change)
                              + " This concerns "
                              + given.words().groupAndTime(commitment.group())
                              + ", which has begun."));
    }
  }

  /** Commitments without a partner; a moved one counts once. */
  static void changed(Case given, Notes notes) {
    if (given.changes().isEmpty()) {
      return;
    }
    for (Changes.Change change : given.changes().get().all()) {
      notes.add(change.count(), List.of(change.person()), () -> says(given, change));
    }
  }

  /** People whose commitments change. */
  static void told(Case given, Notes notes) {
    if (given.changes().isEmpty()) {
      return;
    }
    Map<String, List<Changes.Change>> byPerson = given.changes().get().byPerson();
    byPerson.forEach(
        (person, changes) ->
            notes.add(
                1,
                List.of(person),
                () ->
                    given.words().name(person)
                        + " must be told of "
                        + Wording.count(
                            changes.stream().mapToInt(Changes.Change::count).sum(), "change")
                        + "."));
  }

  private static String says(Case given, Changes.Change change) {
    String who = given.words().name(change.person()) + " " + Wording.doing(change.role()) + " in ";
    String round = given.words().round(change.round());
    if (change.gone().isEmpty()) {
      return who + spans(given, change.fresh(), round) + ", which is new.";
    }
    if (change.fresh().isEmpty()) {
      return who + round + " no more; it was " + spans(given, change.gone(), round) + ".";
    }
    return who
        + spans(given, change.fresh(), round)
        + " instead of "
        + spans(given, change.gone(), round)
        + ".";
  }

  private static String spans(Case given, List<Commitment> commitments, String round) {
    return String.join(
            " and ",
            commitments.stream()
                .map(
                    commitment ->
                        "group "
                            + commitment.group().number()
                            + " ("
                            + given.words().span(commitment.group())
                            + ")")
                .toList())
        + " of "
        + round;
  }
}
