package roundwright.server.store;

import java.time.Instant;
import org.jooq.DSLContext;

/**
 * A transaction under way.
 *
 * @param now the moment at which it began, as exact as databases store it
 */
public record Tx(DSLContext sql, Instant now) {}
