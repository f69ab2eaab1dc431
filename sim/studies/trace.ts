/**
 * `trace`: the climates of one case as one input changes. From the warm and the cold state at either end of the range each branch
 * is followed round its folds; what is unstable is kept, since it divides the basins.
 */
import { SimError } from '../error.ts';
import { lumpedTraceModel } from '../models/lumped/traceFamily.ts';
import type { TraceFamily, TraceModel, TraceNumbers } from '../models/traceModel.ts';
import { zonalTraceModel } from '../models/zonal/traceFamily.ts';
import type { Kelvin } from '../si.ts';
import { type Branch, type BranchPoint, followBranch } from '../solve/continuation.ts';
import { rampAlbedo } from '../surface/albedo/ramp.ts';
import type { World } from '../world.ts';

export interface TracePoint extends TraceNumbers {
  /** The input, SI. */
  readonly value: number;
  readonly stable: boolean;
  /** ln of the dominant multiplier of the year map. */
  readonly logMultiplier: number;
  /** Where the input turns back: a climate ends here. */
  readonly fold: boolean;
}

export interface TraceBranch {
  readonly points: readonly TracePoint[];
  /** `left` the range as it should; `stuck` or `full` where it could not be followed further. */
  readonly ended: Branch['ended'];
}

export interface TraceResult {
  readonly branches: readonly TraceBranch[];
  /** Inputs at which a climate ends, SI, ascending. */
  readonly folds: readonly number[];
  readonly warnings: readonly string[];
}

export interface TraceOptions {
  readonly from: number;
  readonly to: number;
  /** Relative error of temperature. */
  readonly tolerance: number;
  /** Told before every step along a branch, and when the branch has been followed. */
  readonly progress?: (step: TraceStep) => void;
}

/** How far a trace is. */
export interface TraceStep {
  /** Counted from 1. */
  readonly branch: number;
  readonly points: number;
  /** Of the input at the last point. */
  readonly value: number;
  readonly finished: boolean;
}

/** A stepped albedo is followed as a ramp of this width: its branch then turns where it would have a corner. */
const narrowRamp: Kelvin = 0.3;
const maximumPoints = 600;
/** ln of a multiplier at which a march, good to 1e-8, no longer tells where an unstable year began. */
const illConditioned = 15;
/** Two starts closer than this to a branch that is there already belong to it. */
const onBranch: Kelvin = 0.1;

const traceModels: Readonly<Record<string, TraceModel>> = { lumped: lumpedTraceModel, zonal: zonalTraceModel };

/** `worldAt` gives the case's world at a value of the input, SI. */
export function traceClimates(model: string, worldAt: (value: number) => World, options: TraceOptions): TraceResult {
  const { from, to, tolerance } = options;
  if (!(to > from)) throw new SimError('--along', 'the range is empty', 'Write it as lower to upper');
  const tracer = traceModels[model];
  const stepped = worldAt(from).surface.albedo.ramp !== null && isStep(worldAt(from));
  const smooth = (value: number): World => withoutStep(worldAt(value));
  const family = tracer.family(smooth, { from, to });
  const branches: TraceBranch[] = [];
  for (const [value, direction] of [
    [to, -1],
    [from, 1],
  ] as const) {
    for (const y of tracer.startsAt(smooth(value), tolerance)) {
      if (branches.some((branch) => passesThrough(branch, value, y, family))) continue;
      const number = branches.length + 1;
      const tell = (points: number, at: number, finished: boolean) =>
        options.progress?.({ branch: number, points, value: at, finished });
      const branch = followBranch(
        family,
        { y, p: value },
        {
          from,
          to,
          direction,
          tolerance: Math.max(1e-7, 250 * tolerance * 0.02),
          longest: 0.06,
          shortest: 1e-7,
          maximumPoints,
          told: (points, p) => tell(points, p, false),
        },
      );
      branches.push({ ended: branch.ended, points: branch.points.map((point) => describe(family, point)) });
      tell(branch.points.length, branch.points.at(-1)?.p ?? value, true);
    }
  }
  return { branches, folds: foldsOf(branches), warnings: warningsOf(branches, stepped) };
}

function isStep({ surface }: World): boolean {
  const { ramp } = surface.albedo;
  return ramp !== null && ramp.to - ramp.from < narrowRamp;
}

function withoutStep(world: World): World {
  const { albedo } = world.surface;
  if (albedo.ramp === null || !isStep(world)) return world;
  const middle = (albedo.ramp.from + albedo.ramp.to) / 2;
  const wider = rampAlbedo({
    warm: albedo.warm,
    ice: albedo.ice,
    from: middle - narrowRamp / 2,
    to: middle + narrowRamp / 2,
  });
  return { ...world, surface: { ...world.surface, albedo: wider } };
}

function describe(family: TraceFamily, { p, y, logMultiplier, fold }: BranchPoint): TracePoint {
  const numbers = family.summarise(p, y);
  if (numbers === null) throw new Error(`the year at ${p} was marched before and cannot be now`);
  return { value: p, stable: logMultiplier < 0, logMultiplier, fold, ...numbers };
}

/** Whether a start lies on a branch: its mean temperature between two neighbouring points of it, at the same input. */
function passesThrough(branch: TraceBranch, value: number, y: Float64Array, family: TraceFamily): boolean {
  const here = family.summarise(value, y)?.temperatureMean;
  if (here === undefined) return false;
  return branch.points.some((point, i) => {
    const next = branch.points[i + 1];
    if (next === undefined || (point.value - value) * (next.value - value) > 0) return false;
    const share = point.value === next.value ? 0 : (value - point.value) / (next.value - point.value);
    const between = point.temperatureMean + share * (next.temperatureMean - point.temperatureMean);
    return Math.abs(between - here) < onBranch + 0.2 * Math.abs(next.temperatureMean - point.temperatureMean);
  });
}

function foldsOf(branches: readonly TraceBranch[]): number[] {
  const values = branches.flatMap(({ points }) => points.filter(({ fold }) => fold).map(({ value }) => value));
  return values
    .sort((a, b) => a - b)
    .filter((value, i) => i === 0 || Math.abs(value - values[i - 1]) > 1e-6 * Math.abs(value));
}

function warningsOf(branches: readonly TraceBranch[], stepped: boolean): string[] {
  const warnings: string[] = [];
  if (stepped) {
    warnings.push(
      `The albedo step is followed as a ramp ${narrowRamp} K wide: folds move by about 1e-3 of the input where ice first appears or last melts.`,
    );
  }
  const unfinished = branches.filter(({ ended }) => ended !== 'left');
  if (unfinished.length > 0) {
    warnings.push(
      'A branch could not be followed to the end of the range: what lies beyond its last point is not shown.',
    );
  }
  const strongest = Math.max(
    0,
    ...unfinished.flatMap(({ points }) => points.map((one) => Math.abs(one.logMultiplier))),
  );
  if (strongest > illConditioned) {
    warnings.push(
      `The heat store forgets far within a year: disturbances shrink or grow by a factor of up to e^${strongest.toFixed(0)}. An unstable climate is lost there, since a march through the year magnifies its rounding as much; only stable climates can be relied on.`,
    );
  }
  return warnings;
}
