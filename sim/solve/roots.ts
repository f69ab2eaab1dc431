/**
 * Root of `f` between `low` and `high`, whose signs differ (or one of which is the root), to rounding.
 * Bisection guarded regula falsi (Illinois: Dowell & Jarratt 1971, BIT 11, 168).
 */
export function rootBetween(f: (x: number) => number, low: number, high: number): number {
  let a = low;
  let b = high;
  let fa = f(a);
  let fb = f(b);
  if (fa === 0) return a;
  if (fb === 0) return b;
  for (let trial = 0; trial < 100; trial++) {
    let x = b - (fb * (b - a)) / (fb - fa);
    if (!((x - a) * (x - b) < 0)) x = (a + b) / 2;
    const fx = f(x);
    if (fx === 0) return x;
    if (fx < 0 === fb < 0) {
      fa /= 2;
    } else {
      a = b;
      fa = fb;
    }
    b = x;
    fb = fx;
    if (Math.abs(b - a) <= 4e-16 * Math.max(Math.abs(a), Math.abs(b), 1e-300)) break;
  }
  return b;
}
