package roundwright.server.account;

import com.password4j.Argon2Function;
import com.password4j.Password;
import com.password4j.types.Argon2;
import io.javalin.http.ServiceUnavailableResponse;
import java.text.Normalizer;
import java.util.Locale;
import java.util.Set;
import java.util.concurrent.Semaphore;
import java.util.concurrent.TimeUnit;

/**
 * Password rules and hashes: Argon2id (Biryukov, Dinu and Khovratovich 2016) with 19 MiB and two
 * passes, the least that OWASP's password storage cheat sheet allows; four at a time, so that a
 * burst of sign-ins cannot take the memory away from everything else.
 */
final class Passwords {
  static final int FEWEST_LETTERS = 12;
  static final int MOST_LETTERS = 256;

  private static final int AT_ONCE = 4;
  private static final int PATIENCE_SECONDS = 5;
  private static final int SALT_BYTES = 16;
  private static final Argon2Function ARGON2 =
      Argon2Function.getInstance(19 * 1024, 2, 1, 32, Argon2.ID);
  private static final Semaphore SEATS = new Semaphore(AT_ONCE, true);

  /** Long enough and still among the first that anybody tries. */
  private static final Set<String> COMMON =
      Set.of(
          "passwordpassword",
          "password1234",
          "password12345",
          "123456789012",
          "1234567890123",
          "1234567890ab",
          "qwertyuiopas",
          "qwertyuiop12",
          "qwertyqwerty",
          "abcdefghijkl",
          "abc123abc123",
          "iloveyou1234",
          "letmeinletmein",
          "adminadminadmin",
          "administrator",
          "administrator1",
          "welcomewelcome",
          "welcome12345",
          "changemechangeme",
          "changeme1234",
          "trustno1trustno1",
          "correcthorsebatterystaple",
          "111111111111",
          "000000000000",
          "aaaaaaaaaaaa");

  private static final String NOBODYS = hashNow("nobody has this password");

  private Passwords() {}

  /** Why a password cannot be taken, as the key of a sentence; empty where it can. */
  static String complaint(String password, String accountName) {
    int letters = password.codePointCount(0, password.length());
    if (letters < FEWEST_LETTERS) {
      return "account.password.short";
    }
    if (letters > MOST_LETTERS) {
      return "account.password.long";
    }
    String plain = password.toLowerCase(Locale.ROOT);
    String name = accountName.toLowerCase(Locale.ROOT).strip();
    boolean mostlyName = !name.isEmpty() && plain.replace(name, "").length() < 4;
    if (COMMON.contains(plain) || plain.chars().distinct().count() < 3 || mostlyName) {
      return "account.password.common";
    }
    return "";
  }

  static String hash(String password) {
    return seated(() -> hashNow(password));
  }

  /** Takes as long for an account that does not exist as for one that does. */
  static boolean fits(String password, String hashOrNull) {
    String hash = hashOrNull == null ? NOBODYS : hashOrNull;
    boolean same =
        seated(
            () ->
                Password.check(plain(password), hash)
                    .with(Argon2Function.getInstanceFromHash(hash)));
    return same && hashOrNull != null;
  }

  private static String hashNow(String password) {
    return Password.hash(plain(password)).addRandomSalt(SALT_BYTES).with(ARGON2).getResult();
  }

  /** One form for letters that can be typed in two ways. */
  private static String plain(String password) {
    return Normalizer.normalize(password, Normalizer.Form.NFKC);
  }

  private static <T> T seated(java.util.function.Supplier<T> work) {
    boolean seated = false;
    try {
      seated = SEATS.tryAcquire(PATIENCE_SECONDS, TimeUnit.SECONDS);
      if (!seated) {
        throw new ServiceUnavailableResponse();
      }
      return work.get();
    } catch (InterruptedException e) {
      Thread.currentThread().interrupt();
      throw new ServiceUnavailableResponse();
    } finally {
      if (seated) {
        SEATS.release();
      }
    }
  }
}
