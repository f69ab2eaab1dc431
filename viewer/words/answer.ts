/**
 * The sentences that answer the question: how hot, when, how late behind periapsis, how much the heat store damps, and
 * how far the textbook's one number is from it. Plain text from numbers; pure.
 */
import type { RunResult } from '../../sim/run.ts';
import type { Seconds } from '../../sim/si.ts';
import { type Column, columnsOf, commonTimeUnit, finding, findingValue, periodOf } from './columns.ts';
import { fixed, kelvin, list, nbsp, percent, type TimeUnit, timeDecimals } from './number.ts';

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
    const lead = sentences(
      temperatureText(only),
      timing(only, unit),
      swing(only),
      steadySwing(columns),
      textbook(columns),
    );
    return { lead, details: [] };
  }
  return {
    lead: sentences(peaks(columns, unit), steadySwing(columns), textbook(columns)),
    details: columns.map((column) => ({ column, text: answerFor(column, unit) })),
  };
}

/** One column in a few sentences: for the list under the answer and for text alternatives. */
export function answerFor(column: Column, unit: TimeUnit): string {
  return sentences(temperatureText(column), timing(column, unit), swing(column));
}

function sentences(...parts: readonly string[]): string {
  return parts.filter((part) => part !== '').join(' ');
}

function temperatureText(column: Column): string {
  const { low, high, mean } = temperatures(column);
  if (low === null || high === null)
    return `No temperature: ${finding(column, 'temperatureMax')?.reason ?? 'not computed'}.`;
  const when = column.isForwardRun ? 'over the run from its start' : 'through the orbit';
  if (kelvin(low) === kelvin(high)) return `The temperature stays at ${kelvin(high)} ${when}.`;
  const meanText = mean === null ? '' : `, with a mean of ${kelvin(mean)}`;
  return `The temperature goes from ${kelvin(low)} to ${kelvin(high)} ${when}${meanText}.`;
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
  return `It is hottest ${when}, ${late} behind the peak of the steady value.`;
}

function swing(column: Column): string {
  const damping = findingValue(column, 'damping');
  return damping === null || column.isForwardRun ? '' : `It keeps ${percent(damping)} of the steady swing.`;
}

/** What would happen without a heat store, where all columns agree on it. */
function steadySwing(columns: readonly Column[]): string {
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
  if (kelvin(peakOf(coolest)) === kelvin(peakOf(hottest))) {
    return `The peak temperature is ${kelvin(peakOf(hottest))} in every case.`;
  }
  return `The peak temperature lies between ${peakText(coolest, unit)} and ${peakText(hottest, unit)}.`;
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
  const { low, high } = temperatures(column);
  if (number === null || low === null || high === null) return null;
  return Math.max(Math.abs(high - number), Math.abs(low - number));
}

function moment(time: Seconds, column: Column, unit: TimeUnit): string {
  if (column.isForwardRun) return time === 0 ? 'at the start' : `${timeText(time, column, unit)} after the start`;
  const offset = fromPeriapsis(time, column);
  if (offset === 0) return 'at periapsis';
  return `${timeText(Math.abs(offset), column, unit)} ${offset < 0 ? 'before' : 'after'} periapsis`;
}

/** In the last quarter of the orbit the next periapsis is the one that a reader thinks of. */
function fromPeriapsis(time: Seconds, column: Column): Seconds {
  const period = periodOf(column);
  return time > 0.75 * period ? time - period : time;
}

/** About a thousandth of the orbit. */
function timeText(seconds: Seconds, column: Column, unit: TimeUnit): string {
  return `${fixed(seconds / unit.seconds, timeDecimals(periodOf(column), unit, 1))}${nbsp}${unit.symbol}`;
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
