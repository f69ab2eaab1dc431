import fc from 'fast-check';
import { describe, expect, test } from 'vitest';
import { circleDifferencesInto } from '../../../sim/solve/circleDifferences.ts';
import { type Curve, curveValue, curveValuesInto, periodicCurve } from '../../../sim/solve/curve.ts';
import { crossings, extremes, integrate, shareBetween, turningPoints } from '../../../sim/solve/features.ts';
import { rootBetween } from '../../../sim/solve/roots.ts';

/** sin(s) + c on n nodes. */
function sine(nodes: number, offset = 0): Curve {
  const at = (f: (s: number) => number) => Float64Array.from({ length: nodes }, (_, i) => f((2 * Math.PI * i) / nodes));
  return periodicCurve(
    nodes,
    at((s) => Math.sin(s) + offset),
    at(Math.cos),
    at((s) => -Math.sin(s)),
    1,
  );
}

test('quintic Hermite interpolation: order six', () => {
  const error = (nodes: number): number => {
    const curve = sine(nodes);
    let largest = 0;
    for (let i = 0; i < 1000; i++) {
      const s = (2 * Math.PI * (i + 0.3)) / 1000;
      largest = Math.max(largest, Math.abs(curveValue(curve, s) - Math.sin(s)));
    }
    return largest;
  };
  expect(Math.abs(Math.log2(error(8) / error(16)) - 6)).toBeLessThan(0.1);
  expect(Math.abs(Math.log2(error(16) / error(32)) - 6)).toBeLessThan(0.1);
});

test('many values at once are the single values', () => {
  const curve = sine(16);
  const positions = Float64Array.from({ length: 333 }, (_, i) => (2 * Math.PI * i) / 332);
  const values = new Float64Array(333);
  curveValuesInto(curve, positions, values);
  for (let i = 0; i < 333; i++) expect(values[i]).toBeCloseTo(curveValue(curve, positions[i]), 14);
});

test('seven-point differences on a circle: order six', () => {
  const error = (size: number): [number, number] => {
    const value = Float64Array.from({ length: size }, (_, i) => Math.exp(Math.sin((2 * Math.PI * i) / size)));
    const slope = new Float64Array(size);
    const curvature = new Float64Array(size);
    circleDifferencesInto(value, size, slope, curvature);
    let first = 0;
    let second = 0;
    for (let i = 0; i < size; i++) {
      const s = (2 * Math.PI * i) / size;
      const y = Math.exp(Math.sin(s));
      first = Math.max(first, Math.abs(slope[i] - Math.cos(s) * y));
      second = Math.max(second, Math.abs(curvature[i] - (Math.cos(s) ** 2 - Math.sin(s)) * y));
    }
    return [first, second];
  };
  const [coarse, fine] = [error(48), error(96)];
  expect(Math.abs(Math.log2(coarse[0] / fine[0]) - 6)).toBeLessThan(0.1);
  expect(Math.abs(Math.log2(coarse[1] / fine[1]) - 6)).toBeLessThan(0.1);
});

describe('features of a sine', () => {
  const curve = sine(64, 0.2);

  test('turning points', () => {
    const found = turningPoints(curve);
    expect(found.map(({ kind }) => kind)).toEqual(['maximum', 'minimum']);
    expect(found[0].position).toBeCloseTo(Math.PI / 2, 10);
    expect(found[0].curvature).toBeCloseTo(-1, 6);
    expect(extremes(curve).lowest.position).toBeCloseTo((3 * Math.PI) / 2, 10);
    expect(extremes(curve).highest.value).toBeCloseTo(1.2, 10);
  });

  test('crossings and the share of time between', () => {
    expect(crossings(curve, 0.7).map((s) => s / Math.PI)).toEqual([expect.closeTo(1 / 6, 9), expect.closeTo(5 / 6, 9)]);
    expect(shareBetween(curve, 0.7, 9, (s) => s)).toBeCloseTo(1 / 3, 9);
    expect(shareBetween(curve, -9, 9, (s) => s)).toBe(1);
    expect(shareBetween(curve, 5, 9, (s) => s)).toBe(0);
  });

  test('integrals', () => {
    expect(integrate(curve, (_, y) => y)).toBeCloseTo(0.4 * Math.PI, 10);
    expect(integrate(curve, (s, y) => y * Math.sin(s))).toBeCloseTo(Math.PI, 9);
  });
});

test('roots are bracketed to rounding', () => {
  fc.assert(
    fc.property(
      fc.double({ min: -5, max: 5, noNaN: true }),
      fc.double({ min: 0.1, max: 9, noNaN: true }),
      (root, steep) => {
        const f = (x: number) => Math.expm1(steep * (x - root));
        expect(Math.abs(rootBetween(f, -6, 7) - root)).toBeLessThan(1e-13);
      },
    ),
    { seed: 7, numRuns: 300 },
  );
  expect(rootBetween((x) => x, 0, 1)).toBe(0);
  expect(rootBetween((x) => x - 1, 0, 1)).toBe(1);
});
