package roundwright.server.command;

import java.io.IOException;
import java.nio.file.Path;
import roundwright.scheduling.file.EventFile;
import roundwright.scheduling.file.FileProblems;
import roundwright.scheduling.file.PlanFile;
import roundwright.scheduling.model.Event;
import roundwright.scheduling.model.Plan;

/** Reads the files that a command is given. */
final class Given {
  private Given() {}

  static Event event(Path file) throws Refusal {
    try {
      return EventFile.read(file).event();
    } catch (FileProblems problems) {
      throw Refusal.of(file, problems);
    } catch (IOException unreadable) {
      throw Refusal.unreadable(file, unreadable);
    }
  }

  static Plan plan(Path file, Event event) throws Refusal {
    try {
      return PlanFile.read(file, event).plan();
    } catch (FileProblems problems) {
      throw Refusal.of(file, problems);
    } catch (IOException unreadable) {
      throw Refusal.unreadable(file, unreadable);
    }
  }

  static Plan keptPlan(Path file, Event event) throws Refusal {
    try {
      return PlanFile.readKept(file, event).plan();
    } catch (FileProblems problems) {
      throw Refusal.of(file, problems);
    } catch (IOException unreadable) {
      throw Refusal.unreadable(file, unreadable);
    }
  }
}
