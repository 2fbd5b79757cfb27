/**
 * The one reading of a plan's tables as tickets and lanes, for every feature that shows some. It
 * knows the store and the view records of the web.
 */
package roundwright.server.ticket;
