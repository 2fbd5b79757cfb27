package roundwright.server.store;

import com.zaxxer.hikari.HikariConfig;
import com.zaxxer.hikari.HikariDataSource;
import java.sql.Connection;
import java.sql.SQLException;
import java.time.Clock;
import java.time.temporal.ChronoUnit;
import java.util.function.Consumer;
import java.util.function.Function;
import javax.sql.DataSource;
import org.jooq.DSLContext;
import org.jooq.SQLDialect;
import org.jooq.exception.DataAccessException;
import org.jooq.impl.DSL;

/**
 * The one database, H2 or PostgreSQL. All access is by {@link #read} and {@link #write}: one
 * function, one transaction.
 */
public final class Database implements AutoCloseable {
  private static final int CONNECTIONS = 10;
  private static final int TRIES = 3;
  private static final String SERIALIZATION_FAILURE = "40001";

  static {
    // jOOQ greets in the log otherwise.
    System.setProperty("org.jooq.no-logo", "true");
    System.setProperty("org.jooq.no-tips", "true");
  }

  private final HikariDataSource pool;
  private final SQLDialect dialect;
  private final Clock clock;

  private Database(HikariDataSource pool, SQLDialect dialect, Clock clock) {
    this.pool = pool;
    this.dialect = dialect;
    this.clock = clock;
  }

  /**
   * Opens the database and brings it up to date.
   *
   * @throws IllegalStateException with a plain sentence where it cannot be opened
   */
  public static Database open(String url, String user, String password, Clock clock) {
    HikariConfig config = new HikariConfig();
    config.setJdbcUrl(url);
    config.setUsername(user);
    config.setPassword(password);
    config.setMaximumPoolSize(CONNECTIONS);
    config.setMinimumIdle(1);
    config.setAutoCommit(false);
    config.setPoolName("database");
    HikariDataSource pool;
    try {
      pool = new HikariDataSource(config);
    } catch (RuntimeException e) {
      throw new IllegalStateException(
          "The database "
              + url.replaceAll("[;?].*", "")
              + " cannot be opened: is another server using it, and may this one write there?",
          e);
    }
    Migrator.migrate(pool);
    SQLDialect dialect = url.startsWith("jdbc:postgresql:") ? SQLDialect.POSTGRES : SQLDialect.H2;
    return new Database(pool, dialect, clock);
  }

  /** Looks at one consistent state of the database. */
  public <T> T read(Function<Tx, T> reading) {
    return inTransaction(reading, true);
  }

  /** Changes the database, wholly or not at all; may be run again where two changes collide. */
  public <T> T write(Function<Tx, T> writing) {
    for (int attempt = 1; ; attempt++) {
      try {
        return inTransaction(writing, false);
      } catch (DataAccessException e) {
        if (attempt == TRIES || !SERIALIZATION_FAILURE.equals(e.sqlState())) {
          throw e;
        }
      }
    }
  }

  /** The same for changes that give nothing back. */
  public void change(Consumer<Tx> writing) {
    write(
        tx -> {
          writing.accept(tx);
          return true;
        });
  }

  private <T> T inTransaction(Function<Tx, T> work, boolean reading) {
    try (Connection connection = pool.getConnection()) {
      if (reading) {
        connection.setReadOnly(true);
        connection.setTransactionIsolation(Connection.TRANSACTION_REPEATABLE_READ);
      }
      DSLContext sql = DSL.using(connection, dialect);
      boolean done = false;
      try {
        T outcome = work.apply(new Tx(sql, clock.instant().truncatedTo(ChronoUnit.MICROS)));
        connection.commit();
        done = true;
        return outcome;
      } finally {
        if (!done) {
          connection.rollback();
        }
      }
    } catch (SQLException e) {
      throw new IllegalStateException("The database does not answer", e);
    }
  }

  /** For whoever needs connections of its own, such as tests that look behind the features. */
  public DataSource connections() {
    return pool;
  }

  @Override
  public void close() {
    pool.close();
  }
}
