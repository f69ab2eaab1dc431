/** Which rows to compute next: the parts that are missing, in chunks that take about the time wished for. */
import { groupRows, type Range } from './job.ts';

/** Long enough that handing them over costs nothing, short enough that little is lost and Ctrl-C is soon obeyed. */
const wishedSeconds = 0.5;
/** Below this, cutting smaller so that all workers end together no longer pays. */
const leastSeconds = 0.05;
const growth = 8;

/** Shard `index` of `count`, from 1. */
export interface Shard {
  readonly index: number;
  readonly count: number;
}

/** Rows of one shard: as near to equal parts as whole rows allow. */
export function shardRange(rows: number, { index, count }: Shard): Range {
  return { from: Math.floor(((index - 1) * rows) / count), to: Math.floor((index * rows) / count) };
}

/** What of `whole` no range in `present` covers, in order. */
export function missing(whole: Range, present: readonly Range[]): readonly Range[] {
  const gaps: Range[] = [];
  let from = whole.from;
  for (const range of present.toSorted((a, b) => a.from - b.from)) {
    if (range.from > from) gaps.push({ from, to: Math.min(range.from, whole.to) });
    from = Math.max(from, range.to);
  }
  if (from < whole.to) gaps.push({ from, to: whole.to });
  return gaps.filter((gap) => gap.from < gap.to);
}

/**
 * Ranges that stand alone, in order: of those that overlap, the one that begins first, and the longer where two begin together.
 * Whatever is computed of the gaps then, the same ones are taken again.
 */
export function withoutOverlaps(ranges: readonly Range[]): readonly Range[] {
  const taken: Range[] = [];
  for (const range of ranges.toSorted((a, b) => a.from - b.from || b.to - a.to))
    if (range.from >= (taken.at(-1)?.to ?? 0)) taken.push(range);
  return taken;
}

export function countRows(ranges: readonly Range[]): number {
  return ranges.reduce((sum, { from, to }) => sum + to - from, 0);
}

export interface Plan {
  /** The next chunk, or null when all are given out. Never over the edge of a row group. `share` of the time wished for. */
  next(share?: number): Range | null;
  /** How long some rows took: the next chunks are measured by it. */
  took(range: Range, seconds: number): void;
  /** How long what is not given out would take one worker, by the last chunk; Infinity before the first. */
  secondsLeft(): number;
}

/** A first chunk of one row, then up to eight times as many as were seen to go well, towards the time wished for. */
export function planChunks(gaps: readonly Range[], workers: number): Plan {
  const queue = gaps.map((gap) => ({ ...gap }));
  let left = countRows(gaps);
  let seen = 0;
  let secondsPerRow = Infinity;
  const size = (share: number) => {
    if (seen === 0) return 1;
    const wished = (share * wishedSeconds) / secondsPerRow;
    const fair = Math.max(left / (2 * workers), leastSeconds / secondsPerRow);
    return Math.max(1, Math.floor(Math.min(growth * seen, wished, fair, groupRows)));
  };
  return {
    next: (share = 1) => {
      const gap = queue[0];
      if (gap === undefined) return null;
      const { from } = gap;
      const to = Math.min(from + size(share), gap.to, (Math.floor(from / groupRows) + 1) * groupRows);
      left -= to - from;
      gap.from = to;
      if (gap.from === gap.to) queue.shift();
      return { from, to };
    },
    took: ({ from, to }, seconds) => {
      seen = Math.max(seen, to - from);
      secondsPerRow = Math.max(seconds, 1e-9) / (to - from);
    },
    secondsLeft: () => (left === 0 ? 0 : left * secondsPerRow),
  };
}
