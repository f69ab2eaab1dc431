/** One number of a column as a table shows it. Pure. */
import type { Finding } from '../../sim/findings/finding.ts';
import { type Column, finding, periodOf } from './columns.ts';
import { fixed, nbsp, type TimeUnit, timeDecimals, withUnit } from './number.ts';

/** One number as the table shows it. `text` is a dash where there is none, and `reason` says why. */
export interface Cell {
  readonly text: string;
  /** True where the numerical error reaches the last digit shown, and stands in the text. */
  readonly hasError?: boolean;
  readonly reason?: string;
  /** In small print: where and when. */
  readonly detail?: string;
  /** The same quantity of the instantaneous steady value, where it has one. */
  readonly steady?: string;
  /** What stood here before the reader moved a number of the case. */
  readonly was?: string;
}

export interface TableRow {
  readonly label: string;
  /** One a column of the run. */
  readonly cells: readonly Cell[];
}

export function temperature(column: Column, name: string): Cell {
  return numberCell(finding(column, name), (value) => ({ value, unit: 'K', decimals: 2 }));
}

export function time(column: Column, name: string, unit: TimeUnit): Cell {
  const decimals = timeDecimals(periodOf(column), unit);
  return numberCell(finding(column, name), (value) => ({ value: value / unit.seconds, unit: unit.symbol, decimals }));
}

export interface Shown {
  readonly value: number;
  readonly unit: string;
  readonly decimals: number;
}

/** Fixed decimals; where the error reaches the last digit, fewer of them and the error beside. */
export function numberCell(found: Finding | undefined, show: (value: number) => Shown): Cell {
  if (found === undefined || found.value === null) return without(found);
  const { value, unit, decimals } = show(found.value);
  const error = show(found.plusMinus ?? 0).value;
  if (error < 0.5 * 10 ** -decimals) return { text: withUnit(fixed(value, decimals), unit) };
  const kept = Math.max(0, Math.min(decimals, 1 - Math.floor(Math.log10(error))));
  const text = `${fixed(value, kept)} ±${nbsp}${fixed(roundedUp(error, kept), kept)}`;
  return { text: withUnit(text, unit), hasError: true };
}

export function without(found: Finding | undefined): Cell {
  return { text: '—', reason: found ? (found.reason ?? 'not defined') : 'not computed' };
}

/** An error bound must not shrink by rounding. */
export function roundedUp(value: number, decimals: number): number {
  const unit = 10 ** -decimals;
  return Math.ceil(value / unit - 1e-9) * unit;
}
