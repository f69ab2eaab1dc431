/**
 * Follows a branch of periodic states as one parameter p changes, round its folds: pseudo-arclength continuation (Keller 1977;
 * Allgower & Georg 1990, ch. 6) of R(y, p) = Φ(y; p) − y = 0. Lengths are measured in y/yScale (root mean square) and p/pScale.
 * The bordered linear systems are solved by GMRES with products of the linearised year, so that a fold is no obstacle.
 */
import { gmres } from './gmres.ts';
import { logDominantMultiplier, meanYearPreconditioner, type YearMap } from './periodicMap.ts';
import type { Tangent } from './tangent.ts';
import { largest } from './vectors.ts';

export interface Family {
  readonly size: number;
  /** The year map at a parameter value. */
  at(p: number): YearMap;
  readonly yScale: number;
  readonly pScale: number;
}

export interface BranchPoint {
  readonly p: number;
  readonly y: Float64Array;
  readonly logMultiplier: number;
  /** Where p turns back, rather than a regular point. */
  readonly fold: boolean;
}

export interface BranchOptions {
  readonly from: number;
  readonly to: number;
  /** Direction of p at the start. */
  readonly direction: 1 | -1;
  /** Absolute error asked of y. */
  readonly tolerance: number;
  /** Longest and shortest step of arclength, in scaled units. */
  readonly longest: number;
  readonly shortest: number;
  readonly maximumPoints: number;
  /** Told before every step how many points there are and where the last one lies. */
  readonly told?: (points: number, p: number) => void;
}

export interface Branch {
  readonly points: readonly BranchPoint[];
  /** `left` the range, `stuck` at the shortest step, or `full` of points. */
  readonly ended: 'left' | 'stuck' | 'full';
}

interface Vector {
  readonly y: Float64Array;
  readonly p: number;
}

interface Evaluated {
  readonly residual: Float64Array;
  readonly tangent: Tangent;
}

/** The plane in which a correction moves, and ∂R/∂p. */
interface Border {
  readonly like: Vector;
  readonly byParameter: Float64Array;
}

const vectors = 60;
const newtonLimit = 14;

/** From a settled state at p = start.p. */
export function followBranch(family: Family, start: Vector, options: BranchOptions): Branch {
  const solver = new Follower(family, options);
  const points: BranchPoint[] = [];
  const first = solver.correct(start, null);
  if (first === null) return { points, ended: 'stuck' };
  let here: Vector = first.at;
  let direction = solver.direction(here, first.evaluated, { y: new Float64Array(family.size), p: options.direction });
  points.push(pointOf(here, first.evaluated, false));
  let step = options.longest / 4;
  while (points.length < options.maximumPoints) {
    options.told?.(points.length, here.p);
    const guess = advance(here, direction, step, family);
    const bound = guess.p < options.from ? options.from : guess.p > options.to ? options.to : null;
    const last = bound === null ? null : endAt(solver, bound, here, direction, step);
    if (last !== null) {
      points.push(pointOf(last.at, last.evaluated, false));
      return { points, ended: 'left' };
    }
    const next = bound === null ? solver.correct(guess, direction) : null;
    const turned = next === null ? null : solver.direction(next.at, next.evaluated, direction);
    // A step that turns too sharply, or ends far from its guess, may have jumped to another branch.
    const cosine = turned === null ? -1 : solver.dot(direction, turned);
    const strayed = next === null ? Number.POSITIVE_INFINITY : solver.distance(guess, next.at) / step;
    if (next === null || turned === null || cosine < 0.8 || strayed > 0.4) {
      step /= 2;
      if (step >= options.shortest) continue;
      const corner = roundCorner(solver, here, direction, options);
      if (corner === null) return { points, ended: 'stuck' };
      points[points.length - 1] = { ...points[points.length - 1], fold: true };
      here = corner.at;
      direction = corner.direction;
      points.push(pointOf(here, corner.evaluated, false));
      step = options.longest / 20;
      continue;
    }
    if (Math.sign(turned.p) !== Math.sign(direction.p) && turned.p !== 0 && direction.p !== 0) {
      const fold = locateFold(solver, here, direction, step, turned);
      if (fold !== null) points.push(fold);
    }
    here = next.at;
    direction = turned;
    points.push(pointOf(here, next.evaluated, false));
    // Slow Newton is no sign of a bend: the linearised year is not quite that of the march. Bends and strays are.
    if (cosine > 0.95 && strayed < 0.15) step = Math.min(options.longest, step * 1.6);
  }
  return { points, ended: 'full' };
}

