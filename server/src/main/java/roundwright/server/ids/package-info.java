/** Typed ids, so that no handler can mistake one number for another. It knows nothing. */
package roundwright.server.ids;
