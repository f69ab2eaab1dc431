/**
 * Rodas4: a stiffly accurate Rosenbrock method of order 4 with six stages, L-stable; one linear system a stage, all with one
 * factored matrix 1/(γh) − J. Source: Hairer & Wanner (1996) Solving ODEs II, §IV.7 and its program RODAS.
 */
import { type Banded, banded, factorBanded, solveBanded } from './banded.ts';

export const gamma = 0.25;

/** Stage times as shares of the step; stages 5 and 6 lie at its end. */
export const stageTimes = [0, 0.386, 0.21, 0.63, 1, 1] as const;

/** Factors of h ∂f/∂t in each stage. */
export const timeFactors = [0.25, -0.1043, 0.1035, -0.0362, 0, 0] as const;

/** Stage i starts from y + Σ_j shift[i][j] u_j. */
export const shift = [
  [],
  [1.544],
  [0.9466785280815826, 0.2557011698983284],
  [3.314825187068521, 2.896124015972201, 0.9986419139977817],
  [1.221224509226641, 6.019134481288629, 12.53708332932087, -0.687886036105895],
  [1.221224509226641, 6.019134481288629, 12.53708332932087, -0.687886036105895, 1],
] as const;

/** … and adds Σ_j mix[i][j] u_j / h to its right-hand side. */
export const mix = [
  [],
  [-5.6688],
  [-2.430093356833875, -0.2063599157091915],
  [-0.1073529058151375, -9.594562251023355, -20.47028614809616],
  [7.496443313967647, -10.24680431464352, -33.99990352819905, 11.7089089320616],
  [8.083246795921522, -7.981132988064893, -31.52159432874371, 16.31930543123136, -6.058818238834054],
] as const;

/** What a stage method needs to know of a system y′ = f(t, y) with a band Jacobian. */
export interface StageSystem {
  readonly size: number;
  /** Diagonals of the Jacobian on either side of the main one. */
  readonly width: number;
  /** f at stage `stage` of step `step`. */
  rateInto(step: number, stage: number, y: Float64Array, f: Float64Array): void;
  /** f, ∂f/∂y and ∂f/∂t at the start of step `step`: at once, since they share much. */
  lineariseInto(step: number, y: Float64Array, f: Float64Array, matrix: Banded, drift: Float64Array): void;
}

/** Buffers of a march; one per thread and size. */
export interface StageWork {
  readonly stages: readonly Float64Array[];
  readonly trial: Float64Array;
  readonly mixed: Float64Array;
  readonly drift: Float64Array;
  readonly matrix: Banded;
}

export function stageWork(size: number, width: number): StageWork {
  return {
    stages: stageTimes.map(() => new Float64Array(size)),
    trial: new Float64Array(size),
    mixed: new Float64Array(size),
    drift: new Float64Array(size),
    matrix: banded(size, width),
  };
}

/** What a march leaves behind for interpolation: y and y′ at every step end, row by row; (steps + 1) × size. */
export interface StageHistory {
  readonly value: Float64Array;
  readonly rate: Float64Array;
}

export function stageHistory(steps: number, size: number): StageHistory {
  return { value: new Float64Array((steps + 1) * size), rate: new Float64Array((steps + 1) * size) };
}

/**
 * Takes all steps of the given widths, in place. The rate after the last step is that of the first: marches here are whole
 * periods. Returns false when a pivot vanishes or a value is no longer finite.
 */
export function marchRodas4(
  system: StageSystem,
  widths: Float64Array,
  y: Float64Array,
  work: StageWork,
  history: StageHistory | null,
): boolean {
  const { size } = system;
  for (let step = 0; step < widths.length; step++) {
    if (history !== null) history.value.set(y, step * size);
    if (!takeStep(system, step, widths[step], y, work, history)) return false;
  }
  if (history !== null) {
    history.value.set(y, widths.length * size);
    system.rateInto(0, 0, y, work.trial);
    history.rate.set(work.trial, widths.length * size);
  }
  return y.every(Number.isFinite);
}

function takeStep(
  system: StageSystem,
  step: number,
  h: number,
  y: Float64Array,
  work: StageWork,
  history: StageHistory | null,
): boolean {
  const { size } = system;
  const { stages, trial, mixed, drift, matrix } = work;
  system.lineariseInto(step, y, stages[0], matrix, drift);
  if (history !== null) history.rate.set(stages[0], step * size);
  const scale = 1 / (gamma * h);
  for (const diagonal of matrix.diagonals) for (let i = 0; i < size; i++) diagonal[i] = -diagonal[i];
  const main = matrix.diagonals[matrix.width];
  for (let i = 0; i < size; i++) main[i] += scale;
  if (!factorBanded(matrix)) return false;
  addDrift(timeFactors[0] * h, drift, stages[0]);
  solveBanded(matrix, stages[0]);
  for (let stage = 1; stage < stages.length; stage++) {
    const u = stages[stage];
    prepareStage(stage, h, y, work);
    system.rateInto(step, stage, trial, u);
    for (let i = 0; i < size; i++) u[i] += mixed[i];
    solveBanded(matrix, u);
  }
  const last = stages[stages.length - 1];
  for (let i = 0; i < size; i++) y[i] = trial[i] + last[i];
  return true;
}

function addDrift(factor: number, drift: Float64Array, u: Float64Array): void {
  for (let i = 0; i < u.length; i++) u[i] += factor * drift[i];
}

/**
 * trial = y + Σ_j shift_j u_j, where the stage is evaluated, and mixed = Σ_j mix_j u_j / h + drift, what joins its rate: in one
 * pass over the stages before it, each of which has its own loop so that its weights stay in registers.
 */
function prepareStage(stage: number, h: number, y: Float64Array, { stages, trial, mixed, drift }: StageWork): void {
  const size = y.length;
  const [a0 = 0, a1 = 0, a2 = 0, a3 = 0] = shift[stage];
  const inverse = 1 / h;
  const [b0 = 0, b1 = 0, b2 = 0, b3 = 0, b4 = 0] = mix[stage];
  const [m0, m1, m2, m3, m4] = [b0 * inverse, b1 * inverse, b2 * inverse, b3 * inverse, b4 * inverse];
  const d = timeFactors[stage] * h;
  const [u0, u1, u2, u3, u4] = stages;
  switch (stage) {
    case 1:
      for (let i = 0; i < size; i++) {
        trial[i] = y[i] + a0 * u0[i];
        mixed[i] = m0 * u0[i] + d * drift[i];
      }
      break;
    case 2:
      for (let i = 0; i < size; i++) {
        trial[i] = y[i] + a0 * u0[i] + a1 * u1[i];
        mixed[i] = m0 * u0[i] + m1 * u1[i] + d * drift[i];
      }
      break;
    case 3:
      for (let i = 0; i < size; i++) {
        trial[i] = y[i] + a0 * u0[i] + a1 * u1[i] + a2 * u2[i];
        mixed[i] = m0 * u0[i] + m1 * u1[i] + m2 * u2[i] + d * drift[i];
      }
      break;
    case 4:
      for (let i = 0; i < size; i++) {
        trial[i] = y[i] + a0 * u0[i] + a1 * u1[i] + a2 * u2[i] + a3 * u3[i];
        mixed[i] = m0 * u0[i] + m1 * u1[i] + m2 * u2[i] + m3 * u3[i];
      }
      break;
    default: // the last starts where the one before it did, and from its own result
      for (let i = 0; i < size; i++) {
        trial[i] += u4[i];
        mixed[i] = m0 * u0[i] + m1 * u1[i] + m2 * u2[i] + m3 * u3[i] + m4 * u4[i];
      }
  }
}
