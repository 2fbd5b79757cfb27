/**
 * The web server as a whole: where it starts, what it is told, and the one table of all its routes.
 * It knows every feature; nothing knows it but the command line.
 */
package roundwright.server;
