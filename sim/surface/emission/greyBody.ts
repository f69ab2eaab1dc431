import { stefanBoltzmann } from '../../constants.ts';
import { SimError } from '../../error.ts';
import type { Emission } from '../../world.ts';
import { quarticEmission } from './quartic.ts';

/**
 * A grey surface that sees space: E = εσT⁴.
 * Units:  emissivity 1; T K → W m⁻².
 * Errors: SimError unless 0 < emissivity ≤ 1.
 * Source: Stefan–Boltzmann law; σ of CODATA 2018.
 */
export function greyBody(emissivity: number): Emission {
  if (!(emissivity > 0 && emissivity <= 1)) {
    throw new SimError('planet.emissivity', `${emissivity} is not an emissivity`, 'Use 0 < emissivity ≤ 1');
  }
  return quarticEmission(emissivity * stefanBoltzmann);
}
