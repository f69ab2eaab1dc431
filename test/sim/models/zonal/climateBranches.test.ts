import { describe, expect, test } from 'vitest';
import { periodicStates } from '../../../../sim/models/zonal/index.ts';
import { zonalFamily } from '../../../../sim/models/zonal/traceFamily.ts';
import { type Branch, followBranch } from '../../../../sim/solve/continuation.ts';
import { rampAlbedo } from '../../../../sim/surface/albedo/ramp.ts';
import { linearEmission } from '../../../../sim/surface/emission/linear.ts';
import { zonalWorld } from './worlds.ts';

/**
 * Ice line against solar constant of the two-mode energy-balance model with a step co-albedo at −10 °C: North (1975) J. Atmos. Sci.
 * 32, 1301 (set 1) and North, Cahalan & Coakley (1981) Rev. Geophys. 19, 91 (set 2), parameters from memory. The numbers are
 * the exact mode sum Q(x_s) = (A + B T_s)/Σ H_n P_n/(1 + n(n+1)D/B) evaluated elsewhere and cross-checked with a finite-volume
 * solution: calculated. x_s is the sine of the ice line; folds are where Q turns back.
 */
const sets = [
  {
    name: 'constant co-albedo',
    emission: { a: 201.4, b: 1.45 },
    heatTransport: 0.31 * 1.45,
    legendre: [1, 0, -0.482],
    warm: 0.32,
    p2: 0,
    q95: 335.265,
    line: [
      [0.2, 1.0795],
      [0.4, 0.99056],
      [0.6, 0.96922],
      [0.8, 0.9833],
      [0.9, 0.99626],
    ],
    largeCapFold: 0.9692,
    smallCapOnset: 0.98625,
    snowballMelts: 1.353,
  },
  {
    name: 'co-albedo with a P₂ term',
    emission: { a: 203.3, b: 2.09 },
    heatTransport: 0.649,
    legendre: [1, 0, -0.477],
    warm: 0.319,
    p2: 0.202,
    q95: 334.245,
    line: [
      [0.2, 0.99024],
      [0.4, 0.89557],
      [0.6, 0.88614],
      [0.8, 0.93168],
      [0.9, 0.97413],
    ],
    largeCapFold: 0.8826,
    smallCapOnset: null,
    snowballMelts: 1.3256,
  },
] as const;

// The step is followed as a ramp of this width, K: the branch then turns where it would have a corner. What that changes is linear
// in the width and is seen in the last test.
const rampWidth = 0.3;
const bands = 360;

function follow(set: (typeof sets)[number], width: number): { branch: Branch; xs: number[] } {
  const albedo = rampAlbedo({ warm: set.warm, ice: 0.62, from: 263.15 - width / 2, to: 263.15 + width / 2 });
  const worldAt = (q: number) =>
    zonalWorld({
      q,
      // Nothing depends on the time of year: a short one keeps the unstable branch's growth within it small.
      periodDays: 20,
      albedo,
      emission: linearEmission(set.emission),
      globe: { bands, heatTransport: set.heatTransport, albedoP2: set.p2, insolation: { legendre: set.legendre } },
    });
  const start = worldAt(360);
  const [warm] = periodicStates(start, start.globe, bands, 1e-6);
  const family = zonalFamily(worldAt, 4, 100, 340);
  const branch = followBranch(
    family,
    { y: warm.history.value.slice(0, bands), p: 360 },
    { from: 280, to: 470, direction: -1, tolerance: 1e-6, longest: 0.03, shortest: 1e-6, maximumPoints: 600 },
  );
  const share = new Float64Array(bands);
  const xs = branch.points.map(({ y }) => {
    warm.system.physics.warm.into(y, share);
    return share.reduce((sum, value) => sum + value, 0) / bands;
  });
  return { branch, xs };
}

/** Q at an ice line on the way down, by the parabola through three neighbouring points. */
function solarConstantAt(branch: Branch, xs: readonly number[], line: number): number {
  const k = xs.findIndex((x, i) => i > 1 && x < line && xs[i - 1] >= line);
  const [a, b, c] = [k - 2, k - 1, k].map((i) => ({ x: xs[i], q: branch.points[i].p }));
  const weight = (p: number, q: number, r: number) => ((line - q) * (line - r)) / ((p - q) * (p - r));
  return a.q * weight(a.x, b.x, c.x) + b.q * weight(b.x, a.x, c.x) + c.q * weight(c.x, a.x, b.x);
}

describe.each(sets)('$name', (set) => {
  const { branch, xs } = follow(set, rampWidth);
  const folds = branch.points.flatMap((point, i) =>
    point.fold ? [{ q: point.p / set.q95, xs: xs[i], log: point.logMultiplier }] : [],
  );
  const nearest = (q: number) =>
    folds.reduce((best, fold) => (Math.abs(fold.q - q) < Math.abs(best.q - q) ? fold : best));

  test('the whole loop is followed, from an ice-free to a frozen globe', () => {
    expect(branch.ended).toBe('left');
    expect(Math.max(...xs)).toBeCloseTo(1, 6);
    expect(Math.min(...xs)).toBeCloseTo(0, 6);
  });

  // 1e-3: second order in 360 bands leaves 1e-4, the ramp's width 4e-4.
  test('solar constant at each ice line', () => {
    expect(Math.abs(solarConstantAt(branch, xs, 0.95) / set.q95 - 1)).toBeLessThan(1e-3);
    for (const [line, ratio] of set.line) {
      expect(Math.abs(solarConstantAt(branch, xs, line) / set.q95 / ratio - 1)).toBeLessThan(1e-3);
    }
  });

  test('the large ice cap collapses where it should', () => {
    expect(Math.abs(nearest(set.largeCapFold).q - set.largeCapFold)).toBeLessThan(1e-3);
    // At a fold the multiplier is 1.
    expect(Math.abs(nearest(set.largeCapFold).log)).toBeLessThan(1e-3);
  });

  test('the small ice cap appears where it should, or grows smoothly', () => {
    if (set.smallCapOnset !== null) {
      expect(Math.abs(nearest(set.smallCapOnset).q - set.smallCapOnset)).toBeLessThan(1e-3);
    } else {
      expect(folds.filter((fold) => fold.xs > 0.7)).toEqual([]);
    }
  });

  test('stability changes at the folds only: unstable between the large cap and the snowball', () => {
    for (const [i, point] of branch.points.entries()) {
      if (xs[i] > 0.05 && xs[i] < 0.5) expect(point.logMultiplier).toBeGreaterThan(0);
      if (xs[i] > 0.65 && xs[i] < 0.9) expect(point.logMultiplier).toBeLessThan(0);
      if (xs[i] === 0 || xs[i] === 1) expect(point.logMultiplier).toBeLessThan(0);
    }
  });

  test('the snowball melts where it should as the ramp narrows to a step', () => {
    const melts = (of: Branch) => Math.max(...of.points.filter(({ fold }) => fold).map(({ p }) => p)) / set.q95;
    const wide = melts(follow(set, 2 * rampWidth).branch);
    const narrow = melts(branch);
    expect(Math.abs(2 * narrow - wide - set.snowballMelts)).toBeLessThan(1e-3);
  });
});
