/** How far a planet's temperature after periapsis differs from that before it, under the same starlight. Pure. */
import { meanFromTrue } from '../../sim/orbit/anomaly.ts';
import type { Flux, Kelvin } from '../../sim/si.ts';
import type { Column } from '../words/columns.ts';
import { orbitShape } from './orbitShape.ts';
import { throughOrbit } from './throughOrbit.ts';
import { extremes, values } from './variables.ts';

export interface Opening {
  /** Greatest excess after periapsis; below zero where it is cooler then. */
  readonly widest: Kelvin;
  /** Where that is. */
  readonly flux: Flux;
  /** The greatest difference the other way round, with its sign: 0 for a loop that does not cross itself. */
  readonly opposite: Kelvin;
  /** Of the loop, K W m⁻²: above zero where it is gone round against the clock, instellation to the right. */
  readonly area: number;
}

const steps = 180;

/** The instellation changes through the orbit: without that there is no loop. */
export function hasFluxSwing({ dataset }: Column): boolean {
  const [least, most] = extremes(dataset, 'instellation');
  return most - least > 1e-6 * most;
}

/** Of a periodic state. `name`: the temperature, or the steady one. */
export function loopOpening({ dataset }: Column, name: 'temperature' | 'steadyTemperature'): Opening {
  const { eccentricity } = orbitShape(dataset);
  const temperature = throughOrbit(dataset, name);
  const flux = throughOrbit(dataset, 'instellation');
  const means = Array.from({ length: steps - 1 }, (_, at) => meanFromTrue((Math.PI * (at + 1)) / steps, eccentricity));
  const excess = means.map((mean) => temperature(mean) - temperature(-mean));
  const at = excess.reduce((best, one, step) => (Math.abs(one) > Math.abs(excess[best]!) ? step : best), 0);
  const widest = excess[at]!;
  const opposite = excess.reduce((most, one) => (one * widest < 0 && Math.abs(one) > Math.abs(most) ? one : most), 0);
  const area = loopArea(values(dataset, 'instellation'), values(dataset, name));
  return { widest, flux: flux(means[at]!), opposite, area };
}

/** Shoelace; the last point is joined to the first. Above zero against the clock. */
export function loopArea(x: ArrayLike<number>, y: ArrayLike<number>): number {
  let twice = 0;
  for (let at = 0; at < x.length; at++) {
    const next = (at + 1) % x.length;
    twice += (x[at]! - x[0]!) * (y[next]! - y[0]!) - (x[next]! - x[0]!) * (y[at]! - y[0]!);
  }
  return twice / 2;
}
