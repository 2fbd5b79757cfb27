package roundwright.scheduling.file;

import com.fasterxml.jackson.databind.JsonNode;
import java.io.IOException;
import java.io.InputStream;
import java.nio.charset.StandardCharsets;
import java.nio.file.Files;
import java.nio.file.Path;
import roundwright.scheduling.model.Event;
import roundwright.scheduling.model.Plan;

/**
 * What a plan file holds: the plan, and the keys beginning with {@code x-} that its owner put
 * beside it. A plan is read and written beside its event, whose zones tell what its times mean.
 *
 * @param extras kept from reading to writing
 */
public record PlanFile(Plan plan, Extras extras) {
  static final String FORMAT = "roundwright-plan/1";

  /** A file for a plan made by other means than reading one. */
  public PlanFile(Plan plan) {
    this(plan, Extras.NONE);
  }

  /**
   * Reads a plan for an event; its people, halls and rounds must be the event's.
   *
   * @throws FileProblems with every problem of the file, if it has any
   */
  public static PlanFile read(Path path, Event event) throws IOException, FileProblems {
    return read(Files.readAllBytes(path), event, false);
  }

  /**
   * Reads a plan for an event; its people, halls and rounds must be the event's.
   *
   * @throws FileProblems with every problem of the text, if it has any
   */
  public static PlanFile read(String json, Event event) throws FileProblems {
    return read(json.getBytes(StandardCharsets.UTF_8), event, false);
  }

  /**
   * Reads a plan for an event, to the end of the stream; closing it is its opener's.
   *
   * @throws FileProblems with every problem of the file, if it has any
   */
  public static PlanFile read(InputStream stream, Event event) throws IOException, FileProblems {
    return read(stream.readAllBytes(), event, false);
  }

  /**
   * Reads the plan that another is to stay close to. Its people, halls and rounds may have left the
   * event since; times in a hall that has left are in the event's zone.
   *
   * @throws FileProblems with every problem of the file, if it has any
   */
  public static PlanFile readKept(Path path, Event event) throws IOException, FileProblems {
    return read(Files.readAllBytes(path), event, true);
  }

  /**
   * Reads the plan that another is to stay close to; see {@link #readKept(Path, Event)}.
   *
   * @throws FileProblems with every problem of the text, if it has any
   */
  public static PlanFile readKept(String json, Event event) throws FileProblems {
    return read(json.getBytes(StandardCharsets.UTF_8), event, true);
  }

  private static PlanFile read(byte[] bytes, Event event, boolean kept) throws FileProblems {
    Problems problems = new Problems();
    JsonNode root = JsonText.tree(bytes, problems);
    Plan plan = new PlanReader(problems, event, kept).read(root);
    problems.throwIfAny();
    return new PlanFile(plan, Extras.in(root));
  }

  /**
   * The file's text: keys in the order of the file format's page; the same plan gives the same
   * characters.
   *
   * @throws IllegalArgumentException where a time falls into an hour that a change of clocks
   *     repeats, for which the format has no words
   */
  public String json(Event event) {
    return PlanWriter.json(plan, event, extras);
  }

  public void write(Path path, Event event) throws IOException {
    Files.write(path, json(event).getBytes(StandardCharsets.UTF_8));
  }
}
