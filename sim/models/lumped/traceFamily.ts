/** Lumped worlds along one changing input: the unknown is the temperature at periapsis. */
import type { Kelvin } from '../../si.ts';
import { banded } from '../../solve/banded.ts';
import { extremes, integrate } from '../../solve/features.ts';
import { type March, march } from '../../solve/march.ts';
import type { YearMap } from '../../solve/periodicMap.ts';
import type { World } from '../../world.ts';
import type { TraceModel, TraceNumbers } from '../traceModel.ts';
import { findClimates } from './climates.ts';
import { orbitClock } from './clock.ts';
import { plainSolver } from './plain.ts';
import { lumpedEquation } from './problem.ts';
import { smoothSolver } from './smooth.ts';
import type { Trajectory } from './trajectory.ts';

const period = 2 * Math.PI;
const marchTolerance = 1e-8;

export const lumpedTraceModel: TraceModel = {
  startsAt(world, tolerance) {
    return stableTrajectories(world, tolerance).map(({ curve }) => Float64Array.of(curve.value[0]));
  },
  family: (worldAt, { from, to }) => ({
    size: 1,
    yScale: 30,
    pScale: (to - from) / 2,
    at: (p) => orbitMap(worldAt(p)),
    summarise: (p, y) => numbersOf(worldAt(p), y[0]),
  }),
};

function numbersOf(world: World, start: Kelvin): TraceNumbers | null {
  const { curve, completed } = marchOrbit(world, start, true);
  if (curve === null || !completed) return null;
  const clock = orbitClock(world);
  const mean = (f: (temperature: Kelvin) => number) =>
    integrate(curve, (s, temperature) => f(temperature) * clock.pace(s)) / period;
  const { albedo } = world.surface;
  const { highest, lowest } = extremes(curve);
  const icy = (temperature: Kelvin) =>
    albedo.ice === albedo.warm ? 0 : (albedo.at(temperature) - albedo.warm) / (albedo.ice - albedo.warm);
  return {
    temperatureMean: mean((temperature) => temperature),
    temperatureMax: highest.value,
    temperatureMin: lowest.value,
    iceFraction: mean(icy),
  };
}

function stableTrajectories(world: World, tolerance: number): Trajectory[] {
  const { albedo, emission } = world.surface;
  if (albedo.ramp !== null) {
    return findClimates(world, tolerance).all.filter(({ logMultiplier }) => (logMultiplier ?? 0) < 0);
  }
  const { quarticCoefficient } = emission;
  if (quarticCoefficient === null) return [smoothSolver()(world, tolerance)];
  return [plainSolver()(world, quarticCoefficient, tolerance)];
}

function marchOrbit(world: World, value: number, keep: boolean): March {
  return march(lumpedEquation(world), { from: 0, to: period, value, tolerance: marchTolerance, keep });
}

function orbitMap(world: World): YearMap {
  let last: March | null = null;
  return {
    size: 1,
    history: { value: new Float64Array(2), rate: new Float64Array(2) },
    year(y) {
      last = marchOrbit(world, y[0], false);
      y[0] += last.change;
      return last.completed && Number.isFinite(y[0]);
    },
    tangent() {
      if (last === null) return null;
      const { logMultiplier } = last;
      const meanJacobian = banded(1, 1);
      meanJacobian.diagonals[1][0] = logMultiplier;
      return {
        apply: (v) => v.map((value) => Math.exp(logMultiplier) * value),
        grow: (v) => {
          v.fill(1);
          return logMultiplier;
        },
        meanJacobian,
        period: 1,
      };
    },
  };
}
