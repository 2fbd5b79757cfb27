package roundwright.scheduling.flow;

import java.util.Arrays;

/**
 * The least-cost transportation of rows to columns: each row takes one column or stays out, each
 * column takes rows at a cost that may rise with their number. Solved by successive shortest
 * augmenting paths (Ford and Fulkerson 1962; Busacker and Gowen 1961) over the columns alone, since
 * between two columns only the row that moves most cheaply matters: with n rows and k columns, n
 * paths of at most k arcs each, found by label correction (Bellman 1958).
 *
 * <p>A solver is made for its largest size and used over and over; not thread-safe. Layout: costs
 * by row, {@code cost[row * columns + column]}; what a row outside adds by entering, by column,
 * since the cheapest of them is looked for down a column again and again.
 */
public final class Transport {
  /** A cost that no solution may contain. */
  public static final long FORBIDDEN = Long.MAX_VALUE / 8;

  private static final int OUT = -1;
  private static final int UNKNOWN = -2;

  private int rows;
  private int columns;
  private long[] cost = new long[0];
  private long[] outCost = new long[0];
  private long[] entryCost = new long[0];
  private long[][] unitCost = new long[0][];
  private int[] used = new int[0];
  private int[] column = new int[0];
  private long[] best = new long[0];
  private int[] bestRow = new int[0];
  private int[] cheapest = new int[0];
  private long[] cheapestCost = new long[0];
  private long[] distance = new long[0];
  private int[] via = new int[0];
  private int[][] inColumn = new int[0][];
  private int[] rowAt = new int[0];
  private long total;

  /**
   * Begins a new problem.
   *
   * @throws IllegalArgumentException where a size is negative
   */
  public void begin(int rowCount, int columnCount) {
    if (rowCount < 0 || columnCount < 0) {
      throw new IllegalArgumentException("Sizes " + rowCount + " and " + columnCount);
    }
    rows = rowCount;
    columns = columnCount;
    if (cost.length < rows * columns) {
      cost = new long[rows * columns];
    }
    if (outCost.length < rows) {
      outCost = new long[rows];
      column = new int[rows];
      rowAt = new int[rows];
    }
    if (used.length < columns) {
      used = new int[columns];
      unitCost = new long[columns][];
      distance = new long[columns];
      via = new int[columns];
      cheapest = new int[columns];
      cheapestCost = new long[columns];
      inColumn = new int[columns][];
      best = new long[columns * columns];
      bestRow = new int[columns * columns];
    }
  }

  public void cost(int row, int toColumn, long value) {
    cost[row * columns + toColumn] = value;
  }

  /** What it costs to leave a row out; {@link #FORBIDDEN} where it must take a column. */
  public void outCost(int row, long value) {
    outCost[row] = Math.min(value, FORBIDDEN / 4);
  }

  /** The cost of each further row that a column takes, not falling; its length is the capacity. */
  public void units(int ofColumn, long[] costs) {
    unitCost[ofColumn] = costs;
  }

  /** Solves; afterwards {@link #columnOf} and {@link #total} hold a least-cost solution. */
  public void solve() {
    Arrays.fill(used, 0, columns, 0);
    Arrays.fill(column, 0, rows, OUT);
    total = 0;
    for (int row = 0; row < rows; row++) {
      total += outCost[row];
    }
    for (int c = 0; c < columns; c++) {
      cheapest[c] = UNKNOWN;
      if (inColumn[c] == null || inColumn[c].length < unitCost[c].length) {
        inColumn[c] = new int[unitCost[c].length];
      }
      Arrays.fill(best, c * columns, (c + 1) * columns, FORBIDDEN);
    }
    layOutEntries();
    boolean cheaper = true;
    while (cheaper) {
      cheaper = augment();
    }
  }

  private void layOutEntries() {
    if (entryCost.length < rows * columns) {
      entryCost = new long[rows * columns];
    }
    for (int row = 0; row < rows; row++) {
      for (int c = 0; c < columns; c++) {
        long there = cost[row * columns + c];
        entryCost[c * rows + row] = there < FORBIDDEN ? there - outCost[row] : FORBIDDEN;
      }
    }
  }

