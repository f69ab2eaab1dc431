import fc from 'fast-check';
import { expect, test } from 'vitest';
import { solarLuminosity, solarRadius, solarTemperature } from '../../../sim/constants.ts';
import { SimError } from '../../../sim/error.ts';
import {
  luminosityFromTemperature,
  radiusFromLuminosity,
  temperatureFromLuminosity,
} from '../../../sim/star/luminosity.ts';
import { relativeError } from '../relative.ts';

// IAU 2015 Resolution B3 (Prša et al. 2016): the nominal 5772 K is 5772.0 ± 0.8 K, rounded; L then differs by 2.4e-6 (calculated).
test('the nominal Sun', () => {
  expect(relativeError(luminosityFromTemperature(solarTemperature, solarRadius), solarLuminosity)).toBeLessThan(2.5e-6);
  expect(relativeError(temperatureFromLuminosity(solarLuminosity, solarRadius), 5772.003429)).toBeLessThan(1e-9);
  expect(relativeError(radiusFromLuminosity(solarLuminosity, solarTemperature), solarRadius)).toBeLessThan(1.3e-6);
});

test('each of the three from the other two', () => {
  fc.assert(
    fc.property(
      fc.double({ min: 1000, max: 5e4, noNaN: true }),
      fc.double({ min: 1e6, max: 1e12, noNaN: true }),
      (t, r) => {
        const luminosity = luminosityFromTemperature(t, r);
        expect(relativeError(temperatureFromLuminosity(luminosity, r), t)).toBeLessThan(1e-15);
        expect(relativeError(radiusFromLuminosity(luminosity, t), r)).toBeLessThan(2e-15);
      },
    ),
  );
});

test('errors', () => {
  for (const bad of [0, -5, Number.NaN, Number.POSITIVE_INFINITY]) {
    for (const relation of [luminosityFromTemperature, temperatureFromLuminosity, radiusFromLuminosity]) {
      expect(() => relation(bad, 1)).toThrow(SimError);
      expect(() => relation(1, bad)).toThrow(SimError);
    }
  }
});
