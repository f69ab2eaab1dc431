/**
 * Mean, eccentric and true anomaly of a bound orbit, each from each.
 * Shape:  an anomaly and the eccentricity in, an anomaly out; allocates nothing.
 * Units:  rad, 0 at periapsis; any real number of turns: x + 2πk gives y + 2πk, and −x gives −y to the last bit.
 * Errors: SimError unless 0 ≤ eccentricity < 1; NaN and infinite anomalies give NaN.
 * Error of the result: about 1e-15 relative within the first turn, for every eccentricity that a double can hold.
 * Source: M = E − e sin E and tan(ν/2) = √((1+e)/(1−e)) tan(E/2); Meeus (1998) Astronomical Algorithms 2nd ed., ch. 30.
 */
import type { Radians } from '../si.ts';
import { requireBoundOrbit } from './bound.ts';
import { scaledHalfTangent, turn, wholeTurns, withoutTurns } from './revolution.ts';

/** Mean anomaly from eccentric anomaly: Kepler's equation read forwards. */
export function meanFromEccentric(eccentricAnomaly: Radians, eccentricity: number): Radians {
  requireBoundOrbit(eccentricity);
  if (eccentricAnomaly < 0) return -meanFromEccentric(-eccentricAnomaly, eccentricity);
  const turns = wholeTurns(eccentricAnomaly);
  return turns * turn + meanInHalfTurn(withoutTurns(eccentricAnomaly, turns), eccentricity);
}

/** Eccentric anomaly from mean anomaly: Kepler's equation solved. */
export function eccentricFromMean(meanAnomaly: Radians, eccentricity: number): Radians {
  requireBoundOrbit(eccentricity);
  if (meanAnomaly < 0) return -eccentricFromMean(-meanAnomaly, eccentricity);
  const turns = wholeTurns(meanAnomaly);
  const part = withoutTurns(meanAnomaly, turns);
  const eccentric = part < 0 ? -eccentricInHalfTurn(-part, eccentricity) : eccentricInHalfTurn(part, eccentricity);
  return turns * turn + eccentric;
}

/** True anomaly from eccentric anomaly. */
export function trueFromEccentric(eccentricAnomaly: Radians, eccentricity: number): Radians {
  requireBoundOrbit(eccentricity);
  return scaledHalfTangent(eccentricAnomaly, Math.sqrt(1 + eccentricity), Math.sqrt(1 - eccentricity));
}

/** Eccentric anomaly from true anomaly. */
export function eccentricFromTrue(trueAnomaly: Radians, eccentricity: number): Radians {
  requireBoundOrbit(eccentricity);
  return scaledHalfTangent(trueAnomaly, Math.sqrt(1 - eccentricity), Math.sqrt(1 + eccentricity));
}

/** Mean anomaly from true anomaly. */
export function meanFromTrue(trueAnomaly: Radians, eccentricity: number): Radians {
  return meanFromEccentric(eccentricFromTrue(trueAnomaly, eccentricity), eccentricity);
}

/** True anomaly from mean anomaly. */
export function trueFromMean(meanAnomaly: Radians, eccentricity: number): Radians {
  return trueFromEccentric(eccentricFromMean(meanAnomaly, eccentricity), eccentricity);
}

/** E − e sin E as (1 − e)E + e(E − sin E), two terms of one sign: near periapsis of a long orbit the plain form keeps 8 digits. */
function meanInHalfTurn(eccentric: Radians, eccentricity: number): Radians {
  return (1 - eccentricity) * eccentric + eccentricity * excessOverSine(eccentric, Math.sin(eccentric));
}

/** E − sin E: its Taylor series for |E| ≤ 1, where the difference would cancel. */
function excessOverSine(angle: Radians, sine: number): number {
  if (Math.abs(angle) > 1) return angle - sine;
  const x = angle * angle;
  const tail = 1 - (x / 210) * (1 - (x / 272) * (1 - x / 342));
  const series = 1 - (x / 20) * (1 - (x / 42) * (1 - (x / 72) * (1 - (x / 110) * (1 - (x / 156) * tail))));
  return ((angle * x) / 6) * series;
}

/** The last step is taken once the one before it was this small: steps are of fifth order, so what remains is below 1e-16. */
const lastStep = 5e-4;
const stepLimit = 8;

/** Root E of Kepler's equation for 0 ≤ M ≤ π, by steps of fifth order from a cubic start; one or two steps suffice. */
function eccentricInHalfTurn(mean: Radians, eccentricity: number): Radians {
  const least = mean;
  const most = Math.min(mean / (1 - eccentricity), mean + eccentricity);
  let eccentric = Math.min(Math.max(cubicStart(mean, eccentricity), least), most);
  for (let count = 0; count < stepLimit; count++) {
    const step = fifthOrderStep(eccentric, mean, eccentricity);
    const next = Math.min(Math.max(eccentric + step, least), most);
    if (Math.abs(step) <= lastStep * next) return next;
    eccentric = next;
  }
  return eccentric;
}

/** Change of E towards the root of E − e sin E = M, from four derivatives (Danby & Burkardt 1983, Celest. Mech. 31, 95). */
function fifthOrderStep(eccentric: Radians, mean: Radians, eccentricity: number): Radians {
  const sine = Math.sin(eccentric);
  const cosine = Math.cos(eccentric);
  const versine = cosine > 0 ? (sine * sine) / (1 + cosine) : 1 - cosine;
  const miss = (1 - eccentricity) * eccentric + eccentricity * excessOverSine(eccentric, sine) - mean;
  const first = 1 - eccentricity + eccentricity * versine;
  const second = (eccentricity * sine) / 2;
  const third = (eccentricity * cosine) / 6;
  const fourth = (-eccentricity * sine) / 24;
  let step = -miss / first;
  step = -miss / (first + step * second);
  step = -miss / (first + step * (second + step * third));
  return -miss / (first + step * (second + step * (third + step * fourth)));
}

/** Start within 0.2 % for every e and M: Mikkola (1987) Celest. Mech. 40, 329, with z − α/z written without cancellation. */
function cubicStart(mean: Radians, eccentricity: number): Radians {
  const scale = 4 * eccentricity + 0.5;
  const alpha = (1 - eccentricity) / scale;
  const beta = (0.5 * mean) / scale;
  const z = Math.cbrt(beta + Math.sqrt(beta * beta + alpha * alpha * alpha));
  const alphaOverZ = alpha / z;
  const cubic = (2 * beta) / (z * z + alpha + alphaOverZ * alphaOverZ);
  const squared = cubic * cubic;
  const third = cubic - (0.078 * squared * squared * cubic) / (1 + eccentricity);
  return mean + eccentricity * third * (3 - 4 * third * third);
}
