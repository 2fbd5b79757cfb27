package roundwright.server.web;

/**
 * How a hall is told everywhere: by a letter, a pattern and a hue, and its name beside them.
 *
 * @param code the hall's id
 * @param letter A to Z in the order in which the event lists its halls, then AA to ZZ
 * @param pattern name of its style, {@code hall-a} to {@code hall-f}, from the start again after
 *     six
 */
public record HallMark(String code, String letter, String pattern, String name, String venue) {
  private static final int LETTERS = 26;
  private static final int PATTERNS = 6;

  /** The mark of the hall that the event lists at a position, counted from 0. */
  public static HallMark at(int position, String code, String name, String venue) {
    char letter = (char) ('A' + position % LETTERS);
    String letters = position < LETTERS ? "" + letter : "" + letter + letter;
    return new HallMark(code, letters, "hall-" + (char) ('a' + position % PATTERNS), name, venue);
  }
}
