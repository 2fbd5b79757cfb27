package roundwright.server.event;

import java.util.List;
import java.util.stream.Collectors;

/**
 * Everything that is wrong with an event's CSVs, told at once; one line for each in the message.
 */
public final class CsvProblems extends Exception {
  private static final long serialVersionUID = 1;

  private final transient List<Problem> problems;

  CsvProblems(List<Problem> problems) {
    super(problems.stream().map(Problem::says).collect(Collectors.joining("\n")));
    this.problems = List.copyOf(problems);
  }

  /** The problems in the order in which they were found; at least one. */
  public List<Problem> problems() {
    return problems;
  }

  /**
   * One thing wrong.
   *
   * @param place file, line and column, as far as they are known
   * @param value what stands there
   * @param remedy what to do about it
   */
  public record Problem(String place, String value, String remedy) {
    /** The whole problem on one line. */
    public String says() {
      return place + " is " + value + "; " + remedy;
    }
  }
}
