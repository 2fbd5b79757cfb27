package roundwright.server.event;

import io.javalin.http.Context;
import roundwright.server.store.Database;
import roundwright.server.web.Access;
import roundwright.server.web.Visitor.EventName;

/** The event as a file. */
public final class EventRoutes {
  private final Database database;

  public EventRoutes(Database database) {
    this.database = database;
  }

  /** GET /events/{event}/event.json: the event file, as it would be brought in again. */
  public void export(Context ctx) {
    EventName event = Access.visitor(ctx).eventName();
    String json = database.read(tx -> EventReads.file(tx, event.id()).json());
    ctx.contentType("application/json; charset=utf-8");
    ctx.header("Content-Disposition", "attachment; filename=\"" + event.slug() + ".json\"");
    ctx.result(json);
  }
}
