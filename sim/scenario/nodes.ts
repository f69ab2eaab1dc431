/** The values of a range at which a grid is computed, each one that a scenario file can say exactly. */
import { formatNumber, fromUnit, inUnit } from '../quantity/index.ts';
import type { Along } from './along.ts';

export interface Node {
  /** As a scenario would say it, `0.45` or `1.2 au`: reading it gives `value` to the last bit. */
  readonly text: string;
  /** SI. */
  readonly value: number;
}

/** More digits than anyone types, and few enough that a third of a range is written like one. */
const digits = 12;

/**
 * `steps` values from end to end, evenly spaced in the unit of the range, or evenly in their logarithm.
 * Shape:  at least two.
 */
export function nodesOf({ unit, from, to, log }: Along, steps: number): readonly Node[] {
  const [low, high] = [inUnit(from, unit), inUnit(to, unit)];
  const last = steps - 1;
  return Array.from({ length: steps }, (_, k) => {
    const share = k / last;
    const value = log ? inUnit(from * (to / from) ** share, unit) : low + (high - low) * share;
    return nodeAt(k === 0 ? low : k === last ? high : value, unit, Math.max(Math.abs(low), Math.abs(high)));
  });
}

/** The nearest value that takes no more than `digits`; beside `largest`, a rounding error is zero. */
function nodeAt(written: number, unit: string, largest: number): Node {
  const isNothing = Math.abs(written) < 10 ** -digits * largest;
  const { number, value } = sayable(isNothing ? 0 : written, unit, digits);
  return { text: unit === '1' ? number : `${number} ${unit}`, value };
}

/** A number of `unit` rounded so that its text means it exactly, and its SI value. */
export function sayable(written: number, unit: string, most = 15): { number: string; value: number } {
  const number = formatNumber(written, most);
  return { number, value: fromUnit(Number(number), unit) };
}
