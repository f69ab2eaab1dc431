import { expect, test } from 'vitest';
import { batchOf } from '../../../sim/models/batchOf.ts';
import { lumpedModel } from '../../../sim/models/lumped/index.ts';
import type { Model } from '../../../sim/models/model.ts';
import { zonalModel } from '../../../sim/models/zonal/index.ts';
import { periodic, world } from './lumped/worlds.ts';
import { degrees, zonalWorld } from './zonal/worlds.ts';

const windows = [{ name: 'mild', of: 'temperature', from: 260, to: 300 }] as const;

test('a model without a batch of its own is solved one world after another', () => {
  const model = zonalModel();
  const worlds = [0.1, 0.3].map((e) =>
    zonalWorld({
      q: 340,
      e,
      heatCapacity: 2e8,
      globe: { bands: 18, obliquity: 23 * degrees, solarLongitudeOfPeriapsis: 90 * degrees, heatTransport: 0.6 },
    }),
  );
  const batch = batchOf(model, periodic, windows, worlds[0]);
  const few = batchOf(model, periodic, windows, worlds[0], ['temperatureMin', 'fractionInWindow.mild']);
  const row = new Float64Array(batch.columns.length);
  const two = new Float64Array(2);
  for (const of of worlds) {
    const [warm] = model.solve(of, periodic, windows).states;
    expect(batch.into(of, row)).toBe(warm.converged);
    expect(Array.from(row)).toEqual(warm.findings.map(({ value }) => value ?? Number.NaN));
    few.into(of, two);
    expect(Array.from(two)).toEqual(
      few.columns.map(({ name }) => row[batch.columns.findIndex((column) => column.name === name)]),
    );
  }
  expect(() => batchOf(model, periodic, windows, worlds[0], ['temperature'])).toThrow(/no finding/);
});

test('the world that findings are learnt from is solved once, to the same bits', () => {
  const zonal = zonalModel();
  let solved = 0;
  const model: Model = {
    ...zonal,
    solve(...of) {
      solved++;
      return zonal.solve(...of);
    },
  };
  const globe = { bands: 18, obliquity: 23 * degrees, solarLongitudeOfPeriapsis: 0, heatTransport: 0.6 };
  const [one, other] = [0.1, 0.3].map((e) => zonalWorld({ q: 340, e, heatCapacity: 2e8, globe }));
  const batch = batchOf(model, periodic, windows, one);
  const row = new Float64Array(batch.columns.length);
  expect(batch.into(one, row)).toBe(true);
  expect(solved).toBe(1);
  const [warm] = zonal.solve(one, periodic, windows).states;
  expect(Array.from(row)).toEqual(warm.findings.map(({ value }) => value ?? Number.NaN));
  batch.into(other, row);
  expect(solved).toBe(2);
});

test('a model with a batch of its own solves nothing to begin', () => {
  const refuse = () => {
    throw new Error('solved');
  };
  const model = { ...lumpedModel(), solve: refuse };
  const batch = batchOf(model, periodic, windows, world({ e: 0.3, kappa: 1 }), ['temperatureMax']);
  const row = new Float64Array(1);
  expect(batch.into(world({ e: 0.3, kappa: 1 }), row)).toBe(true);
  expect(row[0]).toBeGreaterThan(200);
});
