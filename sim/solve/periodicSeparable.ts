/**
 * Periodic solution of a `Separable` equation with one smooth piece, all steps at once: three-stage Radau IIA collocation,
 * quasi-linearised, so that each step is an affine map of its first value and the period closes as y₀ = β/(1 − α).
 * The mesh is doubled until two agree at every node, odd ones against the coarser's interpolation. For any laws u and v;
 * `periodicQuartic` is the faster special case. Source: Ascher, Mattheij & Russell (1995) ch. 5; Hairer & Wanner (1996) §IV.5.
 */
import { circleCache } from './circle.ts';
import type { Curve } from './curve.ts';
import { linearStages, solveStages, stagePositions } from './radau.ts';
import type { Separable } from './separable.ts';
import { pushStiffPiece, type StiffEnds, settleStiffPieces, stiffSteepness } from './stiffPieces.ts';

/** p, r and their slopes on a mesh. */
export interface SeparableTable {
  readonly arrival: Float64Array;
  readonly arrivalSlope: Float64Array;
  readonly clock: Float64Array;
  readonly clockSlope: Float64Array;
}

export interface PeriodicProblem {
  readonly equation: Separable;
  /** Overwrites the first `count` entries with the forcing at the points of given cosine and sine. */
  readonly tableInto: (cosines: Float64Array, sines: Float64Array, count: number, into: SeparableTable) => void;
  readonly tolerance: number;
  readonly firstSize: number;
  /** First iterate at any s. */
  readonly guess: (arrival: number, clock: number) => number;
}

export interface PeriodicSolution {
  readonly curve: Curve;
  readonly errorEstimate: number;
  readonly converged: boolean;
  readonly logMultiplier: number;
  readonly sweeps: number;
}

const maximumSize = 8192;
const maximumSweeps = 40;
const safety = 6;
const rounding = 1e-13;
/** 1 − multiplier below which the level comes from the mean balance. */
const slowGap = 0.05;

export function periodicSeparable(): (problem: PeriodicProblem) => PeriodicSolution {
  const circle = stageCircle();
  let capacity = 0;
  let work: Work;

  return (problem) => {
    const { equation, tolerance } = problem;
    let size = problem.firstSize;
    let sweeps = 0;
    const load = (): void => {
      if (6 * size > capacity) {
        // Room for the stages of this mesh and, when it is prolonged, of the next.
        capacity = 24 * size;
        const keep = work;
        work = workspace(capacity);
        if (keep !== undefined) work.next.set(keep.next);
      }
      const { cosines, sines } = circle(size);
      problem.tableInto(cosines, sines, 3 * size, work.table);
    };
    const guess = (): void => {
      for (let i = 0; i < 3 * size; i++) work.y[i] = problem.guess(work.table.arrival[i], work.table.clock[i]);
    };
    const settle = (target: number): boolean => {
      for (let count = 0; count < maximumSweeps; count++) {
        const change = newtonSweep(equation, work, size);
        sweeps++;
        if (!Number.isFinite(change)) return false;
        if (change * change * 20 <= target) return true;
      }
      return false;
    };

    load();
    guess();
    let settled = settle(1e-4);
    let difference = Number.POSITIVE_INFINITY;
    let converged = false;
    let curve: Curve | null = null;
    let logMultiplier = 0;
    while (size < maximumSize && !converged) {
      curve = settled ? nodesToCurve(equation, work, size) : null;
      if (curve !== null) prolong(curve, size, equation.floor, work.next);
      size *= 2;
      load();
      if (curve !== null) work.y.set(work.next.subarray(0, 3 * size));
      else guess();
      settled = settle(1e-5 * tolerance);
      if (settled && curve !== null) {
        difference = largestNodeChange(work, size);
        converged = difference < safety * tolerance;
      }
    }
    if (settled) {
      logMultiplier = multiplierOf(equation, work, size);
      curve = nodesToCurve(equation, work, size);
    }
    return {
      curve: curve ?? {
        position: new Float64Array(1),
        value: new Float64Array(0),
        slope: new Float64Array(0),
        curvature: new Float64Array(0),
      },
      errorEstimate: difference / safety + rounding,
      converged: settled && converged,
      logMultiplier,
      sweeps,
    };
  };
}

interface Work {
  readonly table: SeparableTable;
  /** Stage values; entry 3i + 2 is node i + 1. */
  readonly y: Float64Array;
  readonly next: Float64Array;
  readonly homogeneous: Float64Array;
  readonly particular: Float64Array;
}

