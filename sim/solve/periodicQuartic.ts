/**
 * Periodic solution of  y′ = κ (p(s) − r(s) y⁴),  y > 0, p ≥ 0, r > 0, both 2π-periodic in s.
 *
 * All steps of the period are solved at once. One step is the (2,3) Padé two-derivative rule (order 5, L-stable)
 *
 *   y₁ − ⅗h f₁ + (3/20)h² f₁′ − (1/60)h³ f₁″ = y₀ + ⅖h f₀ + (1/20)h² f₀′,
 *
 * Newton's linearised steps form a cyclic two-term recurrence d_n = a_n d_0 + b_n, closed by d_0 = b_N/(1 − a_N): the cost
 * does not grow with the memory of the system. The mesh is doubled until two meshes agree at every node of the finer one,
 * the odd nodes against quintic Hermite interpolation of the coarser, so the estimate speaks of interpolated values too.
 * Source: Hairer & Wanner (1996) Solving ODEs II, §IV.3 (Padé), §IV.8; Ascher, Mattheij & Russell (1995) ch. 5 for
 * solving every step of a boundary value problem at once. It has never heard of a planet.
 */
import { circleCache } from './circle.ts';
import { type Curve, periodicCurve } from './curve.ts';

/** p, r and their first two derivatives on a mesh. */
export interface QuarticForcing {
  readonly p0: Float64Array;
  readonly p1: Float64Array;
  readonly p2: Float64Array;
  readonly r0: Float64Array;
  readonly r1: Float64Array;
  readonly r2: Float64Array;
}

export interface QuarticProblem {
  /** κ > 0. */
  readonly rate: number;
  /** Overwrites the first `size` entries of `into` with the forcing at s = 2πi/size. */
  readonly forcingInto: (cosines: Float64Array, sines: Float64Array, size: number, into: QuarticForcing) => void;
  /** Relative error asked of y. */
  readonly tolerance: number;
  /** First mesh; a power of two. */
  readonly firstSize: number;
}

/** Belongs to its solver, whose next solve overwrites it. */
export interface QuarticSolution {
  readonly size: number;
  /** y, y′ and y″ at the nodes: the first `size` entries. */
  readonly value: Float64Array;
  readonly slope: Float64Array;
  readonly curvature: Float64Array;
  /** p and r at the nodes. */
  readonly forcing: QuarticForcing;
  /** κ. */
  readonly rate: number;
  /** Upper bound of the relative error of y anywhere. */
  readonly errorEstimate: number;
  readonly converged: boolean;
  /** ln of the multiplier: −4κ ∮ r y³ ds. */
  readonly logMultiplier: number;
  readonly sweeps: number;
}

/** Below this rate the closing of the recurrence loses digits, and the mean of y⁴ is known better than y: see `pinMean`. */
const slowRate = 1e-5;
const maximumSize = 16384;
const maximumSweeps = 40;
const rounding = 4e-15;
/** The finer mesh of an order-5 pair is 31 times better; 10 leaves room for the lower order of stiff stretches. */
const safety = 10;
/** On the slow manifold the curvature is known to O(κ⁻¹) only: interpolation gains a factor 4 by halving the mesh. */
const manifoldSafety = 3;
/** Newton's next change is below this times the square of the last. */
const newtonConstant = 20;

