/** A finding of a grid as a reader sees it: in the units of the trade, times that come round with the orbit unrolled. Pure. */
import { radiansPerDegree, secondsPerDay } from '../../sim/constants.ts';
import type { GridCase, GridFinding, GridReport } from '../../sim/studies/grid/gridReport.ts';
import { exact, fixed, nbsp, significant, timeUnit, unitText } from './number.ts';

export type Shown = number | null;

export interface ShownFinding {
  readonly name: string;
  readonly label: string;
  /** As it stands behind a number, `K`; empty for a pure number. */
  readonly symbol: string;
  /** Positive throughout and over so many times its least that only a logarithm shows it all. */
  readonly log: boolean;
  /** Least and greatest of all cases; null where no case has a value. */
  readonly range: readonly [number, number] | null;
  /** A list of nodes for each case of the report; empty where the case has no such finding. */
  readonly cases: readonly (readonly Shown[])[];
  /** A value without its unit. */
  number(value: number): string;
  /** A value with its unit. */
  text(value: number): string;
  /** The same without idle digits, for numbers on lines. */
  short(value: number): string;
}

/** The ones that answer the question, in the order in which they are offered. */
const chief = [
  'temperatureMean',
  'temperatureMax',
  'temperatureMin',
  'lagOfMaxOrbits',
  'damping',
  'timeOfMax',
  'lagOfMax',
  'hottestTemperature',
  'coldestTemperature',
  'iceFractionMean',
];
const isWindow = (name: string): boolean => name.startsWith('fractionInWindow.');

export interface Offered {
  readonly name: string;
  readonly label: string;
}

/** Every finding of any case, once: the chief ones first, in their order, then the rest in the report's. */
export function offeredFindings({ cases }: Pick<GridReport, 'cases'>): { chief: Offered[]; others: Offered[] } {
  const all = new Map(
    cases.flatMap(({ findings }) => findings.map((one) => [one.name, { name: one.name, label: shownLabel(one) }])),
  );
  const first = chief.flatMap((name) => all.get(name) ?? []);
  const windows = [...all.values()].filter(({ name }) => isWindow(name));
  const leading = [...first, ...windows];
  return { chief: leading, others: [...all.values()].filter((one) => !leading.includes(one)) };
}

/** What counts in orbits is shown in percent of one. */
function shownLabel({ label }: GridFinding): string {
  return label.replace(/, in orbits$/, ', share of an orbit');
}

/** Over this ratio colours go by the logarithm. */
const wide = 100;

/** Errors: none; a finding that no case has is empty. */
export function shownFinding(report: Pick<GridReport, 'cases'>, name: string): ShownFinding {
  const found = report.cases.map((one) => one.findings.find((finding) => finding.name === name));
  const known = found.find((finding) => finding !== undefined);
  const si = unrolled(report.cases, found);
  const finite = si.flat().filter((value) => value !== null);
  const { symbol, per } = readableUnit(name, known?.unit ?? '1', finite);
  const cases = si.map((values) => values.map((value) => (value === null ? null : value / per)));
  const range = finite.length === 0 ? null : ([Math.min(...finite) / per, Math.max(...finite) / per] as const);
  const log = range !== null && !known?.circular && range[0] > 0 && range[1] > wide * range[0];
  const isCount = symbol === '' && finite.every(Number.isInteger);
  const number = isCount ? exact : numberText(range ?? [0, 1], log);
  return {
    name,
    label: known === undefined ? name : shownLabel(known),
    symbol,
    log,
    range,
    cases,
    number,
    text: (value) => joined(number(value), symbol),
    short: (value) => joined(exact(Number(value.toPrecision(4))), symbol.startsWith('%') ? '%' : symbol),
  };
}

/** A degree sign touches its number. */
function joined(number: string, symbol: string): string {
  if (symbol === '') return number;
  return symbol === '°' ? `${number}°` : `${number}${nbsp}${symbol}`;
}

function numberText([low, high]: readonly [number, number], log: boolean): (value: number) => string {
  const size = Math.max(Math.abs(low), Math.abs(high));
  if (log || size >= 1e5 || (size > 0 && size < 1e-2)) return (value) => significant(value, 3);
  const span = high - low > 1e-9 * size ? high - low : size;
  const decimals = span > 0 ? Math.max(0, Math.min(6, Math.round(2.7 - Math.log10(span)))) : 0;
  return (value) => fixed(value, decimals);
}

