/**
 * When the temperature changes fastest. The rate is the heating over the heat capacity, dT/dt = N(T, S)/C, so the extreme is
 * the root of dN/ds = f(1−A) dS/ds − (E′ + f S A′) dT/ds, found to rounding rather than read off samples.
 */
import { enter, enterUndefined, type Sheet } from '../../findings/sheet.ts';
import { netHeating } from '../../findings/steadyState.ts';
import { forcingAt } from '../../orbit/forcing.ts';
import type { Radians } from '../../si.ts';
import { type Curve, curveValue, curveValuesInto } from '../../solve/curve.ts';
import { rootBetween } from '../../solve/roots.ts';
import { forcingPoint } from '../../solve/separable.ts';
import type { World } from '../../world.ts';
import { type OrbitClock, timeAt } from './clock.ts';
import { at } from './columns.ts';
import { enterNoChange, still } from './entries.ts';
import { instellationAtAxis, pacing } from './problem.ts';
import type { Trajectory } from './trajectory.ts';

const samplesPerPiece = 4;

export function enterFastestChanges(
  world: World,
  trajectory: Trajectory,
  clock: OrbitClock,
  moving: boolean,
  sheet: Sheet,
): void {
  if (!moving) {
    enterNoChange(sheet, still);
    return;
  }
  enterFastest(world, trajectory, clock, 1, at.fastestWarming, at.timeOfFastestWarming, sheet);
  enterFastest(world, trajectory, clock, -1, at.fastestCooling, at.timeOfFastestCooling, sheet);
}

function enterFastest(
  world: World,
  trajectory: Trajectory,
  clock: OrbitClock,
  sign: 1 | -1,
  rateColumn: number,
  timeColumn: number,
  sheet: Sheet,
): void {
  const { curve, errorEstimate } = trajectory;
  const s = placeOfFastest(world, trajectory, clock, sign);
  const temperature = curveValue(curve, s);
  const flux = clock.instellation(s);
  const { heatCapacity } = world.surface;
  const value = netHeating(world.surface, flux, temperature) / heatCapacity;
  const shifted = netHeating(world.surface, flux, temperature * (1 + errorEstimate)) / heatCapacity;
  if (sign * value <= 0) {
    const reason = `the temperature only ${sign === 1 ? 'falls' : 'rises'}`;
    enterUndefined(sheet, rateColumn, reason);
    enterUndefined(sheet, timeColumn, reason);
    return;
  }
  enter(sheet, rateColumn, value, Math.abs(shifted - value));
  enter(sheet, timeColumn, timeAt(trajectory, clock, s));
}

/** The best of the samples, and then the root of the change of heating beside it. */
function placeOfFastest(world: World, { curve, logMultiplier }: Trajectory, clock: OrbitClock, sign: 1 | -1): Radians {
  const positions = samplePositions(curve);
  const temperatures = new Float64Array(positions.length);
  curveValuesInto(curve, positions, temperatures);
  const heating = positions.map((s, i) => sign * netHeating(world.surface, clock.instellation(s), temperatures[i]));
  let best = 0;
  for (let i = 1; i < heating.length; i++) if (heating[i] > heating[best]) best = i;
  const change = changeOfHeating(world, curve);
  const last = positions.length - 1;
  const isPeriodic = logMultiplier !== null;
  // Index of the left sample of the intervals before and after; round the orbit where that closes.
  const before = best > 0 ? best - 1 : isPeriodic ? last - 1 : best;
  const after = best < last ? best : isPeriodic ? 0 : best - 1;
  for (const left of [before, after]) {
    const low = positions[left];
    const high = positions[left + 1];
    if (sign * change(low) > 0 && sign * change(high) < 0) return rootBetween(change, low, high);
  }
  return positions[best];
}

/** Several places in every piece, and the end; increasing. */
function samplePositions({ position }: Curve): Float64Array {
  const pieces = position.length - 1;
  const positions = new Float64Array(samplesPerPiece * pieces + 1);
  for (let index = 0; index < pieces; index++) {
    const width = position[index + 1] - position[index];
    for (let k = 0; k < samplesPerPiece; k++) {
      positions[samplesPerPiece * index + k] = position[index] + (k / samplesPerPiece) * width;
    }
  }
  positions[samplesPerPiece * pieces] = position[pieces];
  return positions;
}

/** dN/ds along the curve. */
function changeOfHeating(world: World, curve: Curve): (s: Radians) => number {
  const { surface, orbit } = world;
  const atAxis = instellationAtAxis(world);
  const forcing = forcingAt(orbit.eccentricity);
  const point = forcingPoint();
  return (s) => {
    forcing(s, point);
    const temperature = curveValue(curve, s);
    const flux = (atAxis * point.arrival) / point.clock;
    const fluxSlope = flux * (point.arrivalSlope / point.arrival - point.clockSlope / point.clock);
    const heating = netHeating(surface, flux, temperature);
    const temperatureSlope = pacing(world) * point.clock * heating;
    const absorbed = surface.absorbingFraction * (1 - surface.albedo.at(temperature)) * fluxSlope;
    const feedback = surface.absorbingFraction * flux * surface.albedo.slopeAt(temperature);
    return absorbed - (surface.emission.slopeAt(temperature) + feedback) * temperatureSlope;
  };
}
