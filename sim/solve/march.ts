/**
 * Marches a `Separable` equation along s with three-stage Radau IIA steps: adaptively, or over given boundaries so that two
 * marches can be compared. Steps end on the breaks of a piecewise gain, so every step sees one smooth piece.
 */
import type { Curve } from './curve.ts';
import { linearStages, solveStages, stagePositions, stageWeights } from './radau.ts';
import { type ForcingPoint, forcingPoint, pieceOf, type Rates, ratesInto, type Separable } from './separable.ts';
import { pushStiffPiece, type StiffEnds, settleStiffPieces, stiffSteepness } from './stiffPieces.ts';

export interface MarchOptions {
  readonly from: number;
  readonly to: number;
  readonly value: number;
  /** Relative local error asked of each adaptive step. */
  readonly tolerance: number;
  /** Step ends to use instead of adaptive ones; first = from, last = to. */
  readonly boundaries?: Float64Array;
  /** Whether to build the Curve. */
  readonly keep: boolean;
  readonly maximumSteps?: number;
  /** No adaptive step is longer: a stiff solution is smooth at its nodes long before it can be interpolated. */
  readonly maximumStep?: number;
}

export interface March {
  readonly end: number;
  /** end − start, summed from increments: a slow system keeps its digits. */
  readonly change: number;
  /** ∫ ∂y′/∂y ds plus the jumps at breaks: ln ∂end/∂start. */
  readonly logMultiplier: number;
  /** −k ∫ r v′ ds: the same with the gain held fixed. */
  readonly frozenLogMultiplier: number;
  readonly steps: number;
  /** Ends of the steps taken, at breaks too: halving them then refines what lies on either side. */
  readonly boundaries: Float64Array;
  readonly curve: Curve | null;
  /** False when steps became too short or too many. */
  readonly completed: boolean;
}

// Embedded third-order error estimate: Hairer & Wanner (1996), eq. IV.8.19–20.
const estimatorPole = 0.274888829595677; // 1/γ, γ the real eigenvalue of the inverse of the stage matrix
const estimator1 = (estimatorPole / 3) * (-13 - 7 * Math.sqrt(6));
const estimator2 = (estimatorPole / 3) * (-13 + 7 * Math.sqrt(6));
const estimator3 = -estimatorPole / 3;
const maximumIterations = 12;
/** Newton squares its change: below this the next one is rounding. */
const converged = 3e-9;

export function march(problem: Separable, options: MarchOptions): March {
  const stepper = new Stepper(problem);
  const recorder = new Recorder(options.keep);
  const { from, to, boundaries } = options;
  const direction = to >= from ? 1 : -1;
  const span = Math.abs(to - from);
  const limit = options.maximumSteps ?? 4_000_000;
  const longest = options.maximumStep ?? 0.25;
  const ends: number[] = [from];
  let s = from;
  let y = options.value;
  let piece = pieceOf(problem.breaks, y);
  let change = 0;
  let compensation = 0; // Neumaier's running correction of `change`
  let logMultiplier = 0;
  let frozenLogMultiplier = 0;
  let steps = 0;
  let next = 1;
  let h = direction * Math.min(span, 0.05);
  let completed = true;
  let shortenings = 0;
  let crossingsInARow = 0;

  const accept = (width: number): void => {
    recorder.push(stepper, s, width);
    const sum = change + stepper.increment;
    compensation +=
      Math.abs(change) >= Math.abs(stepper.increment)
        ? change - sum + stepper.increment
        : stepper.increment - sum + change;
    change = sum;
    logMultiplier += stepper.logMultiplier;
    frozenLogMultiplier += stepper.frozenLogMultiplier;
    y = stepper.end;
    steps++;
    shortenings = 0;
  };

  while (direction * (to - s) > 1e-14 * span) {
    if (steps > limit || !Number.isFinite(y)) {
      completed = false;
      break;
    }
    const target = boundaries === undefined ? to : boundaries[next];
    const remaining = target - s;
    let width = boundaries === undefined ? direction * Math.min(Math.abs(h), Math.abs(remaining)) : remaining;
    const solved = stepper.step(s, y, width, piece);
    const error = solved ? stepper.errorEstimate / options.tolerance : Number.POSITIVE_INFINITY;
    if (!solved || (boundaries === undefined && error > 1)) {
      shortenings++;
      if (shortenings > 60) {
        completed = false;
        break;
      }
      const factor = solved ? Math.min(shortenings > 1 ? 0.3 : 0.9, Math.max(0.2, 0.9 * error ** -0.25)) : 0.25;
      h = factor * width;
      if (boundaries === undefined) continue;
      // A given step whose Newton fails is taken in two halves; its outer ends stay.
      if (!stepper.stepInHalves(s, y, width, piece)) {
        completed = false;
        break;
      }
    }
    const crossing = stepper.crossing(problem.breaks, piece);
    if (crossing !== null) {
      // Marched backwards, a step that drives both sides apart holds the solution on itself: there is no way through.
      if (++crossingsInARow > 4) {
        completed = false;
        break;
      }
      width = stepper.stepToBreak(s, y, width, piece, crossing.level);
      const before = stepper.endRate;
      accept(width);
      s += width;
      y = crossing.level;
      piece += crossing.up ? 1 : -1;
      logMultiplier += Math.log(Math.abs(stepper.rateAt(s, y, piece) / before));
      if (Math.abs(width) < Math.abs(remaining)) {
        ends.push(s);
        continue;
      }
    } else {
      accept(width);
      crossingsInARow = 0;
      s = Math.abs(width) >= Math.abs(remaining) ? target : s + width;
    }
    if (boundaries !== undefined) next++;
    else
      h =
        direction *
        Math.min(longest, Math.abs(width) * Math.min(4, Math.max(0.3, 0.9 * Math.max(error, 1e-10) ** -0.25)));
    ends.push(s);
  }
  return {
    end: y,
    change: change + compensation,
    logMultiplier,
    frozenLogMultiplier,
    steps,
    boundaries: Float64Array.from(ends),
    curve: options.keep ? recorder.curve() : null,
    completed,
  };
}

