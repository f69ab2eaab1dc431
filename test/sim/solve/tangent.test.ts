import { expect, test } from 'vitest';
import { logDominantMultiplier } from '../../../sim/solve/periodicMap.ts';
import { stageHistory } from '../../../sim/solve/rodas4.ts';
import { tangentOf } from '../../../sim/solve/tangent.ts';

/** y₀′ = −rate y₀, y₁′ = −3 rate y₁. */
function decay(rate: number, steps: number) {
  const widths = new Float64Array(steps).fill(1 / steps);
  const jacobian = (_: number, __: Float64Array, { diagonals }: { diagonals: readonly Float64Array[] }) => {
    for (const diagonal of diagonals) diagonal.fill(0);
    diagonals[1].set([-rate, -3 * rate]);
  };
  return tangentOf(jacobian, { size: 2, width: 1 }, widths, stageHistory(steps, 2))!;
}

test('a product is the exponential, to second order', () => {
  const [first, second] = decay(1, 1000).apply(Float64Array.of(1, 2));
  // SDIRK of order 2: error (λh)² λ ≈ 3e-6 at most
  expect(first).toBeCloseTo(Math.exp(-1), 5);
  expect(second).toBeCloseTo(2 * Math.exp(-3), 5);
});

test('growth is the logarithm of the product', () => {
  const tangent = decay(1, 50);
  const v = Float64Array.of(3, -1);
  const after = tangent.apply(v);
  const length = Math.hypot(...after);
  const turned = v.slice();
  expect(tangent.grow(turned)).toBeCloseTo(Math.log(length / Math.hypot(...v)), 12);
  expect(turned[0]).toBeCloseTo(after[0] / length, 12);
});

test('the multiplier of a year in which all is forgotten, far below the smallest number', () => {
  // e^−2000; λh = 0.5, where a step of R(z) is off by z³/25 at most
  const log = logDominantMultiplier(decay(2000, 4000));
  expect(Math.abs(log / -2000 - 1)).toBeLessThan(0.02);
});
