import { describe, expect, test } from 'vitest';
import { SimError } from '../../../../sim/error.ts';
import { instellationAtAxis } from '../../../../sim/models/lumped/problem.ts';
import { constantAlbedo } from '../../../../sim/surface/albedo/constant.ts';
import { greyAtmosphere } from '../../../../sim/surface/emission/greyAtmosphere.ts';
import { linearEmission } from '../../../../sim/surface/emission/linear.ts';
import type { Window } from '../../../../sim/world.ts';
import { column, finding, solve, state, world } from './worlds.ts';

const of = world({ e: 0.62, kappa: 0.5 });
const windows: Window[] = [
  { name: 'liquid', of: 'temperature', from: 250, to: 270 },
  { name: 'temperate', of: 'instellation', from: 600, to: 2000 },
  { name: 'above', of: 'instellation', from: 1, to: 1e9 },
  { name: 'nowhere', of: 'instellation', from: 1e7, to: 1e9 },
  { name: 'unknown', of: 'instellation', from: 0, to: 0, unavailable: 'the star is too cool' },
];
const found = state(of, { tolerance: 1e-9 }, windows);

describe('against brute force on 100000 rows equal in time', () => {
  const dense = state(of, { tolerance: 1e-9, samples: 100_000, spacing: 'time' });
  const temperature = column(dense, 'temperature');
  const time = column(dense, 'time');
  const step = of.orbit.period / temperature.length;
  const indexOf = (pick: (a: number, b: number) => boolean, values: ArrayLike<number>) => {
    let best = 0;
    for (let i = 0; i < values.length; i++) if (pick(values[i], values[best])) best = i;
    return best;
  };
  const rates = temperature.map((value, i) => (temperature[(i + 1) % temperature.length] - value) / step);
  const greatest = (a: number, b: number) => a > b;
  const least = (a: number, b: number) => a < b;

  test('extremes and their times', () => {
    const hottest = indexOf(greatest, temperature);
    const coldest = indexOf(least, temperature);
    expect(finding(found, 'temperatureMax')).toBeGreaterThanOrEqual(temperature[hottest]);
    expect(finding(found, 'temperatureMax')).toBeCloseTo(temperature[hottest], 5);
    expect(finding(found, 'temperatureMin')).toBeCloseTo(temperature[coldest], 5);
    expect(Math.abs(finding(found, 'timeOfMax') - time[hottest])).toBeLessThan(step);
    expect(Math.abs(finding(found, 'timeOfMin') - time[coldest])).toBeLessThan(step);
  });

  test('mean', () => {
    const mean = temperature.reduce((sum, value) => sum + value, 0) / temperature.length;
    expect(finding(found, 'temperatureMean') / mean).toBeCloseTo(1, 9);
  });

  test('fastest warming and cooling', () => {
    const warming = indexOf(greatest, rates);
    const cooling = indexOf(least, rates);
    // Differences over one row see the rate half a row off: relative error of order step/period.
    expect(finding(found, 'fastestWarming') / rates[warming]).toBeCloseTo(1, 4);
    expect(finding(found, 'fastestCooling') / rates[cooling]).toBeCloseTo(1, 4);
    const periodic = (dt: number) => Math.abs(dt - of.orbit.period * Math.round(dt / of.orbit.period));
    // The brute-force place of a flat extreme is known to the square root of the differences' noise, 1e-8 of the rate.
    expect(periodic(finding(found, 'timeOfFastestWarming') - time[warming])).toBeLessThan(5e-4 * of.orbit.period);
    expect(periodic(finding(found, 'timeOfFastestCooling') - time[cooling])).toBeLessThan(5e-4 * of.orbit.period);
  });

  test('time in windows', () => {
    const share = (values: Float64Array, { from, to }: Window) =>
      values.reduce((count, value) => count + (value >= from && value <= to ? 1 : 0), 0) / values.length;
    // A crossing is known to one row; four crossings at most.
    const rows = 4 / temperature.length;
    expect(Math.abs(finding(found, 'fractionInWindow.liquid') - share(temperature, windows[0]))).toBeLessThan(rows);
    const flux = column(dense, 'instellation');
    expect(Math.abs(finding(found, 'fractionInWindow.temperate') - share(flux, windows[1]))).toBeLessThan(rows);
  });
});

