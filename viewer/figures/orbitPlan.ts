/** How the drawing of an orbit is laid out: its frame, its unit of length, the size of its star. Pure. */
import { metresPerAu, solarRadius } from '../../sim/constants.ts';
import type { Kelvin, Metres, Radians } from '../../sim/si.ts';
import type { Column } from '../words/columns.ts';
import { nbsp, significant } from '../words/number.ts';
import type { FigureStyle } from './figure.ts';
import { type OrbitMark, orbitMarks } from './orbitMarks.ts';
import { distanceAt, type OrbitShape, orbitShape, type Place, placeAt, starRadius } from './orbitShape.ts';
import { extremes } from './variables.ts';
import type { View } from './view.ts';

export interface LengthUnit {
  readonly symbol: string;
  readonly metres: Metres;
}

/** All that the parts of one drawing share. */
export interface Plan {
  readonly column: Column;
  readonly shape: OrbitShape;
  readonly unit: LengthUnit;
  readonly range: readonly [Kelvin, Kelvin];
  readonly marks: readonly OrbitMark[];
  readonly view: View;
  /** Height of the plot in pixels, and about how many of them a unit takes. */
  readonly height: number;
  readonly scale: number;
  readonly style: FigureStyle;
}

/** Pixels: of a plot of usual width, and what names need beside and above the orbit. */
const usualWidth = { wide: 786, narrow: 346 };
const room = { wide: { side: 150, above: 46 }, narrow: { side: 74, above: 40 } };
const heights = { least: 200, most: { wide: 470, narrow: 330 } };
/** The star is not drawn smaller than this many pixels across. */
export const leastStar = 11;
export function planOf(columns: readonly Column[], shown: number, style: FigureStyle): Plan {
  const column = columns[shown]!;
  const shape = orbitShape(column.dataset);
  const unit = lengthUnit(shape.semiMajorAxis);
  const { view, height } = frameOf(shape, unit, style);
  return {
    column,
    shape,
    unit,
    range: sharedRange(columns),
    marks: orbitMarks(column, shape, (nu) => lengthText(distanceAt(shape, nu), unit), style.narrow),
    view: style.view ?? view,
    height,
    scale: height / (view.y[1] - view.y[0]),
    style,
  };
}

/** Astronomical units, but radii of the Sun for orbits that stars themselves are wide in. */
function lengthUnit(semiMajorAxis: Metres): LengthUnit {
  if (semiMajorAxis < 0.01 * metresPerAu) return { symbol: 'R☉', metres: solarRadius };
  return { symbol: 'au', metres: metresPerAu };
}

export function lengthText(length: Metres, { metres, symbol }: LengthUnit): string {
  return `${significant(length / metres, 3)}${nbsp}${symbol}`;
}

/** The orbit with room for names, as high as it needs on a plot of usual width. */
function frameOf(shape: OrbitShape, unit: LengthUnit, { narrow }: FigureStyle): { view: View; height: number } {
  const a = shape.semiMajorAxis / unit.metres;
  const b = a * Math.sqrt(1 - shape.eccentricity ** 2);
  const { side, above } = narrow ? room.narrow : room.wide;
  const width = narrow ? usualWidth.narrow : usualWidth.wide;
  const most = narrow ? heights.most.narrow : heights.most.wide;
  const scale = Math.min((width - 2 * side) / (2 * a), (most - 2 * above) / (2 * b));
  const height = Math.round(Math.max(heights.least, 2 * b * scale + 2 * above));
  const centre = -a * shape.eccentricity;
  const [halfWidth, halfHeight] = [width / scale / 2, height / scale / 2];
  return { view: { x: [centre - halfWidth, centre + halfWidth], y: [-halfHeight, halfHeight] }, height };
}

/** Least and greatest temperature of all columns; never one and the same. */
function sharedRange(columns: readonly Column[]): [Kelvin, Kelvin] {
  const ranges = columns.map(({ dataset }) => extremes(dataset, 'temperature'));
  const [low, high] = [Math.min(...ranges.map(([least]) => least)), Math.max(...ranges.map(([, most]) => most))];
  return high - low >= 0.1 ? [low, high] : [low - 0.5, high + 0.5];
}

/** Where the planet stands at a true anomaly, in the drawing's unit. */
export function spotAt({ shape, unit }: Plan, trueAnomaly: Radians): Place {
  const { x, y } = placeAt(shape, trueAnomaly);
  return { x: x / unit.metres, y: y / unit.metres };
}

export interface StarSize {
  readonly radius: Metres;
  /** How many times larger than to scale; null where the true size is not known. */
  readonly enlarged: number | null;
}

export function starSize({ column, unit, scale }: Plan): StarSize {
  const radius = starRadius(column);
  const least = (leastStar / 2 / scale) * unit.metres;
  if (radius === null) return { radius: least, enlarged: null };
  return radius >= least ? { radius, enlarged: 1 } : { radius: least, enlarged: least / radius };
}

/** Distances of the quiet circles: round numbers, some five of them out to apoapsis, in the figure's unit. */
export function roundDistances(farthest: number, least: number): number[] {
  const wanted = Math.max(farthest / 5, least);
  const power = 10 ** Math.floor(Math.log10(wanted));
  const step = power * [1, 2, 5, 10].find((multiple) => multiple * power >= wanted * (1 - 1e-9))!;
  const count = Math.floor(farthest / step + 1e-9);
  return Array.from({ length: count }, (_, at) => Number(((at + 1) * step).toPrecision(12)));
}

/** No closer than their numbers are wide. */
export function distancesOf({ shape, unit, scale, style }: Plan): number[] {
  return roundDistances(distanceAt(shape, Math.PI) / unit.metres, (style.narrow ? 40 : 52) / scale);
}
