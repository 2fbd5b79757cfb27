package roundwright.scheduling.file;

import java.util.Collection;
import java.util.Locale;
import java.util.Optional;

/** Finds the word that somebody may have meant. */
final class Nearest {
  private Nearest() {}

  /** The nearest of the known words, if a third of its letters or fewer need changing. */
  static Optional<String> to(String word, Collection<String> known) {
    String nearest = null;
    int least = Integer.MAX_VALUE;
    for (String candidate : known) {
      int changes =
          distance(word.toLowerCase(Locale.ROOT), candidate.toLowerCase(Locale.ROOT), least);
      if (changes < least && changes <= Math.max(1, candidate.length() / 3)) {
        nearest = candidate;
        least = changes;
      }
    }
    return Optional.ofNullable(nearest);
  }

  /** The clause to put behind a complaint about a word, or nothing where no word is near. */
  static String hint(String word, Collection<String> known) {
    return to(word, known).map(near -> ": did you mean " + Problems.quoted(near) + "?").orElse("");
  }

  /** Edits between two words (Levenshtein 1966, with neighbours exchanged as one edit). */
  private static int distance(String one, String other, int enough) {
    if (Math.abs(one.length() - other.length()) >= enough || one.length() > 80) {
      return enough;
    }
    int[][] edits = new int[one.length() + 1][other.length() + 1];
    for (int i = 0; i <= one.length(); i++) {
      for (int j = 0; j <= other.length(); j++) {
        if (i == 0 || j == 0) {
          edits[i][j] = i + j;
          continue;
        }
        int change = one.charAt(i - 1) == other.charAt(j - 1) ? 0 : 1;
        edits[i][j] =
            Math.min(edits[i - 1][j - 1] + change, 1 + Math.min(edits[i - 1][j], edits[i][j - 1]));
        if (i > 1
            && j > 1
            && one.charAt(i - 1) == other.charAt(j - 2)
            && one.charAt(i - 2) == other.charAt(j - 1)) {
          edits[i][j] = Math.min(edits[i][j], edits[i - 2][j - 2] + 1);
        }
      }
    }
    return edits[one.length()][other.length()];
  }
}