test('windows at their limits', () => {
  expect(finding(found, 'fractionInWindow.above')).toBe(1);
  expect(finding(found, 'fractionInWindow.nowhere')).toBe(0);
  expect(finding(found, 'orbitMeanInWindow.above')).toBe(1);
  expect(finding(found, 'orbitMeanInWindow.nowhere')).toBe(0);
  const unknown = found.findings.filter(({ name }) => name.endsWith('.unknown'));
  expect(unknown.map(({ value, reason }) => [value, reason])).toEqual([
    [null, 'the star is too cool'],
    [null, 'the star is too cool'],
  ]);
});

test('steady values of a plain world follow the closed forms', () => {
  const unit = finding(found, 'circularTemperature');
  expect(finding(found, 'equilibriumTemperature')).toBeCloseTo(unit, 9); // unit emissivity, no internal heat
  expect(finding(found, 'steadyTemperatureMax') / unit).toBeCloseTo((1 - 0.62) ** -0.5, 12);
  expect(finding(found, 'steadyTemperatureMin') / unit).toBeCloseTo((1 + 0.62) ** -0.5, 12);
  expect(finding(found, 'fluxMeanTemperature') / unit).toBeCloseTo((1 - 0.62 ** 2) ** -0.125, 12);
});

test('a greenhouse warms the surface by (1 + 3τ/4)^¼ and leaves the textbook number alone', () => {
  const tau = 0.83;
  const hot = state(world({ e: 0, heatCapacity: 1e7, emission: greyAtmosphere(tau) }));
  const ratio = finding(hot, 'circularTemperature') / finding(hot, 'equilibriumTemperature');
  expect(ratio).toBeCloseTo((1 + 0.75 * tau) ** 0.25, 12);
  expect(finding(hot, 'emissionTemperatureMean')).toBeCloseTo(finding(hot, 'equilibriumTemperature'), 9);
});

test('a circular orbit has no maximum to speak of, and says so', () => {
  const still = state(world({ e: 0, heatCapacity: 1e7 }));
  for (const name of ['timeOfMax', 'timeOfMin', 'lagOfMax', 'lagOfMaxOrbits', 'lagOfFirstHarmonic', 'damping']) {
    const { value, reason } = still.findings.find((candidate) => candidate.name === name)!;
    expect(value).toBeNull();
    expect(reason).toMatch(/does not vary/);
  }
  expect(finding(still, 'temperatureMax')).toBe(finding(still, 'temperatureMin'));
  expect(finding(still, 'fastestWarming')).toBe(0);
});

test('internal heat alone keeps a world warm: E(T) = H to the last digit', () => {
  const dark = world({ e: 0.3, heatCapacity: 1e7, axisAu: 1e6, internalHeat: 5 });
  expect(of.surface.emission.at(finding(state(dark), 'temperatureMean'))).toBeCloseTo(5, 8);
});

test('a published emission law used beyond its range is a warning', () => {
  const hot = world({ e: 0.3, axisAu: 0.4, heatCapacity: 1e7, emission: linearEmission({ a: 203.3, b: 2.09 }) });
  expect(solve(hot).warnings.join()).toMatch(/beyond the -60 to 50 °C/);
});

test('an almost perfectly reflecting planet still has a temperature', () => {
  const bright = state(world({ e: 0.3, heatCapacity: 1e7, albedo: constantAlbedo(0.999999) }));
  expect(finding(bright, 'temperatureMean')).toBeGreaterThan(1);
});

