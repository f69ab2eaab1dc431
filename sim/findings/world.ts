/** Findings that follow from the world alone: the steady numbers that a run is compared with. */
import { stefanBoltzmann } from '../constants.ts';
import { instellation } from '../instellation/instellation.ts';
import type { Kelvin } from '../si.ts';
import type { World } from '../world.ts';
import type { Finding } from './finding.ts';
import { orbitMeanClosedForm } from './orbitMean.ts';
import { repellingTemperature, steadyTemperature } from './steadyState.ts';

/** The textbook and catalogue number: [f L(1−A)/(4πσa²)]^¼ with the warm albedo and unit emissivity; f = ¼ for a whole sphere. */
export function textbookTemperature(world: World, absorbingFraction = 0.25): Kelvin {
  const { star, orbit, surface } = world;
  const absorbed = absorbingFraction * (1 - surface.albedo.warm) * instellation(star.luminosity, orbit.semiMajorAxis);
  return (absorbed / stefanBoltzmann) ** 0.25;
}

/**
 * `near`: the temperature from which, with several balances, the steady values are reached; or repelled, of a state that is
 * not stable.
 */
export function worldFindings(world: World, near: Kelvin, isStable = true): Finding[] {
  const { star, orbit, surface } = world;
  const meanFlux = orbitMeanClosedForm(world);
  const balance = isStable ? steadyTemperature : repellingTemperature;
  const fluxMean = balance(surface, meanFlux, near);
  return [
    { name: 'period', value: orbit.period, unit: 's', label: 'Orbital period' },
    { name: 'orbitMeanInstellation', value: meanFlux, unit: 'W/m2', label: 'Orbit-mean instellation' },
    {
      name: 'equilibriumTemperature',
      value: textbookTemperature(world),
      unit: 'K',
      label: 'Equilibrium temperature (textbook)',
    },
    {
      name: 'circularTemperature',
      value: balance(surface, instellation(star.luminosity, orbit.semiMajorAxis), near),
      unit: 'K',
      label: 'Steady temperature at distance a',
    },
    { name: 'fluxMeanTemperature', value: fluxMean, unit: 'K', label: 'Steady temperature for the orbit-mean flux' },
    {
      name: 'radiativeTimeConstant',
      value: surface.heatCapacity / surface.emission.slopeAt(fluxMean),
      unit: 's',
      label: 'Radiative time constant',
    },
  ];
}
