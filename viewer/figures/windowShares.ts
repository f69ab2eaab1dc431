/** Windows as rows of a chart: which share of the time each case spends inside, and when. Pure. */
import type { Dataset } from '../../sim/dataset/dataset.ts';
import type { Window } from '../../sim/world.ts';
import { type Column, columnName, finding, findingValue, periodOf } from '../words/columns.ts';
import { orbitSpan, type Span, wholeSpan } from './orbitSpan.ts';
import { values } from './variables.ts';
import { type Stretch, stretchesBetween } from './windowSpans.ts';

export interface WindowRow {
  /** A case; null where every case has this one row. */
  readonly column: Column | null;
  readonly name: string;
  /** Null with its reason where the window cannot be evaluated. */
  readonly share: number | null;
  readonly reason: string | null;
  /** Of what the share is of, s. */
  readonly whole: number;
  /** As shares of the orbit from periapsis (−¼ … ¾), or of a run from its start (0 … 1). */
  readonly stretches: readonly Stretch[];
  /** Whether the orbit-mean instellation lies inside; null for windows of temperature. */
  readonly meanInside: boolean | null;
}

export interface WindowBlock {
  readonly window: Window;
  /** False where cases give the same name to other limits; the window's are then those of the first. */
  readonly isSame: boolean;
  readonly rows: readonly WindowRow[];
}

/** One block a window in the order of the file; all columns are periodic, or none. */
export function windowBlocks(columns: readonly Column[]): WindowBlock[] {
  const names = [...new Set(columns.flatMap(({ windows }) => windows.map(({ name }) => name)))];
  return names.map((name) => {
    const owners = columns.flatMap((column) => {
      const window = column.windows.find((one) => one.name === name);
      return window === undefined ? [] : [{ column, window }];
    });
    const { window } = owners[0]!;
    const isSame = owners.every(({ window: other }) => sameLimits(window, other));
    const rows = owners.map((owner) => rowOf(owner.column, owner.window));
    const isPlain = window.of === 'instellation' || rows.every(({ share }) => share === 0 || share === 1);
    const isCommon = isPlain && isSame && owners.length === columns.length && allAgree(rows);
    return { window, isSame, rows: isCommon && rows.length > 1 ? [{ ...rows[0]!, column: null, name: '' }] : rows };
  });
}

function rowOf(column: Column, window: Window): WindowRow {
  const found = finding(column, `fractionInWindow.${window.name}`);
  const share = found?.value ?? null;
  const mean = findingValue(column, `orbitMeanInWindow.${window.name}`);
  const span = column.isForwardRun ? wholeSpan(column.dataset) : orbitSpan(column.dataset, periodOf(column));
  const whole = column.isForwardRun ? span.time.at(-1)! - span.time[0]! : periodOf(column);
  return {
    column,
    name: columnName(column),
    share,
    reason: share === null ? (found?.reason ?? 'not computed') : null,
    whole,
    stretches: share === null ? [] : stretchesOf(column.dataset, span, window, whole),
    meanInside: mean === null ? null : mean === 1,
  };
}

function stretchesOf(dataset: Dataset, span: Span, window: Window, whole: number): Stretch[] {
  const data = values(dataset, window.of === 'temperature' ? 'temperature' : 'instellation');
  const [first, last] = [-0.25 * whole, 0.75 * whole];
  const isOrbit = span.time[0]! < 0;
  const stretches = stretchesBetween(data, span, window);
  return stretches
    .map(({ from, to }) => (isOrbit ? { from: Math.max(first, from), to: Math.min(last, to) } : { from, to }))
    .filter(({ from, to }) => to > from)
    .map(({ from, to }) => ({ from: from / whole, to: to / whole }));
}

function sameLimits(a: Window, b: Window): boolean {
  return a.of === b.of && near(a.from, b.from) && near(a.to, b.to) && a.unavailable === b.unavailable;
}

function near(a: number, b: number): boolean {
  return a === b || Math.abs(a - b) <= 1e-9 * Math.max(Math.abs(a), Math.abs(b));
}

/** Rounding does not make another row of the same time. */
function allAgree([first, ...rest]: readonly WindowRow[]): boolean {
  return rest.every(
    (row) =>
      near(row.whole, first!.whole) &&
      row.reason === first!.reason &&
      Math.abs((row.share ?? 0) - (first!.share ?? 0)) < 1e-9 &&
      row.meanInside === first!.meanInside,
  );
}
