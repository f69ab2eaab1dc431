/** Numbers of a spread: one scale a quantity, and as many digits as its spread leaves a meaning. Pure. */
import { radiansPerDegree } from '../../sim/constants.ts';
import type { Seconds } from '../../sim/si.ts';
import type { Percentiles, Summary } from '../../sim/studies/spread/percentiles.ts';
import type { SpreadCase, SpreadFinding, SpreadInput } from '../../sim/studies/spread/spreadReport.ts';
import { duration, exact, fixed, list, nbsp, type TimeUnit, timesPower, timeUnit, unitText } from './number.ts';

/** What one of the shown unit is in the unit of the number, and its sign. */
export interface Scale {
  readonly one: number;
  readonly symbol: string;
}

export interface Wording {
  readonly scale: Scale;
  /** Without unit. */
  number(value: number): string;
  text(value: number): string;
  /** `471 to 560 K`. */
  interval(from: number, to: number): string;
}

type Named = Pick<SpreadFinding, 'name' | 'unit'>;

export function findingOf(oneCase: SpreadCase, name: string): SpreadFinding | undefined {
  return oneCase.findings.find((candidate) => candidate.name === name);
}

/** The median period; null where the model gives none. */
export function periodOfCase(oneCase: SpreadCase): Seconds | null {
  const period = findingOf(oneCase, 'period');
  return period?.summary.percentiles?.['50'] ?? period?.atCentre ?? null;
}

/** One unit of time for all cases, from the middle of their periods; null without periods. */
export function spreadTimeUnit(cases: readonly SpreadCase[]): TimeUnit | null {
  const periods = cases.flatMap((one) => periodOfCase(one) ?? []).toSorted((a, b) => a - b);
  return periods.length === 0 ? null : timeUnit(periods[Math.floor(periods.length / 2)]!);
}

/** `93.4 d`, or one for each case; null without periods. */
export function periodsText(cases: readonly SpreadCase[]): string | null {
  const periods = cases.flatMap((one) => periodOfCase(one) ?? []).map((period) => duration(period));
  return periods.length === 0 ? null : list([...new Set(periods)]);
}

/** A share of one, which reads best in percent. */
export function isShare(name: string): boolean {
  return /^(fractionInWindow|habitableFraction|alwaysFraction)\./.test(name) || /[iI]ceFraction/.test(name);
}

export function scaleOf({ name, unit }: Named, cases: readonly SpreadCase[]): Scale {
  const time = spreadTimeUnit(cases);
  if (unit === 's') return time === null ? { one: 1, symbol: 's' } : { one: time.seconds, symbol: time.symbol };
  if (unit === 'K/s' && time !== null) return { one: 1 / time.seconds, symbol: unitText(`K/${time.symbol}`) };
  if (unit === 'rad') return { one: radiansPerDegree, symbol: '°' };
  if (unit === 'deg') return { one: 1, symbol: '°' };
  if (unit === '1' && isShare(name)) return { one: 0.01, symbol: '%' };
  return { one: 1, symbol: unitText(unit) };
}

/** A number once round the circle, in the finding's unit; null where the finding runs in none. */
export function turnOf({ circular, unit }: SpreadFinding, oneCase: SpreadCase): number | null {
  if (!circular) return null;
  if (unit === 's') return periodOfCase(oneCase);
  return unit === 'deg' ? 360 : 2 * Math.PI;
}

export function findingWording(finding: SpreadFinding, cases: readonly SpreadCase[]): Wording {
  return wordingOf(finding.summary, finding.atCentre, scaleOf(finding, cases));
}

/** Without its unit, which stands by itself. */
export function inputWording({ summary, centre }: SpreadInput): Wording {
  return wordingOf(summary, centre, { one: 1, symbol: '' });
}

/** Two significant digits of half the 68 % interval; five of the number itself where it does not spread. */
export function wordingOf(summary: Summary, alone: number | null, scale: Scale): Wording {
  const { percentiles } = summary;
  const half = percentiles === null ? 0 : (percentiles['84'] - percentiles['16']) / 2 / scale.one;
  const sizes = percentiles === null ? [alone ?? 0] : [percentiles['2.5'], percentiles['97.5']];
  const size = Math.max(...sizes.map(Math.abs)) / scale.one;
  if (!(half > 1e-9 * size)) return alike(scale);
  if (spansDecades(percentiles!)) return spelt(scale, ownDigits, 0);
  const decimals = 1 - magnitude(half);
  if (size < 1e5 && decimals <= 6) return spelt(scale, (value) => fixed(value, Math.max(0, decimals)), 0);
  const power = magnitude(Math.abs(percentiles!['50']) / scale.one || size);
  const kept = Math.max(0, Math.min(8, decimals + power));
  return spelt(scale, (value) => fixed(value / 10 ** power, kept), power);
}

/** Steps of one size would round the low end to nothing. */
function spansDecades(percentiles: Percentiles): boolean {
  return percentiles['2.5'] > 0 && percentiles['97.5'] > 100 * percentiles['2.5'];
}

/** Two significant digits of each number for itself. */
function ownDigits(value: number): string {
  const power = magnitude(Math.abs(value));
  if (power < -3 || power > 4) return timesPower(fixed(value / 10 ** power, 1), power);
  return fixed(Number(value.toPrecision(2)), Math.max(0, 1 - power));
}

/** For what does not spread: five digits without idle zeros; a share, which nobody measures to a hundred-thousandth, three. */
function alike(scale: Scale): Wording {
  const digits = scale.symbol === '%' ? 3 : 5;
  return spelt(scale, (value) => exact(Number(value.toPrecision(digits))), 0);
}

/** A power of ten is common to all numbers, so that they can be compared at a glance: `(1.3 to 11.9) × 10⁷`. */
function spelt(scale: Scale, digits: (value: number) => string, power: number): Wording {
  const powered = (number: string): string => (power === 0 ? number : timesPower(number, power));
  const short = (value: number): string => digits(value / scale.one);
  const number = (value: number): string => powered(short(value));
  const text = (value: number): string => withSymbol(number(value), scale.symbol);
  const interval = (from: number, to: number): string => {
    if (short(from) === short(to)) return text(from);
    const pair = `${short(from)} to ${short(to)}`;
    return withSymbol(power === 0 ? pair : powered(`(${pair})`), scale.symbol);
  };
  return { scale, number, text, interval };
}

export function withSymbol(number: string, symbol: string): string {
  if (symbol === '') return number;
  return symbol === '°' ? `${number}°` : `${number}${nbsp}${symbol}`;
}

/** Power of ten of the first digit, as it is shown: that of 9.9999 is 1; 0 for nothing. */
function magnitude(value: number): number {
  return value > 0 && Number.isFinite(value) ? Math.floor(Math.log10(Number(value.toPrecision(3)))) : 0;
}

/** `Maximum temperature (K)`. */
export function labelWithSymbol(label: string, { symbol }: Scale): string {
  return symbol === '' ? label : `${label} (${symbol})`;
}
