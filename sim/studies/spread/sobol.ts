/**
 * Sobol' points: draws that fill the cube of inputs evenly, so that means converge nearly as 1/n and not as 1/√n.
 *
 * Scrambling: a random lower-triangular matrix of bits on each coordinate and a random digital shift (Matoušek 1998, J. Complexity
 * 14, 527). Chosen over nested uniform scrambling by a hash for three reasons. Two coordinates that first differ in bit r come out
 * equal before r, different in r, and with independent even bits behind it: just as nested scrambling would leave them, so that the
 * variance of a mean is the same, whatever a hash is worth. A scrambled net stays a net by construction. And it costs nothing for each
 * point: the matrix is folded into the direction numbers once. Each draw alone is uniform, so means are unbiased over seeds.
 */
import { pseudoRandomDraws, purposes, randomWords } from './pseudoRandom.ts';
import { directionNumbers, sobolBits, sobolDimensions } from './sobolTable.ts';
import type { UniformDraws } from './uniformDraws.ts';

const step = 2 ** -sobolBits;

/**
 * One coordinate of point k, 32 bits: directions (32,) by the Gray code of k.
 * Source: Antonov & Saleev (1979) USSR Comput. Math. Math. Phys. 19, 252.
 */
function coordinateBits(directions: Uint32Array, point: number): number {
  let bits = 0;
  for (let gray = (point ^ (point >>> 1)) >>> 0, i = 0; gray !== 0; gray >>>= 1, i++) {
    if (gray & 1) bits ^= directions[i];
  }
  return bits >>> 0;
}

/** Coordinate of the plain sequence, in [0, 1): point 0 is the origin. 0 ≤ dimension < sobolDimensions; 0 ≤ point < 2³². */
export function sobolCoordinate(point: number, dimension: number): number {
  return coordinateBits(directionNumbers(dimension), point) * step;
}

/**
 * Scrambled Sobol' draws of one seed, 32 bits each, at the middles of their steps: never 0 or 1. Dimensions beyond the table
 * (`sobolDimensions`) are pseudo-random: still uniform and unbiased, but with nothing of the even filling.
 * Shape:  draws 0 … 2^m − 1 have every coordinate exactly once in each of the 2^m equal intervals; 0 ≤ draw < 2³².
 * Errors: SimError for a seed that is not whole or not in [0, 2⁵³).
 */
export function sobolDraws(seed: number): UniformDraws {
  const scrambles = lazily((dimension) => scramble(seed, dimension));
  const beyond = pseudoRandomDraws(seed);
  return {
    at(draw, dimension) {
      if (dimension >= sobolDimensions) return beyond.at(draw, dimension);
      const { directions, shift } = scrambles(dimension);
      return middle(coordinateBits(directions, draw) ^ shift);
    },
    fillInto(dimension, first, out) {
      if (dimension >= sobolDimensions) beyond.fillInto(dimension, first, out);
      else fillColumn(scrambles(dimension), first, out);
    },
  };
}

interface Scramble {
  readonly directions: Uint32Array;
  readonly shift: number;
}

/** Successive points differ in one direction number: that of the lowest zero bit of the point's number. */
function fillColumn({ directions, shift }: Scramble, first: number, out: Float64Array): void {
  let bits = coordinateBits(directions, first) ^ shift;
  for (let j = 0; j < out.length; j++) {
    out[j] = middle(bits);
    bits ^= directions[trailingOnes(first + j)];
  }
}

/** Place of the lowest zero bit; −1 after the very last point, where no direction is left. */
function trailingOnes(number: number): number {
  return 31 - Math.clz32(~number & (number + 1));
}

function middle(bits: number): number {
  return ((bits >>> 0) + 0.5) * step;
}

/** The matrix by its columns: column c is a one in bit c and random bits in all lower places. */
function scramble(seed: number, dimension: number): Scramble {
  const fill = randomWords(seed, purposes.scramble);
  const words = new Uint32Array(4);
  const columns = new Uint32Array(sobolBits);
  for (let c = 0; c < sobolBits; c++) {
    if (c % 4 === 0) fill(c / 4, dimension, words);
    const one = 2 ** (31 - c);
    columns[c] = one | (words[c % 4] & (one - 1));
  }
  fill(sobolBits / 4, dimension, words);
  return { directions: directionNumbers(dimension).map((direction) => multiply(columns, direction)), shift: words[0] };
}

/** Matrix times vector over GF(2). */
function multiply(columns: Uint32Array, vector: number): number {
  let product = 0;
  for (let c = 0; c < sobolBits; c++) if ((vector >>> (31 - c)) & 1) product ^= columns[c];
  return product >>> 0;
}

function lazily<T>(make: (index: number) => T): (index: number) => T {
  const made: T[] = [];
  return (index) => {
    made[index] ??= make(index);
    return made[index];
  };
}
