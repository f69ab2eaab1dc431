import { expect, test } from 'vitest';
import { SimError } from '../../../../sim/error.ts';
import { philoxInto, pseudoRandomDraws, purposes, randomWords } from '../../../../sim/studies/spread/pseudoRandom.ts';

// Known answers of philox4x32 with 10 rounds from the file kat_vectors of Salmon et al.'s Random123 distribution (from memory):
// counter and key of zeros, of ones, and the digits of π. Bits: no tolerance.
test.each([
  { key: [0, 0], counter: [0, 0, 0, 0], answer: [0x6627e8d5, 0xe169c58d, 0xbc57ac4c, 0x9b00dbd8] },
  {
    key: [0xffffffff, 0xffffffff],
    counter: [0xffffffff, 0xffffffff, 0xffffffff, 0xffffffff],
    answer: [0x408f276d, 0x41c83b0e, 0xa20bc7c6, 0x6d5451fd],
  },
  {
    key: [0xa4093822, 0x299f31d0],
    counter: [0x243f6a88, 0x85a308d3, 0x13198a2e, 0x03707344],
    answer: [0xd16cfe09, 0x94fdcceb, 0x5001e420, 0x24126ea1],
  },
])('philox 4×32-10: known answer for key $key', ({ key, counter, answer }) => {
  const block = Uint32Array.from(counter);
  philoxInto(key[0], key[1], block);
  expect([...block]).toEqual(answer);
});

// The C++26 standard, [rand.predef]: the 10,000th word of a default-constructed philox4x32 is 1955073260 (from memory). Its key is
// 20111115, its counter goes up by one for four words.
test('philox 4×32-10: the ten thousandth word of the C++ standard', () => {
  const block = Uint32Array.of(2499, 0, 0, 0);
  philoxInto(20111115, 0, block);
  expect(block[3]).toBe(1955073260);
});

test('a draw depends on its number, its dimension and the seed alone', () => {
  const draws = pseudoRandomDraws(7);
  const column = new Float64Array(50);
  draws.fillInto(3, 1000, column);
  expect(column.toReversed()).toEqual(column.map((_, j) => pseudoRandomDraws(7).at(1049 - j, 3)));
  expect(new Set([draws.at(5, 3), draws.at(5, 4), draws.at(6, 3), pseudoRandomDraws(8).at(5, 3)]).size).toBe(4);
  expect(pseudoRandomDraws(2 ** 32 + 7).at(5, 3)).not.toBe(draws.at(5, 3));
});

test('no two purposes of a seed share words', () => {
  const words = Object.values(purposes).map((purpose) => {
    const block = new Uint32Array(4);
    randomWords(1, purpose)(0, 0, block);
    return block.join(' ');
  });
  expect(new Set(words).size).toBe(words.length);
});

test('uniform: moments and 256 equal classes', () => {
  const count = 2 ** 16;
  const column = new Float64Array(count);
  pseudoRandomDraws(1).fillInto(0, 0, column);
  const mean = column.reduce((sum, u) => sum + u, 0) / count;
  // Standard errors 1/√(12n) = 1.1e-3 and, of the square, 1.2e-3: four of them.
  expect(Math.abs(mean - 1 / 2)).toBeLessThan(4.6e-3);
  expect(Math.abs(column.reduce((sum, u) => sum + u * u, 0) / count - 1 / 3)).toBeLessThan(4.8e-3);
  const classes = new Float64Array(256);
  for (const u of column) classes[Math.floor(u * 256)]++;
  const chiSquare = classes.reduce((sum, n) => sum + (n - count / 256) ** 2 / (count / 256), 0);
  // χ² with 255 degrees of freedom: mean 255, deviation 22.6; four of these either way.
  expect(Math.abs(chiSquare - 255)).toBeLessThan(91);
  expect(Math.min(...column)).toBeGreaterThan(0);
  expect(Math.max(...column)).toBeLessThan(1);
});

test.each([-1, 1.5, Number.NaN, 2 ** 53])('seed %d is refused', (seed) => {
  expect(() => pseudoRandomDraws(seed)).toThrow(SimError);
});
