package roundwright.server.ids;

/** An event's row. */
public record EventId(long number) {}
