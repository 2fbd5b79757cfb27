package roundwright.scheduling.file;

import com.fasterxml.jackson.databind.JsonNode;
import java.io.IOException;
import java.io.InputStream;
import java.nio.charset.StandardCharsets;
import java.nio.file.Files;
import java.nio.file.Path;
import java.time.Instant;
import java.util.Optional;
import roundwright.scheduling.model.Event;

/**
 * What an event file holds: the event, and the keys beginning with {@code x-} that its owner put
 * beside it.
 *
 * @param extras kept from reading to writing
 */
public record EventFile(Event event, Extras extras) {
  static final String FORMAT = "roundwright-event/1";

  /** A file for an event made by other means than reading one. */
  public EventFile(Event event) {
    this(event, Extras.NONE);
  }

  /**
   * Reads an event.
   *
   * @throws FileProblems with every problem of the file, if it has any
   */
  public static EventFile read(Path path) throws IOException, FileProblems {
    return read(Files.readAllBytes(path));
  }

  /**
   * Reads an event, to the end of the stream; closing it is its opener's.
   *
   * @throws FileProblems with every problem of the file, if it has any
   */
  public static EventFile read(InputStream stream) throws IOException, FileProblems {
    return read(stream.readAllBytes());
  }

  /**
   * Reads an event.
   *
   * @throws FileProblems with every problem of the text, if it has any
   */
  public static EventFile read(String json) throws FileProblems {
    return read(json.getBytes(StandardCharsets.UTF_8));
  }

  private static EventFile read(byte[] bytes) throws FileProblems {
    Problems problems = new Problems();
    JsonNode root = JsonText.tree(bytes, problems);
    Event event = new EventReader(problems).read(root);
    problems.throwIfAny();
    return new EventFile(event, Extras.in(root));
  }

  /**
   * The file's text: keys in the order of the file format's page, optional keys only where they
   * differ from what holds without them.
   *
   * @throws IllegalArgumentException where a time falls into an hour that a change of clocks
   *     repeats, for which the format has no words
   */
  public String json() {
    return new EventWriter(event).json(extras);
  }

  public void write(Path path) throws IOException {
    Files.write(path, json().getBytes(StandardCharsets.UTF_8));
  }

  /**
   * A moment given beside the file, such as on a command line, in the event's zone.
   *
   * @param name what to call the moment in a problem, such as {@code --at}
   * @param text a local date and time such as {@code 2027-05-08T09:00}
   * @throws FileProblems where it is none, or a change of clocks skips or repeats it
   */
  public static Instant moment(String name, String text, Event event) throws FileProblems {
    Problems problems = new Problems();
    Fields fields = new Fields(problems, "", "", Fields.newObject().put(name, text));
    Optional<Instant> moment = fields.instant(name, event.zone());
    problems.throwIfAny();
    return moment.orElseThrow();
  }
}
