/** What a grid computes: every case at every node of one or two ranges, straight to its findings. */

import { SimError } from '../../error.ts';
import type { FindingColumn } from '../../findings/finding.ts';
import { batchOf } from '../../models/batchOf.ts';
import { models } from '../../models/index.ts';
import type { Batch } from '../../models/model.ts';
import { type Along, readAlong } from '../../scenario/along.ts';
import { readHold } from '../../scenario/hold.ts';
import { type Node, nodesOf } from '../../scenario/nodes.ts';
import { type CaseOver, casesOver } from '../../scenario/over.ts';
import { nodePlaces } from './nodePlaces.ts';

/** What the numbers of a grid depend on. Plain data: it crosses to every worker. */
export interface GridSetup {
  readonly text: string;
  readonly file: string;
  readonly only: readonly string[] | null;
  /** As typed: `orbit.eccentricity=0 to 0.9`. */
  readonly alongs: readonly string[];
  readonly hold: string | null;
  readonly steps: number;
  /** Names of findings; null for all. */
  readonly of: readonly string[] | null;
}

export interface GridPlanAxis {
  readonly along: Along;
  readonly nodes: readonly Node[];
}

export interface GridPlanCase {
  readonly over: CaseOver;
  readonly batch: Batch;
  readonly findings: readonly FindingColumn[];
}

export interface GridPlan {
  readonly setup: GridSetup;
  readonly axes: readonly GridPlanAxis[];
  readonly cases: readonly GridPlanCase[];
  /** Nodes of all axes together. */
  readonly count: number;
}

/** Errors: as `readAlong`, `readHold` and `casesOver`; SimError at `--of` for a name that is no finding. */
export function planGrid(setup: GridSetup): GridPlan {
  const alongs = setup.alongs.map(readAlong);
  if (alongs.length > 2) throw new SimError('--along', `${alongs.length} ranges are given`, 'Give one or two');
  const hold = setup.hold === null ? null : readHold(setup.hold, alongs);
  const axes = alongs.map((along) => ({ along, nodes: nodesOf(along, setup.steps) }));
  const overs = casesOver(setup.text, setup.file, alongs, { ...(setup.only ? { only: setup.only } : {}), hold });
  return { setup, axes, cases: overs.map((over) => planCase(over, axes, setup.of)), count: setup.steps ** axes.length };
}

function planCase(over: CaseOver, axes: readonly GridPlanAxis[], of: readonly string[] | null): GridPlanCase {
  const model = models[over.model];
  const template = over.worldAt(firstSound(over, axes));
  const all = batchOf(model, over.options, over.windows, template);
  const known = all.columns.map(({ name }) => name);
  const missing = of?.find((name) => !known.includes(name));
  if (missing !== undefined)
    throw new SimError(
      '--of',
      `\`${missing}\` is no finding of case \`${over.name}\``,
      `Choose from ${known.join(', ')}`,
    );
  const batch = of === null ? all : batchOf(model, over.options, over.windows, template, of);
  return { over, batch, findings: batch.columns };
}

/** Values of the first node at which a case is sound; there is one, or `casesOver` would have refused it. */
function firstSound(over: CaseOver, axes: readonly GridPlanAxis[]): number[] {
  const count = axes.reduce((product, { nodes }) => product * nodes.length, 1);
  let fault: unknown;
  for (let node = 0; node < count; node++) {
    try {
      const values = valuesAt(axes, node);
      over.worldAt(values);
      return values;
    } catch (error) {
      fault = error;
    }
  }
  throw fault;
}

/** SI values of the axes at a node; the second axis runs fastest. */
export function valuesAt(axes: readonly GridPlanAxis[], node: number): number[] {
  const places = nodePlaces(
    axes.map(({ nodes }) => nodes.length),
    node,
  );
  return axes.map(({ nodes }, k) => nodes[places[k]].value);
}
