/**
 * The annual-mean balance: the same physics under the time-mean insolation. For stores so deep that a year hardly moves them
 * it is the periodic state; the flow towards it from a warm or cold start keeps that start's basin.
 */
import { banded, factorBanded, solveBanded } from '../../solve/banded.ts';
import { largest } from '../../solve/vectors.ts';
import type { YearMesh } from './mesh.ts';
import type { ZonalPhysics } from './physics.ts';
import { zonalSystem } from './system.ts';

/** A one-step mesh that holds the time mean of another's insolation. */
export function meanMesh(mesh: YearMesh, bands: number): YearMesh {
  const period = mesh.time[mesh.steps];
  const mean = new Float64Array(bands);
  for (let step = 0; step < mesh.steps; step++) {
    // Trapezoidal rule over the steps: first stage and last.
    const share = mesh.width[step] / (2 * period);
    for (let i = 0; i < bands; i++) {
      mean[i] += share * (mesh.insolation[step * 5 * bands + i] + mesh.insolation[(step * 5 + 4) * bands + i]);
    }
  }
  const insolation = new Float64Array(5 * bands);
  for (let stage = 0; stage < 5; stage++) insolation.set(mean, stage * bands);
  return {
    steps: 1,
    time: Float64Array.of(0, period),
    width: Float64Array.of(period),
    insolation,
    insolationDrift: new Float64Array(bands),
  };
}

/** Follows the flow from `start` by implicit steps that lengthen while no band moves by more than a few kelvin. */
export function relaxToAnnualBalance(physics: ZonalPhysics, mesh: YearMesh, start: Float64Array): Float64Array {
  const system = zonalSystem(physics, meanMesh(mesh, physics.bands.count));
  const { size, width } = system;
  const y = start.slice();
  const matrix = banded(size, width);
  const change = new Float64Array(size);
  const most = 4;
  let step = 0.05 * mesh.time[mesh.steps];
  for (let count = 0; count < 400; count++) {
    system.rateInto(0, 0, y, change);
    system.jacobianInto(0, y, matrix);
    for (const diagonal of matrix.diagonals) for (let i = 0; i < size; i++) diagonal[i] *= -1;
    for (let i = 0; i < size; i++) matrix.diagonals[width][i] += 1 / step;
    if (!factorBanded(matrix)) return y;
    solveBanded(matrix, change);
    const moved = largest(change);
    if (!(moved <= most) && count < 390) {
      step /= 3;
      continue;
    }
    for (let i = 0; i < size; i++) y[i] += change[i];
    if (moved < 1e-3 && step > 1e6 * mesh.time[mesh.steps]) return y;
    step *= moved < 0.5 * most ? 3 : 1;
  }
  return y;
}
