import { zeroCelsius } from '../../constants.ts';
import { requirePositive, SimError } from '../../error.ts';
import type { Flux } from '../../si.ts';
import type { Emission } from '../../world.ts';

export interface LinearOptions {
  /** Emitted at 0 °C. */
  readonly a: Flux;
  /** Slope, W m⁻² K⁻¹. */
  readonly b: number;
}

/** −60 … +50 °C, about the range of Earth's surface temperatures that such fits rest on. */
const validity = { from: zeroCelsius - 60, to: zeroCelsius + 50 };

/**
 * Emission to space of an Earth-like atmosphere, linear in surface temperature: E = A + B·T with T in °C.
 * Units:  a W m⁻²; b W m⁻² K⁻¹; T K (converted inside) → W m⁻².
 * Errors: SimError unless both are finite and above zero, and A ≤ 273.15 B: a law that emits at absolute zero has no cold end.
 * Source: Budyko (1969) Tellus 21, 611; North, Cahalan & Coakley (1981) Rev. Geophys. 19, 91.
 */
export function linearEmission({ a, b }: LinearOptions): Emission {
  requirePositive('planet.emission.linear.a', a, 'W/m2');
  requirePositive('planet.emission.linear.b', b, 'W/m2/K');
  if (a > b * zeroCelsius) {
    throw new SimError(
      'planet.emission.linear',
      `a = ${a} W/m2 and b = ${b} W/m2/K emit ${a - b * zeroCelsius} W/m2 at absolute zero`,
      'Lower a or raise b; T is in °C, as the law is published',
    );
  }
  return {
    quarticCoefficient: null,
    validity,
    at: (temperature) => a + b * (temperature - zeroCelsius),
    slopeAt: () => b,
    inverse: (flux) => zeroCelsius + (flux - a) / b,
  };
}
