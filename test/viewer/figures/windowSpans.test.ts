import { expect, test } from 'vitest';
import { type Dataset, series } from '../../../sim/dataset/dataset.ts';
import type { Window } from '../../../sim/world.ts';
import { wholeSpan } from '../../../viewer/figures/orbitSpan.ts';
import { stretchesInside } from '../../../viewer/figures/windowSpans.ts';

const dataset = (...flux: number[]): Dataset => ({
  variables: {
    time: series(
      'time',
      Float64Array.from(flux, (_, i) => 10 * i),
      's',
      'Time',
    ),
    instellation: series('time', Float64Array.from(flux), 'W/m2', 'Instellation'),
  },
});
const window: Window = { name: 'w', of: 'instellation', from: 100, to: 200 };
const inside = (...flux: number[]) => stretchesInside(dataset(...flux), wholeSpan(dataset(...flux)), window);

test('enters and leaves by straight lines between rows', () => {
  expect(inside(0, 200, 400)).toEqual([{ from: 5, to: 10 }]);
  expect(inside(0, 150, 0)).toEqual([{ from: 10 * (100 / 150), to: 10 + 10 * (50 / 150) }]);
});

test('a step across the whole window passes through it', () => {
  expect(inside(0, 400, 0)).toEqual([
    { from: 2.5, to: 5 },
    { from: 15, to: 17.5 },
  ]);
});

test('what begins or ends inside is open to the edge', () => {
  expect(inside(150, 150, 150)).toEqual([{ from: 0, to: 20 }]);
  expect(inside(150, 250, 150)).toEqual([
    { from: 0, to: 5 },
    { from: 15, to: 20 },
  ]);
  expect(inside(0, 50, 0)).toEqual([]);
});
