import { describe, expect, test } from 'vitest';
import { normalQuantile } from '../../../../sim/quantity/index.ts';
import { rowsByWeight } from '../../../../sim/studies/spread/posteriorRow.ts';
import { pseudoRandomDraws } from '../../../../sim/studies/spread/pseudoRandom.ts';
import { type RankMeasure, rankMeasure, rankOrder } from '../../../../sim/studies/spread/rankMeasure.ts';
import { sobolDraws } from '../../../../sim/studies/spread/sobol.ts';

function normals(seed: number, dimension: number, count: number): Float64Array {
  const column = new Float64Array(count);
  pseudoRandomDraws(seed).fillInto(dimension, 0, column);
  return column.map(normalQuantile);
}

function measure(input: Float64Array, finding: Float64Array, rows?: ArrayLike<number>): RankMeasure {
  return rankMeasure(rankOrder(input), rankOrder(finding), rows);
}

function correlated(seed: number, correlation: number, count: number): [Float64Array, Float64Array] {
  const x = normals(seed, 0, count);
  const rest = normals(seed, 1, count);
  return [x, x.map((value, i) => correlation * value + Math.sqrt(1 - correlation ** 2) * rest[i])];
}

/** Bivariate normal: (3/π) asin((1 + ρ²)/2) − ½. Source: Chatterjee (2021) J. Am. Stat. Assoc. 116, 2009, §1 (from memory). */
function ofNormals(correlation: number): number {
  return (3 / Math.PI) * Math.asin((1 + correlation ** 2) / 2) - 0.5;
}

// 0.02: the scatter of 16384 draws is about 0.006, and a class is 1/128 of the draws wide, which costs at most as much.
test.each([0, 0.3, -0.6, 0.9, 0.99])('normals with correlation %d: the closed form', (correlation) => {
  const { value } = measure(...correlated(1, correlation, 16384));
  expect(Math.abs(value! - ofNormals(correlation))).toBeLessThan(0.02);
});

test('a finding that the input fixes, in any shape: 1, less one class', () => {
  const x = normals(2, 0, 4096);
  for (const shape of [
    (u: number) => u,
    (u: number) => -Math.exp(u),
    (u: number) => u ** 2,
    (u: number) => Math.sin(2 * u),
  ]) {
    const { value } = measure(x, x.map(shape));
    expect(value).toBeLessThanOrEqual(1);
    expect(value).toBeGreaterThan(0.9);
  }
});

test('an input that changes only the scatter is seen', () => {
  const [x, z] = correlated(3, 0, 4096);
  const { value, chanceLevel } = measure(
    x,
    z.map((value, i) => value * Math.exp(x[i])),
  );
  expect(value).toBeGreaterThan(4 * chanceLevel!);
});

test('ranks alone count: any rising change of unit or logarithm gives the same bits', () => {
  const [x, y] = correlated(4, 0.5, 4096);
  expect(
    measure(
      x.map(Math.exp),
      y.map((value) => 3 * value - 7),
    ),
  ).toEqual(measure(x, y));
});

describe('irrelevant inputs', () => {
  const seeds = Array.from({ length: 400 }, (_, seed) => seed);

  // 400 cases: the mean of the values to four standard errors (level/2 each); 2.5 % above the level, to four standard errors of 0.8 %.
  test.each([
    { name: 'all different', change: (value: number) => value },
    { name: 'with many ties', change: (value: number) => Math.max(0, Math.round(2 * value)) },
    { name: 'two values', change: (value: number) => (value > 1 ? 1 : 0) },
  ])('near 0 on average and seldom above the level of chance: $name', ({ change }) => {
    const found = seeds.map((seed) => {
      const [x, y] = correlated(seed, 0, 512);
      return measure(x, y.map(change));
    });
    const mean = found.reduce((sum, { value }) => sum + value!, 0) / seeds.length;
    expect(Math.abs(mean)).toBeLessThan((4 * found[0].chanceLevel!) / 2 / Math.sqrt(seeds.length));
    const above = found.filter(({ value, chanceLevel }) => value! > chanceLevel!).length / seeds.length;
    expect(above).toBeGreaterThan(0);
    expect(above).toBeLessThan(0.057);
  });

  test('repeated rows do not look like dependence', () => {
    const weights = Float64Array.from({ length: 800 }, (_, row) => 1 + (row % 9));
    const choose = rowsByWeight('weights', weights);
    const values = seeds.slice(0, 100).map((seed) => {
      const [x, y] = correlated(seed, 0, 800);
      const draws = sobolDraws(seed);
      const rows = Array.from({ length: 4096 }, (_, draw) => choose(draws.at(draw, 0)));
      const take = (column: Float64Array) => Float64Array.from(rows, (row) => column[row]);
      return measure(take(x), take(y), rows);
    });
    const mean = values.reduce((sum, { value }) => sum + value!, 0) / values.length;
    expect(Math.abs(mean)).toBeLessThan((4 * values[0].chanceLevel!) / 2 / Math.sqrt(values.length));
    expect(values.filter(({ value, chanceLevel }) => value! > chanceLevel!).length).toBeLessThanOrEqual(9);
  });
});

test('an input that only goes along with another shares its value: said in the docs, and so it is', () => {
  const [cause, companion] = correlated(5, 0.95, 8192);
  const own = measure(
    cause,
    cause.map((value) => value ** 3),
  ).value!;
  const shared = measure(
    companion,
    cause.map((value) => value ** 3),
  ).value!;
  expect(own).toBeGreaterThan(0.97);
  expect(Math.abs(shared - ofNormals(0.95))).toBeLessThan(0.03);
});

test('draws without the finding are left out', () => {
  const [x, y] = correlated(6, 0.7, 4000);
  const holed = y.map((value, i) => (i % 2 === 0 ? value : Number.NaN));
  const even = (column: Float64Array) => column.filter((_, i) => i % 2 === 0);
  expect(measure(x, holed)).toEqual(measure(even(x), even(y)));
});

test('nothing to measure: null with a reason', () => {
  const [x, y] = correlated(7, 0.7, 200);
  const constant = new Float64Array(200).fill(3);
  expect(measure(x, constant)).toMatchObject({ value: null, reason: 'the finding is the same in every draw' });
  expect(measure(constant, y)).toMatchObject({ value: null, reason: 'the input is the same in every draw' });
  expect(
    measure(
      x,
      y.map((value, i) => (i < 60 ? value : Number.NaN)),
    ).reason,
  ).toContain('fewer than 64');
  expect(measure(x, y, new Uint32Array(200)).reason).toContain('fewer than 64');
});
