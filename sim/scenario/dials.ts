/** What a reader may move in a case: every number of star, orbit and planet that counts there, with the range over which it is usually met. */
import { isWithin, parseQuantity, type QuantitySpec } from '../quantity/index.ts';
import { type Dial, type DialGroup, dialGroups } from './dial.ts';
import { aboutKey, numbersAt, turnOf } from './schema/lookup.ts';
import type { CaseInput, ScenarioCase } from './types.ts';

/** In the order of groups, within them of the file. */
export function dialsOf({ inputs }: ScenarioCase): Dial[] {
  const dials = inputs.flatMap((input) => dialOf(input) ?? []);
  return dialGroups.flatMap((group) => dials.filter((dial) => dial.group === group));
}

function dialOf(input: CaseInput): Dial | null {
  const { key, value, text, used, label, writtenUnit, since } = input;
  const path = key.split('.');
  const group = groupOf(path);
  const spec = numbersAt(path);
  if (group === null || spec === null || value === null || !used || since !== undefined) return null;
  const { description = '', usual } = aboutKey(path) ?? {};
  const turn = turnOf(path);
  const range = turn !== null ? { low: 0, high: turn, log: false } : rangeOf(spec, value, usual);
  const shown = turn === null ? value : value - turn * Math.floor(value / turn);
  return { key, group, label, description, unit: writtenUnit, text, value: shown, ...range, turns: turn !== null };
}

const rotationKeys = ['rotationPeriod', 'obliquity', 'solarLongitudeOfPeriapsis'];

function groupOf([section, key = '']: readonly string[]): DialGroup | null {
  if (section === 'star') return 'Star';
  if (section === 'orbit') return 'Orbit';
  if (section !== 'planet') return null;
  if (rotationKeys.includes(key)) return 'Rotation';
  return /HeatStore$|^heatStore$/.test(key) ? 'Heat store' : 'Surface';
}

interface Range {
  readonly low: number;
  readonly high: number;
  readonly log: boolean;
}

/** The usual range, or a decade and a half on both sides; wide enough for the value, and within the bounds of the key. */
function rangeOf(spec: QuantitySpec, value: number, usual: string | undefined): Range {
  const found = usual === undefined ? openRange(spec, value) : usualRange(spec, usual);
  return stretched(found, value, spec);
}

function usualRange(spec: QuantitySpec, usual: string): Range {
  const { distribution } = parseQuantity(usual, { ...spec, spread: true });
  if (distribution.form !== 'uniform' && distribution.form !== 'logUniform') throw new Error(`${usual} is no range`);
  return { low: distribution.low, high: distribution.high, log: distribution.form === 'logUniform' };
}

function openRange(spec: QuantitySpec, value: number): Range {
  const { min = spec.above, max = spec.below } = spec;
  if (min !== undefined && max !== undefined) return { low: min, high: max, log: false };
  return value > 0 ? { low: value / 30, high: value * 30, log: true } : { low: value - 1, high: value + 1, log: false };
}

/** A value beyond an end moves that end: by half a decade, or by a quarter of the range. */
function stretched({ low, high, log }: Range, value: number, spec: QuantitySpec): Range {
  if (value >= low && value <= high) return { low, high, log };
  const isLog = log && value > 0;
  const ends = isLog
    ? { low: Math.min(low, value / 3), high: Math.max(high, value * 3) }
    : { low: Math.min(low, value - 0.25 * (high - value)), high: Math.max(high, value + 0.25 * (value - low)) };
  return {
    low: isWithin(ends.low, spec) ? ends.low : Math.min(low, value),
    high: isWithin(ends.high, spec) ? ends.high : Math.max(high, value),
    log: isLog,
  };
}
