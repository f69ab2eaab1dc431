import { describe, expect, test } from 'vitest';
import { lumpedModel } from '../../../../sim/models/lumped/index.ts';
import type { State } from '../../../../sim/models/model.ts';
import { zonalModel } from '../../../../sim/models/zonal/index.ts';
import { rampAlbedo } from '../../../../sim/surface/albedo/ramp.ts';
import { greyBody } from '../../../../sim/surface/emission/greyBody.ts';
import { linearEmission } from '../../../../sim/surface/emission/linear.ts';
import type { SolveOptions, Window } from '../../../../sim/world.ts';
import { finding } from '../lumped/worlds.ts';
import { degrees, zonalWorld } from './worlds.ts';

const model = zonalModel();
const options: SolveOptions = { tolerance: 1e-6, start: 'periodic', samples: 180, spacing: 'balancedAnomaly' };
const windows: Window[] = [{ name: 'liquid', of: 'temperature', from: 273.15, to: 373.15 }];

function solve(world: ReturnType<typeof zonalWorld>, changed: Partial<SolveOptions> = {}) {
  return model.solve(world, { ...options, ...changed }, windows);
}

const field = (of: State, name: string) => of.dataset.variables[name];

test('endless transport gives the lumped model', () => {
  const world = zonalWorld({ e: 0.4, heatCapacity: 5e7, emission: greyBody(1), globe: { heatTransport: 1e6 } });
  const [zonal] = solve(world, { tolerance: 1e-8 }).states;
  const [lumped] = lumpedModel().solve(world, { ...options, tolerance: 1e-8 }, []).states;
  // A contrast of order Q/D = 3e-4 K is left.
  for (const name of ['temperatureMax', 'temperatureMin', 'temperatureMean']) {
    expect(finding(zonal, name)).toBeCloseTo(finding(lumped, name), 3);
  }
  expect(finding(zonal, 'lagOfMaxOrbits')).toBeCloseTo(finding(lumped, 'lagOfMaxOrbits'), 4);
});

test('the energy account closes to 1e-9 when solved at 1e-10', () => {
  const worlds = [
    zonalWorld({ e: 0.3, heatCapacity: 2e8 }),
    zonalWorld({ e: 0.1, heatCapacity: 5e7, emission: greyBody(1), globe: { obliquity: 90 * degrees } }),
  ];
  for (const world of worlds) {
    const [found] = solve(world, { tolerance: 1e-10 }).states;
    expect(found.converged).toBe(true);
    expect(found.energyBalance.relativeDifference).toBeLessThan(1e-9);
  }
});

test('transport moves heat and makes none', () => {
  const [found] = solve(zonalWorld({ e: 0.2 })).states;
  const convergence = field(found, 'bandConvergence');
  const [rows, bands] = convergence.shape;
  for (let row = 0; row < rows; row++) {
    const sum = convergence.data.subarray(row * bands, (row + 1) * bands).reduce((a, b) => a + b, 0);
    expect(Math.abs(sum / bands)).toBeLessThan(1e-9); // W/m²; rounding of fluxes of 1e2 W/m²
  }
});

test('at an obliquity of 90° the poles are hotter than the equator in the annual mean, at 0° colder', () => {
  const contrast = (obliquity: number) => {
    const world = zonalWorld({ heatCapacity: 2e8, emission: greyBody(1), globe: { obliquity: obliquity * degrees } });
    return finding(solve(world).states[0], 'contrast');
  };
  expect(contrast(90)).toBeLessThan(-5);
  expect(contrast(0)).toBeGreaterThan(20);
  // Pole and equator receive the same over the year at 53.896° (OEIS A381254); a linear world's contrast changes sign near it.
  expect(contrast(50) > contrast(58)).toBe(true);
});

test('north and south mirror each other when the orbit is circular', () => {
  const [found] = solve(zonalWorld({ heatCapacity: 5e7 }), { tolerance: 1e-8 }).states;
  const { data, shape } = field(found, 'bandTemperature');
  const [rows, bands] = shape;
  // Half a year later the hemispheres have changed places.
  for (let row = 0; row < rows / 2; row++) {
    for (let i = 0; i < bands; i++) {
      const later = data[(row + rows / 2) * bands + (bands - 1 - i)];
      expect(Math.abs(data[row * bands + i] / later - 1)).toBeLessThan(1e-7);
    }
  }
  expect(finding(found, 'lagAt45North')).toBeCloseTo(finding(found, 'lagAt45South'), -4);
});

test('steps: the time error is within the tolerance of a much finer year', () => {
  const world = zonalWorld({ e: 0.3, heatCapacity: 2e7, globe: { solarLongitudeOfPeriapsis: 250 * degrees } });
  const exact = solve(world, { tolerance: 1e-10 }).states[0];
  for (const tolerance of [1e-4, 1e-6, 1e-8]) {
    const found = solve(world, { tolerance }).states[0];
    const reference = field(exact, 'bandTemperature').data;
    const error = field(found, 'bandTemperature').data.reduce(
      (largest, value, i) => Math.max(largest, Math.abs(value / reference[i] - 1)),
      0,
    );
    expect(error).toBeLessThan(tolerance);
    expect(error).toBeLessThan(found.errorEstimate + 1e-10);
  }
});

