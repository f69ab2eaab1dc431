import { expect, test } from 'vitest';
import { metresPerAu, solarLuminosity } from '../../../sim/constants.ts';
import { friendly } from '../../../viewer/words/friendly.ts';

test('friendly: the units of the trade where it has its own, SI elsewhere', () => {
  expect(friendly(0.48 * metresPerAu, 'm')).toBe('0.48\u00a0au');
  expect(friendly(20, 'm')).toBe('20\u00a0m');
  expect(friendly(184.12523 * 86_400, 's')).toBe('184.125\u00a0d');
  expect(friendly(Math.PI / 2, 'rad')).toBe('90°');
  expect(friendly(0.52 * solarLuminosity, 'W')).toBe('0.52\u00a0Lsun');
  expect(friendly(1966.129338923498, 'W/m2')).toBe('1966.13\u00a0W\u00a0m⁻²');
  expect(friendly(0.3, '1')).toBe('0.3');
});
