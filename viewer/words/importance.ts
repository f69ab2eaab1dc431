/** Which input matters to a finding, and how sure that is. Pure. */

import type { SobolIndex } from '../../sim/studies/spread/sobolIndices.ts';
import type { SpreadCase, SpreadFinding, SpreadInput } from '../../sim/studies/spread/spreadReport.ts';
import { labelInText } from './along.ts';
import { fixed, nbsp } from './number.ts';

/** Independent inputs: shares of the variance. */
export interface Shares {
  readonly kind: 'shares';
  /** Most important first, by the total index. */
  readonly inputs: readonly { readonly input: SpreadInput; readonly first: SobolIndex; readonly total: SobolIndex }[];
}

/** Inputs that go together: dependence by ranks. */
export interface Ranks {
  readonly kind: 'ranks';
  readonly inputs: readonly { readonly input: SpreadInput; readonly value: number; readonly chanceLevel: number }[];
  /** Inputs of which it cannot be told. */
  readonly unknown: readonly { readonly input: SpreadInput; readonly reason: string }[];
}

export type Importances = Shares | Ranks | { readonly kind: 'none'; readonly reason: string };

export function importancesOf({ inputs }: SpreadCase, { importance }: SpreadFinding): Importances {
  const { first, total, ranks, reason } = importance;
  if (first !== null && total !== null) {
    const found = inputs.map((input, at) => ({ input, first: first[at]!, total: total[at]! }));
    return { kind: 'shares', inputs: found.toSorted((a, b) => b.total.value - a.total.value) };
  }
  if (ranks !== null) {
    const all = inputs.map((input, at) => ({ input, ...ranks[at]! }));
    const found = all.flatMap((one) => (one.value === null ? [] : [one]));
    const unknown = all.flatMap((one) => (one.value === null ? [{ input: one.input, reason: one.reason }] : []));
    return { kind: 'ranks', inputs: found.toSorted((a, b) => b.value - a.value), unknown };
  }
  return { kind: 'none', reason: reason ?? 'no indices were computed' };
}

/** In one or two sentences; `what` is the finding within a sentence, e.g. `the peak`. */
export function importanceText(oneCase: SpreadCase, finding: SpreadFinding, what: string): string {
  const found = importancesOf(oneCase, finding);
  if (found.kind === 'none') return `What matters most to ${what} is not known: ${found.reason}.`;
  if (found.inputs.length === 0) return 'No input has a spread.';
  return found.kind === 'shares' ? sharesText(found, what) : ranksText(found, what);
}

function sharesText({ inputs }: Shares, what: string): string {
  const [most, next] = inputs;
  const name = inText(most!.input.label);
  if (next === undefined) return `All of the spread of ${what} comes from the ${name}.`;
  const isClear = most!.total.percentiles['2.5'] > next.total.percentiles['97.5'];
  const { value, percentiles } = most!.first;
  const removes = `${wholePercent(value)} of the variance of ${what} (95${nbsp}%: ${wholeInterval(percentiles['2.5'], percentiles['97.5'])})`;
  const then = `${inText(next.input.label)}, ${wholePercent(next.first.value)}`;
  const lead = isClear
    ? `The ${name} matters most: to know it alone would remove ${removes}; next comes the ${then}.`
    : `The ${name} and the ${inText(next.input.label)} matter most, and these draws do not tell which more: to know the first alone would remove ${removes}, the second ${wholePercent(next.first.value)}.`;
  return [lead, togetherText(inputs)].filter((text) => text !== '').join(' ');
}

/** What no input does alone. */
function togetherText(inputs: Shares['inputs']): string {
  const alone = inputs.reduce((sum, { first }) => sum + first.value, 0);
  return alone < 0.9 ? `About ${wholePercent(1 - alone)} comes from inputs acting together.` : '';
}

function ranksText(found: Ranks, what: string): string {
  return [knownRanksText(found, what), unknownText(found)].filter((text) => text !== '').join(' ');
}

/** Of which inputs it cannot be told, and why. */
export function unknownText({ unknown }: Ranks): string {
  return unknown.map(({ input, reason }) => `Of the ${inText(input.label)} it cannot be told: ${reason}.`).join(' ');
}

function knownRanksText({ inputs }: Ranks, what: string): string {
  const [most, next] = inputs;
  if (!(most!.value > most!.chanceLevel)) return `No input tells more about ${what} than chance alone would.`;
  const lead = `The ${inText(most!.input.label)} tells most about ${what}: D${nbsp}=${nbsp}${fixed(most!.value, 2)}, where chance alone stays below ${chanceText(most!.chanceLevel)}`;
  const isTelling = next !== undefined && next.value > next.chanceLevel;
  const then = isTelling ? `; next comes the ${inText(next.input.label)}, ${fixed(next.value, 2)}.` : '.';
  return `${lead}${then}`;
}

export function chanceText(level: number): string {
  return fixed(Math.max(0, level), level < 0.095 ? 3 : 2);
}

/** Whole percent: an index knows no more. What an estimate puts below nothing is nothing, and above all is all. */
export function wholePercent(share: number): string {
  return `${fixed(100 * clipped(share), 0)}${nbsp}%`;
}

function wholeInterval(from: number, to: number): string {
  return `${fixed(100 * clipped(from), 0)} to ${wholePercent(to)}`;
}

function clipped(share: number): number {
  return Math.min(1, Math.max(0, share));
}

/** The label as it stands within a sentence. */
export function inText(label: string): string {
  return labelInText({ label });
}

/** A sentence about a case with its name before it; a case that stands alone needs no name. */
export function ledBy(caseName: string, sentence: string, cases: readonly unknown[]): string {
  return cases.length > 1 ? `${caseName}: ${sentence}` : `${sentence[0]!.toUpperCase()}${sentence.slice(1)}`;
}
