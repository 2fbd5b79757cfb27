package roundwright.server.command;

import java.io.Console;
import java.io.PrintWriter;
import java.util.Locale;
import java.util.concurrent.atomic.AtomicBoolean;
import roundwright.scheduling.Progress;

/**
 * Follows a search for somebody at a terminal, on one line that is written again and again, or for
 * a pipe, on a plain line now and then. May be stopped from another thread.
 */
final class ProgressLines implements Progress {
  private static final double SECONDS_BETWEEN_LINES = 2;
  private static final int LONGEST_LINE = 100;

  private final PrintWriter out;
  private final boolean rewriting;
  private final AtomicBoolean stopWanted = new AtomicBoolean();
  private String last = "";
  private double lastSeconds = Double.NEGATIVE_INFINITY;
  private long steps;
  private double elapsedSeconds;

  /**
   * @param rewriting whether the same line is written again, as terminals can
   */
  ProgressLines(PrintWriter out, boolean rewriting) {
    this.out = out;
    this.rewriting = rewriting;
  }

  /** Whether this process talks to a terminal and not to a pipe or a file. */
  @SuppressWarnings("SystemConsoleNull") // no console means no terminal, on every version
  static boolean isTerminal() {
    Console console = System.console();
    if (console == null) {
      return false;
    }
    try {
      return (Boolean) Console.class.getMethod("isTerminal").invoke(console);
    } catch (ReflectiveOperationException before22) {
      return true;
    }
  }

  void stop() {
    stopWanted.set(true);
  }

  @Override
  public boolean stopWanted() {
    return stopWanted.get();
  }

  @Override
  public synchronized void report(Report report) {
    steps = Math.max(steps, report.steps());
    elapsedSeconds = report.elapsedSeconds();
    String says = line(report);
    if (rewriting) {
      out.print("\r" + padded(says, last.length()));
      out.flush();
      last = says;
    } else if (report.elapsedSeconds() - lastSeconds >= SECONDS_BETWEEN_LINES) {
      out.println(says);
      out.flush();
      lastSeconds = report.elapsedSeconds();
    }
  }

  /** Leaves the rewritten line behind, so that what follows stands on its own. */
  synchronized void finish() {
    if (rewriting && !last.isEmpty()) {
      out.print("\r" + " ".repeat(last.length()) + "\r");
      out.flush();
      last = "";
    }
  }

  synchronized long steps() {
    return steps;
  }

  synchronized double elapsedSeconds() {
    return elapsedSeconds;
  }

  private static String padded(String text, int length) {
    return text + " ".repeat(Math.max(0, length - text.length()));
  }

  private static String line(Report report) {
    String stage = report.stage().name().toLowerCase(Locale.ROOT).replace('_', ' ');
    String says =
        String.format(
            Locale.ROOT, "%6.1f s  %-10s  %s", report.elapsedSeconds(), stage, report.best());
    if (!report.stillWrong().isEmpty()) {
      says += "; still wrong: " + String.join(", ", report.stillWrong());
    }
    return says.length() <= LONGEST_LINE ? says : says.substring(0, LONGEST_LINE - 3) + "...";
  }
}
