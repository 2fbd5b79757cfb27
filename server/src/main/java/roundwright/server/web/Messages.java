package roundwright.server.web;

import java.io.IOException;
import java.io.InputStream;
import java.io.InputStreamReader;
import java.io.UncheckedIOException;
import java.nio.charset.StandardCharsets;
import java.nio.file.Files;
import java.nio.file.Path;
import java.text.MessageFormat;
import java.util.List;
import java.util.Locale;
import java.util.Map;
import java.util.Optional;
import java.util.Properties;
import java.util.concurrent.ConcurrentHashMap;

/**
 * The sentences of all pages, by key: one file a subject in {@code templates/messages/<language>/}.
 * A key that is nowhere is a programming error and says so.
 */
public final class Messages {
  /** The files of each language. */
  public static final List<String> SUBJECTS =
      List.of("common", "account", "event", "planning", "editions");

  private static final String FOLDER = "templates/messages/";

  private final Optional<Path> devRoot;
  private final Map<Locale, Map<String, String>> byLocale = new ConcurrentHashMap<>();

  public Messages(Optional<Path> devRoot) {
    this.devRoot = devRoot;
  }

  /**
   * The sentence of a key, with its places filled.
   *
   * @throws IllegalArgumentException where no file has the key
   */
  public String say(Locale locale, String key, Object... filled) {
    String pattern = patterns(locale).get(key);
    if (pattern == null) {
      throw new IllegalArgumentException(
          "No sentence for '" + key + "' in " + locale + ". Add it to a file in " + FOLDER);
    }
    return new MessageFormat(pattern, locale).format(filled);
  }

  /** Every key of a language with its pattern. */
  public Map<String, String> patterns(Locale locale) {
    return devRoot.isPresent() ? load(locale) : byLocale.computeIfAbsent(locale, this::load);
  }

  private Map<String, String> load(Locale locale) {
    Map<String, String> patterns = new ConcurrentHashMap<>();
    for (String subject : SUBJECTS) {
      String file = FOLDER + locale.getLanguage() + "/" + subject + ".properties";
      Properties lines = new Properties();
      try (InputStream in = open(file);
          InputStreamReader reader = new InputStreamReader(in, StandardCharsets.UTF_8)) {
        lines.load(reader);
      } catch (IOException e) {
        throw new UncheckedIOException("Cannot read " + file, e);
      }
      for (String key : lines.stringPropertyNames()) {
        if (patterns.put(key, lines.getProperty(key)) != null) {
          throw new IllegalStateException("'" + key + "' stands in two files, one is " + file);
        }
      }
    }
    return patterns;
  }

  private InputStream open(String file) throws IOException {
    if (devRoot.isPresent()) {
      return Files.newInputStream(devRoot.get().resolve(file));
    }
    InputStream in = Messages.class.getClassLoader().getResourceAsStream(file);
    if (in == null) {
      throw new IOException("not in the jar");
    }
    return in;
  }
}
