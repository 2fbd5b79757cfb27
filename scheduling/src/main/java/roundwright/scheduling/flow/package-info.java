/**
 * Transportation and assignment by shortest augmenting paths, with dual prices as proof of what is
 * least. It knows numbers only, and no word of the trade.
 */
package roundwright.scheduling.flow;
