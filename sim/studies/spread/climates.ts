/**
 * Which climates the draws of a model with latitude took. Its findings are those of the climate that a warm start ends in; a colder one
 * may be as lasting. Free of ice, partly under it, frozen over: by the year's mean share of the area, with a hundredth at either end
 * (our own line: less ice than that is a fleck at a pole in the worst season).
 */

export interface DrawnClimates {
  /** Of the draws for which it is known how many stable climates there are, the share that has a second; null where it is known of none. */
  readonly second: number | null;
  /** Of all draws, the share for which that is known. */
  readonly known: number;
  /** Of the draws that have a climate: the three add up to 1. */
  readonly iceFree: number;
  readonly partlyFrozen: number;
  readonly frozenOver: number;
}

const aFleck = 0.01;

/** Shape: columns (draws,) of `climates` and `iceFractionMean`, NaN where undefined. Null where no draw has a climate. */
export function drawnClimates(climates: Float64Array, ice: Float64Array): DrawnClimates | null {
  const sound = countOf(ice, () => true);
  if (sound === 0) return null;
  const known = countOf(climates, () => true);
  const iceFree = countOf(ice, (share) => share < aFleck) / sound;
  const frozenOver = countOf(ice, (share) => share > 1 - aFleck) / sound;
  return {
    second: known === 0 ? null : countOf(climates, (count) => count > 1) / known,
    known: known / climates.length,
    iceFree,
    partlyFrozen: countOf(ice, (share) => share >= aFleck && share <= 1 - aFleck) / sound,
    frozenOver,
  };
}

function countOf(values: Float64Array, is: (value: number) => boolean): number {
  let count = 0;
  for (const value of values) if (!Number.isNaN(value) && is(value)) count++;
  return count;
}
