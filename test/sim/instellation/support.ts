import fc from 'fast-check';
import { radiansPerDegree } from '../../../sim/constants.ts';
import { dailyMeanFactorInto, dailyMeanFactorSlopeInto } from '../../../sim/instellation/dailyMean.ts';
import { sinDeclination, trueAnomalyAt } from '../../../sim/instellation/season.ts';
import { starDistance } from '../../../sim/orbit/distance.ts';
import type { Elements } from '../../published/insolation.ts';

export const latitude = fc.oneof(
  fc.double({ min: -Math.PI / 2, max: Math.PI / 2, noNaN: true }),
  fc.constantFrom(-Math.PI / 2, 0, Math.PI / 2),
);
export const declination = latitude;
export const angle = fc.double({ min: -Math.PI, max: Math.PI, noNaN: true });
export const obliquity = fc.double({ min: 0, max: Math.PI, noNaN: true });

const one = (value: number) => Float64Array.of(value);

export function factor(phi: number, delta: number): number {
  const into = one(Number.NaN);
  dailyMeanFactorInto(one(Math.sin(phi)), one(Math.cos(phi)), Math.sin(delta), into);
  return into[0]!;
}

export function factorSlope(phi: number, delta: number): number {
  const into = one(Number.NaN);
  dailyMeanFactorSlopeInto(one(Math.sin(phi)), one(Math.cos(phi)), Math.sin(delta), into);
  return into[0]!;
}

/** Daily mean in W m⁻² at 1 au mean distance; angles in degrees. */
export function dailyMean(elements: Elements, latitudeDeg: number, solarLongitudeDeg: number): number {
  const longitude = solarLongitudeDeg * radiansPerDegree;
  const phi = latitudeDeg * radiansPerDegree;
  const into = one(Number.NaN);
  const sine = sinDeclination(longitude, elements.obliquityDeg * radiansPerDegree);
  dailyMeanFactorInto(one(Math.sin(phi)), one(Math.cos(phi)), sine, into);
  const trueAnomaly = trueAnomalyAt(longitude, periapsisLongitude(elements));
  return (into[0]! * elements.irradiance) / starDistance(1, elements.eccentricity, trueAnomaly) ** 2;
}

/** Solar longitude at perihelion, rad: opposite to the heliocentric longitude. */
export function periapsisLongitude(elements: Pick<Elements, 'perihelionDeg'>): number {
  return (elements.perihelionDeg + 180) * radiansPerDegree;
}
