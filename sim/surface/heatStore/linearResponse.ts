import { requirePositive } from '../../error.ts';
import type { ArealHeatCapacity, Radians, Seconds } from '../../si.ts';

/** How a small, sinusoidal swing of the absorbed flux appears in temperature. */
export interface LinearResponse {
  /** Swing over that of a surface without heat store, 0 … 1. */
  readonly amplitude: number;
  /** Phase behind the flux. */
  readonly lag: Radians;
}

/**
 * One lumped store: amplitude 1/√(1+(ωτ)²) and lag atan(ωτ) with τ = C/(dE/dT) and ω = 2π/cycle.
 * Units:  heatCapacity J m⁻² K⁻¹; cycle s; radiativeSlope W m⁻² K⁻¹.
 * Errors: SimError unless all are finite and above zero.
 * Source: first-order linear response; e.g. North & Coakley (1979) J. Atmos. Sci. 36, 1189.
 */
export function lumpedLinearResponse(options: {
  readonly heatCapacity: ArealHeatCapacity;
  readonly cycle: Seconds;
  readonly radiativeSlope: number;
}): LinearResponse {
  const { heatCapacity, cycle, radiativeSlope } = options;
  requirePositive('planet.heatStore.heatCapacity', heatCapacity, 'J/m2/K');
  requirePositive('cycle', cycle, 's');
  requirePositive('radiativeSlope', radiativeSlope, 'W/m2/K');
  const slowness = (2 * Math.PI * heatCapacity) / (cycle * radiativeSlope); // ωτ
  return { amplitude: 1 / Math.hypot(1, slowness), lag: Math.atan(slowness) };
}
