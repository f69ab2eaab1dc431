import { expect, test } from 'vitest';
import { zonalModel } from '../../../../sim/models/zonal/index.ts';
import { lagBehind } from '../../../../sim/models/zonal/lags.ts';
import { greyBody } from '../../../../sim/surface/emission/greyBody.ts';
import { degrees, zonalWorld } from './worlds.ts';

test.each([
  ['behind one maximum', [10], 40, 30],
  ['over the turn of the year', [90], 10, 20],
  ['three quarters behind: still behind', [10], 85, 75],
  ['less than a quarter ahead of the next', [10], 86, -24],
  ['just ahead, the maximum a little after the turn', [2], 99, -3],
  ['half a year or less behind one of two: behind it, near as the next is', [10, 60], 59, 49],
  ['more than half a year behind the last of two', [10, 30], 90, -20],
  ['more than half a year behind, the next too far', [10, 30], 84, 54],
  ['at the maximum', [10], 10, 0],
])('%s', (_, maxima, moment, lag) => {
  expect(lagBehind(maxima, moment, 100)).toBeCloseTo(lag, 9);
});

test('no maxima, no lag', () => {
  expect(lagBehind([], 10, 100)).toBeNull();
});

// A store that forgets within hours has no lag to speak of; where its area mean peaks before the steady value, it leads it.
test('a small store under a tilted year: lags stay within a quarter of an orbit, in seconds and in orbits', () => {
  const world = zonalWorld({
    e: 0.35,
    heatCapacity: 1e5,
    emission: greyBody(0.6),
    globe: { bands: 18, obliquity: 60 * degrees, solarLongitudeOfPeriapsis: 90 * degrees },
  });
  const options = { tolerance: 1e-5, start: 'periodic', samples: 360, spacing: 'balancedAnomaly' } as const;
  const [{ findings }] = zonalModel().solve(world, options, []).states;
  const of = (name: string) => findings.find((one) => one.name === name)!.value!;
  const { period } = world.orbit;
  expect(of('lagOfMax')).toBeLessThan(0);
  expect(of('lagOfMax')).toBeGreaterThan(-period / 4);
  expect(of('lagOfMaxOrbits')).toBeCloseTo(of('lagOfMax') / period, 12);
  for (const place of ['lagAtNorthPole', 'lagAt45North']) expect(Math.abs(of(place)), place).toBeLessThan(period / 4);
});
