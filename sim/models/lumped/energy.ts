/** The energy account of a trajectory by Gauss–Legendre quadrature, which no solver here uses. */

import { accountReference } from '../../findings/accountReference.ts';
import type { Curve } from '../../solve/curve.ts';
import { integrate } from '../../solve/features.ts';
import type { World } from '../../world.ts';
import type { EnergyBalance } from '../model.ts';
import type { OrbitClock } from './clock.ts';

/** Means over the curve's span, W m⁻². */
export function energyBalance(world: World, curve: Curve, clock: OrbitClock): EnergyBalance {
  const { surface } = world;
  const start = curve.position[0];
  const end = curve.position[curve.position.length - 1];
  const span = clock.mean(end) - clock.mean(start);
  const mean = (f: (s: number, temperature: number) => number) =>
    integrate(curve, (s, temperature) => f(s, temperature) * clock.pace(s)) / span;
  const absorbed = mean(
    (s, temperature) => surface.absorbingFraction * clock.instellation(s) * (1 - surface.albedo.at(temperature)),
  );
  const emitted = mean((_, temperature) => surface.emission.at(temperature));
  const rise = curve.value[curve.value.length - 1] - curve.value[0];
  const stored = (surface.heatCapacity * rise) / (span * clock.secondsPerRadian);
  const internalHeat = surface.internalHeat;
  const reference = accountReference(absorbed, emitted, stored);
  const relativeDifference = Math.abs(absorbed + internalHeat - emitted - stored) / reference;
  return { absorbed, internalHeat, emitted, stored, relativeDifference };
}
