import type { Emission } from '../../world.ts';

/** E(T) = coefficient · T⁴, W m⁻²: what the grey laws have in common. Checks nothing; a negative flux has no inverse (NaN). */
export function quarticEmission(coefficient: number): Emission {
  return {
    quarticCoefficient: coefficient,
    validity: null,
    at(temperature) {
      const squared = temperature * temperature;
      return coefficient * squared * squared;
    },
    slopeAt: (temperature) => 4 * coefficient * temperature * temperature * temperature,
    inverse: (flux) => Math.sqrt(Math.sqrt(flux / coefficient)),
  };
}
