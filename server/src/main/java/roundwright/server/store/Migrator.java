package roundwright.server.store;

import javax.sql.DataSource;
import org.flywaydb.core.Flyway;

/** Brings a database to the newest of the numbered scripts in {@code db/migrations}. */
final class Migrator {
  private Migrator() {}

  static void migrate(DataSource connections) {
    Flyway.configure(Migrator.class.getClassLoader())
        .dataSource(connections)
        .locations("classpath:db/migrations")
        .load()
        .migrate();
  }
}
