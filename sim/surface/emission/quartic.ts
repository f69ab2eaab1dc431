import type { Emission } from '../../world.ts';

/**
 * E(T) = coefficient · T⁴, W m⁻²: what the grey laws have in common. Checks nothing; a negative flux has no inverse (NaN).
 * Below 0 K, where a solver's trial may stray, it falls on as −coefficient · T⁴: with an even law such a trial would run away.
 */
export function quarticEmission(coefficient: number): Emission {
  return {
    quarticCoefficient: coefficient,
    validity: null,
    at(temperature) {
      const squared = temperature * temperature;
      return coefficient * squared * temperature * Math.abs(temperature);
    },
    slopeAt: (temperature) => 4 * coefficient * temperature * temperature * Math.abs(temperature),
    inverse: (flux) => Math.sqrt(Math.sqrt(flux / coefficient)),
  };
}
