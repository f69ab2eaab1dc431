import fc from 'fast-check';
import { expect, test } from 'vitest';
import { spreadLabels } from '../../../viewer/figures/spreadLabels.ts';

test('labels with room stay where they want to be', () => {
  expect(spreadLabels([80, 10, 40], 20, 0, 100)).toEqual([80, 10, 40]);
});

test('labels that collide step apart evenly round their middle, and away from an edge', () => {
  expect(spreadLabels([50, 50], 20, 0, 100)).toEqual([40, 60]);
  expect(spreadLabels([1, 2, 3], 20, 0, 100)).toEqual([0, 20, 40]);
});

test('for any labels: inside, in order, apart', () => {
  const wanted = fc.array(fc.double({ min: 0, max: 400, noNaN: true }), { maxLength: 30 });
  fc.assert(
    fc.property(wanted, (places) => {
      const step = Math.min(21, 400 / Math.max(1, places.length - 1));
      const placed = spreadLabels(places, 21, 0, 400);
      const inOrder = places.map((place, index) => ({ place, at: placed[index]! })).sort((a, b) => a.place - b.place);
      const sorted = inOrder.map(({ at }) => at).sort((a, b) => a - b);
      expect(
        sorted.every((at, i) => at >= -1e-6 && at <= 400 + 1e-6 && (i === 0 || at - sorted[i - 1]! >= step - 1e-6)),
      ).toBe(true);
      expect(
        inOrder.every(({ place, at }, i) => i === 0 || place === inOrder[i - 1]!.place || at > inOrder[i - 1]!.at),
      ).toBe(true);
    }),
    { seed: 7 },
  );
});
