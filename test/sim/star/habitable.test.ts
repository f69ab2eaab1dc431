import { describe, expect, test } from 'vitest';
import { metresPerAu, solarIrradiance, solarTemperature } from '../../../sim/constants.ts';
import { SimError } from '../../../sim/error.ts';
import { distanceFromInstellation } from '../../../sim/instellation/instellation.ts';
import { habitableFlux, habitableLimits, habitableTemperatureRange } from '../../../sim/star/habitable.ts';
import { fluxTemperatures, habitableRows } from '../../published/habitableZone.ts';
import { relativeError } from '../relative.ts';

/** The luminosity that gives S₀ = 1361 W m⁻² at 1 au, as the published distances take it. */
const sunOfS0 = 4 * Math.PI * metresPerAu ** 2 * solarIrradiance;

describe('Kopparapu et al. 2014', () => {
  for (const { limit, solar, axis, flux } of habitableRows) {
    test(limit, () => {
      expect(relativeError(habitableFlux(limit, 5780), solar * solarIrradiance)).toBeLessThan(1e-15);
      fluxTemperatures.forEach((temperature, i) => {
        // 8 digits are stored
        expect(relativeError(habitableFlux(limit, temperature) / solarIrradiance, flux[i]!)).toBeLessThan(1e-7);
      });
      const distance = distanceFromInstellation(sunOfS0, habitableFlux(limit, 5780)) / metresPerAu;
      expect(relativeError(distance, axis)).toBeLessThan(1e-7);
    });
  }

  test('every limit has its row', () => {
    expect([...habitableLimits].sort()).toEqual(habitableRows.map((row) => row.limit).sort());
  });

  // Calculated: the published reference star has 5780 K, the IAU nominal Sun 5772 K; distances grow by 5e-4 to 12e-4 au.
  test('the nominal Sun is 8 K cooler than the reference star', () => {
    for (const limit of habitableLimits) {
      const at = (temperature: number) =>
        distanceFromInstellation(sunOfS0, habitableFlux(limit, temperature)) / metresPerAu;
      const shift = at(solarTemperature) - at(5780);
      expect(shift).toBeGreaterThan(3.5e-4);
      expect(shift).toBeLessThan(12.5e-4);
    }
  });
});

test('the limits keep their order at every star temperature, and heavier planets keep their water closer in', () => {
  const inward = [
    'earlyMars',
    'maximumGreenhouse',
    'runawayGreenhouseTenthEarth',
    'runawayGreenhouse',
    'runawayGreenhouse5Earths',
    'recentVenus',
  ] as const;
  for (let temperature = 2600; temperature <= 7200; temperature += 100) {
    const fluxes = inward.map((limit) => habitableFlux(limit, temperature));
    expect(fluxes).toEqual([...fluxes].sort((a, b) => a - b));
  }
});

test('hotter stars push every limit to more flux', () => {
  for (const limit of habitableLimits) {
    for (let temperature = 2600; temperature < 7200; temperature += 100) {
      expect(habitableFlux(limit, temperature + 100)).toBeGreaterThan(habitableFlux(limit, temperature));
    }
  }
});

test('outside the published star temperatures there is no answer', () => {
  expect(habitableTemperatureRange).toEqual({ from: 2600, to: 7200 });
  for (const temperature of [2599.9, 7200.1, Number.NaN]) {
    expect(() => habitableFlux('earlyMars', temperature)).toThrow(SimError);
  }
  expect(() => habitableFlux('earlyMars', 2500)).toThrow(
    'star.temperature: 2500 K is outside 2600 to 7200 K, for which the habitable limits were published. Give the window as instellation, e.g. 0.32 to 1.1 S0.',
  );
});
