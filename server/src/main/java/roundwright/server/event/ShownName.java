package roundwright.server.event;

import java.lang.Character.UnicodeScript;
import java.util.EnumSet;
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
}
