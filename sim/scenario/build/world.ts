/** The keys of one case → a World, how to solve it, and what to tell about it. */

import { stefanBoltzmann } from '../../constants.ts';
import { instellation } from '../../instellation/instellation.ts';
import { models } from '../../models/index.ts';
import type { ModelAsks } from '../../models/model.ts';
import { orbitMeanInverseSquare } from '../../orbit/averages.ts';
import type { Globe, Orbit, SolveOptions, Star, Surface, Window, World } from '../../world.ts';
import type { Desk, Given } from './given.ts';
import { buildGlobe } from './globe.ts';
import { buildHeatStore, surfaceGravity } from './heatStore.ts';
import { isAllLand } from './land.ts';
import { buildOrbit } from './orbit.ts';
import { buildOptions } from './solve.ts';
import { buildStar, type StarParts } from './star.ts';
import { unusable } from './strictDesk.ts';
import { buildSkin, type Skin } from './surface.ts';
import { buildWindows } from './windows.ts';

export interface Built {
  readonly world: World;
  readonly options: SolveOptions;
  readonly windows: readonly Window[];
}

/** Null when something is missing or wrong: the desk then holds what. */
export function buildWorld(given: Desk): Built | null {
  const asks = models[given.keys.model ?? '']?.asks ?? anyModel;
  const parts = buildStar(given);
  const placed = buildOrbit(given, parts);
  const skin = buildSkin(given, asks.absorbingFraction);
  const star = placed && finishStar(parts, placed.starMass);
  const slope = placed && radiativeSlope(parts, placed.orbit, skin);
  const ground = placed && { ...placed.orbit, radiativeSlope: slope };
  const heatCapacity = buildHeatStore(given, ground);
  const orbit = placed?.orbit ?? null;
  const globe = asks.globe ? buildGlobe(given, { orbit, ground, albedo: skin.albedo, heatCapacity }) : null;
  const windows = buildWindows(given, parts);
  const options = given.once('solve', () => buildOptions(given, asks.start));
  const surface = finishSurface(skin, heatCapacity);
  if (!orbit || !star || !surface || !options || (asks.globe && !globe)) return null;
  derivePlanet(given, star, orbit, surface);
  const world = globe === null ? { star, orbit, surface } : withGlobe(given, { star, orbit, surface }, globe);
  if (!isUsable(world, given) || !fits(globe, options, given)) return null;
  return { world, options, windows };
}

/** What a scenario is held to whose model is not known: an error that is told elsewhere. */
const anyModel: ModelAsks = { absorbingFraction: true, globe: false, start: true };

/** A globe of land alone has one heat store, that of the land, and no sea that freezes. */
function withGlobe(given: Given, world: World, globe: Globe): World {
  if (globe.land === null || !isAllLand(globe.land)) return { ...world, globe };
  given.passOver('planet.heatStore', 'planet.frozenHeatStore');
  const { heatCapacity } = globe.land;
  return {
    ...world,
    surface: { ...world.surface, heatCapacity },
    globe: { ...globe, land: null, frozenHeatCapacity: null },
  };
}

/** Values that one field of latitude and time may have: a hundred megabytes of them stand in a report. */
const mostFieldValues = 2_000_000;

function fits(globe: Globe | null, { samples }: SolveOptions, given: Given): boolean {
  const values = (globe?.bands ?? 0) * samples;
  if (values <= mostFieldValues) return true;
  const what = `${samples} samples of ${globe?.bands} bands make ${values} values a field, more than ${mostFieldValues}`;
  given.wrong('solve.samples', what, 'Lower samples or planet.bands');
  return false;
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
  const atAxis = instellation(star.luminosity.value, orbit.semiMajorAxis);
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
function isUsable({ star, orbit, surface, globe }: World, given: Desk): boolean {
  const positive: readonly (readonly [key: string, value: number | null | undefined])[] = [
    ['star.luminosity', star.luminosity],
    ['star.temperature', star.temperature],
    ['star.radius', star.radius],
    ['star.mass', star.mass],
    ['orbit.semiMajorAxis', orbit.semiMajorAxis],
    ['orbit.period', orbit.period],
    ['orbit.instellation', instellation(star.luminosity, orbit.semiMajorAxis)],
    ['planet.heatStore', surface.heatCapacity],
    ['planet.landHeatStore', globe?.land?.heatCapacity],
    ['planet.frozenHeatStore', globe?.frozenHeatCapacity],
    ['planet.rotationPeriod', globe?.solarDay],
  ];
  const bad =
    positive.find(([, value]) => value != null && !(value > 0 && Number.isFinite(value))) ??
    given.derived.map(({ key, value }) => [key, value] as const).find(([, value]) => !Number.isFinite(value));
  if (bad) given.wrong(bad[0], `the inputs together give ${bad[1]}, which is no usable number`, unusable);
  return !bad;
}
