import { expect, test } from 'vitest';
import { multiples, roomyTicks } from '../../../viewer/figures/roomyTicks.ts';

test('roomyTicks: welcome values first, none too near to another, none off the axis', () => {
  const ticks = roomyTicks({
    levels: [
      [0, 90],
      [30, 60, 85, 200],
    ],
    place: (value) => (value > 100 ? null : value),
    gap: 20,
    enough: 9,
  });
  expect(ticks.map(({ value }) => value)).toEqual([0, 30, 60, 90]);
});

test('roomyTicks: with enough of them finer ones are left away', () => {
  const place = (value: number): number => value;
  expect(roomyTicks({ levels: [[0, 50], [25]], place, gap: 1, enough: 2 }).map(({ value }) => value)).toEqual([0, 50]);
  expect(roomyTicks({ levels: [[0, 50], [25]], place, gap: 1, enough: 3 })).toHaveLength(3);
});

test('multiples: both ends belong', () => {
  expect(multiples(30, -60, 60)).toEqual([-60, -30, 0, 30, 60]);
  expect(multiples(90, 95, 100)).toEqual([]);
  expect(multiples(0.1, 0.3, 0.5)).toHaveLength(3);
});
