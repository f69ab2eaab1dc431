/** Damaged scenarios: each reads or is refused in plain words; never another exception, never a NaN. */
import { expect, test } from 'vitest';
import { richGlobe } from './globes.ts';
import { mutated, rich, seeded } from './mutate.ts';
import { outcomeOf } from './outcome.ts';
import { sound } from './sound.ts';

test('1,500 damaged scenarios read, or are refused in plain words', () => {
  const random = seeded(20260304);
  const counts = { reads: 0, refused: 0 };
  for (let i = 0; i < 1500; i++) counts[outcomeOf(mutated(random))]++;
  // Both happen often, so the damage is neither always fatal nor always harmless.
  expect(counts.reads).toBeGreaterThan(100);
  expect(counts.refused).toBeGreaterThan(500);
});

test('the texts that are damaged read before', () => {
  expect(outcomeOf(sound)).toBe('reads');
  expect(outcomeOf(rich)).toBe('reads');
  expect(outcomeOf(richGlobe)).toBe('reads');
});
