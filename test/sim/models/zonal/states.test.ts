import { describe, expect, test } from 'vitest';
import { type ZonalState, zonalGrid } from '../../../../sim/models/zonal/states.ts';
import { zonalSystem } from '../../../../sim/models/zonal/system.ts';
import { yearCurves } from '../../../../sim/models/zonal/yearCurves.ts';
import { marchRodas4, stageWork } from '../../../../sim/solve/rodas4.ts';
import { rampAlbedo } from '../../../../sim/surface/albedo/ramp.ts';
import { linearEmission } from '../../../../sim/surface/emission/linear.ts';
import { quarticEmission } from '../../../../sim/surface/emission/quartic.ts';
import { degrees, firstRow, settled, zonalWorld } from './worlds.ts';

const bands = 18;

// A narrow ramp: ice melts and freezes within one of the coarse steps, which find a state that finer ones do not have.
test('where coarse steps lose their way, the year is that of waiting in fine ones', () => {
  const world = zonalWorld({
    q: 222.9,
    e: 0.446,
    periodDays: 150.3,
    heatCapacity: 4.55e6,
    albedo: rampAlbedo({ warm: 0.3, ice: 0.606, from: 254.66, to: 256.15 }),
    emission: linearEmission({ a: 203.3, b: 2.09 }),
    globe: { bands, obliquity: 59 * degrees, solarLongitudeOfPeriapsis: 75.1 * degrees, heatTransport: 0.102 },
  });
  const state = settled(world, 320, 1e-4);
  expect(state.converged).toBe(true);
  const grid = zonalGrid(world, world.globe, bands);
  const mesh = grid.mesh(6144);
  const system = zonalSystem(grid.physics, mesh);
  const work = stageWork(system.size, system.width);
  const waited = new Float64Array(bands).fill(320);
  // A year leaves at most e^−4.8 of a disturbance: eight leave nothing.
  for (let year = 0; year < 8; year++) marchRodas4(system, mesh.width, waited, work, null);
  const error = firstRow(state).reduce((most, value, i) => Math.max(most, Math.abs(value / waited[i] - 1)), 0);
  expect(error).toBeLessThan(1e-4);
});

/** Largest relative difference of two states of one world, at the coarser's step ends and between them. */
function apart(coarse: ZonalState, fine: ZonalState): number {
  const { mesh, size } = coarse.system;
  const [a, b] = [coarse, fine].map(({ system, history }) => yearCurves(system, history));
  const [here, there] = [new Float64Array(size), new Float64Array(size)];
  let largest = 0;
  for (let step = 0; step < mesh.steps; step++) {
    for (const x of [0, 0.25, 0.5, 0.75]) {
      const time = mesh.time[step] + x * mesh.width[step];
      a.unknownsInto(time, here);
      b.unknownsInto(time, there);
      for (let i = 0; i < size; i++) largest = Math.max(largest, Math.abs(here[i] / there[i] - 1));
    }
  }
  return largest;
}

describe('the error estimate holds where stores are fast against the steps', () => {
  const snowball = zonalWorld({
    q: 242.97,
    periodDays: 711.7,
    heatCapacity: 6.262e6,
    albedo: rampAlbedo({ warm: 0.3, ice: 0.525, from: 269.05, to: 273.05 }),
    emission: quarticEmission(0.62),
    globe: { bands, obliquity: 18.19 * degrees, heatTransport: 0.126, frozenHeatCapacity: 2.572e6 },
  });
  const longOrbit = zonalWorld({
    q: 172.13,
    e: 0.7311,
    periodDays: 439.9,
    heatCapacity: 8.43e5,
    emission: linearEmission({ a: 203.3, b: 2.09 }),
    globe: {
      bands,
      obliquity: 16.35 * degrees,
      solarLongitudeOfPeriapsis: 257.3 * degrees,
      heatTransport: 1.937,
    },
  });
  test.each([
    ['a snowball', snowball, 215],
    ['a long orbit', longOrbit, 320],
  ])('%s', (_, world, start) => {
    const exact = settled(world, start, 1e-8);
    expect(exact.converged).toBe(true);
    for (const tolerance of [1e-4, 1e-5, 1e-6]) {
      const found = settled(world, start, tolerance);
      expect(found.converged).toBe(true);
      expect(found.errorEstimate).toBeLessThan(tolerance);
      expect(apart(found, exact)).toBeLessThan(found.errorEstimate + 1e-8);
    }
  });
});
