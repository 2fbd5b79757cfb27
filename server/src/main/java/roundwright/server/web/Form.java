package roundwright.server.web;

import io.javalin.http.Context;
import java.util.Optional;

/**
 * A form as it was sent: reads fields, notes what is wrong with them, keeps what was typed. Once
 * {@link #errors()} is not empty, what the readers gave is not to be used.
 */
public final class Form {
  private final Context ctx;
  private final FieldErrors errors = new FieldErrors();

  public Form(Context ctx) {
    this.ctx = ctx;
  }

  public FieldErrors errors() {
    return errors;
  }

  /** What was typed, as it was typed. */
  public String typed(String field) {
    String text = ctx.formParam(field);
    return text == null ? "" : text;
  }

  /** A line of text without its outer blanks; missing or overlong ones are noted. */
  public String line(String field, int mostLetters) {
    String text = typed(field).strip();
    if (text.isEmpty()) {
      errors.add(field, "form.missing." + field);
    } else if (text.codePointCount(0, text.length()) > mostLetters) {
      errors.add(field, "form.too-long", mostLetters);
    } else if (text.codePoints().anyMatch(Character::isISOControl)) {
      errors.add(field, "form.control-letters");
    }
    return text;
  }

  /** A whole number within bounds; anything else is noted. */
  public int whole(String field, int least, int most) {
    Optional<Integer> number = number(typed(field).strip());
    if (number.isEmpty() || number.get() < least || number.get() > most) {
      errors.add(field, "form.whole", least, most);
      return least;
    }
    return number.get();
  }

  private static Optional<Integer> number(String text) {
    try {
      return Optional.of(Integer.valueOf(text));
    } catch (NumberFormatException notANumber) {
      return Optional.empty();
    }
  }
}
