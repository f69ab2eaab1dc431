import { describe, expect, test } from 'vitest';
import {
  duration,
  exact,
  fixed,
  kelvin,
  keptUnits,
  list,
  percent,
  significant,
  timeDecimals,
  timeUnit,
  unitText,
  withUnit,
} from '../../../viewer/words/number.ts';

const day = 86_400;

describe('numbers for readers', () => {
  test('fixed: a real minus sign, and no minus nothing', () => {
    expect(fixed(-2.345, 1)).toBe('−2.3');
    expect(fixed(-0.04, 1)).toBe('0.0');
  });

  test('significant: plain decimals where they are short, powers of ten elsewhere', () => {
    expect([0, 0.0507, 1.12, 16.8, 31_557, -2.95].map((value) => significant(value, 3))).toEqual([
      '0',
      '0.0507',
      '1.12',
      '16.8',
      '31600',
      '−2.95',
    ]);
    expect(significant(2.3e-11, 1)).toBe('2\u00a0×\u00a010⁻¹¹');
    expect(significant(0.9996, 3)).toBe('1.00');
    expect(significant(999_999, 3)).toBe('1.00\u00a0×\u00a010⁶');
  });

  test('exact: nine figures, no idle zeros', () => {
    expect(exact(0.1 + 0.2)).toBe('0.3');
    expect(exact(1.98892e30)).toBe('1.98892\u00a0×\u00a010³⁰');
    expect(exact(2200)).toBe('2200');
  });

  test('percent: a little is not nothing and nearly all is not all', () => {
    expect([0, 0.0001, 0.2302, 0.99999, 1].map(percent)).toEqual([
      '0.0\u00a0%',
      '<\u00a00.1\u00a0%',
      '23.0\u00a0%',
      '>\u00a099.9\u00a0%',
      '100.0\u00a0%',
    ]);
  });

  test('units as they are set in print', () => {
    expect(unitText('W/m2')).toBe('W\u00a0m⁻²');
    expect(unitText('J/m2/K/s^0.5')).toBe('J\u00a0m⁻²\u00a0K⁻¹\u00a0s⁻¹ᐟ²');
    expect(withUnit('0.3', '1')).toBe('0.3');
    expect(withUnit('0.3', '')).toBe('0.3');
    expect(kelvin(255.04)).toBe('255.0\u00a0K');
  });

  test('time: hours below 5 days, years above 1000', () => {
    expect([4.9, 5, 1000, 1001].map((days) => timeUnit(days * day).symbol)).toEqual(['h', 'd', 'd', 'yr']);
    expect(duration(7.67 * day)).toBe('7.67\u00a0d');
    expect(duration(5 * day)).toBe('5\u00a0d');
  });

  test('timeDecimals: about a ten-thousandth of the orbit', () => {
    const unit = timeUnit(120 * day);
    expect(timeDecimals(120 * day, unit)).toBe(2);
    expect(timeDecimals(120 * day, unit, 1)).toBe(1);
    expect(timeDecimals(0.02 * 3600, timeUnit(0.02 * 3600))).toBe(6);
  });

  test('list', () => {
    expect(list([])).toBe('');
    expect(list(['a'])).toBe('a');
    expect(list(['a', 'b', 'c'])).toBe('a, b and c');
  });
});

test('numbers of a text from elsewhere stay with their units', () => {
  expect(keptUnits('16 % of them from 228 to 238.9 K, 4 d later; 3 do not')).toBe(
    '16\u00a0% of them from 228 to 238.9\u00a0K, 4\u00a0d later; 3 do not',
  );
});
