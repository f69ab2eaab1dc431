/** SI numbers back in the user's units. */
import { parseUnit, toSi, type Unit } from './units.ts';

const resolve = (unit: string | Unit): Unit => (typeof unit === 'string' ? parseUnit(unit) : unit);

/** An SI value as a number of `unit`. Errors: SimError for an unknown unit. */
export function inUnit(si: number, unit: string | Unit): number {
  const { factor, divisor, offset } = resolve(unit);
  return ((si - offset) * divisor) / factor;
}

/** A number of `unit` as SI. Errors: SimError for an unknown unit. */
export function fromUnit(value: number, unit: string | Unit): number {
  return toSi(value, resolve(unit));
}

/**
 * An SI value as text in the user's unit: `0.48 au`; a pure number has no unit behind it.
 * Shape:  rounded to `digits` significant digits; 17 bring back the same number to a rounding or two. `parseQuantity` reads it.
 * Errors: SimError for an unknown unit; RangeError for a value that is not finite (a NaN is never printed).
 */
export function formatQuantity(si: number, unit: string | Unit, digits = 6): string {
  const resolved = resolve(unit);
  const number = formatNumber(inUnit(si, resolved), digits);
  return resolved.symbol === '1' ? number : `${number} ${resolved.symbol}`;
}

/** Plain digits from 1e-4 up to 1e6, otherwise `4e7`; no trailing zeros. Errors: RangeError unless finite. */
export function formatNumber(value: number, digits = 6): string {
  if (!Number.isFinite(value)) throw new RangeError(`${value} cannot be printed`);
  const rounded = Number(value.toPrecision(digits));
  const size = Math.abs(rounded);
  if (size === 0) return '0';
  return size >= 1e-4 && size < 1e6 ? String(rounded) : rounded.toExponential().replace('e+', 'e');
}
