/** A cold start that fails must not pass for a climate that is not there. */
import { describe, expect, test } from 'vitest';
import { zonalModel } from '../../../../sim/models/zonal/index.ts';
import { runCase } from '../../../../sim/run.ts';
import type { ScenarioCase } from '../../../../sim/scenario/types.ts';
import { rampAlbedo } from '../../../../sim/surface/albedo/ramp.ts';
import { greyBody } from '../../../../sim/surface/emission/greyBody.ts';
import { zonalWorld } from './worlds.ts';

// Half of each band is land of next to no heat store. In the warm climate it never freezes; in the cold one it melts each year at
// `melts`, within seconds, on a ramp half a kelvin wide: no step follows that.
const world = (melts: number, e = 0.25) =>
  zonalWorld({
    q: 340,
    e,
    albedo: rampAlbedo({ warm: 0.2, ice: 0.8, from: melts - 0.5, to: melts }),
    emission: greyBody(1),
    heatCapacity: 3e9,
    globe: {
      bands: 18,
      obliquity: 0,
      land: { fraction: { sineLatitude: [-1, 1], value: [0.5, 0.5] }, heatCapacity: 100, exchange: 0.5 },
    },
  });
const options = { tolerance: 1e-4, start: 'periodic', samples: 24, spacing: 'time' } as const;

describe('a cold state that cannot be computed', () => {
  const of = world(195);
  const { states, warnings, failures } = zonalModel().solve(of, options, []);

  test('leaves the warm one, and no claim that it is the only one', () => {
    expect(states.map(({ label, converged }) => [label, converged])).toEqual([['warm', true]]);
    expect(failures).toHaveLength(1);
    expect(failures![0]).toMatch(/cold start could not be computed.*not known/);
    expect(warnings.join()).not.toContain('half the bands');
    for (const { name, value } of states[0].findings) expect(value === null || Number.isFinite(value), name).toBe(true);
  });

  test('is told with the warnings, and the case does not pass', () => {
    const plain = { inputs: [], derived: [], windows: [], warnings: [], remarks: [] };
    const scenarioCase: ScenarioCase = { name: 'base', model: 'zonal', world: of, options, ...plain };
    const result = runCase(scenarioCase);
    expect(result.warnings).toContain(failures![0]);
    // land that follows the light within minutes, between steps of a week: 1e-3 off when J f stands for its T″
    expect(result.checks.energyBalance.relativeDifference).toBeLessThan(1e-6);
    expect(result.passed).toBe(false);
  });
});

test('where, on a rounder orbit, the cold land does not reach its ramp both states are there, and nothing failed', () => {
  const { states, failures } = zonalModel().solve(world(215, 0.1), options, []);
  expect(states.map(({ label }) => label)).toEqual(['warm', 'cold']);
  expect(failures).toEqual([]);
});
