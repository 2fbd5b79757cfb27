package roundwright.scheduling.model;

/** The way between two venues, the same in both directions. */
public record Way(String oneVenue, String otherVenue, int minutes) {}
