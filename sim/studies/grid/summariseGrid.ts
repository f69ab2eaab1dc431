/** From the rows of a grid to what is told of it. */
import type { Origin } from '../../origin.ts';
import { inUnit } from '../../quantity/index.ts';
import type { GridCase, GridReport } from './gridReport.ts';
import { type GridPlan, type GridPlanCase, valuesAt } from './plan.ts';

export interface GridRows {
  /** Columns of findings, case after case, (nodes,), NaN where undefined. */
  readonly findings: readonly Float64Array[];
  readonly failures: readonly { readonly draw: number; readonly message: string }[];
}
