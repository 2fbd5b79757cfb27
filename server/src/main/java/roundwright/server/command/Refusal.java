package roundwright.server.command;

import java.io.IOException;
import java.nio.file.AccessDeniedException;
import java.nio.file.Files;
import java.nio.file.NoSuchFileException;
import java.nio.file.Path;
import java.util.List;
import roundwright.scheduling.file.FileProblems;

/** Why a command cannot do what it was asked, one line for each thing wrong. */
final class Refusal extends Exception {
  private static final long serialVersionUID = 1L;

  private final transient List<String> lines;

  Refusal(String line) {
    this(List.of(line));
  }

  private Refusal(List<String> lines) {
    super(String.join("\n", lines));
    this.lines = List.copyOf(lines);
  }

  List<String> lines() {
    return lines;
  }

  static Refusal of(Path file, FileProblems problems) {
    return new Refusal(
        problems.problems().stream().map(problem -> file + ": " + problem.line()).toList());
  }

  /** A file that could not be read, with what to do about it. */
  static Refusal unreadable(Path file, IOException failure) {
    if (Files.isDirectory(file)) {
      return new Refusal(file + ": is a folder; name a file in it");
    }
    if (failure instanceof NoSuchFileException) {
      return new Refusal(file + ": there is no such file; check its name and folder");
    }
    if (failure instanceof AccessDeniedException) {
      return new Refusal(file + ": may not be read; change its permissions");
    }
    return new Refusal(file + ": cannot be read (" + failure.getMessage() + ")");
  }

  /** A file that could not be written, with what to do about it. */
  static Refusal unwritable(Path file, IOException failure) {
    return new Refusal(
        file + ": cannot be written (" + failure.getMessage() + "); name another with --out");
  }

  /** Throws where a file can hardly be written, before any time is spent on what to write. */
  static void unlessWritable(Path file) throws Refusal {
    Path folder = file.toAbsolutePath().getParent();
    if (Files.isDirectory(file)) {
      throw new Refusal(file + ": is a folder; name a file in it with --out");
    }
    if (folder == null || !Files.isDirectory(folder)) {
      throw new Refusal(file + ": there is no folder " + folder + "; make it first");
    }
    if (Files.exists(file) ? !Files.isWritable(file) : !Files.isWritable(folder)) {
      throw new Refusal(file + ": may not be written; change permissions or name another file");
    }
  }
}
