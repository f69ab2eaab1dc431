/** The instantaneous steady temperature along a trajectory: its extremes, mean, phase and maxima. */
import type { Kelvin, Radians } from '../../si.ts';
import { type Curve, curveValue } from '../../solve/curve.ts';
import { integrate } from '../../solve/features.ts';
import type { World } from '../../world.ts';
import { steadyTemperature } from '../steadyState.ts';
import type { OrbitClock } from './clock.ts';

export interface SteadySeries {
  readonly highest: Kelvin;
  readonly lowest: Kelvin;
  /** Time mean. */
  readonly mean: Kelvin;
  /** Phase of the first harmonic in mean anomaly. */
  readonly harmonicPhase: Radians;
  /** Nearest local maximum at or before s, with the error of its mean anomaly; null when the steady value does not vary. */
  maximumBefore(s: Radians): { readonly position: Radians; readonly error: Radians } | null;
}

export function steadySeries(world: World, curve: Curve, clock: OrbitClock): SteadySeries {
  const { surface, orbit } = world;
  const start = curve.position[0];
  const end = curve.position[curve.position.length - 1];
  const span = clock.mean(end) - clock.mean(start);
  const at = (s: Radians, temperature: Kelvin) => steadyTemperature(surface, clock.instellation(s), temperature);
  const project = (wave: (mean: Radians) => number) =>
    integrate(curve, (s, temperature) => at(s, temperature) * wave(clock.mean(s)) * clock.pace(s));
  const common = { mean: project(() => 1) / span, harmonicPhase: Math.atan2(project(Math.sin), project(Math.cos)) };
  if (orbit.eccentricity === 0 && surface.albedo.ramp === null) {
    const value = at(0, curve.value[0]);
    return { ...common, harmonicPhase: 0, mean: value, highest: value, lowest: value, maximumBefore: () => null };
  }
  return surface.albedo.ramp === null
    ? { ...common, ...followingDistance([start, ...apsides(curve), end], (s) => at(s, curve.value[0])) }
    : { ...common, ...sampled(curve, clock, at) };
}

/** Multiples of π within the curve's span. */
function apsides(curve: Curve): Radians[] {
  const found: Radians[] = [];
  const end = curve.position[curve.position.length - 1];
  for (let k = Math.ceil(curve.position[0] / Math.PI); k * Math.PI <= end; k++) found.push(k * Math.PI);
  return found;
}

/** One balance at each instellation: highest at periapsis, lowest at apoapsis. */
function followingDistance(turns: readonly Radians[], at: (s: Radians) => Kelvin) {
  const values = turns.map(at);
  return {
    highest: Math.max(...values),
    lowest: Math.min(...values),
    maximumBefore: (s: Radians) => ({ position: 2 * Math.PI * Math.floor(s / (2 * Math.PI) + 1e-12), error: 0 }),
  };
}

/** Several balances: the one meant may jump with the state, so the series is sampled, eight times in every piece. */
function sampled(curve: Curve, clock: OrbitClock, at: (s: Radians, temperature: Kelvin) => Kelvin) {
  const positions = samplePositions(curve);
  const values = Array.from(positions, (s) => at(s, curveValue(curve, s)));
  const count = values.length;
  const span = curve.position[curve.position.length - 1] - curve.position[0];
  const maxima = Array.from(positions.keys()).filter(
    (i) => values[i] > values[(i + count - 1) % count] && values[i] >= values[(i + 1) % count],
  );
  return {
    highest: values.reduce((a, b) => Math.max(a, b)),
    lowest: values.reduce((a, b) => Math.min(a, b)),
    maximumBefore(s: Radians) {
      if (maxima.length === 0) return null;
      const before = maxima.filter((i) => positions[i] <= s + 1e-12).pop();
      const index = before ?? maxima[maxima.length - 1];
      const position = positions[index] - (before === undefined ? span : 0);
      // Between jumps the balance follows the distance, and the apsides are among the samples: exact there.
      const exact = Math.abs(Math.sin(positions[index])) < 1e-12;
      const error = exact ? 0 : clock.mean(positions[Math.min(index + 1, count - 1)]) - clock.mean(positions[index]);
      return { position, error };
    },
  };
}

/** Eight places in every piece, and the apsides; increasing. */
function samplePositions(curve: Curve): Float64Array {
  const perPiece = 8;
  const positions = apsides(curve);
  for (let index = 0; index + 1 < curve.position.length; index++) {
    const left = curve.position[index];
    const width = curve.position[index + 1] - left;
    for (let k = 0; k < perPiece; k++) positions.push(left + (k / perPiece) * width);
  }
  return Float64Array.from(new Set(positions)).sort();
}
