package roundwright.scheduling.file;

import com.fasterxml.jackson.core.JsonFactory;
import com.fasterxml.jackson.core.JsonLocation;
import com.fasterxml.jackson.core.JsonParser;
import com.fasterxml.jackson.core.JsonProcessingException;
import com.fasterxml.jackson.core.JsonToken;
import com.fasterxml.jackson.databind.JsonNode;
import com.fasterxml.jackson.databind.node.ArrayNode;
import com.fasterxml.jackson.databind.node.JsonNodeFactory;
import com.fasterxml.jackson.databind.node.ObjectNode;
import java.io.IOException;
import java.io.UncheckedIOException;
import java.nio.ByteBuffer;
import java.nio.CharBuffer;
import java.nio.charset.CharsetDecoder;
import java.nio.charset.CoderResult;
import java.nio.charset.CodingErrorAction;
import java.nio.charset.StandardCharsets;
import java.util.Locale;
import java.util.regex.Pattern;

/**
 * Text as RFC 8259 has it, read into a tree. A byte order mark is skipped, as that document allows;
 * a key given twice in one object is a problem, and the first of the two is read.
 */
final class JsonText {
  static final JsonNodeFactory NODES = JsonNodeFactory.instance;

  /** What the library says to programmers, not to whoever wrote the file. */
  private static final Pattern LIBRARY_TALK =
      Pattern.compile(
          "(?s) \\(code \\d+[^)]*\\)|: enable `.*|, from `[^`]*`| \\(not recognized as.*| at \\[Source.*");

  private static final JsonFactory FACTORY = new JsonFactory();

  private final Problems problems;
  private final JsonParser parser;

  private JsonText(JsonParser parser, Problems problems) {
    this.parser = parser;
    this.problems = problems;
  }

  /** The tree of a whole file; throws at once where the text is no JSON and no tree can be had. */
  static JsonNode tree(byte[] bytes, Problems problems) throws FileProblems {
    String text = decoded(bytes, problems);
    try (JsonParser parser = FACTORY.createParser(text)) {
      if (parser.nextToken() == null) {
        problems.add("line 1, column 1", "", "the end of an empty file", "write one JSON object");
        problems.throwIfAny();
      }
      JsonNode tree = new JsonText(parser, problems).value("");
      if (parser.nextToken() != null) {
        problems.add(
            place(parser.currentTokenLocation()),
            "",
            "text after the end",
            "keep one JSON object in the file");
      }
      return tree;
    } catch (JsonProcessingException broken) {
      String says = LIBRARY_TALK.matcher(broken.getOriginalMessage()).replaceAll("");
      says = says.replaceAll("\\s+", " ");
      problems.add(
          place(broken.getLocation()),
          "",
          "broken JSON",
          "mend this: " + says.substring(0, 1).toLowerCase(Locale.ROOT) + says.substring(1));
      problems.throwIfAny();
      throw new IllegalStateException("A problem was noted and not thrown");
    } catch (IOException impossible) {
      throw new UncheckedIOException(impossible);
    }
  }

  private static String decoded(byte[] bytes, Problems problems) throws FileProblems {
    boolean marked =
        bytes.length >= 3
            && (bytes[0] & 0xff) == 0xef
            && (bytes[1] & 0xff) == 0xbb
            && (bytes[2] & 0xff) == 0xbf;
    int skipped = marked ? 3 : 0;
    ByteBuffer in = ByteBuffer.wrap(bytes, skipped, bytes.length - skipped);
    CharBuffer out = CharBuffer.allocate(bytes.length + 1);
    CharsetDecoder decoder =
        StandardCharsets.UTF_8
            .newDecoder()
            .onMalformedInput(CodingErrorAction.REPORT)
            .onUnmappableCharacter(CodingErrorAction.REPORT);
    CoderResult result = decoder.decode(in, out, true);
    if (result.isError()) {
      problems.add(
          "byte " + (in.position() + 1), "", "not UTF-8", "save the file in the UTF-8 encoding");
      problems.throwIfAny();
    }
    return out.flip().toString();
  }

  private static String place(JsonLocation location) {
    return location == null
        ? "line 1, column 1"
        : "line " + location.getLineNr() + ", column " + location.getColumnNr();
  }

  private JsonNode value(String path) throws IOException {
    JsonToken token = parser.currentToken();
    return switch (token) {
      case START_OBJECT -> object(path);
      case START_ARRAY -> array(path);
      case VALUE_STRING -> NODES.textNode(parser.getText());
      case VALUE_NUMBER_INT -> NODES.numberNode(parser.getBigIntegerValue());
      case VALUE_NUMBER_FLOAT -> NODES.numberNode(parser.getDecimalValue());
      case VALUE_TRUE -> NODES.booleanNode(true);
      case VALUE_FALSE -> NODES.booleanNode(false);
      case VALUE_NULL -> NODES.nullNode();
      default -> throw new IllegalStateException("Unexpected " + token);
    };
  }

  private ObjectNode object(String path) throws IOException {
    ObjectNode object = NODES.objectNode();
    while (parser.nextToken() != JsonToken.END_OBJECT) {
      String key = parser.currentName();
      String inner = Fields.join(path, key);
      JsonLocation where = parser.currentLocation();
      parser.nextToken();
      JsonNode value = value(inner);
      if (object.has(key)) {
        problems.add(
            inner,
            "",
            "given twice, again with " + Problems.shown(value),
            "keep one of the two (the second is at " + place(where) + ")");
      } else {
        object.set(key, value);
      }
    }
    return object;
  }

  private ArrayNode array(String path) throws IOException {
    ArrayNode array = NODES.arrayNode();
    while (parser.nextToken() != JsonToken.END_ARRAY) {
      array.add(value(path + "[" + array.size() + "]"));
    }
    return array;
  }
}
