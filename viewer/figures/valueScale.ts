/** Where values stand between the least and the greatest of a finding, and the round ones among them. Pure. */
import { multiples } from './roomyTicks.ts';

export interface ValueScale {
  /** A value or its logarithm. */
  place(value: number): number;
  /** Ends, as places; apart even where all values are the same. */
  readonly range: readonly [number, number];
  /** Round values within, for contours and ticks. */
  readonly levels: readonly number[];
}

export function valueScale([low, high]: readonly [number, number], log: boolean): ValueScale {
  const place = (value: number): number => (log ? Math.log10(value) : value);
  const [from, to] = [place(low), place(high)];
  // Less is rounding: one value, and no lines.
  const isFlat = to - from <= 1e-9 * Math.max(Math.abs(from), Math.abs(to));
  const air = Math.max(1e-3, 0.01 * Math.abs(to));
  return {
    place,
    range: isFlat ? [from - air, to + air] : [from, to],
    levels: isFlat ? [] : log ? decades(low, high) : multiples(roundStep(high - low), low, high).map(tidy),
  };
}

/** A round number that leaves five to nine steps. */
function roundStep(span: number): number {
  const rough = span / 9;
  const decade = 10 ** Math.floor(Math.log10(rough));
  return [1, 2, 2.5, 5, 10].find((lead) => lead * decade >= rough * (1 - 1e-9))! * decade;
}

/** 0.30000000000000004 is 0.3. */
function tidy(value: number): number {
  return Number(value.toPrecision(12));
}

function decades(low: number, high: number): number[] {
  const [first, last] = [Math.floor(Math.log10(low)), Math.ceil(Math.log10(high))];
  const leads = last - first <= 3 ? [1, 2, 5] : last - first <= 6 ? [1, 3] : [1];
  const stride = Math.ceil((last - first) / 10);
  const powers = Array.from({ length: last - first + 1 }, (_, at) => first + at).filter((at) => at % stride === 0);
  return powers
    .flatMap((power) => leads.map((lead) => tidy(lead * 10 ** power)))
    .filter((value) => value >= low && value <= high);
}
