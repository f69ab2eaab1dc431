/** What a followed branch says of climates: its stretches, where each climate ends, and where there are several. */
import type { Kelvin } from '../si.ts';
import type { TraceReportBranch, TraceReportCase, TraceReportPoint } from './traceReport.ts';

/** Consecutive points, the input rising or falling throughout, all stable or all unstable but for the ends. */
export interface Stretch {
  readonly stable: boolean;
  /** The input rises from one to the next. */
  readonly points: readonly TraceReportPoint[];
}

/** A stable climate that is not there beyond an input. */
export interface ClimateEnd {
  /** The user's unit. */
  readonly value: number;
  readonly climate: 'warm' | 'cold';
  /** On which side of the value this climate is missing. */
  readonly missing: 'below' | 'above';
  /** Of the climate, where it ends. */
  readonly temperatureMean: Kelvin;
}

export interface InputRange {
  readonly from: number;
  readonly to: number;
}

/** Neighbouring stretches share a point. */
export function stretchesOf({ points }: TraceReportBranch): Stretch[] {
  const stretches: Stretch[] = [];
  for (let start = 0; start < points.length - 1; ) {
    let end = start + 1;
    while (end < points.length - 1 && continues(points, end)) end++;
    const own = points.slice(start, end + 1);
    // A fold is neither stable nor unstable: the stretch is what lies inside it.
    const stable = (own.find(({ fold }) => !fold) ?? own[0]!).stable;
    stretches.push({ stable, points: own[0]!.value <= own.at(-1)!.value ? own : own.toReversed() });
    start = end;
  }
  return stretches;
}

function continues(points: readonly TraceReportPoint[], at: number): boolean {
  const [before, here, after] = [points[at - 1]!, points[at]!, points[at + 1]!];
  if (here.fold || (here.value - before.value) * (after.value - here.value) < 0) return false;
  return after.fold || here.stable === after.stable;
}

/** Ascending in the input. A fold at which no stable climate ends is left out. */
export function climateEnds({ branches }: TraceReportCase): ClimateEnd[] {
  const ends = branches.flatMap(({ points }) => points.flatMap((_, at) => endAt(points, at)));
  return ends
    .toSorted((a, b) => a.value - b.value)
    .filter(({ value }, at, all) => at === 0 || Math.abs(value - all[at - 1]!.value) > 1e-6 * Math.abs(value));
}

function endAt(points: readonly TraceReportPoint[], at: number): ClimateEnd[] {
  const [before, here, after] = [points[at - 1], points[at]!, points[at + 1]];
  if (!here.fold || !before || !after || before.stable === after.stable) return [];
  const [stable, other] = before.stable ? [before, after] : [after, before];
  const climate = stable.temperatureMean > other.temperatureMean ? 'warm' : 'cold';
  const missing = stable.value > here.value ? 'below' : 'above';
  return [{ value: here.value, climate, missing, temperatureMean: here.temperatureMean }];
}

/** Ranges of the input in which more than one stable climate is there, ascending. */
export function severalClimates({ branches }: TraceReportCase): InputRange[] {
  const spans = branches
    .flatMap(stretchesOf)
    .filter(({ stable }) => stable)
    .map(({ points }) => ({ from: points[0]!.value, to: points.at(-1)!.value }));
  const marks = [...new Set(spans.flatMap(({ from, to }) => [from, to]))].toSorted((a, b) => a - b);
  const ranges: InputRange[] = [];
  for (const [at, from] of marks.slice(0, -1).entries()) {
    const to = marks[at + 1]!;
    const middle = from / 2 + to / 2;
    if (spans.filter((span) => span.from <= middle && middle <= span.to).length < 2) continue;
    const last = ranges.at(-1);
    if (last && last.to === from) ranges[ranges.length - 1] = { from: last.from, to };
    else ranges.push({ from, to });
  }
  return ranges;
}
