/** The input that changes, in words. Pure. */
import type { TraceReport } from '../../sim/studies/traceReport.ts';
import { exact, fixed, significant, unitText, withUnit } from './number.ts';

export type Along = TraceReport['along'];

/** A value without its unit, to about a thousandth of the range; over decades to a thousandth of itself. */
export function alongNumber(value: number, { from, to, log }: Along): string {
  if (value === from || value === to) return exact(value);
  const size = Math.max(Math.abs(from), Math.abs(to));
  const isWide = log && to > 10 * from;
  if (isWide) return significant(value, 4);
  if (size < 1e-2 || size >= 1e5) return significant(value, significantDigits(size, to - from));
  return fixed(value, Math.max(0, Math.round(3 - Math.log10(to - from))));
}

function significantDigits(size: number, range: number): number {
  return Math.min(9, 4 + Math.max(0, Math.floor(Math.log10(size / range))));
}

export function alongText(value: number, along: Along): string {
  return withUnit(alongNumber(value, along), along.unit);
}

/** `0.93 and 1.21 Lsun`; of a pure number, `eccentricity 0.2 and 0.4`. */
export function alongPair(from: number, to: number, along: Along): string {
  const pair = `${alongNumber(from, along)} and ${alongText(to, along)}`;
  return unitText(along.unit) === '' ? `${labelInText(along)} ${pair}` : pair;
}

/** People keep their capital within a sentence. */
const isNamed = /^(?:Bond|Sobol)\b/;

/** The label as it stands within a sentence. */
export function labelInText({ label }: Pick<Along, 'label'>): string {
  return /^\p{Lu}\p{Ll}/u.test(label) && !isNamed.test(label) ? `${label[0]!.toLowerCase()}${label.slice(1)}` : label;
}

/** The label with its unit, for an axis. */
export function axisTitle({ label, unit }: Along): string {
  return unitText(unit) === '' ? label : `${label} (${unitText(unit)})`;
}
