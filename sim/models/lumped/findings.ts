/** What people quote of a trajectory. Times are found as roots of the rate, never as the largest sample. */
import { stefanBoltzmann } from '../../constants.ts';
import type { Finding } from '../../findings/finding.ts';
import { instellationWindowFindings } from '../../findings/instellationWindow.ts';
import { netHeating } from '../../findings/steadyState.ts';
import { worldFindings } from '../../findings/world.ts';
import type { Kelvin, Radians, Seconds } from '../../si.ts';
import { type Curve, curveValue } from '../../solve/curve.ts';
import { extremes, integrate, shareBetween, type TurningPoint } from '../../solve/features.ts';
import type { Window, World } from '../../world.ts';
import { type OrbitClock, timeAt } from './clock.ts';
import { fastestChanges } from './fastest.ts';
import { pacing } from './problem.ts';
import { type SteadySeries, steadySeries } from './steadySeries.ts';
import type { Trajectory } from './trajectory.ts';

/** A time of an extreme counts as undefined when its own error is larger than this share of an orbit. */
const largestTimeError = 0.02;
/** A swing below this share of the temperature is rounding. */
const smallestSwing = 1e-13;
const notPeriodic = 'a run from a start is not periodic';
const circular = 'the instellation does not vary on a circular orbit';

export function lumpedFindings(
  world: World,
  trajectory: Trajectory,
  clock: OrbitClock,
  windows: readonly Window[],
): Finding[] {
  const { curve, errorEstimate } = trajectory;
  const steady = steadySeries(world, curve, clock);
  const mean = meanOver(curve, clock, (temperature) => temperature);
  const found = extremes(curve);
  const highest = atRestOfRate(world, curve, clock, found.highest);
  const lowest = atRestOfRate(world, curve, clock, found.lowest);
  const swing = highest.value - lowest.value;
  const moving = swing > smallestSwing * mean;
  const error = (temperature: Kelvin) => errorEstimate * temperature;
  const kelvin = (name: string, value: number, label: string, plusMinus = error(value)): Finding => {
    return { name, value, unit: 'K', label, plusMinus };
  };
  return [
    ...worldFindings(world, mean, (trajectory.logMultiplier ?? -1) < 0),
    kelvin('steadyTemperatureMax', steady.highest, 'Maximum steady temperature', 0),
    kelvin('steadyTemperatureMin', steady.lowest, 'Minimum steady temperature', 0),
    kelvin('steadyTemperatureMean', steady.mean, 'Mean steady temperature', 0),
    kelvin('temperatureMax', highest.value, 'Maximum temperature'),
    kelvin('temperatureMin', lowest.value, 'Minimum temperature'),
    kelvin('temperatureMean', mean, 'Mean temperature'),
    ...timing(world, trajectory, clock, steady, highest, lowest, moving),
    harmonicLag(world, trajectory, clock, steady, moving),
    damping(trajectory, swing, steady, error(highest.value) + error(lowest.value)),
    emissionTemperature(world, curve, clock, error),
    ...fastestChanges(world, trajectory, clock, moving),
    ...windows.flatMap((window) => windowFindings(world, curve, clock, window)),
  ];
}

/** Null where a linear law, far below its range, emits less than nothing: only a run from a cold start gets there. */
function emissionTemperature(
  world: World,
  curve: Curve,
  clock: OrbitClock,
  error: (temperature: Kelvin) => Kelvin,
): Finding {
  const base = { name: 'emissionTemperatureMean', unit: 'K', label: 'Mean emission temperature' };
  const { emission } = world.surface;
  const value = meanOver(curve, clock, (temperature) => (emission.at(temperature) / stefanBoltzmann) ** 0.25);
  return Number.isFinite(value)
    ? { ...base, value, plusMinus: error(value) }
    : { ...base, value: null, reason: 'the emission law falls below zero at the lowest temperatures' };
}

