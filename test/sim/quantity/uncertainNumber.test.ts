import { execFileSync } from 'node:child_process';
import { describe, expect, test } from 'vitest';
import { SimError } from '../../../sim/error.ts';
import { type Distribution, type Support, type UncertainNumber, uncertainNumber } from '../../../sim/quantity/index.ts';
import { requireTool, toolPath } from '../../support/require.ts';
import { relativeError } from '../relative.ts';

const free: Support = { kind: 'bounded', low: Number.NEGATIVE_INFINITY, high: Number.POSITIVE_INFINITY };
const fraction: Support = { kind: 'bounded', low: 0, high: 0.9999 };

function number(distribution: Distribution, { value = 0, support = free } = {}): UncertainNumber {
  return uncertainNumber('key', { value, distribution }, support);
}

/** Mean and variance as ∫ Q(u) du and ∫ (Q(u) − mean)² du, by tanh–sinh quadrature, which takes quantiles' ends without harm. */
function moments({ quantile }: UncertainNumber): { mean: number; variance: number } {
  const mean = integral(quantile);
  return { mean, variance: integral((share) => (quantile(share) - mean) ** 2) };
}

/** Halves apart, since a split normal has a bend in the middle. */
function integral(f: (share: number) => number): number {
  const step = 1 / 64;
  let sum = 0;
  let weights = 0;
  for (let t = -2.9; t <= 2.9; t += step) {
    const share = 1 / (1 + Math.exp(-Math.PI * Math.sinh(t)));
    const weight = share * (1 - share) * Math.cosh(t);
    sum += (weight * (f(share / 2) + f(1 - share / 2))) / 2;
    weights += weight;
  }
  return sum / weights;
}

const root2OverPi = Math.sqrt(2 / Math.PI);

// Closed forms. The quadrature leaves out 1e-12 of the probability at either end: 1e-9 relative to the deviation is ample.
test.each([
  { distribution: { form: 'normal', sigma: 0.3 }, value: 2, mean: 2, variance: 0.09 },
  // Split normal with half the probability on each side: mean c + (u − d)/√(2π), second moment (u² + d²)/2.
  {
    distribution: { form: 'splitNormal', up: 3, down: 1 },
    value: 10,
    mean: 10 + root2OverPi,
    variance: 5 - root2OverPi ** 2,
  },
  { distribution: { form: 'uniform', low: 1, high: 5 }, mean: 3, variance: 16 / 12 },
  // Log-uniform: (b − a)/ln(b/a), second moment (b² − a²)/(2 ln(b/a)).
  {
    distribution: { form: 'logUniform', low: 1, high: Math.E },
    mean: Math.E - 1,
    variance: (Math.E ** 2 - 1) / 2 - (Math.E - 1) ** 2,
  },
  // Half-normal of scale s = limit / 1.9599639845400545: mean s√(2/π), variance s²(1 − 2/π).
  {
    distribution: { form: 'upperLimit', limit: 1.9599639845400545, confidence: 0.95 },
    mean: root2OverPi,
    variance: 1 - 2 / Math.PI,
  },
  // p(x) = ½ sin x: mean π/2, variance π²/4 − 2.
  { distribution: { form: 'isotropic' }, mean: Math.PI / 2, variance: Math.PI ** 2 / 4 - 2 },
] as const)('moments: $distribution', ({ distribution, mean, variance, ...rest }) => {
  const found = moments(number(distribution, rest));
  expect(Math.abs(found.mean - mean) / Math.sqrt(variance)).toBeLessThan(1e-9);
  expect(relativeError(found.variance, variance)).toBeLessThan(1e-9);
});

// Closed forms: a few roundings.
test.each([
  { distribution: { form: 'uniform', low: 1, high: 5 }, share: 0.16, expected: 1.64 },
  { distribution: { form: 'logUniform', low: 1e5, high: 1e9 }, share: 0.25, expected: 1e6 },
  { distribution: { form: 'logUniform', low: 1e5, high: 1e9 }, share: 0.75, expected: 1e8 },
  { distribution: { form: 'upperLimit', limit: 0.12, confidence: 0.95 }, share: 0.95, expected: 0.12 },
  // The smallest share of 32 bits: s·√(π/2)·share.
  {
    distribution: { form: 'upperLimit', limit: 1.9599639845400545, confidence: 0.95 },
    share: 2 ** -33,
    expected: 2 ** -33 / root2OverPi,
  },
  { distribution: { form: 'isotropic' }, share: 0.25, expected: Math.PI / 3 },
  { distribution: { form: 'isotropic' }, share: 0.75, expected: (2 * Math.PI) / 3 },
  { distribution: { form: 'isotropic' }, share: 2 ** -33, expected: 2 * Math.asin(2 ** -16.5) },
  { distribution: { form: 'exact' }, share: 0.2, expected: 7 },
] as const)('quantile $share: $distribution', ({ distribution, share, expected }) => {
  expect(relativeError(number(distribution, { value: 7 }).quantile(share), expected)).toBeLessThan(1e-14);
});

