import { expect, test } from 'vitest';
import { importanceByRanks } from '../../../../sim/studies/spread/importance.ts';
import { rankOrder } from '../../../../sim/studies/spread/rankMeasure.ts';

const count = 256;
const rows = Uint32Array.from({ length: count }, (_, row) => row);
const rising = Float64Array.from(rows, (row) => row / count);
/** The same few values over and over: of no account to anything that rises. */
const alternating = Float64Array.from(rows, (row) => row % 16);
const constant = new Float64Array(count).fill(0.3);

test('an input of which nothing can be told stays null, with its reason, beside those of which it can', () => {
  const { ranks, reason } = importanceByRanks([rising, constant, alternating].map(rankOrder), rankOrder(rising), rows);
  expect(reason).toBeUndefined();
  expect(ranks![0]!.value).toBeGreaterThan(0.9);
  expect(ranks![1]).toEqual({ value: null, chanceLevel: null, reason: 'the input is the same in every draw' });
  expect(ranks![2]!.value).toBeLessThan(0); // what chance gives on average is taken off, and is not clipped
});

test('where nothing can be told of any input there are no ranks, and one reason', () => {
  const all = importanceByRanks([rising, alternating].map(rankOrder), rankOrder(constant), rows);
  expect(all).toEqual({
    first: null,
    total: null,
    ranks: null,
    leftOut: 0,
    reason: 'the finding is the same in every draw',
  });
  expect(importanceByRanks([], rankOrder(rising), rows).reason).toBe('no input is drawn');
});
