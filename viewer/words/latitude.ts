/** Latitudes in words, and which Datasets have them. Pure. */
import { radiansPerDegree } from '../../sim/constants.ts';
import type { Dataset } from '../../sim/dataset/dataset.ts';
import type { Finding } from '../../sim/findings/finding.ts';
import { fixed, nbsp } from './number.ts';

/** Degrees, north above zero. */
export type LatitudeDeg = number;

/** Whether a Dataset, or the one of a column, tells latitudes apart. */
export function hasLatitude({ dataset }: { readonly dataset: Dataset }): boolean {
  return dataset.variables.latitude !== undefined;
}

/** `34.2° N`, `87.9° S`; `0.0°` on the equator. */
export function latitudeText(latitudeDeg: LatitudeDeg): string {
  return withSide(fixed(Math.abs(latitudeDeg), 1), latitudeDeg);
}

/** `30° N`, `0°`: for axes. */
export function wholeLatitudeText(latitudeDeg: LatitudeDeg): string {
  return withSide(fixed(Math.abs(latitudeDeg), 0), latitudeDeg);
}

function withSide(size: string, latitudeDeg: LatitudeDeg): string {
  if (Number(size) === 0) return `${size}°`;
  return `${size}°${nbsp}${latitudeDeg > 0 ? 'N' : 'S'}`;
}

/** A finding that is an angle, in degrees whatever it is kept in; null where there is none. */
export function degreesOf(found: Finding | undefined): LatitudeDeg | null {
  if (found === undefined || found.value === null) return null;
  return found.unit === 'rad' ? found.value / radiansPerDegree : found.value;
}

/** Both ends of the way of an ice edge, the one nearer to the equator first: `51.2° to 68.7° N`, `the equator`. */
export function edgeText(oneDeg: LatitudeDeg, otherDeg: LatitudeDeg): string {
  const [near, far] = Math.abs(oneDeg) <= Math.abs(otherDeg) ? [oneDeg, otherDeg] : [otherDeg, oneDeg];
  const [from, to] = [latitudeText(near), latitudeText(far)];
  if (from !== to) return `${fixed(Math.abs(near), 1)}° to ${to}`;
  return to === latitudeText(0) ? 'the equator' : to;
}
