package roundwright.server;

import roundwright.server.command.Roundwright;

/** Where the jar starts. */
public final class Main {
  private Main() {}

  public static void main(String[] arguments) {
    System.exit(Roundwright.commandLine().execute(arguments));
  }
}