test('split normal: median, 16 % and 84 % are as published', () => {
  const { quantile } = number({ form: 'splitNormal', up: 0.03, down: 0.05 }, { value: 0.62 });
  expect(quantile(0.5)).toBe(0.62);
  // Φ(±1), scipy 1.10.1.
  expect(quantile(0.15865525393145707)).toBeCloseTo(0.57, 14);
  expect(quantile(0.8413447460685429)).toBeCloseTo(0.65, 14);
});

// scipy 1.10.1, scipy.stats.truncnorm: quantiles 1e-9, 2.5, 16, 50, 84, 97.5 % and 1 − 1e-9, mean and variance. It claims no more than
// about 1e-9 in the tails; and near a bound the rounding of F(low) is absolute: 1e-9 of the deviation.
const truncatedReference = [
  {
    value: 0.1,
    sigma: 0.2,
    low: 0,
    high: 0.9999,
    quantiles: [
      3.928015135379326e-10, 0.009705219524960035, 0.059197050706063924, 0.1793733113948628, 0.34462964907396476,
      0.5226490921138849, 0.9998913682512701,
    ],
    mean: 0.20182795471983342,
    variance: 0.01944363902328043,
  },
  {
    value: 5,
    sigma: 1,
    low: Number.NEGATIVE_INFINITY,
    high: 2,
    quantiles: [
      -1.9925264425689369, 1.0150519895956371, 1.4802583708342119, 1.7948450794010666, 1.9472871964638934,
      1.9922968413791824, 1.9999999996954094,
    ],
    mean: 1.71690134506956,
    variance: 0.07055918678525586,
  },
  {
    value: 0,
    sigma: 1,
    low: 8,
    high: 9,
    quantiles: [
      8.000000000123112, 8.003116269315386, 8.021436334046284, 8.08488889901817, 8.222526448435906, 8.441515723415538,
      8.999999394946316,
    ],
    mean: 8.121188992979869,
    variance: 0.014148542782154938,
  },
  {
    value: -3,
    sigma: 0.5,
    low: 0,
    high: Number.POSITIVE_INFINITY,
    quantiles: [
      8.118927752320815e-11, 0.0020548540323082065, 0.01412393050459082, 0.055782530906719696, 0.14543096516940723,
      0.286472954970574, 1.3794063922857749,
    ],
    mean: 0.07924130227230952,
    variance: 0.005996909197259898,
  },
];
const truncatedShares = [1e-9, 0.025, 0.16, 0.5, 0.84, 0.975, 1 - 1e-9];

test.each(truncatedReference)(
  'truncated: $value ± $sigma from $low to $high',
  ({ value, sigma, low, high, ...known }) => {
    const found = number({ form: 'normal', sigma }, { value, support: { kind: 'bounded', low, high } });
    for (const [i, share] of truncatedShares.entries()) {
      expect(Math.abs(found.quantile(share) - known.quantiles[i]) / sigma).toBeLessThan(2e-9);
      expect(Math.abs(found.shareBelow(known.quantiles[i]) - share)).toBeLessThan(1e-9);
    }
    const { mean, variance } = moments(found);
    expect(Math.abs(mean - known.mean) / sigma).toBeLessThan(1e-9);
    expect(relativeError(variance, known.variance)).toBeLessThan(1e-7);
  },
);

const everyForm: { distribution: Distribution; value?: number; cut: number }[] = [
  // Shares of 0.1 ± 0.2 outside [0, 0.9999]: Φ(−0.5) + Φ(−4.4995), scipy 1.10.1.
  { distribution: { form: 'normal', sigma: 0.2 }, value: 0.1, cut: 0.3085375387259869 + 3.40567399255126e-6 },
  // Φ(−2) below alone: the other side reaches 0.9999 at 28 deviations.
  { distribution: { form: 'splitNormal', up: 0.02, down: 0.2 }, value: 0.4, cut: 0.02275013194817921 },
  { distribution: { form: 'uniform', low: -0.5, high: 0.5 }, cut: 0.5 },
  { distribution: { form: 'logUniform', low: 0.01, high: 0.9999 ** 2 / 0.01 }, cut: 0.5 },
  // The 95 % limit itself is the bound.
  { distribution: { form: 'upperLimit', limit: 0.9999, confidence: 0.95 }, cut: 0.05 },
  { distribution: { form: 'isotropic' }, cut: 0 },
];

