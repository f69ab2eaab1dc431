/**
 * Shares of the standard normal distribution, accurate in both tails. Built for care and not for speed: microseconds a call.
 * Source: Abramowitz & Stegun (1964) 7.1.6, a series of positive terms, near the centre; DLMF 7.9.1, a continued fraction, beyond.
 */

/** |x| in standard deviations up to which the series serves: there the smaller tail still holds 0.14. */
const centre = 1.06;

/**
 * Share that lies below x.
 * Shape:  one number in, one out; relative error below 1e-14 for x > −37, where the share is 1e-300.
 * Units:  standard deviations → probability 1. The share above x is normalShare(−x).
 */
export function normalShare(x: number): number {
  if (Math.abs(x) <= centre) return 0.5 + signedCentralShare(x);
  const tail = tailShare(Math.abs(x));
  return x < 0 ? tail : 1 - tail;
}

/** Share that lies between −x and x, for x ≥ 0: that of a half-normal below x. Relative error below 1e-14 down to x = 0. */
export function halfNormalShare(x: number): number {
  return x <= centre ? 2 * signedCentralShare(x) : 1 - 2 * tailShare(x);
}

/** Share between 0 and x, negative for negative x: φ(x) (x + x³/3 + x⁵/(3·5) + …). */
function signedCentralShare(x: number): number {
  let term = x;
  let sum = x;
  for (let odd = 3; Math.abs(term) > Number.EPSILON * Math.abs(sum) * 0.1; odd += 2) {
    term *= (x * x) / odd;
    sum += term;
  }
  return density(x) * sum;
}

/** Enough at x = centre, where it converges slowest: the error falls as exp(−2x√n). */
const fractions = 400;

/** Beyond it a tail is less than the least double. */
const nothingBeyond = 39;

/** Share above x > 0: φ(x) / (x + 1/(x + 2/(x + 3/(x + …)))). */
function tailShare(x: number): number {
  if (x > nothingBeyond) return 0;
  let fraction = x;
  for (let n = fractions; n > 0; n--) fraction = x + n / fraction;
  return density(x) / fraction;
}

/** φ(x); the square is split so that its rounding does not grow with x (after Cody 1969, Math. Comp. 23, 631). */
function density(x: number): number {
  const coarse = Math.round(x * 16) / 16;
  return (Math.exp(-coarse * coarse * 0.5) * Math.exp(-(x - coarse) * (x + coarse) * 0.5)) / Math.sqrt(2 * Math.PI);
}
