/** Climates along an input: on a circular orbit the periodic state is the balance itself, so that folds are known in closed form. */
import { describe, expect, test } from 'vitest';
import { metresPerAu, solarLuminosity, stefanBoltzmann } from '../../../sim/constants.ts';
import { readAlong } from '../../../sim/scenario/along.ts';
import { casesAlong } from '../../../sim/scenario/caseAlong.ts';
import { climateEnds, severalClimates, stretchesOf } from '../../../sim/studies/climateRanges.ts';
import { traceAlong } from '../../../sim/studies/traceAlong.ts';
import type { TraceReportCase } from '../../../sim/studies/traceReport.ts';

const circular = `star: { luminosity: 1 Lsun, mass: 1 Msun }
orbit: { semiMajorAxis: 1 au, eccentricity: 0 }
planet:
  albedo: { warm: 0.3, ice: 0.62, from: 258 K, to: 273 K }
  emission: { opticalDepth: 0.83 }
  heatStore: { mixedLayer: 10 m }
`;

function traced(scenario: string, range: string): TraceReportCase {
  const along = readAlong(range);
  const [one] = casesAlong(scenario, 'x.yaml', along);
  return traceAlong(one!, along);
}

/** Luminosity, Lsun, that holds the planet of `circular` at a temperature: L(1 − A)/(16πa²) = σT⁴/(1 + ¾τ). */
function balancing(temperature: number): number {
  const x = Math.min(1, Math.max(0, (temperature - 258) / 15));
  const albedo = 0.62 - 0.32 * x ** 2 * (3 - 2 * x);
  const emitted = (stefanBoltzmann * temperature ** 4) / (1 + 0.75 * 0.83);
  return (16 * Math.PI * metresPerAu ** 2 * emitted) / (1 - albedo) / solarLuminosity;
}

/** Extremes of the balance between 250 and 280 K, by a plain scan: the warm climate ends at the lowest, the cold at the highest. */
function scannedFolds(): { warm: number; cold: number } {
  let [warm, cold] = [Number.POSITIVE_INFINITY, 0];
  const values = Array.from({ length: 300_001 }, (_, step) => balancing(250 + step * 1e-4));
  for (let at = 1; at < values.length - 1; at++) {
    const [before, here, after] = [values[at - 1]!, values[at]!, values[at + 1]!];
    if (here <= before && here < after) warm = Math.min(warm, here);
    if (here >= before && here > after) cold = Math.max(cold, here);
  }
  return { warm, cold };
}

describe('an ice–albedo planet on a circular orbit', () => {
  const found = traced(circular, 'star.luminosity=0.5 to 2 Lsun');
  const folds = scannedFolds();

  test('folds are the extremes of the balance', () => {
    expect(found.folds).toHaveLength(2);
    // 1e-4 of the input is what trace promises.
    expect(Math.abs(found.folds[0]! / folds.warm - 1)).toBeLessThan(1e-4);
    expect(Math.abs(found.folds[1]! / folds.cold - 1)).toBeLessThan(1e-4);
  });

  test('every point lies on the balance, stable where more light makes it warmer', () => {
    const points = found.branches.flatMap(({ points }) => points);
    expect(points.length).toBeGreaterThan(40);
    for (const { value, temperatureMean, stable, fold } of points) {
      expect(Math.abs(balancing(temperatureMean) / value - 1)).toBeLessThan(1e-4);
      if (!fold) expect(stable).toBe(balancing(temperatureMean + 1e-3) > balancing(temperatureMean - 1e-3));
    }
  });

  test('branches end at the ends of the range', () => {
    expect(found.branches.map(({ ended }) => ended)).toEqual(['left']);
    const { points } = found.branches[0]!;
    expect(points[0]!.value).toBeCloseTo(2, 12);
    expect(points.at(-1)!.value).toBeCloseTo(0.5, 12);
  });

  test('hysteresis: between the folds a warm and a cold climate, parted by an unstable one', () => {
    const middle = (found.folds[0]! + found.folds[1]!) / 2;
    const passing = found.branches
      .flatMap(stretchesOf)
      .filter(({ points }) => points[0]!.value < middle && points.at(-1)!.value > middle);
    const here = passing.map(({ stable, points }) => {
      const after = points.findIndex(({ value }) => value >= middle);
      return { stable, temperature: points[after]!.temperatureMean };
    });
    here.sort((a, b) => a.temperature - b.temperature);
    expect(here.map(({ stable }) => stable)).toEqual([true, false, true]);
    expect(severalClimates(found)).toEqual([{ from: found.folds[0], to: found.folds[1] }]);
    expect(climateEnds(found)).toMatchObject([
      { climate: 'warm', missing: 'below', value: found.folds[0] },
      { climate: 'cold', missing: 'above', value: found.folds[1] },
    ]);
  });

  test('a range inside the folds: both climates, no end', () => {
    const inside = traced(circular, `star.luminosity=${folds.warm * 1.05} to ${folds.cold * 0.95} Lsun`);
    expect(inside.folds).toEqual([]);
    expect(inside.branches).toHaveLength(2);
    expect(severalClimates(inside)).toHaveLength(1);
    expect(severalClimates(inside)[0]!.to).toBeCloseTo(folds.cold * 0.95, 9);
  });
});

test('a constant albedo has one climate and no fold, to the very edge of what the key takes', () => {
  const plain = circular.replace(/albedo:.*/, 'bondAlbedo: 0.3');
  const found = traced(plain, 'orbit.eccentricity=0 to 0.9');
  expect([found.folds, severalClimates(found), found.branches.length]).toEqual([[], [], 1]);
  const values = found.branches[0]!.points.map(({ value }) => value);
  expect(Math.min(...values)).toBe(0);
  expect(Math.max(...values)).toBe(0.9);
});

test('a log range over five decades: a small store follows the sky, a large one feels its mean', () => {
  const plain = circular.replace(/albedo:.*/, 'bondAlbedo: 0.3').replace('eccentricity: 0', 'eccentricity: 0.3');
  const found = traced(plain, 'planet.heatStore.heatCapacity=1e4 to 1e11 J/m2/K log');
  expect([found.branches.length, found.branches[0]!.ended, found.folds]).toEqual([1, 'left', []]);
  const points = found.branches[0]!.points.toSorted((a, b) => a.value - b.value);
  expect([points[0]!.value, points.at(-1)!.value]).toEqual([1e4, 1e11]);
  const swings = points.map(({ temperatureMax, temperatureMin }) => temperatureMax / temperatureMin);
  // Emission follows (1 + e)²/(1 − e)² without a store: a swing of √(1.3/0.7) in temperature. The small store damps it by 1e-4.
  expect(Math.abs(swings[0]! / Math.sqrt(1.3 / 0.7) - 1)).toBeLessThan(1e-4);
  expect(swings.at(-1)!).toBeLessThan(1.001);
  // Falling all the way; neighbours may differ by less than the tolerance of the temperatures, 1e-6.
  for (let at = 1; at < swings.length; at++) expect(swings[at]!).toBeLessThan(swings[at - 1]! * (1 + 1e-6));
  // Steps are even in the logarithm: every decade is there.
  for (let decade = 5; decade < 11; decade++)
    expect(points.some(({ value }) => Math.floor(Math.log10(value)) === decade)).toBe(true);
});
