/** Sums of weights miss one by their last bits. */
const rounding = 1e-12;

/** A share of a whole: exactly 0 or 1 where only rounding keeps it from them. */
export function wholeShare(share: number): number {
  if (Math.abs(share) < rounding) return 0;
  return Math.abs(share - 1) < rounding ? 1 : share;
}
