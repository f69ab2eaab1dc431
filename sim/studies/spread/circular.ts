/**
 * Mean and percentiles of what runs in a circle: times in the orbit, season angles. In turns: the time over the draw's own period, the
 * angle over 2π. A time of 0.99 and one of 0.01 are neighbours, and their mean is 0, not 0.5.
 * Source: Mardia & Jupp (2000) Directional Statistics §2.2 (mean direction, resultant length) and §6.3 (Rayleigh's test).
 */
import { type Percentiles, percentileLevels, percentilesInto, type Summary, undefinedSummary } from './percentiles.ts';

export interface CircularSummary extends Summary {
  /** 0 when the draws point all around, 1 when they agree; null where no draw has a value. */
  readonly resultantLength: number | null;
}

/**
 * Below this resultant length a mean direction is the accident of a few draws, and percentiles around it mislead: 0.1, which chance
 * reaches once in a thousand times at 700 uniform draws (Rayleigh's test: P(n·R² > z) = e^−z), and as much as that for fewer draws.
 */
function leastResultant(count: number): number {
  return Math.max(0.1, Math.min(0.5, Math.sqrt(Math.log(1000) / count)));
}

/**
 * Shape:  turns (draws,) in draw order with NaN where a draw has none, left alone; scratch at least as long, overwritten.
 * Units:  turns. Percentiles are counted from half a turn before the mean to half a turn after, and do not jump: 2.5 % may be −0.02,
 *         which is the end of the turn before. Mean and percentiles are of the same turn, that in which the median lies above −¼ and
 *         not above ¾: a median shortly before the turn begins anew is told as before it.
 */
export function summariseTurns(
  turns: Float64Array,
  scratch: Float64Array = new Float64Array(turns.length),
): CircularSummary {
  const { cosine, sine, count } = resultant(turns);
  if (count === 0) return { ...undefinedSummary(0, 'no draw has a value'), resultantLength: null };
  const defined = count / turns.length;
  const resultantLength = Math.min(1, Math.hypot(cosine, sine) / count);
  if (resultantLength < leastResultant(count)) {
    return { ...undefinedSummary(defined, noDirection(resultantLength)), resultantLength };
  }
  const mean = wrapTurn(Math.atan2(sine, cosine) / (2 * Math.PI));
  return { ...inCustomaryTurn(mean, percentilesInto(unwrapInto(turns, mean, scratch))), defined, resultantLength };
}

function inCustomaryTurn(mean: number, percentiles: Percentiles): { mean: number; percentiles: Percentiles } {
  const turns = Math.ceil(percentiles['50'] - 0.75);
  if (turns === 0) return { mean, percentiles };
  const moved = Object.fromEntries(percentileLevels.map((level) => [level, percentiles[level] - turns]));
  return { mean: mean - turns, percentiles: moved as Percentiles };
}

/** The same direction, written within half a turn of `centre`: from centre − ½ to below centre + ½. */
export function unwrapTurn(turn: number, centre: number): number {
  const apart = turn - centre;
  return centre + (apart - Math.floor(apart + 0.5));
}

function resultant(turns: Float64Array): { cosine: number; sine: number; count: number } {
  let cosine = 0;
  let sine = 0;
  let count = 0;
  for (let i = 0; i < turns.length; i++) {
    if (Number.isNaN(turns[i])) continue;
    cosine += Math.cos(2 * Math.PI * turns[i]);
    sine += Math.sin(2 * Math.PI * turns[i]);
    count++;
  }
  return { cosine, sine, count };
}

function unwrapInto(turns: Float64Array, mean: number, scratch: Float64Array): Float64Array {
  let count = 0;
  for (let i = 0; i < turns.length; i++) {
    if (!Number.isNaN(turns[i])) scratch[count++] = unwrapTurn(turns[i], mean);
  }
  return scratch.subarray(0, count);
}

/** Into [0, 1): a tiny negative turn rounds to 0, not to 1. */
function wrapTurn(turn: number): number {
  const inside = turn - Math.floor(turn);
  return inside < 1 ? inside : 0;
}

function noDirection(resultantLength: number): string {
  return `the draws lie all around the circle and have no mean direction (resultant length ${resultantLength.toFixed(3)})`;
}
