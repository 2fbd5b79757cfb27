/**
 * How long groups will take and who will be in later rounds: the least time of a group, its closed
 * loop by mean-value analysis and by simulation, what another number of hands would do, and each
 * person's chance to go on. It knows {@code model}, and {@code cost} for its notices.
 */
package roundwright.scheduling.forecast;
