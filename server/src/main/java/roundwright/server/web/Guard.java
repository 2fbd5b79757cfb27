package roundwright.server.web;

import io.javalin.http.BadRequestResponse;
import io.javalin.http.Context;
import io.javalin.http.ForbiddenResponse;
import io.javalin.http.HandlerType;
import java.net.URI;
import java.security.MessageDigest;
import java.util.Arrays;
import java.util.Base64;
import java.util.Optional;
import java.util.Set;

/**
 * Headers on every answer, and the refusal of changes that another site's page sends. A change
 * needs a {@code Sec-Fetch-Site} or {@code Origin} that is ours, where the browser tells, and
 * always the form's token: a masked hash of a cookie that only this host can set or read.
 */
public final class Guard {
  /** The field of a form that carries its token. */
  public static final String TOKEN_FIELD = "token";

  public static final String CONTENT_POLICY =
      "default-src 'self'; object-src 'none'; base-uri 'none'; frame-ancestors 'none'";

  private static final String FORM_COOKIE = "rw-form";
  private static final int FORM_COOKIE_SECONDS = 7 * 24 * 3600;
  private static final int MASK_BYTES = 16;
  private static final Set<HandlerType> READING =
      Set.of(HandlerType.GET, HandlerType.HEAD, HandlerType.OPTIONS);

  private final Address address;
  private final Cookies cookies;

  public Guard(Address address, Cookies cookies) {
    this.address = address;
    this.cookies = cookies;
  }

  /** To be run before everything else. */
  public void check(Context ctx) {
    setHeaders(ctx);
    // Javalin would take this header's word for the method, past whatever looked at the real one.
    if (ctx.header("X-HTTP-Method-Override") != null) {
      throw new BadRequestResponse();
    }
    if (!READING.contains(ctx.method()) && !(ownPage(ctx) && tokenFits(ctx))) {
      throw new ForbiddenResponse();
    }
  }

  private void setHeaders(Context ctx) {
    ctx.header("Content-Security-Policy", CONTENT_POLICY);
    ctx.header("X-Content-Type-Options", "nosniff");
    ctx.header("Referrer-Policy", "no-referrer");
    ctx.header("Cross-Origin-Opener-Policy", "same-origin");
    if (address.encrypted()) {
      ctx.header("Strict-Transport-Security", "max-age=31536000");
    }
  }

  private boolean ownPage(Context ctx) {
    String site = ctx.header("Sec-Fetch-Site");
    if (site != null) {
      return site.equals("same-origin") || site.equals("none");
    }
    String origin = ctx.header("Origin");
    // Browsers write "null" under our own referrer policy; then the token alone decides.
    return origin == null || origin.equals("null") || origin.equals(ownOrigin(ctx));
  }

  private String ownOrigin(Context ctx) {
    return address
        .publicAddress()
        .map(uri -> uri.getScheme() + "://" + uri.getAuthority())
        .orElseGet(() -> URI.create(ctx.url()).getScheme() + "://" + ctx.host());
  }

  private boolean tokenFits(Context ctx) {
    String sent = ctx.formParam(TOKEN_FIELD);
    Optional<String> cookie = cookies.read(ctx, FORM_COOKIE);
    if (sent == null || cookie.isEmpty()) {
      return false;
    }
    try {
      byte[] masked = Base64.getUrlDecoder().decode(sent);
      if (masked.length != 2 * MASK_BYTES) {
        return false;
      }
      byte[] mask = Arrays.copyOf(masked, MASK_BYTES);
      byte[] secret = Arrays.copyOfRange(masked, MASK_BYTES, 2 * MASK_BYTES);
      return MessageDigest.isEqual(xor(secret, mask), secretOf(cookie.get()));
    } catch (IllegalArgumentException notBase64) {
      return false;
    }
  }

  /**
   * A token for the forms of the page now being made; gives the browser the cookie behind it where
   * it has none. Masked afresh each time, so that a compressed page gives nothing away.
   */
  public String formToken(Context ctx) {
    String known = ctx.attribute(FORM_COOKIE);
    String cookie =
        known != null ? known : cookies.read(ctx, FORM_COOKIE).orElseGet(() -> newCookie(ctx));
    ctx.attribute(FORM_COOKIE, cookie);
    byte[] mask = Tokens.random(MASK_BYTES);
    byte[] masked = Arrays.copyOf(mask, 2 * MASK_BYTES);
    System.arraycopy(xor(secretOf(cookie), mask), 0, masked, MASK_BYTES, MASK_BYTES);
    return Base64.getUrlEncoder().withoutPadding().encodeToString(masked);
  }

  private String newCookie(Context ctx) {
    String drawn = Tokens.draw();
    cookies.write(ctx, FORM_COOKIE, drawn, FORM_COOKIE_SECONDS);
    return drawn;
  }

  private static byte[] secretOf(String cookie) {
    return Arrays.copyOf(Tokens.sha256("form:" + cookie), MASK_BYTES);
  }

  private static byte[] xor(byte[] one, byte[] other) {
    byte[] mixed = new byte[MASK_BYTES];
    for (int i = 0; i < MASK_BYTES; i++) {
      mixed[i] = (byte) (one[i] ^ other[i]);
    }
    return mixed;
  }
}
