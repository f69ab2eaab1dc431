/**
 * What the page carries: a run, the trace of climates as one input changes, the spread of uncertain inputs, or a grid over one
 * or two. Pure.
 */
import type { RunResult } from '../../sim/run.ts';
import type { GridReport } from '../../sim/studies/grid/gridReport.ts';
import type { SpreadReport } from '../../sim/studies/spread/spreadReport.ts';
import type { TraceReport } from '../../sim/studies/traceReport.ts';
import { checkedGrid } from './readGrid.ts';
import { checkedRun, damaged, parsed } from './readResult.ts';
import { checkedSpread } from './readSpread.ts';

export type Carried =
  /** `tree` is the scenario whose numbers may be moved, as `toPortableTree` gave it; null for a page that only shows. */
  | { readonly result: RunResult; readonly tree: unknown }
  | { readonly trace: TraceReport }
  | { readonly spread: SpreadReport }
  | { readonly grid: GridReport };

/** Errors: PageError when the block holds nothing that this page can show. */
export function readPage(text: string): Carried {
  const { trace, spread, grid, result, tree = null } = parsed(text);
  if (trace !== undefined) return { trace: checkedTrace(trace) };
  if (spread !== undefined) return { spread: checkedSpread(spread) };
  if (grid !== undefined) return { grid: checkedGrid(grid) };
  return { result: checkedRun(result), tree };
}

function checkedTrace(value: unknown): TraceReport {
  if (!isTrace(value)) throw damaged('the data are not a trace');
  for (const { name, branches } of value.cases) {
    if (!branches.every(({ points }) => points.every(isWhole))) throw damaged(`numbers of “${name}” are missing`);
  }
  return value;
}

function isTrace(value: unknown): value is TraceReport {
  const trace = value as Partial<TraceReport> | null;
  if (typeof trace !== 'object' || trace === null) return false;
  const { along, cases, scenario, program } = trace;
  if (typeof scenario?.file !== 'string' || typeof program?.name !== 'string') return false;
  if (typeof along?.label !== 'string' || typeof along.unit !== 'string') return false;
  if (!(along.to > along.from) || (along.log && !(along.from > 0))) return false;
  return Array.isArray(cases) && cases.length > 0 && cases.every(isCase);
}

function isCase(one: Partial<TraceReport['cases'][number]> | null): boolean {
  const { name, branches, warnings } = one ?? {};
  if (typeof name !== 'string' || !Array.isArray(warnings) || !Array.isArray(branches)) return false;
  return branches.every((branch) => Array.isArray(branch?.points));
}

function isWhole(point: TraceReport['cases'][number]['branches'][number]['points'][number]): boolean {
  const { value, temperatureMean, temperatureMax, temperatureMin, iceFraction } = point;
  return [value, temperatureMean, temperatureMax, temperatureMin, iceFraction].every(Number.isFinite);
}
