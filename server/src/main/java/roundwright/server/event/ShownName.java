package roundwright.server.event;

import java.lang.Character.UnicodeScript;
import java.text.Normalizer;
import java.util.EnumSet;
import java.util.Locale;
import java.util.Optional;
import java.util.Set;

/**
 * What strangers may see of a name: the public name where there is one; the whole name of whoever
 * agreed to be listed; of minors and of everybody else the given name only, as far as writing
 * tells.
 */
public final class ShownName {
  private static final Set<UnicodeScript> FAMILY_NAME_FIRST =
      EnumSet.of(
          UnicodeScript.HAN, UnicodeScript.HANGUL, UnicodeScript.HIRAGANA, UnicodeScript.KATAKANA);

  private ShownName() {}

  public static String of(String name, Optional<String> publicName, boolean listed, boolean minor) {
    if (publicName.isPresent()) {
      return publicName.get();
    }
    return listed && !minor ? name : givenName(name);
  }

  private static String givenName(String name) {
    String[] parts = name.strip().split("\\s+", -1);
    boolean familyFirst =
        FAMILY_NAME_FIRST.contains(UnicodeScript.of(parts[parts.length - 1].codePointAt(0)));
    if (!familyFirst) {
      return parts[0];
    }
    String last = parts[parts.length - 1];
    boolean unspaced = parts.length == 1 && last.codePointCount(0, last.length()) > 1;
    return unspaced ? last.substring(last.offsetByCodePoints(0, 1)) : last;
  }

  /**
   * A name without case, accents and what else separates ways of typing it, for looking up: İ, Ł
   * and ø are found by i, l and o.
   */
  public static String folded(String name) {
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
