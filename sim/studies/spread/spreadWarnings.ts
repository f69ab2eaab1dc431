/**
 * What must be said beside the numbers of a spread, for terminal, file and page alike: several climates, draws in two groups, spreads
 * that were cut, rows that indices lack.
 */
import { formatNumber, formatQuantity, inUnit } from '../../quantity/index.ts';
import type { SolveOptions, World } from '../../world.ts';
import type { DrawnClimates } from './climates.ts';
import type { Group } from './groups.ts';
import { percentFirst, percentWords } from './percentWords.ts';
import type { SpreadFinding, SpreadInput } from './spreadReport.ts';

/** Nothing where all draws are thawed, with one climate each. */
export function climateWarnings(climates: DrawnClimates | null): string[] {
  if (climates === null) return [];
  const { second, iceFree, partlyFrozen, frozenOver } = climates;
  const kinds = [
    { share: iceFree, words: 'free of ice' },
    { share: partlyFrozen, words: 'partly under ice' },
    { share: frozenOver, words: 'frozen over' },
  ].filter(({ share }) => share > 0);
  return [
    ...(second !== null && second > 0
      ? [
          `${percentFirst(second)} of the draws allow a second, colder climate that lasts as well. Every number here is of the warm one; which of them a planet is in depends on its past.`,
        ]
      : []),
    ...(kinds.length > 1
      ? [
          `The draws are of several climates: ${listed(kinds.map(({ share, words }) => `${percentWords(share)} ${words}`))} (area and time under ice below 1 %, between, above 99 %).`,
        ]
      : []),
  ];
}

/** Five of them lie beyond a percentile of 2.5 %. */
const leastSamples = 200;

/** Of a posterior: few samples make rough percentiles, however often they are drawn. Weights (count,) or null; none where there are enough. */
export function fewSamplesWarnings({ count, weights }: { count: number; weights: Float64Array | null }): string[] {
  const effective = weights === null ? count : Math.round(effectiveNumber(weights));
  if (effective >= leastSamples) return [];
  const counting = effective < count ? `, which by their weights count as ${effective}` : '';
  const samples = count === 1 ? '1 sample' : `${count} samples`;
  return [
    `The posterior has ${samples}${counting}: draws repeat them, and percentiles far from the median rest on a few. Take at least ${leastSamples}.`,
  ];
}

/** Kish (1965) Survey Sampling, ch. 8 (from memory): (Σw)² / Σw². */
function effectiveNumber(weights: Float64Array): number {
  let sum = 0;
  let squares = 0;
  for (const weight of weights) {
    sum += weight;
    squares += weight ** 2;
  }
  return sum ** 2 / squares;
}

/** Where draws have different periods, times and lags are not told in the same days; null where they have one. Periods (draws,), NaN where undefined. */
export function periodNote(periods: Float64Array): string | null {
  let low = Number.POSITIVE_INFINITY;
  let high = Number.NEGATIVE_INFINITY;
  for (const period of periods) {
    if (period < low) low = period;
    if (period > high) high = period;
  }
  if (!(high > low * (1 + 1e-9))) return null;
  return 'The period is drawn: a time after periapsis is a share of its own draw’s period, told in the median period; a lag is in the days of its own draw.';
}

/** What times count from where every draw is on a circle, and has no periapsis; null where that is of no account. */
export function circleNote({ orbit, globe }: World, isDrawn: boolean): string | null {
  if (orbit.eccentricity > 0 || isDrawn || !globe) return null;
  const longitude = formatQuantity(globe.solarLongitudeOfPeriapsis, 'deg', 4);
  return `The orbit is a circle: “periapsis” is only the point that times are counted from, at solar longitude ${longitude}.`;
}

/** Said of models that do not count the climates of each draw; null where there can be only one. */
export function warmestNote({ surface }: World, start: SolveOptions['start']): string | null {
  if (surface.albedo.ramp === null || start !== 'periodic') return null;
  return 'With ice, an orbit may allow several climates: every number here is of the warmest. `run` shows all of one planet.';
}

