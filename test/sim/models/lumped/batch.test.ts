import v8 from 'node:v8';
import vm from 'node:vm';
import fc from 'fast-check';
import { describe, expect, test } from 'vitest';
import { SimError } from '../../../../sim/error.ts';
import { lumpedModel } from '../../../../sim/models/lumped/index.ts';
import { constantAlbedo } from '../../../../sim/surface/albedo/constant.ts';
import { rampAlbedo } from '../../../../sim/surface/albedo/ramp.ts';
import { greyAtmosphere } from '../../../../sim/surface/emission/greyAtmosphere.ts';
import { greyBody } from '../../../../sim/surface/emission/greyBody.ts';
import { linearEmission } from '../../../../sim/surface/emission/linear.ts';
import type { SolveOptions, Window, World } from '../../../../sim/world.ts';
import { periodic, world } from './worlds.ts';

const batchOf = lumpedModel().batch!;
const windows: Window[] = [
  { name: 'mild', of: 'temperature', from: 250, to: 290 },
  { name: 'temperate', of: 'instellation', from: 700, to: 1600 },
  { name: 'cold', of: 'temperature', from: 0, to: 240 },
  { name: 'unknown', of: 'instellation', from: 0, to: 0, unavailable: 'the star is too cool' },
];

const eccentricity = fc.oneof(
  { weight: 1, arbitrary: fc.constantFrom(0, 5e-324, 1e-12, 1e-6, 0.99) },
  { weight: 6, arbitrary: fc.double({ min: 0, max: 0.99, noNaN: true }) },
);
const logKappa = fc.double({ min: -6, max: 4, noNaN: true });
const albedo = fc.double({ min: 0, max: 0.9, noNaN: true }).map(constantAlbedo);
const internalHeat = fc.constantFrom(0, 0, 0.05, 40);
const quartic = fc.oneof(
  fc.double({ min: 0.1, max: 1, noNaN: true }).map(greyBody),
  fc.double({ min: 0, max: 5, noNaN: true }).map(greyAtmosphere),
);
const ramp = fc
  .tuple(fc.double({ min: 240, max: 270, noNaN: true }), fc.constantFrom(0, 3, 15))
  .map(([from, width]) => rampAlbedo({ warm: 0.3, ice: 0.6, from, to: from + width }));

const plainWorld = fc
  .tuple(eccentricity, logKappa, albedo, quartic, internalHeat)
  .map(([e, log, a, emission, heat]) => world({ e, kappa: 10 ** log, albedo: a, emission, internalHeat: heat }));
const linearWorld = fc
  .tuple(eccentricity, fc.double({ min: 4, max: 11, noNaN: true }), albedo)
  .map(([e, log, a]) =>
    world({ e, heatCapacity: 10 ** log, albedo: a, emission: linearEmission({ a: 203.3, b: 2.09 }) }),
  );
const rampWorld = fc
  .tuple(fc.double({ min: 0, max: 0.6, noNaN: true }), fc.double({ min: 6, max: 9, noNaN: true }), ramp)
  .map(([e, log, a]) => world({ e, heatCapacity: 10 ** log, axisAu: 0.92, albedo: a }));

/** What `solve` of a model that has seen nothing else says, NaN where undefined. */
function single(of: World, options: SolveOptions) {
  const [warm] = lumpedModel().solve(of, options, windows).states;
  for (const { value } of warm.findings) expect(value === null || Number.isFinite(value)).toBe(true);
  return { row: warm.findings.map(({ value }) => value ?? Number.NaN), warm };
}

/** Bit for bit, NaN equal to NaN. */
function expectSame(row: ArrayLike<number>, expected: readonly number[]): void {
  expect(row.length).toBe(expected.length);
  for (let i = 0; i < expected.length; i++) expect(Object.is(row[i], expected[i])).toBe(true);
}

