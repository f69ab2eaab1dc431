/** What `grid` hands to files, terminal and page: plain data. Findings are SI; inputs are in the unit in which they were typed. */
import type { Origin } from '../../origin.ts';
import type { CaseInput } from '../../scenario/types.ts';
import type { UniversalPlace } from './storeNumber.ts';

export interface GridAxis {
  readonly key: string;
  readonly label: string;
  readonly unit: string;
  readonly log: boolean;
  /** Nodes in `unit`, ascending. */
  readonly nodes: Float64Array;
}

export interface GridFinding {
  readonly name: string;
  readonly label: string;
  readonly unit: string;
  /** (axes[0] nodes, axes[1] nodes) row-major, or (nodes,) with one axis; null where undefined. */
  readonly values: readonly (number | null)[];
  /** Times that come round with the orbit. */
  readonly circular: boolean;
}

/** A case of the scenario on the grid. */
export interface GridMember {
  readonly name: string;
  /** Its place among the cases of the grid, the merged ones counted. */
  readonly index: number;
  /** The scenario's own point in the axes' units; null where it says nothing that gives it, or lies outside. */
  readonly own: readonly (number | null)[];
  /** The case on the chart of plain lumped worlds; null where it is not one. */
  readonly universal: UniversalPlace | null;
  /** As the scenario has them; those along an axis are what its own point is made of. */
  readonly inputs: readonly CaseInput[];
}

export interface GridCase {
  /** Of all members: `rock = thick air`. */
  readonly name: string;
  readonly model: string;
  readonly findings: readonly GridFinding[];
  /** Cases of the scenario that the axes make one and the same; mostly a single one. */
  readonly members: readonly GridMember[];
  readonly failed: readonly { readonly node: number; readonly message: string }[];
  readonly warnings: readonly string[];
  readonly notes: readonly string[];
}

export interface GridReport extends Origin {
  /** One or two. */
  readonly axes: readonly GridAxis[];
  readonly hold: string | null;
  readonly cases: readonly GridCase[];
  /** Of the grid as a whole: that spreads are not propagated, and which centres are used instead. */
  readonly notes: readonly string[];
}
