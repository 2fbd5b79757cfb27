package roundwright.scheduling.file;

import java.util.List;
import java.util.stream.Collectors;

/**
 * Everything that is wrong with a file, told at once. Its message has one line for each problem.
 */
public final class FileProblems extends Exception {
  private static final long serialVersionUID = 1L;

  private final transient List<Problem> problems;

  FileProblems(List<Problem> problems) {
    super(problems.stream().map(Problem::line).collect(Collectors.joining("\n")));
    this.problems = List.copyOf(problems);
  }

  /** The problems in the order in which they were found; at least one. */
  public List<Problem> problems() {
    return problems;
  }

  /**
   * One thing wrong with a file.
   *
   * @param path where, such as {@code people[3].entries[0].expectedSeconds}, or a line and column
   * @param id of the thing that the path leads into, where it has one; else empty
   * @param value what stands there, shortened; {@code missing} where nothing does
   * @param remedy what to do about it
   */
  public record Problem(String path, String id, String value, String remedy) {
    /** The whole problem on one line. */
    public String line() {
      String owner = id.isEmpty() ? "" : " (" + id + ")";
      return path + owner + " is " + value + "; " + remedy;
    }
  }
}