function readableUnit(name: string, unit: string, values: readonly number[]): { symbol: string; per: number } {
  const most = Math.max(0, ...values.map(Math.abs));
  if (unit === 's') {
    // Over decades days serve best: years would make powers of ten of the short ones.
    const isWide = Math.min(...values) < most / wide;
    const { symbol, seconds } = timeUnit(isWide ? Math.min(most, 999 * secondsPerDay) : most);
    return { symbol, per: seconds };
  }
  if (unit === 'K/s') return most < 240 / secondsPerDay ? { symbol: `K${nbsp}d⁻¹`, per: 1 / secondsPerDay } : hourly;
  if (unit === 'rad') return { symbol: '°', per: radiansPerDegree };
  if (unit === 'deg') return { symbol: '°', per: 1 };
  if (name === 'lagOfMaxOrbits') return { symbol: '% of an orbit', per: 0.01 };
  if (unit === '1' && /^fraction|Fraction/.test(name)) return { symbol: '%', per: 0.01 };
  return { symbol: unitText(unit), per: 1 };
}

const hourly = { symbol: `K${nbsp}h⁻¹`, per: 1 / 3600 };

/**
 * Times and angles on a circle, cut where all cases together leave the widest gap free, so that neighbours stay neighbours: what
 * lies behind the cut counts from below zero. Needs the length of the circle at every node; without it they stay as they are.
 */
function unrolled(cases: readonly GridCase[], found: readonly (GridFinding | undefined)[]): (readonly Shown[])[] {
  if (!found.some((finding) => finding?.circular)) return found.map((finding) => finding?.values ?? []);
  const lengths = cases.map((one, at) => circleLengths(one, found[at]));
  const turns = found.map((finding, at) =>
    (finding?.values ?? []).map((value, node) => share(value, lengths[at]![node])),
  );
  const cut = widestGap(turns.flat().filter((turn) => turn !== null));
  return found.map((finding, at) =>
    (finding?.values ?? []).map((value, node) => {
      const turn = turns[at]![node] ?? null;
      return value !== null && turn !== null && turn > cut ? value - lengths[at]![node]! : value;
    }),
  );
}

function circleLengths({ findings }: GridCase, finding: GridFinding | undefined): readonly Shown[] {
  if (finding === undefined) return [];
  const { unit, values } = finding;
  const periods = findings.find(({ name }) => name === 'period')?.values;
  if (unit === 'rad' || unit === 'deg') return values.map(() => (unit === 'rad' ? 2 * Math.PI : 360));
  return values.map((_, node) => periods?.[node] ?? null);
}

function share(value: Shown, length: Shown | undefined): Shown {
  return value === null || !length ? null : value / length;
}

/** The middle of the widest stretch of the circle without a value; 1 where that is at its end. */
function widestGap(turns: readonly number[]): number {
  const inOrder = turns.toSorted((a, b) => a - b);
  if (inOrder.length === 0) return 1;
  let cut = 1;
  let widest = inOrder[0]! + 1 - inOrder.at(-1)!;
  for (let at = 1; at < inOrder.length; at++) {
    const gap = inOrder[at]! - inOrder[at - 1]!;
    if (gap <= widest) continue;
    widest = gap;
    cut = (inOrder[at]! + inOrder[at - 1]!) / 2;
  }
  return cut;
}

export interface Extreme {
  readonly value: number;
  readonly node: number;
}

/** `290.0 to 357.2 K`, the unit said once; null where the two read alike. */
export function spanText(shown: ShownFinding, low: number, high: number): string | null {
  if (shown.text(low) === shown.text(high)) return null;
  return `${shown.number(low)} to ${shown.text(high)}`;
}

/** Lowest and highest of a case, and where; null where it has no value. */
export function extremesOf(values: readonly Shown[]): { readonly low: Extreme; readonly high: Extreme } | null {
  let low: Extreme | null = null;
  let high: Extreme | null = null;
  values.forEach((value, node) => {
    if (value === null) return;
    if (low === null || value < low.value) low = { value, node };
    if (high === null || value > high.value) high = { value, node };
  });
  return low === null || high === null ? null : { low, high };
}
