import { expect, test } from 'vitest';
import { settleZonal, zonalGrid } from '../../../../sim/models/zonal/states.ts';
import { zonalSystem } from '../../../../sim/models/zonal/system.ts';
import { marchRodas4, stageWork } from '../../../../sim/solve/rodas4.ts';
import { rampAlbedo } from '../../../../sim/surface/albedo/ramp.ts';
import { linearEmission } from '../../../../sim/surface/emission/linear.ts';
import { degrees, zonalWorld } from './worlds.ts';

// Does solving for the periodic state end where waiting would? Eight emission offsets round the folds, two ramp widths, four starts:
// 64 pairs. Waiting is plain years of the same steps until they repeat; near a fold it may take hundreds.
const offsets = [190, 203.3, 215, 225, 230, 235, 240, 245];
const widths = [12, 3];
const starts: readonly [string, (x: number) => number][] = [
  ['warm', (x) => 303 - 45 * x * x],
  ['mild', (x) => 281 - 45 * x * x],
  ['cool', (x) => 273 - 45 * x * x],
  ['cold', () => 233],
];
const bands = 45;
const steps = 64;

function waited(grid: ReturnType<typeof zonalGrid>, start: Float64Array): Float64Array {
  const mesh = grid.mesh(steps);
  const system = zonalSystem(grid.physics, mesh);
  const work = stageWork(system.size, system.width);
  const y = start.slice();
  for (let year = 0; year < 3000; year++) {
    const before = y.slice();
    marchRodas4(system, mesh.width, y, work, null);
    if (y.every((value, i) => Math.abs(value - before[i]) < 1e-6)) break;
  }
  return y;
}

test.each(offsets.flatMap((a) => widths.map((width) => [a, width] as const)))(
  'A = %f W/m2, ramp of %f K',
  (a, width) => {
    const world = zonalWorld({
      q: 340.25,
      e: 0.3,
      heatCapacity: 2.1e8,
      emission: linearEmission({ a, b: 2.09 }),
      albedo: rampAlbedo({ warm: 0.32, ice: 0.62, from: 263.15 - width / 2, to: 263.15 + width / 2 }),
      globe: { bands, solarLongitudeOfPeriapsis: 250 * degrees, heatTransport: 0.65 },
    });
    const grid = zonalGrid(world, world.globe, bands);
    for (const [name, profile] of starts) {
      const start = Float64Array.from(grid.physics.bands.sine, profile);
      const found = settleZonal(grid, start, 1e-5).history.value.slice(0, bands);
      const expected = waited(grid, start);
      const apart = found.reduce((most, value, i) => Math.max(most, Math.abs(value - expected[i])), 0);
      // Different states are kelvins apart; the same one, known to 3 mK by its steps and to change/(1 − μ) by waiting.
      expect(apart, `${name} start`).toBeLessThan(0.05);
    }
  },
);
