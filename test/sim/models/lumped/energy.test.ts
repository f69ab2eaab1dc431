import { describe, expect, test } from 'vitest';
import { rampAlbedo } from '../../../../sim/surface/albedo/ramp.ts';
import { greyAtmosphere } from '../../../../sim/surface/emission/greyAtmosphere.ts';
import { linearEmission } from '../../../../sim/surface/emission/linear.ts';
import { column, solve, state, world } from './worlds.ts';

const ramp = rampAlbedo({ warm: 0.3, ice: 0.62, from: 255, to: 268 });
const step = rampAlbedo({ warm: 0.3, ice: 0.62, from: 262, to: 262 });

// Absorbed + internal heat − emitted − change of stored heat, by a quadrature that no solver uses, at tolerance 1e-10: the
// account must close to 1e-9 of what is absorbed (dE/E = 4 dT/T leaves 4e-10).
test.each([
  ['plain', world({ e: 0.62, kappa: 0.5 })],
  ['plain, extreme orbit', world({ e: 0.99, kappa: 3 })],
  ['nearly steady', world({ e: 0.4, heatCapacity: 1e2 })],
  ['nearly constant', world({ e: 0.4, heatCapacity: 1e11 })],
  ['internal heat', world({ e: 0.3, kappa: 2, internalHeat: 40 })],
  ['greenhouse', world({ e: 0.3, kappa: 2, emission: greyAtmosphere(0.83) })],
  ['linear emission', world({ e: 0.3, heatCapacity: 2e8, emission: linearEmission({ a: 203.3, b: 2.09 }) })],
  ['ice–albedo ramp', world({ e: 0.2, axisAu: 0.9, heatCapacity: 2e8, albedo: ramp })],
  ['ice–albedo ramp, fast surface', world({ e: 0.3, axisAu: 0.9, heatCapacity: 1e6, albedo: ramp })],
  ['ice–albedo step', world({ e: 0.3, axisAu: 0.9, heatCapacity: 1e6, albedo: step })],
] as const)('the energy account closes: %s', (_, of) => {
  for (const found of solve(of, { tolerance: 1e-10 }).states) {
    expect(found.converged).toBe(true);
    expect(found.energyBalance.relativeDifference).toBeLessThan(1e-9);
  }
});

describe('a run from a start', () => {
  const of = world({ e: 0.5, heatCapacity: 2e8 });
  const start = { temperature: 400, orbits: 3.25, at: 1 };

  test('accounts for the change of stored heat', () => {
    const { energyBalance } = state(of, { tolerance: 1e-10, start });
    expect(energyBalance.relativeDifference).toBeLessThan(1e-9);
    expect(energyBalance.stored).toBeLessThan(-1); // it cools from 400 K
  });

  test('stores what the first and last temperature say', () => {
    const found = state(of, { start });
    const temperature = column(found, 'temperature');
    const time = column(found, 'time');
    const rise = temperature[temperature.length - 1] - temperature[0];
    const expected = (of.surface.heatCapacity * rise) / (time[time.length - 1] - time[0]);
    expect(found.energyBalance.stored / expected).toBeCloseTo(1, 9);
  });
});

// The rows' own weights reproduce the means: what a reader of series.csv computes.
test.each(['balancedAnomaly', 'time'] as const)('weights of the rows, spacing %s', (spacing) => {
  const of = world({ e: 0.62, kappa: 0.5 });
  const found = state(of, { spacing, samples: 720, tolerance: 1e-9 });
  const weight = column(found, 'weight');
  const mean = (name: string) => column(found, name).reduce((sum, value, i) => sum + value * weight[i], 0);
  expect(weight.reduce((sum, w) => sum + w, 0)).toBeCloseTo(1, 13);
  // Trapezoidal rule on a circle: spectral in either variable; 720 points in time leave e^(−720 × 0.27) at e = 0.62.
  expect(mean('absorbed') / found.energyBalance.absorbed).toBeCloseTo(1, 9);
  expect(mean('emitted') / mean('absorbed')).toBeCloseTo(1, 7);
});
