/**
 * Numbers strictly between 0 and 1, one for each draw and dimension.
 * Draw k depends on nothing but k, the seed and the dimension: not on the order, the worker or what was drawn before.
 */
export interface UniformDraws {
  /** draw: whole, 0 ≤ draw < 2³²; dimension: whole, from 0. */
  at(draw: number, dimension: number): number;
  /** out[j] = at(first + j, dimension), faster than one by one. */
  fillInto(dimension: number, first: number, out: Float64Array): void;
}
