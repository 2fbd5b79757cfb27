package roundwright.scheduling.model;

import java.util.List;
import java.util.OptionalInt;
import java.util.SortedSet;
import java.util.TreeSet;

/**
 * A room with solving stations.
 *
 * @param open merged windows in which groups may be there
 * @param occupancy people allowed by whoever licenses the venue, where known
 * @param features words such as {@code quiet} that a discipline may need
 */
public record Hall(
    String id,
    String name,
    int stations,
    List<Window> open,
    OptionalInt occupancy,
    SortedSet<String> features) {
  public Hall {
    open = Window.merged(open);
    features = java.util.Collections.unmodifiableSortedSet(new TreeSet<>(features));
  }
}
