/** The ellipse of a column's orbit: its size and shape from the Dataset, its bearing and the star's size from the inputs. Pure. */
import type { Dataset } from '../../sim/dataset/dataset.ts';
import type { Metres, Radians } from '../../sim/si.ts';
import type { Column } from '../words/columns.ts';
import { values } from './variables.ts';

export interface OrbitShape {
  readonly semiMajorAxis: Metres;
  readonly eccentricity: number;
}

/** From the star, periapsis to the right, motion against the clock. */
export interface Place {
  readonly x: Metres;
  readonly y: Metres;
}

/** Where distances differ by less than this share, the orbit is a circle to every reader. */
const roundness = 1e-9;

/**
 * From the nearest and the farthest row, wherever on the orbit they stand: 1/r = (1 + e cos ν)/p is linear in 1/p and e/p.
 * Errors: a Dataset without distance and true anomaly is our own fault.
 */
export function orbitShape(dataset: Dataset): OrbitShape {
  const distance = values(dataset, 'distance');
  const anomaly = values(dataset, 'trueAnomaly');
  const near = distance.reduce((best, r, row) => (r < distance[best]! ? row : best), 0);
  const far = distance.reduce((best, r, row) => (r > distance[best]! ? row : best), 0);
  const [closest, farthest] = [distance[near]!, distance[far]!];
  if (farthest - closest <= roundness * closest) return { semiMajorAxis: closest, eccentricity: 0 };
  const [nearCosine, farCosine] = [Math.cos(anomaly[near]!), Math.cos(anomaly[far]!)];
  const eOverP = (1 / closest - 1 / farthest) / (nearCosine - farCosine);
  const p = 1 / (1 / closest - eOverP * nearCosine);
  const eccentricity = eOverP * p;
  return { semiMajorAxis: p / (1 - eccentricity ** 2), eccentricity };
}

export function distanceAt({ semiMajorAxis, eccentricity }: OrbitShape, trueAnomaly: Radians): Metres {
  return (semiMajorAxis * (1 - eccentricity ** 2)) / (1 + eccentricity * Math.cos(trueAnomaly));
}

export function placeAt(shape: OrbitShape, trueAnomaly: Radians): Place {
  const r = distanceAt(shape, trueAnomaly);
  return { x: r * Math.cos(trueAnomaly), y: r * Math.sin(trueAnomaly) };
}

/** Direction of motion, of length 1. */
export function headingAt(
  { eccentricity }: OrbitShape,
  trueAnomaly: Radians,
): { readonly x: number; readonly y: number } {
  const [x, y] = [-Math.sin(trueAnomaly), eccentricity + Math.cos(trueAnomaly)];
  const length = Math.hypot(x, y);
  return { x: x / length, y: y / length };
}

/**
 * True anomalies at which the planet stands before and behind the star, 90° − ω and 270° − ω in the convention of radial
 * velocities; null where ω is not known. A transit of a circular orbit given without ω sets the count of its anomalies.
 */
export function conjunctions(column: Column): { readonly transit: Radians; readonly eclipse: Radians } | null {
  const omega = inputOf(column, 'orbit.argumentOfPeriapsis') ?? omegaOfCircle(column);
  return omega === null ? null : { transit: turned(Math.PI / 2 - omega), eclipse: turned(1.5 * Math.PI - omega) };
}

function omegaOfCircle(column: Column): Radians | null {
  const isDated = inputOf(column, 'orbit.transitTime') !== null;
  return isDated && orbitShape(column.dataset).eccentricity === 0 ? Math.PI / 2 : null;
}

/** 0 … 2π. */
function turned(angle: Radians): Radians {
  const turn = 2 * Math.PI;
  return angle - turn * Math.floor(angle / turn);
}

export function starRadius(column: Column): Metres | null {
  return inputOf(column, 'star.radius');
}

/** What the case computes with: what follows from the inputs wins over what was typed. */
function inputOf({ derived, inputs }: Column, key: string): number | null {
  const own = (list: readonly { readonly key: string; readonly value: number | null }[]): number | null =>
    list.find((one) => one.key === key)?.value ?? null;
  return own(derived) ?? own(inputs);
}
