import { describe, expect, test } from 'vitest';
import { toPortable } from '../../../sim/dataset/portable.ts';
import { readPage } from '../../../viewer/report/readPage.ts';
import { curveGrid, mapGrid } from '../gridFixture.ts';

const written = (grid: unknown): string => JSON.stringify(toPortable({ grid }));
type Draft = ReturnType<typeof draft>;
const draft = () => JSON.parse(written(curveGrid())).grid;
const changed = (change: (grid: Draft) => void): string => {
  const grid = draft();
  change(grid);
  return JSON.stringify({ grid });
};

describe('a page that carries a grid', () => {
  test('comes back as it was written, over one input and over two', () => {
    for (const grid of [curveGrid(), mapGrid()]) expect(readPage(written(grid))).toEqual({ grid });
  });

  test.each<[string, (grid: Draft) => void]>([
    ['no cases', (grid) => (grid.cases = [])],
    ['three axes', (grid) => (grid.axes = [grid.axes[0], grid.axes[0], grid.axes[0]])],
    ['an axis of one node', (grid) => (grid.axes[0].nodes = toPortable(Float64Array.of(1)))],
    ['nodes that fall', (grid) => (grid.axes[0].nodes = toPortable(Float64Array.of(1, 0.5)))],
    ['a logarithm of zero', (grid) => (grid.axes[0].log = true)],
    ['a case without findings', (grid) => delete grid.cases[0].findings],
    ['no origin', (grid) => delete grid.scenario],
  ])('%s: not a grid', (_, change) => {
    expect(() => readPage(changed(change))).toThrow('the data are not a grid');
  });

  test.each<[string, (grid: Draft) => void]>([
    ['a value too few', (grid) => grid.cases[1].findings[2].values.pop()],
    ['a word for a value', (grid) => (grid.cases[1].findings[2].values[4] = 'hot')],
    ['a failed node beyond the grid', (grid) => (grid.cases[1].failed[0].node = 31)],
    ['an own point of two inputs', (grid) => grid.cases[1].members[0].own.push(1)],
    ['a place off the chart', (grid) => (grid.cases[1].members[0].universal.storeNumber = 0)],
  ])('%s: numbers are missing', (_, change) => {
    expect(() => readPage(changed(change))).toThrow('numbers of “thin air” are missing');
  });
});
