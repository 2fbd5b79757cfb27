/**
 * How long groups will take and who will be in later rounds: the least time of a group, and the
 * closed loop of stations, scramblers and runners by mean-value analysis. It knows {@code model}.
 */
package roundwright.scheduling.forecast;
