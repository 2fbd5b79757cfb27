/**
 * The score of a plan and the names of the rules it is judged by. It knows nothing else, so that
 * every other package can speak of rules and levels with the same words.
 */
package roundwright.scheduling.cost;
