import { execFileSync } from 'node:child_process';
import fc from 'fast-check';
import { describe, expect, test } from 'vitest';
import {
  addInOrder,
  type Percentiles,
  percentileLevels,
  quantilesInto,
  type RunningSum,
  summarise,
} from '../../../../sim/studies/spread/percentiles.ts';
import { pseudoRandomDraws } from '../../../../sim/studies/spread/pseudoRandom.ts';
import { requireTool, toolPath } from '../../../support/require.ts';

const columns = fc.array(fc.double({ min: -1e6, max: 1e6, noNaN: true }), { minLength: 1, maxLength: 500 });

// Places (n − 1)·s by hand: of ten values 0 … 9 the share 0.16 stands at 1.44. Exact but for the product's rounding.
test('quantiles: by hand', () => {
  const values = Float64Array.of(7, 1, 9, 3, 0, 8, 2, 6, 5, 4);
  const found = quantilesInto(values, [0, 0.025, 0.16, 0.5, 0.84, 1]);
  for (const [i, expected] of [0, 0.225, 1.44, 4.5, 7.56, 9].entries()) expect(found[i]).toBeCloseTo(expected, 14);
  expect(quantilesInto(Float64Array.of(3), [0.025, 0.975])).toEqual([3, 3]);
});

test('quantiles: what full sorting gives, for any values, ties and orders', () => {
  fc.assert(
    fc.property(columns, fc.integer({ min: 1, max: 40 }), (values, coarse) => {
      const column = Float64Array.from(values, (x) => Math.round((x / 1e6) * coarse));
      const sorted = column.toSorted();
      const shares = [0, 0.1, 0.1, 0.7, 1];
      const found = quantilesInto(column, shares);
      for (const [i, share] of shares.entries()) {
        const place = (sorted.length - 1) * share;
        const low = sorted[Math.floor(place)];
        const expected = low + (sorted[Math.ceil(place)] - low) * (place % 1);
        if (Math.abs(found[i] - expected) > 1e-14 * coarse) return false;
      }
      return true;
    }),
    { seed: 1 },
  );
});

test('quantiles: orders that make bad splits', () => {
  const length = 3000;
  const orders: ((i: number) => number)[] = [(i) => i, (i) => -i, () => 1, (i) => i % 2, (i) => Math.abs(i - 1500)];
  for (const order of orders) {
    const column = Float64Array.from({ length }, (_, i) => order(i));
    expect(quantilesInto(column.slice(), [0.5])[0]).toBe((column.toSorted()[1499] + column.toSorted()[1500]) / 2);
  }
});

describe.skipIf(!requireTool('scipy'))('live reference', () => {
  test('numpy.percentile, to the last bit', () => {
    const column = new Float64Array(1003);
    pseudoRandomDraws(1).fillInto(0, 0, column);
    const script = `
import json, sys, numpy
print(json.dumps(numpy.percentile(json.load(sys.stdin), [2.5, 16, 50, 84, 97.5]).tolist()))`;
    const input = JSON.stringify([...column]);
    const known = JSON.parse(execFileSync(toolPath('scipy')!, ['-c', script], { input }).toString());
    const found = summarise(column).percentiles!;
    expect(percentileLevels.map((level) => found[level])).toEqual(known);
  });
});

test('draws without a value are left out, and their share is told', () => {
  const column = Float64Array.of(Number.NaN, 4, 1, Number.NaN, 2, 3, Number.NaN, 5);
  const kept = column.slice();
  const { mean, percentiles, defined, reason } = summarise(column);
  expect(column).toEqual(kept);
  expect({ mean, defined, reason }).toEqual({ mean: 3, defined: 5 / 8, reason: undefined });
  expect((percentiles as Percentiles)['50']).toBe(3);
});

test('no draw with a value: null and a reason, never NaN', () => {
  for (const column of [Float64Array.of(Number.NaN, Number.NaN), new Float64Array(0)]) {
    const nothing = { mean: null, percentiles: null, defined: 0, reason: 'no draw has a value' };
    expect(summarise(column)).toEqual(nothing);
  }
});

test('scratch may be longer than the column', () => {
  const column = Float64Array.of(3, 1, 2);
  expect(summarise(column, new Float64Array(50).fill(-9))).toEqual(summarise(column));
});

test('sums in draw order: the same bits however the column is cut', () => {
  fc.assert(
    fc.property(columns, fc.array(fc.nat(500), { maxLength: 5 }), (values, cuts) => {
      const column = Float64Array.from(values);
      const whole: RunningSum = { sum: 0, count: 0 };
      addInOrder(whole, column);
      const parts: RunningSum = { sum: 0, count: 0 };
      const ends = [0, ...cuts.map((cut) => Math.min(cut, column.length)).sort((a, b) => a - b), column.length];
      for (let i = 1; i < ends.length; i++) addInOrder(parts, column.subarray(ends[i - 1], ends[i]));
      return Object.is(whole.sum, parts.sum) && whole.count === parts.count;
    }),
    { seed: 1 },
  );
});