function meanOver(curve: Curve, clock: OrbitClock, f: (temperature: Kelvin) => number): number {
  const span = clock.mean(curve.position[curve.position.length - 1]) - clock.mean(curve.position[0]);
  return integrate(curve, (s, temperature) => f(temperature) * clock.pace(s)) / span;
}

/**
 * Moves a turning point to the root of the heating itself, N(T, s) = 0: where the temperature hardly varies, N keeps digits
 * that differences of temperature have lost. Newton along the curve: dN/ds = T″/(P/(2πC) dM/ds) where N = 0. Ends stay.
 */
function atRestOfRate(world: World, curve: Curve, clock: OrbitClock, point: TurningPoint): TurningPoint {
  const start = curve.position[0];
  const end = curve.position[curve.position.length - 1];
  let { position } = point;
  if (position === start || position === end || point.curvature === 0) return point;
  const reach = 0.02;
  for (let trial = 0; trial < 3; trial++) {
    const heating = netHeating(world.surface, clock.instellation(position), curveValue(curve, position));
    const next = position - (pacing(world) * clock.pace(position) * heating) / point.curvature;
    if (!(Math.abs(next - point.position) < reach && next > start && next < end)) return point;
    position = next;
  }
  return { ...point, position };
}

/**
 * Error of an extreme's time: an error δT shifts the balance f(T, s) = 0 by |∂f/∂T| δT / |d²T/ds²| along s.
 */
function timeError(world: World, point: TurningPoint, clock: OrbitClock, errorEstimate: number): Seconds {
  const pace = clock.pace(point.position);
  const steepness = pacing(world) * pace * heatingSlope(world, clock.instellation(point.position), point.value);
  const shift = (steepness * errorEstimate * point.value) / Math.abs(point.curvature);
  return shift * pace * clock.secondsPerRadian;
}

/** |∂(absorbed − emitted)/∂T|, W m⁻² K⁻¹. */
function heatingSlope(world: World, instellation: number, temperature: Kelvin): number {
  const { surface } = world;
  const feedback = surface.absorbingFraction * instellation * surface.albedo.slopeAt(temperature);
  return Math.abs(feedback + surface.emission.slopeAt(temperature));
}

function timing(
  world: World,
  trajectory: Trajectory,
  clock: OrbitClock,
  steady: SteadySeries,
  highest: TurningPoint,
  lowest: TurningPoint,
  moving: boolean,
): Finding[] {
  const { period } = world.orbit;
  const since = trajectory.logMultiplier === null ? 'after the start' : 'after periapsis';
  const still = 'the temperature does not vary';
  const errorOf = (point: TurningPoint) => timeError(world, point, clock, trajectory.errorEstimate);
  const when = (name: string, label: string, point: TurningPoint): Finding => {
    const plusMinus = moving ? errorOf(point) : Number.POSITIVE_INFINITY;
    const base = { name, unit: 's', label };
    if (!moving) return { ...base, value: null, reason: still };
    const end = endOfRun(trajectory, point);
    if (end === runEnd) return { ...base, value: null, reason: 'the run ends before the temperature turns' };
    if (end === runStart) return { ...base, value: 0, plusMinus: 0 };
    if (!(plusMinus <= largestTimeError * period)) return { ...base, value: null, reason: tooFlat };
    return { ...base, value: timeAt(trajectory, clock, point.position), plusMinus };
  };
  const timeOfMax = when('timeOfMax', `Time of maximum, ${since}`, highest);
  const timeOfMin = when('timeOfMin', `Time of minimum, ${since}`, lowest);
  return [
    timeOfMax,
    timeOfMin,
    ...lagFindings(world, clock, steady, highest, timeOfMax, endOfRun(trajectory, highest)),
  ];
}

const runStart = 'the start itself';
const runEnd = 'the end of the run';

/** Set when a forward run's extreme lies there: no turning point at all. */
function endOfRun(trajectory: Trajectory, point: TurningPoint): string | null {
  const { position } = trajectory.curve;
  if (trajectory.logMultiplier !== null) return null;
  if (point.position === position[0]) return runStart;
  return point.position === position[position.length - 1] ? runEnd : null;
}

