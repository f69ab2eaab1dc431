import fc from 'fast-check';
import { describe, expect, test } from 'vitest';
import { groupRows, type Range } from '../../../cli/engine/job.ts';
import { countRows, missing, planChunks, shardRange, withoutOverlaps } from '../../../cli/engine/plan.ts';

/** All chunks, when each row takes so many seconds. */
function chunks(gaps: readonly Range[], workers: number, secondsPerRow: number): Range[] {
  const plan = planChunks(gaps, workers);
  const given: Range[] = [];
  for (let range = plan.next(); range !== null; range = plan.next()) {
    given.push(range);
    plan.took(range, (range.to - range.from) * secondsPerRow);
  }
  return given;
}

const ranges = fc
  .uniqueArray(fc.integer({ min: 0, max: 70000 }), { minLength: 2, maxLength: 12 })
  .map((edges) => edges.toSorted((a, b) => a - b))
  .map((edges) =>
    edges.flatMap((edge, index) => (index % 2 === 1 ? [{ from: edges[index - 1]!, to: edge }] : ([] as Range[]))),
  );

describe('planChunks', () => {
  test('gives out every missing row once, in order, never over the edge of a row group', () => {
    const price = fc.constantFrom(0, 1e-9, 1e-5, 1e-3, 0.1);
    fc.assert(
      fc.property(ranges, price, fc.integer({ min: 1, max: 9 }), (gaps, secondsPerRow, workers) => {
        const given = chunks(gaps, workers, secondsPerRow);
        const joined: { from: number; to: number }[] = [];
        for (const { from, to } of given) {
          if (joined.at(-1)?.to === from) joined.at(-1)!.to = to;
          else joined.push({ from, to });
        }
        expect(joined).toEqual(gaps);
        for (const { from, to } of given) expect(Math.floor(from / groupRows)).toBe(Math.floor((to - 1) / groupRows));
      }),
      { numRuns: 60 },
    );
  });

  test('begins with one row and takes about half a second where rows cost much', () => {
    const given = chunks([{ from: 0, to: 5000 }], 1, 0.01);
    const sizes = given.map(({ from, to }) => to - from);
    expect(sizes.slice(0, 4)).toEqual([1, 8, 50, 50]);
    expect(Math.max(...sizes)).toBe(50);
  });

  test('a row of many seconds is a chunk', () => {
    expect(chunks([{ from: 0, to: 6 }], 2, 30).every(({ from, to }) => to === from + 1)).toBe(true);
  });

  test('fills whole row groups where rows cost nothing', () => {
    const given = chunks([{ from: 0, to: 20 * groupRows }], 2, 1e-8);
    expect(given.filter(({ from, to }) => to - from === groupRows).length).toBeGreaterThan(15);
  });

  test('grows no more than eightfold before it has seen how that went', () => {
    const plan = planChunks([{ from: 0, to: 1e6 }], 4);
    const sizes = [0, 0, 0].map(() => plan.next()!).map(({ from, to }) => to - from);
    expect(sizes).toEqual([1, 1, 1]);
  });

  test('the last chunks are smaller, so that the workers end together', () => {
    const sizes = chunks([{ from: 0, to: 1000 }], 4, 0.01).map(({ from, to }) => to - from);
    expect(Math.max(...sizes.slice(-4))).toBeLessThanOrEqual(10);
  });
});

test('missing: what no range covers, whether they touch, overlap or reach beyond', () => {
  const whole = { from: 10, to: 100 };
  expect(missing(whole, [])).toEqual([whole]);
  expect(
    missing(whole, [
      { from: 50, to: 60 },
      { from: 0, to: 20 },
      { from: 55, to: 70 },
    ]),
  ).toEqual([
    { from: 20, to: 50 },
    { from: 70, to: 100 },
  ]);
  expect(missing(whole, [{ from: 10, to: 100 }])).toEqual([]);
  expect(missing(whole, [{ from: 100, to: 120 }])).toEqual([whole]);
});

test('shards tile the rows, and differ by one at most', () => {
  fc.assert(
    fc.property(fc.integer({ min: 1, max: 1e7 }), fc.integer({ min: 1, max: 200 }), (rows, count) => {
      const parts = Array.from({ length: count }, (_, index) => shardRange(rows, { index: index + 1, count }));
      expect(missing({ from: 0, to: rows }, parts)).toEqual([]);
      expect(countRows(parts)).toBe(rows);
      const sizes = parts.map(({ from, to }) => to - from);
      expect(Math.max(...sizes) - Math.min(...sizes)).toBeLessThanOrEqual(1);
    }),
  );
});

describe('withoutOverlaps', () => {
  test('each row once; what is computed of the gaps afterwards, and no other, joins the same ones', () => {
    const range = fc
      .tuple(fc.nat(99), fc.integer({ min: 1, max: 30 }))
      .map(([from, rows]) => ({ from, to: from + rows }));
    fc.assert(
      fc.property(fc.array(range, { maxLength: 12 }), (present) => {
        const taken = withoutOverlaps(present);
        for (const [i, { from }] of taken.slice(1).entries()) expect(from).toBeGreaterThanOrEqual(taken[i]!.to);
        const gaps = missing({ from: 0, to: 130 }, taken);
        const all = [...taken, ...gaps].toSorted((a, b) => a.from - b.from);
        expect(withoutOverlaps([...present, ...gaps])).toEqual(all);
        expect(countRows(all)).toBe(130);
      }),
    );
  });
});
