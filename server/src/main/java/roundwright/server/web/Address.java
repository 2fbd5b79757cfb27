package roundwright.server.web;

import java.net.URI;
import java.util.Optional;
import java.util.Set;

/**
 * Where browsers find the server, and whether the way there is encrypted.
 *
 * @param host the address listened on
 * @param publicAddress scheme, host and port as browsers see them, where a proxy stands before us
 */
public record Address(String host, Optional<URI> publicAddress) {
  private static final Set<String> LOOPBACK =
      Set.of("127.0.0.1", "::1", "0:0:0:0:0:0:0:1", "localhost");

  /** True unless everything happens on this one machine: only there may cookies go unencrypted. */
  public boolean secureCookies() {
    return publicAddress
        .map(address -> "https".equals(address.getScheme()))
        .orElse(!LOOPBACK.contains(host));
  }

  public boolean encrypted() {
    return publicAddress.map(address -> "https".equals(address.getScheme())).orElse(false);
  }

  /** A cookie's name, with the prefix by which browsers pin it to this host where they can. */
  public String cookieName(String plain) {
    return secureCookies() ? "__Host-" + plain : plain;
  }
}
