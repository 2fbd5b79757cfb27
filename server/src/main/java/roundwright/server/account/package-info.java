/**
 * Accounts with passwords, their sessions, the first start's set-up link, and the personal links of
 * everybody else. It knows the web and the store.
 */
package roundwright.server.account;