test.each(everyForm)('$distribution: share cut away, rising quantiles, inverse', ({ distribution, value = 0, cut }) => {
  const support = distribution.form === 'isotropic' ? free : fraction;
  const found = number(distribution, { value, support });
  expect(Math.abs(found.truncatedShare - cut)).toBeLessThan(1e-13);
  let last = Number.NEGATIVE_INFINITY;
  for (const share of [2 ** -33, 1e-6, 0.01, 0.3, 0.5, 0.6, 0.99, 1 - 1e-6, 1 - 2 ** -33]) {
    const x = found.quantile(share);
    expect(x).toBeGreaterThan(last);
    if (support.kind === 'bounded') expect(x >= support.low && x <= support.high).toBe(true);
    expect(Math.abs(found.shareBelow(x) - share)).toBeLessThan(1e-14);
    last = x;
  }
});

test('angles wrap: nothing is cut away, and values come back by whole turns', () => {
  const turn: Support = { kind: 'wrapped', from: 0, period: 2 * Math.PI };
  const found = number({ form: 'normal', sigma: 0.3 }, { value: 0.1, support: turn });
  const plain = number({ form: 'normal', sigma: 0.3 }, { value: 0.1 });
  expect(found.truncatedShare).toBe(0);
  expect(found.quantile(0.9)).toBe(plain.quantile(0.9));
  expect(found.quantile(0.1)).toBe(plain.quantile(0.1) + 2 * Math.PI);
  for (const sigma of [1, 100, 1e6]) {
    for (const share of [1e-9, 0.1, 0.5, 0.7, 1 - 1e-9]) {
      const x = number({ form: 'normal', sigma }, { support: turn }).quantile(share);
      expect(x >= 0 && x < 2 * Math.PI).toBe(true);
    }
  }
  expect(number({ form: 'exact' }, { value: -1, support: turn }).quantile(0.5)).toBe(2 * Math.PI - 1);
});

test('the angle between two directions folds at its ends', () => {
  const tilt: Support = { kind: 'folded', low: 0, high: Math.PI };
  const plain = number({ form: 'normal', sigma: 0.3 }, { value: 0.1 });
  const found = number({ form: 'normal', sigma: 0.3 }, { value: 0.1, support: tilt });
  expect(found.quantile(0.1)).toBeCloseTo(-plain.quantile(0.1), 14);
  expect(found.quantile(0.9)).toBe(plain.quantile(0.9));
  const other = number({ form: 'normal', sigma: 0.3 }, { value: 3, support: tilt });
  expect(other.quantile(0.9)).toBeCloseTo(2 * Math.PI - 3 - 0.3 * 1.2815515655446004, 14);
  expect(found.truncatedShare).toBe(0);
});

test('a spread with nothing inside the bounds is refused', () => {
  expect(() => number({ form: 'uniform', low: 2, high: 3 }, { support: fraction })).toThrow(SimError);
  expect(() => number({ form: 'normal', sigma: 0.01 }, { value: 9, support: fraction })).toThrow(SimError);
  expect(() => number({ form: 'exact' }, { value: 2, support: fraction })).toThrow(/key: .*from 0 to 0.9999/);
});

describe.skipIf(!requireTool('scipy'))('live reference', () => {
  test('truncnorm, halfnorm and loguniform of scipy.stats', () => {
    const script = `
import json
from scipy import stats
shares = [0.001, 0.16, 0.5, 0.84, 0.999]
ppf = lambda d: d.ppf(shares).tolist()
print(json.dumps([ppf(stats.truncnorm(-3, 2.5, 0.6, 0.2)), ppf(stats.halfnorm(scale=0.1)), ppf(stats.loguniform(2, 300))]))`;
    const [normal, half, log] = JSON.parse(execFileSync(toolPath('scipy')!, ['-c', script]).toString()) as number[][];
    const ours = [
      number({ form: 'normal', sigma: 0.2 }, { value: 0.6, support: { kind: 'bounded', low: 0, high: 1.1 } }),
      number({ form: 'upperLimit', limit: 0.1 * 1.9599639845400545, confidence: 0.95 }),
      number({ form: 'logUniform', low: 2, high: 300 }),
    ];
    // scipy's own error, mostly from (a − loc)/scale and from logarithms.
    for (const [i, share] of [0.001, 0.16, 0.5, 0.84, 0.999].entries()) {
      for (const [j, known] of [normal, half, log].entries()) {
        expect(relativeError(ours[j].quantile(share), known[i])).toBeLessThan(1e-11);
      }
    }
  });
});
