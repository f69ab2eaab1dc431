/** Periodic states of a zonal world from a warm and a cold start. */

import { steadyAtAlbedo } from '../../findings/steadyState.ts';
import { instellation } from '../../instellation/instellation.ts';
import {
  logDominantMultiplier,
  type Settled,
  type SettleOptions,
  settlePeriodic,
  type YearMap,
} from '../../solve/periodicMap.ts';
import { marchRodas4, type StageHistory, stageHistory, stageWork } from '../../solve/rodas4.ts';
import { type SteppedTangent, type TangentStore, tangentOf, tangentStore } from '../../solve/tangent.ts';
import { largest } from '../../solve/vectors.ts';
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

const coarseSteps = 24;
/** Of the mesh on which a start is followed, and of any. */
const finestStart = 1536;
const finestSteps = 6144;
const largestStep = 4;
/** Years on one mesh: fewer on a finer one, so that a world that cannot settle is given up in bounded time. */
const maximumYears = (steps: number) => Math.min(60, Math.max(12, Math.ceil(20_000 / steps)));
/** By how much two meshes differ more than the finer one errs: at most, and where the gain by halving is not known yet. */
const bestSafety = 4;
const firstSafety = 2;
/** Steps beyond so many memories of a band: slopes from f multiply there what the march leaves, and halving gains little. */
const fastStep = 4;

/** Follows a start, K by band, to its periodic state; steps are doubled until two meshes agree to the tolerance. */
export function settleZonal(grid: ZonalGrid, bandStart: Float64Array, tolerance: number): ZonalState {
  const start = onSurfaces(grid.physics, bandStart);
  let years = 0;
  let steps = coarseSteps;
  // A year that hardly moves the world: the annual balance is all but its state.
  const deep = yearOverMemory(grid) < 1;
  const first = deep ? relaxToAnnualBalance(grid.physics, grid.mesh(steps), start) : start;
  const firstStep = deep ? 4 : 1;
  // Steps too coarse for the fastest bands may lose their way, or end where no finer ones do: then the way from the start is
  // tried again on finer ones.
  const fromStart = () => settleOn(grid, steps, first, { tolerance: 1e-2, firstStep, contraction: 1 });
  let previous = fromStart();
  let lastDifference = Number.NaN;
  for (;;) {
    years += previous.settled.years * steps;
    steps *= 2;
    const { converged: isThere, state, contraction } = previous.settled;
    if (!isThere && steps <= finestStart) {
      previous = fromStart();
      continue;
    }
    const fine = settleOn(grid, steps, state, {
      tolerance: 0.02 * tolerance * 250,
      firstStep: Number.POSITIVE_INFINITY,
      contraction,
    });
    const difference = largestDifference(previous, fine);
    const errorEstimate = difference / safety(fine, lastDifference / difference);
    const converged = fine.settled.converged && errorEstimate < tolerance;
    const isLost = !fine.settled.converged && 2 * steps > finestStart;
    if (converged || isLost || 2 * steps > finestSteps) {
      return finished(fine, errorEstimate, converged, years / steps + fine.settled.years);
    }
    lastDifference = fine.settled.converged ? difference : Number.NaN;
    previous = fine;
  }
}

/** Rodas4 gains 2⁴ by halving its steps; kinks of polar night and narrow ramps leave less, as the gain before shows. */
function safety({ system, map, settled: { tangent } }: OnMesh, gain: number): number {
  if (tangent !== null && fastestRate(system, map, tangent) * largest(system.mesh.width) > fastStep) return 1;
  return Number.isNaN(gain) ? firstSafety : Math.min(bestSafety, Math.max(1, gain - 1));
}

/** 1 over the shortest memory of a store, in the mean of the year: transport between fine bands is stiff, but forgets nothing. */
function fastestRate(system: ZonalSystem, { history }: ZonalYearMap, { meanJacobian }: SteppedTangent): number {
  const rates = new Float64Array(system.size);
  system.transportRatesInto(history.value.subarray(0, system.size), rates);
  const main = meanJacobian.diagonals[system.width];
  return largest(rates.map((rate, i) => rate + main[i]));
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
  readonly map: ZonalYearMap;
  readonly settled: Settled<SteppedTangent>;
}

type HowToSettle = Pick<SettleOptions, 'tolerance' | 'firstStep' | 'contraction'>;

function settleOn(grid: ZonalGrid, steps: number, start: Float64Array, how: HowToSettle): OnMesh {
  const mesh = grid.mesh(steps);
  const system = zonalSystem(grid.physics, mesh);
  const map = yearMap(system);
  const settled = settlePeriodic(map, start, { ...how, largestStep, maximumYears: maximumYears(steps) });
  if (settled.converged && settled.tangent !== null) map.move(settled.tangent, settled.change);
  return { system, map, settled };
}

export interface ZonalYearMap extends YearMap<SteppedTangent> {
  /** The tangent with the albedo held; takes the room of the other. */
  frozenTangent(): SteppedTangent | null;
  /** Moves the last history by a small change of its start. */
  move(tangent: SteppedTangent, change: Float64Array): void;
}

export function yearMap(system: ZonalSystem): ZonalYearMap {
  const { mesh, size } = system;
  const work = stageWork(size, system.width);
  const history = stageHistory(mesh.steps, size);
  let store: TangentStore | null = null;
  const tangent = (jacobian: ZonalSystem['jacobianInto']) => {
    store ??= tangentStore(mesh.steps, size, system.width);
    return tangentOf(jacobian, system, mesh.width, history, store);
  };
  return {
    size,
    history,
    year: (y) => marchRodas4(system, mesh.width, y, work, history),
    tangent: () => tangent(system.jacobianInto),
    frozenTangent: () => tangent(system.frozenJacobianInto),
    move(along, change) {
      along.addAlong(change, history.value);
      for (let step = 0; step <= mesh.steps; step++) {
        const row = (values: Float64Array) => values.subarray(step * size, (step + 1) * size);
        system.rateInto(step % mesh.steps, 0, row(history.value), row(history.rate));
      }
    },
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
  let most = 0;
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
      if (!(difference <= most)) most = difference;
    }
  }
  return most;
}

function finished(on: OnMesh, errorEstimate: number, converged: boolean, yearEquivalents: number): ZonalState {
  const { system, map, settled } = on;
  const tangent = settled.tangent ?? map.tangent();
  const logMultiplier = tangent === null ? Number.NaN : logDominantMultiplier(tangent);
  const frozen = map.frozenTangent();
  return {
    system,
    history: map.history,
    logMultiplier,
    frozenLogMultiplier: frozen === null ? Number.NaN : logDominantMultiplier(frozen),
    errorEstimate,
    converged,
    yearEquivalents,
  };
}
