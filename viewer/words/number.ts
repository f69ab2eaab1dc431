/** Numbers as a reader wants them: few digits, real minus signs, no-break spaces before units. Pure. */

import { secondsPerDay, secondsPerYear } from '../../sim/constants.ts';
import type { Seconds } from '../../sim/si.ts';

/** No-break space: a number stays with its unit. */
export const nbsp = '\u00a0';
const superscripts = '⁰¹²³⁴⁵⁶⁷⁸⁹';

/** `digits` places after the point. */
export function fixed(value: number, digits: number): string {
  const text = value.toFixed(digits);
  return withRealMinus(Number(text) === 0 ? text.replace('-', '') : text);
}

/** `digits` significant digits; powers of ten where a plain decimal would be long: `1.2 × 10⁻⁹`. */
export function significant(value: number, digits: number): string {
  if (value === 0) return '0';
  const [mantissa, power] = value.toExponential(digits - 1).split('e') as [string, string];
  const exponent = Number(power);
  if (exponent < -3 || exponent > 5) return timesPower(withRealMinus(mantissa), exponent);
  return withRealMinus(Number(`${mantissa}e${power}`).toFixed(Math.max(0, digits - 1 - exponent)));
}

/** As few digits as say the value to nine figures: for inputs, which are shown as they were meant. */
export function exact(value: number): string {
  const trimmed = Number(value.toPrecision(9));
  const size = Math.abs(trimmed);
  if (size !== 0 && (size < 1e-3 || size >= 1e6)) {
    const [mantissa, power] = trimmed.toExponential().split('e') as [string, string];
    return timesPower(withRealMinus(mantissa), Number(power));
  }
  return withRealMinus(String(trimmed));
}

/** `1.2 × 10⁻⁹`. */
export function timesPower(number: string, exponent: number): string {
  return `${number}${nbsp}×${nbsp}10${raised(exponent)}`;
}

/** A text whose numbers stay with their percent signs. */
export function keptPercents(text: string): string {
  return text.replaceAll(/(\d) %/g, `$1${nbsp}%`);
}

/** A text from elsewhere whose numbers stay with what they count. */
export function keptUnits(text: string): string {
  return text.replaceAll(/(\d) (?=%|(?:K|d|deg|au)\b)/g, `$1${nbsp}`);
}

/** `W/m2/K` as `W m⁻² K⁻¹`, a pure number as nothing. */
export function unitText(unit: string): string {
  if (unit === '1') return '';
  if (unit === 'S0') return 'S₀'; // a name, no power
  const [head, ...below] = unit.split('/') as [string, ...string[]];
  return [raisedDigits(head), ...below.map(inverted)].join(nbsp);
}

/** Value and unit; the unit of a pure number is left out. */
export function withUnit(number: string, unit: string): string {
  const symbol = unitText(unit);
  return symbol === '' ? number : `${number}${nbsp}${symbol}`;
}

export function kelvin(value: number): string {
  return `${fixed(value, 1)}${nbsp}K`;
}

/** A share of one, in percent to one decimal; a little is not nothing, and nearly all is not all. */
export function percent(share: number): string {
  if (share > 0 && share < 5e-4) return `<${nbsp}0.1${nbsp}%`;
  if (share < 1 && share > 1 - 5e-4) return `>${nbsp}99.9${nbsp}%`;
  return `${fixed(100 * share, 1)}${nbsp}%`;
}

export interface TimeUnit {
  readonly symbol: 'h' | 'd' | 'yr';
  readonly seconds: Seconds;
}

const hours: TimeUnit = { symbol: 'h', seconds: 3600 };
const days: TimeUnit = { symbol: 'd', seconds: secondsPerDay };
const years: TimeUnit = { symbol: 'yr', seconds: secondsPerYear };

/** The unit in which an orbit of this length reads best: hours below 5 days, Julian years above 1000 days. */
export function timeUnit(span: Seconds): TimeUnit {
  if (span < 5 * secondsPerDay) return hours;
  return span > 1000 * secondsPerDay ? years : days;
}

/** Three significant digits without idle zeros, in a given unit or the one that suits. */
export function duration(seconds: Seconds, unit: TimeUnit = timeUnit(Math.abs(seconds))): string {
  return `${exact(Number((seconds / unit.seconds).toPrecision(3)))}${nbsp}${unit.symbol}`;
}

/** Decimals that show about a ten-thousandth of an orbit; `coarser` leaves some away. */
export function timeDecimals(period: Seconds, unit: TimeUnit, coarser = 0): number {
  return Math.max(0, Math.min(6, 4 - coarser - Math.floor(Math.log10(period / unit.seconds))));
}

/** `a`, `a and b`, `a, b and c`. */
export function list(words: readonly string[]): string {
  if (words.length < 2) return words[0] ?? '';
  return `${words.slice(0, -1).join(', ')} and ${words.at(-1)}`;
}

/** An exponent as it is set in print. */
export function raised(exponent: number): string {
  return `${exponent < 0 ? '⁻' : ''}${raisedDigits(String(Math.abs(exponent)))}`;
}

function raisedDigits(text: string): string {
  return text.replace(/[0-9]/g, (digit) => superscripts[Number(digit)]!);
}

/** `m2` → `m⁻²`, `s^0.5` → `s^−0.5`, `K` → `K⁻¹`. */
function inverted(factor: string): string {
  const power = /^([A-Za-z]+)\^([0-9.]+)$/.exec(factor);
  if (power) return power[2] === '0.5' ? `${power[1]}⁻¹ᐟ²` : `${power[1]}^−${power[2]}`;
  return /[0-9]$/.test(factor) ? factor.replace(/([0-9])$/, (digit) => `⁻${raisedDigits(digit)}`) : `${factor}⁻¹`;
}

function withRealMinus(text: string): string {
  return text.replace('-', '−');
}
