import { describe, expect, test } from 'vitest';
import { stefanBoltzmann } from '../../../../sim/constants.ts';
import { netHeating } from '../../../../sim/findings/steadyState.ts';
import { instellationAtAxis } from '../../../../sim/models/lumped/problem.ts';
import { rampAlbedo } from '../../../../sim/surface/albedo/ramp.ts';
import { column, finding, largestDifference, solve, state, world } from './worlds.ts';

const ramp = rampAlbedo({ warm: 0.3, ice: 0.62, from: 255, to: 268 });

describe('a circular orbit with two climates', () => {
  const of = world({ e: 0, axisAu: 0.9, heatCapacity: 2e8, albedo: ramp });
  const { states, warnings } = solve(of, { tolerance: 1e-9 });
  const flux = instellationAtAxis(of);

  test('has a warm, a middle and a cold state, where absorbed equals emitted', () => {
    expect(states.map(({ label, stable }) => [label, stable])).toEqual([
      ['warm', true],
      ['middle', false],
      ['cold', true],
    ]);
    for (const found of states) {
      expect(Math.abs(netHeating(of.surface, flux, finding(found, 'temperatureMean')))).toBeLessThan(1e-6);
    }
    expect(warnings.join()).toContain('3 periodic states');
  });

  // On a circular orbit a state is a balance of the mean flux: its own, the middle one as well, and so is its time constant.
  test('each with its own steady temperature and time constant', () => {
    for (const found of states) {
      const t = finding(found, 'temperatureMean');
      expect(Math.abs(finding(found, 'fluxMeanTemperature') - t)).toBeLessThan(1e-4);
      expect(Math.abs(finding(found, 'circularTemperature') - t)).toBeLessThan(1e-4);
      const timeConstant = of.surface.heatCapacity / (4 * stefanBoltzmann * t ** 3);
      expect(finding(found, 'radiativeTimeConstant') / timeConstant).toBeCloseTo(1, 5);
    }
  });

  // At a fixed point the multiplier is exp(P ∂(net heating)/∂T / C): closed form.
  test('each with its own multiplier and margin', () => {
    for (const found of states) {
      const t = finding(found, 'temperatureMean');
      const emitted = 4 * stefanBoltzmann * t ** 3;
      const feedback = -0.25 * flux * ramp.slopeAt(t);
      const log = (of.orbit.period * (feedback - emitted)) / of.surface.heatCapacity;
      expect(Math.log(found.multiplier!)).toBeCloseTo(log, 5);
      expect(found.stabilityMargin).toBeCloseTo(1 - feedback / emitted, 6);
    }
  });
});

describe('an eccentric orbit with two climates', () => {
  const of = world({
    e: 0.2,
    axisAu: 0.9,
    heatCapacity: 4e8,
    albedo: rampAlbedo({ warm: 0.3, ice: 0.62, from: 264, to: 266 }),
  });
  const { states } = solve(of);

  test('keeps all three', () => {
    expect(states.map(({ label }) => label)).toEqual(['warm', 'middle', 'cold']);
    const [warm, middle, cold] = states.map((one) => finding(one, 'fluxMeanTemperature'));
    expect([warm > 266, middle > 264 && middle < 266, cold < 264]).toEqual([true, true, true]);
    expect(states[1].multiplier).toBeGreaterThan(1);
    expect(states[1].stabilityMargin).toBeLessThan(0);
  });

  // Waiting is the independent method: a run of 120 orbits from either side of the middle state ends in the state on that side.
  test.each([
    ['just above the middle', 0.5, 0],
    ['just below the middle', -0.5, 2],
    ['from far above', 150, 0],
    ['from far below', -100, 2],
  ] as const)('%s', (_, offset, expected) => {
    const middle = column(states[1], 'temperature')[0];
    const run = state(of, { start: { temperature: middle + offset, orbits: 120, at: 0 }, samples: 16 });
    const last = column(run, 'temperature').at(-1)!;
    expect(last / column(states[expected], 'temperature')[0]).toBeCloseTo(1, 5);
  });
});

test('the margin shrinks to nothing where the warm state ends', () => {
  const margin = (axisAu: number): number => {
    const { states } = solve(world({ e: 0.1, axisAu, heatCapacity: 4e8, albedo: ramp }));
    return states[0].label === 'warm' ? states[0].stabilityMargin! : Number.NaN;
  };
  // The warm state of this orbit vanishes between 0.90 and 0.95 au: bisect for the last axis that still has it.
  let kept = 0.9;
  let lost = 0.95;
  expect(margin(kept)).toBeGreaterThan(0);
  expect(margin(lost)).toBeNaN();
  for (let i = 0; i < 14; i++) {
    const middle = (kept + lost) / 2;
    if (Number.isNaN(margin(middle))) lost = middle;
    else kept = middle;
  }
  // Near a fold the margin falls as the square root of the distance: 3e-6 au of it are left.
  expect(margin(kept)).toBeGreaterThan(-1e-3);
  expect(margin(kept)).toBeLessThan(0.05);
});

