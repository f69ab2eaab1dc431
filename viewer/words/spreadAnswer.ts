/** The sentences that answer a spread: how hot, how sure, when, what matters most, and where the textbook's number lies. Pure. */
import type { Seconds } from '../../sim/si.ts';
import type { SpreadCase, SpreadFinding, SpreadReport } from '../../sim/studies/spread/spreadReport.ts';
import { importanceText, inText } from './importance.ts';
import { nbsp, percent } from './number.ts';
import { findingOf, findingWording, periodOfCase } from './spreadNumber.ts';

export interface SpreadAnswer {
  readonly lead: string;
  /** One entry a case; empty where the lead says it all. */
  readonly details: readonly { readonly caseIndex: number; readonly name: string; readonly text: string }[];
}

const at68 = `68${nbsp}%`;
const at95 = `95${nbsp}%`;

export function spreadAnswer(report: SpreadReport): SpreadAnswer {
  const { cases } = report;
  const [only] = cases;
  if (cases.length === 1 && only) return { lead: caseText(only, report), details: [] };
  return {
    lead: peaksText(report),
    details: cases.map((one, caseIndex) => ({ caseIndex, name: one.name, text: caseText(one, report) })),
  };
}

/** What a case is asked first: its peak, or whatever its model gives. */
export function chiefOf(oneCase: SpreadCase): SpreadFinding | undefined {
  return findingOf(oneCase, 'temperatureMax') ?? oneCase.findings[0];
}

function caseText(oneCase: SpreadCase, report: SpreadReport): string {
  const chief = chiefOf(oneCase);
  if (chief === undefined) return 'No findings.';
  const isPeak = chief.name === 'temperatureMax';
  const what = isPeak ? 'the peak' : inText(chief.label);
  return sentences(
    chiefText(oneCase, chief, report),
    isPeak ? timingText(oneCase, report) : '',
    importanceText(oneCase, chief, what),
    isPeak ? textbookText(oneCase, chief, report) : '',
  );
}

function sentences(...parts: readonly string[]): string {
  return parts.filter((part) => part !== '').join(' ');
}

function chiefText(oneCase: SpreadCase, finding: SpreadFinding, { cases }: SpreadReport): string {
  const { percentiles, defined, reason } = finding.summary;
  const subject = finding.name === 'temperatureMax' ? `${temperatureOf(oneCase)} peaks at` : `${finding.label}:`;
  if (percentiles === null) return `${finding.label}: none; ${reason ?? 'not defined'}.`;
  const words = findingWording(finding, cases);
  const exists = defined < 1 ? ` (${percent(defined)} of the draws have this number.)` : '';
  const whole = words.interval(percentiles['2.5'], percentiles['97.5']);
  if (!whole.includes(' to ')) return `${subject} ${whole} in nearly every draw.${exists}`;
  const near = between(words.number(percentiles['16']), words.text(percentiles['84']));
  const far = between(words.number(percentiles['2.5']), words.text(percentiles['97.5']));
  return `${subject} ${words.text(percentiles['50'])}, between ${near} at ${at68} and between ${far} at ${at95}.${exists}`;
}

function between(low: string, high: string): string {
  return `${low} and ${high}`;
}

function temperatureOf(oneCase: SpreadCase): string {
  return findingOf(oneCase, 'hottestTemperature') === undefined ? 'The temperature' : 'The area-mean temperature';
}

function timingText(oneCase: SpreadCase, { cases }: SpreadReport): string {
  const found = findingOf(oneCase, 'timeOfMax');
  const period = periodOfCase(oneCase);
  if (found === undefined || period === null || !found.circular) return '';
  const { percentiles, defined, reason } = found.summary;
  if (percentiles === null) return `When it is hottest has no middle: ${reason ?? 'not defined'}.`;
  const words = findingWording(found, cases);
  const size = (time: Seconds): string => words.text(Math.abs(time));
  const median = momentText(percentiles['50'], size);
  const interval = momentsText(percentiles['16'], percentiles['84'], size);
  const exists = defined < 1 ? `, in the ${percent(defined)} of the draws in which that time is known` : '';
  return `It is hottest ${median}, at ${at68} ${interval}${exists}.`;
}

/** `12.1 d after periapsis`. */
function momentText(time: Seconds, size: (time: Seconds) => string): string {
  return `${size(time)} ${time < 0 ? 'before' : 'after'} periapsis`;
}

/** `from 1.2 d before to 3.4 d after it`. */
function momentsText(from: Seconds, to: Seconds, size: (time: Seconds) => string): string {
  if (from < 0 && to >= 0) return `from ${size(from)} before to ${size(to)} after it`;
  const [near, far] = from < 0 ? [-to, -from] : [from, to];
  return `between ${size(near)} and ${size(far)} ${from < 0 ? 'before' : 'after'} it`;
}

/** Where the one number of the catalogues lies among the peaks. */
function textbookText(oneCase: SpreadCase, peak: SpreadFinding, { cases }: SpreadReport): string {
  const value = findingOf(oneCase, 'equilibriumTemperature')?.atCentre ?? null;
  const { percentiles } = peak.summary;
  if (value === null || percentiles === null) return '';
  const number = findingWording(peak, cases).text(value);
  const place =
    value < percentiles['2.5']
      ? `lies below more than 97${nbsp}% of these peaks`
      : value > percentiles['97.5']
        ? `lies above more than 97${nbsp}% of these peaks`
        : `lies among these peaks, within their ${at95} interval`;
  return `The textbook equilibrium temperature, ${number} with every input at its centre, ${place}.`;
}

/** Several cases: the lowest and the highest median peak. */
function peaksText({ cases }: SpreadReport): string {
  const known = cases.flatMap((oneCase) => {
    const found = findingOf(oneCase, 'temperatureMax');
    return found === undefined || found.summary.percentiles === null
      ? []
      : [{ oneCase, found, levels: found.summary.percentiles }];
  });
  if (known.length === 0) return 'No case has a peak temperature; the findings that there are stand below.';
  const inOrder = known.toSorted((a, b) => a.levels['50'] - b.levels['50']);
  const said = ({ oneCase, found, levels }: (typeof known)[number]): string => {
    const words = findingWording(found, cases);
    return `${words.text(levels['50'])} (“${oneCase.name}”, ${words.interval(levels['16'], levels['84'])} at ${at68})`;
  };
  const [low, high] = [inOrder[0]!, inOrder.at(-1)!];
  const reach = low === high ? `is ${said(low)}` : `lies between ${said(low)} and ${said(high)}`;
  const differ =
    low === high ? '' : low.levels['97.5'] < high.levels['2.5'] ? apart(cases.length) : overlapping(cases.length);
  return sentences(`The median peak temperature ${reach}.`, differ);
}

function apart(count: number): string {
  return count === 2
    ? `The inputs do not blur the difference: the ${at95} intervals of the two cases do not meet.`
    : `The inputs do not blur the difference between these two: their ${at95} intervals do not meet.`;
}

function overlapping(count: number): string {
  return `The ${at95} intervals of ${count === 2 ? 'the two cases' : 'these two'} overlap; where both share an uncertain input, their difference is surer than that.`;
}

/** What stands beside the answer: draws that failed. Null where none did. */
export function failureText({ failed, draws }: SpreadReport): string | null {
  if (failed === 0) return null;
  const share = percent(failed / draws);
  const words = `${failed} of ${draws} draws (${share}) could not be computed, or not within the tolerance; they stand in failed.csv and in no number here.`;
  return failed / draws > 0.01
    ? `${words} That is more than 1${nbsp}%: what they have in common is missing from every interval.`
    : words;
}
