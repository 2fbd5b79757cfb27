package roundwright.server.web;

import io.javalin.http.Context;
import java.time.LocalDate;
import java.time.format.DateTimeParseException;
import java.util.Optional;

/** Reads what an address asks for; what makes no sense counts as not asked. */
public final class Query {
  private Query() {}

  public static Optional<LocalDate> day(Context ctx, String name) {
    try {
      return Optional.ofNullable(ctx.queryParam(name)).map(LocalDate::parse);
    } catch (DateTimeParseException notADay) {
      return Optional.empty();
    }
  }
}
