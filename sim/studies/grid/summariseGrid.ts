/** From the rows of a grid to what is told of it. */
import type { Origin } from '../../origin.ts';
import { inUnit } from '../../quantity/index.ts';
import type { CaseOver } from '../../scenario/over.ts';
import { byGrid, spreadNotes } from '../../scenario/spreads.ts';
import type { Scenario, ScenarioCase } from '../../scenario/types.ts';
import { isTimeInOrbit } from '../isTimeInOrbit.ts';
import type { GridCase, GridMember, GridReport } from './gridReport.ts';
import type { GridPlan, GridPlanCase } from './plan.ts';
import { universalPlace } from './storeNumber.ts';

export interface GridRows {
  /** Columns of findings, case after case, (nodes,), NaN where undefined. */
  readonly findings: readonly Float64Array[];
  /** With the names of the cases where there are several: `sea: orbit: …; rock: orbit: …`. */
  readonly failures: readonly { readonly node: number; readonly message: string }[];
}

/** `scenario`: with the cases of the plan. */
export function summariseGrid(
  plan: GridPlan,
  { cases, posterior }: Pick<Scenario, 'cases' | 'posterior'>,
  origin: Origin,
  rows: GridRows,
): GridReport {
  let offset = 0;
  return {
    ...origin,
    axes: plan.axes.map(({ along: { key, label, unit, log }, nodes }) => {
      return { key, label, unit, log, nodes: Float64Array.from(nodes, ({ text }) => Number.parseFloat(text)) };
    }),
    hold: plan.setup.hold,
    cases: plan.cases.map((one) => {
      const columns = rows.findings.slice(offset, offset + one.findings.length);
      offset += one.findings.length;
      return summariseCase(plan, one, cases, columns, rows.failures);
    }),
    notes: spreadNotes({ cases: cases.map((one) => asRead(one, plan)), posterior }, byGrid),
  };
}

function summariseCase(
  { axes, cases: planned }: GridPlan,
  { name, over, members, findings, notes }: GridPlanCase,
  cases: readonly ScenarioCase[],
  columns: readonly Float64Array[],
  failures: GridRows['failures'],
): GridCase {
  const names = planned.map((one) => one.name);
  return {
    name,
    model: over.model,
    findings: findings.map((finding, f) => ({
      ...finding,
      values: Array.from(columns[f], (value) => (Number.isNaN(value) ? null : value)),
      circular: over.options.start === 'periodic' && isTimeInOrbit(finding.name),
    })),
    members: members.map((member) => summariseMember(member, axes, cases)),
    failed: failures.flatMap(({ node, message }) =>
      messagesOf(message, names, name).map((text) => ({ node, message: text })),
    ),
    warnings: [...new Set(members.flatMap(({ warnings }) => warnings))],
    notes,
  };
}

function summariseMember(
  { name, model, options, own, world }: CaseOver,
  axes: GridPlan['axes'],
  cases: readonly ScenarioCase[],
): GridMember {
  const index = cases.findIndex((one) => one.name === name);
  return {
    name,
    index,
    own: own.map((value, k) => {
      const { from, to, unit } = axes[k].along;
      return value === null || value < from || value > to ? null : inUnit(value, unit);
    }),
    universal: universalPlace(model, world, options),
    inputs: cases[index].inputs,
  };
}

/** A case with the inputs that its nodes read. */
function asRead({ name, inputs }: ScenarioCase, { cases }: GridPlan): Pick<ScenarioCase, 'name' | 'inputs'> {
  const { unread } = cases.flatMap(({ members }) => members).find((member) => member.name === name)!;
  return { name, inputs: inputs.filter(({ key }) => !unread.some((one) => `${key}.`.startsWith(`${one}.`))) };
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
