/**
 * Do the draws of a finding fall into two groups with nothing between, as where some planets are frozen and others are not? Then a
 * mean may lie where no draw is, and an interval over both says little of either.
 *
 * A plain test, and no estimate of how many modes there are: the widest gap between neighbours in order that has 2.5 % of the draws,
 * and at least 8 of them, on either side must be at least a fifth of the whole reach. To look for a gap in the ordered sample is common
 * practice; the numbers are our own, chosen so that smooth distributions, those with long tails too, hardly ever pass for two groups
 * (see the tests). Groups that touch, or one that holds fewer draws, are not told; nor is a finding with two values only, which says yes
 * or no, and whose mean is a share.
 *
 * On a circle the line has no ends of its own: it is cut at the widest arc without a draw, and the widest gap left decides.
 */
import { unwrapTurn } from './circular.ts';
import { definedInto, quantilesInto } from './percentiles.ts';

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
/** Of a turn: times nearer than that are one time, and may differ by rounding alone. */
const leastTurn = 1e-3;
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
  const groups = fallApart(definedInto(values, scratch));
  return groups?.some(({ from, to }) => from !== to) ? groups : null;
}

/**
 * As `twoGroups`, of directions; two directions only are groups as well, since their mean is no share.
 * Shape:  turns (draws,), NaN where undefined, left alone; scratch at least as long, overwritten.
 * Units:  turns. A group's middle lies within −¼ … ¾, and its ends may lie beyond; a group that holds the mean stands where the mean does.
 */
export function twoArcs(
  turns: Float64Array,
  mean: number | null,
  scratch: Float64Array = new Float64Array(turns.length),
): readonly [Group, Group] | null {
  const defined = definedInto(turns, scratch);
  const cut = emptiestTurn(defined);
  if (cut === null) return null;
  for (let i = 0; i < defined.length; i++) defined[i] = unwrapTurn(defined[i], cut + 0.5);
  const groups = fallApart(defined);
  if (groups === null || groups[1].from - groups[0].to < leastTurn) return null;
  const [one, other] = groups.map((group) => placed(group, mean));
  return one.from < other.from ? [one, other] : [other, one];
}

function placed({ share, from, to }: Group, mean: number | null): Group {
  const middle = (from + to) / 2;
  const near = mean === null ? Number.NaN : unwrapTurn(mean, middle);
  const moved = Math.round(near >= from && near <= to ? mean! - near : unwrapTurn(middle, 0.25) - middle);
  return { share, from: from + moved, to: to + moved };
}

/** The middle of the widest arc without a value, found exactly where it is wider than a place; null where none is. */
function emptiestTurn(turns: Float64Array): number | null {
  const { lowest, highest } = endsByPlace(turns, 0, 1, (turn) => turn - Math.floor(turn));
  const filled = Array.from({ length: places }, (_, place) => place).filter((place) => lowest[place] <= highest[place]);
  let widest: Gap | null = null;
  for (const [i, place] of filled.entries()) {
    const next = i + 1 < filled.length ? lowest[filled[i + 1]] : lowest[filled[0]] + 1;
    const gap: Gap = { from: highest[place], to: next };
    if (widest === null || gap.to - gap.from > widest.to - widest.from) widest = gap;
  }
  return widest && (widest.from + widest.to) / 2;
}

/** Shape: values in any order, all defined; brought out of order. */
function fallApart(values: Float64Array): readonly [Group, Group] | null {
  const count = values.length;
  const aside = Math.max(leastDraws, Math.ceil(leastShare * count));
  if (count < 2 * aside) return null;
  const [low, high] = quantilesInto(values, [(aside - 1) / (count - 1), (count - aside) / (count - 1)]);
  const gap = widestGap(values, low, high);
  if (gap === null) return null;
  const groups = groupsAround(values, gap);
  return gap.to - gap.from >= leastGap * (groups[1].to - groups[0].from) ? groups : null;
}

interface Gap {
  readonly from: number;
  readonly to: number;
}

/** Between neighbours within [low, high]: the highest below and the lowest above every edge between places that no value bridges. */
function widestGap(values: Float64Array, low: number, high: number): Gap | null {
  if (!(high > low)) return null;
  const { lowest, highest } = endsByPlace(values, low, high, (value) => value);
  let widest: Gap = { from: low, to: low };
  let before = low;
  for (let place = 0; place < places; place++) {
    if (lowest[place] > highest[place]) continue; // no value there
    if (lowest[place] - before > widest.to - widest.from) widest = { from: before, to: lowest[place] };
    before = highest[place];
  }
  return widest;
}

/** Lowest and highest of the values, brought by `at`, in each of the places that [low, high] is cut into; infinite in those without. */
function endsByPlace(values: Float64Array, low: number, high: number, at: (value: number) => number) {
  const lowest = new Float64Array(places).fill(Number.POSITIVE_INFINITY);
  const highest = new Float64Array(places).fill(Number.NEGATIVE_INFINITY);
  for (let i = 0; i < values.length; i++) {
    const value = at(values[i]);
    if (value < low || value > high) continue;
    const place = Math.min(places - 1, Math.floor(((value - low) / (high - low)) * places));
    if (value < lowest[place]) lowest[place] = value;
    if (value > highest[place]) highest[place] = value;
  }
  return { lowest, highest };
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
