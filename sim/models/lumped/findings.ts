/** What people quote of a trajectory. Times are found as roots of the rate, never as the largest sample. */
import { stefanBoltzmann } from '../../constants.ts';
import type { Finding } from '../../findings/finding.ts';
import { orbitMeanClosedForm } from '../../findings/orbitMean.ts';
import { worldFindings } from '../../findings/world.ts';
import type { Kelvin, Radians, Seconds } from '../../si.ts';
import { type Curve, curveValue } from '../../solve/curve.ts';
import { extremes, integrate, shareBetween, type TurningPoint } from '../../solve/features.ts';
import type { Window, World } from '../../world.ts';
import { netHeating } from '../steadyState.ts';
import type { OrbitClock } from './clock.ts';
import { fastestChanges } from './fastest.ts';
import { pacing } from './problem.ts';
import { type SteadySeries, steadySeries } from './steadySeries.ts';
import type { Trajectory } from './trajectory.ts';
import { instellationShare } from './windows.ts';

/** A time of an extreme counts as undefined when its own error is larger than this share of an orbit. */
const largestTimeError = 0.02;
/** A swing below this share of the temperature is rounding. */
const smallestSwing = 1e-13;
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
    ...worldFindings(world, mean),
    kelvin('steadyTemperatureMax', steady.highest, 'Maximum steady temperature', 0),
    kelvin('steadyTemperatureMin', steady.lowest, 'Minimum steady temperature', 0),
    kelvin('steadyTemperatureMean', steady.mean, 'Mean steady temperature', 0),
    kelvin('temperatureMax', highest.value, 'Maximum temperature'),
    kelvin('temperatureMin', lowest.value, 'Minimum temperature'),
    kelvin('temperatureMean', mean, 'Mean temperature'),
    ...timing(world, trajectory, clock, steady, highest, lowest, moving),
    harmonicLag(world, trajectory, clock, steady, moving),
    damping(swing, steady, error(highest.value) + error(lowest.value)),
    kelvin(
      'emissionTemperatureMean',
      meanOver(curve, clock, (temperature) => (world.surface.emission.at(temperature) / stefanBoltzmann) ** 0.25),
      'Mean emission temperature',
    ),
    ...fastestChanges(world, trajectory, clock, moving),
    ...windows.flatMap((window) => windowFindings(world, curve, clock, window)),
  ];
}

function meanOver(curve: Curve, clock: OrbitClock, f: (temperature: Kelvin) => number): number {
  const span = clock.mean(curve.position[curve.position.length - 1]) - clock.mean(curve.position[0]);
  return integrate(curve, (s, temperature) => f(temperature) * clock.pace(s)) / span;
}

/** Seconds after periapsis within the orbit, or after the start of a forward run. */
function timeAt(trajectory: Trajectory, clock: OrbitClock, s: Radians): Seconds {
  const { position } = trajectory.curve;
  const since = clock.mean(s) - clock.mean(position[0]);
  const turn = 2 * Math.PI;
  const folded = trajectory.logMultiplier === null ? since : since - turn * Math.floor(since / turn);
  return folded * clock.secondsPerRadian;
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
    if (!(plusMinus <= largestTimeError * period)) return { ...base, value: null, reason: tooFlat };
    return { ...base, value: timeAt(trajectory, clock, point.position), plusMinus };
  };
  const timeOfMax = when('timeOfMax', `Time of maximum, ${since}`, highest);
  const timeOfMin = when('timeOfMin', `Time of minimum, ${since}`, lowest);
  const atStart = trajectory.logMultiplier === null && highest.position === trajectory.curve.position[0];
  return [timeOfMax, timeOfMin, ...lagFindings(world, clock, steady, highest, timeOfMax, atStart)];
}

const tooFlat =
  'the maximum or minimum is too flat: its time is uncertain by more than 0.02 orbit; lower solve.tolerance';

function lagFindings(
  world: World,
  clock: OrbitClock,
  steady: SteadySeries,
  highest: TurningPoint,
  timeOfMax: Finding,
  atStart: boolean,
): Finding[] {
  const { period } = world.orbit;
  const lag = { name: 'lagOfMax', unit: 's', label: 'Lag of the maximum behind the steady maximum' };
  const inOrbits = { name: 'lagOfMaxOrbits', unit: '1', label: 'Lag of the maximum, in orbits' };
  const undefinedLag = (reason: string): Finding[] => [
    { ...lag, value: null, reason },
    { ...inOrbits, value: null, reason },
  ];
  if (timeOfMax.value === null) return undefinedLag(timeOfMax.reason ?? tooFlat);
  if (atStart) return undefinedLag('the maximum is the start itself');
  const behind = steady.maximumBefore(highest.position);
  if (behind === null) return undefinedLag(circular);
  const value = (clock.mean(highest.position) - clock.mean(behind.position)) * clock.secondsPerRadian;
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
  if (trajectory.logMultiplier === null) return { ...base, value: null, reason: 'a run from a start is not periodic' };
  if (!moving) return { ...base, value: null, reason: 'the temperature does not vary' };
  const { curve } = trajectory;
  const project = (wave: (mean: Radians) => number) =>
    integrate(curve, (s, temperature) => temperature * wave(clock.mean(s)) * clock.pace(s));
  const phase = Math.atan2(project(Math.sin), project(Math.cos));
  const difference = phase - steady.harmonicPhase;
  const folded = difference - 2 * Math.PI * Math.round(difference / (2 * Math.PI));
  return { ...base, value: (folded / (2 * Math.PI)) * world.orbit.period };
}

function damping(swing: Kelvin, steady: SteadySeries, error: Kelvin): Finding {
  const base = { name: 'damping', unit: '1', label: 'Damping (swing over steady swing)' };
  const steadySwing = steady.highest - steady.lowest;
  if (!(steadySwing > smallestSwing * steady.highest)) return { ...base, value: null, reason: circular };
  return { ...base, value: swing / steadySwing, plusMinus: error / steadySwing };
}

function windowFindings(world: World, curve: Curve, clock: OrbitClock, window: Window): Finding[] {
  const ofFlux = window.of === 'instellation';
  const share = {
    name: `fractionInWindow.${window.name}`,
    unit: '1',
    label: ofFlux ? `Time in “${window.name}” (instantaneous instellation)` : `Time in “${window.name}”`,
  };
  const mean = {
    name: `orbitMeanInWindow.${window.name}`,
    unit: '1',
    label: `Orbit-mean instellation in “${window.name}” (1 yes, 0 no)`,
  };
  if (window.unavailable !== undefined) {
    const reason = window.unavailable;
    return [{ ...share, value: null, reason }, ...(ofFlux ? [{ ...mean, value: null, reason }] : [])];
  }
  if (!ofFlux) return [{ ...share, value: shareBetween(curve, window.from, window.to, (s) => clock.mean(s)) }];
  const meanFlux = orbitMeanClosedForm(world);
  return [
    { ...share, value: instellationShare(world, curve, clock, window) },
    { ...mean, value: meanFlux >= window.from && meanFlux <= window.to ? 1 : 0 },
  ];
}
