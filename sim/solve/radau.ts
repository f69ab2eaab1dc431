/**
 * Radau IIA collocation with three stages (order 5, L-stable, stiffly accurate), linearised for a scalar equation.
 * Source: Hairer & Wanner (1996) Solving ODEs II, table IV.5.6.
 */
const root6 = Math.sqrt(6);

/** Stage positions within a step; the last is the step's end. */
export const stagePositions = [(4 - root6) / 10, (4 + root6) / 10, 1] as const;

/** Weights of the quadrature on the stages: the last row of the table. */
export const stageWeights = [(16 - root6) / 36, (16 + root6) / 36, 1 / 9] as const;

const a11 = (88 - 7 * root6) / 360;
const a12 = (296 - 169 * root6) / 1800;
const a13 = (-2 + 3 * root6) / 225;
const a21 = (296 + 169 * root6) / 1800;
const a22 = (88 + 7 * root6) / 360;
const a23 = (-2 - 3 * root6) / 225;
const [a31, a32, a33] = stageWeights;

for (const [c, sum] of [
  [stagePositions[0], a11 + a12 + a13],
  [stagePositions[1], a21 + a22 + a23],
  [stagePositions[2], a31 + a32 + a33],
] as const) {
  if (Math.abs(c - sum) > 4e-16) throw new Error('Radau IIA table: a row does not sum to its position');
}

/** The three stages as affine functions of the step's first value: Y_j = first_j y₀ + rest_j. */
export interface LinearStages {
  first1: number;
  first2: number;
  first3: number;
  rest1: number;
  rest2: number;
  rest3: number;
}

export function linearStages(): LinearStages {
  return { first1: 0, first2: 0, first3: 0, rest1: 0, rest2: 0, rest3: 0 };
}

/**
 * Solves Y = y₀ + A (g + j ∘ Y) for Y, where f(Y) ≈ (g + j Y)/h at each stage: `j` is h ∂f/∂y there and
 * `g` = h f − j Y, both at the current iterate. One call is one Newton iteration of a step.
 */
export function solveStages(
  j1: number,
  j2: number,
  j3: number,
  g1: number,
  g2: number,
  g3: number,
  out: LinearStages,
): void {
  const r1 = a11 * g1 + a12 * g2 + a13 * g3;
  const r2 = a21 * g1 + a22 * g2 + a23 * g3;
  const r3 = a31 * g1 + a32 * g2 + a33 * g3;
  const m11 = 1 - a11 * j1;
  const m12 = -a12 * j2;
  const m13 = -a13 * j3;
  const m21 = -a21 * j1;
  const m22 = 1 - a22 * j2;
  const m23 = -a23 * j3;
  const m31 = -a31 * j1;
  const m32 = -a32 * j2;
  const m33 = 1 - a33 * j3;
  const c11 = m22 * m33 - m23 * m32;
  const c12 = m13 * m32 - m12 * m33;
  const c13 = m12 * m23 - m13 * m22;
  const c21 = m23 * m31 - m21 * m33;
  const c22 = m11 * m33 - m13 * m31;
  const c23 = m13 * m21 - m11 * m23;
  const c31 = m21 * m32 - m22 * m31;
  const c32 = m12 * m31 - m11 * m32;
  const c33 = m11 * m22 - m12 * m21;
  const inverse = 1 / (m11 * c11 + m12 * c21 + m13 * c31);
  out.first1 = (c11 + c12 + c13) * inverse;
  out.first2 = (c21 + c22 + c23) * inverse;
  out.first3 = (c31 + c32 + c33) * inverse;
  out.rest1 = (c11 * r1 + c12 * r2 + c13 * r3) * inverse;
  out.rest2 = (c21 * r1 + c22 * r2 + c23 * r3) * inverse;
  out.rest3 = (c31 * r1 + c32 * r2 + c33 * r3) * inverse;
}
