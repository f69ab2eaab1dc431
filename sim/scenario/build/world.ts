/** The keys of one case → a World, how to solve it, and what to tell about it. */
import { stefanBoltzmann } from '../../constants.ts';
import { orbitMeanInverseSquare } from '../../orbit/averages.ts';
import type { Orbit, SolveOptions, Star, Surface, Window, World } from '../../world.ts';
import type { Desk, Given } from './given.ts';
import { buildHeatStore, surfaceGravity } from './heatStore.ts';
import { buildOrbit } from './orbit.ts';
import { buildOptions } from './solve.ts';
import { buildStar, type StarParts } from './star.ts';
import { buildSkin, type Skin } from './surface.ts';
import { buildWindows } from './windows.ts';

export interface Built {
  readonly world: World;
  readonly options: SolveOptions;
  readonly windows: readonly Window[];
}

/** Null when something is missing or wrong: the desk then holds what. */
export function buildWorld(given: Desk): Built | null {
  const parts = buildStar(given);
  const placed = buildOrbit(given, parts);
  const skin = buildSkin(given);
  const star = placed && finishStar(parts, placed.starMass);
  const slope = placed && radiativeSlope(parts, placed.orbit, skin);
  const heatCapacity = buildHeatStore(given, placed && { ...placed.orbit, radiativeSlope: slope });
  const windows = buildWindows(given, parts.temperature);
  const options = buildOptions(given);
  const surface = finishSurface(skin, heatCapacity);
  if (!placed || !star || !surface || !options) return null;
  const { orbit } = placed;
  derivePlanet(given, star, orbit, surface);
  const world = { star, orbit, surface };
  if (!isUsable(world, given)) return null;
  return { world, options, windows };
}

function finishStar({ luminosity, temperature, radius }: StarParts, mass: number): Star | null {
  return luminosity && { luminosity: luminosity.value, temperature, radius: radius?.value ?? null, mass };
}

function finishSurface(skin: Skin, heatCapacity: number | null): Surface | null {
  const { albedo, emission, absorbingFraction, internalHeat } = skin;
  if (!albedo || !emission || absorbingFraction === null || internalHeat === null || heatCapacity === null) return null;
  return { albedo, emission, absorbingFraction, internalHeat, heatCapacity };
}

/** dE/dT where the emission balances the orbit-mean absorption of an ice-free planet. */
function radiativeSlope(star: StarParts, orbit: Orbit, skin: Skin): number | null {
  const { albedo, emission, absorbingFraction, internalHeat } = skin;
  if (!star.luminosity || !albedo || !emission || absorbingFraction === null || internalHeat === null) return null;
  const atAxis = star.luminosity.value / (4 * Math.PI * orbit.semiMajorAxis ** 2);
  const absorbed = absorbingFraction * (1 - albedo.warm) * atAxis * orbitMeanInverseSquare(orbit.eccentricity);
  const slope = emission.slopeAt(emission.inverse(absorbed + internalHeat));
  return slope > 0 && Number.isFinite(slope) ? slope : null;
}

/** The textbook number [L(1−A)/(16πσa²)]^¼, warm albedo, and the gravity where mass and radius give it. */
function derivePlanet(given: Given, star: Star, orbit: Orbit, { albedo }: Surface): void {
  const kept = (star.luminosity * (1 - albedo.warm)) / (16 * Math.PI * stefanBoltzmann * orbit.semiMajorAxis ** 2);
  given.derive('planet.equilibriumTemperature', kept ** 0.25, 'K', 'Textbook equilibrium temperature');
  const gravity = surfaceGravity(given);
  if (gravity !== null) given.derive('planet.gravity', gravity, 'm/s2', 'Surface gravity');
}

/** The last guard: numbers that are each in bounds can still overflow, or vanish, together. */
function isUsable({ star, orbit, surface }: World, given: Desk): boolean {
  const positive = {
    'star.luminosity': star.luminosity,
    'star.temperature': star.temperature,
    'star.radius': star.radius,
    'star.mass': star.mass,
    'orbit.semiMajorAxis': orbit.semiMajorAxis,
    'orbit.period': orbit.period,
    'orbit.instellation': star.luminosity / (4 * Math.PI * orbit.semiMajorAxis ** 2),
    'planet.heatStore': surface.heatCapacity,
  };
  const bad =
    Object.entries(positive).find(([, value]) => value !== null && !(value > 0 && Number.isFinite(value))) ??
    given.derived.map(({ key, value }) => [key, value] as const).find(([, value]) => !Number.isFinite(value));
  if (bad)
    given.wrong(bad[0], `the inputs together give ${bad[1]}, which is no usable number`, 'Use the numbers of a planet');
  return !bad;
}
