/** What a reader of a zonal result must know before using it. */
import { zeroCelsius } from '../../constants.ts';
import type { Curve } from '../../solve/curve.ts';
import { extremes } from '../../solve/features.ts';
import type { Globe, World } from '../../world.ts';
import type { ZonalYear } from './year.ts';

export function zonalWarnings(world: World, globe: Globe, years: readonly ZonalYear[]): string[] {
  return [...dailyMeanWarnings(world, globe), ...albedoWarnings(globe), ...emissionWarnings(world, years)];
}

/** The daily mean stands for a day only while neither the season nor the ground moves much within it. */
function dailyMeanWarnings(world: World, globe: Globe): string[] {
  const { solarDay } = globe;
  if (globe.insolation !== 'daily' || solarDay === null) return [];
  const { period, eccentricity } = world.orbit;
  const warnings: string[] = [];
  // ν̇ at periapsis: n √(1+e)/(1−e)^{3/2}
  const fastest = ((360 / period) * Math.sqrt(1 + eccentricity)) / (1 - eccentricity) ** 1.5;
  const perDay = fastest * solarDay;
  if (perDay > 5) {
    warnings.push(
      `Near periapsis the planet moves ${perDay.toPrecision(3)}° within one solar day (limit 5°): the daily mean is not justified there; it would need a model with hours.`,
    );
  }
  const { surface } = world;
  const stores = [surface.heatCapacity, globe.frozenHeatCapacity, globe.land?.heatCapacity];
  const smallest = Math.min(...stores.filter((store) => store !== null && store !== undefined));
  const mean = world.star.luminosity / (16 * Math.PI * world.orbit.semiMajorAxis ** 2);
  const temperature = surface.emission.inverse(mean * (1 - surface.albedo.warm) + surface.internalHeat);
  const memory = smallest / surface.emission.slopeAt(temperature);
  if (solarDay > memory / 10) {
    warnings.push(
      `The solar day is ${(solarDay / memory).toPrecision(2)} of the radiative time of the smallest store (limit 0.1): day and night differ; it would need a model with hours.`,
    );
  }
  return warnings;
}

function albedoWarnings(globe: Globe): string[] {
  const tilt = Math.min(globe.obliquity, Math.PI - globe.obliquity) * (180 / Math.PI);
  if (globe.albedoP2 === 0 || tilt <= 40) return [];
  return [
    `The latitude term p2 of the albedo is tuned to the Earth; at an obliquity of ${tilt.toFixed(0)}° it has no meaning.`,
  ];
}

function emissionWarnings(world: World, years: readonly ZonalYear[]): string[] {
  const { validity } = world.surface.emission;
  if (validity === null) return [];
  const found = years.flatMap(surfaceCurves).map(extremes);
  const lowest = Math.min(...found.map(({ lowest: point }) => point.value));
  const highest = Math.max(...found.map(({ highest: point }) => point.value));
  if (lowest >= validity.from && highest <= validity.to) return [];
  const celsius = (kelvin: number) => (kelvin - zeroCelsius).toFixed(0);
  return [
    `Local temperatures run from ${celsius(lowest)} to ${celsius(highest)} °C, beyond the ${celsius(validity.from)} to ${celsius(validity.to)} °C for which the emission law is published.`,
  ];
}

/** Of every surface that is there. */
function surfaceCurves({ curves: { sea, land }, physics }: ZonalYear): Curve[] {
  const fraction = physics.land?.fraction;
  if (land === null || fraction === undefined) return [...sea];
  return [...sea.filter((_, i) => fraction[i] < 1), ...land.filter((_, i) => fraction[i] > 0)];
}
