/** Zonal worlds along one changing input: the unknowns are the temperatures at periapsis. */
import { SimError } from '../../error.ts';
import type { Family } from '../../solve/continuation.ts';
import type { Globe, World } from '../../world.ts';
import type { TraceModel } from '../traceModel.ts';
import { areaMeanOf, iceFractionOf } from './areaMeans.ts';
import { periodicStates } from './index.ts';
import { yearMap, zonalGrid } from './states.ts';
import { zonalSystem } from './system.ts';

/** Steps of a year while a branch is followed: coarser than a run's, the same for all of its points. */
const traceSteps = 48;

export const zonalTraceModel: TraceModel = {
  startsAt(world, tolerance) {
    const globe = globeOf(world);
    return periodicStates(world, globe, globe.bands, tolerance)
      .filter(({ logMultiplier }) => logMultiplier < 0)
      .map(({ history, system }) => history.value.slice(0, system.size));
  },
  family: (worldAt, pScale, reference) => zonalFamily(worldAt, traceSteps, pScale, reference),
  summarise(world, { map }) {
    const { physics, mesh, size } = zonalSystemOf(world);
    let mean = 0;
    let ice = 0;
    let highest = Number.NEGATIVE_INFINITY;
    let lowest = Number.POSITIVE_INFINITY;
    const { steps, width, time } = mesh;
    for (let step = 0; step < steps; step++) {
      const row = map.history.value.subarray(step * size, (step + 1) * size);
      // Trapezoidal rule round the year.
      const share = (width[step] + width[(step + steps - 1) % steps]) / (2 * time[steps]);
      const value = areaMeanOf(physics, row);
      mean += share * value;
      ice += share * iceFractionOf(physics, row);
      highest = Math.max(highest, value);
      lowest = Math.min(lowest, value);
    }
    return { temperatureMean: mean, temperatureMax: highest, temperatureMin: lowest, iceFraction: ice };
  },
};

/** Every year is marched in the same number of steps. */
export function zonalFamily(worldAt: (p: number) => World, steps: number, pScale: number, reference: number): Family {
  return {
    size: zonalSystemOf(worldAt(reference)).size,
    yScale: 30,
    pScale,
    at: (p) => yearMap(zonalSystemOf(worldAt(p), steps)),
  };
}

function zonalSystemOf(world: World, steps = traceSteps) {
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
