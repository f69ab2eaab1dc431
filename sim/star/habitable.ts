/**
 * Instellation at the published limits of the habitable zone, by star temperature:
 * S = S₀ (s + a t + b t² + c t³ + d t⁴) with t = T − 5780 K.
 * Source: Kopparapu et al. (2014) ApJ 787, L29, eq. 4 and table 1 (one-dimensional, cloud-free columns; planets of 1 Earth
 *         mass unless named otherwise). Solar unit S₀ = 1361 W m⁻².
 */
import { solarIrradiance } from '../constants.ts';
import { SimError } from '../error.ts';
import type { Flux, Kelvin } from '../si.ts';

const coefficients = {
  recentVenus: [1.776, 2.136e-4, 2.533e-8, -1.332e-11, -3.097e-15],
  runawayGreenhouse: [1.107, 1.332e-4, 1.58e-8, -8.308e-12, -1.931e-15],
  runawayGreenhouse5Earths: [1.188, 1.433e-4, 1.707e-8, -8.968e-12, -2.084e-15],
  runawayGreenhouseTenthEarth: [0.99, 1.209e-4, 1.404e-8, -7.418e-12, -1.713e-15],
  maximumGreenhouse: [0.356, 6.171e-5, 1.698e-9, -3.198e-12, -5.575e-16],
  earlyMars: [0.32, 5.547e-5, 1.526e-9, -2.874e-12, -5.011e-16],
} as const;

export type HabitableLimit = keyof typeof coefficients;

export const habitableLimits = Object.keys(coefficients) as readonly HabitableLimit[];

/** Star temperatures for which the limits were computed, K; both ends included. */
export const habitableTemperatureRange: { readonly from: Kelvin; readonly to: Kelvin } = { from: 2600, to: 7200 };

/**
 * Instellation at a limit.
 * Units:  starTemperature K → W m⁻².
 * Errors: SimError outside `habitableTemperatureRange`: the polynomial means nothing there.
 */
export function habitableFlux(limit: HabitableLimit, starTemperature: Kelvin): Flux {
  const { from, to } = habitableTemperatureRange;
  if (!(starTemperature >= from && starTemperature <= to)) {
    throw new SimError(
      'star.temperature',
      `${starTemperature} K is outside ${from} to ${to} K, for which the habitable limits were published`,
      'Give the window as instellation, e.g. 0.32 to 1.1 S0',
    );
  }
  const t = starTemperature - 5780;
  const [s, a, b, c, d] = coefficients[limit];
  return solarIrradiance * (s + t * (a + t * (b + t * (c + t * d))));
}
