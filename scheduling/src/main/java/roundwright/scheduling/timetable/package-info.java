/**
 * Rounds to numbers of groups, halls and starts: the shapes a round can take, a serial decoder that
 * lays them out in order of priority, and annealing over the priorities. It knows the core and the
 * rules' prices.
 */
package roundwright.scheduling.timetable;
