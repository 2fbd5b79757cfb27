package roundwright.server.command;

import java.nio.file.Path;
import picocli.CommandLine.Option;
import roundwright.server.Settings;

/** Which database a command works on. */
final class DatabaseOptions {
  @Option(
      names = "--database",
      paramLabel = "FILE|URL",
      description =
          "File of the embedded database, or a jdbc:postgresql: address with user and password in"
              + " ROUNDWRIGHT_DATABASE_USER and ROUNDWRIGHT_DATABASE_PASSWORD (default:"
              + " ${DEFAULT-VALUE}).",
      defaultValue = "roundwright")
  private String database;

  String url() {
    return database.startsWith("jdbc:") ? database : Settings.h2Url(Path.of(database));
  }

  String user() {
    return environment("ROUNDWRIGHT_DATABASE_USER", "sa");
  }

  String password() {
    return environment("ROUNDWRIGHT_DATABASE_PASSWORD", "");
  }

  private static String environment(String name, String otherwise) {
    String set = System.getenv(name);
    return set == null ? otherwise : set;
  }
}
