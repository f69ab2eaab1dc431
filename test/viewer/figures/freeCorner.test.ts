import { expect, test } from 'vitest';
import type { ChartLine } from '../../../viewer/figures/chartLine.ts';
import { freeCorner } from '../../../viewer/figures/freeCorner.ts';

const band = { left: 0, right: 100, low: 0, high: 10 };
const line = (x: number[], y: number[]): ChartLine => ({
  plainName: '',
  name: '',
  shortName: '',
  x,
  y,
  colour: '',
  dash: 'solid',
  width: 1,
  marker: null,
  referenceFor: null,
});

test('a name stands at the left top unless a line runs there', () => {
  expect(freeCorner([], band, 20, 2)).toEqual({ side: 'left', edge: 'top' });
  expect(freeCorner([line([0, 100], [9, 5])], band, 20, 2)).toEqual({ side: 'left', edge: 'bottom' });
});

test('with both left corners taken it moves to the right', () => {
  const lines = [line([0, 30], [9, 9]), line([0, 30], [1, 1])];
  expect(freeCorner(lines, band, 20, 2)).toEqual({ side: 'right', edge: 'top' });
});

test('a steep step across the corner counts though no point lies in it', () => {
  expect(freeCorner([line([5, 6], [-50, 50])], band, 20, 2).side).toBe('right');
});
