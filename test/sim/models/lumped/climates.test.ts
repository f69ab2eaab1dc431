import { describe, expect, test } from 'vitest';
import { stefanBoltzmann } from '../../../../sim/constants.ts';
import { instellationAtAxis } from '../../../../sim/models/lumped/problem.ts';
import { netHeating } from '../../../../sim/models/steadyState.ts';
import { rampAlbedo } from '../../../../sim/surface/albedo/ramp.ts';
import { column, finding, solve, state, world } from './worlds.ts';

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
