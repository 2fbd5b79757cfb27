package roundwright.server.ids;

/** An account's row. */
public record AccountId(long number) {}
