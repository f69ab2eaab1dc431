import { requirePositive } from '../../error.ts';
import type { ArealHeatCapacity } from '../../si.ts';

export interface AtmosphereOptions {
  /** Pa */
  readonly surfacePressure: number;
  /** At constant pressure, J kg⁻¹ K⁻¹. */
  readonly specificHeat: number;
  /** m s⁻² */
  readonly gravity: number;
}

/**
 * A column of air that warms as a whole: its mass is p/g, so C = p c_p / g.
 * Units:  → J m⁻² K⁻¹.
 * Errors: SimError unless all three are finite and above zero.
 * Source: hydrostatic balance; e.g. Pierrehumbert (2010) Principles of Planetary Climate.
 */
export function atmosphereHeatCapacity(options: AtmosphereOptions): ArealHeatCapacity {
  const { surfacePressure, specificHeat, gravity } = options;
  requirePositive('planet.heatStore.atmosphere.surfacePressure', surfacePressure, 'Pa');
  requirePositive('planet.heatStore.atmosphere.specificHeat', specificHeat, 'J/kg/K');
  requirePositive('planet.heatStore.atmosphere.gravity', gravity, 'm/s2');
  return (surfacePressure * specificHeat) / gravity;
}
