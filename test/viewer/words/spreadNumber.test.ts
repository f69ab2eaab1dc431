import { describe, expect, test } from 'vitest';
import {
  findingWording,
  inputWording,
  periodsText,
  scaleOf,
  turnOf,
  wordingOf,
} from '../../../viewer/words/spreadNumber.ts';
import { daysPerPeriod, spreadCase, withFinding } from '../spreadFixture.ts';

const plain = (text: string): string => text.replaceAll('\u00a0', ' ');
const one = spreadCase();

function summaryOf(low: number, p16: number, median: number, p84: number, high: number) {
  return { mean: median, percentiles: { '2.5': low, '16': p16, '50': median, '84': p84, '97.5': high }, defined: 1 };
}

describe('numbers of a spread', () => {
  const kelvin = { one: 1, symbol: 'K' };

  test('two significant digits of half the 68 % interval, and no more', () => {
    const wide = wordingOf(summaryOf(430, 471, 512, 560, 610), null, kelvin);
    expect(plain(wide.interval(471.4, 559.8))).toBe('471 to 560 K');
    const narrow = wordingOf(summaryOf(300, 301.2, 302.1, 303, 304), null, kelvin);
    expect(plain(narrow.text(302.0512))).toBe('302.05 K');
  });

  test('what does not spread is said once, without idle zeros', () => {
    const still = wordingOf(summaryOf(312, 312, 312, 312, 312), null, kelvin);
    expect(plain(still.interval(312, 312))).toBe('312 K');
  });

  test('large and small numbers share one power of ten', () => {
    const words = wordingOf(summaryOf(8e6, 1.3e7, 4e7 - 1e-6, 1.19e8, 1.8e8), null, { one: 1, symbol: 'J' });
    expect(plain(words.interval(1.3e7, 1.19e8))).toBe('(1.3 to 11.9) × 10⁷ J');
    const small = wordingOf(summaryOf(1e-9, 2e-9, 3e-9, 4e-9, 5e-9), null, { one: 1, symbol: '' });
    expect(plain(small.text(3e-9))).toBe('3.0 × 10⁻⁹');
  });

  test('over decades each number has digits of its own, and the low end is not nothing', () => {
    const words = wordingOf(summaryOf(1.3e5, 4.3e5, 1e7 - 1e-3, 2.3e8, 7.9e8), null, { one: 1, symbol: 'J' });
    expect(plain(words.interval(4.3e5, 2.3e8))).toBe('4.3 × 10⁵ to 2.3 × 10⁸ J');
    expect(plain(words.text(1e7 - 1e-3))).toBe('1.0 × 10⁷ J');
    const times = wordingOf(summaryOf(0.052, 0.193, 4.33, 13.59, 15.18), null, { one: 1, symbol: 'd' });
    expect(plain(times.interval(0.052, 15.18))).toBe('0.052 to 15 d');
  });

  test('each kind of finding in its own unit', () => {
    const scale = (name: string, unit: string) => scaleOf({ name, unit }, [one]);
    expect(scale('lagOfMax', 's')).toEqual({ one: 86_400, symbol: 'd' });
    expect(plain(scale('fastestWarming', 'K/s').symbol)).toBe('K d⁻¹');
    expect(scale('hottestLatitude', 'deg').symbol).toBe('°');
    expect(scale('fractionInWindow.temperate', '1')).toEqual({ one: 0.01, symbol: '%' });
    expect(scale('damping', '1').symbol).toBe('');
  });

  test('a turn is the median period, and named', () => {
    const time = one.findings.find(({ name }) => name === 'timeOfMax')!;
    expect(turnOf(time, one)! / 86_400).toBeCloseTo(daysPerPeriod, 9);
    expect(plain(periodsText([one])!)).toBe(`${Math.round(daysPerPeriod)} d`);
    expect(turnOf({ ...time, circular: false }, one)).toBeNull();
    expect(turnOf({ ...time, unit: 'deg' }, one)).toBe(360);
  });

  test('inputs are told in the unit in which they were typed, which stands apart', () => {
    const { inputs } = one;
    expect(inputWording(inputs[1]!).number(0.62)).toBe('0.620');
    expect(plain(inputWording(inputs[3]!).number(4e7))).toBe('4.0 × 10⁷');
  });

  test('a share that does not spread has three digits, whatever it is exactly', () => {
    const scale = { one: 0.01, symbol: '%' };
    expect(plain(wordingOf(summaryOf(0.91553, 0.91553, 0.91553, 0.91553, 0.91553), null, scale).text(0.91553))).toBe(
      '91.6 %',
    );
    expect(plain(wordingOf({ mean: null, percentiles: null, defined: 0 }, 0.0012345, scale).text(0.0012345))).toBe(
      '0.123 %',
    );
  });

  test('a time before periapsis keeps its sign in tables', () => {
    const early = withFinding(one, 'timeOfMax', {
      summary: summaryOf(-172_800, -86_400, 43_200, 172_800, 259_200),
    });
    const found = early.findings.find(({ name }) => name === 'timeOfMax')!;
    expect(plain(findingWording(found, [early]).interval(-86_400, 172_800))).toBe('−1.0 to 2.0 d');
  });
});
