/**
 * How far a finished plan can be from the best: lower bounds on its strain, each proved by a
 * relaxation. It knows the board, the rules and flows, and nothing of the search.
 */
package roundwright.scheduling.bounds;
