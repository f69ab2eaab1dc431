import fc from 'fast-check';
import { describe, expect, test } from 'vitest';
import { radiansPerDegree, secondsPerDay, secondsPerYear } from '../../../sim/constants.ts';
import { SimError } from '../../../sim/error.ts';
import { greyBody } from '../../../sim/surface/emission/greyBody.ts';
import { linearEmission } from '../../../sim/surface/emission/linear.ts';
import { atmosphereHeatCapacity } from '../../../sim/surface/heatStore/atmosphere.ts';
import { groundHeatCapacity, groundLinearResponse } from '../../../sim/surface/heatStore/ground.ts';
import { lumpedLinearResponse } from '../../../sim/surface/heatStore/linearResponse.ts';
import { mixedLayerHeatCapacity } from '../../../sim/surface/heatStore/mixedLayer.ts';
import { mixedLayers, radiatingGround, radiativeTimes, seasonalLags, titanLag } from '../../published/heatStores.ts';
import { relativeError } from '../relative.ts';

const positive = fc.double({ min: -3, max: 8, noNaN: true }).map((power) => 10 ** power);

describe('mixed layer', () => {
  for (const { depth, heatCapacity, yearsAtB209 } of mixedLayers) {
    test(`${depth} m`, () => {
      expect(mixedLayerHeatCapacity(depth)).toBe(heatCapacity);
      const slope = linearEmission({ a: 203.3, b: 2.09 }).slopeAt(288);
      expect(relativeError(mixedLayerHeatCapacity(depth) / slope / secondsPerYear, yearsAtB209)).toBeLessThan(1e-6); // 6 digits
    });
  }

  // North & Coakley (1979) print 4.6 yr for 75 m (from memory): two digits, half a unit is 0.05; 4.65 rounds either way.
  test('75 m of ocean: 4.6 years', () => {
    expect(Math.abs(mixedLayerHeatCapacity(75) / 2.09 / secondsPerYear - 4.6)).toBeLessThan(0.051);
  });

  // With 4σ(255 K)³ instead: 1.723 and 2.584 yr (calculated, 4 digits).
  test('radiating at 255 K', () => {
    const years = (depth: number) => mixedLayerHeatCapacity(depth) / greyBody(1).slopeAt(255) / secondsPerYear;
    expect(years(50)).toBeCloseTo(1.723, 3);
    expect(years(75)).toBeCloseTo(2.584, 3);
  });
});

describe('atmosphere: radiative time constant p c_p/(4 g σ T³)', () => {
  for (const { body, temperature, days, ...air } of radiativeTimes) {
    test(body, () => {
      const time = atmosphereHeatCapacity(air) / greyBody(1).slopeAt(temperature);
      expect(relativeError(time / secondsPerDay, days)).toBeLessThan(1e-6); // 6 digits or more
    });
  }
});

describe('lumped linear response', () => {
  /** A store with the time constant τ, in units where dE/dT is 1. */
  const lagDeg = (years: number, period: number) =>
    lumpedLinearResponse({ heatCapacity: years, cycle: period, radiativeSlope: 1 }).lag / radiansPerDegree;

  for (const { body, years, lagDeg: published, period, periodSlack } of seasonalLags) {
    // τ is printed to 0.001 yr and the lag to 0.01°: half a unit of each, and what is not known of the period.
    test(`seasonal lag of ${body}`, () => {
      expect(lagDeg(years - 5e-4, period * (1 + periodSlack)) - 0.005).toBeLessThanOrEqual(published);
      expect(lagDeg(years + 5e-4, period * (1 - periodSlack)) + 0.005).toBeGreaterThanOrEqual(published);
    });
  }

  test("Titan's row contradicts itself", () => {
    expect(lagDeg(titanLag.years, titanLag.period)).toBeCloseTo(titanLag.lagOfYearsDeg, 2);
    expect(lagDeg(titanLag.yearsOfLag, titanLag.period)).toBeCloseTo(titanLag.lagDeg, 1);
    expect(titanLag.yearsOfLag / titanLag.years).toBeGreaterThan(600);
  });

  /**
   * North & Coakley (1979) J. Atmos. Sci. 36, 1189, first seasonal harmonic with diffusion: Q a · 2 sin ε / |B + 2D + iωC|,
   * C/B = 4.65 yr (ocean) and 0.16 yr (land); form from memory, values calculated to 7 digits;
   * days are those of a tropical year of 365.2422.
   */
  test('seasons of ocean and land', () => {
    const [b, d, year] = [2.09, 0.649, 365.25 * secondsPerDay];
    const forcing = 340.25 * 0.68 * 2 * Math.sin(23.44 * radiansPerDegree);
    const season = (yearsOfStore: number) => {
      const slope = b + 2 * d;
      const heatCapacity = yearsOfStore * secondsPerYear * b;
      const { amplitude, lag } = lumpedLinearResponse({ heatCapacity, cycle: year, radiativeSlope: slope });
      return { kelvin: (forcing / slope) * amplitude, days: (lag / (2 * Math.PI)) * 365.2422 };
    };
    expect(relativeError(season(4.65).kelvin, 3.009835234)).toBeLessThan(1e-6);
    expect(relativeError(season(4.65).days, 88.088589)).toBeLessThan(1e-6);
    expect(relativeError(season(0.16).kelvin, 46.17259012)).toBeLessThan(1e-6);
    expect(relativeError(season(0.16).days, 32.268615)).toBeLessThan(1e-6);
  });

  test('ωτ = 1: 1/√2 and 45°', () => {
    const { amplitude, lag } = lumpedLinearResponse({ heatCapacity: 1, cycle: 2 * Math.PI, radiativeSlope: 1 });
    expect(amplitude).toBeCloseTo(Math.SQRT1_2, 15);
    expect(lag).toBeCloseTo(Math.PI / 4, 15);
  });
});

