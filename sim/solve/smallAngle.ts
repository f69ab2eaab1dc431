/**
 * Sine and cosine of an angle within one radian of zero by their Taylor series, in powers of x² that need not wait for one
 * another: a fraction of the time of `Math.sin`, which inner loops feel. Error below 3e-16.
 * Units: rad, |angle| ≤ 1; checks nothing.
 */
export function smallSine(angle: number): number {
  const x = angle * angle;
  const x2 = x * x;
  const x4 = x2 * x2;
  const low = s1 + s2 * x + x2 * (s3 + s4 * x);
  const high = s5 + s6 * x + x2 * (s7 + s8 * x);
  return angle + angle * x * (low + x4 * high);
}

export function smallCosine(angle: number): number {
  const x = angle * angle;
  const x2 = x * x;
  const x4 = x2 * x2;
  const low = c1 + c2 * x + x2 * (c3 + c4 * x);
  const high = c5 + c6 * x + x2 * (c7 + c8 * x);
  return 1 + x * (low + x4 * (high + c9 * x4));
}

// (−1)^k / (2k+1)! and (−1)^k / (2k)!
const s1 = -1 / 6;
const s2 = 1 / 120;
const s3 = -1 / 5040;
const s4 = 1 / 362_880;
const s5 = -1 / 39_916_800;
const s6 = 1 / 6_227_020_800;
const s7 = -1 / 1_307_674_368_000;
const s8 = 1 / 355_687_428_096_000;
const c1 = -1 / 2;
const c2 = 1 / 24;
const c3 = -1 / 720;
const c4 = 1 / 40_320;
const c5 = -1 / 3_628_800;
const c6 = 1 / 479_001_600;
const c7 = -1 / 87_178_291_200;
const c8 = 1 / 20_922_789_888_000;
const c9 = -1 / 6_402_373_705_728_000;
