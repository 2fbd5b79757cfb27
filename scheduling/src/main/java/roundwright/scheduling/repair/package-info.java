/**
 * Keeps a plan that people have been told and changes as little of it as an event that is no longer
 * the same allows: the day plan first, then groups and crews. It knows the board, the rules, and
 * how crewing fills what is empty.
 */
package roundwright.scheduling.repair;
