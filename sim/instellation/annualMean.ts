/**
 * Annual-mean insolation by latitude, relative to the global annual mean (a quarter of the orbit-mean instellation).
 * Equal steps of true anomaly bring equal light (Kepler's second law), so the distribution depends on the obliquity alone:
 * it is the mean of 4f over the solar longitude at equal weights, the same in north and south for every e and λ_periapsis.
 * Units:  x = sin φ within ±1; obliquity rad → 1. At a pole (4/π) sin ε, at the equator (8/π²) E(m = sin²ε).
 * Errors: none; NaN passes through. Error of the result: 1e-14 by latitude; 1e-14 over a band's width in x by band.
 * Source: Ward (1974) J. Geophys. Res. 79, 3375; Nadeau & McGehee (2017) Icarus 291, 46.
 */
import type { Radians } from '../si.ts';
import { lightSouthOf } from './bandMean.ts';
import { dailyMeanFactor } from './dailyMean.ts';
import { legendre } from './legendre.ts';

/** At one latitude. */
export function annualMeanFactor(sineLatitude: number, obliquity: Radians): number {
  const cosineLatitude = Math.sqrt((1 - sineLatitude) * (1 + sineLatitude));
  return (
    4 *
    seasonMean(cosineLatitude, obliquity, (sinDeclination, cosDeclination) =>
      dailyMeanFactor(sineLatitude * sinDeclination, cosineLatitude * cosDeclination),
    )
  );
}

/** At latitudes x (n,) → `into` (n,). */
export function annualMeanFactorInto(sineLatitude: Float64Array, obliquity: Radians, into: Float64Array): void {
  for (let i = 0; i < into.length; i++) into[i] = annualMeanFactor(sineLatitude[i], obliquity);
}

/** Exact means over bands between `edges` in x, increasing, (bands + 1,) → `into` (bands,). The globe's mean is 1 to rounding. */
export function annualMeanBandsInto(edges: Float64Array, obliquity: Radians, into: Float64Array): void {
  let south = annualSouthOf(edges[0], obliquity);
  for (let band = 0; band < into.length; band++) {
    const north = annualSouthOf(edges[band + 1], obliquity);
    into[band] = (4 * (north - south)) / (edges[band + 1] - edges[band]);
    south = north;
  }
}

/**
 * Coefficients of the distribution in P_n(x) for n = 0 … highest; odd ones are 0:
 *
 *     s_n = −2(2n+1) P_n(0)² P_n(cos ε) / ((n−1)(n+2)),   so s₀ = 1, s₂ = −(5/8) P₂(cos ε), s₄ = −(9/64) P₄(cos ε) …
 *
 * They fall as n^(−5/2), at ε = 0 as n^(−2): two terms are a fit, not the distribution.
 * From: coefficients of max(0, cos) in P_n are −(2n+1)P_n(0)/(2(n−1)(n+2)), and ⟨P_n(sin δ)⟩ over λ is P_n(0)P_n(cos ε).
 */
export function annualMeanLegendre(obliquity: Radians, highest: number): number[] {
  return Array.from({ length: highest + 1 }, (_, n) => {
    if (n % 2 === 1) return 0;
    const middle = legendre(n, 0);
    return (-2 * (2 * n + 1) * middle * middle * legendre(n, Math.cos(obliquity))) / ((n - 1) * (n + 2));
  });
}

function annualSouthOf(x: number, obliquity: Radians): number {
  const cosineLatitude = Math.sqrt((1 - x) * (1 + x));
  return seasonMean(cosineLatitude, obliquity, (sinDeclination, cosDeclination) =>
    lightSouthOf(x, sinDeclination, cosDeclination),
  );
}

/**
 * Mean over λ of a function of δ that is smooth but where the latitude enters polar day or night, |sin δ| = cos φ. δ takes
 * all its values for −π/2 ≤ λ ≤ π/2; the pieces between the polar edges are integrated one by one.
 */
function seasonMean(
  cosineLatitude: number,
  obliquity: Radians,
  value: (sinDeclination: number, cosDeclination: number) => number,
): number {
  const sineObliquity = Math.sin(obliquity);
  const atLongitude = (longitude: Radians) => {
    const sinDeclination = sineObliquity * Math.sin(longitude);
    return value(sinDeclination, Math.sqrt((1 - sinDeclination) * (1 + sinDeclination)));
  };
  const solstice = Math.PI / 2;
  const edge = cosineLatitude < sineObliquity ? Math.asin(cosineLatitude / sineObliquity) : solstice;
  const sum = integral(atLongitude, -edge, edge);
  if (edge === solstice) return sum / Math.PI;
  return (sum + integral(atLongitude, -solstice, -edge) + integral(atLongitude, edge, solstice)) / Math.PI;
}

/**
 * Tanh–sinh quadrature (Takahasi & Mori 1974, Publ. RIMS 9, 721): exponential convergence whatever root stands at the ends
 * or just beyond them. Nodes and weights on −1 … 1.
 */
const step = 1 / 16;
const reach = 52;
const nodes = Array.from({ length: 2 * reach + 1 }, (_, k) => Math.tanh((Math.PI / 2) * Math.sinh((k - reach) * step)));
const weights = Array.from({ length: 2 * reach + 1 }, (_, k) => {
  const t = (k - reach) * step;
  return (step * (Math.PI / 2) * Math.cosh(t)) / Math.cosh((Math.PI / 2) * Math.sinh(t)) ** 2;
});

function integral(f: (x: number) => number, from: number, to: number): number {
  const half = (to - from) / 2;
  const middle = (from + to) / 2;
  let sum = 0;
  for (let k = 0; k < nodes.length; k++) sum += weights[k]! * f(middle + half * nodes[k]!);
  return half * sum;
}
