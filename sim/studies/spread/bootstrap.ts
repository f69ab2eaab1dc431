/** How often each row is drawn when as many rows are drawn again with replacement: Efron (1979) Ann. Stat. 7, 1. */
import { purposes, randomWords } from './pseudoRandom.ts';

export interface Resamples {
  readonly rows: number;
  readonly replicates: number;
  /** (replicates · rows,), replicate by replicate: how often the row was drawn. */
  readonly counts: Float64Array;
}

/** Depends on nothing but its arguments. Errors: SimError for a seed that is not whole or not in [0, 2⁵³). */
export function resamples(rows: number, seed: number, replicates = 200): Resamples {
  const fill = randomWords(seed, purposes.bootstrap);
  const words = new Uint32Array(4);
  const counts = new Float64Array(replicates * rows);
  for (let replicate = 0; replicate < replicates; replicate++) {
    for (let drawn = 0; drawn < rows; drawn++) {
      if (drawn % 4 === 0) fill(drawn / 4, replicate, words);
      counts[replicate * rows + Math.floor((words[drawn % 4] * rows) / 2 ** 32)]++;
    }
  }
  return { rows, replicates, counts };
}

/**
 * Sums of every column in every resample: out[replicate · columns + column] = Σ_row counts · column[row].
 * Shape:  columns each (rows,) → (replicates · columns.length,).
 */
export function resampledSums(again: Resamples, columns: readonly Float64Array[]): Float64Array {
  const sums = new Float64Array(again.replicates * columns.length);
  for (let first = 0; first < columns.length; first += 4) {
    const packed = packFour(columns, first, again.rows);
    for (let replicate = 0; replicate < again.replicates; replicate += 2) {
      const pair = [replicate, Math.min(replicate + 1, again.replicates - 1)] as const;
      const found = sumsOfFour(again, packed, pair);
      for (let column = first; column < Math.min(first + 4, columns.length); column++) {
        sums[pair[0] * columns.length + column] = found[column - first];
        sums[pair[1] * columns.length + column] = found[4 + column - first];
      }
    }
  }
  return sums;
}

/** Four columns side by side, row by row; zeros where there are fewer. */
function packFour(columns: readonly Float64Array[], first: number, rows: number): Float64Array {
  const packed = new Float64Array(4 * rows);
  columns.slice(first, first + 4).forEach((column, place) => {
    for (let row = 0; row < rows; row++) packed[4 * row + place] = column[row];
  });
  return packed;
}

/** Of two resamples at once, eight sums in all: none waits for the additions of another. */
function sumsOfFour(
  { rows, counts }: Resamples,
  packed: Float64Array,
  [one, two]: readonly [number, number],
): number[] {
  const from1 = one * rows;
  const from2 = two * rows;
  let a0 = 0;
  let a1 = 0;
  let a2 = 0;
  let a3 = 0;
  let b0 = 0;
  let b1 = 0;
  let b2 = 0;
  let b3 = 0;
  for (let row = 0, at = 0; row < rows; row++, at += 4) {
    const count1 = counts[from1 + row];
    const count2 = counts[from2 + row];
    const x0 = packed[at];
    const x1 = packed[at + 1];
    const x2 = packed[at + 2];
    const x3 = packed[at + 3];
    a0 += count1 * x0;
    a1 += count1 * x1;
    a2 += count1 * x2;
    a3 += count1 * x3;
    b0 += count2 * x0;
    b1 += count2 * x1;
    b2 += count2 * x2;
    b3 += count2 * x3;
  }
  return [a0, a1, a2, a3, b0, b1, b2, b3];
}
