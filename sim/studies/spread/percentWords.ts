/** A share of the draws in words, within a sentence: neither all nor nothing where it is not. */

/** Digits that a share of some thousand draws has: whole percent in the middle, a tenth near the ends. */
export function percentWords(share: number): string {
  const percent = 100 * share;
  if (percent > 0 && percent < 0.05) return 'less than 0.1 %';
  if (percent < 100 && percent > 99.95) return 'more than 99.9 %';
  return `${percent < 9.95 || percent > 90.05 ? Number(percent.toFixed(1)) : Math.round(percent)} %`;
}

/** The same where a sentence begins. */
export function percentFirst(share: number): string {
  const words = percentWords(share);
  return `${words[0].toUpperCase()}${words.slice(1)}`;
}
