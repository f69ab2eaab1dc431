/** A march from a start, to a promised accuracy. */
import { certify } from './certify.ts';
import type { Curve } from './curve.ts';
import { march } from './march.ts';
import type { Separable } from './separable.ts';

export interface Forward {
  readonly curve: Curve;
  readonly errorEstimate: number;
  readonly converged: boolean;
  readonly steps: number;
}

/** Null when no march reaches the end. */
export function forward(
  problem: Separable,
  from: number,
  to: number,
  value: number,
  tolerance: number,
  maximumSteps: number,
): Forward | null {
  const first = march(problem, {
    from,
    to,
    value,
    tolerance: Math.min(1e-4, 30 * tolerance),
    keep: false,
    maximumSteps,
  });
  if (!first.completed) return null;
  const solveOn = (boundaries: Float64Array): { curve: Curve; steps: number } | null => {
    const run = march(problem, { from, to, value, tolerance, keep: true, boundaries, maximumSteps });
    return run.completed && run.curve !== null ? { curve: run.curve, steps: run.steps } : null;
  };
  const certified = certify(solveOn, first.boundaries, tolerance, maximumSteps);
  if (certified === null) return null;
  const { result, errorEstimate, converged } = certified;
  return { curve: result.curve, steps: result.steps, errorEstimate, converged };
}
