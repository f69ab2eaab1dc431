import { requirePositive } from '../error.ts';
import type { Kilograms, Metres } from '../si.ts';

/**
 * Mass of a star from its mean density, which transits measure, and its radius: M = (4π/3) ρ R³.
 * Units:  density kg/m³; radius m → kg.
 * Errors: SimError unless both are finite and above zero.
 */
export function massFromDensity(density: number, radius: Metres): Kilograms {
  requirePositive('star.density', density, 'kg/m3');
  requirePositive('star.radius', radius, 'm');
  return ((4 * Math.PI) / 3) * density * radius ** 3;
}
