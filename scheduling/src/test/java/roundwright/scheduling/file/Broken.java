package roundwright.scheduling.file;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertNotNull;
import static org.junit.jupiter.api.Assertions.assertTrue;

import com.fasterxml.jackson.databind.JsonNode;
import com.fasterxml.jackson.databind.ObjectMapper;
import java.io.IOException;
import java.io.InputStream;
import java.nio.charset.StandardCharsets;
import java.util.stream.Stream;
import java.util.stream.StreamSupport;
import org.junit.jupiter.api.Named;
import org.junit.jupiter.params.provider.Arguments;

/** Files for tests, whole and broken. */
final class Broken {
  private Broken() {}

  static String resource(String name) {
    try (InputStream stream = Broken.class.getResourceAsStream(name)) {
      assertNotNull(stream, "No test resource " + name);
      return new String(stream.readAllBytes(), StandardCharsets.UTF_8);
    } catch (IOException unreadable) {
      throw new AssertionError("Cannot read test resource " + name, unreadable);
    }
  }

  /** A good file with one stretch of it exchanged. */
  static String edited(String good, String old, String replacement) {
    assertTrue(good.contains(old), "The good file holds " + old);
    int at = good.indexOf(old);
    return good.substring(0, at) + replacement + good.substring(at + old.length());
  }

  /** Rows of (broken file, message) out of rows of (old, replacement, message). */
  static Stream<Arguments> rows(String table, String good) {
    JsonNode rows;
    try {
      rows = new ObjectMapper().readTree(resource(table));
    } catch (IOException unreadable) {
      throw new AssertionError("Cannot read the table " + table, unreadable);
    }
    return StreamSupport.stream(rows.spliterator(), false)
        .map(
            row -> {
              assertEquals(3, row.size(), "A row is old, replacement, message: " + row);
              String replacement = row.get(1).asText();
              return Arguments.of(
                  Named.of(
                      replacement.isBlank() ? "without " + row.get(0).asText() : replacement,
                      edited(good, row.get(0).asText(), replacement)),
                  row.get(2).asText());
            });
  }
}
