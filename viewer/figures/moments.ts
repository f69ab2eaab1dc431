/** One moment of the orbit on several figures: the share of the period after periapsis, and where each figure shows it. Pure. */
import { type Column, columnName, findingValue, periodOf } from '../words/columns.ts';
import type { Span } from './orbitSpan.ts';
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

/** The value of a variable at a share of the period: straight lines between rows, round the end, too. */
export function valueAt({ dataset }: Column, name: string, share: number): number {
  const anomaly = values(dataset, 'meanAnomaly');
  const data = values(dataset, name);
  const [before, after, part] = bracket(anomaly, 2 * Math.PI * share, 2 * Math.PI);
  return data[before]! + part * (data[after]! - data[before]!);
}

/** Rows before and after a place on a circle of increasing numbers, and how far it is between them. */
function bracket(
  circle: ArrayLike<number>,
  wanted: number,
  turn: number,
): [before: number, after: number, part: number] {
  let low = 0;
  let high = circle.length;
  while (low < high) {
    const middle = (low + high) >> 1;
    if (circle[middle]! <= wanted) low = middle + 1;
    else high = middle;
  }
  const before = (low - 1 + circle.length) % circle.length;
  const after = low % circle.length;
  const from = circle[before]! - (low === 0 ? turn : 0);
  const to = circle[after]! + (low === circle.length ? turn : 0);
  return [before, after, to > from ? (wanted - from) / (to - from) : 0];
}

/** On a chart through the orbit: a line, and a point on each curve. `span` gives the places of a column along the axis, `per` what they are divided by. */
export function momentsAlong(
  columns: readonly Column[],
  span: (column: Column) => Span,
  per: number,
  name: string | null,
): Moments {
  const axes = columns.map((column) => axisOf(column, span(column), per));
  return {
    shareAt: (x) => axes[0]!.shareAt(x),
    placesOf: (share) => [
      { x: axes[0]!.placeOf(share), y: null, caseIndex: null },
      ...(name === null
        ? []
        : columns.map((column, i) => ({
            x: axes[i]!.placeOf(share),
            y: valueAt(column, name, share),
            caseIndex: column.caseIndex,
          }))),
    ],
  };
}

interface Axis {
  shareAt(x: number): number | null;
  placeOf(share: number): number;
}

function axisOf({ dataset }: Column, { time, rows }: Span, per: number): Axis {
  const anomaly = values(dataset, 'meanAnomaly');
  const shares = rows.map((row) => anomaly[row]! / (2 * Math.PI));
  const places = time.map((t) => t / per);
  return {
    shareAt(x) {
      const after = places.findIndex((place) => place >= x);
      if (after <= 0) return after === 0 ? shares[0]! : null;
      const step = (((shares[after]! - shares[after - 1]!) % 1) + 1) % 1;
      const part = (x - places[after - 1]!) / (places[after]! - places[after - 1]!);
      return (shares[after - 1]! + part * step) % 1;
    },
    placeOf(share) {
      for (let at = 1; at < shares.length; at++) {
        const step = (((shares[at]! - shares[at - 1]!) % 1) + 1) % 1;
        const ahead = (((share - shares[at - 1]!) % 1) + 1) % 1;
        if (ahead <= step && step > 0) return places[at - 1]! + (ahead / step) * (places[at]! - places[at - 1]!);
      }
      return places[0]!;
    },
  };
}

/** On a figure of two variables: a point for each column. `x` and `y` give its place at a share of the period. */
export function momentsBetween(
  columns: readonly Column[],
  x: (column: Column, share: number) => number,
  y: (column: Column, share: number) => number,
): Moments {
  const shares = Array.from({ length: 361 }, (_, i) => i / 360);
  const places = columns.map((column) => shares.map((share) => [x(column, share), y(column, share)] as const));
  return {
    shareAt(wantedX, wantedY) {
      const spread = (axis: 0 | 1) => {
        const all = places.flatMap((curve) => curve.map((place) => place[axis]));
        return Math.max(...all) - Math.min(...all) || 1;
      };
      const [width, height] = [spread(0), spread(1)];
      let best = { far: Number.POSITIVE_INFINITY, share: 0 };
      for (const curve of places) {
        for (const [i, place] of curve.entries()) {
          const far = Math.hypot((place[0] - wantedX) / width, (place[1] - wantedY) / height);
          if (far < best.far) best = { far, share: shares[i]! % 1 };
        }
      }
      return best.share;
    },
    placesOf: (share) =>
      columns.map((column) => ({ x: x(column, share), y: y(column, share), caseIndex: column.caseIndex })),
  };
}

/** What every case has at a moment: for a line of words beside the figures. */
export function momentValues(
  columns: readonly Column[],
  share: number,
): { name: string; temperature: number; instellation: number; steady: number }[] {
  return columns.map((column) => ({
    name: columnName(column),
    temperature: valueAt(column, 'temperature', share),
    instellation: valueAt(column, 'instellation', share),
    steady: valueAt(column, 'steadyTemperature', share),
  }));
}

/** Seconds after periapsis of a column at a share of its period. */
export function timeAt(column: Column, share: number): number {
  return share * periodOf(column);
}

/** Where the hottest moment of a column is: a good first place for a mark. */
export function hottestShare(column: Column): number {
  const time = findingValue(column, 'timeOfMax');
  return time === null ? 0 : time / periodOf(column);
}
