/** Insolation of every band at a time: the daily mean, the annual mean, or a Legendre series, each as its exact band mean. */
import { annualMeanBandsInto } from '../../instellation/annualMean.ts';
import { bandMeanFactorInto } from '../../instellation/bandMean.ts';
import { orbitMeanInstellation } from '../../instellation/instellation.ts';
import { legendreSeriesBandsInto } from '../../instellation/legendre.ts';
import { sinDeclination, solarLongitude } from '../../instellation/season.ts';
import type { Seconds } from '../../si.ts';
import type { Globe, World } from '../../world.ts';
import type { Bands } from './bands.ts';
import { placeAt } from './mesh.ts';

/** Returns a function that overwrites its last argument with W m⁻² per band at a time after periapsis. */
export function bandInsolation(world: World, globe: Globe, bands: Bands): (time: Seconds, into: Float64Array) => void {
  if (globe.insolation !== 'daily') {
    const row = steadyInsolation(world, globe, bands);
    return (_, into) => into.set(row);
  }
  return (time, into) => {
    const { trueAnomaly, instellation } = placeAt(world, time);
    const longitude = solarLongitude(trueAnomaly, globe.solarLongitudeOfPeriapsis);
    bandMeanFactorInto(bands.edges, sinDeclination(longitude, globe.obliquity), into);
    for (let i = 0; i < into.length; i++) into[i] *= instellation;
  };
}

function steadyInsolation(world: World, globe: Globe, bands: Bands): Float64Array {
  const { star, orbit } = world;
  const mean = orbitMeanInstellation(star.luminosity, orbit.semiMajorAxis, orbit.eccentricity) / 4;
  const row = new Float64Array(bands.count);
  if (typeof globe.insolation === 'object') legendreSeriesBandsInto(globe.insolation.legendre, bands.edges, row);
  else annualMeanBandsInto(bands.edges, globe.obliquity, row);
  return row.map((factor) => mean * factor);
}
