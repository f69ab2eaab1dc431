/** What the properties of this room draw from. */
import fc from 'fast-check';

export const eccentricity = fc.double({ min: 0, max: 0.9999, noNaN: true });
/** Any angle within some thousand turns. */
export const angle = fc.double({ min: -2e4, max: 2e4, noNaN: true });
/** Down to the neighbourhood of 0 and of π, where formulas break. */
export const halfTurn = fc.oneof(
  fc.double({ min: 1e-12, max: Math.PI, noNaN: true }),
  fc.double({ min: -12, max: 0, noNaN: true }).map((power) => Math.PI * 10 ** power),
  fc.double({ min: -15, max: 0, noNaN: true }).map((power) => Math.PI - 10 ** power),
);
