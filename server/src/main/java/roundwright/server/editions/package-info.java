/**
 * What has been published, as everybody sees it: schedule, look-up, a person's day, boards. The one
 * owner of "a person's day".
 */
package roundwright.server.editions;
