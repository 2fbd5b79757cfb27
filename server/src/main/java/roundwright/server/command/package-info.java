/**
 * The command line. It knows the engine and the server as a whole, and nothing of any feature's
 * inside.
 */
package roundwright.server.command;