const tooFlat =
  'the maximum or minimum is too flat: its time is uncertain by more than 0.02 orbit; lower solve.tolerance';

function lagFindings(
  world: World,
  clock: OrbitClock,
  steady: SteadySeries,
  highest: TurningPoint,
  timeOfMax: Finding,
  end: string | null,
): Finding[] {
  const { period } = world.orbit;
  const lag = { name: 'lagOfMax', unit: 's', label: 'Lag of the maximum behind the steady maximum' };
  const inOrbits = { name: 'lagOfMaxOrbits', unit: '1', label: 'Lag of the maximum, in orbits' };
  const undefinedLag = (reason: string): Finding[] => [
    { ...lag, value: null, reason },
    { ...inOrbits, value: null, reason },
  ];
  if (end !== null) return undefinedLag(`the maximum is ${end}`);
  if (timeOfMax.value === null) return undefinedLag(timeOfMax.reason ?? tooFlat);
  // A maximum that is late by less than its own error may seem to come before the one that it follows.
  const reach = (timeOfMax.plusMinus ?? 0) / (clock.pace(highest.position) * clock.secondsPerRadian);
  const behind = steady.maximumBefore(highest.position + reach);
  if (behind === null) return undefinedLag(circular);
  const value = Math.max(0, clock.mean(highest.position) - clock.mean(behind.position)) * clock.secondsPerRadian;
  const plusMinus = (timeOfMax.plusMinus ?? 0) + behind.error * clock.secondsPerRadian;
  return [
    { ...lag, value, plusMinus },
    { ...inOrbits, value: value / period, plusMinus: plusMinus / period },
  ];
}

/** Phase of the first harmonic in mean anomaly, temperature behind steady temperature; within half an orbit either way. */
function harmonicLag(
  world: World,
  trajectory: Trajectory,
  clock: OrbitClock,
  steady: SteadySeries,
  moving: boolean,
): Finding {
  const base = { name: 'lagOfFirstHarmonic', unit: 's', label: 'Lag of the first harmonic' };
  if (trajectory.logMultiplier === null) return { ...base, value: null, reason: notPeriodic };
  if (!moving) return { ...base, value: null, reason: 'the temperature does not vary' };
  const { curve } = trajectory;
  const project = (wave: (mean: Radians) => number) =>
    integrate(curve, (s, temperature) => temperature * wave(clock.mean(s)) * clock.pace(s));
  const phase = Math.atan2(project(Math.sin), project(Math.cos));
  const difference = phase - steady.harmonicPhase();
  const folded = difference - 2 * Math.PI * Math.round(difference / (2 * Math.PI));
  return { ...base, value: (folded / (2 * Math.PI)) * world.orbit.period };
}

function damping(trajectory: Trajectory, swing: Kelvin, steady: SteadySeries, error: Kelvin): Finding {
  const base = { name: 'damping', unit: '1', label: 'Damping (swing over steady swing)' };
  if (trajectory.logMultiplier === null) return { ...base, value: null, reason: notPeriodic };
  const steadySwing = steady.highest - steady.lowest;
  if (!(steadySwing > smallestSwing * steady.highest)) return { ...base, value: null, reason: circular };
  return { ...base, value: swing / steadySwing, plusMinus: error / steadySwing };
}

/** Mean anomaly at the curve's two ends. */
function spanOf(curve: Curve, clock: OrbitClock): [Radians, Radians] {
  return [clock.mean(curve.position[0]), clock.mean(curve.position[curve.position.length - 1])];
}

function windowFindings(world: World, curve: Curve, clock: OrbitClock, window: Window): Finding[] {
  if (window.of === 'instellation') return instellationWindowFindings(world, window, ...spanOf(curve, clock));
  return [
    {
      name: `fractionInWindow.${window.name}`,
      value: shareBetween(curve, window.from, window.to, (s) => clock.mean(s)),
      unit: '1',
      label: `Time in “${window.name}”`,
    },
  ];
}
