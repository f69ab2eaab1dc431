/** Periodic states of a zonal world from a warm and a cold start. */

import { steadyAtAlbedo } from '../../findings/steadyState.ts';
import { instellation } from '../../instellation/instellation.ts';
import { logDominantMultiplier, settlePeriodic, type YearMap } from '../../solve/periodicMap.ts';
import { marchRodas4, type StageHistory, stageHistory, stageWork } from '../../solve/rodas4.ts';
import { tangentOf } from '../../solve/tangent.ts';
import type { Globe, World } from '../../world.ts';
import { relaxToAnnualBalance } from './annualBalance.ts';
import { equalAreaBands } from './bands.ts';
import { type YearMesh, yearMesh } from './mesh.ts';
import { type ZonalPhysics, zonalPhysics } from './physics.ts';
import { zonalSystem } from './system.ts';
import type { ZonalSystem } from './systemShape.ts';

export interface ZonalState {
  readonly system: ZonalSystem;
  readonly history: StageHistory;
  readonly logMultiplier: number;
  readonly frozenLogMultiplier: number;
  /** Upper bound of the relative error in time. */
  readonly errorEstimate: number;
  readonly converged: boolean;
  /** Years marched, weighted by their steps in units of the last mesh. */
  readonly yearEquivalents: number;
}

export interface ZonalGrid {
  readonly world: World;
  readonly globe: Globe;
  readonly physics: ZonalPhysics;
  /** The mesh of so many steps; made once. */
  mesh(steps: number): YearMesh;
}

export function zonalGrid(world: World, globe: Globe, bandCount: number): ZonalGrid {
  const bands = equalAreaBands(bandCount);
  const meshes = new Map<number, YearMesh>();
  return {
    world,
    globe,
    physics: zonalPhysics(world, globe, bands),
    mesh(steps) {
      let mesh = meshes.get(steps);
      if (mesh === undefined) {
        mesh = yearMesh(world, globe, bands, steps);
        meshes.set(steps, mesh);
      }
      return mesh;
    },
  };
}

const coarseSteps = 32;
/** Of the mesh on which a start is followed, and of any. */
const finestStart = 2048;
const finestSteps = 8192;
const largestStep = 4;
/** A last change, K, that the history of a year need not show. */
const negligible = 1e-5;
/** Years on one mesh: fewer on a finer one, so that a world that cannot settle is given up in bounded time. */
const maximumYears = (steps: number) => Math.min(300, Math.max(12, Math.ceil(20_000 / steps)));
/** Rodas4 gains 2⁴ by halving its steps; 6 leaves room for the kinks of polar night. */
const safety = 6;

/** Follows a start, K by band, to its periodic state; steps are doubled until two meshes agree to the tolerance. */
export function settleZonal(grid: ZonalGrid, bandStart: Float64Array, tolerance: number): ZonalState {
  const start = onSurfaces(grid.physics, bandStart);
  let years = 0;
  let steps = coarseSteps;
  // A year that hardly moves the world: the annual balance is all but its state.
  const deep = yearOverMemory(grid) < 1;
  const first = deep ? relaxToAnnualBalance(grid.physics, grid.mesh(steps), start) : start;
  const firstStep = deep ? 4 : 1;
  // Steps too coarse for the fastest bands may lose their way: then the way from the start is tried again on finer ones.
  let previous = settleOn(grid, steps, first, 1e-2, firstStep);
  while (!previous.settled.converged && 2 * steps <= finestStart) {
    years += previous.settled.years * steps;
    steps *= 2;
    previous = settleOn(grid, steps, first, 1e-2, firstStep);
  }
  years += previous.settled.years * steps;
  for (;;) {
    steps *= 2;
    const fine = settleOn(grid, steps, previous.settled.state, 0.02 * tolerance * 250, Number.POSITIVE_INFINITY);
    years += fine.settled.years * steps;
    const difference = largestDifference(previous, fine);
    const converged = fine.settled.converged && difference < safety * tolerance;
    if (converged || 2 * steps > finestSteps || !fine.settled.converged) {
      return finished(fine, difference / safety, converged, years / steps);
    }
    previous = fine;
  }
}

