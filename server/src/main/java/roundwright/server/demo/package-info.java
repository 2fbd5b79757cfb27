/**
 * The demo event, brought in, planned and published through the features' own reads and writes. It
 * knows the features; nothing knows it but the command line.
 */
package roundwright.server.demo;