describe.each([
  ['plain, grey atmosphere, internal heat', plainWorld, 300],
  ['linear emission', linearWorld, 25],
  ['ice–albedo ramp and step', rampWorld, 12],
] as const)('equal to the single run to the last bit: %s', (_, worlds, numRuns) => {
  test.each([1e-3, 1e-6, 1e-9])('tolerance %f', (tolerance) => {
    const options = { ...periodic, tolerance };
    // One batch for all: what it solved before must leave no trace.
    const batch = batchOf(options, windows);
    const row = new Float64Array(batch.columns.length);
    fc.assert(
      fc.property(worlds, (of) => {
        const { row: expected, warm } = single(of, options);
        expect(batch.into(of, row)).toBe(warm.converged);
        expectSame(row, expected);
        const names = warm.findings.map(({ name, unit, label }) => ({ name, unit, label }));
        expect(batch.columns).toEqual(names);
      }),
      { numRuns: tolerance === 1e-6 ? numRuns : Math.ceil(numRuns / 3), seed: 20261201 },
    );
  });
});

test('a run from a start, too', () => {
  const options = { ...periodic, start: { temperature: 320, orbits: 2.5, at: 1 } };
  const batch = batchOf(options, windows);
  const row = new Float64Array(batch.columns.length);
  for (const of of [world({ e: 0.4, kappa: 0.3 }), world({ e: 0, kappa: 2 })]) {
    batch.into(of, row);
    expectSame(row, single(of, options).row);
  }
});

test('a finding is the same number whatever else is wanted, in the order wanted', () => {
  const all = batchOf(periodic, windows);
  const every = new Float64Array(all.columns.length);
  const names = all.columns.map(({ name }) => name);
  fc.assert(
    fc.property(plainWorld, fc.shuffledSubarray(names, { minLength: 1 }), (of, only) => {
      const batch = batchOf(periodic, windows, only);
      expect(batch.columns.map(({ name }) => name)).toEqual(only);
      const row = new Float64Array(only.length);
      expect(batch.into(of, row)).toBe(all.into(of, every));
      expectSame(
        row,
        only.map((name) => every[names.indexOf(name)]),
      );
    }),
    { numRuns: 300, seed: 20261201 },
  );
});

test('errors as in a single run, and for a name that is no finding', () => {
  const batch = batchOf(periodic, windows);
  const row = new Float64Array(batch.columns.length);
  const of = world({ e: 0.3, kappa: 1 });
  const cold = { ...of, surface: { ...of.surface, albedo: { ...constantAlbedo(0.5), warm: 1 } } };
  expect(() => batch.into(cold, row)).toThrow(SimError);
  expect(() => batch.into({ ...of, orbit: { ...of.orbit, eccentricity: 1.2 } }, row)).toThrow(SimError);
  // And it goes on after an error.
  batch.into(of, row);
  expectSame(row, single(of, periodic).row);
  expect(() => batchOf(periodic, windows, ['temperatureMaximum'])).toThrow(/no finding/);
});

/** The collector by hand, for a heap that shows what was left since. */
function collector(): () => void {
  v8.setFlagsFromString('--expose_gc');
  return vm.runInNewContext('gc');
}

// Doubles that cross a call which V8 does not inline are boxed, 16 bytes each: 900 bytes a draw outside the test runner, 2500
// inside it, through whose imports V8 cannot see. The single run of the same worlds leaves 100 kB and more.
test('leaves little garbage', () => {
  const worlds = Array.from({ length: 1000 }, (_, i) =>
    world({ e: 0.8 * ((0.618 * i) % 1), kappa: 10 ** (-2 + 4 * ((0.414 * i) % 1)) }),
  );
  const batch = batchOf(periodic, []);
  const row = new Float64Array(batch.columns.length);
  const run = () => {
    for (const of of worlds) batch.into(of, row);
  };
  for (let round = 0; round < 40; round++) run();
  const collect = collector();
  collect();
  const before = process.memoryUsage().heapUsed;
  run();
  const perDraw = (process.memoryUsage().heapUsed - before) / worlds.length;
  expect(perDraw).toBeLessThan(5000);
  collect();
  // Nothing stays: 40 rounds and one leave the heap as it was, to 10 bytes a draw.
  const kept = process.memoryUsage().heapUsed;
  for (let round = 0; round < 5; round++) run();
  collect();
  expect((process.memoryUsage().heapUsed - kept) / (5 * worlds.length)).toBeLessThan(10);
});