/** One sentence for all findings that fall apart, with the numbers of the chief one. */
export function groupWarnings(findings: readonly SpreadFinding[]): string[] {
  const apart = findings.filter(({ groups }) => groups !== null);
  const chief = ['temperatureMean', 'temperatureMax']
    .map((name) => apart.find((finding) => finding.name === name))
    .find((finding) => finding !== undefined);
  const [told = apart[0]] = [chief];
  if (told === undefined) return [];
  const others = apart.filter((finding) => finding !== told).map(({ label }) => label);
  const rest =
    others.length === 0
      ? ''
      : ` So do those of ${others.length > 3 ? `${others.length} other findings` : listed(others)}.`;
  const round = apart.some(({ circular }) => circular)
    ? ' Times come round with the orbit: a group that reaches across the ends of a histogram stands at both.'
    : '';
  return [
    `${groupWords(told)}${rest} Histograms show both groups; a mean or an interval over both may tell of neither.${round}`,
  ];
}

/** Above this share a published spread is no longer what is drawn. */
export const largestCut = 0.05;

/** One sentence for each input of which much was cut away. */
export function cutWarnings(inputs: readonly Pick<SpreadInput, 'key' | 'text' | 'truncatedShare'>[]): string[] {
  return inputs
    .filter(({ truncatedShare }) => truncatedShare > largestCut)
    .map(
      ({ key, text, truncatedShare }) =>
        `${percentFirst(truncatedShare)} of ${key} ${text} lies beyond what is physical and was cut away: what is drawn is no longer the spread as published. A spread that keeps within bounds would describe it better.`,
    );
}

/** Above this share of rows left out, indices are of other draws than the finding's interval. */
const largestLeftOut = 0.05;

/** One sentence for all findings whose indices are of part of the rows; nothing for those that have none. */
export function leftOutWarnings(findings: readonly SpreadFinding[]): string[] {
  const partly = findings
    .filter(({ importance: { total, leftOut } }) => total !== null && leftOut > largestLeftOut)
    .toSorted((a, b) => b.importance.leftOut - a.importance.leftOut);
  if (partly.length === 0) return [];
  const [{ importance }] = partly;
  const names = partly.length > 3 ? `${partly.length} findings` : listed(partly.map(({ label }) => label));
  const share = `${partly.length > 1 ? 'up to ' : ''}${percentWords(importance.leftOut)}`;
  return [
    `Which input matters: the indices of ${names} leave out ${share} of the rows of runs, in which one failed or lacks the finding. They tell of the other rows alone.`,
  ];
}

function groupWords({ label, unit, groups, circular, summary: { mean } }: SpreadFinding): string {
  const [low, high] = groups!;
  const symbol = unit === 's' ? 'd' : unit;
  const number = (value: number) => formatNumber(unit === 's' ? inUnit(value, 'd') : value, 4);
  const text = (value: number) => (symbol === '1' ? number(value) : `${number(value)} ${symbol}`);
  const reach = ({ share, from, to }: Group) => {
    return `${percentWords(share)} of them ${number(from) === number(to) ? `at ${text(from)}` : `from ${number(from)} to ${text(to)}`}`;
  };
  // on the circle nothing lies beyond both groups
  const isOfNone =
    mean !== null &&
    (circular ? !groups!.some(({ from, to }) => mean >= from && mean <= to) : mean > low.to && mean < high.from);
  const average = isOfNone ? `: the mean, ${text(mean)}, is that of no draw` : '';
  return `${label}: the draws fall into two groups${circular ? ' on the orbit' : ''}, ${reach(low)} and ${reach(high)}, none between${average}.`;
}

function listed(words: readonly string[]): string {
  return words.length < 2 ? (words[0] ?? '') : `${words.slice(0, -1).join(', ')} and ${words.at(-1)}`;
}
