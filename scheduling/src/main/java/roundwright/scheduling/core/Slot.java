package roundwright.scheduling.core;

/**
 * A group's place in a day plan, before anybody is in it.
 *
 * @param number within the round, 1 and up
 * @param stations in use
 * @param start epoch minute
 * @param end epoch minute, later than {@code start}
 */
public record Slot(int round, int number, int hall, int stations, int start, int end) {}
