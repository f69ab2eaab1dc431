/** What people quote of a trajectory. Times are found as roots of the rate, never as the largest sample. */
import { stefanBoltzmann } from '../../constants.ts';
import { enter, enterUndefined, type Sheet } from '../../findings/sheet.ts';
import { netHeating } from '../../findings/steadyState.ts';
import type { Kelvin, Radians, Seconds } from '../../si.ts';
import { type Curve, curveValue } from '../../solve/curve.ts';
import { extremes, integrate, shareBetween, type TurningPoint } from '../../solve/features.ts';
import type { Window, World } from '../../world.ts';
import { type OrbitClock, timeAt } from './clock.ts';
import { at } from './columns.ts';
import {
  circular,
  enterDampingOf,
  enterInstellationWindow,
  enterLagOf,
  enterNoLag,
  enterWorld,
  isMoving,
  largestTimeError,
  still,
  tooFlat,
} from './entries.ts';
import { enterFastestChanges } from './fastest.ts';
import { pacing } from './problem.ts';
import { type SteadySeries, steadySeries } from './steadySeries.ts';
import type { Trajectory } from './trajectory.ts';

const notPeriodic = 'a run from a start is not periodic';

/** The findings of any trajectory, read off its curve. Overwrites `sheet`, whose columns are those of `lumpedColumns`. */
export function lumpedFindingsInto(
  world: World,
  trajectory: Trajectory,
  clock: OrbitClock,
  windows: readonly Window[],
  sheet: Sheet,
): void {
  const { curve, errorEstimate } = trajectory;
  const steady = steadySeries(world, curve, clock);
  const mean = meanOver(curve, clock, (temperature) => temperature);
  const found = extremes(curve);
  const highest = atRestOfRate(world, curve, clock, found.highest);
  const lowest = atRestOfRate(world, curve, clock, found.lowest);
  const swing = highest.value - lowest.value;
  const moving = isMoving(swing, mean);
  const error = (temperature: Kelvin) => errorEstimate * temperature;
  enterWorld(world, mean, (trajectory.logMultiplier ?? -1) < 0, sheet);
  enter(sheet, at.steadyTemperatureMax, steady.highest, 0);
  enter(sheet, at.steadyTemperatureMin, steady.lowest, 0);
  enter(sheet, at.steadyTemperatureMean, steady.mean, 0);
  enter(sheet, at.temperatureMax, highest.value, error(highest.value));
  enter(sheet, at.temperatureMin, lowest.value, error(lowest.value));
  enter(sheet, at.temperatureMean, mean, error(mean));
  enterTimes(world, trajectory, clock, steady, highest, lowest, moving, sheet);
  enterHarmonicLag(world, trajectory, clock, steady, moving, sheet);
  enterDamping(trajectory, swing, steady, error(highest.value) + error(lowest.value), sheet);
  enterEmissionTemperature(world, curve, clock, error, sheet);
  enterFastestChanges(world, trajectory, clock, moving, sheet);
  enterWindows(world, curve, clock, windows, sheet);
}

/** Undefined where a linear law, far below its range, emits less than nothing: only a run from a cold start gets there. */
function enterEmissionTemperature(
  world: World,
  curve: Curve,
  clock: OrbitClock,
  error: (temperature: Kelvin) => Kelvin,
  sheet: Sheet,
): void {
  const { emission } = world.surface;
  const value = meanOver(curve, clock, (temperature) => (emission.at(temperature) / stefanBoltzmann) ** 0.25);
  if (Number.isFinite(value)) enter(sheet, at.emissionTemperatureMean, value, error(value));
  else {
    const reason = 'the emission law falls below zero at the lowest temperatures';
    enterUndefined(sheet, at.emissionTemperatureMean, reason);
  }
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

function enterTimes(
  world: World,
  trajectory: Trajectory,
  clock: OrbitClock,
  steady: SteadySeries,
  highest: TurningPoint,
  lowest: TurningPoint,
  moving: boolean,
  sheet: Sheet,
): void {
  const { period } = world.orbit;
  const enterTime = (column: number, point: TurningPoint): void => {
    const end = endOfRun(trajectory, point);
    const plusMinus = timeError(world, point, clock, trajectory.errorEstimate);
    if (!moving) enterUndefined(sheet, column, still);
    else if (end === runEnd) enterUndefined(sheet, column, 'the run ends before the temperature turns');
    else if (end === runStart) enter(sheet, column, 0, 0);
    else if (!(plusMinus <= largestTimeError * period)) enterUndefined(sheet, column, tooFlat);
    else enter(sheet, column, timeAt(trajectory, clock, point.position), plusMinus);
  };
  enterTime(at.timeOfMax, highest);
  enterTime(at.timeOfMin, lowest);
  enterLag(world, clock, steady, highest, endOfRun(trajectory, highest), sheet);
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

/** After the time of the maximum has been entered. */
function enterLag(
  world: World,
  clock: OrbitClock,
  steady: SteadySeries,
  highest: TurningPoint,
  end: string | null,
  sheet: Sheet,
): void {
  const timeless = end === null ? sheet.reason[at.timeOfMax] : `the maximum is ${end}`;
  if (timeless !== null) {
    enterNoLag(sheet, timeless);
    return;
  }
  // A maximum that is late by less than its own error may seem to come before the one that it follows.
  const error = sheet.plusMinus[at.timeOfMax];
  const reach = error / (clock.pace(highest.position) * clock.secondsPerRadian);
  const behind = steady.maximumBefore(highest.position + reach);
  if (behind === null) {
    enterNoLag(sheet, circular);
    return;
  }
  const value = Math.max(0, clock.mean(highest.position) - clock.mean(behind.position)) * clock.secondsPerRadian;
  enterLagOf(world, value, error + behind.error * clock.secondsPerRadian, sheet);
}

/** Phase of the first harmonic in mean anomaly, temperature behind steady temperature; within half an orbit either way. */
function enterHarmonicLag(
  world: World,
  trajectory: Trajectory,
  clock: OrbitClock,
  steady: SteadySeries,
  moving: boolean,
  sheet: Sheet,
): void {
  if (trajectory.logMultiplier === null || !moving) {
    enterUndefined(sheet, at.lagOfFirstHarmonic, moving ? notPeriodic : still);
    return;
  }
  const { curve } = trajectory;
  const project = (wave: (mean: Radians) => number) =>
    integrate(curve, (s, temperature) => temperature * wave(clock.mean(s)) * clock.pace(s));
  const phase = Math.atan2(project(Math.sin), project(Math.cos));
  const difference = phase - steady.harmonicPhase();
  const folded = difference - 2 * Math.PI * Math.round(difference / (2 * Math.PI));
  enter(sheet, at.lagOfFirstHarmonic, (folded / (2 * Math.PI)) * world.orbit.period);
}

function enterDamping(trajectory: Trajectory, swing: Kelvin, steady: SteadySeries, error: Kelvin, sheet: Sheet): void {
  if (trajectory.logMultiplier === null) enterUndefined(sheet, at.damping, notPeriodic);
  else enterDampingOf(swing, steady.highest, steady.lowest, error, sheet);
}

function enterWindows(world: World, curve: Curve, clock: OrbitClock, windows: readonly Window[], sheet: Sheet): void {
  const start = clock.mean(curve.position[0]);
  const end = clock.mean(curve.position[curve.position.length - 1]);
  let column: number = at.windows;
  for (const window of windows) {
    if (window.of === 'instellation') {
      enterInstellationWindow(world, window, start, end, column, sheet);
      column += 2;
    } else enter(sheet, column++, shareBetween(curve, window.from, window.to, clock.mean));
  }
}
