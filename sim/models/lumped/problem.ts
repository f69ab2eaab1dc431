/**
 * The lumped world as an equation in the balanced anomaly s (0 at periapsis):
 *
 *   dT/ds = P/(2πC) · [ f S_a (1 − A(T)) (a/r)² dM/ds − (E(T) − H) dM/ds ],
 *
 * with S_a the instellation at distance a, f the absorbing fraction, A the albedo, E the emission, H the internal heat,
 * C the heat capacity and P the period. It is C dT/dt = f(1−A)S + H − E written with dt = P/(2π) (dM/ds) ds.
 */
import { SimError } from '../../error.ts';
import { instellation } from '../../instellation/instellation.ts';
import { forcingAt } from '../../orbit/forcing.ts';
import type { Flux } from '../../si.ts';
import type { Separable } from '../../solve/separable.ts';
import type { World } from '../../world.ts';

/** Instellation at distance a, W m⁻². */
export function instellationAtAxis(world: World): Flux {
  return instellation(world.star.luminosity, world.orbit.semiMajorAxis);
}

/** P/(2πC), K per (W m⁻²) and radian of mean anomaly. */
export function pacing(world: World): number {
  return world.orbit.period / (2 * Math.PI * world.surface.heatCapacity);
}

export function requireSomeHeat(world: World): void {
  const { albedo, internalHeat } = world.surface;
  if (albedo.warm >= 1 && internalHeat <= 0) {
    throw new SimError(
      'planet',
      'nothing heats this planet: it absorbs nothing and has no internal heat',
      'Lower the albedo or give internalHeat',
    );
  }
}

export function lumpedEquation(world: World): Separable {
  const { surface, orbit } = world;
  const { albedo, emission, internalHeat } = surface;
  const arriving = surface.absorbingFraction * instellationAtAxis(world);
  return {
    rate: pacing(world),
    drive: forcingAt(orbit.eccentricity),
    breaks: albedo.breaks,
    gain: (temperature, piece) => arriving * (1 - albedo.pieces[piece].at(temperature)),
    gainSlope: (temperature, piece) => -arriving * albedo.pieces[piece].slopeAt(temperature),
    loss: (temperature) => emission.at(temperature) - internalHeat,
    lossSlope: (temperature) => emission.slopeAt(temperature),
    floor: 0,
  };
}

/** First mesh of the all-at-once solvers: about six nodes per e-folding width of the periapsis passage. */
export function firstMeshSize(eccentricity: number): number {
  if (eccentricity < 0.97) return 16;
  return eccentricity < 0.997 ? 32 : 64;
}
