/** A computation of several tables, one after the other: which of them is under way, and what all of them will take. */

export interface Phase {
  /** From 1. */
  readonly number: number;
  readonly count: number;
  /** Rows of the tables that come after it. */
  readonly rowsAfter: number;
  /**
   * Told once a computation, where all of it will take long: from the rows of a second to what is said. Rows of all tables are taken
   * to cost the same; null where it has been said, or is not worth saying.
   */
  warning(rowsLeft: number, rowsPerSecond: number): string | null;
}

export interface PhaseTable {
  readonly name: string;
  readonly rows: number;
}

/** Longer than a pause for coffee: whoever waits wants to know, and how to make it shorter. */
const longSeconds = 600;

/** `shorten`: what makes it shorter, in the imperative. `words`: how a duration reads. */
export function phasesOf(
  tables: readonly PhaseTable[],
  shorten: string,
  words: (seconds: number) => string,
): readonly Phase[] {
  let isSaid = false;
  return tables.map(({ name, rows }, i) => {
    const after = tables.slice(i + 1);
    const rowsAfter = after.reduce((sum, table) => sum + table.rows, 0);
    return {
      number: i + 1,
      count: tables.length,
      rowsAfter,
      warning(rowsLeft, rowsPerSecond) {
        const seconds = (rowsLeft + rowsAfter) / rowsPerSecond;
        if (isSaid || !(seconds > longSeconds)) return null;
        isSaid = true;
        const each = [{ name, rows: Math.min(rows, rowsLeft) }, ...after];
        const parts = each.map((table) => `${table.name} ${words(table.rows / rowsPerSecond)}`).join(', ');
        const detail = each.length > 1 ? ` (${parts})` : '';
        return `This will take about ${words(seconds)} more${detail}. ${shorten} Ctrl-C keeps what is done.`;
      },
    };
  });
}
