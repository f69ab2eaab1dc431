/**
 * The sentences that answer the question: how hot, when, how late behind periapsis, how much the heat store damps, and
 * how far the textbook's one number is from it. Plain text from numbers; pure.
 */
import type { RunResult } from '../../sim/run.ts';
import { type Column, columnsOf, commonTimeUnit, finding, findingValue } from './columns.ts';
import { hasLatitude } from './latitude.ts';
import { localAnswer, localPeaks } from './latitudeAnswer.ts';
import { moment, timeText } from './moment.ts';
import { kelvin, list, percent, type TimeUnit } from './number.ts';

export interface Answer {
  /** For the whole run. */
  readonly lead: string;
  /** One entry a column; empty where the lead says it all. */
  readonly details: readonly { readonly column: Column; readonly text: string }[];
}

export function answer(result: RunResult): Answer {
  const columns = columnsOf(result);
  const unit = commonTimeUnit(columns);
  const [only] = columns;
  if (columns.length === 1 && only) {
    const lead = sentences(answerFor(only, unit), steadySwing(columns), textbook(columns));
    return { lead, details: [] };
  }
  return {
    lead: sentences(peaks(columns, unit), localPeaks(columns, unit), steadySwing(columns), textbook(columns)),
    details: columns.map((column) => ({ column, text: answerFor(column, unit) })),
  };
}

/** One column in a few sentences: for the list under the answer and for text alternatives. */
export function answerFor(column: Column, unit: TimeUnit): string {
  return sentences(temperatureText(column), timing(column, unit), swing(column), localAnswer(column, unit));
}

function sentences(...parts: readonly string[]): string {
  return parts.filter((part) => part !== '').join(' ');
}

function temperatureText(column: Column): string {
  const { low, high, mean } = temperatures(column);
  if (low === null || high === null)
    return `No temperature: ${finding(column, 'temperatureMax')?.reason ?? 'not computed'}.`;
  const when = column.isForwardRun ? 'over the run from its start' : 'through the orbit';
  const what = hasLatitude(column) ? 'The area-mean temperature' : 'The temperature';
  if (kelvin(low) === kelvin(high)) return `${what} stays at ${kelvin(high)} ${when}.`;
  const meanText = mean === null ? '' : `, with a mean of ${kelvin(mean)}`;
  return `${what} goes from ${kelvin(low)} to ${kelvin(high)} ${when}${meanText}.`;
}

/** When the maximum comes, and how late that is. */
function timing(column: Column, unit: TimeUnit): string {
  const time = findingValue(column, 'timeOfMax');
  if (time === null) return '';
  const when = moment(time, column, unit);
  if (column.isForwardRun && time === 0) return `It is hottest ${when}.`;
  const lag = finding(column, 'lagOfMax');
  if (lag === undefined) return `It is hottest ${when}.`;
  if (lag.value === null) return `It is hottest ${when}; the lag is not defined (${lag.reason ?? 'no reason given'}).`;
  const late = timeText(lag.value, column, unit);
  if (when === `${late} after periapsis`)
    return `It is hottest ${late} after periapsis and the peak of the steady value.`;
  if (lag.value < 0)
    return `It is hottest ${when}, ${timeText(-lag.value, column, unit)} before the peak of the steady value.`;
  return `It is hottest ${when}, ${late} behind the peak of the steady value.`;
}

function swing(column: Column): string {
  const damping = findingValue(column, 'damping');
  return damping === null || column.isForwardRun ? '' : `It keeps ${percent(damping)} of the steady swing.`;
}

/** What would happen without a heat store, where all columns agree on it; latitudes would then part, and no one value tell. */
function steadySwing(columns: readonly Column[]): string {
  if (columns.some(hasLatitude)) return '';
  const texts = columns.map((column) => {
    const low = findingValue(column, 'steadyTemperatureMin');
    const high = findingValue(column, 'steadyTemperatureMax');
    if (low === null || high === null) return '';
    if (kelvin(low) === kelvin(high)) return `Without a heat store the temperature would stay at ${kelvin(high)} too.`;
    return `Without a heat store the temperature would swing from ${kelvin(low)} to ${kelvin(high)}.`;
  });
  return texts.every((text) => text === texts[0]) ? texts[0]! : '';
}

/** Several columns: the coolest and the hottest peak, and when they come. No planet stays in an unstable state. */
function peaks(columns: readonly Column[], unit: TimeUnit): string {
  const known = columns.filter(({ state }) => state.stable !== false).filter(hasPeak);
  if (known.length === 0) return 'No case has a temperature.';
  const inOrder = known.toSorted((a, b) => peakOf(a) - peakOf(b));
  const [coolest, hottest] = [inOrder[0]!, inOrder.at(-1)!];
  const what = known.some(hasLatitude) ? 'The peak of the area-mean temperature' : 'The peak temperature';
  if (kelvin(peakOf(coolest)) === kelvin(peakOf(hottest))) {
    return `${what} is ${kelvin(peakOf(hottest))} in every case.`;
  }
  return `${what} lies between ${peakText(coolest, unit)} and ${peakText(hottest, unit)}.`;
}

function peakText(column: Column, unit: TimeUnit): string {
  const time = findingValue(column, 'timeOfMax');
  const when = time === null ? '' : `, ${moment(time, column, unit)}`;
  const state = column.stateName === null ? '' : `, ${column.stateName}`;
  return `${kelvin(peakOf(column))} (“${column.caseName}”${state}${when})`;
}

/** The textbook's number against the extremes that it does not show. */
function textbook(columns: readonly Column[]): string {
  const numbers = columns.flatMap((column) => findingValue(column, 'equilibriumTemperature') ?? []).map(kelvin);
  const misses = columns.flatMap((column) => missOf(column) ?? []);
  if (numbers.length === 0 || misses.length === 0) return '';
  const distinct = [...new Set(numbers)];
  const worst = kelvin(Math.max(...misses));
  return distinct.length === 1
    ? `The textbook equilibrium temperature, ${distinct[0]}, misses the extremes by up to ${worst}.`
    : `The textbook equilibrium temperatures, ${list(distinct)}, miss the extremes by up to ${worst}.`;
}

function missOf(column: Column): number | null {
  const number = findingValue(column, 'equilibriumTemperature');
  const area = temperatures(column);
  const low = findingValue(column, 'coldestTemperature') ?? area.low;
  const high = findingValue(column, 'hottestTemperature') ?? area.high;
  if (number === null || low === null || high === null) return null;
  return Math.max(Math.abs(high - number), Math.abs(low - number));
}

function hasPeak(column: Column): boolean {
  return findingValue(column, 'temperatureMax') !== null;
}

function peakOf(column: Column): number {
  return findingValue(column, 'temperatureMax')!;
}

function temperatures(column: Column): { low: number | null; high: number | null; mean: number | null } {
  return {
    low: findingValue(column, 'temperatureMin'),
    high: findingValue(column, 'temperatureMax'),
    mean: findingValue(column, 'temperatureMean'),
  };
}
