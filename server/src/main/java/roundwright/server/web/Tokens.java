package roundwright.server.web;

import java.nio.charset.StandardCharsets;
import java.security.MessageDigest;
import java.security.NoSuchAlgorithmException;
import java.security.SecureRandom;
import java.util.Base64;
import java.util.HexFormat;

/** Secrets that are drawn, handed out once and kept only as their hash. */
public final class Tokens {
  private static final int BYTES = 20;
  private static final SecureRandom RANDOM = new SecureRandom();

  private Tokens() {}

  /** 160 random bits in letters that fit a path. */
  public static String draw() {
    byte[] bytes = new byte[BYTES];
    RANDOM.nextBytes(bytes);
    return Base64.getUrlEncoder().withoutPadding().encodeToString(bytes);
  }

  /** SHA-256 in hex: with 160 random bits behind it nothing slower is needed. */
  public static String hash(String token) {
    return HexFormat.of().formatHex(sha256(token));
  }

  static byte[] sha256(String text) {
    try {
      return MessageDigest.getInstance("SHA-256").digest(text.getBytes(StandardCharsets.UTF_8));
    } catch (NoSuchAlgorithmException impossible) {
      throw new IllegalStateException("Every Java has SHA-256", impossible);
    }
  }

  static byte[] random(int bytes) {
    byte[] drawn = new byte[bytes];
    RANDOM.nextBytes(drawn);
    return drawn;
  }
}
