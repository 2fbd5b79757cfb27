package roundwright.server.web;

import java.util.ArrayList;
import java.util.List;
import java.util.Optional;

/** What is wrong with a form, by field, as keys of sentences; in the order of the fields. */
public final class FieldErrors {
  private final List<FieldError> errors = new ArrayList<>();

  /** One field's complaint: the key of a sentence and what fills its places. */
  public record FieldError(String field, String key, List<Object> filled) {
    public FieldError {
      filled = List.copyOf(filled);
    }
  }

  public void add(String field, String key, Object... filled) {
    errors.add(new FieldError(field, key, List.of(filled)));
  }

  public boolean none() {
    return errors.isEmpty();
  }

  public List<FieldError> all() {
    return List.copyOf(errors);
  }

  /** The first complaint about a field, or null, which is what templates ask for. */
  public FieldError of(String field) {
    Optional<FieldError> first =
        errors.stream().filter(error -> error.field().equals(field)).findFirst();
    return first.orElse(null);
  }
}
