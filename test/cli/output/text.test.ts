import fc from 'fast-check';
import { expect, test } from 'vitest';
import { hanging, printable, textWidth, toAscii, wrap } from '../../../cli/output/text.ts';

test('widths: combining marks take none, East Asian letters two', () => {
  expect(['abc', 'naïve', 'nai\u0308ve', '日本語', '±—µ', '⣿┤'].map(textWidth)).toEqual([3, 5, 5, 6, 3, 2]);
});

test('wrap keeps every letter and never exceeds the width', () => {
  fc.assert(
    fc.property(fc.string({ maxLength: 80 }), fc.integer({ min: 2, max: 30 }), (text, width) => {
      const lines = wrap(printable(text), width);
      expect(Math.max(...lines.map(textWidth))).toBeLessThanOrEqual(width);
      expect(lines.join('').replace(/\s/g, '')).toBe(printable(text).replace(/\s/g, ''));
    }),
  );
});

test('hanging indents what follows, and puts a long head above', () => {
  expect(hanging('head  ', 'some more words', 14)).toEqual(['head  some', '      more', '      words']);
  expect(hanging('a rather long head ', 'words', 20)).toEqual(['a rather long head', '  words']);
});

test('what could steer a terminal is replaced; ASCII spells what it can', () => {
  expect(printable('a\u001b[2Jb\u0007\u009bc\nd')).toBe('a?[2Jb??c\nd');
  expect(printable('a\u202eb\u2066c👩\u200d🚀')).toBe('a?b?c👩\u200d🚀'); // direction marks; the joiner of an emoji stays
  expect(toAscii('naïve — 3 ± 0.1 ≤ µ日')).toBe('naive - 3 +/- 0.1 <= u?');
});
