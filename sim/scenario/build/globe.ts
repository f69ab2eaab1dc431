/** What models with latitude ask of a planet → the globe of a World. */
import { legendreSeries } from '../../instellation/legendre.ts';
import type { Quantity } from '../../quantity/index.ts';
import type { ArealHeatCapacity, Radians, Seconds } from '../../si.ts';
import type { Albedo, Globe, Orbit } from '../../world.ts';
import { showRotation } from '../schema/planet.ts';
import type { Given } from './given.ts';
import type { GroundSetting } from './ground.ts';
import { buildHeatStore } from './heatStore.ts';
import { buildLand } from './land.ts';
import { siderealPeriod, solarDay } from './rotation.ts';
import { shown, shownNumber } from './show.ts';

/** What else is known of the planet; null what is not, or not yet. */
export interface GlobeSetting {
  readonly orbit: Orbit | null;
  readonly ground: GroundSetting | null;
  readonly albedo: Albedo | null;
  readonly heatCapacity: ArealHeatCapacity | null;
}

/** Null when something is missing or wrong. */
export function buildGlobe(given: Given, setting: GlobeSetting): Globe | null {
  given.use('planet.bands');
  const bands = given.keys.planet?.bands;
  const heatTransport = required(given, 'heatTransport', '0.65 W/m2/K');
  const obliquity = required(given, 'obliquity', '23 deg');
  const insolation = buildInsolation(given);
  const season = setting.orbit && buildSeason(given, setting.orbit.eccentricity);
  const day = buildSolarDay(given, setting.orbit, obliquity, insolation === 'daily');
  const albedoP2 = buildP2(given, setting.albedo);
  const frozen = buildFrozen(given, setting);
  const land = buildLand(given, setting.ground);
  if (bands === undefined || heatTransport === null || obliquity === null || !insolation || season === null)
    return null;
  if (!day || albedoP2 === null || !frozen || !land) return null;
  return {
    bands,
    obliquity,
    solarLongitudeOfPeriapsis: season,
    insolation,
    heatTransport,
    albedoP2,
    frozenHeatCapacity: frozen.heatCapacity,
    land: land.land,
    solarDay: day.length,
  };
}

function required(given: Given, name: 'heatTransport' | 'obliquity', example: string): number | null {
  const found = given.quantity(`planet.${name}`);
  return found ? found.value : missing(given, name, `Write ${name}, e.g. ${example}`);
}

function missing(given: Given, name: string, mend: string): null {
  return given.missing('planet', [name], `no ${name} is given, which model ${given.keys.model} needs`, mend);
}

/** Solar longitude at periapsis; a circle has no periapsis, and its year begins at the northern spring equinox. */
function buildSeason(given: Given, eccentricity: number): Radians | null {
  const found = given.quantity('planet.solarLongitudeOfPeriapsis');
  if (found) return found.value;
  if (eccentricity === 0) return 0;
  const mend = 'Write solarLongitudeOfPeriapsis, e.g. 250 deg; 0 deg is the northern spring equinox';
  return missing(given, 'solarLongitudeOfPeriapsis', mend);
}

function buildInsolation(given: Given): Globe['insolation'] | null {
  given.use('planet.insolation');
  const insolation = given.keys.planet?.insolation;
  if (insolation === undefined || typeof insolation === 'string') return insolation ?? null;
  const { legendre: coefficients } = insolation;
  const legendre = given.once('planet.insolation', () => readSeries(given, coefficients));
  return legendre && { legendre };
}

/** P12 is far beyond what bands of insolation need. */
const mostCoefficients = 13;

function readSeries(given: Given, coefficients: readonly Quantity[]): readonly number[] | null {
  const key = 'planet.insolation.legendre';
  const [first] = coefficients;
  if (!first) return given.wrong(key, 'the series is empty', 'Write e.g. [1, 0, -0.482]');
  if (coefficients.length > mostCoefficients) {
    const what = `the series has ${coefficients.length} coefficients`;
    return given.wrong(key, what, `Keep the first ${mostCoefficients}, P0 to P${mostCoefficients - 1}`);
  }
  if (first.value !== 1) {
    const mend = 'P0 carries the global mean, so that its coefficient is 1: divide all of them by the first';
    return given.wrong(key, `the series starts with ${first.text}`, mend);
  }
  const values = coefficients.map(({ value }) => value);
  const darkest = lowest(values);
  if (darkest.value >= -1e-9) return values;
  const what = `the series falls to ${shownNumber(darkest.value)} of the global mean at latitude ${shown(darkest.latitude, 'deg', 2)}`;
  return given.wrong(key, what, 'No insolation is below zero: correct the coefficients');
}

