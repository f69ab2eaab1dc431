/** Findings that follow from the world alone: the steady numbers that a run is compared with. */
import { stefanBoltzmann } from '../constants.ts';
import { instellation } from '../instellation/instellation.ts';
import type { Kelvin } from '../si.ts';
import type { World } from '../world.ts';
import type { Finding, FindingColumn } from './finding.ts';
import { orbitMeanClosedForm } from './orbitMean.ts';
import { repellingTemperature, steadyTemperature } from './steadyState.ts';

/** The textbook and catalogue number: [f L(1−A)/(4πσa²)]^¼ with the warm albedo and unit emissivity; f = ¼ for a whole sphere. */
export function textbookTemperature(world: World, absorbingFraction = 0.25): Kelvin {
  const { star, orbit, surface } = world;
  const absorbed = absorbingFraction * (1 - surface.albedo.warm) * instellation(star.luminosity, orbit.semiMajorAxis);
  return Math.sqrt(Math.sqrt(absorbed / stefanBoltzmann));
}

export const worldColumns: readonly FindingColumn[] = [
  { name: 'period', unit: 's', label: 'Orbital period' },
  { name: 'orbitMeanInstellation', unit: 'W/m2', label: 'Orbit-mean instellation' },
  { name: 'equilibriumTemperature', unit: 'K', label: 'Equilibrium temperature (textbook)' },
  { name: 'circularTemperature', unit: 'K', label: 'Steady temperature at distance a' },
  { name: 'fluxMeanTemperature', unit: 'K', label: 'Steady temperature for the orbit-mean flux' },
  { name: 'radiativeTimeConstant', unit: 's', label: 'Radiative time constant' },
];

/**
 * Overwrites the first entries of `values`, one for each of `worldColumns`. `near`: the temperature from which, with several
 * balances, the steady values are reached; or repelled, of a state that is not stable.
 */
export function worldValuesInto(world: World, near: Kelvin, isStable: boolean, values: Float64Array): void {
  const { star, orbit, surface } = world;
  const meanFlux = orbitMeanClosedForm(world);
  const balance = isStable ? steadyTemperature : repellingTemperature;
  const fluxMean = balance(surface, meanFlux, near);
  values[0] = orbit.period;
  values[1] = meanFlux;
  values[2] = textbookTemperature(world);
  values[3] = balance(surface, instellation(star.luminosity, orbit.semiMajorAxis), near);
  values[4] = fluxMean;
  values[5] = surface.heatCapacity / surface.emission.slopeAt(fluxMean);
}

export function worldFindings(world: World, near: Kelvin, isStable = true): Finding[] {
  const values = new Float64Array(worldColumns.length);
  worldValuesInto(world, near, isStable, values);
  return worldColumns.map((column, i) => ({ ...column, value: values[i] }));
}
