package roundwright.server.pages;

import com.fasterxml.jackson.databind.JsonNode;
import com.fasterxml.jackson.databind.json.JsonMapper;
import java.io.ByteArrayInputStream;
import java.io.IOException;
import java.io.UncheckedIOException;
import java.nio.charset.StandardCharsets;
import java.util.ArrayList;
import java.util.List;
import nu.validator.client.EmbeddedValidator;
import org.xml.sax.SAXException;

/** The Nu HTML checker, in this process. */
final class NuChecker {
  private static final JsonMapper JSON = new JsonMapper();

  private NuChecker() {}

  /** Errors and warnings, each with its place and the markup there. */
  static List<String> errors(String html) {
    EmbeddedValidator checker = new EmbeddedValidator();
    checker.setNoLangDetect(true);
    checker.setOutputFormat(EmbeddedValidator.OutputFormat.JSON);
    try {
      String report =
          checker.validate(new ByteArrayInputStream(html.getBytes(StandardCharsets.UTF_8)));
      List<String> errors = new ArrayList<>();
      for (JsonNode message : JSON.readTree(report).path("messages")) {
        errors.add(
            message.path("type").asText()
                + " at line "
                + message.path("lastLine").asInt()
                + ": "
                + message.path("message").asText()
                + " — "
                + message.path("extract").asText().strip());
      }
      return errors;
    } catch (IOException e) {
      throw new UncheckedIOException(e);
    } catch (SAXException e) {
      throw new IllegalStateException("The checker itself failed", e);
    }
  }
}