  private boolean augment() {
    for (int c = 0; c < columns; c++) {
      distance[c] = entry(c);
      via[c] = OUT;
    }
    correctLabels();
    int last = OUT;
    long least = 0;
    for (int c = 0; c < columns; c++) {
      if (used[c] < unitCost[c].length && distance[c] < FORBIDDEN) {
        long whole = distance[c] + unitCost[c][used[c]];
        if (whole < least) {
          least = whole;
          last = c;
        }
      }
    }
    if (last == OUT) {
      return false;
    }
    total += least;
    push(last);
    return true;
  }

  /** What the cheapest row outside adds by entering a column; it is kept until it is taken. */
  private long entry(int c) {
    if (cheapest[c] == UNKNOWN || (cheapest[c] != OUT && column[cheapest[c]] != OUT)) {
      cheapest[c] = OUT;
      cheapestCost[c] = FORBIDDEN;
      for (int row = 0, at = c * rows; row < rows; row++, at++) {
        if (entryCost[at] < cheapestCost[c]) {
          cheapestCost[c] = entryCost[at];
          cheapest[c] = row;
        }
      }
    }
    return cheapestCost[c];
  }

  private void correctLabels() {
    boolean changed = true;
    while (changed) {
      changed = false;
      for (int a = 0; a < columns; a++) {
        if (distance[a] >= FORBIDDEN || used[a] == 0) {
          continue;
        }
        for (int b = 0; b < columns; b++) {
          long arc = best[a * columns + b];
          if (arc < FORBIDDEN && distance[a] + arc < distance[b]) {
            distance[b] = distance[a] + arc;
            via[b] = a;
            changed = true;
          }
        }
      }
    }
  }

  private void push(int last) {
    int position = used[last]++;
    int c = last;
    while (via[c] != OUT) {
      int from = via[c];
      int row = bestRow[from * columns + c];
      int vacated = rowAt[row];
      place(row, c, position);
      position = vacated;
      c = from;
    }
    int entered = cheapest[c];
    place(entered, c, position);
    for (int other = 0; other < columns; other++) {
      entryCost[other * rows + entered] = FORBIDDEN;
    }
    for (c = last; c != OUT; c = via[c]) {
      refresh(c);
    }
  }

  private void place(int row, int c, int at) {
    column[row] = c;
    inColumn[c][at] = row;
    rowAt[row] = at;
  }

  private void refresh(int a) {
    Arrays.fill(best, a * columns, (a + 1) * columns, FORBIDDEN);
    for (int i = 0; i < used[a]; i++) {
      int row = inColumn[a][i];
      long here = cost[row * columns + a];
      for (int b = 0; b < columns; b++) {
        long there = cost[row * columns + b];
        if (b != a && there < FORBIDDEN && there - here < best[a * columns + b]) {
          best[a * columns + b] = there - here;
          bestRow[a * columns + b] = row;
        }
      }
    }
  }

  /** The column a row takes, or -1 where it stays out. */
  public int columnOf(int row) {
    return column[row];
  }

  public int used(int ofColumn) {
    return used[ofColumn];
  }

  /** The cost of the solution: columns taken, their units, and rows left out. */
  public long total() {
    return total;
  }

  /**
   * Dual prices: what one more row in a column would cost. They prove the solution least, since for
   * any prices the sum over rows of their cheapest choice at those prices, less what the columns
   * then take in, is no more than the cost of any solution, and at these it is {@link #total}.
   *
   * @return by column
   */
  public long[] prices() {
    long[] price = new long[columns];
    for (int c = 0; c < columns; c++) {
      price[c] = used[c] < unitCost[c].length ? unitCost[c][used[c]] : FORBIDDEN;
      for (int i = 0; i < used[c]; i++) {
        int row = inColumn[c][i];
        price[c] = Math.min(price[c], outCost[row] - cost[row * columns + c]);
      }
    }
    boolean changed = true;
    while (changed) {
      changed = false;
      for (int a = 0; a < columns; a++) {
        for (int b = 0; b < columns; b++) {
          long arc = best[a * columns + b];
          if (arc < FORBIDDEN && arc + price[b] < price[a]) {
            price[a] = arc + price[b];
            changed = true;
          }
        }
      }
    }
    return price;
  }
}
