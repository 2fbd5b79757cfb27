package roundwright.scheduling;

import roundwright.scheduling.core.Board;
import roundwright.scheduling.core.Frame;
import roundwright.scheduling.core.GroupRow;
import roundwright.scheduling.core.Problem;
import roundwright.scheduling.timetable.Timetabling;

/**
 * What a plan that broke has to say to the timetable: which rounds somebody could not be in both
 * of, in which rounds somebody found no group, and where crews were short.
 */
final class Lessons {
  private Lessons() {}

  /** Passes the lessons on; whether duties stayed empty. */
  static boolean learn(Board board, Timetabling timetabling) {
    Problem problem = board.problem;
    for (int p = 0; p < problem.people; p++) {
      for (int i = 0; i < board.commitmentCount(p); i++) {
        learnFrom(board, p, i, timetabling);
      }
    }
    boolean gaps = false;
    GroupRow row = new GroupRow();
    for (int g = 0; g < board.frame.groups; g++) {
      row.load(board, g);
      if (row.leastMinutes() > board.frame.end[g] - board.frame.start[g]) {
        timetabling.reshape(row.round);
      }
      if (lacksCrew(row)) {
        gaps = true;
        keepFromOthers(board.frame, g, timetabling);
      }
    }
    return gaps;
  }

  private static void learnFrom(Board board, int person, int at, Timetabling timetabling) {
    int commitment = board.commitment(person, at);
    if ((commitment & 3) != Problem.SOLVING) {
      return;
    }
    Frame frame = board.frame;
    int group = commitment >> 2;
    int round = frame.round[group];
    boolean likely = board.problem.roundLikely[round];
    if (!likely && !board.problem.present(person, frame.start[group], frame.end[group])) {
      timetabling.reshape(round);
    }
    for (int i = 0; i < at; i++) {
      int other = board.commitment(person, i);
      if ((other & 3) == Problem.SOLVING && frame.conflict(other >> 2, group)) {
        timetabling.keepApart(frame.round[other >> 2], round);
      }
    }
  }

  private static boolean lacksCrew(GroupRow row) {
    for (int role = 0; role < 3; role++) {
      if (row.filled[role] < row.wanted[role]) {
        return true;
      }
    }
    return false;
  }

  private static void keepFromOthers(Frame frame, int group, Timetabling timetabling) {
    for (int other = 0; other < frame.groups; other++) {
      if (other != group
          && frame.start[other] < frame.end[group]
          && frame.start[group] < frame.end[other]) {
        timetabling.keepApart(frame.round[group], frame.round[other]);
      }
    }
  }
}
