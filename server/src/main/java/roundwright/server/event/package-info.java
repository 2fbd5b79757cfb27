/**
 * An event as a whole: brought in from an event file, given out as one, and read as the engine's
 * records. It knows the store and the shared view records, and of the engine its files and model.
 */
package roundwright.server.event;
