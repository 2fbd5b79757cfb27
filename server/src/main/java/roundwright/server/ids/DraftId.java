package roundwright.server.ids;

/** A draft, by its number within its event: drafts of other events cannot be named. */
public record DraftId(EventId event, int number) {}
