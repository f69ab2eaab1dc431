/** The first account: orbit-mean instellation by quadrature against its closed form. */
import { instellation, orbitMeanInstellation } from '../instellation/instellation.ts';
import type { Flux } from '../si.ts';
import type { World } from '../world.ts';

/**
 * Orbit-mean instellation by the trapezoidal rule in the eccentric anomaly E, which no solver here works in:
 * ⟨S⟩ = ∮ L/(4πr²) (r/a) dE / 2π. The integrand's poles lie ln(1/β) off the real line, β = e/(1+√(1−e²)), and the rule
 * converges as β^points; 40 e-foldings are far below rounding.
 */
export function orbitMeanByQuadrature(world: World): Flux {
  const { eccentricity, semiMajorAxis } = world.orbit;
  const beta = eccentricity / (1 + Math.sqrt((1 - eccentricity) * (1 + eccentricity)));
  const points = Math.max(64, Math.ceil(40 / -Math.log(Math.max(beta, 1e-300))));
  let sum = 0;
  for (let i = 0; i < points; i++) {
    // 1 − e cos E without cancellation near periapsis
    const ratio = 1 - eccentricity + 2 * eccentricity * Math.sin((Math.PI * i) / points) ** 2;
    sum += instellation(world.star.luminosity, semiMajorAxis * ratio) * ratio;
  }
  return sum / points;
}

/** L / (4πa²√(1−e²)). */
export function orbitMeanClosedForm(world: World): Flux {
  return orbitMeanInstellation(world.star.luminosity, world.orbit.semiMajorAxis, world.orbit.eccentricity);
}
