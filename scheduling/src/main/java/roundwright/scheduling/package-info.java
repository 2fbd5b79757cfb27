/**
 * The door of the engine: what to plan, how much effort to spend, and how to follow and stop it.
 * Everything behind this door may be used here; nothing behind it knows the door.
 */
package roundwright.scheduling;
