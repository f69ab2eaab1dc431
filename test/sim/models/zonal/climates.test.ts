/** Just beyond the end of a climate a start is left with what is no state of any year; it must not pass for a climate. */
import { describe, expect, test } from 'vitest';
import { batchOf } from '../../../../sim/models/batchOf.ts';
import { climatesOf } from '../../../../sim/models/zonal/climates.ts';
import { periodicStates, zonalModel } from '../../../../sim/models/zonal/index.ts';
import { runCase } from '../../../../sim/run.ts';
import { readScenario } from '../../../../sim/scenario/read.ts';

// Followed by continuation (`perilag trace`, which never waits for a start to settle) this world has a warm climate from
// 0.78403 S0 up and a cold one up to 0.97852 S0.
const at = (instellation: number) => {
  const text = `title: Between two climates
model: zonal
star: { luminosity: 0.6 Lsun, temperature: 5200 K, mass: 0.87 Msun }
orbit: { instellation: ${instellation} S0, eccentricity: 0.35 }
planet:
  albedo: { warm: 0.28, ice: 0.6, from: 258 K, to: 272 K }
  emission: { opticalDepth: 0.83 }
  heatStore: { mixedLayer: 40 m }
  heatTransport: 0.5 W/m2/K
  obliquity: 60 deg
  rotationPeriod: 20 h
  solarLongitudeOfPeriapsis: 90 deg
  bands: 22
`;
  return readScenario(text, 'between.yaml').cases[0]!;
};
const both = /allows a warm and a cold climate/;
const labels = (instellation: number) => {
  const { states, failures } = runAt(instellation);
  return { states: states.map(({ label, stable, converged }) => [label, stable, converged]), failures };
};
const runAt = (instellation: number) => {
  const { world, options, windows } = at(instellation);
  return zonalModel().solve(world, options, windows);
};

test('between the ends both are climates', () => {
  expect(labels(0.9)).toEqual({
    states: [
      ['warm', true, true],
      ['cold', true, true],
    ],
    failures: [],
  });
});

test('beyond the end of the cold one the warm one is left, and the cold start is told as a failure', () => {
  const { states, failures } = labels(0.979);
  expect(states).toEqual([['warm', true, true]]);
  expect(failures).toHaveLength(1);
  expect(failures![0]).toMatch(/^From the cold start no climate was reached: it stopped at 253\.\d K mean, known to/);
  const climates = runAt(0.979).states[0]!.findings.find(({ name }) => name === 'climates');
  expect(climates).toMatchObject({ value: null, reason: 'one of the two starts reached no climate' });
  const result = runCase(at(0.979));
  expect(result.passed).toBe(false);
  expect(result.warnings).toContain(failures![0]);
  expect(result.warnings.join()).not.toMatch(both);
});

describe('beyond the end of the warm one', () => {
  const scenarioCase = at(0.783);
  const result = runCase(scenarioCase);

  test('the cold one gives the findings, under its own name', () => {
    expect(result.states.map(({ label }) => label)).toEqual(['cold']);
    const mean = result.findings.find(({ name }) => name === 'temperatureMean')!.value!;
    expect(mean).toBeLessThan(245);
    // at 0.783 S0 all is ice
    expect(result.findings.find(({ name }) => name === 'iceFractionMean')!.value).toBeCloseTo(1, 9);
    expect(result.warnings.join()).toMatch(/From the warm start no climate was reached: it stopped at 274\.\d K mean/);
    expect(result.warnings.join()).not.toMatch(both);
    expect(result.passed).toBe(false);
  });

  test('and in a table of many worlds they do not count as those of the warm one', () => {
    const { world, options, windows } = scenarioCase;
    const batch = batchOf(zonalModel(), options, windows, world);
    const row = new Float64Array(batch.columns.length);
    expect(batch.into(world, row)).toBe(false);
    expect(batch.into(at(0.9).world, row)).toBe(true);
  });
});

test('where neither start ends in a climate the warm one stands, as what it is', () => {
  const starts = (instellation: number) => {
    const { world, options } = at(instellation);
    return periodicStates(world, world.globe!, 22, options.tolerance);
  };
  const [remainderOfWarm] = starts(0.783);
  const [, remainderOfCold] = starts(0.979);
  const { found, failures } = climatesOf([remainderOfWarm, remainderOfCold], 1e-6);
  expect(found.map(({ label, state }) => [label, state.converged])).toEqual([['warm', false]]);
  expect(failures).toHaveLength(1);
  expect(failures[0]).toContain('From the cold start');
});

test('a climate whose steps are too few for the tolerance is one nevertheless; an unstable state is none', () => {
  const { world } = at(0.9);
  const [warm, cold] = periodicStates(world, world.globe!, 22, 1e-6);
  const rough = { ...cold, converged: false, errorEstimate: 2e-6 };
  expect(climatesOf([warm, rough], 1e-6)).toMatchObject({
    found: [{ label: 'warm' }, { label: 'cold' }],
    failures: [],
  });
  const unstable = { ...cold, logMultiplier: 0.1 };
  expect(climatesOf([warm, unstable], 1e-6).failures[0]).toMatch(/in a state that is not stable\.$/);
});