test('nothing in a finding or a row is ever not a number', () => {
  const worlds = [of, world({ e: 0, heatCapacity: 1e2 }), world({ e: 0.9999, heatCapacity: 1e11, axisAu: 50 })];
  for (const each of worlds) {
    const { findings, dataset } = state(each, {}, windows);
    for (const { value, plusMinus } of findings) {
      expect(value === null || Number.isFinite(value)).toBe(true);
      expect(plusMinus === undefined || plusMinus >= 0).toBe(true);
    }
    for (const { data } of Object.values(dataset.variables)) expect(data.every(Number.isFinite)).toBe(true);
  }
});

test('a planet that nothing heats is refused', () => {
  const cold = { ...of, surface: { ...of.surface, albedo: { ...constantAlbedo(0.5), warm: 1 } } };
  expect(() => solve(cold)).toThrow(SimError);
});

test('fastest changes are roots of the change of heating, also near the ends of a piece', () => {
  for (let i = 0; i < 12; i++) {
    const each = world({ e: 0.08 + 0.07 * i, kappa: 10 ** (-3 + 0.45 * i) });
    const dense = state(each, { tolerance: 1e-9, samples: 20_000 });
    const heating = column(dense, 'absorbed').map((absorbed, k) => absorbed - column(dense, 'emitted')[k]);
    const { heatCapacity } = each.surface;
    // A sample misses the extreme by the square of its distance, (2π/20000)² of the rate.
    const warming = heating.reduce((most, value) => Math.max(most, value)) / heatCapacity;
    const cooling = heating.reduce((least, value) => Math.min(least, value)) / heatCapacity;
    expect(Math.abs(finding(dense, 'fastestWarming') / warming - 1)).toBeLessThan(1e-6);
    expect(Math.abs(finding(dense, 'fastestCooling') / cooling - 1)).toBeLessThan(1e-6);
  }
});

// Where the heat store vanishes the temperature is the steady one, T ∝ (a/r)^½, and with d(r/a)/dt = n e sin ν/√(1−e²)
// (Kepler's second law) its rate is ½ T_c n e sin ν (1 + e cos ν)^(3/2) / (1 − e²)². A store of κ = 1e6 is late by about 1e-6 of
// the orbit; tolerance 1e-6 with a margin of ten, since a rate knows less than a temperature.
test.each([0.05, 0.3, 0.6, 0.9])('the fastest changes of a fast world follow the closed form, e = %f', (e) => {
  const fast = state(world({ e, kappa: 1e6 }));
  const motion = (2 * Math.PI) / world({ e, kappa: 1e6 }).orbit.period;
  const rate = (nu: number) => (e * Math.sin(nu) * (1 + e * Math.cos(nu)) ** 1.5) / (1 - e * e) ** 2;
  const steps = 200_000; // the largest sample is the maximum to (π/steps)²
  const fastest = Array.from({ length: steps }, (_, i) => rate((Math.PI * i) / steps)).reduce((a, b) => Math.max(a, b));
  const expected = 0.5 * finding(fast, 'circularTemperature') * motion * fastest;
  expect(Math.abs(finding(fast, 'fastestWarming') / expected - 1)).toBeLessThan(1e-5);
  expect(Math.abs(finding(fast, 'fastestCooling') / -expected - 1)).toBeLessThan(1e-5);
});

// ⟨T⟩ of the steady value with internal heat, by the trapezoidal rule in the eccentric anomaly, dM = (1 − e cos E) dE.
test.each([0.1, 0.62, 0.95])('mean steady temperature over internal heat, e = %f', (e) => {
  const warm = world({ e, kappa: 1, internalHeat: 40 });
  const { surface } = warm;
  const points = 4096; // poles at ± i ln(1/β): β^4096 is nothing at e = 0.95
  let sum = 0;
  for (let i = 0; i < points; i++) {
    const ratio = 1 - e * Math.cos((2 * Math.PI * i) / points);
    const absorbed = surface.absorbingFraction * (1 - surface.albedo.warm) * instellationAtAxis(warm);
    sum += ratio * surface.emission.inverse(absorbed / ratio ** 2 + 40);
  }
  expect(finding(state(warm), 'steadyTemperatureMean') / (sum / points)).toBeCloseTo(1, 13);
});
