/**
 * Periodic solution of y′ = k (p(s) u(y) − r(s) v(y)) with smooth laws u and v (see `separable.ts`), all steps at once: three-stage Radau IIA collocation,
 * quasi-linearised, so that each step is an affine map of its first value and the period closes as y₀ = β/(1 − α).
 * The mesh is doubled until two agree at every node, odd ones against the coarser's interpolation. For any laws u and v;
 * `periodicQuartic` is the faster special case. Source: Ascher, Mattheij & Russell (1995) ch. 5; Hairer & Wanner (1996) §IV.5.
 */
import { circleCache } from './circle.ts';
import { circleDifferencesInto } from './circleDifferences.ts';
import { type Curve, periodicCurve } from './curve.ts';
import { linearStages, solveStages, stagePositions } from './radau.ts';

/** p, r and their slopes on a mesh. */
export interface SeparableTable {
  readonly arrival: Float64Array;
  readonly arrivalSlope: Float64Array;
  readonly clock: Float64Array;
  readonly clockSlope: Float64Array;
}

/** u, u′, v and v′ at many ordinates. */
export interface LawTable {
  readonly gain: Float64Array;
  readonly gainSlope: Float64Array;
  readonly loss: Float64Array;
  readonly lossSlope: Float64Array;
}

export interface PeriodicProblem {
  /** k of the equation, and the ordinate that iterates stay above. */
  readonly rate: number;
  readonly floor: number;
  /** Overwrites the first `count` entries with the laws at the ordinates `y`. */
  readonly lawsInto: (y: Float64Array, count: number, into: LawTable) => void;
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
/** |∂f/∂y| × step above which slopes come from differences of the nodes, for whole meshes at a time. */
const steepStep = 4;
/** Newton's next change is below this times the square of the last. */
const newtonConstant = 20;
/** 1 − multiplier below which the level comes from the mean balance. */
const slowGap = 0.05;

export function periodicSeparable(): (problem: PeriodicProblem) => PeriodicSolution {
  const circle = stageCircle();
  let capacity = 0;
  let work: Work;

  return (problem) => {
    const { tolerance, floor } = problem;
    let size = problem.firstSize;
    let sweeps = 0;
    let leftover = 0;
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
        const change = newtonSweep(problem, work, size);
        sweeps++;
        if (!Number.isFinite(change)) return false;
        leftover = newtonConstant * change * change;
        if (leftover <= target) return true;
      }
      return false;
    };

    load();
    guess();
    let settled = settle(1e-4);
    let difference = Number.POSITIVE_INFINITY;
    let converged = false;
    let nodes: NodeCurve | null = null;
    while (size < maximumSize && !converged) {
      nodes = settled ? curveThroughNodes(problem, work, size) : null;
      if (nodes !== null) prolong(nodes.curve, size, floor, work.next);
      size *= 2;
      load();
      if (nodes !== null) work.y.set(work.next.subarray(0, 3 * size));
      else guess();
      settled = settle(0.02 * tolerance);
      if (settled && nodes !== null) {
        difference = largestNodeChange(work, size);
        converged = difference < safety * tolerance;
      }
    }
    if (settled) nodes = curveThroughNodes(problem, work, size);
    return {
      curve: nodes?.curve ?? emptyCurve(),
      errorEstimate: difference / safety + leftover + rounding,
      converged: settled && converged,
      logMultiplier: nodes?.logMultiplier ?? 0,
      sweeps,
    };
  };
}

/** What an unconverged solve hands over. */
function emptyCurve(): Curve {
  const none = () => new Float64Array(0);
  return { position: new Float64Array(1), value: none(), slope: none(), curvature: none() };
}

interface Work {
  readonly table: SeparableTable;
  readonly laws: LawTable;
  /** Stage values; entry 3i + 2 is node i + 1. */
  readonly y: Float64Array;
  readonly next: Float64Array;
  /** The nodes alone, and the laws there. */
  readonly node: Float64Array;
  readonly nodeSlope: Float64Array;
  readonly nodeCurvature: Float64Array;
  readonly nodeLaws: LawTable;
  readonly homogeneous: Float64Array;
  readonly particular: Float64Array;
}