describe('ground', () => {
  for (const { phi, amplitude, lagDeg } of radiatingGround) {
    test(`radiating half-space, Φ = ${phi}`, () => {
      // Φ = Γ√ω/(dE/dT): with ω = 1 and dE/dT = 1 it is Γ. 12 digits.
      const response = groundLinearResponse({ thermalInertia: phi, cycle: 2 * Math.PI, radiativeSlope: 1 });
      expect(relativeError(response.amplitude, amplitude)).toBeLessThan(5e-12);
      expect(relativeError(response.lag / radiansPerDegree, lagDeg)).toBeLessThan(5e-12);
    });
  }

  test('against layers that conduct: no formula for the half-space', () => {
    const [thermalInertia, cycle, radiativeSlope] = [800, 60 * secondsPerDay, 3.1];
    const omega = (2 * Math.PI) / cycle;
    const surface = layeredAdmittance(thermalInertia, omega);
    const size = Math.hypot(radiativeSlope + surface.real, surface.imaginary);
    const response = groundLinearResponse({ thermalInertia, cycle, radiativeSlope });
    // second order in layers of 1/200 skin depth: 1e-5 of the admittance
    expect(relativeError(response.amplitude, radiativeSlope / size)).toBeLessThan(1e-5);
    expect(relativeError(response.lag, Math.atan2(surface.imaginary, radiativeSlope + surface.real))).toBeLessThan(
      1e-5,
    );
    // and the lumped store is the quadrature part of it
    expect(relativeError(omega * groundHeatCapacity({ thermalInertia, cycle }), surface.imaginary)).toBeLessThan(1e-5);
  });

  test('lags at most 45°, a lumped store up to 90°; both damp more with more inertia', () => {
    fc.assert(
      fc.property(positive, positive, positive, (thermalInertia, cycle, radiativeSlope) => {
        const ground = groundLinearResponse({ thermalInertia, cycle, radiativeSlope });
        const heatCapacity = groundHeatCapacity({ thermalInertia, cycle });
        const lumped = lumpedLinearResponse({ heatCapacity, cycle, radiativeSlope });
        expect(ground.lag).toBeLessThanOrEqual(Math.PI / 4);
        expect(lumped.lag).toBeLessThanOrEqual(Math.PI / 2);
        // same quadrature part, but the half-space also has one in phase: it damps more and lags less
        expect(ground.amplitude).toBeLessThanOrEqual(lumped.amplitude);
        expect(ground.lag).toBeLessThanOrEqual(lumped.lag);
        const more = groundLinearResponse({ thermalInertia: 2 * thermalInertia, cycle, radiativeSlope });
        expect(more.amplitude).toBeLessThanOrEqual(ground.amplitude);
      }),
    );
  });
});

/** Flux into the ground per kelvin at the surface, W m⁻² K⁻¹, of 20 skin depths in thin layers: half-layer conductances around stores. */
function layeredAdmittance(thermalInertia: number, omega: number): { real: number; imaginary: number } {
  const volumetric = 1.5e6; // ρc; the result must not depend on it
  const conductivity = thermalInertia ** 2 / volumetric;
  const skin = Math.sqrt((2 * conductivity) / (volumetric * omega));
  const thickness = skin / 200;
  const half = (2 * conductivity) / thickness;
  let [real, imaginary] = [0, 0]; // insulated below
  for (let layer = 0; layer < 4000; layer++) {
    [real, imaginary] = inSeries(half, real, imaginary);
    imaginary += omega * volumetric * thickness;
    [real, imaginary] = inSeries(half, real, imaginary);
  }
  return { real, imaginary };
}

/** A conductance in series with an admittance: g y/(g + y). */
function inSeries(conductance: number, real: number, imaginary: number): [number, number] {
  const [sumReal, size] = [conductance + real, (conductance + real) ** 2 + imaginary ** 2];
  return [(conductance * (real * sumReal + imaginary ** 2)) / size, (conductance * conductance * imaginary) / size];
}

test('errors', () => {
  for (const bad of [0, -1, Number.NaN, Number.POSITIVE_INFINITY]) {
    expect(() => mixedLayerHeatCapacity(bad)).toThrow('planet.heatStore.mixedLayer');
    expect(() => atmosphereHeatCapacity({ surfacePressure: bad, specificHeat: 1, gravity: 1 })).toThrow(SimError);
    expect(() => atmosphereHeatCapacity({ surfacePressure: 1, specificHeat: bad, gravity: 1 })).toThrow(SimError);
    expect(() => atmosphereHeatCapacity({ surfacePressure: 1, specificHeat: 1, gravity: bad })).toThrow(SimError);
    expect(() => groundHeatCapacity({ thermalInertia: bad, cycle: 1 })).toThrow(SimError);
    expect(() => groundLinearResponse({ thermalInertia: 1, cycle: bad, radiativeSlope: 1 })).toThrow(SimError);
    expect(() => lumpedLinearResponse({ heatCapacity: 1, cycle: 1, radiativeSlope: bad })).toThrow(SimError);
  }
});
