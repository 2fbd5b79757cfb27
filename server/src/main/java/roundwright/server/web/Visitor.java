package roundwright.server.web;

import java.time.ZoneId;
import java.util.Optional;
import roundwright.server.ids.AccountId;
import roundwright.server.ids.EventId;
import roundwright.server.ids.PersonId;

/**
 * Who is behind a request, and the event it is about.
 *
 * @param event that of the path, where there is such a one
 * @param organiser of that event
 * @param person that of the path, where the browser holds their personal link
 */
public record Visitor(
    Optional<Account> account,
    Optional<EventName> event,
    boolean organiser,
    Optional<PersonId> person) {
  public static final Visitor NOBODY =
      new Visitor(Optional.empty(), Optional.empty(), false, Optional.empty());

  /** An account that has signed in. */
  public record Account(AccountId id, String name, boolean host) {}

  /** What every page of an event says of it. */
  public record EventName(EventId id, String slug, String name, ZoneId zone) {}

  /**
   * The account behind a route that asks for one.
   *
   * @throws IllegalStateException where the route table let somebody else through
   */
  public AccountId accountId() {
    return account
        .map(Account::id)
        .orElseThrow(() -> new IllegalStateException("A route needs a role that implies sign-in"));
  }

  /**
   * The event of a route with an {@code {event}} in its path.
   *
   * @throws IllegalStateException where the path has none
   */
  public EventId eventId() {
    return eventName().id();
  }

  public EventName eventName() {
    return event.orElseThrow(() -> new IllegalStateException("The route has no {event} in it"));
  }
}
