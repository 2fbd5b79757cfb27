package roundwright.server.web;

import io.javalin.http.Context;
import io.javalin.http.Cookie;
import io.javalin.http.SameSite;
import java.util.Optional;

/** Cookies that scripts cannot read and other sites cannot send along with a change. */
public final class Cookies {
  private final Address address;

  public Cookies(Address address) {
    this.address = address;
  }

  public Optional<String> read(Context ctx, String plainName) {
    return Optional.ofNullable(ctx.cookie(address.cookieName(plainName)))
        .filter(text -> !text.isBlank());
  }

  public void write(Context ctx, String plainName, String text, int seconds) {
    Cookie cookie = new Cookie(address.cookieName(plainName), text, "/", seconds);
    cookie.setSecure(address.secureCookies());
    cookie.setHttpOnly(true);
    cookie.setSameSite(SameSite.LAX);
    ctx.cookie(cookie);
  }

  public void remove(Context ctx, String plainName) {
    write(ctx, plainName, "", 0);
  }
}
