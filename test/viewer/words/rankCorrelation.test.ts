import { expect, test } from 'vitest';
import { rankCorrelation } from '../../../viewer/words/rankCorrelation.ts';

test('rankCorrelation: 1 along any rising curve, −1 along a falling one, null for what does not vary', () => {
  const x = Array.from({ length: 20 }, (_, at) => at - 3);
  expect(rankCorrelation(x, x.map(Math.exp))).toBeCloseTo(1, 12);
  expect(
    rankCorrelation(
      x,
      x.map((value) => -(value ** 3)),
    ),
  ).toBeCloseTo(-1, 12);
  expect(
    rankCorrelation(
      x,
      x.map(() => 5),
    ),
  ).toBeNull();
});

test('rankCorrelation: a sum that can be done by hand', () => {
  // Without ties ρ = 1 − 6 Σd² / n(n² − 1): d = 0, 1, 1, 0, so 1 − 12/60.
  expect(rankCorrelation([1, 2, 3, 4], [1, 3, 2, 4])).toBeCloseTo(0.8, 12);
});

test('rankCorrelation: ties share their place', () => {
  // Ranks 0, 1.5, 1.5, 3 against 0, 1, 2, 3: 4.5/√(4.5·5).
  expect(rankCorrelation([1, 2, 2, 3], [1, 2, 3, 4])).toBeCloseTo(4.5 / Math.sqrt(4.5 * 5), 12);
});
