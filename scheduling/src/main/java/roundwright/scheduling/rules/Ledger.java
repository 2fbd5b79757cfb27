package roundwright.scheduling.rules;

import java.util.Arrays;
import roundwright.scheduling.core.Board;
import roundwright.scheduling.core.Frame;
import roundwright.scheduling.core.GroupRow;
import roundwright.scheduling.core.PersonRow;
import roundwright.scheduling.core.Problem;

/**
 * A board with its price. Moves go through {@link #seat} and {@link #duty}; {@link #settle} prices
 * the rows they touched anew; then {@link #keep} or {@link #undo}, which restores rather than
 * recomputes. Not thread-safe; allocates nothing after construction.
 *
 * <p>Layout: a price a person and a group, hard and strain apart; a stack of the ops of the open
 * move and of the rows it touched with what they cost before.
 */
public final class Ledger {
  private static final int FIRST_LENGTH = 1024;
  private static final int SEAT = 0;
  private static final int DUTY = 1;

  /** What a trial adds for each breach: more than any strain, little enough to be summed. */
  public static final long BREACH_IN_TRIALS = 1L << 44;

  public final Board board;
  public final Frame frame;
  public final Problem problem;

  private final RuleBook book;
  private final PersonRow personRow = new PersonRow();
  private final GroupRow groupRow = new GroupRow();

  private final long[] personHard;
  private final long[] personStrain;
  private final long[] groupHard;
  private final long[] groupStrain;
  private final long frameHard;
  private final long frameStrain;
  private long hard;
  private long strain;

  private int[] opKind = new int[FIRST_LENGTH];
  private int[] opAt = new int[FIRST_LENGTH];
  private int[] opBefore = new int[FIRST_LENGTH];
  private int ops;

  private final int[] touchedPeople;
  private final int[] touchedGroups;
  private final boolean[] personTouched;
  private final boolean[] groupTouched;
  private final long[] oldHard;
  private final long[] oldStrain;
  private int peopleTouched;
  private int groupsTouched;
  private long hardBefore;
  private long strainBefore;
  private boolean settled;

  public Ledger(Board board, RuleBook book) {
    this.board = board;
    this.frame = board.frame;
    this.problem = board.problem;
    this.book = book;
    personHard = new long[problem.people];
    personStrain = new long[problem.people];
    groupHard = new long[frame.groups];
    groupStrain = new long[frame.groups];
    touchedPeople = new int[problem.people];
    touchedGroups = new int[frame.groups];
    personTouched = new boolean[problem.people];
    groupTouched = new boolean[frame.groups];
    oldHard = new long[problem.people + frame.groups];
    oldStrain = new long[problem.people + frame.groups];
    frameHard = book.hard(frame);
    frameStrain = book.strain(frame);
    reprice();
  }

  /** Prices every row anew, forgetting any open move. */
  public void reprice() {
    ops = 0;
    peopleTouched = 0;
    groupsTouched = 0;
    settled = false;
    Arrays.fill(personTouched, false);
    Arrays.fill(groupTouched, false);
    hard = frameHard;
    strain = frameStrain;
    for (int p = 0; p < problem.people; p++) {
      priceOf(p);
      hard += personHard[p];
      strain += personStrain[p];
    }
    for (int g = 0; g < frame.groups; g++) {
      priceOfGroup(g);
      hard += groupHard[g];
      strain += groupStrain[g];
    }
    hardBefore = hard;
    strainBefore = strain;
  }

  private void priceOf(int person) {
    personRow.load(board, person);
    personHard[person] = book.hard(personRow);
    personStrain[person] = book.strain(personRow);
  }

  private void priceOfGroup(int group) {
    groupRow.load(board, group);
    groupHard[group] = book.hard(groupRow);
    groupStrain[group] = book.strain(groupRow);
  }

  public long hard() {
    return hard;
  }

  public long strain() {
    return strain;
  }

  public long personStrain(int person) {
    return personStrain[person];
  }

  public long personHard(int person) {
    return personHard[person];
  }

  public long groupHard(int group) {
    return groupHard[group];
  }

  public void seat(int seat, int group) {
    int before = board.seatGroup[seat];
    if (before == group) {
      return;
    }
    note(SEAT, seat, before);
    touchPerson(problem.seatPerson[seat]);
    if (before >= 0) {
      touchGroup(before);
    }
    if (group >= 0) {
      touchGroup(group);
    }
    board.seat(seat, group);
  }

