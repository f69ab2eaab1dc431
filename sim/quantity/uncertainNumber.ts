/**
 * A number with its spread, ready to be drawn: the inverse of its distribution function within what is physical.
 * Equations: value(share) = F⁻¹(F(low) + share · (F(high) − F(low))), from whichever tail is nearer, so that neither loses digits.
 */
import { SimError } from '../error.ts';
import { halfNormalQuantile, normalQuantile } from './normalQuantile.ts';
import { halfNormalShare, normalShare } from './normalShare.ts';
import type { Distribution, Quantity } from './types.ts';

/** Where the number may be, SI. */
export type Support =
  /** What lies outside is cut away, and the rest scaled up to 1; ±Infinity is no bound. */
  | { readonly kind: 'bounded'; readonly low: number; readonly high: number }
  /** An angle or a phase: brought into [from, from + period) by whole periods. */
  | { readonly kind: 'wrapped'; readonly from: number; readonly period: number }
  /** The angle between two directions: a mirror stands at either end, as 185° from the pole is 175° on the other side. */
  | { readonly kind: 'folded'; readonly low: number; readonly high: number };

export interface UncertainNumber {
  /** Inverse of the distribution function, for 0 < share < 1; rises with share, but for the jumps of a wrapped or folded number. */
  quantile(share: number): number;
  /** Distribution function of what `quantile` gives, before it is wrapped or folded. */
  shareBelow(x: number): number;
  /** Probability outside the bounds, cut away: 0 for angles. */
  readonly truncatedShare: number;
}

/**
 * Shape:  a Quantity's value and distribution, and where it may be → quantile and distribution function.
 * Units:  SI in and out.
 * Errors: SimError with `where` when nothing of the distribution lies within the bounds.
 */
export function uncertainNumber(
  where: string,
  { value, distribution }: Pick<Quantity, 'value' | 'distribution'>,
  support: Support,
): UncertainNumber {
  if (distribution.form === 'exact') return exactNumber(where, value, support);
  const free = freeNumber(distribution, value);
  if (support.kind === 'bounded') return truncated(where, free, support);
  const bring = support.kind === 'wrapped' ? wrapInto(support) : foldInto(support);
  return { quantile: (share) => bring(free.quantile(share)), shareBelow: free.below, truncatedShare: 0 };
}

/** A distribution without bounds: shares and quantiles counted from both ends. */
interface FreeNumber {
  below(x: number): number;
  above(x: number): number;
  quantile(share: number): number;
  /** The x above which `share` lies. */
  quantileFromAbove(share: number): number;
}

type Spread = Exclude<Distribution, { form: 'exact' }>;

function freeNumber(distribution: Spread, value: number): FreeNumber {
  switch (distribution.form) {
    case 'normal':
      return normalHalves(value, distribution.sigma, distribution.sigma);
    case 'splitNormal':
      return normalHalves(value, distribution.down, distribution.up);
    case 'uniform':
      return uniform(distribution.low, distribution.high);
    case 'logUniform':
      return logUniform(distribution.low, distribution.high);
    case 'upperLimit':
      return halfNormal(distribution.limit / halfNormalQuantile(distribution.confidence));
    case 'isotropic':
      return isotropic;
  }
}

/** Half the probability on each side of the centre, each half a half-normal: centre and 16/84 % are as published. */
function normalHalves(centre: number, down: number, up: number): FreeNumber {
  const standard = (x: number) => (x - centre) / (x < centre ? down : up);
  const at = (z: number) => centre + z * (z < 0 ? down : up);
  return {
    below: (x) => normalShare(standard(x)),
    above: (x) => normalShare(-standard(x)),
    quantile: (share) => at(normalQuantile(share)),
    quantileFromAbove: (share) => at(-normalQuantile(share)),
  };
}

function uniform(low: number, high: number): FreeNumber {
  return {
    below: (x) => unitClip((x - low) / (high - low)),
    above: (x) => unitClip((high - x) / (high - low)),
    quantile: (share) => low + share * (high - low),
    quantileFromAbove: (share) => high - share * (high - low),
  };
}

