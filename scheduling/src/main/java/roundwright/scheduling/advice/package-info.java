/**
 * Answers to an organiser's questions about an event or any plan for it: why, why not, who instead,
 * what breaks, how few people would do, whom to recruit, and what no plan can do. It knows the
 * board and the rules, flows, and the auditor, whom it asks what a change breaks.
 */
package roundwright.scheduling.advice;
