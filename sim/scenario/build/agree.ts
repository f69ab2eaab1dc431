/** Two ways to one number: how far apart they may be. */
import type { Given } from './given.ts';
import { shown, shownNumber } from './show.ts';

/** A value with its relative standard deviation, and what a user would call the place it comes from. */
export interface Estimate {
  readonly value: number;
  readonly relativeSigma: number;
  /** `period 130 d and star mass 0.85 Msun`; asked only where two estimates differ. */
  readonly source: () => string;
  /** The source says the value itself. */
  readonly isGiven?: true;
}

export interface Comparison {
  /** Where an error points. */
  readonly key: string;
  readonly label: string;
  readonly unit: string;
  readonly chosen: Estimate;
  readonly other: Estimate;
}

const allowed = 0.01;
/** A smaller difference is rounding in what was typed. */
const worthMention = 1e-6;
/** A smaller one, or one within the stated uncertainties, is no reason for caution. */
const worthWarning = 1e-3;

/**
 * `other` must agree with `chosen` within max(1 %, 3 σ): beyond it an error at `key`; within it a warning with the numbers,
 * or a remark where they differ by less than 0.1 % or 1 σ.
 */
export function agree(given: Given, { key, label, unit, chosen, other }: Comparison): void {
  const difference = Math.abs(other.value / chosen.value - 1);
  const sigma = Math.hypot(chosen.relativeSigma, other.relativeSigma);
  const limit = Math.max(allowed, 3 * sigma);
  const show = ({ value, source, isGiven }: Estimate) =>
    isGiven ? source() : `${shown(value, unit, 5)} (from ${source()})`;
  const percent = (share: number) => `${shownNumber(100 * share, 2)} %`;
  if (!(difference <= limit)) {
    const what = `${show(other)} and ${show(chosen)} differ by ${percent(difference)}; at most ${percent(limit)} is allowed`;
    given.wrong(key, what, 'Correct one of them, or leave one out');
  } else if (difference > worthMention) {
    const text = () => `${label}: ${show(chosen)} is used; ${show(other)} is ${percent(difference)} off.`;
    if (difference <= Math.max(worthWarning, sigma)) given.remark(text);
    else given.warn(text);
  }
}