/** One Radau IIA step at a time; results stay in its fields until the next call. */
class Stepper {
  private readonly problem: Separable;
  private readonly points: readonly [ForcingPoint, ForcingPoint, ForcingPoint] = [
    forcingPoint(),
    forcingPoint(),
    forcingPoint(),
  ];
  private readonly startPoint = forcingPoint();
  private readonly rates: readonly [Rates, Rates, Rates] = [rates(), rates(), rates()];
  readonly startRates: Rates = rates();
  private readonly stages = linearStages();
  private y1 = 0;
  private y2 = 0;
  end = 0;
  start = 0;
  increment = 0;
  errorEstimate = 0;
  logMultiplier = 0;
  frozenLogMultiplier = 0;

  constructor(problem: Separable) {
    this.problem = problem;
  }

  get endRate(): number {
    return this.rates[2].rate;
  }

  /** Stage values less the step's first value. */
  get departures(): [number, number, number] {
    return [this.y1 - this.start, this.y2 - this.start, this.increment];
  }

  get endRates(): Rates {
    return this.rates[2];
  }

  /** y′ on one side of a break. */
  rateAt(s: number, y: number, piece: number): number {
    const point = forcingPoint();
    const here = rates();
    this.problem.drive(s, point);
    ratesInto(this.problem, point, y, piece, here);
    return here.rate;
  }

  /** Takes a step of `h` from (s, y); false when Newton does not converge or leaves the domain. */
  step(s: number, y: number, h: number, piece: number): boolean {
    const { problem, points, stages } = this;
    const [c1, c2] = stagePositions;
    const [f1, f2, f3] = this.rates;
    problem.drive(s, this.startPoint);
    problem.drive(s + c1 * h, points[0]);
    problem.drive(s + c2 * h, points[1]);
    problem.drive(s + h, points[2]);
    ratesInto(problem, this.startPoint, y, piece, this.startRates);
    let y1 = y;
    let y2 = y;
    let y3 = y;
    for (let iteration = 0; iteration < maximumIterations; iteration++) {
      ratesInto(problem, points[0], y1, piece, f1);
      ratesInto(problem, points[1], y2, piece, f2);
      ratesInto(problem, points[2], y3, piece, f3);
      const j1 = h * f1.slope;
      const j2 = h * f2.slope;
      const j3 = h * f3.slope;
      // Unknowns are the departures from y, so that small increments keep their digits.
      solveStages(
        j1,
        j2,
        j3,
        h * f1.rate - j1 * (y1 - y),
        h * f2.rate - j2 * (y2 - y),
        h * f3.rate - j3 * (y3 - y),
        stages,
      );
      const n1 = y + stages.rest1;
      const n2 = y + stages.rest2;
      const n3 = y + stages.rest3;
      if (!(n1 > problem.floor && n2 > problem.floor && n3 > problem.floor)) return false;
      const moved = Math.max(Math.abs(n1 - y1), Math.abs(n2 - y2), Math.abs(n3 - y3)) / Math.abs(n3);
      f3.rate += f3.slope * (n3 - y3); // the rate at the new end: a stiff slope would feel what Newton still moved
      y1 = n1;
      y2 = n2;
      y3 = n3;
      if (moved < converged) {
        this.y1 = y1;
        this.y2 = y2;
        this.end = y3;
        this.start = y;
        this.increment = stages.rest3;
        this.finish(h);
        return Number.isFinite(y3);
      }
    }
    return false;
  }

