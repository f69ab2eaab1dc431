import { requirePositive } from '../../error.ts';
import type { ArealHeatCapacity, Metres } from '../../si.ts';

/** Sea water, 1025 kg m⁻³ × 3990 J kg⁻¹ K⁻¹: rounded values for 35 g/kg of salt near 15 °C (Gill 1982, Atmosphere–Ocean Dynamics, app. 3). */
const seaWaterHeatCapacity = 1025 * 3990;

/**
 * An ocean stirred to a depth: C = ρ c d.
 * Units:  depth m → J m⁻² K⁻¹.
 * Errors: SimError unless depth is finite and above zero.
 */
export function mixedLayerHeatCapacity(depth: Metres): ArealHeatCapacity {
  requirePositive('planet.heatStore.mixedLayer', depth, 'm');
  return seaWaterHeatCapacity * depth;
}
