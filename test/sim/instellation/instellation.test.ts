import fc from 'fast-check';
import { describe, expect, test } from 'vitest';
import { metresPerAu, solarIrradiance, solarLuminosity } from '../../../sim/constants.ts';
import { SimError } from '../../../sim/error.ts';
import {
  distanceFromInstellation,
  instellation,
  orbitMeanInstellation,
} from '../../../sim/instellation/instellation.ts';
import { sheetAxes } from '../../published/factSheets.ts';
import { relativeError } from '../relative.ts';

/** The luminosity of a given irradiance at 1 au. */
const sunOf = (irradiance: number) => 4 * Math.PI * metresPerAu ** 2 * irradiance;

/**
 * JPL D-8160 (seen): irradiance at perihelion, aphelion and distance a, whole W m⁻²; it uses 1367.5 W m⁻² at 1 au, which the
 * figures fit only then. Half a unit of the last digit is 0.5, and 1367.5 itself is rounded (4e-5), which is 0.25 at Mercury's aphelion.
 * `today`: the same with S₀ = 1361 W m⁻² (calculated); half a unit of its shortest figure in `todayWithin`.
 */
const published = [
  {
    body: 'Mars',
    axisAu: 1.523679,
    e: 0.0934,
    figures: [717, 493, 589],
    within: 0.5,
    todayWithin: 1.1e-7,
    today: [713.2466, 490.3577, 586.2342],
  },
  {
    body: 'Mercury',
    axisAu: 0.387098,
    e: 0.20563,
    figures: [14462, 6278, 9126],
    within: 0.75,
    todayWithin: 6e-6,
    today: [14393.64, 6248.68, 9082.7],
  },
] as const;

describe('irradiance at the apsides', () => {
  for (const { body, axisAu, e, figures, within, todayWithin, today } of published) {
    test(body, () => {
      const distances = [1 - e, 1 + e, 1].map((ratio) => ratio * axisAu * metresPerAu);
      distances.forEach((distance, i) => {
        expect(Math.abs(instellation(sunOf(1367.5), distance) - figures[i]!)).toBeLessThanOrEqual(within);
        expect(relativeError(instellation(sunOf(solarIrradiance), distance), today[i]!)).toBeLessThan(todayWithin);
      });
    });
  }

  test('the "mean" in such tables is at distance a; the time mean is more', () => {
    const mars = orbitMeanInstellation(sunOf(solarIrradiance), 1.523679 * metresPerAu, 0.0934);
    expect(mars).toBeCloseTo(588.81, 2);
    const mercury = orbitMeanInstellation(sunOf(solarIrradiance), 0.387098 * metresPerAu, 0.20563);
    expect(mercury).toBeCloseTo(9281, 0);
  });
});

describe('fact-sheet irradiance against S₀/a²', () => {
  for (const { body, axis, irradiance, excess, within } of sheetAxes) {
    test(body, () => {
      const ratio = irradiance / instellation(sunOf(solarIrradiance), axis);
      expect(Math.abs(ratio - 1 - excess)).toBeLessThan(within);
      if (excess !== 0) expect(Math.abs(ratio - 1)).toBeGreaterThan(within);
    });
  }
});

// Laskar et al. (2004) A&A 428, 261, elements at J2000 (seen): e = 0.0167023623; ¼ of the annual mean 340.29747 (calculated, 8 digits).
test("Earth's annual mean depends on e alone", () => {
  expect(orbitMeanInstellation(sunOf(solarIrradiance), metresPerAu, 0.0167023623) / 4).toBeCloseTo(340.29747, 5);
});

test('one nominal luminosity at 1 au is 1361.166 W m⁻², not S₀', () => {
  expect(instellation(solarLuminosity, metresPerAu)).toBeCloseTo(1361.166465, 6);
});

test('distance and instellation from one another; inverse square', () => {
  const positive = fc.double({ min: 1e-3, max: 1e3, noNaN: true });
  fc.assert(
    fc.property(positive, positive, (luminosity, distance) => {
      const flux = instellation(luminosity * solarLuminosity, distance * metresPerAu);
      const back = distanceFromInstellation(luminosity * solarLuminosity, flux);
      expect(relativeError(back, distance * metresPerAu)).toBeLessThan(1e-15);
      expect(instellation(luminosity, 2 * distance)).toBe(instellation(luminosity, distance) / 4);
    }),
  );
});

test('the orbit mean is never below the flux at distance a', () => {
  fc.assert(
    fc.property(fc.double({ min: 0, max: 0.9999, noNaN: true }), (e) => {
      return orbitMeanInstellation(1, 1, e) >= instellation(1, 1) * (1 - 1e-15);
    }),
  );
});

test('errors', () => {
  expect(() => orbitMeanInstellation(0, 1, 0)).toThrow(SimError);
  expect(() => orbitMeanInstellation(1, 1, 1)).toThrow(SimError);
  expect(() => distanceFromInstellation(1, 0)).toThrow(SimError);
});