describe('ice and albedo', () => {
  const albedo = rampAlbedo({ warm: 0.32, ice: 0.62, from: 258, to: 268 });
  const emission = linearEmission({ a: 203.3, b: 2.09 });
  const world = zonalWorld({ e: 0.1, heatCapacity: 2.1e8, albedo, emission, globe: { heatTransport: 0.65 } });
  const { states, warnings } = solve(world);

  test('a warm and a cold climate on one orbit', () => {
    expect(states.map(({ label, stable }) => [label, stable])).toEqual([
      ['warm', true],
      ['cold', true],
    ]);
    expect(warnings.join()).toContain('a warm and a cold climate');
    expect(states.map((state) => finding(state, 'climates'))).toEqual([2, 2]);
    expect(finding(states[1], 'iceFractionMean')).toBeCloseTo(1, 6);
    expect(finding(states[1], 'iceEdgeNorthMin')).toBeCloseTo(0, 6);
  });

  test('ice pulls the margin below one, and the frozen globe has none of it', () => {
    expect(states[0].stabilityMargin).toBeLessThan(1);
    expect(states[0].stabilityMargin).toBeGreaterThan(0);
    expect(states[1].stabilityMargin).toBeCloseTo(1, 6);
  });

  test('the multiplier is what a small push does after a year', () => {
    // Waiting is the independent method: the slowest mode of the frozen, linear globe is exp(−B P/C).
    expect(Math.log(states[1].multiplier!)).toBeCloseTo((-2.09 * world.orbit.period) / 2.1e8, 4);
  });
});

test('every depth of store settles in as many years, within a factor of 3; a short orbit over a deep ocean too', () => {
  const stores = [1e5, 1e6, 1e7, 1e8, 1e9, 1e10, 1e11, 1e12];
  const worlds = [
    ...stores.map((heatCapacity) => zonalWorld({ e: 0.3, heatCapacity })),
    zonalWorld({ e: 0.1, periodDays: 11, heatCapacity: 2.05e8 }), // 50 m of water
  ];
  const years = worlds.map((world) => {
    const { iterations, states } = solve(world);
    expect(states[0].converged).toBe(true);
    return iterations;
  });
  expect(Math.max(...years) / Math.min(...years)).toBeLessThan(3);
});

test('nothing in a finding or a row is ever not a number', () => {
  for (const world of [zonalWorld(), zonalWorld({ e: 0.8, heatCapacity: 1e6, emission: greyBody(1) })]) {
    for (const { findings, dataset } of solve(world).states) {
      for (const { value } of findings) expect(value === null || Number.isFinite(value)).toBe(true);
      for (const { data } of Object.values(dataset.variables)) expect(data.every(Number.isFinite)).toBe(true);
    }
  }
});

test('a longest season has a latitude where just one has it, none where several have all year', () => {
  const world = zonalWorld({ heatCapacity: 5e7, globe: { bands: 18 } });
  const of = (from: number, to: number) =>
    model.solve(world, options, [{ name: 'it', of: 'temperature', from, to }]).states[0].findings;
  const latitude = (from: number, to: number) => of(from, to).find(({ name }) => name === 'longestSeasonLatitude.it')!;
  expect(latitude(100, 400)).toMatchObject({ value: null, reason: 'all year at several latitudes' });
  expect(latitude(390, 400)).toMatchObject({ value: null, reason: 'no latitude is ever inside' });
  const { hottestTemperature, hottestLatitude } = Object.fromEntries(
    of(100, 400).map(({ name, value }) => [name, value!]),
  );
  expect(latitude(hottestTemperature - 0.1, 400).value).toBeCloseTo(hottestLatitude, 9);
});

test('the ± of a local extreme covers what twice the bands find', () => {
  const [coarse] = solve(zonalWorld({ globe: { bands: 20 } })).states;
  const [fine] = solve(zonalWorld({ globe: { bands: 40 } })).states;
  for (const name of ['hottestTemperature', 'coldestTemperature']) {
    const plusMinus = coarse.findings.find((one) => one.name === name)?.plusMinus ?? 0;
    expect(Math.abs(finding(coarse, name) - finding(fine, name))).toBeLessThan(plusMinus);
    expect(plusMinus).toBeLessThan(10);
  }
});

describe('a store so small that polar night cools within hours', () => {
  const globe = { bands: 18, heatTransport: 0.1, obliquity: 90 * degrees };
  const fast = zonalWorld({ e: 0.1, heatCapacity: 1e4, emission: greyBody(1), globe });

  test('is followed on finer steps where the first lose their way', () => {
    const [only] = solve(fast, { tolerance: 1e-4 }).states;
    expect(only.converged).toBe(true);
    expect(finding(only, 'climates')).toBe(1);
    expect(only.energyBalance.relativeDifference).toBeLessThan(1e-3);
    // Without feedback of ice the margin is one, also where the multiplier is below the smallest number.
    expect(only.stabilityMargin).toBeCloseTo(1, 9);
  });

  test('is refused, not told as a number, where no step is fine enough', () => {
    const albedo = rampAlbedo({ warm: 0.3, ice: 0.62, from: 258, to: 259 });
    const steep = zonalWorld({ e: 0.6, heatCapacity: 1e3, emission: greyBody(1), albedo, globe });
    expect(() => solve(steep, { tolerance: 1e-4 })).toThrow(/faster than its shortest time step/);
  });
});
