/** One moment of the orbit on several figures: the share of the period after periapsis, and where each figure shows it. Pure. */
import { type Column, columnName, findingValue, periodOf } from '../words/columns.ts';
import type { Span } from './orbitSpan.ts';
import { throughOrbit } from './throughOrbit.ts';
import { values } from './variables.ts';

/** A place in the data of a figure; a line from foot to top where `y` is null. */
export interface MomentPlace {
  readonly x: number;
  readonly y: number | null;
  /** Place of the case in the run: gives the colour; null for ink. */
  readonly caseIndex: number | null;
}

export interface Moments {
  /** Share of the period, 0 … 1, at a place under the pointer; null where there is none. */
  shareAt(x: number, y: number): number | null;
  placesOf(share: number): readonly MomentPlace[];
}

const turn = 2 * Math.PI;

/** On a chart of temperature through the orbit: a line, and a point on each curve. A place along the axis is that of the span over `per`. */
export function momentsAlong(
  columns: readonly Column[],
  span: (column: Column) => Span,
  per: number,
  curve: (column: Column) => (share: number) => number,
): Moments {
  const axes = columns.map((column) => axisOf(column, span(column), per));
  const curves = columns.map(curve);
  return {
    shareAt: (x) => axes[0]!.shareAt(x),
    placesOf: (share) => [
      { x: axes[0]!.placeOf(share), y: null, caseIndex: null },
      ...columns.map(({ caseIndex }, i) => ({ x: axes[i]!.placeOf(share), y: curves[i]!(share), caseIndex })),
    ],
  };
}

/** The temperature of a column at a share of its period. */
export function temperatureAt({ dataset }: Column): (share: number) => number {
  const temperature = throughOrbit(dataset, 'temperature');
  return (share) => temperature(turn * share);
}

interface Axis {
  shareAt(x: number): number | null;
  placeOf(share: number): number;
}

/** By straight lines between the points of a span. */
function axisOf({ dataset }: Column, { time, rows }: Span, per: number): Axis {
  const anomaly = values(dataset, 'meanAnomaly');
  const shares = rows.map((row) => anomaly[row]! / turn);
  const places = time.map((t) => t / per);
  return {
    shareAt(x) {
      const after = places.findIndex((place) => place >= x);
      if (after < 1) return null;
      const part = (x - places[after - 1]!) / (places[after]! - places[after - 1]!);
      return onCircle(shares[after - 1]! + part * onCircle(shares[after]! - shares[after - 1]!));
    },
    placeOf(share) {
      for (let after = 1; after < shares.length; after++) {
        const step = onCircle(shares[after]! - shares[after - 1]!);
        const ahead = onCircle(share - shares[after - 1]!);
        if (step > 0 && ahead <= step) {
          return places[after - 1]! + (ahead / step) * (places[after]! - places[after - 1]!);
        }
      }
      return places[0]!;
    },
  };
}

function onCircle(share: number): number {
  return share - Math.floor(share);
}

/** On a figure of two variables: a point for each column, which `place` gives at a share of the period. */
export function momentsBetween(
  columns: readonly Column[],
  place: (column: Column) => (share: number) => { readonly x: number; readonly y: number },
): Moments {
  const curves = columns.map(place);
  let traced: { x: number; y: number; share: number }[] | null = null;
  return {
    shareAt(x, y) {
      traced ??= curves.flatMap((curve) =>
        Array.from({ length: 360 }, (_, i) => ({ ...curve(i / 360), share: i / 360 })),
      );
      const width = extent(traced.map((one) => one.x));
      const height = extent(traced.map((one) => one.y));
      const far = (one: { x: number; y: number }) => Math.hypot((one.x - x) / width, (one.y - y) / height);
      return traced.reduce((best, one) => (far(one) < far(best) ? one : best)).share;
    },
    placesOf: (share) => columns.map(({ caseIndex }, i) => ({ ...curves[i]!(share), caseIndex })),
  };
}

function extent(numbers: readonly number[]): number {
  return Math.max(...numbers) - Math.min(...numbers) || 1;
}

/** Across a map of one column whose axis is time: a line alone. `placeOf` gives the place of a share. */
export function momentsAcross(shareOf: (x: number) => number, placeOf: (share: number) => number): Moments {
  return {
    shareAt: (x) => onCircle(shareOf(x)),
    placesOf: (share) => [{ x: placeOf(share), y: null, caseIndex: null }],
  };
}

export interface MomentValues {
  readonly name: string;
  readonly caseIndex: number;
  /** Seconds after periapsis, in the column's own period. */
  readonly time: number;
  /** K. */
  readonly temperature: number;
  readonly steady: number;
  /** W m⁻². */
  readonly instellation: number;
}

/** What every column has at a moment. */
export function momentValues(columns: readonly Column[], share: number): MomentValues[] {
  return columns.map((column) => {
    const at = (name: string) => throughOrbit(column.dataset, name)(turn * share);
    return {
      name: columnName(column),
      caseIndex: column.caseIndex,
      time: share * periodOf(column),
      temperature: at('temperature'),
      steady: at('steadyTemperature'),
      instellation: at('instellation'),
    };
  });
}

/** When a column is hottest. */
export function hottestShare(column: Column): number {
  const time = findingValue(column, 'timeOfMax');
  return time === null ? 0 : time / periodOf(column);
}
