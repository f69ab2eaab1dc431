/** The energy account of a zonal year, area means, by Gauss–Legendre quadrature within every step. */

import { accountReference } from '../../findings/accountReference.ts';
import { gaussNodes, gaussWeights } from '../../solve/features.ts';
import type { EnergyBalance } from '../model.ts';
import { globalMean } from './bands.ts';
import type { ZonalYear } from './year.ts';

export function zonalEnergyBalance(year: ZonalYear): EnergyBalance {
  const { world, curves } = year;
  const { position } = curves.mean;
  const period = position[position.length - 1];
  let absorbed = 0;
  let emitted = 0;
  for (let step = 0; step + 1 < position.length; step++) {
    const width = position[step + 1] - position[step];
    for (let k = 0; k < gaussNodes.length; k++) {
      const moment = year.at(position[step] + gaussNodes[k] * width);
      const share = (gaussWeights[k] * width) / period;
      absorbed += share * globalMean(moment.absorbed);
      emitted += share * globalMean(moment.emitted);
    }
  }
  const stored = year.storedOverYear() / period;
  const { internalHeat } = world.surface;
  const reference = accountReference(absorbed, emitted, stored);
  const relativeDifference = Math.abs(absorbed + internalHeat - emitted - stored) / reference;
  return { absorbed, internalHeat, emitted, stored, relativeDifference };
}
