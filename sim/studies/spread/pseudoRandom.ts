/**
 * Counter-based random numbers: the counter (draw, dimension, purpose) is mixed with the seed, and nothing is remembered.
 * Source: Salmon, Moraes, Dror & Shaw (2011) Parallel random numbers: as easy as 1, 2, 3, SC'11: Philox 4×32, 10 rounds.
 */
import { SimError } from '../../error.ts';
import type { UniformDraws } from './uniformDraws.ts';

/** One number each, so that no two uses of a seed meet. */
export const purposes = { draws: 0, scramble: 1, bootstrap: 2 } as const;
export type Purpose = (typeof purposes)[keyof typeof purposes];

/** Four random 32-bit words of one counter into `words` (4,). */
export type RandomWords = (index: number, dimension: number, words: Uint32Array) => void;

const multiplier0 = 0xd2511f53;
const multiplier1 = 0xcd9e8d57;
const keyStep0 = 0x9e3779b9;
const keyStep1 = 0xbb67ae85;
const rounds = 10;

/** Philox 4×32-10 in place: `block` (4,) goes in as the counter and comes out as the random words; all 32-bit unsigned. */
export function philoxInto(key0: number, key1: number, block: Uint32Array): void {
  let x0 = block[0];
  let x1 = block[1];
  let x2 = block[2];
  let x3 = block[3];
  let k0 = key0;
  let k1 = key1;
  for (let round = 0; round < rounds; round++) {
    const high0 = highProduct(multiplier0, x0);
    const high1 = highProduct(multiplier1, x2);
    const low0 = Math.imul(multiplier0, x0);
    x0 = (high1 ^ x1 ^ k0) >>> 0;
    x1 = Math.imul(multiplier1, x2) >>> 0;
    x2 = (high0 ^ x3 ^ k1) >>> 0;
    x3 = low0 >>> 0;
    k0 = (k0 + keyStep0) | 0;
    k1 = (k1 + keyStep1) | 0;
  }
  block[0] = x0;
  block[1] = x1;
  block[2] = x2;
  block[3] = x3;
}

/** Upper 32 bits of the 64-bit product of two unsigned 32-bit numbers, by halves of 16 bits. */
function highProduct(a: number, b: number): number {
  const aLow = a & 0xffff;
  const aHigh = a >>> 16;
  const bLow = b & 0xffff;
  const bHigh = b >>> 16;
  const middle = aHigh * bLow + ((aLow * bLow) >>> 16); // below 2³²
  const cross = aLow * bHigh + (middle & 0xffff);
  return (aHigh * bHigh + (middle >>> 16) + (cross >>> 16)) >>> 0;
}

/**
 * The words of one seed for one purpose. index: whole, below 2⁵³.
 * Errors: SimError unless the seed is whole and 0 ≤ seed < 2⁵³.
 */
export function randomWords(seed: number, purpose: Purpose): RandomWords {
  requireSeed(seed);
  const key0 = seed >>> 0;
  const key1 = Math.floor(seed / 2 ** 32);
  return (index, dimension, words) => {
    words[0] = index >>> 0;
    words[1] = Math.floor(index / 2 ** 32);
    words[2] = dimension;
    words[3] = purpose;
    philoxInto(key0, key1, words);
  };
}

/** Pseudo-random draws: 52 bits each, never 0 or 1. Errors: SimError for a seed that is not whole or not in [0, 2⁵³). */
export function pseudoRandomDraws(seed: number): UniformDraws {
  const fill = randomWords(seed, purposes.draws);
  const words = new Uint32Array(4);
  const at = (draw: number, dimension: number): number => {
    fill(draw, dimension, words);
    return openUnit(words[0], words[1]);
  };
  return {
    at,
    fillInto(dimension, first, out) {
      for (let j = 0; j < out.length; j++) out[j] = at(first + j, dimension);
    },
  };
}

/** Two words as a number in (0, 1): 52 bits, and half a step up, which is exact and reaches neither end. */
function openUnit(high: number, low: number): number {
  return ((high >>> 6) * 2 ** 26 + (low >>> 6) + 0.5) * 2 ** -52;
}

function requireSeed(seed: number): void {
  if (Number.isSafeInteger(seed) && seed >= 0) return;
  throw new SimError('seed', `${seed} is not a whole number from 0 to 2⁵³ − 1`, 'Give a whole number such as 1');
}
