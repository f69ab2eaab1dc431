/** From the rows of a grid to what is told of it. */
import type { Origin } from '../../origin.ts';
import { inUnit } from '../../quantity/index.ts';
import type { ScenarioCase } from '../../scenario/types.ts';
import { isTimeInOrbit } from '../isTimeInOrbit.ts';
import type { GridCase, GridReport } from './gridReport.ts';
import type { GridPlan, GridPlanCase } from './plan.ts';
import { universalPlace } from './storeNumber.ts';

export interface GridRows {
  /** Columns of findings, case after case, (nodes,), NaN where undefined. */
  readonly findings: readonly Float64Array[];
  /** With the names of the cases where there are several: `sea: orbit: …; rock: orbit: …`. */
  readonly failures: readonly { readonly node: number; readonly message: string }[];
}

/** `cases`: those of the scenario, in the order of the plan. */
export function summariseGrid(
  plan: GridPlan,
  cases: readonly ScenarioCase[],
  origin: Origin,
  rows: GridRows,
): GridReport {
  let offset = 0;
  return {
    ...origin,
    axes: plan.axes.map(({ along: { key, label, unit, log }, nodes }) => {
      return { key, label, unit, log, nodes: Float64Array.from(nodes, ({ value }) => inUnit(value, unit)) };
    }),
    hold: plan.setup.hold,
    cases: plan.cases.map((one, index) => {
      const columns = rows.findings.slice(offset, offset + one.findings.length);
      offset += one.findings.length;
      return summariseCase(plan, one, cases[index], columns, rows.failures);
    }),
  };
}

function summariseCase(
  { axes, cases }: GridPlan,
  { over, findings }: GridPlanCase,
  { model, world, options, inputs }: ScenarioCase,
  columns: readonly Float64Array[],
  failures: GridRows['failures'],
): GridCase {
  const names = cases.map((one) => one.over.name);
  return {
    name: over.name,
    model,
    findings: findings.map((finding, f) => ({
      ...finding,
      values: Array.from(columns[f], (value) => (Number.isNaN(value) ? null : value)),
      circular: options.start === 'periodic' && isTimeInOrbit(finding.name),
    })),
    own: over.own.map((value, k) => {
      const { from, to, unit } = axes[k].along;
      return value === null || value < from || value > to ? null : inUnit(value, unit);
    }),
    failed: failures.flatMap(({ node, message }) =>
      messagesOf(message, names, over.name).map((text) => ({ node, message: text })),
    ),
    warnings: over.warnings,
    notes: over.notes,
    universal: universalPlace(model, world, options),
    inputs,
  };
}

/**
 * What a message says of one case, without its name. A part begins with the name of a case; a semicolon within one ends nothing, and of
 * two names that fit the longer is meant.
 */
function messagesOf(message: string, names: readonly string[], wanted: string): string[] {
  if (names.length === 1) return [message];
  const parts: { name: string; text: string }[] = [];
  for (const piece of message.split('; ')) {
    const [name] = names.filter((one) => piece.startsWith(`${one}: `)).sort((a, b) => b.length - a.length);
    if (name !== undefined) parts.push({ name, text: piece.slice(name.length + 2) });
    else if (parts.length > 0) parts.at(-1)!.text += `; ${piece}`;
  }
  return parts.filter(({ name }) => name === wanted).map(({ text }) => text);
}