/** The logarithm is uniform: quantiles are geometric between the ends. */
function logUniform(low: number, high: number): FreeNumber {
  const { below, above } = uniform(0, Math.log(high / low));
  return {
    below: (x) => (x <= low ? 0 : below(Math.log(x / low))),
    above: (x) => (x <= low ? 1 : above(Math.log(x / low))),
    quantile: (share) => low * (high / low) ** share,
    quantileFromAbove: (share) => high * (low / high) ** share,
  };
}

/** |normal| on [0, ∞). */
function halfNormal(scale: number): FreeNumber {
  return {
    below: (x) => (x <= 0 ? 0 : halfNormalShare(x / scale)),
    above: (x) => (x <= 0 ? 1 : 2 * normalShare(-x / scale)),
    quantile: (share) => scale * halfNormalQuantile(share),
    quantileFromAbove: (share) => -scale * normalQuantile(share / 2),
  };
}

/** p(x) = ½ sin x on [0, π]: the share below is sin²(x/2). */
const isotropic: FreeNumber = {
  below: (x) => Math.sin(Math.min(Math.PI, Math.max(0, x)) / 2) ** 2,
  above: (x) => Math.cos(Math.min(Math.PI, Math.max(0, x)) / 2) ** 2,
  quantile: (share) => 2 * Math.asin(Math.sqrt(share)),
  quantileFromAbove: (share) => 2 * Math.acos(Math.sqrt(share)),
};

function exactNumber(where: string, value: number, support: Support): UncertainNumber {
  if (support.kind === 'bounded' && !(value >= support.low && value <= support.high)) throw outside(where, support);
  const bring = support.kind === 'folded' ? foldInto(support) : support.kind === 'wrapped' ? wrapInto(support) : null;
  const kept = bring?.(value) ?? value;
  return { quantile: () => kept, shareBelow: (x) => (x < value ? 0 : 1), truncatedShare: 0 };
}

/** Below this share of the whole, what the bounds leave is a slip and no distribution. */
const leastKept = 1e-300;

function truncated(where: string, free: FreeNumber, { low, high }: { low: number; high: number }): UncertainNumber {
  const lost = { below: free.below(low), above: free.above(high) };
  const kept = keptShare(free, lost, low, high);
  if (!(kept > leastKept)) throw outside(where, { low, high });
  return {
    truncatedShare: Math.min(1, lost.below + lost.above),
    quantile(share) {
      const fromBelow = lost.below + share * kept;
      const fromAbove = lost.above + (1 - share) * kept;
      const x = fromBelow <= fromAbove ? free.quantile(fromBelow) : free.quantileFromAbove(fromAbove);
      return Math.min(high, Math.max(low, x));
    },
    shareBelow(x) {
      if (x < low) return 0;
      if (x >= high) return 1;
      const isUpper = lost.below > 0.5;
      const part = isUpper ? free.above(low) - free.above(x) : free.below(x) - lost.below;
      return unitClip(part / kept);
    },
  };
}

/** F(high) − F(low) from the tail that both ends lie in, where there is one. */
function keptShare(free: FreeNumber, lost: { below: number; above: number }, low: number, high: number): number {
  if (lost.below > 0.5) return free.above(low) - lost.above;
  if (lost.above > 0.5) return free.below(high) - lost.below;
  return 1 - lost.below - lost.above;
}

function wrapInto({ from, period }: { from: number; period: number }): (x: number) => number {
  return (x) => {
    const turns = Math.floor((x - from) / period);
    const inside = x - turns * period;
    return inside < from + period ? Math.max(from, inside) : from;
  };
}

function foldInto({ low, high }: { low: number; high: number }): (x: number) => number {
  const wrap = wrapInto({ from: low, period: 2 * (high - low) });
  return (x) => {
    const once = wrap(x);
    return once <= high ? once : Math.max(low, 2 * high - once);
  };
}

function outside(where: string, { low, high }: { low: number; high: number }): SimError {
  const what = `no value that it may take lies from ${low} to ${high} (SI units)`;
  return new SimError(where, what, 'Move its centre or widen its spread');
}

function unitClip(share: number): number {
  return Math.min(1, Math.max(0, share));
}