/** Where a series is least, at every half degree of latitude. */
function lowest(coefficients: readonly number[]): { value: number; latitude: Radians } {
  const places = Array.from({ length: 361 }, (_, i) => (Math.PI * (i - 180)) / 360);
  return places
    .map((latitude) => ({ latitude, value: legendreSeries(coefficients, Math.sin(latitude)) }))
    .reduce((best, place) => (place.value < best.value ? place : best));
}

/** The length is null where the star stands still in the sky; the whole is null where the rotation cannot be had. */
function buildSolarDay(
  given: Given,
  orbit: Orbit | null,
  obliquity: Radians | null,
  isDaily: boolean,
): { length: Seconds | null } | null {
  given.use('planet.rotationPeriod');
  const rotation = given.keys.planet?.rotationPeriod;
  if (!rotation) return missing(given, 'rotationPeriod', 'Write rotationPeriod, e.g. 26 h');
  if (!orbit || obliquity === null) return null;
  const length = solarDay(siderealPeriod(rotation, orbit), orbit.period, obliquity);
  const hasDay = length < longestDay * orbit.period;
  const needs = 'the mean over a day is not justified; it would need a model with longitude';
  if (isDaily && !hasDay) {
    given.warn(() => `rotationPeriod ${showRotation(rotation)}: the star stands still in the sky, so that ${needs}.`);
  } else if (isDaily && (rotation.form === 'resonance' || rotation.form === 'synchronous')) {
    given.warn(
      () =>
        `rotationPeriod ${showRotation(rotation)} ties the days to the orbit: each longitude has a climate of its own, and ${needs}.`,
    );
  }
  if (!hasDay) return { length: null };
  given.derive('planet.solarDay', length, 's', 'Solar day');
  return { length };
}

/** A day of so many orbits is a rounding error in the rotation. */
const longestDay = 1e6;

/** p2 P₂(sin latitude) runs from −p2/2 at the equator to p2 at the poles. */
function buildP2(given: Given, albedo: Albedo | null): number | null {
  given.use('planet.albedo.p2');
  const p2 = given.keys.planet?.albedo?.p2;
  if (!p2) return 0;
  if (!albedo) return null;
  for (const [place, value] of [
    ['the equator', albedo.warm - p2.value / 2],
    ['the poles', albedo.warm + p2.value],
  ] as const) {
    if (value >= 0 && value < 1) continue;
    const what = `warm ${shownNumber(albedo.warm)} and p2 ${p2.text} give an albedo of ${shownNumber(value)} at ${place}`;
    return given.wrong('planet.albedo.p2', what, 'Keep warm - p2/2 and warm + p2 at least 0 and below 1');
  }
  return p2.value;
}

function buildFrozen(given: Given, setting: GlobeSetting): { heatCapacity: ArealHeatCapacity | null } | null {
  if (!given.keys.planet?.frozenHeatStore) return given.has('planet.frozenHeatStore') ? null : { heatCapacity: null };
  const heatCapacity = buildHeatStore(given, setting.ground, 'frozenHeatStore');
  if (setting.albedo?.ramp === null) {
    const what = 'nothing says at which temperatures the sea is frozen';
    const mend = 'Write albedo: { warm: 0.3, ice: 0.62, from: 258 K, to: 273 K } for bondAlbedo; the ramp serves both';
    return given.wrong('planet.frozenHeatStore', what, mend);
  }
  if (heatCapacity === null) return null;
  const { heatCapacity: open } = setting;
  if (open !== null && heatCapacity > open) {
    given.warn(
      () =>
        `The frozen sea stores ${shown(heatCapacity, 'J/m2/K', 3)}, more than the open sea, ${shown(open, 'J/m2/K', 3)}: usually it is less.`,
    );
  }
  return { heatCapacity };
}
