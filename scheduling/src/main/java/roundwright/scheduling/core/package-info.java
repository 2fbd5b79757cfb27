/**
 * The event as dense ints, a day plan laid out over it, and the board that says who is where, with
 * rows that give one person's commitments or one group at a time. It knows the model and no rule.
 */
package roundwright.scheduling.core;