/** A solver with its own buffers; one per thread. It leaves no garbage once its buffers have grown. */
export function quarticSolver(): (problem: QuarticProblem) => QuarticSolution {
  const circle = circleCache();
  const work = workspace();

  function load(problem: QuarticProblem): void {
    reserve(work, 2 * work.size); // this mesh, and the next when it is prolonged
    const { cosines, sines } = circle(work.size);
    problem.forcingInto(cosines, sines, work.size, work.forcing);
  }

  return (problem) => {
    const { rate, tolerance } = problem;
    work.rate = rate;
    work.size = problem.firstSize;
    work.sweeps = 0;
    load(problem);
    blendedGuess(work.value, work.forcing, rate, work.size);
    let settled = settle(work, 1e-4, tolerance);
    let difference = Number.POSITIVE_INFINITY;
    let accepted = false;
    while (work.size < maximumSize && !accepted) {
      if (settled) {
        derivatives(work, onManifold(work, tolerance));
        prolong(work);
      }
      work.size *= 2;
      load(problem);
      if (settled) copy(work.coarse, work.size, work.value);
      else blendedGuess(work.value, work.forcing, rate, work.size);
      const compare = settled;
      settled = settle(work, 0.02 * tolerance, tolerance);
      difference =
        settled && compare ? largestRelativeChange(work.value, work.coarse, work.size) : Number.POSITIVE_INFINITY;
      work.sweeps++; // for the log, a mesh counts as one
      accepted = difference < (onManifold(work, tolerance) ? manifoldSafety : safety) * tolerance;
    }
    const manifold = onManifold(work, tolerance);
    derivatives(work, manifold);
    work.errorEstimate =
      work.leftover +
      (manifold ? difference / manifoldSafety + rounding : difference / safety + rounding * amplification(work));
    work.converged = accepted;
    work.logMultiplier = logMultiplier(work.value, work.forcing, rate, work.size);
    return work;
  };
}

/** The solution as it grows, and what a sweep leaves behind. */
interface Work {
  size: number;
  rate: number;
  forcing: QuarticForcing;
  value: Float64Array;
  coarse: Float64Array;
  slope: Float64Array;
  curvature: Float64Array;
  homogeneous: Float64Array;
  particular: Float64Array;
  /** Largest relative change of y in the last sweep. */
  change: number;
  /** 4κ max(r y³). */
  stiffness: number;
  /** What Newton has left, as interpolated values feel it. */
  leftover: number;
  sweeps: number;
  errorEstimate: number;
  converged: boolean;
  logMultiplier: number;
}

function workspace(): Work {
  const none = new Float64Array(0);
  return {
    size: 0,
    rate: 0,
    forcing: { p0: none, p1: none, p2: none, r0: none, r1: none, r2: none },
    value: none,
    coarse: none,
    slope: none,
    curvature: none,
    homogeneous: none,
    particular: none,
    change: 0,
    stiffness: 0,
    leftover: 0,
    sweeps: 0,
    errorEstimate: 0,
    converged: false,
    logMultiplier: 0,
  };
}

function reserve(work: Work, size: number): void {
  if (size <= work.value.length) return;
  const capacity = Math.max(512, size);
  const column = () => new Float64Array(capacity);
  work.forcing = { p0: column(), p1: column(), p2: column(), r0: column(), r1: column(), r2: column() };
  work.value = grown(work.value, capacity);
  work.coarse = grown(work.coarse, capacity);
  work.slope = column();
  work.curvature = column();
  work.homogeneous = column();
  work.particular = column();
}

/** Interpolated values feel an error of y as (gh)²/64 times itself, through the curvature: g = 4κ max(r y³), h the step. */
function amplification({ stiffness, size }: Work): number {
  const gh = (stiffness * (2 * Math.PI)) / size;
  return 1 + (gh * gh) / 64;
}

/** Slopes from f amplify rounding; where that alone would spoil the tolerance they come from the slow manifold. */
function onManifold(work: Work, tolerance: number): boolean {
  return amplification(work) * 40 * rounding > tolerance;
}

/** Newton until what the next sweep would change, as interpolated values feel it, is below `target`. */
function settle(work: Work, target: number, tolerance: number): boolean {
  for (let count = 0; count < maximumSweeps; count++) {
    newtonSweep(work);
    work.sweeps++;
    const { change } = work;
    if (!Number.isFinite(change)) return false;
    work.leftover = newtonConstant * change * change * (onManifold(work, tolerance) ? 1 : amplification(work));
    if (work.leftover <= target) {
      if (work.rate < slowRate) pinMean(work.value, work.forcing, work.size);
      return true;
    }
  }
  return false;
}