function workspace(capacity: number): Work {
  const column = () => new Float64Array(capacity);
  return {
    table: { arrival: column(), arrivalSlope: column(), clock: column(), clockSlope: column() },
    y: column(),
    next: column(),
    homogeneous: column(),
    particular: column(),
  };
}

/** Cosines and sines at the stages of every step. */
function stageCircle(): (size: number) => { readonly cosines: Float64Array; readonly sines: Float64Array } {
  const kept = new Map<number, { cosines: Float64Array; sines: Float64Array }>();
  const node = circleCache();
  const [c1, c2] = stagePositions;
  return (size) => {
    let stages = kept.get(size);
    if (stages === undefined) {
      const nodes = node(size);
      stages = { cosines: new Float64Array(3 * size), sines: new Float64Array(3 * size) };
      for (let i = 0; i < size; i++) {
        for (const [j, c] of [c1, c2].entries()) {
          stages.cosines[3 * i + j] = Math.cos((2 * Math.PI * (i + c)) / size);
          stages.sines[3 * i + j] = Math.sin((2 * Math.PI * (i + c)) / size);
        }
        stages.cosines[3 * i + 2] = nodes.cosines[(i + 1) % size];
        stages.sines[3 * i + 2] = nodes.sines[(i + 1) % size];
      }
      kept.set(size, stages);
    }
    return stages;
  };
}

/** One Newton iteration of all stages; returns the largest relative change, or NaN where the laws left their domain. */
function newtonSweep(equation: Separable, work: Work, size: number): number {
  const { rate, gain, gainSlope, loss, lossSlope, floor } = equation;
  const { y, homogeneous, particular } = work;
  const { arrival, clock } = work.table;
  const h = (2 * Math.PI) / size;
  const k = rate * h;
  const stages = linearStages();
  let a = 1;
  let b = 0;
  for (let i = 0; i < size; i++) {
    const o = 3 * i;
    const y1 = y[o];
    const y2 = y[o + 1];
    const y3 = y[o + 2];
    const p1 = k * arrival[o];
    const p2 = k * arrival[o + 1];
    const p3 = k * arrival[o + 2];
    const r1 = k * clock[o];
    const r2 = k * clock[o + 1];
    const r3 = k * clock[o + 2];
    const j1 = p1 * gainSlope(y1, 0) - r1 * lossSlope(y1);
    const j2 = p2 * gainSlope(y2, 0) - r2 * lossSlope(y2);
    const j3 = p3 * gainSlope(y3, 0) - r3 * lossSlope(y3);
    solveStages(
      j1,
      j2,
      j3,
      p1 * gain(y1, 0) - r1 * loss(y1) - j1 * y1,
      p2 * gain(y2, 0) - r2 * loss(y2) - j2 * y2,
      p3 * gain(y3, 0) - r3 * loss(y3) - j3 * y3,
      stages,
    );
    homogeneous[o] = stages.first1 * a;
    particular[o] = stages.first1 * b + stages.rest1;
    homogeneous[o + 1] = stages.first2 * a;
    particular[o + 1] = stages.first2 * b + stages.rest2;
    b = stages.first3 * b + stages.rest3;
    a = stages.first3 * a;
    homogeneous[o + 2] = a;
    particular[o + 2] = b;
  }
  const first = b / (1 - a);
  const lift = 1 - a < slowGap ? levelOf(equation, work, size, first) : 0;
  let largest = 0;
  for (let i = 0; i < 3 * size; i++) {
    const from = y[i];
    let to = homogeneous[i] * first + particular[i] + lift;
    // Never below 0.3 of the way down to the floor: the laws may not be defined beneath.
    const lowest = floor + 0.3 * (from - floor);
    if (!(to > lowest)) to = Number.isFinite(to) ? lowest : Number.NaN;
    const change = Math.abs(to - from) / Math.abs(to);
    if (!(change <= largest)) largest = change;
    y[i] = to;
  }
  return largest;
}

/**
 * A slow system closes at 1 − α ≪ 1 and loses the digits of its level; but ⟨p u⟩ = ⟨r v⟩ holds for every periodic solution.
 * Returns what must be added to all values (one Newton step; the trapezoidal rule on the nodes is spectrally accurate).
 */
function levelOf(equation: Separable, work: Work, size: number, first: number): number {
  const { homogeneous, particular, table } = work;
  let imbalance = 0;
  let slope = 0;
  for (let i = 2; i < 3 * size; i += 3) {
    const y = homogeneous[i] * first + particular[i];
    imbalance += table.arrival[i] * equation.gain(y, 0) - table.clock[i] * equation.loss(y);
    slope += table.clock[i] * equation.lossSlope(y) - table.arrival[i] * equation.gainSlope(y, 0);
  }
  return imbalance / slope;
}