/** The branch at the bound that a step would cross; null where it turns before, or lies too far from the guess. */
function endAt(solver: Follower, bound: number, here: Vector, direction: Vector, step: number) {
  const length = (bound - here.p) / (direction.p * solver.family.pScale);
  const guess = { y: advance(here, direction, length, solver.family).y, p: bound };
  const found = solver.correct(guess, null);
  return found !== null && solver.distance(guess, found.at) <= 0.4 * length + 1e-3 * step ? found : null;
}

/**
 * Where a law has a kink, such as the first ice at a pole, a branch may turn back in a corner instead of a round fold. Looks for
 * its continuation with the change of p reversed.
 */
function roundCorner(solver: Follower, here: Vector, direction: Vector, options: BranchOptions) {
  const back: Vector = { y: direction.y, p: -direction.p };
  for (let length = 8 * options.shortest; length <= options.longest / 2; length *= 4) {
    const next = solver.correct(advance(here, back, length, solver.family), back);
    if (next === null) continue;
    const turned = solver.direction(next.at, next.evaluated, back);
    const onward = turned.p * direction.p < 0 && solver.dot({ ...turned, p: 0 }, { ...direction, p: 0 }) > 0;
    if (onward) return { at: next.at, evaluated: next.evaluated, direction: turned };
  }
  return null;
}

function pointOf(at: Vector, { tangent }: Evaluated, fold: boolean): BranchPoint {
  return { p: at.p, y: at.y, logMultiplier: logDominantMultiplier(tangent), fold };
}

function advance(from: Vector, direction: Vector, step: number, family: Family): Vector {
  const yStep = step * family.yScale;
  return {
    y: from.y.map((value, i) => value + yStep * direction.y[i]),
    p: from.p + step * family.pScale * direction.p,
  };
}

/** The fold between two points: p along the arc is a parabola near it; stepping to its summit converges quadratically in p. */
function locateFold(
  solver: Follower,
  from: Vector,
  direction: Vector,
  step: number,
  turned: Vector,
): BranchPoint | null {
  let low = 0;
  let high = step;
  let lowSlope = direction.p;
  let highSlope = turned.p;
  let best: { readonly at: Vector; readonly evaluated: Evaluated } | null = null;
  let bestSlope = Number.POSITIVE_INFINITY;
  for (let trial = 0; trial < 12; trial++) {
    const share = lowSlope / (lowSlope - highSlope);
    const length = low + Math.min(0.9, Math.max(0.1, share)) * (high - low);
    const found = solver.correct(advance(from, direction, length, solver.family), direction);
    if (found === null) break;
    const slope = solver.direction(found.at, found.evaluated, direction);
    if (Math.abs(slope.p) < bestSlope) {
      bestSlope = Math.abs(slope.p);
      best = found;
    }
    // The error of p is the slope times half the interval.
    if (Math.abs(slope.p) * (high - low) < 1e-7) break;
    if (Math.sign(slope.p) === Math.sign(lowSlope)) {
      low = length;
      lowSlope = slope.p;
    } else {
      high = length;
      highSlope = slope.p;
    }
  }
  return best === null ? null : pointOf(best.at, best.evaluated, true);
}

/** Evaluates, corrects and differentiates; directions are in scaled units with length 1. */
class Follower {
  readonly family: Family;
  private readonly options: BranchOptions;

  constructor(family: Family, options: BranchOptions) {
    this.family = family;
    this.options = options;
  }

  dot(a: Vector, b: Vector): number {
    let sum = 0;
    for (let i = 0; i < a.y.length; i++) sum += a.y[i] * b.y[i];
    return sum / this.family.size + a.p * b.p;
  }

  /** Length of b − a in scaled units. */
  distance(a: Vector, b: Vector): number {
    const { yScale, pScale } = this.family;
    const difference = { y: b.y.map((value, i) => (value - a.y[i]) / yScale), p: (b.p - a.p) / pScale };
    return Math.sqrt(this.dot(difference, difference));
  }

  /** Null outside the range too: a world need not exist there. */
  private evaluate(at: Vector): Evaluated | null {
    if (at.p < this.options.from || at.p > this.options.to) return null;
    const map = this.family.at(at.p);
    const end = at.y.slice();
    if (!map.year(end)) return null;
    const tangent = map.tangent();
    if (tangent === null) return null;
    return { tangent, residual: end.map((value, i) => value - at.y[i]) };
  }