  public void duty(int place, int person) {
    int before = board.placePerson[place];
    if (before == person) {
      return;
    }
    note(DUTY, place, before);
    touchGroup(frame.placeGroup[place]);
    if (before >= 0) {
      touchPerson(before);
    }
    if (person >= 0) {
      touchPerson(person);
    }
    board.duty(place, person);
  }

  private void note(int kind, int at, int before) {
    if (settled) {
      throw new IllegalStateException("Keep or undo the settled move before the next one");
    }
    if (ops == opKind.length) {
      opKind = Arrays.copyOf(opKind, ops * 2);
      opAt = Arrays.copyOf(opAt, ops * 2);
      opBefore = Arrays.copyOf(opBefore, ops * 2);
    }
    opKind[ops] = kind;
    opAt[ops] = at;
    opBefore[ops] = before;
    ops++;
  }

  private void touchPerson(int person) {
    if (!personTouched[person]) {
      personTouched[person] = true;
      touchedPeople[peopleTouched++] = person;
    }
  }

  private void touchGroup(int group) {
    if (!groupTouched[group]) {
      groupTouched[group] = true;
      touchedGroups[groupsTouched++] = group;
    }
  }

  /** Prices what the open move touched; {@link #hard()} and {@link #strain()} then hold it. */
  public void settle() {
    int at = 0;
    for (int i = 0; i < peopleTouched; i++, at++) {
      int person = touchedPeople[i];
      oldHard[at] = personHard[person];
      oldStrain[at] = personStrain[person];
      priceOf(person);
      hard += personHard[person] - oldHard[at];
      strain += personStrain[person] - oldStrain[at];
    }
    for (int i = 0; i < groupsTouched; i++, at++) {
      int group = touchedGroups[i];
      oldHard[at] = groupHard[group];
      oldStrain[at] = groupStrain[group];
      priceOfGroup(group);
      hard += groupHard[group] - oldHard[at];
      strain += groupStrain[group] - oldStrain[at];
    }
    settled = true;
  }

  /** What the settled move changed in the hard part. */
  public long hardChange() {
    return hard - hardBefore;
  }

  /** What the settled move changed in strain, in millionths. */
  public long strainChange() {
    return strain - strainBefore;
  }

  public void keep() {
    if (!settled) {
      settle();
    }
    clear();
  }

  public void undo() {
    for (int i = ops - 1; i >= 0; i--) {
      if (opKind[i] == SEAT) {
        board.seat(opAt[i], opBefore[i]);
      } else {
        board.duty(opAt[i], opBefore[i]);
      }
    }
    if (settled) {
      int at = 0;
      for (int i = 0; i < peopleTouched; i++, at++) {
        personHard[touchedPeople[i]] = oldHard[at];
        personStrain[touchedPeople[i]] = oldStrain[at];
      }
      for (int i = 0; i < groupsTouched; i++, at++) {
        groupHard[touchedGroups[i]] = oldHard[at];
        groupStrain[touchedGroups[i]] = oldStrain[at];
      }
      hard = hardBefore;
      strain = strainBefore;
    }
    clear();
  }

  private void clear() {
    for (int i = 0; i < peopleTouched; i++) {
      personTouched[touchedPeople[i]] = false;
    }
    for (int i = 0; i < groupsTouched; i++) {
      groupTouched[touchedGroups[i]] = false;
    }
    ops = 0;
    peopleTouched = 0;
    groupsTouched = 0;
    settled = false;
    hardBefore = hard;
    strainBefore = strain;
  }

  /**
   * A person's own price as the board now stands, open moves included: strain, and {@link
   * #BREACH_IN_TRIALS} for each breach.
   */
  public long priceNow(int person) {
    personRow.load(board, person);
    return book.hard(personRow) / RuleBook.BREACH * BREACH_IN_TRIALS + book.strain(personRow);
  }

  /** Whether one duty or another in a group can make a difference to a person's own price. */
  public boolean tellsRolesApart() {
    return book.hasKept();
  }

  /** Like {@link #priceNow}, with one commitment more. */
  public long priceWith(int person, int commitment) {
    board.add(person, commitment);
    long price = priceNow(person);
    board.drop(person, commitment);
    return price;
  }
}
