/** What may stand along the foot of a chart through the orbit: time, or what follows from it. Pure. */
import { radiansPerDegree } from '../../sim/constants.ts';
import type { TdbSeconds } from '../../sim/si.ts';
import { type Column, commonTimeUnit, periodOf } from '../words/columns.ts';
import { orbitSpan, quarterBefore, type Span } from './orbitSpan.ts';
import type { AxisName } from './reading.ts';
import { values } from './variables.ts';

/** What a number on the axis counts. `seconds` of the chart's spans are one of them: 1 where they are not seconds any more. */
export interface AxisUnit {
  readonly symbol: string;
  readonly seconds: number;
}

export interface OrbitAxis {
  readonly name: AxisName;
  readonly title: string;
  readonly unit: AxisUnit;
  /** One whole orbit of a column, its places along the axis in `unit` × `unit.seconds`. */
  span(column: Column): Span;
  /** Where the chart begins and ends, in the measure of spans. */
  readonly from: number;
  readonly to: number;
  /** Half an orbit after periapsis, where all columns agree on it. */
  readonly apoapsis: number | null;
  /** Date of zero, on an axis of time where all columns agree on it. */
  readonly zeroDate: TdbSeconds | null;
}

/** Those that these columns have, in the order of `axisNames`. */
export function availableAxes(columns: readonly Column[]): AxisName[] {
  const hasSeasons = columns.every(({ dataset }) => dataset.variables.solarLongitude !== undefined);
  return [
    'time',
    'phase',
    'trueAnomaly',
    ...(sharedDate(columns) === null ? [] : (['date'] as const)),
    ...(hasSeasons ? (['solarLongitude'] as const) : []),
  ];
}

/** The axis of that name, or of time where the columns have none. */
export function orbitAxis(name: AxisName, columns: readonly Column[]): OrbitAxis {
  const chosen = availableAxes(columns).includes(name) ? name : 'time';
  if (chosen === 'phase') return phaseAxis();
  if (chosen === 'trueAnomaly') return angleAxis(chosen, 'True anomaly (°)', -180);
  if (chosen === 'solarLongitude') return angleAxis(chosen, 'Solar longitude (°)', 0);
  return timeAxis(chosen, columns);
}

function timeAxis(name: AxisName, columns: readonly Column[]): OrbitAxis {
  const periods = columns.map(periodOf);
  const longest = Math.max(...periods);
  const unit = commonTimeUnit(columns);
  return {
    name,
    title: `Time after periapsis (${unit.symbol})`,
    unit,
    span: plainSpan,
    from: -quarterBefore * longest,
    to: (1 - quarterBefore) * longest,
    apoapsis: allEqual(periods) ? periods[0]! / 2 : null,
    zeroDate: sharedDate(columns),
  };
}

function phaseAxis(): OrbitAxis {
  return {
    name: 'phase',
    title: 'Share of the period after periapsis',
    unit: { symbol: 'of the period', seconds: 1 },
    span: (column) => {
      const span = plainSpan(column);
      return { ...span, time: span.time.map((t) => t / periodOf(column)) };
    },
    from: -quarterBefore,
    to: 1 - quarterBefore,
    apoapsis: 0.5,
    zeroDate: null,
  };
}

/** One whole turn from `from`, degrees: every column fills it. */
function angleAxis(name: 'trueAnomaly' | 'solarLongitude', title: string, from: number): OrbitAxis {
  return {
    name,
    title,
    unit: { symbol: '°', seconds: 1 },
    span: (column) => angleSpan(column, name, from),
    from,
    to: from + 360,
    apoapsis: null,
    zeroDate: null,
  };
}

function plainSpan(column: Column): Span {
  return orbitSpan(column.dataset, periodOf(column));
}

/** Rows in the order of an angle that makes one turn an orbit, and those next to both ends a turn away. */
function angleSpan({ dataset }: Column, name: string, from: number): Span {
  const angle = values(dataset, name);
  const points = Array.from(angle, (radians, row) => {
    const turned = radians / radiansPerDegree - from;
    return { row, at: from + turned - 360 * Math.floor(turned / 360) };
  }).sort((a, b) => a.at - b.at);
  const [first, last] = [points[0]!, points.at(-1)!];
  const all = [{ ...last, at: last.at - 360 }, ...points, { ...first, at: first.at + 360 }];
  return { time: all.map(({ at }) => at), rows: all.map(({ row }) => row) };
}

/** The date of periapsis, where every column has the same one and the same period. */
function sharedDate(columns: readonly Column[]): TdbSeconds | null {
  const dates = columns.map(({ periapsisTime }) => periapsisTime);
  return allEqual(columns.map(periodOf)) && dates.every((date) => date === dates[0]) ? dates[0]! : null;
}

export function allEqual(periods: readonly number[]): boolean {
  return periods.every((period) => Math.abs(period - periods[0]!) <= 1e-9 * periods[0]!);
}
