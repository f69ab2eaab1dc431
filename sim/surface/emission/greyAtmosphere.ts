import { stefanBoltzmann } from '../../constants.ts';
import { requireNotNegative } from '../../error.ts';
import type { Emission } from '../../world.ts';
import { quarticEmission } from './quartic.ts';

/**
 * A surface under a grey atmosphere in radiative equilibrium, transparent to starlight: E = σT⁴ / (1 + 3τ/4), so that the
 * surface is (1 + 3τ/4)^¼ times as warm as what space sees. Convection, which would cool it, is left out.
 * Units:  opticalDepth 1, in the thermal infrared; surface T K → W m⁻².
 * Errors: SimError unless opticalDepth is finite and ≥ 0.
 * Source: Eddington approximation; e.g. Goody & Yung (1989) Atmospheric Radiation 2nd ed., ch. 9.
 */
export function greyAtmosphere(opticalDepth: number): Emission {
  requireNotNegative('planet.emission.opticalDepth', opticalDepth, '(optical depth)');
  return quarticEmission(stefanBoltzmann / (1 + 0.75 * opticalDepth));
}
