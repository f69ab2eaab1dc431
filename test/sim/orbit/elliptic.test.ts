import fc from 'fast-check';
import { expect, test } from 'vitest';
import { SimError } from '../../../sim/error.ts';
import { completeEllipticE, completeEllipticK } from '../../../sim/orbit/elliptic.ts';
import { relativeError } from '../relative.ts';

/**
 * Abramowitz & Stegun (1964) Handbook of Mathematical Functions, table 17.1 (from memory) prints K(½) = 1.85407 46773 01372
 * and E(½) = 1.35064 38810 47675; the other rows and digits from mpmath, calculated for the parameter m as a double.
 */
// biome-ignore format: a table
const reference = [
  [0, Math.PI / 2, Math.PI / 2],
  [0.1, 1.6124413487202194, 1.5307576368977631],
  [0.5, 1.8540746773013719, 1.3506438810476755],
  [0.81, 2.2805491384227703, 1.1716970527816142],
  [0.99, 3.695637362989874, 1.015993545025224],
  [0.999999, 8.294051463601063, 1.0000038970261722],
] as const;

test('published values', () => {
  for (const [m, first, second] of reference) {
    // what the file promises
    expect(relativeError(completeEllipticK(m), first)).toBeLessThan(3e-15);
    expect(relativeError(completeEllipticE(m), second)).toBeLessThan(3e-15);
  }
});

test("Legendre's relation EK′ + E′K − KK′ = π/2", () => {
  fc.assert(
    fc.property(fc.double({ min: 1e-6, max: 1 - 1e-6, noNaN: true }), (m) => {
      const product = (x: number, y: number) => completeEllipticE(x) * completeEllipticK(y);
      const relation = product(m, 1 - m) + product(1 - m, m) - completeEllipticK(m) * completeEllipticK(1 - m);
      // terms of up to π/2 · K(1 − 1e-6) = 13, each good to 3e-15
      expect(Math.abs(relation - Math.PI / 2)).toBeLessThan(1e-13);
    }),
  );
});

test('against the integrals themselves, by the periodic trapezoid rule', () => {
  const steps = 64; // spectral: e^(−64 · 2 ln(1/q)) is below 1e-17 for m ≤ 0.9
  for (const m of [0.05, 0.3, 0.7, 0.9]) {
    let first = 0;
    let second = 0;
    for (let i = 0; i < steps; i++) {
      const root = Math.sqrt(1 - m * Math.sin(((i + 0.5) * Math.PI) / steps) ** 2);
      first += Math.PI / 2 / steps / root;
      second += ((Math.PI / 2) * root) / steps;
    }
    expect(relativeError(completeEllipticK(m), first)).toBeLessThan(1e-14);
    expect(relativeError(completeEllipticE(m), second)).toBeLessThan(1e-14);
  }
});

test('limits and errors', () => {
  expect(relativeError(completeEllipticE(1 - 2 ** -53), 1)).toBeLessThan(3e-15);
  for (const bad of [-0.1, 1, 2, Number.NaN]) expect(() => completeEllipticE(bad)).toThrow(SimError);
});
