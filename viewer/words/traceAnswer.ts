/** The sentences that answer a trace: which climates exist where, and where each ends. Plain text; pure. */
import type { TraceReport } from '../../sim/studies/traceReport.ts';
import { type Along, alongPair, alongText } from './along.ts';
import type { TraceCase } from './arcs.ts';
import { type ClimateEnd, climateEnds, climateName, type Span, spansOf } from './climates.ts';
import { kelvin, list } from './number.ts';

export interface TraceAnswer {
  readonly lead: string;
  /** One entry a case; empty where the lead says it all. */
  readonly details: readonly { readonly caseIndex: number; readonly name: string; readonly text: string }[];
}

const past = 'Which one a planet is in depends on its past.';

export function traceAnswer({ cases, along }: TraceReport): TraceAnswer {
  const [only] = cases;
  if (cases.length === 1 && only) {
    return { lead: [climatesText(only, along), hasChoice(only, along) ? past : ''].join(' ').trim(), details: [] };
  }
  const choosing = cases.filter((oneCase) => hasChoice(oneCase, along)).length;
  const where = `somewhere between ${alongPair(along.from, along.to, along)}`;
  const lead =
    choosing === 0
      ? `No case allows more than one climate between ${alongPair(along.from, along.to, along)}.`
      : `${howMany(choosing, cases.length)} more than one climate ${where}. ${past}`;
  return {
    lead,
    details: cases.map((one, caseIndex) => ({ caseIndex, name: one.name, text: climatesText(one, along) })),
  };
}

function howMany(choosing: number, all: number): string {
  if (choosing === all) return all === 2 ? 'Both cases allow' : `All ${all} cases allow`;
  return `${choosing} of ${all} cases ${choosing === 1 ? 'allows' : 'allow'}`;
}

/** What happens at each fold, for those who cannot see the figure. */
export function endsText(oneCase: TraceCase, along: Along): string {
  const ends = climateEnds(oneCase, along);
  if (ends.length === 0) {
    const whole = oneCase.branches.every(({ ended }) => ended === 'left');
    return whole
      ? 'no climate ends at a fold within the range.'
      : 'no end was found as far as the branches could be followed.';
  }
  return `${ends.map((end) => endText(end, along)).join('; ')}.`;
}

function endText({ point, name, next }: ClimateEnd, along: Along): string {
  const onward = next === null ? 'no climate was found beyond it' : `what is left is one at ${kelvin(next)}`;
  return `the ${name} climate ends in a fold at ${alongText(point.value, along)}, at a mean of ${kelvin(point.temperatureMean)}, and ${onward}`;
}

function hasChoice(oneCase: TraceCase, along: Along): boolean {
  return spansOf(oneCase, along).some(({ climates }) => climates > 1);
}

function climatesText(oneCase: TraceCase, along: Along): string {
  const spans = spansOf(oneCase, along);
  const several = spans.filter(({ climates }) => climates > 1);
  const none = spans.filter(({ climates }) => climates === 0).map(({ from, to }) => alongPair(from, to, along));
  const ends = climateEnds(oneCase, along);
  const parts = [
    several.length === 0 ? oneClimate(spans, along) : severalClimates(several, ends, along),
    none.length === 0 ? '' : `Between ${none.join(' and between ')} no stable climate was found.`,
  ];
  return parts.filter((part) => part !== '').join(' ');
}

function oneClimate(spans: readonly Span[], along: Along): string {
  const ones = spans.filter(({ climates }) => climates === 1);
  if (ones.length === 0) return '';
  const where = ones.map(({ from, to }) => alongPair(from, to, along)).join(' and between ');
  return `Between ${where} this orbit allows one climate only.`;
}

function severalClimates(spans: readonly Span[], ends: readonly ClimateEnd[], along: Along): string {
  const allowed = spans.map(({ from, to, climates }) => `between ${alongPair(from, to, along)} ${names(climates)}`);
  const first = `Between ${alongPair(spans[0]!.from, spans[0]!.to, along)} this orbit allows ${names(spans[0]!.climates)}`;
  const sentence = [first, ...allowed.slice(1)].join(', ');
  if (spans.length === 1) return `${sentence}${endsOfOne(spans[0]!, ends, along)}.`;
  const where = list(ends.map(({ point }) => alongText(point.value, along)));
  return ends.length === 0 ? `${sentence}.` : `${sentence}. A climate ends at ${where}.`;
}

/** `; the warm one ends at 0.93 Lsun, the cold one at 1.21 Lsun`. */
function endsOfOne({ climates }: Span, ends: readonly ClimateEnd[], along: Along): string {
  const said = ends.map(
    ({ name, point }, at) => `the ${name} one ${at === 0 ? 'ends ' : ''}at ${alongText(point.value, along)}`,
  );
  const going = Array.from({ length: climates }, (_, place) => climateName(place, climates)).filter(
    (name) => ends.length > 0 && !ends.some((end) => end.name === name),
  );
  const rest = going.map((name) => `no end of the ${name} one lies in the range`);
  const words = [said.join(', '), ...rest].filter((part) => part !== '');
  return words.map((part) => `; ${part}`).join('');
}

/** `a warm and a cold climate`. */
function names(climates: number): string {
  if (climates > 3) return `${climates} climates`;
  return `${list(Array.from({ length: climates }, (_, place) => `a ${climateName(place, climates)}`))} climate`;
}
