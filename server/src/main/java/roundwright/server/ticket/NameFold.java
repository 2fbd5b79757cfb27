package roundwright.server.ticket;

import java.text.Normalizer;
import java.util.Locale;

/** Names as the look-up compares them. */
public final class NameFold {
  private NameFold() {}

  /**
   * A name without case, accents and what else separates ways of typing it, for looking up: İ, Ł
   * and ø are found by i, l and o.
   */
  public static String of(String name) {
    String apart = Normalizer.normalize(name, Normalizer.Form.NFKD).toLowerCase(Locale.ROOT);
    StringBuilder folded = new StringBuilder(apart.length());
    apart
        .codePoints()
        .filter(letter -> Character.getType(letter) != Character.NON_SPACING_MARK)
        .forEach(letter -> folded.append(plain(letter)));
    return Normalizer.normalize(folded, Normalizer.Form.NFKC).strip();
  }

  private static String plain(int letter) {
    return switch (letter) {
      case 'ı' -> "i";
      case 'ł' -> "l";
      case 'ø' -> "o";
      case 'đ', 'ð' -> "d";
      case 'ħ' -> "h";
      case 'ß' -> "ss";
      case 'æ' -> "ae";
      case 'œ' -> "oe";
      case 'þ' -> "th";
      default -> Character.toString(letter);
    };
  }
}
