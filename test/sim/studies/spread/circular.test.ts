import { expect, test } from 'vitest';
import { normalQuantile } from '../../../../sim/quantity/index.ts';
import { summariseTurns, unwrapTurn } from '../../../../sim/studies/spread/circular.ts';
import { sobolDraws } from '../../../../sim/studies/spread/sobol.ts';

/** A wrapped normal: centre and deviation in turns. */
function wrappedNormal(centre: number, deviation: number, draws = 2 ** 14): Float64Array {
  const shares = new Float64Array(draws);
  sobolDraws(1).fillInto(0, 0, shares);
  return shares.map((share) => {
    const turn = centre + deviation * normalQuantile(share);
    return turn - Math.floor(turn);
  });
}

// Mardia & Jupp (2000) §3.5.7: a wrapped normal has resultant length exp(−σ²/2), σ in radians. 2¹⁴ even draws: 1e-4.
test.each([
  { centre: 0.4, deviation: 0.05 },
  { centre: 0.99, deviation: 0.05 },
  { centre: 0, deviation: 0.1 },
])('wrapped normal at $centre: mean, percentiles and resultant length', ({ centre, deviation }) => {
  const { mean, percentiles, defined, resultantLength } = summariseTurns(wrappedNormal(centre, deviation));
  expect(Math.abs(unwrapTurn(mean!, centre) - centre)).toBeLessThan(1e-4);
  expect(percentiles!['50'] > -0.25 && percentiles!['50'] <= 0.75).toBe(true);
  expect(defined).toBe(1);
  expect(Math.abs(resultantLength! - Math.exp(-((2 * Math.PI * deviation) ** 2) / 2))).toBeLessThan(1e-4);
  // The percentiles do not jump where the turn ends.
  const start = unwrapTurn(centre, mean!);
  expect(Math.abs(percentiles!['2.5'] - start - deviation * normalQuantile(0.025))).toBeLessThan(3e-4);
  expect(Math.abs(percentiles!['50'] - start)).toBeLessThan(3e-4);
  expect(Math.abs(percentiles!['97.5'] - start - deviation * normalQuantile(0.975))).toBeLessThan(3e-4);
});

test('two neighbours across the end of the turn have their mean between them', () => {
  const { mean, percentiles } = summariseTurns(Float64Array.of(0.99, 0.03));
  expect(mean).toBeCloseTo(0.01, 12);
  expect(percentiles!['50']).toBeCloseTo(0.01, 12);
  expect(percentiles!['2.5']).toBeCloseTo(-0.009, 12);
});

// A median in the last quarter of the turn is told as before its beginning, and all the rest with it.
test.each([
  { centre: 0.74, told: 0.74 },
  { centre: 0.76, told: -0.24 },
  { centre: 0.98, told: -0.02 },
])('mean and percentiles are of one turn: around $centre they are told around $told', ({ centre, told }) => {
  const { mean, percentiles } = summariseTurns(
    Float64Array.of(-0.02, -0.01, 0, 0.01, 0.05).map((x) => (x + centre) % 1),
  );
  expect(percentiles!['50']).toBeCloseTo(told, 12);
  // Expanding tan: the mean on the line less (2π)² μ₃/6, with μ₃ = 12.7e-6 the third moment of the five.
  expect(mean).toBeCloseTo(told + 0.006 - ((2 * Math.PI) ** 2 * 12.7e-6) / 6, 5);
  expect(percentiles!['2.5']).toBeCloseTo(told - 0.019, 12);
  expect(percentiles!['97.5']).toBeCloseTo(told + 0.046, 12);
});

test('no direction: draws all around, or opposite', () => {
  for (const turns of [
    Float64Array.from({ length: 1000 }, (_, i) => i / 1000),
    Float64Array.from({ length: 1000 }, (_, i) => (i % 2) / 2 + 0.1),
  ]) {
    const found = summariseTurns(turns);
    expect(found).toMatchObject({ mean: null, percentiles: null, defined: 1 });
    expect(found.reason).toContain('no mean direction');
    expect(found.resultantLength).toBeLessThan(1e-12);
  }
});

test('draws without a value are left out; none at all is null with a reason', () => {
  const found = summariseTurns(Float64Array.of(Number.NaN, 0.25, 0.25, Number.NaN));
  expect(found).toMatchObject({ defined: 0.5, resultantLength: 1 });
  expect(found.mean).toBeCloseTo(0.25, 15);
  expect(summariseTurns(Float64Array.of(Number.NaN))).toMatchObject({
    mean: null,
    resultantLength: null,
    defined: 0,
    reason: 'no draw has a value',
  });
});

test('unwrapTurn stays within half a turn of the centre and moves by whole turns', () => {
  for (const centre of [0, 0.1, 0.5, 0.9]) {
    for (const turn of [0, 0.2, 0.4, 0.6, 0.8, 0.999]) {
      const found = unwrapTurn(turn, centre);
      expect(found - centre >= -0.5 && found - centre < 0.5 + 1e-15).toBe(true);
      expect(Math.abs(found - turn - Math.round(found - turn))).toBeLessThan(1e-15);
    }
  }
});
