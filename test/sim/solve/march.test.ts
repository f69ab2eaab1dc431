import { describe, expect, test } from 'vitest';
import { halved } from '../../../sim/solve/certify.ts';
import { curveValue } from '../../../sim/solve/curve.ts';
import { forward } from '../../../sim/solve/forward.ts';
import { march } from '../../../sim/solve/march.ts';
import type { Separable } from '../../../sim/solve/separable.ts';
import { linearEquation, steadyQuartic } from './support.ts';

test('observed order of convergence is five', () => {
  const equation = linearEquation(1.3);
  const errorWith = (steps: number): number => {
    const boundaries = Float64Array.from({ length: steps + 1 }, (_, i) => (4 * i) / steps);
    const { end } = march(equation, { from: 0, to: 4, value: 5, tolerance: 1, keep: false, boundaries });
    return Math.abs(end - equation.exact(4, 5));
  };
  const errors = [8, 16, 32].map(errorWith);
  // Radau IIA with three stages: order 5 (Hairer & Wanner 1996, thm IV.5.3).
  for (let i = 0; i < 2; i++) expect(Math.abs(Math.log2(errors[i] / errors[i + 1]) - 5)).toBeLessThan(0.15);
});

describe.each([0.1, 1, 100, 1e5])('forward at rate %f', (rate) => {
  test.each([1e-4, 1e-7, 1e-10])('keeps the tolerance %f between the steps too', (tolerance) => {
    const equation = linearEquation(rate);
    const found = forward(equation, 0, 6, 10, tolerance, 1_000_000)!;
    expect(found.converged).toBe(true);
    let largest = 0;
    for (let i = 0; i <= 700; i++) {
      const s = (6 * i) / 700;
      largest = Math.max(largest, Math.abs(curveValue(found.curve, s) / equation.exact(s, 10) - 1));
    }
    expect(largest).toBeLessThan(tolerance);
    expect(largest).toBeLessThan(found.errorEstimate);
  });
});

test('backwards undoes forwards', () => {
  const equation = linearEquation(0.8);
  const there = march(equation, { from: 0, to: 3, value: 7, tolerance: 1e-9, keep: false });
  const back = march(equation, { from: 3, to: 0, value: there.end, tolerance: 1e-9, keep: false });
  expect(back.end).toBeCloseTo(7, 7);
  expect(back.logMultiplier).toBeCloseTo(-there.logMultiplier, 9);
});

test('the multiplier is the derivative of end by start', () => {
  const equation = steadyQuartic(0.7);
  const end = (value: number) => march(equation, { from: 0, to: 1, value, tolerance: 1e-10, keep: false });
  const derivative = (end(1.5 + 1e-5).end - end(1.5 - 1e-5).end) / 2e-5;
  expect(Math.exp(end(1.5).logMultiplier)).toBeCloseTo(derivative, 6);
});

test('a slow system keeps the digits of its change', () => {
  const equation = steadyQuartic(1e-13);
  const { change } = march(equation, { from: 0, to: 1, value: 2, tolerance: 1e-8, keep: false });
  expect(change / (1e-13 * (1 - 16))).toBeCloseTo(1, 9);
});

describe('a gain that steps at y = 1', () => {
  // y′ = u − y with u = 2 above 1 and ½ below: from 1.3 it rises to 2, from 0.9 it falls to ½, each exponentially.
  const stepped: Separable = {
    ...linearEquation(1),
    drive: (_, into) => {
      into.arrival = 1;
      into.arrivalSlope = 0;
      into.clock = 1;
      into.clockSlope = 0;
    },
    breaks: [1],
    gain: (_, piece) => (piece === 1 ? 2 : 0.5),
  };

  test('is marched within one piece', () => {
    const { end } = march(stepped, { from: 0, to: 2, value: 1.3, tolerance: 1e-9, keep: false });
    expect(end).toBeCloseTo(2 - 0.7 * Math.exp(-2), 8);
  });

  test('is crossed exactly, with the jump in the multiplier', () => {
    // Driven across: u is higher below, so that y rises through 1 towards 3 and goes on to 1.5.
    const driven: Separable = { ...stepped, gain: (_, piece) => (piece === 1 ? 1.5 : 3) };
    const crossingTime = Math.log(2.5 / 2); // 3 − 2.5 e^−t = 1
    const exact = 1.5 - 0.5 * Math.exp(-(2 - crossingTime));
    const run = march(driven, { from: 0, to: 2, value: 0.5, tolerance: 1e-9, keep: true });
    expect(run.end).toBeCloseTo(exact, 10);
    expect(curveValue(run.curve!, crossingTime)).toBeCloseTo(1, 10);
    // d end/d start = e^−2 × (slope after)/(slope before) = e^−2 × 0.5/2
    expect(Math.exp(run.logMultiplier)).toBeCloseTo((Math.exp(-2) * 0.5) / 2, 9);
  });
});

test('halved keeps every end and adds every middle', () => {
  expect(Array.from(halved(Float64Array.of(0, 1, 4)))).toEqual([0, 0.5, 1, 2.5, 4]);
});
