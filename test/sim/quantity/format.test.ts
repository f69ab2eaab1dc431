import { expect, test } from 'vitest';
import { formatNumber, formatQuantity, fromUnit, inUnit } from '../../../sim/quantity/index.ts';

test.each([
  [0.48 * 149597870700, 'au', '0.48 au'],
  [4e7, 'J/m2/K', '4e7 J/m2/K'],
  [0.35, '%', '35 %'],
  [0.62, '1', '0.62'],
  [263.15, '°C', '-10 degC'],
  [Math.PI, 'deg', '180 deg'],
  [Math.PI, '°', '180 deg'],
  [1361, 'W m⁻²', '1361 W/m2'],
  [1361, 'S0', '1 S0'],
  [1 / 3, '1', '0.333333'],
  [0, 'km', '0 km'],
  [-0, 'km', '0 km'],
  [1e-5, '1', '1e-5'],
  [1e-4, '1', '0.0001'],
  [999999, '1', '999999'],
  [999999.9, '1', '1e6'],
  [1.5e23, '1', '1.5e23'],
])('formatQuantity(%f, %s) = %s', (si, unit, text) => {
  expect(formatQuantity(si, unit)).toBe(text);
});

test('digits are significant digits', () => {
  expect(formatQuantity(2 / 3, '1', 3)).toBe('0.667');
  expect(formatNumber(123456.789, 8)).toBe('123456.79');
});

test('inUnit and fromUnit take the offset in', () => {
  expect(inUnit(273.15, 'degC')).toBe(0);
  expect(fromUnit(0, 'degC')).toBe(273.15);
  expect(inUnit(86400, 'h')).toBe(24);
});

test('what is not finite is never printed', () => {
  for (const value of [Number.NaN, Number.POSITIVE_INFINITY])
    expect(() => formatQuantity(value, 'K')).toThrow(RangeError);
});
