package roundwright.scheduling.audit;

import java.time.Duration;
import java.time.Instant;
import java.util.ArrayList;
import java.util.Arrays;
import java.util.Comparator;
import java.util.List;
import java.util.Map;
import java.util.Optional;
import java.util.Set;
import java.util.SortedMap;
import java.util.TreeMap;
import java.util.TreeSet;
import roundwright.scheduling.model.Group;
import roundwright.scheduling.model.Plan;
import roundwright.scheduling.model.Role;

/**
 * What a plan changes of a kept one: the commitments of either that find no partner in the other.
 */
final class Changes {
  private static final Duration MOST_APART = Duration.ofMinutes(5);

  private final List<Change> changes;
  private final Optional<Instant> at;

  private Changes(List<Change> changes, Optional<Instant> at) {
    this.changes = changes;
    this.at = at;
  }

  /** Whose commitments are compared: those of one person, round and role. */
  private record Key(String person, String round, Optional<Role> role) implements Comparable<Key> {
    private static final Comparator<Key> ORDER =
        Comparator.comparing(Key::person)
            .thenComparing(Key::round)
            .thenComparingInt(key -> key.role().map(Role::ordinal).orElse(-1));

    @Override
    public int compareTo(Key other) {
      return ORDER.compare(this, other);
    }
  }

  /**
   * Commitments of one person, round and role without a partner.
   *
   * @param gone those of the kept plan
   * @param fresh those of the new one
   */
  record Change(
      String person,
      String round,
      Optional<Role> role,
      List<Commitment> gone,
      List<Commitment> fresh) {
    /** A moved commitment counts once. */
    int count() {
      return Math.max(gone.size(), fresh.size());
    }
  }

  List<Change> all() {
    return changes;
  }

  /** What starts before this moment can no longer be changed. */
  Optional<Instant> at() {
    return at;
  }

  static Changes between(Directory event, Plan plan, Kept kept) {
    SortedMap<Key, List<Commitment>> old = commitments(event, kept.plan());
    SortedMap<Key, List<Commitment>> fresh = commitments(event, plan);
    Set<Key> keys = new TreeSet<>(old.keySet());
    keys.addAll(fresh.keySet());
    List<Change> changes = new ArrayList<>();
    for (Key key : keys) {
      List<Commitment> before = old.getOrDefault(key, List.of());
      List<Commitment> after = fresh.getOrDefault(key, List.of());
      int[] partners = partners(before, after);
      List<Commitment> unmatchedBefore = new ArrayList<>(before);
      List<Commitment> unmatchedAfter = new ArrayList<>();
      for (int i = 0; i < partners.length; i++) {
        if (partners[i] < 0) {
          unmatchedAfter.add(after.get(i));
        } else {
          unmatchedBefore.remove(before.get(partners[i]));
        }
      }
      if (!unmatchedBefore.isEmpty() || !unmatchedAfter.isEmpty()) {
        changes.add(
            new Change(key.person(), key.round(), key.role(), unmatchedBefore, unmatchedAfter));
      }
    }
    return new Changes(changes, kept.at());
  }

  /** The commitments of those who are still in the event. */
  private static SortedMap<Key, List<Commitment>> commitments(Directory event, Plan plan) {
    SortedMap<Key, List<Commitment>> commitments = new TreeMap<>();
    for (Group group : plan.groups()) {
      Book.eachListing(
          group,
          (person, role) -> {
            if (event.hasPerson(person)) {
              commitments
                  .computeIfAbsent(new Key(person, group.round(), role), key -> new ArrayList<>())
                  .add(new Commitment(person, group, role));
            }
          });
    }
    commitments.values().forEach(list -> list.sort(Commitment.IN_TIME));
    return commitments;
  }

  /** For each commitment after, the index of its partner before, or -1; as many as possible. */
  private static int[] partners(List<Commitment> before, List<Commitment> after) {
    int[] partnerOfAfter = new int[after.size()];
    Arrays.fill(partnerOfAfter, -1);
    for (int i = 0; i < before.size(); i++) {
      findPartner(before, after, i, partnerOfAfter, new boolean[after.size()]);
    }
    return partnerOfAfter;
  }

  /** One augmenting path of the bipartite matching (Kuhn 1955). */
  private static boolean findPartner(
      List<Commitment> before,
      List<Commitment> after,
      int index,
      int[] partnerOfAfter,
      boolean[] tried) {
    for (int j = 0; j < after.size(); j++) {
      if (!tried[j] && areAlike(before.get(index), after.get(j))) {
        tried[j] = true;
        if (partnerOfAfter[j] < 0
            || findPartner(before, after, partnerOfAfter[j], partnerOfAfter, tried)) {
          partnerOfAfter[j] = index;
          return true;
        }
      }
    }
    return false;
  }

  private static boolean areAlike(Commitment one, Commitment other) {
    return one.hall().equals(other.hall())
        && isNear(one.start(), other.start())
        && isNear(one.end(), other.end());
  }

  private static boolean isNear(Instant one, Instant other) {
    return Duration.between(one, other).abs().compareTo(MOST_APART) <= 0;
  }

  /** The changes of each person, by id. */
  Map<String, List<Change>> byPerson() {
    SortedMap<String, List<Change>> byPerson = new TreeMap<>();
    for (Change change : changes) {
      byPerson.computeIfAbsent(change.person(), person -> new ArrayList<>()).add(change);
    }
    return byPerson;
  }
}
