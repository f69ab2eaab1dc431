/** How late the temperature follows: the area mean behind its steady value, and single latitudes behind their own insolation. */

import type { Dataset } from '../../dataset/dataset.ts';
import type { Finding } from '../../findings/finding.ts';
import type { Seconds } from '../../si.ts';
import { extremes } from '../../solve/features.ts';
import { topOfParabola } from '../../solve/parabola.ts';
import type { ZonalYear } from './year.ts';

/** An error of the time above this share of the year leaves a lag undefined. */
const largestError = 0.02;

export function lagFindings(year: ZonalYear, dataset: Dataset, errorEstimate: number): Finding[] {
  const { period } = year.world.orbit;
  const { highest, lowest } = extremes(year.curves.mean);
  const swing = highest.value - lowest.value;
  // A flat extreme's time is uncertain by √(2 δT/|T″|).
  const uncertain = (point: typeof highest): Seconds =>
    Math.sqrt((2 * errorEstimate * point.value) / Math.max(Math.abs(point.curvature), 1e-300));
  const still = !(swing > 1e-9 * highest.value);
  const when = (name: string, label: string, point: typeof highest): Finding => {
    const base = { name, unit: 's', label };
    if (still) return { ...base, value: null, reason: 'the temperature does not vary' };
    const plusMinus = uncertain(point);
    if (plusMinus > largestError * period)
      return { ...base, value: null, reason: 'the extreme is too flat: lower solve.tolerance' };
    return { ...base, value: point.position % period, plusMinus };
  };
  const timeOfMax = when('timeOfMax', 'Time of maximum, after periapsis', highest);
  const timeOfMin = when('timeOfMin', 'Time of minimum, after periapsis', lowest);
  const steady = localMaxima(dataset.variables.steadyTemperature.data, dataset.variables.time.data, period);
  const behind = timeOfMax.value === null ? null : lagBehind(steady, timeOfMax.value, period);
  const base = { name: 'lagOfMax', unit: 's', label: 'Lag of the maximum behind the steady maximum' };
  const reason = timeOfMax.reason ?? 'the steady value does not vary';
  const plusMinus = timeOfMax.plusMinus ?? 0;
  return [
    timeOfMax,
    timeOfMin,
    behind === null ? { ...base, value: null, reason } : { ...base, value: behind, plusMinus },
    behind === null
      ? { ...base, name: 'lagOfMaxOrbits', unit: '1', label: 'Lag of the maximum, in orbits', value: null, reason }
      : {
          ...base,
          name: 'lagOfMaxOrbits',
          unit: '1',
          label: 'Lag of the maximum, in orbits',
          value: behind / period,
          plusMinus: plusMinus / period,
        },
    harmonicLag(dataset, period, still),
  ];
}

function harmonicLag(dataset: Dataset, period: Seconds, still: boolean): Finding {
  const base = { name: 'lagOfFirstHarmonic', unit: 's', label: 'Lag of the first harmonic' };
  if (still) return { ...base, value: null, reason: 'the temperature does not vary' };
  const { weight, meanAnomaly, temperature, steadyTemperature } = dataset.variables;
  const phase = (values: Float64Array): number => {
    let cosine = 0;
    let sine = 0;
    for (let i = 0; i < values.length; i++) {
      cosine += weight.data[i] * values[i] * Math.cos(meanAnomaly.data[i]);
      sine += weight.data[i] * values[i] * Math.sin(meanAnomaly.data[i]);
    }
    return Math.atan2(sine, cosine);
  };
  const difference = phase(temperature.data) - phase(steadyTemperature.data);
  const folded = difference - 2 * Math.PI * Math.round(difference / (2 * Math.PI));
  return { ...base, value: (folded / (2 * Math.PI)) * period };
}

/** Local lag: the year's hottest moment of a latitude behind the maximum of its own insolation, by the rule of `lagBehind`. */
export function localLags(year: ZonalYear): Finding[] {
  const { latitude } = year.physics.bands;
  const nearest = (degreesNorth: number): number => {
    const target = (degreesNorth * Math.PI) / 180;
    return latitude.reduce(
      (best, value, i) => (Math.abs(value - target) < Math.abs(latitude[best] - target) ? i : best),
      0,
    );
  };
  const places = [
    ['lagAtEquator', 'at the equator', nearest(0)],
    ['lagAt45North', 'at 45° N', nearest(45)],
    ['lagAt45South', 'at 45° S', nearest(-45)],
    ['lagAtNorthPole', 'at the north pole', latitude.length - 1],
    ['lagAtSouthPole', 'at the south pole', 0],
  ] as const;
  const { period } = year.world.orbit;
  const samples = 720;
  const times = Float64Array.from({ length: samples }, (_, i) => (period * i) / samples);
  const insolation = places.map(() => new Float64Array(samples));
  const row = new Float64Array(latitude.length);
  for (let i = 0; i < samples; i++) {
    year.insolationInto(times[i], row);
    for (const [k, [, , band]] of places.entries()) insolation[k][i] = row[band];
  }
  return places.map(([name, where, band], k) => {
    const base = { name, unit: 's', label: `Lag ${where}, behind the local insolation` };
    const { highest, lowest } = extremes(year.curves.bands[band]);
    const maxima = localMaxima(insolation[k], times, period);
    const varies = highest.value - lowest.value > 1e-6 * highest.value;
    const lag = varies ? lagBehind(maxima, highest.position, period) : null;
    return lag === null
      ? { ...base, value: null, reason: 'insolation or temperature does not vary there' }
      : { ...base, value: lag, plusMinus: period / samples };
  });
}

/** Times of local maxima of samples round the year, each refined by the parabola through three points. */
export function localMaxima(values: Float64Array, times: Float64Array, period: Seconds): Seconds[] {
  const count = values.length;
  const greatest = values.reduce((a, b) => Math.max(a, b));
  const least = values.reduce((a, b) => Math.min(a, b));
  if (!(greatest - least > 1e-9 * Math.abs(greatest))) return [];
  const found: Seconds[] = [];
  for (let i = 0; i < count; i++) {
    const before = values[(i + count - 1) % count];
    const after = values[(i + 1) % count];
    if (!(values[i] > before && values[i] >= after)) continue;
    const left = times[i] - (i > 0 ? times[i - 1] : times[count - 1] - period);
    const right = (i + 1 < count ? times[i + 1] : times[0] + period) - times[i];
    found.push(times[i] + topOfParabola(left, right, before - values[i], after - values[i]));
  }
  return found;
}

/**
 * Lag of a moment, going round the year: time since the nearest of `times` before it; but where that is more than half an orbit ago
 * and the next of them less than a quarter of an orbit away, the moment leads that one, and its lag is below zero.
 * Null when there are none.
 */
export function lagBehind(times: readonly Seconds[], moment: Seconds, period: Seconds): Seconds | null {
  if (times.length === 0) return null;
  const since = times.map((time) => {
    const turns = Math.floor((moment - time + 1e-9 * period) / period);
    return Math.max(0, moment - time - period * turns);
  });
  const behind = since.reduce((a, b) => Math.min(a, b));
  const ahead = period - since.reduce((a, b) => Math.max(a, b));
  return behind > period / 2 && ahead < period / 4 ? -ahead : behind;
}
