import fc from 'fast-check';
import { expect, test } from 'vitest';
import { solarIrradiance, stefanBoltzmann } from '../../../sim/constants.ts';
import { SimError } from '../../../sim/error.ts';
import { meanFromEccentric } from '../../../sim/orbit/anomaly.ts';
import {
  fluxMeanTemperatureRatio,
  orbitMeanInverseSquare,
  timeMeanDistanceRatio,
  timeMeanSteadyRatio,
} from '../../../sim/orbit/averages.ts';
import { distanceFromEccentric } from '../../../sim/orbit/distance.ts';
import { apsides, orbitAverages } from '../../published/orbitAverages.ts';
import { relativeError } from '../relative.ts';
import { eccentricity } from './arbitrary.ts';

// 12 digits are stored: half a unit of the last is at most 5e-13 relative.
for (const row of orbitAverages) {
  test(`closed forms at e = ${row.e}`, () => {
    expect(relativeError(orbitMeanInverseSquare(row.e), row.flux)).toBeLessThan(6e-13);
    expect(relativeError(timeMeanDistanceRatio(row.e), row.distance)).toBeLessThan(6e-13);
    expect(relativeError(timeMeanSteadyRatio(row.e), row.timeMeanTemperature)).toBeLessThan(6e-13);
    expect(relativeError(fluxMeanTemperatureRatio(row.e), row.fluxMeanTemperature)).toBeLessThan(6e-13);
  });
}

test('the apsides', () => {
  for (const { e, periapsis, apoapsis, fluxRatio } of apsides) {
    const near = distanceFromEccentric(1, e, 0);
    const far = distanceFromEccentric(1, e, Math.PI);
    expect(relativeError(near ** -0.5, periapsis)).toBeLessThan(1e-10);
    expect(relativeError(far ** -0.5, apoapsis)).toBeLessThan(1e-10);
    expect(relativeError((far / near) ** 2, fluxRatio)).toBeLessThan(1e-10);
  }
});

/** Time mean of g(r/a) by the periodic trapezoid rule in the eccentric anomaly: dM = (1 − e cos E) dE. Spectral in `steps`. */
function timeMean(e: number, g: (ratio: number) => number, steps = 6000): number {
  let sum = 0;
  for (let i = 0; i < steps; i++) {
    const ratio = 1 - e * Math.cos((2 * Math.PI * (i + 0.5)) / steps);
    sum += g(ratio) * ratio;
  }
  return sum / steps;
}

test('closed forms against quadrature', () => {
  for (const e of [0, 0.05, 0.2056, 0.5, 0.8, 0.95, 0.99, 0.999]) {
    // the integrands are analytic within ln(1/β) ≥ 0.045 of the real line: e^(−6000 · 0.045) is nothing
    expect(
      relativeError(
        orbitMeanInverseSquare(e),
        timeMean(e, (r) => r ** -2),
      ),
    ).toBeLessThan(1e-12);
    expect(
      relativeError(
        timeMeanDistanceRatio(e),
        timeMean(e, (r) => r),
      ),
    ).toBeLessThan(1e-13);
    expect(
      relativeError(
        timeMeanSteadyRatio(e),
        timeMean(e, (r) => r ** -0.5),
      ),
    ).toBeLessThan(1e-13);
    expect(
      relativeError(
        1,
        timeMean(e, (r) => 1 / r),
      ),
    ).toBeLessThan(1e-13); // ⟨1/r⟩ = 1/a
  }
});

// Méndez & Rivera-Valentín (2017), abstract (seen): the time-mean temperature "converges to 90 %"; exactly 2√2/π.
test('limit of a long orbit', () => {
  const limit = (2 * Math.SQRT2) / Math.PI;
  expect(limit).toBeCloseTo(0.9, 2);
  // from above, as ¼(1−e) ln(1/(1−e)): below 1e-8 here
  expect(timeMeanSteadyRatio(1 - 1e-10)).toBeGreaterThan(limit);
  expect(relativeError(timeMeanSteadyRatio(1 - 1e-10), limit)).toBeLessThan(1e-8);
});

test('series for a nearly circular orbit: 1 − e²/16 − 15e⁴/1024 and 1 + e²/8', () => {
  const e = 0.01; // the next terms are e⁶ and 9e⁴/128
  expect(Math.abs(timeMeanSteadyRatio(e) - (1 - e ** 2 / 16 - (15 * e ** 4) / 1024))).toBeLessThan(e ** 6);
  expect(Math.abs(fluxMeanTemperatureRatio(e) - (1 + e ** 2 / 8))).toBeLessThan(e ** 4 / 10);
});

test('Jensen: the mean of the steady temperature is below, that of the mean flux above, the circular one', () => {
  fc.assert(
    fc.property(fc.double({ min: 1e-6, max: 0.9999, noNaN: true }), (e) => {
      expect(timeMeanSteadyRatio(e)).toBeLessThan(1);
      expect(timeMeanSteadyRatio(e)).toBeGreaterThan((2 * Math.SQRT2) / Math.PI);
      expect(fluxMeanTemperatureRatio(e)).toBeGreaterThan(1);
    }),
  );
  fc.assert(
    fc.property(eccentricity, eccentricity, (x, y) => {
      const [low, high] = x < y ? [x, y] : [y, x];
      expect(timeMeanSteadyRatio(high)).toBeLessThanOrEqual(timeMeanSteadyRatio(low) + 2e-15);
      expect(orbitMeanInverseSquare(high)).toBeGreaterThanOrEqual(orbitMeanInverseSquare(low) * (1 - 1e-15));
    }),
  );
});

/**
 * Mallama (2017) arXiv:1703.02670 (seen): Mercury with A = 0.088 has a time-mean temperature of 436.3 K, from 278.5 K for a
 * black planet at 1 au (an older solar constant): one printed digit, 0.05 K. With S₀ = 1361 W m⁻² it is 435.99 K (calculated).
 */
test('Mercury: Mallama 2017', () => {
  const [axisAu, e, albedo] = [0.387098, 0.20563, 0.088];
  const mean = (blackAtOneAu: number) => blackAtOneAu * (1 - albedo) ** 0.25 * axisAu ** -0.5 * timeMeanSteadyRatio(e);
  expect(Math.abs(mean(278.5) - 436.3)).toBeLessThan(0.05);
  expect(Math.abs(mean((solarIrradiance / (4 * stefanBoltzmann)) ** 0.25) - 435.99)).toBeLessThan(0.006);
});

test('farther than its axis for ½ + e/π of the time', () => {
  for (const e of [0, 0.3, 0.97]) {
    expect(1 - meanFromEccentric(Math.PI / 2, e) / Math.PI).toBeCloseTo(0.5 + e / Math.PI, 14);
  }
});

test('errors', () => {
  for (const ratio of [orbitMeanInverseSquare, timeMeanDistanceRatio, timeMeanSteadyRatio, fluxMeanTemperatureRatio]) {
    for (const bad of [-1e-9, 1, Number.NaN]) expect(() => ratio(bad)).toThrow(SimError);
  }
});