function copy(from: Float64Array, count: number, to: Float64Array): void {
  for (let i = 0; i < count; i++) to[i] = from[i];
}

function grown(column: Float64Array, capacity: number): Float64Array {
  const larger = new Float64Array(capacity);
  larger.set(column);
  return larger;
}

/** The solution as a Curve on [0, 2π], ordinates multiplied by `scale`. */
export function quarticCurve(solution: QuarticSolution, scale: number): Curve {
  return periodicCurve(solution.size, solution.value, solution.slope, solution.curvature, scale);
}

/** Between the steady value p/r (fast) and the mean-preserving constant (slow): y⁴ = w p/r + (1−w)⟨p⟩/⟨r⟩, w = 4κ/(1+4κ). */
function blendedGuess(y: Float64Array, forcing: QuarticForcing, rate: number, size: number): void {
  const { p0, r0 } = forcing;
  let p = 0;
  let r = 0;
  for (let i = 0; i < size; i++) {
    p += p0[i];
    r += r0[i];
  }
  const w = (4 * rate) / (1 + 4 * rate);
  const constant = ((1 - w) * p) / r;
  for (let i = 0; i < size; i++) y[i] = Math.sqrt(Math.sqrt((w * p0[i]) / r0[i] + constant));
}

/** One Newton iteration of all steps at once. */
function newtonSweep(work: Work): void {
  const { value: y, rate, size, homogeneous, particular } = work;
  const { p0, p1, p2, r0, r1, r2 } = work.forcing;
  const h = (2 * Math.PI) / size;
  const left1 = 0.6 * h;
  const left2 = 0.15 * h * h;
  const left3 = (h * h * h) / 60;
  const right1 = 0.4 * h;
  const right2 = 0.05 * h * h;
  let stiffness = 0;
  let previousRight = 0;
  let previousRightSlope = 0;
  let firstLeft = 0;
  let firstLeftSlope = 1;
  let firstGap = 0;
  let a = 1;
  let b = 0;
  let gap = 0; // 1 − a, summed from like-signed terms so that a slow system keeps its digits
  let previousGap = 0;
  for (let i = 0; i < size; i++) {
    const t = y[i];
    const t2 = t * t;
    const t3 = t2 * t;
    const t4 = t2 * t2;
    const r = rate * r0[i];
    const rp = rate * r1[i];
    const rpp = rate * r2[i];
    const g3 = 4 * r * t3;
    if (g3 > stiffness) stiffness = g3;
    const g2 = 12 * r * t2;
    const h3 = rp * t3;
    const f = rate * p0[i] - r * t4;
    const f1 = rate * p1[i] - rp * t4 - g3 * f;
    const f2 = rate * p2[i] - rpp * t4 - 8 * h3 * f - g2 * f * f - g3 * f1;
    const j1 = -4 * h3 - g2 * f + g3 * g3;
    const j2 =
      -4 * rpp * t3 - 24 * rp * t2 * f + 8 * h3 * g3 - 24 * r * t * f * f + 2 * g2 * f * g3 - g2 * f1 - g3 * j1;
    const left = -left1 * f + left2 * f1 - left3 * f2;
    const leftGap = left1 * g3 + left2 * j1 - left3 * j2; // ∂left/∂y − 1
    if (i === 0) {
      firstLeft = left;
      firstLeftSlope = 1 + leftGap;
      firstGap = leftGap;
    } else {
      const inverse = 1 / (1 + leftGap);
      const k1 = previousRightSlope * inverse;
      const k0 = (y[i - 1] - t + (previousRight - left)) * inverse;
      gap += a * (leftGap - previousGap) * inverse;
      a *= k1;
      b = k1 * b + k0;
      homogeneous[i] = a;
      particular[i] = b;
    }
    previousRight = right1 * f + right2 * f1;
    previousGap = -right1 * g3 + right2 * j1; // ∂right/∂y − 1
    previousRightSlope = 1 + previousGap;
  }
  const inverse = 1 / firstLeftSlope;
  gap += a * (firstGap - previousGap) * inverse;
  b = (previousRightSlope * b + (y[size - 1] - y[0] + (previousRight - firstLeft))) * inverse;
  const d0 = b / gap;
  homogeneous[0] = 1;
  particular[0] = 0;
  let largest = 0;
  for (let i = 0; i < size; i++) {
    const t = y[i];
    let d = homogeneous[i] * d0 + particular[i];
    if (t + d < 0.3 * t) d = -0.7 * t;
    y[i] = t + d;
    // Divides only when a new largest is found; NaN is one.
    if (!(Math.abs(d) <= largest * t)) largest = Math.abs(d) / t;
  }
  work.change = largest;
  work.stiffness = stiffness;
}

