package roundwright.server;

import java.net.URI;
import java.nio.file.Path;
import java.util.Optional;
import roundwright.server.web.Address;

/**
 * What whoever hosts the server decides, once, at its start.
 *
 * @param host the address listened on; loopback unless said otherwise
 * @param port 0 lets the system choose a free one
 * @param publicAddress how browsers reach the server where a proxy stands before it
 * @param databaseUrl a JDBC address of H2 or PostgreSQL
 * @param devRoot the source folder from which templates and static files are read afresh each time
 * @param stopSeconds how long requests that are under way may take to end when the server stops
 * @param solveSeconds how long one search may take at most
 */
public record Settings(
    String host,
    int port,
    Optional<URI> publicAddress,
    String databaseUrl,
    String databaseUser,
    String databasePassword,
    Optional<Path> devRoot,
    int stopSeconds,
    int solveSeconds) {
  public static final String LOOPBACK = "127.0.0.1";
  public static final int DEFAULT_PORT = 7070;

  /** An embedded database in a file, reached from this machine only. */
  public static Settings local(Path databaseFile, int port) {
    return new Settings(
        LOOPBACK, port, Optional.empty(), h2Url(databaseFile), "sa", "", Optional.empty(), 5, 600);
  }

  public Settings withDevRoot(Path root) {
    return new Settings(
        host,
        port,
        publicAddress,
        databaseUrl,
        databaseUser,
        databasePassword,
        Optional.of(root),
        stopSeconds,
        solveSeconds);
  }

  /**
   * The address of an embedded database in a file. Its defaults lose about the last second of
   * acknowledged writes when the process is killed; these settings lose none.
   */
  public static String h2Url(Path databaseFile) {
    return "jdbc:h2:file:"
        + databaseFile.toAbsolutePath()
        + ";DATABASE_TO_LOWER=TRUE;WRITE_DELAY=0;DB_CLOSE_ON_EXIT=FALSE";
  }

  /** True where no other process can have the database open. */
  public boolean embedded() {
    return databaseUrl.startsWith("jdbc:h2:");
  }

  /** How browsers reach the server, as far as the settings tell. */
  public Address address() {
    return new Address(host, publicAddress);
  }
}
