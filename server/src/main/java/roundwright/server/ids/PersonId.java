package roundwright.server.ids;

/** A person of an event, by the id of the event file. */
public record PersonId(EventId event, String code) {}
