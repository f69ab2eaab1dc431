/** Steps of one year, equal in the balanced anomaly, and the insolation of every band at every stage time of every step. */
import { instellation } from '../../instellation/instellation.ts';
import {
  balancedFromMean,
  distanceRatioFromBalanced,
  meanFromBalanced,
  trueFromBalanced,
} from '../../orbit/balanced.ts';
import type { Flux, Radians, Seconds } from '../../si.ts';
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
  const at = bandInsolation(world, globe, bands);
  const row = new Float64Array(bands.count);
  for (let step = 0; step < steps; step++) {
    for (let stage = 0; stage < distinctStages; stage++) {
      const offset = (step * distinctStages + stage) * bands.count;
      if (stage === 0 && step > 0) {
        insolation.copyWithin(offset, offset - bands.count, offset);
        continue;
      }
      at(time[step] + stageTimes[stage] * width[step], row);
      insolation.set(row, offset);
    }
    driftInto(
      at,
      time[step],
      1e-4 * perRadian,
      row,
      insolationDrift.subarray(step * bands.count, (step + 1) * bands.count),
    );
  }
  return { steps, time, width, insolation, insolationDrift };
}

/** Central difference over `reach` either way: relative error 1e-8, far below the method's own. */
function driftInto(
  at: (time: Seconds, row: Float64Array) => void,
  time: Seconds,
  reach: Seconds,
  row: Float64Array,
  drift: Float64Array,
): void {
  at(time + reach, drift);
  at(time - reach, row);
  for (let i = 0; i < drift.length; i++) drift[i] = (drift[i] - row[i]) / (2 * reach);
}

/** Where the planet is at a time: true anomaly and instellation. */
export function placeAt(world: World, time: Seconds): { trueAnomaly: Radians; instellation: Flux } {
  const { orbit, star } = world;
  const s = balancedFromMean((2 * Math.PI * time) / orbit.period, orbit.eccentricity);
  const distance = orbit.semiMajorAxis * distanceRatioFromBalanced(s, orbit.eccentricity);
  return {
    trueAnomaly: trueFromBalanced(s, orbit.eccentricity),
    instellation: instellation(star.luminosity, distance),
  };
}
