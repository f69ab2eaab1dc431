/** What `spread` hands to files, terminal and page: plain data. Findings are SI; inputs are in the unit in which they were typed. */
import type { Origin } from '../../origin.ts';
import type { DrawnClimates } from './climates.ts';
import type { Group } from './groups.ts';
import type { Summary } from './percentiles.ts';
import type { SobolIndex } from './sobolIndices.ts';

export interface SpreadInput {
  readonly key: string;
  readonly label: string;
  /** As typed; `1` for a pure number. */
  readonly unit: string;
  readonly text: string;
  /** What `run` uses, in `unit`. */
  readonly centre: number;
  /** Of the draws, in `unit`. */
  readonly summary: Summary;
  /** Probability that lies beyond what is physical and was cut away; 0 for a posterior. */
  readonly truncatedShare: number;
  /** The posterior's column that gives it; null where its own spread does. */
  readonly column: string | null;
}

export interface Histogram {
  readonly from: number;
  readonly to: number;
  /** Draws in bins of equal width; what lies outside is counted in `beyond`. */
  readonly counts: readonly number[];
  readonly beyond: number;
}

export interface SpreadFinding {
  readonly name: string;
  readonly label: string;
  readonly unit: string;
  /** Of `run`, every input at its centre; null where it has none there. */
  readonly atCentre: number | null;
  readonly summary: Summary;
  /** Why the first computed draw without the finding lacks it; null where none does, or nothing says why. */
  readonly missingBecause: string | null;
  /** Times that come round with the orbit: summarised on the circle, in seconds of an orbit of the median period. */
  readonly circular: boolean;
  /** Null where fewer than two draws have a value. */
  readonly histogram: Histogram | null;
  /**
   * Where the draws fall into two groups with none between, the lower first; else null. Where `circular`, on the circle: a group
   * may reach across periapsis, and stands whole.
   */
  readonly groups: readonly [Group, Group] | null;
  readonly importance: Importance;
}

/** Which input matters to a finding. One entry for each input of the case, in order; null where there is none, with the reason. */
export interface Importance {
  readonly first: readonly SobolIndex[] | null;
  readonly total: readonly SobolIndex[] | null;
  /** For posterior samples, whose inputs go together: dependence by ranks, and what chance alone would give. */
  readonly ranks: readonly RankImportance[] | null;
  /** Share of the rows of the index design left out whole because one of their runs failed or lacks the finding; 0 without indices. */
  readonly leftOut: number;
  readonly reason?: string;
}

/** `value` 0 where the input tells nothing, as an estimate around it, so that it may come out slightly below; 1 where it tells all. */
export type RankImportance =
  | { readonly value: number; readonly chanceLevel: number }
  | { readonly value: null; readonly chanceLevel: null; readonly reason: string };

/** Percentiles of a curve, point by point: one array for each level of `percentileLevels`. NaN nowhere. */
export interface SpreadBand {
  readonly label: string;
  /** What runs along it: share of the period since periapsis, or latitude in degrees. */
  readonly along: 'orbit' | 'latitude';
  readonly positions: Float64Array;
  readonly unit: string;
  readonly levels: readonly Float64Array[];
  /** Every input at its centre. */
  readonly atCentre: Float64Array;
}

export interface SpreadCase {
  readonly name: string;
  readonly model: string;
  readonly inputs: readonly SpreadInput[];
  /** Inputs with a spread that are not drawn, and why. */
  readonly idle: readonly { readonly key: string; readonly label: string; readonly reason: string }[];
  readonly findings: readonly SpreadFinding[];
  /** Temperature through the orbit first. */
  readonly bands: readonly SpreadBand[];
  /** Which climates the draws took; null for models without ice by latitude. */
  readonly climates: DrawnClimates | null;
  /** Draws that the bands are made from: the first of all. */
  readonly bandDraws: number;
  /** Draws that could not be computed, or not within the tolerance. */
  readonly failed: number;
  /** The first draws, for scatter: a column for each input (in `unit`) and finding; NaN is left out with its row. */
  readonly sample: {
    readonly inputs: readonly Float64Array[];
    readonly findings: readonly (readonly (number | null)[])[];
  };
  readonly warnings: readonly string[];
  readonly notes: readonly string[];
}

export interface SpreadReport extends Origin {
  readonly draws: number;
  readonly seed: number;
  readonly sampling: 'sobol' | 'random' | 'posterior';
  /** Rows of the index design; 0 where indices were not asked for. */
  readonly indexRows: number;
  /** Draws that failed in at least one case. */
  readonly failed: number;
  readonly cases: readonly SpreadCase[];
}