function workspace(capacity: number): Work {
  const column = () => new Float64Array(capacity);
  const laws = (): LawTable => ({ gain: column(), gainSlope: column(), loss: column(), lossSlope: column() });
  return {
    table: { arrival: column(), arrivalSlope: column(), clock: column(), clockSlope: column() },
    laws: laws(),
    node: column(),
    nodeSlope: column(),
    nodeCurvature: column(),
    nodeLaws: laws(),
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
function newtonSweep(problem: PeriodicProblem, work: Work, size: number): number {
  const { rate, floor } = problem;
  const { y, homogeneous, particular } = work;
  const { arrival, clock } = work.table;
  const { gain, gainSlope, loss, lossSlope } = work.laws;
  problem.lawsInto(y, 3 * size, work.laws);
  const h = (2 * Math.PI) / size;
  const k = rate * h;
  const stages = linearStages();
  let a = 1;
  let b = 0;
  for (let i = 0; i < size; i++) {
    const o = 3 * i;
    const p1 = k * arrival[o];
    const p2 = k * arrival[o + 1];
    const p3 = k * arrival[o + 2];
    const r1 = k * clock[o];
    const r2 = k * clock[o + 1];
    const r3 = k * clock[o + 2];
    const j1 = p1 * gainSlope[o] - r1 * lossSlope[o];
    const j2 = p2 * gainSlope[o + 1] - r2 * lossSlope[o + 1];
    const j3 = p3 * gainSlope[o + 2] - r3 * lossSlope[o + 2];
    solveStages(
      j1,
      j2,
      j3,
      p1 * gain[o] - r1 * loss[o] - j1 * y[o],
      p2 * gain[o + 1] - r2 * loss[o + 1] - j2 * y[o + 1],
      p3 * gain[o + 2] - r3 * loss[o + 2] - j3 * y[o + 2],
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
  const values = particular;
  for (let i = 0; i < 3 * size; i++) values[i] += homogeneous[i] * first;
  const lift = 1 - a < slowGap ? levelOf(problem, work, values, size) : 0;
  let largest = 0;
  for (let i = 0; i < 3 * size; i++) {
    const from = y[i];
    let to = values[i] + lift;
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
function levelOf(problem: PeriodicProblem, work: Work, values: Float64Array, size: number): number {
  const { table, laws } = work;
  problem.lawsInto(values, 3 * size, laws);
  let imbalance = 0;
  let slope = 0;
  for (let i = 2; i < 3 * size; i += 3) {
    imbalance += table.arrival[i] * laws.gain[i] - table.clock[i] * laws.loss[i];
    slope += table.clock[i] * laws.lossSlope[i] - table.arrival[i] * laws.gainSlope[i];
  }
  return imbalance / slope;
}

interface NodeCurve {
  readonly curve: Curve;
  /** ∮ ∂y′/∂y ds by the trapezoidal rule on the nodes: spectrally accurate for a smooth periodic integrand. */
  readonly logMultiplier: number;
}

function curveThroughNodes(problem: PeriodicProblem, work: Work, size: number): NodeCurve {
  const { rate } = problem;
  const { y, table, node, nodeSlope, nodeCurvature } = work;
  const { gain, gainSlope, loss, lossSlope } = work.nodeLaws;
  const h = (2 * Math.PI) / size;
  for (let i = 0; i < size; i++) node[i] = y[stageOfNode(i, size)];
  problem.lawsInto(node, size, work.nodeLaws);
  let sum = 0;
  let steepest = 0;
  for (let i = 0; i < size; i++) {
    const o = stageOfNode(i, size);
    const slopeOfRate = rate * (table.arrival[o] * gainSlope[i] - table.clock[o] * lossSlope[i]);
    const f = rate * (table.arrival[o] * gain[i] - table.clock[o] * loss[i]);
    nodeSlope[i] = f;
    nodeCurvature[i] = rate * (table.arrivalSlope[o] * gain[i] - table.clockSlope[o] * loss[i]) + slopeOfRate * f;
    sum += slopeOfRate;
    steepest = Math.max(steepest, -slopeOfRate);
  }
  if (steepest * h > steepStep) {
    circleDifferencesInto(node, size, nodeSlope, nodeCurvature);
  }
  return { curve: periodicCurve(size, node, nodeSlope, nodeCurvature, 1), logMultiplier: sum * h };
}

/** Node i is the last stage of the step before it. */
function stageOfNode(i: number, size: number): number {
  return i === 0 ? 3 * size - 1 : 3 * i - 1;
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
