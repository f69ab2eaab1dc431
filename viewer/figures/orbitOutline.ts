/** The orbit seen from above, to scale, star at the origin, periapsis to the right. Pure; lengths as a share of a. */
import type { Dataset } from '../../sim/dataset/dataset.ts';
import { extremes, values } from './variables.ts';

export interface Point {
  readonly x: number;
  readonly y: number;
}

export interface OrbitOutline {
  /** The whole path, row by row. */
  readonly path: readonly Point[];
  /** Where the planet stands at equal steps of time from periapsis on. */
  readonly dots: readonly Point[];
}

/** A periodic state's orbit with `count` dots. */
export function orbitOutline(dataset: Dataset, count: number): OrbitOutline {
  const distance = values(dataset, 'distance');
  const [shortest, longest] = extremes(dataset, 'distance');
  const semiMajorAxis = (longest + shortest) / 2;
  const path = Array.from(values(dataset, 'trueAnomaly'), (nu, row) => {
    const r = distance[row]! / semiMajorAxis;
    return { x: r * Math.cos(nu), y: r * Math.sin(nu) };
  });
  const mean = values(dataset, 'meanAnomaly');
  const dots = Array.from({ length: count }, (_, dot) => pointAt(path, mean, (2 * Math.PI * dot) / count));
  return { path, dots };
}

/** Between the two rows whose mean anomalies enclose the one asked for. */
function pointAt(path: readonly Point[], mean: Float64Array, wanted: number): Point {
  const next = mean.findIndex((anomaly) => anomaly > wanted);
  const after = Math.max(0, next);
  const before = (after + path.length - 1) % path.length;
  const end = next < 0 ? mean[0]! + 2 * Math.PI : mean[after]!;
  const share = (wanted - mean[before]!) / (end - mean[before]!);
  const [from, to] = [path[before]!, path[after]!];
  return { x: from.x + share * (to.x - from.x), y: from.y + share * (to.y - from.y) };
}
