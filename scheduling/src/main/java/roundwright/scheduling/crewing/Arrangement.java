package roundwright.scheduling.crewing;

import roundwright.scheduling.core.Board;
import roundwright.scheduling.core.Frame;
import roundwright.scheduling.rules.Ledger;

/** Who is where over a frame, with its price: what a search hands on. Immutable. */
public final class Arrangement implements Comparable<Arrangement> {
  public final Frame frame;

  /** Breaches and gaps as {@link roundwright.scheduling.rules.RuleBook} adds them. */
  public final long hard;

  /** In millionths. */
  public final long strain;

  private final int[] seatGroup;
  private final int[] placePerson;

  private Arrangement(Frame frame, long hard, long strain, int[] seatGroup, int[] placePerson) {
    this.frame = frame;
    this.hard = hard;
    this.strain = strain;
    this.seatGroup = seatGroup;
    this.placePerson = placePerson;
  }

  /** What a ledger's board stands at, with its price. */
  public static Arrangement of(Ledger ledger) {
    return new Arrangement(
        ledger.frame,
        ledger.hard(),
        ledger.strain(),
        ledger.board.seatGroup.clone(),
        ledger.board.placePerson.clone());
  }

  /** The group of a seat, or -1. */
  public int groupOf(int seat) {
    return seatGroup[seat];
  }

  /** The person in a place, or -1. */
  public int personAt(int place) {
    return placePerson[place];
  }

  /** A board that stands as this does. */
  public Board board() {
    Board board = new Board(frame);
    for (int seat = 0; seat < seatGroup.length; seat++) {
      if (seatGroup[seat] >= 0) {
        board.seat(seat, seatGroup[seat]);
      }
    }
    for (int place = 0; place < placePerson.length; place++) {
      if (placePerson[place] >= 0) {
        board.duty(place, placePerson[place]);
      }
    }
    return board;
  }

  @Override
  public int compareTo(Arrangement other) {
    int byHard = Long.compare(hard, other.hard);
    return byHard != 0 ? byHard : Long.compare(strain, other.strain);
  }

  @Override
  public boolean equals(Object other) {
    return other instanceof Arrangement that
        && hard == that.hard
        && strain == that.strain
        && java.util.Arrays.equals(seatGroup, that.seatGroup)
        && java.util.Arrays.equals(placePerson, that.placePerson);
  }

  @Override
  public int hashCode() {
    return Long.hashCode(hard * 31 + strain);
  }
}
