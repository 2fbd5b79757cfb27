/**
 * The rules, one class each: each prices one row (a person's commitments, a group, or the day plan
 * itself) and is asked for the same row when the price is explained; the book of all of them, and
 * the ledger that keeps a board's price through moves. It knows the core and the names of rules.
 */
package roundwright.scheduling.rules;
