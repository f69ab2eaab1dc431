/** Orbit keys → the orbit of a World, and what follows from it. */

import { metresPerAu } from '../../constants.ts';
import { instellation } from '../../instellation/instellation.ts';
import { orbitMeanInverseSquare } from '../../orbit/averages.ts';
import type { Orbit } from '../../world.ts';
import { buildPeriapsisTime } from './epoch.ts';
import type { Given } from './given.ts';
import { buildShape, type Shape } from './shape.ts';
import { shown, shownNumber } from './show.ts';
import { buildSize, type Size } from './size.ts';
import type { StarParts } from './star.ts';

/** Nearer than this, in stellar radii, the star is no point of light and its tides deform the planet. */
const nearStar = 3;

export interface BuiltOrbit {
  readonly orbit: Orbit;
  readonly starMass: number;
}

export function buildOrbit(given: Given, star: StarParts): BuiltOrbit | null {
  const shape = buildShape(given);
  const size = buildSize(given, star);
  if (!shape || !size) return null;
  deriveOrbit(given, star, shape, size);
  checkAxis(given, size);
  checkPeriapsis(given, star, shape, size);
  const orbit = {
    semiMajorAxis: size.semiMajorAxis,
    period: size.period,
    eccentricity: shape.eccentricity,
    argumentOfPeriapsis: shape.argumentOfPeriapsis,
    inclination: given.keys.orbit?.inclination?.value ?? null,
    periapsisTime: buildPeriapsisTime(given, shape, size.period),
  };
  return { orbit, starMass: size.starMass };
}

function deriveOrbit(given: Given, star: StarParts, { eccentricity }: Shape, { semiMajorAxis }: Size): void {
  const [near, far] = [semiMajorAxis * (1 - eccentricity), semiMajorAxis * (1 + eccentricity)];
  given.derive('orbit.periapsisDistance', near, 'm', 'Distance at periapsis');
  given.derive('orbit.apoapsisDistance', far, 'm', 'Distance at apoapsis');
  if (!star.luminosity) return;
  const luminosity = star.luminosity.value;
  const atAxis = instellation(luminosity, semiMajorAxis);
  given.derive('orbit.instellation', atAxis, 'W/m2', 'Instellation at distance a');
  const mean = atAxis * orbitMeanInverseSquare(eccentricity);
  given.derive('orbit.orbitMeanInstellation', mean, 'W/m2', 'Orbit-mean instellation');
  given.derive('orbit.periapsisInstellation', instellation(luminosity, near), 'W/m2', 'Instellation at periapsis');
  given.derive('orbit.apoapsisInstellation', instellation(luminosity, far), 'W/m2', 'Instellation at apoapsis');
}

/** Wider, passing stars would have taken the planet away. */
const widestOrbit = 1e5 * metresPerAu;

function checkAxis(given: Given, { semiMajorAxis }: Size): void {
  if (semiMajorAxis <= widestOrbit) return;
  given.warn(
    () =>
      `A semi-major axis of ${shown(semiMajorAxis, 'au', 3)} is wider than the orbits that stars can hold, some 1e5 au. Is its unit right?`,
  );
}

function checkPeriapsis(given: Given, star: StarParts, { eccentricity }: Shape, { semiMajorAxis }: Size): void {
  if (!star.radius) return;
  const radii = (semiMajorAxis * (1 - eccentricity)) / star.radius.value;
  if (radii <= 1) {
    const key = ['eccentricity', 'eCosOmega', 'sqrtECosOmega'].find((name) => given.has(`orbit.${name}`));
    const what = `periapsis lies inside the star, at ${shownNumber(radii, 3)} of its radii from the centre`;
    given.wrong(`orbit.${key ?? 'eccentricity'}`, what, 'Lower the eccentricity or widen the orbit');
  } else if (radii < nearStar) {
    given.warn(
      () =>
        `Periapsis lies ${shownNumber(radii, 3)} stellar radii from the centre of the star: nearer than ${nearStar}, where the star is no point of light and tides matter.`,
    );
  }
}
