/** The instantaneous steady temperature along a trajectory: its extremes, mean, phase and maxima. */

import { steadyTemperature } from '../../findings/steadyState.ts';
import type { Kelvin, Radians } from '../../si.ts';
import { type Curve, curveValue } from '../../solve/curve.ts';
import { gauss } from '../../solve/features.ts';
import type { World } from '../../world.ts';
import type { OrbitClock } from './clock.ts';

export interface SteadySeries {
  readonly highest: Kelvin;
  readonly lowest: Kelvin;
  /** Time mean. */
  readonly mean: Kelvin;
  /** Phase of the first harmonic in mean anomaly; 0 when the steady value does not vary. */
  harmonicPhase(): Radians;
  /** Nearest local maximum at or before s, with the error of its mean anomaly; null when the steady value does not vary. */
  maximumBefore(s: Radians): { readonly position: Radians; readonly error: Radians } | null;
}

export function steadySeries(world: World, curve: Curve, clock: OrbitClock): SteadySeries {
  const { surface, orbit } = world;
  const at = (s: Radians) => steadyTemperature(surface, clock.instellation(s), curveValue(curve, s));
  if (surface.albedo.ramp !== null) return onBranches(surface.albedo.ramp, curve, clock, at);
  if (orbit.eccentricity === 0) return unvarying(at(0));
  const start = curve.position[0];
  const end = curve.position[curve.position.length - 1];
  // One balance at each instellation: highest at periapsis, lowest at apoapsis.
  const values = [start, ...apsides(curve), end].map(at);
  return {
    ...means(at, Array.from(curve.position), clock),
    highest: Math.max(...values),
    lowest: Math.min(...values),
    maximumBefore: (s) => ({ position: 2 * Math.PI * Math.floor(s / (2 * Math.PI) + 1e-12), error: 0 }),
  };
}

function unvarying(value: Kelvin): SteadySeries {
  return { highest: value, lowest: value, mean: value, harmonicPhase: () => 0, maximumBefore: () => null };
}

/** Multiples of π within the curve's span. */
function apsides(curve: Curve): Radians[] {
  const found: Radians[] = [];
  const end = curve.position[curve.position.length - 1];
  for (let k = Math.ceil(curve.position[0] / Math.PI); k * Math.PI <= end; k++) found.push(k * Math.PI);
  return found;
}

/** Mean and phase by quadrature between the given places, increasing, between which the series is smooth. */
function means(at: (s: Radians) => Kelvin, places: readonly Radians[], clock: OrbitClock) {
  const project = (wave: (mean: Radians) => number) => {
    let sum = 0;
    for (let i = 0; i + 1 < places.length; i++) {
      sum += gauss((s) => at(s) * wave(clock.mean(s)) * clock.pace(s), places[i], places[i + 1]);
    }
    return sum;
  };
  const span = clock.mean(places[places.length - 1]) - clock.mean(places[0]);
  return { mean: project(() => 1) / span, harmonicPhase: () => Math.atan2(project(Math.sin), project(Math.cos)) };
}

/**
 * Several balances: the one meant jumps where the state passes from the reach of one to that of another. The series is
 * sampled, and cut where it changes from ice to ramp or open water; it is smooth between the cuts.
 */
function onBranches(
  ramp: { readonly from: Kelvin; readonly to: Kelvin },
  curve: Curve,
  clock: OrbitClock,
  at: (s: Radians) => Kelvin,
): SteadySeries {
  const branch = (value: Kelvin) => (value < ramp.from ? 0 : value < ramp.to ? 1 : 2);
  const positions: Radians[] = [];
  const values: Kelvin[] = [];
  const add = (s: Radians, value: Kelvin): void => {
    positions.push(s);
    values.push(value);
  };
  for (const s of samplePositions(curve)) {
    const value = at(s);
    const last = values.length - 1;
    if (last >= 0 && branch(value) !== branch(values[last])) {
      const cut = changeOfBranch((x) => branch(at(x)), positions[last], s);
      add(cut.before, at(cut.before));
      add(cut.after, at(cut.after));
    }
    if (s > (positions[positions.length - 1] ?? Number.NEGATIVE_INFINITY)) add(s, value);
  }
  const end = curve.position[curve.position.length - 1];
  const places = [...positions.filter((s) => s < end), end];
  const highest = values.reduce((a, b) => Math.max(a, b));
  const lowest = values.reduce((a, b) => Math.min(a, b));
  return { ...means(at, places, clock), highest, lowest, maximumBefore: localMaxima(positions, values, clock, end) };
}

/** Bisection for the place where the branch changes, to rounding: the last s before and the first after. */
function changeOfBranch(branchAt: (s: Radians) => number, low: Radians, high: Radians) {
  const from = branchAt(low);
  let before = low;
  let after = high;
  for (let trial = 0; trial < 60; trial++) {
    const middle = (before + after) / 2;
    if (middle <= before || middle >= after) break;
    if (branchAt(middle) === from) before = middle;
    else after = middle;
  }
  return { before, after };
}

/** Nearest local maximum of the samples at or before s, going round the orbit. */
function localMaxima(
  positions: readonly Radians[],
  values: readonly Kelvin[],
  clock: OrbitClock,
  end: Radians,
): SteadySeries['maximumBefore'] {
  const count = values.length;
  const maxima = values.flatMap((value, i) => {
    return value > values[(i + count - 1) % count] && value >= values[(i + 1) % count] ? [i] : [];
  });
  return (s) => {
    if (maxima.length === 0) return null;
    const before = maxima.filter((i) => positions[i] <= s + 1e-12).pop();
    const index = before ?? maxima[maxima.length - 1];
    const position = positions[index] - (before === undefined ? end - positions[0] : 0);
    // The apsides and the jumps are among the samples: a maximum there is exact.
    const next = positions[Math.min(index + 1, count - 1)];
    const exact = Math.abs(Math.sin(positions[index])) < 1e-12 || next - positions[index] < 1e-12;
    return { position, error: exact ? 0 : clock.mean(next) - clock.mean(positions[index]) };
  };
}

/** Eight places in every piece, and the apsides; in order, a place may stand twice. */
function samplePositions(curve: Curve): Float64Array {
  const perPiece = 8;
  const turns = apsides(curve);
  const pieces = curve.position.length - 1;
  const positions = new Float64Array(perPiece * pieces + turns.length);
  for (let index = 0; index < pieces; index++) {
    const left = curve.position[index];
    const width = curve.position[index + 1] - left;
    for (let k = 0; k < perPiece; k++) positions[perPiece * index + k] = left + (k / perPiece) * width;
  }
  positions.set(turns, perPiece * pieces);
  return positions.sort();
}
