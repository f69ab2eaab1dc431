import { requirePositive, SimError } from '../../error.ts';
import type { Kelvin } from '../../si.ts';
import type { Albedo, Law } from '../../world.ts';
import { requireAlbedo } from './bounds.ts';

export interface RampOptions {
  /** Bond albedo at `to` and above. */
  readonly warm: number;
  /** Bond albedo at `from` and below. */
  readonly ice: number;
  readonly from: Kelvin;
  readonly to: Kelvin;
}

/**
 * Ice–albedo ramp: A(T) = ice + (warm − ice) x²(3 − 2x), x = (T − from)/(to − from) held in [0, 1]; slope continuous.
 * Units:  temperatures K; albedo 1, its slope K⁻¹. `from` = `to` is a step: warm at that temperature and above, slope 0.
 * Errors: SimError unless both albedos are in [0, 1), temperatures above zero, and from ≤ to.
 * Source: the ice–albedo feedback of Budyko (1969) Tellus 21, 611 and Sellers (1969) J. Appl. Meteorol. 8, 392; the cubic is our choice
 *         of a smooth ramp.
 */
export function rampAlbedo({ warm, ice, from, to }: RampOptions): Albedo {
  requireAlbedo('planet.albedo.warm', warm);
  requireAlbedo('planet.albedo.ice', ice);
  requirePositive('planet.albedo.from', from, 'K');
  requirePositive('planet.albedo.to', to, 'K');
  if (from > to) {
    throw new SimError(
      'planet.albedo',
      `\`from\` (${from} K) is above \`to\` (${to} K)`,
      'Ice lies at `from` and below: swap them',
    );
  }
  const ramp = { from, to };
  const iceOnly: Law = { at: () => ice, slopeAt: () => 0 };
  const warmOnly: Law = { at: () => warm, slopeAt: () => 0 };
  if (from === to) {
    const at = (temperature: Kelvin) => (temperature >= to ? warm : ice);
    return { warm, ice, ramp, breaks: [to], pieces: [iceOnly, warmOnly], at, slopeAt: () => 0 };
  }
  const between = smoothstep(ice, warm, from, to);
  const pieces = [iceOnly, between, warmOnly] as const;
  const pieceAt = (temperature: Kelvin) => pieces[temperature >= to ? 2 : temperature <= from ? 0 : 1];
  return {
    warm,
    ice,
    ramp,
    breaks: [from, to],
    pieces,
    at: (temperature) => pieceAt(temperature).at(temperature),
    slopeAt: (temperature) => pieceAt(temperature).slopeAt(temperature),
  };
}

/** The cubic between two levels, with level ends; a plain polynomial beyond them. */
function smoothstep(low: number, high: number, from: Kelvin, to: Kelvin): Law {
  const width = to - from;
  return {
    at(temperature) {
      const x = (temperature - from) / width;
      return low + (high - low) * x * x * (3 - 2 * x);
    },
    slopeAt(temperature) {
      const x = (temperature - from) / width;
      return ((high - low) * 6 * x * (1 - x)) / width;
    },
  };
}
