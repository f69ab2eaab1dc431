/**
 * When the temperature changes fastest. The rate is the heating over the heat capacity, dT/dt = N(T, S)/C, so the extreme is
 * the root of dN/ds = f(1−A) dS/ds − (E′ + f S A′) dT/ds, found to rounding rather than read off samples.
 */
import type { Finding } from '../../findings/finding.ts';
import { forcingAt } from '../../orbit/forcing.ts';
import type { Kelvin, Radians } from '../../si.ts';
import { type Curve, curveValue, emptyPiece, loadPiece, pieceValue } from '../../solve/curve.ts';
import { rootBetween } from '../../solve/roots.ts';
import { forcingPoint } from '../../solve/separable.ts';
import type { World } from '../../world.ts';
import { netHeating } from '../steadyState.ts';
import type { OrbitClock } from './clock.ts';
import { instellationAtAxis, pacing } from './problem.ts';
import type { Trajectory } from './trajectory.ts';

const samplesPerPiece = 4;

export function fastestChanges(world: World, trajectory: Trajectory, clock: OrbitClock, moving: boolean): Finding[] {
  const warming = { rate: 'fastestWarming', time: 'timeOfFastestWarming', label: 'Fastest warming' };
  const cooling = { rate: 'fastestCooling', time: 'timeOfFastestCooling', label: 'Fastest cooling' };
  return [
    ...fastest(world, trajectory, clock, moving, 1, warming),
    ...fastest(world, trajectory, clock, moving, -1, cooling),
  ];
}

function fastest(
  world: World,
  trajectory: Trajectory,
  clock: OrbitClock,
  moving: boolean,
  sign: 1 | -1,
  names: { readonly rate: string; readonly time: string; readonly label: string },
): Finding[] {
  const rate = { name: names.rate, unit: 'K/s', label: names.label };
  const time = { name: names.time, unit: 's', label: `Time of ${names.label.toLowerCase()}` };
  if (!moving) {
    return [
      { ...rate, value: 0 },
      { ...time, value: null, reason: 'the temperature does not vary' },
    ];
  }
  const { curve, errorEstimate } = trajectory;
  const s = placeOfFastest(world, curve, clock, sign);
  const temperature = curveValue(curve, s);
  const flux = clock.instellation(s);
  const { heatCapacity } = world.surface;
  const value = netHeating(world.surface, flux, temperature) / heatCapacity;
  const shifted = netHeating(world.surface, flux, temperature * (1 + errorEstimate)) / heatCapacity;
  const since = clock.mean(s) - clock.mean(curve.position[0]);
  return [
    { ...rate, value, plusMinus: Math.abs(shifted - value) },
    { ...time, value: since * clock.secondsPerRadian },
  ];
}

function placeOfFastest(world: World, curve: Curve, clock: OrbitClock, sign: 1 | -1): Radians {
  const positions: Radians[] = [];
  const temperatures: Kelvin[] = [];
  const piece = emptyPiece();
  for (let index = 0; index + 1 < curve.position.length; index++) {
    loadPiece(curve, index, piece);
    for (let k = 0; k <= samplesPerPiece; k++) {
      const x = k / samplesPerPiece;
      positions.push(piece.left + x * piece.width);
      temperatures.push(pieceValue(piece, x));
    }
  }
  const heating = positions.map((s, i) => sign * netHeating(world.surface, clock.instellation(s), temperatures[i]));
  let best = 0;
  for (let i = 1; i < heating.length; i++) if (heating[i] > heating[best]) best = i;
  const change = changeOfHeating(world, curve);
  const low = positions[Math.max(0, best - 1)];
  const high = positions[Math.min(positions.length - 1, best + 1)];
  return sign * change(low) > 0 && sign * change(high) < 0 ? rootBetween(change, low, high) : positions[best];
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
