/** The same as in the normal suite, 10,000 of them. */
import { expect, test } from 'vitest';
import { mutated, seeded } from './mutate.ts';
import { outcomeOf } from './outcome.ts';

test('10,000 damaged scenarios read, or are refused in plain words', () => {
  const random = seeded(19850523);
  const counts = { reads: 0, refused: 0 };
  for (let i = 0; i < 10_000; i++) counts[outcomeOf(mutated(random))]++;
  expect(counts.reads).toBeGreaterThan(1000);
  expect(counts.refused).toBeGreaterThan(4000);
});
