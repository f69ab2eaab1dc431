/** Steps of one year, equal in the balanced anomaly, and the insolation of every band at every stage time of every step. */
import { meanFromBalanced } from '../../orbit/balanced.ts';
import { stageTimes } from '../../solve/rodas4.ts';
import type { Globe, World } from '../../world.ts';
import type { Bands } from './bands.ts';
import { bandInsolation } from './insolation.ts';

/** Stages at distinct times: the last two share the step's end. */
const distinctStages = 5;

export interface YearMesh {
  readonly steps: number;
  /** Step ends after periapsis, s; steps + 1. */
  readonly time: Float64Array;
  readonly width: Float64Array;
  /** W m⁻² at [(step × 5 + stage) × bands + band]. */
  readonly insolation: Float64Array;
  /** ∂/∂t of it at the start of each step, W m⁻² s⁻¹, at [step × bands + band]. */
  readonly insolationDrift: Float64Array;
}

export function yearMesh(world: World, globe: Globe, bands: Bands, steps: number): YearMesh {
  const { period, eccentricity } = world.orbit;
  const perRadian = period / (2 * Math.PI);
  const time = Float64Array.from(
    { length: steps + 1 },
    (_, i) => perRadian * meanFromBalanced((2 * Math.PI * i) / steps, eccentricity),
  );
  const width = time.slice(1).map((end, i) => end - time[i]);
  const insolation = new Float64Array(steps * distinctStages * bands.count);
  const insolationDrift = new Float64Array(steps * bands.count);
  const insolationAt = bandInsolation(world, globe, bands);
  const rowAt = (of: Float64Array, index: number) => of.subarray(index * bands.count, (index + 1) * bands.count);
  for (let step = 0; step < steps; step++) {
    const first = step * distinctStages;
    insolationAt.withDrift(time[step], rowAt(insolation, first), rowAt(insolationDrift, step));
    for (let stage = 1; stage < distinctStages - 1; stage++) {
      insolationAt.at(time[step] + stageTimes[stage] * width[step], rowAt(insolation, first + stage));
    }
    // The last stage of a step is the first of the next; a year closes on itself.
    if (step > 0) rowAt(insolation, first - 1).set(rowAt(insolation, first));
  }
  rowAt(insolation, steps * distinctStages - 1).set(rowAt(insolation, 0));
  return { steps, time, width, insolation, insolationDrift };
}
