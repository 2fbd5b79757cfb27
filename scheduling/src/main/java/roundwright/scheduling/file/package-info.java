/**
 * Event files and plan files: JSON read into records and written back, with every problem of a file
 * told at once. It knows the records of {@code model} and is the only package that knows JSON.
 */
package roundwright.scheduling.file;