/** y′ and y″ at the nodes. */
function derivatives(work: Work, manifold: boolean): void {
  const { value: y, rate, size, slope, curvature } = work;
  const { p0, p1, p2, r0, r1, r2 } = work.forcing;
  if (!manifold) {
    for (let i = 0; i < size; i++) {
      const t = y[i];
      const t3 = t * t * t;
      const f = rate * (p0[i] - r0[i] * t3 * t);
      slope[i] = f;
      curvature[i] = rate * (p1[i] - r1[i] * t3 * t - 4 * r0[i] * t3 * f);
    }
    return;
  }
  // The slow manifold: f_s + f_y v = w defines v from w = y″ ≈ v′, correct to O(κ⁻²); no rounding is amplified.
  for (let i = 0; i < size; i++) {
    const t = y[i];
    const t2 = t * t;
    const t4 = t2 * t2;
    const inverse = 1 / (4 * r0[i] * t2 * t);
    const v = (p1[i] - r1[i] * t4) * inverse;
    const w = (p2[i] - r2[i] * t4 - 8 * r1[i] * t2 * t * v - 12 * r0[i] * t2 * v * v) * inverse;
    slope[i] = v - (w * inverse) / rate;
    curvature[i] = w;
  }
}

/** Quintic Hermite midpoints: the mesh of `size` nodes to one of twice as many. Kept positive on coarse meshes. */
function prolong({ value: y, slope, curvature, size, coarse: finer }: Work): void {
  const h = (2 * Math.PI) / size;
  const a = (5 * h) / 32;
  const b = (h * h) / 64;
  for (let i = 0; i < size; i++) {
    const j = i + 1 === size ? 0 : i + 1;
    const low = Math.min(y[i], y[j]);
    const high = Math.max(y[i], y[j]);
    const middle = 0.5 * (y[i] + y[j]) + a * (slope[i] - slope[j]) + b * (curvature[i] + curvature[j]);
    finer[2 * i] = y[i];
    finer[2 * i + 1] = middle > 0.7 * low ? Math.min(middle, 1.4 * high) : 0.7 * low;
  }
}

/** ⟨r y⁴⟩ = ⟨p⟩ holds exactly for the periodic solution: sets the level of a slow one to full precision. */
function pinMean(y: Float64Array, forcing: QuarticForcing, size: number): void {
  let arriving = 0;
  let leaving = 0;
  for (let i = 0; i < size; i++) {
    const t2 = y[i] * y[i];
    arriving += forcing.p0[i];
    leaving += forcing.r0[i] * t2 * t2;
  }
  const factor = Math.sqrt(Math.sqrt(arriving / leaving));
  for (let i = 0; i < size; i++) y[i] *= factor;
}

function largestRelativeChange(y: Float64Array, from: Float64Array, size: number): number {
  let largest = 0;
  for (let i = 0; i < size; i++) {
    const change = Math.abs(y[i] - from[i]);
    if (!(change <= largest * y[i])) largest = change / y[i];
  }
  return largest;
}

function logMultiplier(y: Float64Array, forcing: QuarticForcing, rate: number, size: number): number {
  let sum = 0;
  for (let i = 0; i < size; i++) sum += forcing.r0[i] * y[i] * y[i] * y[i];
  return (-4 * rate * sum * 2 * Math.PI) / size;
}