function nodesToCurve(equation: Separable, work: Work, size: number): Curve {
  const { rate, gain, gainSlope, loss, lossSlope } = equation;
  const { y, table } = work;
  const h = (2 * Math.PI) / size;
  const position = new Float64Array(size + 1);
  const value = new Float64Array(2 * size);
  const slope = new Float64Array(2 * size);
  const curvature = new Float64Array(2 * size);
  const stiff: StiffEnds = { index: [], slope: [], curvature: [] };
  let previousStiffness = 0;
  for (let i = -1; i < size; i++) {
    // Node i + 1: the right end of step i and the left end of step i + 1.
    const o = i < 0 ? 3 * size - 1 : 3 * i + 2;
    const node = y[o];
    const u = gain(node, 0);
    const v = loss(node);
    const slopeOfRate = rate * (table.arrival[o] * gainSlope(node, 0) - table.clock[o] * lossSlope(node));
    const f = rate * (table.arrival[o] * u - table.clock[o] * v);
    const second = rate * (table.arrivalSlope[o] * u - table.clockSlope[o] * v) + slopeOfRate * f;
    const stiffness = Math.abs(slopeOfRate) * h;
    position[i + 1] = (i + 1) * h;
    if (i >= 0) {
      value[2 * i + 1] = node;
      slope[2 * i + 1] = f;
      curvature[2 * i + 1] = second;
      const start = value[2 * i];
      if (Math.max(stiffness, previousStiffness) > stiffSteepness) {
        pushStiffPiece(stiff, i, h, y[3 * i] - start, y[3 * i + 1] - start, node - start);
      }
    }
    if (i + 1 < size) {
      value[2 * i + 2] = node;
      slope[2 * i + 2] = f;
      curvature[2 * i + 2] = second;
    }
    previousStiffness = stiffness;
  }
  position[size] = 2 * Math.PI;
  const curve = { position, value, slope, curvature };
  settleStiffPieces(curve, stiff);
  return curve;
}

/** The curve at the stages of the mesh of twice its size, kept well above the floor on coarse meshes. */
function prolong(curve: Curve, size: number, floor: number, stages: Float64Array): void {
  const [c1, c2] = stagePositions;
  const offsets = [c1 / 2, c2 / 2, 0.5, (1 + c1) / 2, (1 + c2) / 2, 1];
  const h = curve.position[1] - curve.position[0];
  for (let i = 0; i < size; i++) {
    const a = 2 * i;
    const b = a + 1;
    const start = curve.value[a];
    const rise = curve.value[b] - start;
    const v0 = curve.slope[a] * h;
    const v1 = curve.slope[b] * h;
    const w0 = curve.curvature[a] * h * h;
    const w1 = curve.curvature[b] * h * h;
    const k3 = 10 * rise - 6 * v0 - 4 * v1 - 1.5 * w0 + 0.5 * w1;
    const k4 = -15 * rise + 8 * v0 + 7 * v1 + 1.5 * w0 - w1;
    const k5 = 6 * rise - 3 * (v0 + v1) - 0.5 * (w0 - w1);
    const lowest = floor + 0.7 * (Math.min(start, curve.value[b]) - floor);
    for (let j = 0; j < 6; j++) {
      const x = offsets[j];
      const y = start + x * (v0 + x * (0.5 * w0 + x * (k3 + x * (k4 + x * k5))));
      stages[6 * i + j] = Math.max(y, lowest);
    }
  }
}

function largestNodeChange(work: Work, size: number): number {
  let largest = 0;
  for (let i = 2; i < 3 * size; i += 3) {
    const change = Math.abs(work.y[i] - work.next[i]) / Math.abs(work.y[i]);
    if (!(change <= largest)) largest = change;
  }
  return largest;
}

/** ∮ ∂y′/∂y ds by the trapezoidal rule on the nodes: spectrally accurate for a smooth periodic integrand. */
function multiplierOf(equation: Separable, work: Work, size: number): number {
  let sum = 0;
  for (let i = 2; i < 3 * size; i += 3) {
    sum +=
      work.table.arrival[i] * equation.gainSlope(work.y[i], 0) - work.table.clock[i] * equation.lossSlope(work.y[i]);
  }
  return (equation.rate * sum * 2 * Math.PI) / size;
}
