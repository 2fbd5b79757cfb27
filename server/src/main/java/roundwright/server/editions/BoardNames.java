package roundwright.server.editions;

import java.util.ArrayList;
import java.util.LinkedHashMap;
import java.util.List;
import java.util.Map;

/**
 * Names as a board has room for them: eight rows of large type, so more names mean narrower columns
 * and shorter names, never smaller type. A name that is too long keeps as many of its leading parts
 * as fit and the first letter of the next; where two people would read alike they get more letters.
 *
 * @param columns 2 to 5
 * @param left how many people have no room at all
 */
public record BoardNames(List<String> names, int columns, int left) {
  private static final int ROWS = 8;
  private static final int FEWEST_COLUMNS = 2;
  private static final int MOST_COLUMNS = 5;
  private static final int[] LETTERS_BY_COLUMNS = {22, 14, 11, 9};

  public BoardNames {
    names = List.copyOf(names);
  }

  public static BoardNames of(List<String> all) {
    int columns = Math.min(MOST_COLUMNS, Math.max(FEWEST_COLUMNS, (all.size() + ROWS - 1) / ROWS));
    int room = columns * ROWS;
    // The last place then says how many are left out.
    List<String> shown = all.size() > room ? all.subList(0, room - 1) : all;
    int letters = LETTERS_BY_COLUMNS[columns - FEWEST_COLUMNS];
    return new BoardNames(fitted(shown, letters), columns, all.size() - shown.size());
  }

  private static List<String> fitted(List<String> names, int letters) {
    List<String> fitted =
        new ArrayList<>(names.stream().map(name -> fit(name, letters, 1)).toList());
    for (int initials = 2; initials <= letters; initials++) {
      Map<String, Integer> met = new LinkedHashMap<>();
      fitted.forEach(name -> met.merge(name, 1, Integer::sum));
      for (int i = 0; i < fitted.size(); i++) {
        if (met.get(fitted.get(i)) > 1) {
          fitted.set(i, fit(names.get(i), letters + initials - 1, initials));
        }
      }
    }
    return fitted;
  }

  /** The name itself where it has room, else leading parts and an initial of some letters. */
  static String fit(String name, int letters, int initials) {
    if (width(name) <= letters) {
      return name;
    }
    String[] parts = name.split(" ", -1);
    StringBuilder kept = new StringBuilder(firstPart(parts[0], letters));
    for (int i = 1; i < parts.length; i++) {
      String initial = start(parts[i], initials) + (cut(parts[i], initials) ? "." : "");
      if (width(kept + " " + parts[i]) + 3 <= letters && i < parts.length - 1) {
        kept.append(' ').append(parts[i]);
      } else {
        return width(kept + " " + initial) <= letters + 1 ? kept + " " + initial : kept.toString();
      }
    }
    return kept.toString();
  }

  private static String firstPart(String part, int letters) {
    if (width(part) + 3 <= letters) {
      return part;
    }
    int hyphen = part.indexOf('-');
    String first = hyphen > 0 ? part.substring(0, hyphen) : part;
    return start(first, letters);
  }

  private static boolean cut(String part, int letters) {
    return part.codePointCount(0, part.length()) > letters;
  }

  private static String start(String text, int letters) {
    return cut(text, letters) ? text.substring(0, text.offsetByCodePoints(0, letters)) : text;
  }

  /**
   * How wide a text is, in Latin letters. Other alphabets come from a face that cannot be narrowed,
   * ideographs and syllable blocks are wider still, marks take no room.
   */
  static int width(String text) {
    int tenths = text.codePoints().map(BoardNames::tenths).sum();
    return (tenths + 9) / 10;
  }

  private static int tenths(int letter) {
    int type = Character.getType(letter);
    if (type == Character.NON_SPACING_MARK || type == Character.ENCLOSING_MARK) {
      return 0;
    }
    return switch (Character.UnicodeScript.of(letter)) {
      case LATIN, COMMON, INHERITED -> 10;
      case HAN, HANGUL, HIRAGANA, KATAKANA -> 22;
      default -> 15;
    };
  }
}
