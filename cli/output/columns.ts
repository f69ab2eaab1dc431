/** The columns of the table, a state of a case each; and the unit of time that suits them. */
import { secondsPerDay, secondsPerYear } from '../../sim/constants.ts';
import type { Finding } from '../../sim/findings/finding.ts';
import type { State } from '../../sim/models/model.ts';
import type { CaseResult, RunResult } from '../../sim/run.ts';

export interface Column {
  readonly result: CaseResult;
  readonly state: State;
  readonly heading: string;
}

export interface TimeUnit {
  readonly symbol: string;
  readonly plural: string;
  readonly seconds: number;
}

const hour: TimeUnit = { symbol: 'h', plural: 'hours', seconds: 3600 };
const day: TimeUnit = { symbol: 'd', plural: 'days', seconds: secondsPerDay };
const year: TimeUnit = { symbol: 'yr', plural: 'years', seconds: secondsPerYear };

export function columnsOf(result: RunResult): readonly Column[] {
  return result.cases.flatMap((item) =>
    item.states.map((state) => ({ result: item, state, heading: headingOf(item, state) })),
  );
}

/** The case's name, and which of its states where there is a choice; a cold one without its warm one is told, too. */
function headingOf({ name, states }: CaseResult, { label, stable }: State): string {
  const tags = [
    ...(states.length > 1 || label === 'forward' || label === 'cold' ? [label] : []),
    ...(stable === false ? ['unstable'] : []),
  ];
  return tags.length === 0 ? name : `${name} (${tags.join(', ')})`;
}

/** A run from a start, not a periodic state. */
export function isForward({ label }: State): boolean {
  return label === 'forward';
}

/** Whether the model has latitudes, so that its other numbers are means over the area. */
export function hasLatitudes({ dataset }: Pick<State, 'dataset'>): boolean {
  return 'latitude' in dataset.variables;
}

export function findingOf(state: State, name: string): Finding | undefined {
  return state.findings.find((finding) => finding.name === name);
}

/** Length of the orbit, s: every model gives it. */
export function periodOf({ state, heading }: Pick<Column, 'state' | 'heading'>): number {
  const period = findingOf(state, 'period')?.value;
  if (period === null || period === undefined) throw new Error(`${heading}: the model gave no period`);
  return period;
}

/** Decimals of a time in a unit: about a ten-thousandth of the orbit. */
export function timeDecimals(column: Pick<Column, 'state' | 'heading'>, { seconds }: TimeUnit): number {
  return Math.max(0, Math.min(6, 4 - Math.floor(Math.log10(periodOf(column) / seconds))));
}

/** Hours for orbits under five days, years for those over a thousand. */
export function timeUnitFor(period: number): TimeUnit {
  if (period < 5 * day.seconds) return hour;
  return period > 1000 * day.seconds ? year : day;
}

/** One unit for all columns, from the middle of their periods. */
export function commonTimeUnit(columns: readonly Column[]): TimeUnit {
  const periods = columns.map(periodOf).toSorted((a, b) => a - b);
  return timeUnitFor(periods[Math.floor(periods.length / 2)]!);
}
