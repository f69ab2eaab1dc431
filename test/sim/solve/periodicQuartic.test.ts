import { describe, expect, test } from 'vitest';
import { curveValue } from '../../../sim/solve/curve.ts';
import { quarticCurve, quarticSolver } from '../../../sim/solve/periodicQuartic.ts';
import { manufactured } from './support.ts';

const solve = quarticSolver();

// Method of manufactured solutions: the answer is exp(a sin s) by construction.
describe.each([1e-7, 1e-3, 1, 30, 1e4, 1e6])('rate %f', (rate) => {
  test.each([1e-4, 1e-6, 1e-9])('keeps the tolerance %f everywhere', (tolerance) => {
    const { solution, forcingInto } = manufactured(rate, 0.7);
    const found = solve({ rate, forcingInto, tolerance, firstSize: 16 });
    expect(found.converged).toBe(true);
    const curve = quarticCurve(found, 2);
    for (let i = 0; i < 500; i++) {
      const s = (2 * Math.PI * (i + 0.41)) / 500;
      expect(Math.abs(curveValue(curve, s) / (2 * solution(s)) - 1)).toBeLessThan(tolerance);
    }
  });
});

test('observed order of convergence is five', () => {
  const { solution, forcingInto } = manufactured(1, 0.9);
  const errors = [16, 32, 64].map((firstSize) => {
    // A loose tolerance accepts the first pair: the mesh is 2 × firstSize.
    const found = solve({ rate: 1, forcingInto, tolerance: 0.1, firstSize });
    // Errors at the nodes; what Newton has left is the square of its last change, far below them.
    let largest = 0;
    for (let i = 0; i < found.size; i++) {
      largest = Math.max(largest, Math.abs(found.value[i] / solution((2 * Math.PI * i) / found.size) - 1));
    }
    return largest;
  });
  for (let i = 0; i + 1 < errors.length; i++) {
    // Two-derivative Padé (2,3) rule: order 5; 0.3 for meshes that are not yet asymptotic.
    expect(Math.abs(Math.log2(errors[i] / errors[i + 1]) - 5)).toBeLessThan(0.3);
  }
});

test('the multiplier is exp(−4κ ∮ y³)', () => {
  const rate = 0.3;
  const { solution, forcingInto } = manufactured(rate, 0.5);
  const found = solve({ rate, forcingInto, tolerance: 1e-10, firstSize: 16 });
  let sum = 0;
  for (let i = 0; i < 4096; i++) sum += solution((2 * Math.PI * i) / 4096) ** 3;
  expect(found.logMultiplier).toBeCloseTo((-4 * rate * sum * 2 * Math.PI) / 4096, 8);
});

test('answers do not depend on what was solved before', () => {
  const problem = { rate: 5, ...manufactured(5, 0.7), tolerance: 1e-9, firstSize: 16 };
  const fresh = quarticSolver();
  const first = Array.from(fresh(problem).value.slice(0, 16));
  fresh({ rate: 2e3, ...manufactured(2e3, 2.5), tolerance: 1e-11, firstSize: 64 }); // grows every buffer
  expect(Array.from(fresh(problem).value.slice(0, 16))).toEqual(first);
});
