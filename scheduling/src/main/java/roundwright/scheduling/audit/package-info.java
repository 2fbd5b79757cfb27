/**
 * The price of any plan, from the records alone: naive on purpose, so that it can be read beside
 * the page of rules and judge the engine. It knows {@code model} and {@code cost} and nothing else,
 * and what the engine computes too (least time, entrants) it computes anew.
 */
package roundwright.scheduling.audit;
