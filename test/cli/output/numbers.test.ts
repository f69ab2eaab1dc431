import fc from 'fast-check';
import { expect, test } from 'vitest';
import { magnitude, percent, significant, withError } from '../../../cli/output/numbers.ts';

test.each([
  [498.0261, 2, 0, '498.03'],
  [498.0261, 2, 0.004, '498.03'],
  [498.0261, 2, 0.02, '498.03 ± 0.02'],
  [498.0261, 2, 3.21, '498.0 ± 3.3'],
  [498.0261, 2, 41, '498 ± 41'],
  [-0.001, 2, 0, '0.00'],
])('withError(%d, %i, %d) is %s', (value, decimals, plusMinus, text) => {
  expect(withError(value, decimals, plusMinus)).toBe(text);
});

test('withError: the bound that is shown is never smaller than the bound', () => {
  fc.assert(
    fc.property(fc.double({ min: 1e-9, max: 1e4, noNaN: true }), fc.integer({ min: 0, max: 4 }), (bound, decimals) => {
      const [, shown] = withError(300, decimals, bound).split(' ± ');
      const kept = shown === undefined ? 0.5 * 10 ** -decimals : Number(shown) * (1 + 1e-9);
      expect(kept).toBeGreaterThanOrEqual(bound * (1 - 1e-6));
    }),
  );
});

test.each([
  [0.123456, '0.123'],
  [12.3456, '12.3'],
  [99999, '99999'],
  [123456, '1.23e+5'],
  [0.000123, '1.23e-4'],
  [0, '0.00'],
])('significant(%d) is %s', (value, text) => {
  expect(significant(value, 3)).toBe(text);
});

test.each([
  [0, '0.0'],
  [1e-9, '< 0.1'],
  [0.3421, '34.2'],
  [0.99999, '> 99.9'],
  [1, '100.0'],
])('percent(%d) is %s', (share, text) => {
  expect(percent(share)).toBe(text);
});

test('magnitude is one digit', () => {
  expect([0, 3.1e-14, 2e5].map(magnitude)).toEqual(['0', '3e-14', '2e5']);
});
