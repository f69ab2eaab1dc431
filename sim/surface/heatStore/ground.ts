/**
 * Ground that conducts heat: a half-space of thermal inertia Γ = √(kρc) answers a surface temperature of frequency ω = 2π/P
 * with the flux Γ√(iω) per kelvin, 45° ahead.
 * Units:  thermalInertia J m⁻² K⁻¹ s^(−½); cycle s; radiativeSlope dE/dT W m⁻² K⁻¹.
 * Errors: SimError unless all are finite and above zero.
 * Source: Carslaw & Jaeger (1959) Conduction of Heat in Solids 2nd ed., §2.6; the radiating surface: Spencer, Lebofsky & Sykes (1989) Icarus 78, 337.
 */
import { requirePositive } from '../../error.ts';
import type { ArealHeatCapacity, Seconds } from '../../si.ts';
import type { LinearResponse } from './linearResponse.ts';

export interface GroundOptions {
  readonly thermalInertia: number;
  readonly cycle: Seconds;
}

/**
 * The lumped store with the same quadrature part as the half-space, C = Γ√(P/4π) → J m⁻² K⁻¹.
 * It lacks the half-space's in-phase part: compare the two responses before trusting it.
 */
export function groundHeatCapacity({ thermalInertia, cycle }: GroundOptions): ArealHeatCapacity {
  requireGround(thermalInertia, cycle);
  return thermalInertia * Math.sqrt(cycle / (4 * Math.PI));
}

/** Small swings of the half-space under a radiating surface, with Φ = Γ√ω/(dE/dT): 1/√(1+√2Φ+Φ²), lag ≤ 45°. */
export function groundLinearResponse(options: GroundOptions & { readonly radiativeSlope: number }): LinearResponse {
  const { thermalInertia, cycle, radiativeSlope } = options;
  requireGround(thermalInertia, cycle);
  requirePositive('radiativeSlope', radiativeSlope, 'W/m2/K');
  const part = (thermalInertia * Math.sqrt(Math.PI / cycle)) / radiativeSlope; // Φ/√2
  return { amplitude: 1 / Math.hypot(1 + part, part), lag: Math.atan2(part, 1 + part) };
}

function requireGround(thermalInertia: number, cycle: Seconds): void {
  requirePositive('planet.heatStore.ground.thermalInertia', thermalInertia, 'J/m2/K/s^0.5');
  requirePositive('planet.heatStore.ground.cycle', cycle, 's');
}
