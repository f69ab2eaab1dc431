import fc from 'fast-check';
import { expect, test } from 'vitest';
import { editDistance, nearest } from '../../../sim/quantity/nearest.ts';

test('editDistance: textbook cases', () => {
  expect(editDistance('kitten', 'sitting')).toBe(3); // the standard example of Levenshtein's distance
  expect(editDistance('saturday', 'sunday')).toBe(3);
  expect(editDistance('abcd', 'abdc')).toBe(1); // a swap of neighbours counts once
  expect(editDistance('', 'abc')).toBe(3);
});

test('editDistance: symmetric, zero only for equal words, at most the longer word', () => {
  const word = fc.string({ maxLength: 12 });
  fc.assert(
    fc.property(word, word, (a, b) => {
      const distance = editDistance(a, b);
      return (
        distance === editDistance(b, a) && (distance === 0) === (a === b) && distance <= Math.max(a.length, b.length)
      );
    }),
    { seed: 1 },
  );
});

const keys = ['semiMajorAxis', 'eccentricity', 'inclination', 'period', 'bondAlbedo', 'thermalInertia', 'run', 'check'];

test.each([
  ['eccentrictiy', 'eccentricity'],
  ['semimajoraxis', 'semiMajorAxis'],
  ['semi_major_axis', 'semiMajorAxis'],
  ['perod', 'period'],
  ['rn', 'run'],
  ['chekc', 'check'],
  ['albedo', 'bondAlbedo'],
  ['inertia', 'thermalInertia'],
  ['x', null],
  ['', null],
  ['luminosity', null],
])('nearest: %s → %s', (word, expected) => {
  expect(nearest(word, keys)).toBe(expected);
});

test('nearest: the word itself wins, then the earlier of two equally near', () => {
  expect(nearest('period', keys)).toBe('period');
  expect(nearest('cat', ['bat', 'hat'])).toBe('bat');
  expect(nearest('anything', [])).toBe(null);
});