/** The same temperature on every surface of a band. */
function onSurfaces({ land }: ZonalPhysics, bands: Float64Array): Float64Array {
  return land === null ? bands : Float64Array.from({ length: 2 * bands.length }, (_, i) => bands[i >> 1]);
}

/** P (dE/dT)/C at the orbit-mean steady temperature: how much of its memory a world loses in a year. */
function yearOverMemory({ world }: ZonalGrid): number {
  const { surface, orbit } = world;
  const flux = instellation(world.star.luminosity, orbit.semiMajorAxis);
  const temperature = steadyAtAlbedo(surface, flux, surface.albedo.warm);
  return (orbit.period * surface.emission.slopeAt(temperature)) / surface.heatCapacity;
}

interface OnMesh {
  readonly system: ZonalSystem;
  readonly map: YearMap;
  readonly settled: ReturnType<typeof settlePeriodic>;
}

function settleOn(grid: ZonalGrid, steps: number, start: Float64Array, tolerance: number, firstStep: number): OnMesh {
  const mesh = grid.mesh(steps);
  const system = zonalSystem(grid.physics, mesh);
  const map = yearMap(system);
  const settled = settlePeriodic(map, start, {
    tolerance,
    largestStep,
    firstStep,
    maximumYears: maximumYears(steps),
  });
  // The history belongs to the state before its last change: where that matters, march the final state once more.
  if (settled.lastChange > negligible) map.year(settled.state.slice());
  return { system, map, settled };
}

export function yearMap(system: ZonalSystem): YearMap {
  const { mesh, size } = system;
  const work = stageWork(size, system.width);
  const history = stageHistory(mesh.steps, size);
  return {
    size,
    history,
    year: (y) => marchRodas4(system, mesh.width, y, work, history),
    tangent: () => tangentOf(system.jacobianInto, system, mesh.width, history),
  };
}

/**
 * Largest relative difference of two meshes, the finer of twice as many steps: at the coarser's step ends, and between them
 * against the cubic Hermite interpolation of the coarser, so that the estimate speaks of interpolated values too.
 */
function largestDifference(coarse: OnMesh, fine: OnMesh): number {
  const { size, mesh } = coarse.system;
  const fineTime = fine.system.mesh.time;
  const { value, rate } = coarse.map.history;
  let largest = 0;
  for (let step = 0; step < mesh.steps; step++) {
    const h = mesh.width[step];
    const x = (fineTime[2 * step + 1] - mesh.time[step]) / h;
    // Hermite weights of the two values and the two rates at x.
    const rise = x * x * (3 - 2 * x);
    const leave = h * x * (1 - x) * (1 - x);
    const arrive = -h * x * x * (1 - x);
    for (let i = 0; i < size; i++) {
      const a = step * size + i;
      const b = a + size;
      const between = value[a] + rise * (value[b] - value[a]) + leave * rate[a] + arrive * rate[b];
      const atEnd = fine.map.history.value[2 * step * size + i];
      const atMiddle = fine.map.history.value[(2 * step + 1) * size + i];
      const difference = Math.max(Math.abs(value[a] / atEnd - 1), Math.abs(between / atMiddle - 1));
      if (!(difference <= largest)) largest = difference;
    }
  }
  return largest;
}

function finished(on: OnMesh, errorEstimate: number, converged: boolean, yearEquivalents: number): ZonalState {
  const { system, map } = on;
  const tangent = map.tangent();
  const frozen = tangentOf(system.frozenJacobianInto, system, system.mesh.width, map.history);
  return {
    system,
    history: map.history,
    logMultiplier: tangent === null ? Number.NaN : logDominantMultiplier(tangent),
    frozenLogMultiplier: frozen === null ? Number.NaN : logDominantMultiplier(frozen),
    errorEstimate,
    converged,
    yearEquivalents,
  };
}
