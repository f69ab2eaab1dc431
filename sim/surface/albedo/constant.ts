import type { Albedo } from '../../world.ts';
import { requireAlbedo } from './bounds.ts';

/**
 * The same Bond albedo at every temperature.
 * Errors: SimError unless 0 ≤ value < 1.
 */
export function constantAlbedo(value: number): Albedo {
  requireAlbedo('planet.bondAlbedo', value);
  const law = { at: () => value, slopeAt: () => 0 };
  return { warm: value, ice: value, ramp: null, breaks: [], pieces: [law], ...law };
}
