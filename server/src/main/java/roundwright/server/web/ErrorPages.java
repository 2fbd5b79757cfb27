package roundwright.server.web;

import io.javalin.config.RoutesConfig;
import io.javalin.http.Context;
import io.javalin.http.HttpResponseException;
import io.javalin.http.HttpStatus;
import io.javalin.http.MethodNotAllowedResponse;
import java.util.Set;
import org.slf4j.Logger;
import org.slf4j.LoggerFactory;
import roundwright.server.store.Missing;
import roundwright.server.store.StaleVersion;

/**
 * The pages that say what went wrong, with a reference under which the server's log tells the rest;
 * never a trace.
 */
public final class ErrorPages {
  private static final Logger LOG = LoggerFactory.getLogger(ErrorPages.class);
  private static final Set<Integer> WITH_OWN_WORDS = Set.of(400, 403, 404, 405, 409, 413, 429, 503);

  private final Html html;

  public ErrorPages(Html html) {
    this.html = html;
  }

  public void register(RoutesConfig routes) {
    routes.exception(HttpResponseException.class, this::refused);
    routes.exception(Missing.class, (e, ctx) -> show(ctx, HttpStatus.NOT_FOUND.getCode(), ""));
    routes.exception(StaleVersion.class, (e, ctx) -> show(ctx, HttpStatus.CONFLICT.getCode(), ""));
    routes.exception(Exception.class, this::failed);
  }

  private void refused(HttpResponseException e, Context ctx) {
    if (e instanceof MethodNotAllowedResponse) {
      String allowed = e.getDetails().get("availableMethods");
      if (allowed != null) {
        ctx.header("Allow", allowed);
      }
    }
    show(ctx, e.getStatus(), "");
  }

  private void failed(Exception e, Context ctx) {
    String reference = Tokens.draw().substring(0, 8);
    LOG.error("Reference {}: {} {} failed", reference, ctx.method(), logged(ctx.path()), e);
    show(ctx, HttpStatus.INTERNAL_SERVER_ERROR.getCode(), reference);
  }

  /** A path fit for one line of a log: no new lines, no personal link. */
  static String logged(String path) {
    return path.replaceAll("\\p{Cntrl}", " ").replaceAll("(/(?:link|setup)/)[^/]+", "$1***");
  }

  private void show(Context ctx, int status, String reference) {
    String words = WITH_OWN_WORDS.contains(status) ? String.valueOf(status) : "500";
    try {
      html.show(
          ctx,
          View.of("layout/error")
              .with("words", words)
              .with("reference", reference)
              .orFragment("trouble"));
    } catch (RuntimeException e) {
      LOG.error("The error page itself failed", e);
      ctx.contentType("text/plain; charset=utf-8").result(status + " " + reference);
    }
    ctx.status(status);
    ctx.header("Cache-Control", "no-store");
  }
}
