/** Insolation of every band at a time: the daily mean, the annual mean, or a Legendre series, each as its exact band mean. */
import { annualMeanBandsInto } from '../../instellation/annualMean.ts';
import { bandMeanFactorInto } from '../../instellation/bandMean.ts';
import { orbitMeanInstellation } from '../../instellation/instellation.ts';
import { legendreSeriesBandsInto } from '../../instellation/legendre.ts';
import { declinationRate, sinDeclination, solarLongitude } from '../../instellation/season.ts';
import type { Seconds } from '../../si.ts';
import type { Globe, World } from '../../world.ts';
import type { Bands } from './bands.ts';
import { placeAt } from './place.ts';

export interface BandInsolation {
  /** Overwrites `into` by W m⁻² per band at a time after periapsis. */
  at(time: Seconds, into: Float64Array): void;
  /** The same, and its ∂/∂t, W m⁻² s⁻¹. */
  withDrift(time: Seconds, into: Float64Array, drift: Float64Array): void;
}

export function bandInsolation(world: World, globe: Globe, bands: Bands): BandInsolation {
  if (globe.insolation !== 'daily') {
    const row = steadyInsolation(world, globe, bands);
    return {
      at: (_, into) => into.set(row),
      withDrift(_, into, drift) {
        into.set(row);
        drift.fill(0);
      },
    };
  }
  const { period, eccentricity } = world.orbit;
  const meanMotion = (2 * Math.PI) / period;
  const sweep = meanMotion / ((1 - eccentricity) * (1 + eccentricity)) ** 1.5;
  return {
    at(time, into) {
      const { trueAnomaly, instellation } = placeAt(world, time);
      const longitude = solarLongitude(trueAnomaly, globe.solarLongitudeOfPeriapsis);
      bandMeanFactorInto(bands.edges, sinDeclination(longitude, globe.obliquity), into);
      for (let i = 0; i < into.length; i++) into[i] *= instellation;
    },
    withDrift(time, into, drift) {
      const { trueAnomaly, instellation } = placeAt(world, time);
      const longitude = solarLongitude(trueAnomaly, globe.solarLongitudeOfPeriapsis);
      bandMeanFactorInto(bands.edges, sinDeclination(longitude, globe.obliquity), into, drift);
      // S ∝ (1 + e cos ν)² f(δ), ν̇ = n (1 + e cos ν)²/(1 − e²)^1.5
      const nearness = 1 + eccentricity * Math.cos(trueAnomaly);
      const turning = sweep * nearness * nearness;
      const approach = (-2 * eccentricity * Math.sin(trueAnomaly) * turning) / nearness;
      const tilt = turning * finite(declinationRate(longitude, globe.obliquity));
      for (let i = 0; i < into.length; i++) {
        drift[i] = instellation * (approach * into[i] + tilt * drift[i]);
        into[i] *= instellation;
      }
    },
  };
}

/** Where the star turns back at the very pole its rate has no value: halfway between the two. */
function finite(rate: number): number {
  return Number.isFinite(rate) ? rate : 0;
}

function steadyInsolation(world: World, globe: Globe, bands: Bands): Float64Array {
  const { star, orbit } = world;
  const mean = orbitMeanInstellation(star.luminosity, orbit.semiMajorAxis, orbit.eccentricity) / 4;
  const row = new Float64Array(bands.count);
  if (typeof globe.insolation === 'object') legendreSeriesBandsInto(globe.insolation.legendre, bands.edges, row);
  else annualMeanBandsInto(bands.edges, globe.obliquity, row);
  return row.map((factor) => mean * factor);
}
