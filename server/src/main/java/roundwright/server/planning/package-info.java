/** The organiser's day plan and crews: drafts, searches, publishing. */
package roundwright.server.planning;
