/** Round numbers for axes. */

/** Steps that a reader counts in; every second one is labelled. */
const niceSteps = [1, 2, 2.5, 5, 10, 20];

export interface RowScale {
  /** Value at the middle of the lowest row. */
  readonly lowest: number;
  readonly step: number;
  readonly rows: number;
}

/** Rows of equal round height that hold low…high, at most `mostRows` of them. A flat curve gets three rows. */
export function rowScale(low: number, high: number, mostRows: number): RowScale {
  const needed = Math.max((high - low) / (mostRows - 1), Math.max(Math.abs(high), 1) * 1e-4);
  const decade = 10 ** Math.floor(Math.log10(needed));
  for (const step of niceSteps) {
    const height = step * decade;
    const lowest = Math.round(low / height);
    const rows = Math.round(high / height) - lowest + 1;
    if (height >= needed * 0.999 && rows <= mostRows) {
      const padding = rows < 3 ? 1 : 0;
      return { lowest: (lowest - padding) * height, step: height, rows: rows + 2 * padding };
    }
  }
  throw new RangeError(`no scale from ${low} to ${high} in ${mostRows} rows`);
}

/** Round values from low to high, at most `most` of them and at least one where the range holds a round value. */
export function ticks(low: number, high: number, most: number): number[] {
  const needed = (high - low) / Math.max(1, most);
  const decade = 10 ** Math.floor(Math.log10(needed));
  const step = [1, 2, 5, 10].map((nice) => nice * decade).find((nice) => nice >= needed * 0.999)!;
  const first = Math.ceil(low / step - 1e-9);
  const last = Math.floor(high / step + 1e-9);
  return Array.from({ length: last - first + 1 }, (_, index) => Number(((first + index) * step).toPrecision(12)));
}

/** As many decimals as the step needs, and no minus zero. */
export function tickText(value: number, step: number): string {
  const [, decimals = ''] = String(Number(step.toPrecision(6))).split('.');
  return value.toFixed(Math.min(decimals.length, 20)).replace(/^-(0\.?0*)$/, '$1');
}
