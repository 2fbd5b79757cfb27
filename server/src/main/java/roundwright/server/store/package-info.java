/**
 * The database: opening, migrating, transactions, the journal of numbered changes and the audit
 * trail. It knows SQL and ids, and nothing of HTTP.
 */
package roundwright.server.store;
