/** Zonal worlds along one changing input: the unknowns are the temperatures at periapsis. */
import { SimError } from '../../error.ts';
import { instellation } from '../../instellation/instellation.ts';
import type { Family } from '../../solve/continuation.ts';
import type { StageHistory } from '../../solve/rodas4.ts';
import type { Globe, World } from '../../world.ts';
import type { TraceModel, TraceNumbers } from '../traceModel.ts';
import { areaMeanOf, iceFractionOf } from './areaMeans.ts';
import { isPhysical } from './climates.ts';
import { periodicStates } from './index.ts';
import { yearMap, zonalGrid } from './states.ts';
import { zonalSystem } from './system.ts';
import type { ZonalSystem } from './systemShape.ts';

/** Steps of a year while a branch is followed: coarser than a run's, the same for all of its points. */
const fewestSteps = 48;
const mostSteps = 384;

export const zonalTraceModel: TraceModel = {
  startsAt(world, tolerance) {
    const globe = globeOf(world);
    return periodicStates(world, globe, globe.bands, tolerance)
      .filter((state) => isPhysical(state) && state.logMultiplier < 0)
      .map(({ history, system }) => history.value.slice(0, system.size));
  },
  family(worldAt, { from, to }) {
    const steps = Math.max(stepsFor(worldAt(from)), stepsFor(worldAt(to)));
    const family = zonalFamily(worldAt, steps, (to - from) / 2, from);
    return {
      ...family,
      summarise: (p, y) => {
        const system = systemOf(worldAt(p), steps);
        const map = yearMap(system);
        return map.year(y.slice()) ? numbersOf(system, map.history) : null;
      },
    };
  },
};

/** Every year is marched in the same number of steps. */
export function zonalFamily(worldAt: (p: number) => World, steps: number, pScale: number, reference: number): Family {
  return {
    size: systemOf(worldAt(reference), steps).size,
    yScale: 30,
    pScale,
    at: (p) => yearMap(systemOf(worldAt(p), steps)),
  };
}

/**
 * The linearised year leads Newton's method along a branch only while a step of the march is short against what grows
 * fastest: thin ground whose ice melts in full light, with dT/dt = (∂A/∂T) S T/C.
 */
function stepsFor(world: World): number {
  const { frozenHeatCapacity, land } = globeOf(world);
  const { surface, star, orbit } = world;
  const { ramp, warm, ice } = surface.albedo;
  if (ramp === null) return fewestSteps;
  const stores = [surface.heatCapacity, frozenHeatCapacity, land?.heatCapacity].filter((store) => store != null);
  const steepest = (1.5 * Math.abs(ice - warm)) / Math.max(ramp.to - ramp.from, 1e-3);
  // A day's mean at the equator is 1/π of full light.
  const light = instellation(star.luminosity, orbit.semiMajorAxis * (1 - orbit.eccentricity)) / Math.PI;
  const growth = (orbit.period * steepest * light) / Math.min(...stores);
  let steps = fewestSteps;
  while (2 * steps < growth && steps < mostSteps) steps *= 2;
  return steps;
}

function numbersOf({ physics, mesh, size }: ZonalSystem, history: StageHistory): TraceNumbers {
  let mean = 0;
  let ice = 0;
  let highest = Number.NEGATIVE_INFINITY;
  let lowest = Number.POSITIVE_INFINITY;
  const { steps, width, time } = mesh;
  for (let step = 0; step < steps; step++) {
    const row = history.value.subarray(step * size, (step + 1) * size);
    // Trapezoidal rule round the year.
    const share = (width[step] + width[(step + steps - 1) % steps]) / (2 * time[steps]);
    const value = areaMeanOf(physics, row);
    mean += share * value;
    ice += share * iceFractionOf(physics, row);
    highest = Math.max(highest, value);
    lowest = Math.min(lowest, value);
  }
  return { temperatureMean: mean, temperatureMax: highest, temperatureMin: lowest, iceFraction: ice };
}

function systemOf(world: World, steps: number): ZonalSystem {
  const globe = globeOf(world);
  const grid = zonalGrid(world, globe, globe.bands);
  return zonalSystem(grid.physics, grid.mesh(steps));
}

function globeOf({ globe }: World): Globe {
  if (globe === null || globe === undefined) {
    throw new SimError('planet', 'the zonal model needs a globe', 'Give obliquity, rotationPeriod and heatTransport');
  }
  return globe;
}
