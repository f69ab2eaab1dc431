import { expect, test } from 'vitest';
import { SimError } from '../../../../sim/error.ts';
import { rowsByWeight, rowsEvenly } from '../../../../sim/studies/spread/posteriorRow.ts';
import { sobolDraws } from '../../../../sim/studies/spread/sobol.ts';

function timesTaken(choose: (share: number) => number, rows: number, draws: number): Float64Array {
  const taken = new Float64Array(rows);
  const shares = sobolDraws(4);
  for (let draw = draws - 1; draw >= 0; draw--) taken[choose(shares.at(draw, 0))]++;
  return taken;
}

test('rows by weight: by hand', () => {
  const choose = rowsByWeight('posterior.weights', Float64Array.of(0, 1, 0, 3, 0));
  expect([1e-9, 0.2499, 0.2501, 1 - 1e-9].map(choose)).toEqual([1, 1, 3, 3]);
});

test('each row as often as its weight says, to within two', () => {
  const weights = Float64Array.from({ length: 700 }, (_, row) => (row % 7 === 0 ? 0 : 1 + (row % 13)));
  const sum = weights.reduce((total, weight) => total + weight, 0);
  const taken = timesTaken(rowsByWeight('weights', weights), 700, 4096);
  for (const [row, times] of taken.entries()) {
    expect(Math.abs(times - (4096 * weights[row]) / sum)).toBeLessThan(2);
    if (weights[row] === 0) expect(times).toBe(0);
  }
});

test('without weights: as with equal ones', () => {
  const taken = timesTaken(rowsEvenly('file', 1000), 1000, 4096);
  expect(taken).toEqual(timesTaken(rowsByWeight('file', new Float64Array(1000).fill(0.3)), 1000, 4096));
  expect(Math.min(...taken)).toBeGreaterThanOrEqual(3);
  expect(Math.max(...taken)).toBeLessThanOrEqual(6);
});

test.each([
  { name: 'no row', weights: [], what: 'there is no row' },
  { name: 'negative', weights: [1, -1], what: 'the weight of row 2 is -1' },
  { name: 'NaN', weights: [Number.NaN], what: 'the weight of row 1 is NaN' },
  { name: 'all zero', weights: [0, 0], what: 'no weight is above zero' },
])('refused: $name', ({ weights, what }) => {
  const ask = () => rowsByWeight('posterior.weights', Float64Array.from(weights));
  expect(ask).toThrow(SimError);
  expect(ask).toThrow(what);
});

test('refused: an empty file', () => {
  expect(() => rowsEvenly('posterior.file', 0)).toThrow(SimError);
});
