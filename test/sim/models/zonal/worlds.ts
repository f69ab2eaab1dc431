/** Zonal worlds for tests, given by the numbers of energy-balance papers. */
import { metresPerAu } from '../../../../sim/constants.ts';
import { settleZonal, type ZonalState, zonalGrid } from '../../../../sim/models/zonal/states.ts';
import { constantAlbedo } from '../../../../sim/surface/albedo/constant.ts';
import { linearEmission } from '../../../../sim/surface/emission/linear.ts';
import type { Albedo, Emission, Globe, World } from '../../../../sim/world.ts';

export interface ZonalNumbers {
  /** A quarter of the instellation at distance a, W m⁻². */
  readonly q?: number;
  readonly e?: number;
  readonly periodDays?: number;
  readonly heatCapacity?: number;
  readonly albedo?: Albedo;
  readonly emission?: Emission;
  readonly globe?: Partial<Globe>;
}

export const degrees = Math.PI / 180;

export function zonalWorld(numbers: ZonalNumbers = {}): World & { readonly globe: Globe } {
  const { q = 340, e = 0, periodDays = 365.25, heatCapacity = 2e8 } = numbers;
  const { albedo = constantAlbedo(0.3), emission = linearEmission({ a: 210, b: 2 }) } = numbers;
  return {
    star: { luminosity: 16 * Math.PI * metresPerAu ** 2 * q, temperature: 5772, radius: 6.957e8, mass: 1.988e30 },
    orbit: {
      semiMajorAxis: metresPerAu,
      eccentricity: e,
      period: periodDays * 86_400,
      argumentOfPeriapsis: null,
      inclination: null,
      periapsisTime: null,
    },
    surface: { albedo, emission, absorbingFraction: 0.25, internalHeat: 0, heatCapacity },
    globe: {
      bands: 90,
      obliquity: 23.44 * degrees,
      solarLongitudeOfPeriapsis: 0,
      insolation: 'daily',
      heatTransport: 0.6,
      albedoP2: 0,
      frozenHeatCapacity: null,
      land: null,
      solarDay: null,
      ...numbers.globe,
    },
  };
}

export function settled(world: World & { readonly globe: Globe }, start = 320, tolerance = 1e-6): ZonalState {
  const { bands } = world.globe;
  return settleZonal(zonalGrid(world, world.globe, bands), new Float64Array(bands).fill(start), tolerance);
}

/** Temperature of every band at the start of the year. */
export function firstRow(state: ZonalState): Float64Array {
  return state.history.value.slice(0, state.system.size);
}