  private finish(h: number): void {
    const [w1, w2, w3] = stageWeights;
    const [f1, f2, f3] = this.rates;
    const [p1, p2, p3] = this.points;
    const { problem, start } = this;
    const z1 = this.y1 - start;
    const z2 = this.y2 - start;
    const z3 = this.increment;
    const raw = estimatorPole * h * this.startRates.rate + estimator1 * z1 + estimator2 * z2 + estimator3 * z3;
    this.errorEstimate = Math.abs(raw / (1 - estimatorPole * h * this.startRates.slope)) / Math.abs(this.end);
    this.logMultiplier = h * (w1 * f1.slope + w2 * f2.slope + w3 * f3.slope);
    this.frozenLogMultiplier =
      -h *
      problem.rate *
      (w1 * p1.clock * problem.lossSlope(this.y1) +
        w2 * p2.clock * problem.lossSlope(this.y2) +
        w3 * p3.clock * problem.lossSlope(this.end));
  }

  /** The same span in two, four … steps; the fields describe the whole span. */
  stepInHalves(s: number, y: number, h: number, piece: number): boolean {
    for (let parts = 2; parts <= 4096; parts *= 2) {
      let at = y;
      let increment = 0;
      let logMultiplier = 0;
      let frozen = 0;
      let good = true;
      for (let i = 0; i < parts && good; i++) {
        good = this.step(s + (i * h) / parts, at, h / parts, piece);
        at = this.end;
        increment += this.increment;
        logMultiplier += this.logMultiplier;
        frozen += this.frozenLogMultiplier;
      }
      if (!good) continue;
      this.start = y;
      this.increment = increment;
      this.logMultiplier = logMultiplier;
      this.frozenLogMultiplier = frozen;
      this.problem.drive(s, this.startPoint);
      ratesInto(this.problem, this.startPoint, y, piece, this.startRates);
      return true;
    }
    return false;
  }

  /** The break that the last step has passed, if any. */
  crossing(breaks: readonly number[], piece: number): { level: number; up: boolean } | null {
    const upper = piece < breaks.length ? breaks[piece] : Number.POSITIVE_INFINITY;
    const lower = piece > 0 ? breaks[piece - 1] : Number.NEGATIVE_INFINITY;
    if (this.end > upper) return { level: upper, up: true };
    if (this.end < lower) return { level: lower, up: false };
    return null;
  }

  /** Shortens the last step so that it ends on `level`; returns its width. Each trial is a full step. */
  stepToBreak(s: number, y: number, width: number, piece: number, level: number): number {
    let short = 0;
    let shortGap = y - level;
    let long = width;
    let longGap = this.end - level;
    let best = width;
    for (let trial = 0; trial < 60; trial++) {
      // Illinois variant of regula falsi (Dowell & Jarratt 1971): halves the kept end's ordinate.
      let x = shortGap === longGap ? (short + long) / 2 : long - (longGap * (long - short)) / (longGap - shortGap);
      if (!((x - short) * (x - long) < 0)) x = (short + long) / 2;
      best = x;
      if (!this.step(s, y, x, piece)) {
        long = x;
        longGap = this.end - level;
        continue;
      }
      const gap = this.end - level;
      if (Math.abs(gap) <= 4e-16 * Math.abs(level) || Math.abs(long - short) <= 1e-15 * Math.abs(width)) break;
      if (gap * longGap > 0) {
        long = x;
        longGap = gap;
        shortGap /= 2;
      } else {
        short = x;
        shortGap = gap;
        longGap /= 2;
      }
    }
    return best;
  }
}

function rates(): Rates {
  return { rate: 0, drift: 0, slope: 0 };
}

/** Collects steps into a Curve. */
class Recorder {
  private readonly keep: boolean;
  private readonly position: number[] = [];
  private readonly value: number[] = [];
  private readonly slope: number[] = [];
  private readonly curvature: number[] = [];
  private readonly stiff: StiffEnds = { index: [], slope: [], curvature: [] };

  constructor(keep: boolean) {
    this.keep = keep;
  }

  push(stepper: Stepper, s: number, width: number): void {
    if (!this.keep || s + width === s) return;
    const left = stepper.startRates;
    const right = stepper.endRates;
    if (this.position.length === 0) this.position.push(s);
    const steepness = Math.max(Math.abs(left.slope), Math.abs(right.slope)) * Math.abs(width);
    if (steepness > stiffSteepness) pushStiffPiece(this.stiff, this.position.length - 1, width, ...stepper.departures);
    this.position.push(s + width);
    this.value.push(stepper.start, stepper.end);
    this.slope.push(left.rate, right.rate);
    this.curvature.push(left.drift + left.slope * left.rate, right.drift + right.slope * right.rate);
  }

  curve(): Curve {
    const curve = {
      position: Float64Array.from(this.position),
      value: Float64Array.from(this.value),
      slope: Float64Array.from(this.slope),
      curvature: Float64Array.from(this.curvature),
    };
    settleStiffPieces(curve, this.stiff);
    return curve;
  }
}
