package roundwright.scheduling.flow;

import java.util.Arrays;

/**
 * The least-cost assignment of rows to columns, each row to one column and each column to one row
 * at most, by shortest augmenting paths with dual prices (Kuhn 1955; Tomizawa 1971): for n rows and
 * m columns at most n * n * m steps. Made for its largest size and used over and over; not
 * thread-safe. Layout: costs by row, {@code cost[row * columns + column]}.
 */
public final class Assignment {
  private static final long FAR = Long.MAX_VALUE / 4;

  private int rows;
  private int columns;
  private int[] cost = new int[0];
  private long[] rowPrice = new long[0];
  private long[] columnPrice = new long[0];
  private long[] distance = new long[0];
  private int[] via = new int[0];
  private boolean[] done = new boolean[0];
  private int[] rowOf = new int[0];
  private int[] columnOf = new int[0];

  /**
   * Begins a new problem.
   *
   * @throws IllegalArgumentException where there are more rows than columns
   */
  public void begin(int rowCount, int columnCount) {
    if (rowCount > columnCount) {
      throw new IllegalArgumentException(rowCount + " rows for " + columnCount + " columns");
    }
    rows = rowCount;
    columns = columnCount;
    if (cost.length < rows * columns) {
      cost = new int[rows * columns];
    }
    if (rowPrice.length < rows) {
      rowPrice = new long[rows];
      columnOf = new int[rows];
    }
    if (columnPrice.length < columns) {
      columnPrice = new long[columns];
      distance = new long[columns];
      via = new int[columns];
      done = new boolean[columns];
      rowOf = new int[columns];
    }
  }

  public void cost(int row, int column, int value) {
    cost[row * columns + column] = value;
  }

  /** Solves; afterwards {@link #columnOf} holds a least-cost assignment. */
  public void solve() {
    Arrays.fill(rowOf, 0, columns, -1);
    Arrays.fill(rowPrice, 0, rows, 0);
    Arrays.fill(columnPrice, 0, columns, 0);
    for (int row = 0; row < rows; row++) {
      augment(row);
    }
    for (int column = 0; column < columns; column++) {
      if (rowOf[column] >= 0) {
        columnOf[rowOf[column]] = column;
      }
    }
  }

  /** Shortest path from a row to a column without one (Dijkstra 1959 on reduced costs). */
  private void augment(int start) {
    Arrays.fill(distance, 0, columns, FAR);
    Arrays.fill(done, 0, columns, false);
    Arrays.fill(via, 0, columns, -1);
    int row = start;
    int reached = -1;
    long far = 0;
    while (true) {
      int nearest = -1;
      for (int column = 0; column < columns; column++) {
        if (done[column]) {
          continue;
        }
        long there = far + cost[row * columns + column] - rowPrice[row] - columnPrice[column];
        if (there < distance[column]) {
          distance[column] = there;
          via[column] = reached;
        }
        if (nearest < 0 || distance[column] < distance[nearest]) {
          nearest = column;
        }
      }
      far = distance[nearest];
      reached = nearest;
      done[nearest] = true;
      if (rowOf[nearest] < 0) {
        break;
      }
      row = rowOf[nearest];
    }
    reprice(start, far);
    while (reached >= 0) {
      int before = via[reached];
      rowOf[reached] = before < 0 ? start : rowOf[before];
      reached = before;
    }
  }

  private void reprice(int start, long far) {
    rowPrice[start] += far;
    for (int column = 0; column < columns; column++) {
      if (done[column] && distance[column] < far) {
        columnPrice[column] += distance[column] - far;
        rowPrice[rowOf[column]] += far - distance[column];
      }
    }
  }

  /** The column of a row. */
  public int columnOf(int row) {
    return columnOf[row];
  }
}
