/**
 * Competitors to groups and people to duties, over a given day plan: a first arrangement by exact
 * flow, exact polish of one moment or one round at a time, and annealing over both together. It
 * knows the rules' prices and the flow.
 */
package roundwright.scheduling.crewing;
