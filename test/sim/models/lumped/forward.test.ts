import { expect, test } from 'vitest';
import { SimError } from '../../../../sim/error.ts';
import { steadyAtAlbedo } from '../../../../sim/findings/steadyState.ts';
import { instellationAtAxis } from '../../../../sim/models/lumped/problem.ts';
import { constantAlbedo } from '../../../../sim/surface/albedo/constant.ts';
import { linearEmission } from '../../../../sim/surface/emission/linear.ts';
import { column, finding, largestDifference, solve, state, world } from './worlds.ts';

// Linear emission on a circular orbit relaxes exponentially: T = T_s + (T₀ − T_s) exp(−B t/C), exactly.
test.each([1e-4, 1e-6, 1e-9])('linear relaxation keeps the tolerance %f', (tolerance) => {
  const of = world({ e: 0, heatCapacity: 4e8, emission: linearEmission({ a: 203.3, b: 2.09 }) });
  const found = state(of, { tolerance, start: { temperature: 320, orbits: 6, at: 0 } });
  const settled = steadyAtAlbedo(of.surface, instellationAtAxis(of), 0.3);
  const time = column(found, 'time');
  const error = column(found, 'temperature').reduce((largest, value, i) => {
    const exact = settled + (320 - settled) * Math.exp((-2.09 * time[i]) / 4e8);
    return Math.max(largest, Math.abs(value / exact - 1));
  }, 0);
  expect(error).toBeLessThan(tolerance);
  expect(error).toBeLessThan(found.errorEstimate);
});

// A black body cooling without starlight: 1/T³ = 1/T₀³ + 3σt/C (separable; any mechanics-of-heat textbook), A → 1 leaves 1e-9 of
// the flux, which moves the temperature by less than 1e-9 here.
test('cooling in the dark follows the closed form', () => {
  const of = world({ e: 0.4, heatCapacity: 1e8, albedo: constantAlbedo(1 - 1e-12) });
  const found = state(of, { tolerance: 1e-9, start: { temperature: 300, orbits: 1, at: 0 } });
  const time = column(found, 'time');
  for (const [i, value] of column(found, 'temperature').entries()) {
    const exact = (300 ** -3 + (3 * 5.670374419e-8 * time[i]) / 1e8) ** (-1 / 3);
    expect(Math.abs(value / exact - 1)).toBeLessThan(2e-9);
  }
});

test('a long run ends in the periodic state', () => {
  const of = world({ e: 0.6, kappa: 0.3 });
  const run = state(of, { start: { temperature: 500, orbits: 12, at: 0 }, samples: 90, tolerance: 1e-8 });
  const settled = state(of, { samples: 90, tolerance: 1e-8 });
  const last = column(run, 'temperature').slice(-91, -1);
  for (const [i, value] of column(settled, 'temperature').entries())
    expect(Math.abs(last[i] / value - 1)).toBeLessThan(2e-8);
});

test('the start is where it is asked for', () => {
  const of = world({ e: 0.6, kappa: 0.3 });
  const found = state(of, { start: { temperature: 222, orbits: 2, at: 2.1 }, samples: 36 });
  expect(column(found, 'temperature')).toHaveLength(73);
  expect(column(found, 'temperature')[0]).toBe(222);
  expect(column(found, 'time')[0]).toBe(0);
  expect(column(found, 'trueAnomaly')[0]).toBeCloseTo(2.1, 12);
  expect(column(found, 'time')[72] / of.orbit.period).toBeCloseTo(2, 12);
});

test('a stiff start: the fast transient is resolved, not skipped', () => {
  const of = world({ e: 0.9, heatCapacity: 1e3 });
  const found = state(of, { start: { temperature: 900, orbits: 1, at: Math.PI }, samples: 720 });
  expect(column(found, 'temperature')[0]).toBe(900);
  // Radiative time at 900 K: C/(4σT³) = 6 s; one row later it sits on the steady value.
  expect(column(found, 'temperature')[1] / column(found, 'steadyTemperature')[1]).toBeCloseTo(1, 5);
  expect(found.energyBalance.relativeDifference).toBeLessThan(1e-5);
});

test('findings of a run speak of the run', () => {
  const of = world({ e: 0.5, heatCapacity: 2e8 });
  const cooling = state(of, { start: { temperature: 400, orbits: 5, at: 1 } });
  expect(finding(cooling, 'timeOfMax')).toBe(0);
  expect(cooling.findings.find(({ name }) => name === 'lagOfMax')?.reason).toBe('the maximum is the start itself');
  expect(cooling.findings.find(({ name }) => name === 'lagOfFirstHarmonic')?.reason).toBe(
    'a run from a start is not periodic',
  );
  expect(cooling.stable).toBeNull();
  expect(cooling.dataset.variables.time.longName).toBe('Time after the start');
});

test('a run that ends while it warms claims no maximum, lag or damping', () => {
  const of = world({ e: 0.1, heatCapacity: 4e9 });
  const { states, warnings } = solve(of, { start: { temperature: 100, orbits: 6, at: 0 } });
  for (const name of ['timeOfMax', 'lagOfMax', 'lagOfMaxOrbits', 'damping']) {
    const found = states[0].findings.find((candidate) => candidate.name === name)!;
    expect(found.value).toBeNull();
    expect(found.reason).toMatch(/the run ends before|the end of the run|not periodic/);
  }
  expect(warnings.join()).toMatch(/has not settled: its last orbit ends .* K warmer/);
});

test('a run that cannot end says so', () => {
  const of = world({ e: 0.5, heatCapacity: 2e8 });
  const endless = () => solve(of, { start: { temperature: 400, orbits: 1e9, at: 0 }, samples: 1e-6 });
  expect(endless).toThrow(SimError);
  expect(endless).toThrow(/need more than 8000000 steps/);
});

// Slopes of the curve are the rates at the new ends: the rates one Newton change earlier left 1e-9 between the nodes.
test('a stiff run keeps a tolerance of 1e-10', () => {
  const of = world({ e: 0.2, axisAu: 0.9, heatCapacity: 1e3 });
  const start = { temperature: 900, orbits: 1.7, at: 2 };
  const found = state(of, { tolerance: 1e-10, start });
  const finer = state(of, { tolerance: 1e-11, start });
  expect(found.converged).toBe(true);
  expect(largestDifference(found, finer)).toBeLessThan(1e-10);
});

test('a start so cold that a linear law emits less than nothing has no emission temperature, and says why', () => {
  const of = world({ e: 0.2, heatCapacity: 2e8, emission: linearEmission({ a: 203.3, b: 2.09 }) });
  const found = state(of, { start: { temperature: 100, orbits: 1, at: 0 }, samples: 36 });
  const emission = found.findings.find(({ name }) => name === 'emissionTemperatureMean');
  expect(emission).toMatchObject({ value: null, reason: expect.stringContaining('below zero') });
});
