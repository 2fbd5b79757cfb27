/**
 * An event as its organiser describes it and a plan as the engine decides it, as plain records. It
 * knows only the names of rules and scores, and holds no behaviour beyond looking itself up.
 */
package roundwright.scheduling.model;
