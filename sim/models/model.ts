/** What every model exports. A new model is a folder that fills this in, and a line in the registry. */
import type { ZodRawShape } from 'zod';
import type { Dataset } from '../dataset/dataset.ts';
import type { Finding, FindingColumn } from '../findings/finding.ts';
import type { SolveOptions, Window, World } from '../world.ts';

/** One periodic state (or one forward run) and what is known of its stability. */
export interface State {
  /** `warm`, `cold`, `middle`, or `only` when a single state exists; `forward` for a run from a start. */
  readonly label: string;
  /** Null for a forward run. */
  readonly stable: boolean | null;
  /** Dominant multiplier of the orbit map; null for a forward run. */
  readonly multiplier: number | null;
  /** ln μ / ln μ₀: 1 no feedback, 0 a fold, negative unstable; null for a forward run. */
  readonly stabilityMargin: number | null;
  /** Upper bound of the relative temperature error. */
  readonly errorEstimate: number;
  /** Whether the estimate is within the tolerance asked for. */
  readonly converged: boolean;
  readonly dataset: Dataset;
  readonly findings: readonly Finding[];
  readonly energyBalance: EnergyBalance;
}

/** Orbit means (forward runs: means over the run), W m⁻². */
export interface EnergyBalance {
  readonly absorbed: number;
  readonly internalHeat: number;
  readonly emitted: number;
  readonly stored: number;
  /** |absorbed + internal − emitted − stored| over the largest of absorbed, emitted and stored. */
  readonly relativeDifference: number;
}

export interface Solution {
  /** Warm first; one that a start did not reach is missing, and among the failures. */
  readonly states: readonly State[];
  readonly warnings: readonly string[];
  /** States that were looked for and could not be computed, each in the words that say so; the run does not pass. */
  readonly failures?: readonly string[];
  /** Newton sweeps or steps taken, for the log. */
  readonly iterations: number;
}

/** What a model asks of a scenario beyond star, orbit and surface. Keys for what it does not ask are read, and left unused. */
export interface ModelAsks {
  /** The share of the flux that a square metre receives; without it light falls on a whole sphere. */
  readonly absorbingFraction: boolean;
  /** A globe: bands, spin, transport, land and sea. */
  readonly globe: boolean;
  /** Whether it runs forward from a start, too. */
  readonly start: boolean;
}

/** Many worlds straight to their findings. All share the options, the windows and the set of findings. */
export interface Batch {
  /** What a row holds, in order. */
  readonly columns: readonly FindingColumn[];
  /**
   * Overwrites `row` (columns.length) by the findings of a world's warm state, to the last bit those of `solve`; NaN where
   * one is undefined. Returns whether the state kept its tolerance; not so where only the cold start ended in a climate. Errors: as `solve`.
   */
  into(world: World, row: Float64Array): boolean;
}

export interface Model {
  /** What `model:` says in a scenario. */
  readonly name: string;
  readonly asks: ModelAsks;
  /** Keys that only some models know, merged into the strict schema: the lumped model brings absorbingFraction. */
  readonly keys: { readonly planet?: ZodRawShape; readonly solve?: ZodRawShape; readonly top?: ZodRawShape };
  solve(world: World, options: SolveOptions, windows: readonly Window[]): Solution;
  /**
   * A faster way to the findings alone, where the model has one (`batchOf` makes do without). `only`: the names wanted, in
   * the order wanted; without it all of them. Errors: SimError for a name that is no finding.
   */
  batch?(options: SolveOptions, windows: readonly Window[], only?: readonly string[]): Batch;
  /**
   * The temperature of the globe through a periodic orbit, where the model has a quick way to it: of the warm state, at increasing
   * balanced anomalies from 0 to 2π, into as many. Returns whether the state kept its tolerance. Errors: as `solve`.
   */
  orbitInto?(world: World, options: SolveOptions, positions: Float64Array, into: Float64Array): boolean;
}
