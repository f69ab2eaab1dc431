import fc from 'fast-check';
import { expect, test } from 'vitest';
import { plainLabel } from '../../../viewer/figures/plainLabel.ts';

test('markup becomes entities, an entity stays as it was typed', () => {
  expect(plainLabel('<b>a</b>')).toBe('&lt;b&gt;a&lt;/b&gt;');
  expect(plainLabel('&lt;')).toBe('&amp;lt;');
});

test('white space is single, control and direction characters are gone, long text is cut between characters', () => {
  expect(plainLabel(' a\n\tb\u0000\u202ec ')).toBe('a bc');
  expect(plainLabel('🪐'.repeat(40), 5)).toBe('🪐🪐🪐🪐…');
});

test('no text leaves a bracket or a bare ampersand behind', () => {
  fc.assert(
    fc.property(fc.string({ unit: 'grapheme' }), (text) => {
      expect(plainLabel(text)).not.toMatch(/[<>]|&(?!(amp|lt|gt);)/);
    }),
    { seed: 11 },
  );
});