test('a stepped albedo: both stable states, and a word about the one that rests on the step', () => {
  const albedo = rampAlbedo({ warm: 0.3, ice: 0.62, from: 265, to: 265 });
  const { states, warnings } = solve(world({ e: 0.2, axisAu: 0.9, heatCapacity: 4e8, albedo }));
  expect(states.map(({ label, stable }) => [label, stable])).toEqual([
    ['warm', true],
    ['cold', true],
  ]);
  expect(warnings.join()).toContain('rests on the albedo step');
});

test('a ramp that no state reaches changes nothing', () => {
  const far = rampAlbedo({ warm: 0.3, ice: 0.62, from: 30, to: 35 });
  const withRamp = solve(world({ e: 0.5, axisAu: 0.7, kappa: 1, albedo: far }), { tolerance: 1e-8 });
  const without = state(world({ e: 0.5, axisAu: 0.7, kappa: 1 }), { tolerance: 1e-8 });
  expect(withRamp.states).toHaveLength(1);
  for (const name of ['temperatureMax', 'temperatureMin', 'temperatureMean', 'damping']) {
    expect(finding(withRamp.states[0], name) / finding(without, name)).toBeCloseTo(1, 7);
  }
});

// The steady value jumps between ice and open water where the state passes from the reach of one balance to that of another.
// Reference: the same rule on 100000 equal times, whose error is one row per jump: 50 K × 2 / 100000.
test('the mean steady temperature of a world that changes branch', () => {
  const of = world({ e: 0.2, heatCapacity: 2e8, albedo: rampAlbedo({ warm: 0.3, ice: 0.62, from: 250, to: 280 }) });
  const options = { samples: 100_000, spacing: 'time' } as const;
  for (const found of solve(of, options).states) {
    const steady = column(found, 'steadyTemperature');
    const mean = steady.reduce((sum, value) => sum + value, 0) / steady.length;
    expect(Math.abs(finding(found, 'steadyTemperatureMean') - mean)).toBeLessThan(1e-3);
    expect(finding(found, 'steadyTemperatureMax')).toBeGreaterThanOrEqual(
      steady.reduce((a, b) => Math.max(a, b)) - 1e-6,
    );
  }
});

test('a fast planet at its hottest, just under the upper bound of the search, is not overlooked', () => {
  const albedo = rampAlbedo({ warm: 0.3, ice: 0.5, from: 30, to: 40 });
  const fast = world({ e: 0.7566724631353281, heatCapacity: 4682.707871901694, axisAu: 1.10405512615107, albedo });
  const { states } = solve(fast, { samples: 16 });
  expect(states.map(({ label }) => label)).toEqual(['only']);
  expect(finding(states[0], 'temperatureMax') / finding(states[0], 'steadyTemperatureMax')).toBeCloseTo(1, 3);
});

test('a maximum that comes at periapsis to within its error lags by nothing, not by a whole orbit', () => {
  const albedo = rampAlbedo({ warm: 0.3, ice: 0.5, from: 30, to: 40 });
  const fast = world({ e: 0.9998857052774277, heatCapacity: 6939.208260862458, axisAu: 0.11790674128235094, albedo });
  expect(finding(state(fast, { tolerance: 7.5e-5, samples: 16 }), 'lagOfMaxOrbits')).toBeLessThan(1e-3);
});

// The step across a break of the ramp ends where the break is: both sides of it must be refined, and the estimate must see both.
test('the estimate holds across the ends of a ramp', () => {
  for (const [from, to] of [
    [240, 280],
    [240, 243],
    [262, 262],
  ] as const) {
    const of = world({ e: 0.4, heatCapacity: 1e6, albedo: rampAlbedo({ warm: 0.3, ice: 0.6, from, to }) });
    const exact = state(of, { tolerance: 1e-11 });
    for (const tolerance of [1e-4, 1e-6, 1e-8]) {
      const found = state(of, { tolerance });
      const error = largestDifference(found, exact);
      expect(error).toBeLessThan(tolerance);
      expect(error).toBeLessThan(1.2 * found.errorEstimate + 1e-11);
    }
  }
});
