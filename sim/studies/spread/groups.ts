/**
 * Do the draws of a finding fall into two groups with nothing between, as where some planets are frozen and others are not? Then a
 * mean may lie where no draw is, and an interval over both says little of either.
 *
 * A plain test, and no estimate of how many modes there are: the widest gap between neighbours in order that has 2.5 % of the draws,
 * and at least 8 of them, on either side must be at least a fifth of the whole reach. To look for a gap in the ordered sample is common
 * practice; the numbers are our own, chosen so that smooth distributions, those with long tails too, hardly ever pass for two groups
 * (see the tests). Groups that touch, or one that holds fewer draws, are not told; nor is a finding with two values only, which says yes
 * or no, and whose mean is a share.
 */
import { quantilesInto } from './percentiles.ts';

export interface Group {
  /** Of the draws that have the finding. */
  readonly share: number;
  /** Lowest and highest of its draws. */
  readonly from: number;
  readonly to: number;
}

/** Least part of the reach from the lowest draw to the highest that a gap must take. */
const leastGap = 0.2;
/** Least share, and least number, of the draws on either side. */
const leastShare = 0.025;
const leastDraws = 8;
/** Places in which neighbours are sought: a gap wider than one of them is found exactly. */
const places = 64;

/**
 * Shape:  values (draws,), NaN where undefined, left alone; scratch at least as long, overwritten. Two groups, the lower one first,
 *         or null. Time grows as the number of draws.
 */
export function twoGroups(
  values: Float64Array,
  scratch: Float64Array = new Float64Array(values.length),
): readonly [Group, Group] | null {
  let count = 0;
  for (let i = 0; i < values.length; i++) if (!Number.isNaN(values[i])) scratch[count++] = values[i];
  const aside = Math.max(leastDraws, Math.ceil(leastShare * count));
  if (count < 2 * aside) return null;
  const defined = scratch.subarray(0, count);
  const [low, high] = quantilesInto(defined, [(aside - 1) / (count - 1), (count - aside) / (count - 1)]);
  const gap = widestGap(defined, low, high);
  if (gap === null) return null;
  const groups = groupsAround(defined, gap);
  if (groups.every(({ from, to }) => from === to)) return null;
  return gap.to - gap.from >= leastGap * (groups[1].to - groups[0].from) ? groups : null;
}

interface Gap {
  readonly from: number;
  readonly to: number;
}

/** Between neighbours within [low, high]: the highest below and the lowest above every edge between places that no value bridges. */
function widestGap(values: Float64Array, low: number, high: number): Gap | null {
  if (!(high > low)) return null;
  const lowest = new Float64Array(places).fill(Number.POSITIVE_INFINITY);
  const highest = new Float64Array(places).fill(Number.NEGATIVE_INFINITY);
  for (const value of values) {
    if (value < low || value > high) continue;
    const place = Math.min(places - 1, Math.floor(((value - low) / (high - low)) * places));
    if (value < lowest[place]) lowest[place] = value;
    if (value > highest[place]) highest[place] = value;
  }
  let widest: Gap = { from: low, to: low };
  let before = low;
  for (let place = 0; place < places; place++) {
    if (lowest[place] > highest[place]) continue; // no value there
    if (lowest[place] - before > widest.to - widest.from) widest = { from: before, to: lowest[place] };
    before = highest[place];
  }
  return widest;
}

function groupsAround(values: Float64Array, { from, to }: Gap): readonly [Group, Group] {
  let below = 0;
  let least = Number.POSITIVE_INFINITY;
  let most = Number.NEGATIVE_INFINITY;
  for (const value of values) {
    if (value <= from) below++;
    if (value < least) least = value;
    if (value > most) most = value;
  }
  const share = below / values.length;
  return [
    { share, from: least, to: from },
    { share: 1 - share, from: to, to: most },
  ];
}

/** Findings that go in steps whatever the planet: counts, yes or no, the latitude of a band, bands counted. Gaps tell nothing there. */
export function goesInSteps(name: string): boolean {
  return /Latitude(\.|$)|^(orbitMeanInWindow|alwaysFraction)\.|^climates$/.test(name);
}