  /** ∂R/∂p by a one-sided difference, taken inside the range. */
  private slopeByParameter(at: Vector, residual: Float64Array): Float64Array | null {
    const size = 1e-6 * this.family.pScale;
    const nudge = at.p + size > this.options.to ? -size : size;
    const end = at.y.slice();
    if (!this.family.at(at.p + nudge).year(end)) return null;
    return end.map((value, i) => (value - at.y[i] - residual[i]) / nudge);
  }

  /** Newton at fixed p (direction null), or within the plane through the guess normal to the direction. */
  correct(guess: Vector, direction: Vector | null) {
    const { family, options } = this;
    let at = guess;
    let lastChange = Number.POSITIVE_INFINITY;
    // ∂R/∂p hardly varies within a step: that of the guess serves all iterations.
    let byParameter: Float64Array | null = null;
    for (let iterations = 1; iterations <= newtonLimit; iterations++) {
      const evaluated = this.evaluate(at);
      if (evaluated === null) return null;
      if (direction !== null) byParameter ??= this.slopeByParameter(at, evaluated.residual);
      const border = direction === null || byParameter === null ? null : { like: direction, byParameter };
      if (direction !== null && border === null) return null;
      const change = this.solveBordered(evaluated.tangent, border, evaluated.residual, 0);
      if (change === null) return null;
      const size = largest(change.y);
      if (!(size < 20 * Math.max(1, family.yScale)) || size > 50 * lastChange) return null;
      lastChange = Math.max(size, options.tolerance);
      at = { y: at.y.map((value, i) => value + change.y[i]), p: at.p + change.p };
      if (size <= options.tolerance && Math.abs(change.p) <= 1e-7 * family.pScale) {
        const final = this.evaluate(at);
        return final === null ? null : { at, evaluated: final };
      }
    }
    return null;
  }

  /** Unit tangent of the branch, on the side of `like`. */
  direction(at: Vector, evaluated: Evaluated, like: Vector): Vector {
    const zero = new Float64Array(this.family.size);
    const byParameter = this.slopeByParameter(at, evaluated.residual);
    const border = byParameter === null ? null : { like, byParameter };
    const solved = (border && this.solveBordered(evaluated.tangent, border, zero, 1)) ?? { y: zero, p: like.p };
    const scaled = { y: solved.y.map((value) => value / this.family.yScale), p: solved.p / this.family.pScale };
    const length = Math.sqrt(this.dot(scaled, scaled));
    const sign = this.dot(scaled, like) < 0 ? -1 : 1;
    return { y: scaled.y.map((value) => (sign * value) / length), p: (sign * scaled.p) / length };
  }

  /**
   * Solves (1 − M) δy − R_p δp = right, with `like` · (δy, δp) = along in scaled units; δp = 0 where there is no border.
   */
  private solveBordered(tangent: Tangent, border: Border | null, right: Float64Array, along: number): Vector | null {
    const { family } = this;
    const precondition = meanYearPreconditioner(tangent, 0);
    const oneLess = (v: Float64Array): Float64Array => {
      const end = tangent.apply(v);
      for (let i = 0; i < end.length; i++) end[i] = v[i] - end[i];
      return end;
    };
    if (border === null) return { y: gmres(oneLess, precondition, right, vectors, 1e-6).x, p: 0 };
    const { like, byParameter } = border;
    const n = family.size;
    // Last unknown: δp/pScale, weighted so that its row is of the size of a temperature.
    const apply = (v: Float64Array): Float64Array => {
      const y = v.subarray(0, n);
      const out = new Float64Array(n + 1);
      out.set(oneLess(y.slice()));
      let sum = like.p * v[n];
      for (let i = 0; i < n; i++) {
        out[i] -= byParameter[i] * family.pScale * v[n];
        sum += (like.y[i] * v[i]) / (family.yScale * n);
      }
      out[n] = sum;
      return out;
    };
    const extended = (v: Float64Array): Float64Array => {
      const out = new Float64Array(n + 1);
      out.set(precondition(v.slice(0, n)));
      out[n] = v[n];
      return out;
    };
    const b = new Float64Array(n + 1);
    b.set(right);
    b[n] = along;
    const { x } = gmres(apply, extended, b, Math.min(vectors, n + 1), 1e-8);
    return x.every(Number.isFinite) ? { y: x.slice(0, n), p: x[n] * family.pScale } : null;
  }
}
