/** The table of cases: the numbers that people quote, each beside the steady value. Same rows as on the terminal. Pure. */
import type { Finding } from '../../sim/findings/finding.ts';
import type { Window } from '../../sim/world.ts';
import { type Column, commonTimeUnit, finding, findingValue, periodOf } from './columns.ts';
import { fixed, nbsp, percent, significant, type TimeUnit, timeDecimals, withUnit } from './number.ts';

/** One number as the table shows it. `text` is a dash where there is none, and `reason` says why. */
export interface Cell {
  readonly text: string;
  /** True where the numerical error reaches the last digit shown, and stands in the text. */
  readonly hasError?: boolean;
  readonly reason?: string;
  /** The same quantity of the instantaneous steady value, where it has one. */
  readonly steady?: string;
}

export interface TableRow {
  readonly label: string;
  /** One a column of the run. */
  readonly cells: readonly Cell[];
}

export function caseTable(columns: readonly Column[]): TableRow[] {
  const unit = commonTimeUnit(columns);
  const row = (label: string, cell: (column: Column) => Cell): TableRow => ({ label, cells: columns.map(cell) });
  return [
    row('Textbook equilibrium temperature', (column) => temperature(column, 'equilibriumTemperature')),
    row('Mean temperature', (column) => besideSteady(column, 'temperatureMean', 'steadyTemperatureMean')),
    row('Maximum temperature', (column) => besideSteady(column, 'temperatureMax', 'steadyTemperatureMax')),
    row('Minimum temperature', (column) => besideSteady(column, 'temperatureMin', 'steadyTemperatureMin')),
    ...timeOfMaxRows(columns, unit),
    row('Lag of the maximum behind the steady maximum', (column) => time(column, 'lagOfMax', unit)),
    row('Damping: swing over steady swing', (column) => ratio(column, 'damping', 1)),
    row('Radiative time constant, in orbits', (column) => ratio(column, 'radiativeTimeConstant', periodOf(column))),
    ...windowsOf(columns).map((window) => row(shareLabel(window), (column) => share(column, window.name))),
    ...meanWindows(columns).map(({ name }) =>
      row(`Orbit-mean instellation in “${name}”`, (column) => meanInside(column, name)),
    ),
    ...(hasSeveralStates(columns) ? [row('Stability margin (0: tips over, below 0: unstable)', margin)] : []),
  ];
}

/** True where every column has the same steady values, so that one column can show them for all. */
export function steadyIsShared(rows: readonly TableRow[]): boolean {
  return rows.every(({ cells }) => cells.every(({ steady }) => steady === cells[0]!.steady));
}

function temperature(column: Column, name: string): Cell {
  return numberCell(finding(column, name), (value) => ({ value, unit: 'K', decimals: 2 }));
}

function besideSteady(column: Column, name: string, steadyName: string): Cell {
  const steady = findingValue(column, steadyName);
  const cell = temperature(column, name);
  return steady === null ? cell : { ...cell, steady: temperature(column, steadyName).text };
}

function time(column: Column, name: string, unit: TimeUnit): Cell {
  const decimals = timeDecimals(periodOf(column), unit);
  return numberCell(finding(column, name), (value) => ({ value: value / unit.seconds, unit: unit.symbol, decimals }));
}

function ratio(column: Column, name: string, divisor: number): Cell {
  const found = finding(column, name);
  if (found === undefined || found.value === null) return without(found);
  return { text: significant(found.value / divisor, 3) };
}

function share(column: Column, name: string): Cell {
  const found = finding(column, `fractionInWindow.${name}`);
  if (found === undefined) return { text: '—', reason: 'this case has no such window' };
  return found.value === null ? without(found) : { text: percent(found.value) };
}

function meanInside(column: Column, name: string): Cell {
  const found = finding(column, `orbitMeanInWindow.${name}`);
  if (found === undefined || found.value === null) return without(found);
  return { text: found.value === 1 ? 'yes' : 'no' };
}

function margin({ state, stateName }: Column): Cell {
  if (stateName === null || state.stabilityMargin === null) return { text: '—', reason: 'one state only' };
  return { text: significant(state.stabilityMargin, 3) };
}

interface Shown {
  readonly value: number;
  readonly unit: string;
  readonly decimals: number;
}

/** Fixed decimals; where the error reaches the last digit, fewer of them and the error beside. */
function numberCell(found: Finding | undefined, show: (value: number) => Shown): Cell {
  if (found === undefined || found.value === null) return without(found);
  const { value, unit, decimals } = show(found.value);
  const error = show(found.plusMinus ?? 0).value;
  if (error < 0.5 * 10 ** -decimals) return { text: withUnit(fixed(value, decimals), unit) };
  const kept = Math.max(0, Math.min(decimals, 1 - Math.floor(Math.log10(error))));
  const text = `${fixed(value, kept)} ±${nbsp}${fixed(roundedUp(error, kept), kept)}`;
  return { text: withUnit(text, unit), hasError: true };
}

function without(found: Finding | undefined): Cell {
  return { text: '—', reason: found ? (found.reason ?? 'not defined') : 'not computed' };
}

/** An error bound must not shrink by rounding. */
function roundedUp(value: number, decimals: number): number {
  const unit = 10 ** -decimals;
  return Math.ceil(value / unit - 1e-9) * unit;
}

function windowsOf(columns: readonly Column[]): Window[] {
  return [...new Map(columns.flatMap(({ windows }) => windows.map((window) => [window.name, window]))).values()];
}

function meanWindows(columns: readonly Column[]): Window[] {
  return windowsOf(columns).filter(({ name }) =>
    columns.some((column) => finding(column, `orbitMeanInWindow.${name}`)),
  );
}

/** The instellation of a moment is not what a climate feels: the row says that it is meant. */
function shareLabel({ name, of }: Window): string {
  return `Share of time in “${name}”${of === 'instellation' ? ' (instantaneous)' : ''}`;
}

/** Periodic states count from periapsis, runs from their start: a row for each that occurs. */
function timeOfMaxRows(columns: readonly Column[], unit: TimeUnit): TableRow[] {
  const origins = [...new Set(columns.map(({ isForwardRun }) => isForwardRun))].toSorted();
  return origins.map((forward) => ({
    label: `Maximum comes, after ${forward ? 'the start' : 'periapsis'}`,
    cells: columns.map((column) => (column.isForwardRun === forward ? time(column, 'timeOfMax', unit) : { text: '—' })),
  }));
}

function hasSeveralStates(columns: readonly Column[]): boolean {
  return columns.some(({ stateName }) => stateName !== null);
}
