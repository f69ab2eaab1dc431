/** What a grid computes: every case at every node of one or two ranges, straight to its findings. */

import { SimError } from '../../error.ts';
import type { FindingColumn } from '../../findings/finding.ts';
import { batchOf } from '../../models/batchOf.ts';
import { models } from '../../models/index.ts';
import type { Batch } from '../../models/model.ts';
import { nearest } from '../../quantity/index.ts';
import { alike, alikeNotes, togetherName } from '../../scenario/alike.ts';
import { type Along, readAlong } from '../../scenario/along.ts';
import { readHold } from '../../scenario/hold.ts';
import { fingerprintWithWindows } from '../../scenario/influence.ts';
import { replacedNotes } from '../../scenario/leftOut.ts';
import { type Node, nodesOf } from '../../scenario/nodes.ts';
import { type CaseOver, casesOver } from '../../scenario/over.ts';
import { caught } from '../rowSolver.ts';
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
  /** Of all members. */
  readonly name: string;
  /** Cases of the scenario that are the same over the ranges; the first stands for all. */
  readonly members: readonly CaseOver[];
  readonly over: CaseOver;
  readonly batch: Batch;
  readonly findings: readonly FindingColumn[];
  /** What the ranges replace, what follows from other keys, what is held, and why there are several members. */
  readonly notes: readonly string[];
}

export interface GridPlan {
  readonly setup: GridSetup;
  readonly axes: readonly GridPlanAxis[];
  readonly cases: readonly GridPlanCase[];
  /** Nodes of all axes together. */
  readonly count: number;
}

const where = '--of';

/**
 * Errors: as `readAlong`, `readHold` and `casesOver`; SimError at `--of` for a name that is no finding, at `--along` for a case
 * that no node finds sound.
 */
export function planGrid(setup: GridSetup): GridPlan {
  const alongs = setup.alongs.map(readAlong);
  if (alongs.length > 2) throw new SimError('--along', `${alongs.length} ranges are given`, 'Give one or two');
  const hold = setup.hold === null ? null : readHold(setup.hold, alongs);
  const axes = alongs.map((along) => ({ along, nodes: nodesOf(along, setup.steps) }));
  const overs = casesOver(setup.text, setup.file, alongs, { ...(setup.only ? { only: setup.only } : {}), hold });
  const groups = alike(overs.map((over) => ({ over, print: printOf(over, axes) }))).map((group) =>
    group.map(({ over }) => over),
  );
  return { setup, axes, cases: planCases(groups, axes, setup.of), count: setup.steps ** axes.length };
}

/** All that the findings of a case depend on, at the ends and in the middle of the ranges. */
function printOf(over: CaseOver, axes: readonly GridPlanAxis[]): string {
  const probed = axes.reduce<number[][]>(
    (points, { along }) => points.flatMap((point) => nodesOf(along, 3).map(({ value }) => [...point, value])),
    [[]],
  );
  const prints = probed.map((point) => {
    const built = caught(() => over.builtAt(point));
    return typeof built === 'string' ? built : [built.world.star, fingerprintWithWindows(built)];
  });
  return JSON.stringify([over.model, over.options, prints]);
}

function planCases(
  groups: readonly (readonly CaseOver[])[],
  axes: readonly GridPlanAxis[],
  of: readonly string[] | null,
): GridPlanCase[] {
  const batchFor = (over: CaseOver, only?: readonly string[]) =>
    batchOf(models[over.model], over.options, over.windows, over.worldAt(firstSound(over, axes)), only);
  const all = groups.map(([over]) => batchFor(over));
  if (of !== null) checkNames(of, all);
  const these = axes.length > 1 ? 'over these inputs, which replace' : 'along this input, which replaces';
  return groups.map((members, at) => {
    const [over] = members;
    const batch = of === null ? all[at] : batchFor(over, wantedOf(of, togetherName(members), all[at]));
    return {
      name: togetherName(members),
      members,
      over,
      batch,
      findings: batch.columns,
      notes: [
        ...replacedNotes(members.flatMap(({ replaced }) => replaced)),
        ...over.notes,
        ...alikeNotes(members, these, 'computed'),
      ],
    };
  });
}

/** Errors: SimError for no name, and for one that is no finding of any case. */
function checkNames(of: readonly string[], batches: readonly Batch[]): void {
  const known = [...new Set(batches.flatMap(({ columns }) => columns.map(({ name }) => name)))];
  const missing = of.find((name) => !known.includes(name));
  if (of.length > 0 && missing === undefined) return;
  const what = missing === undefined ? 'no finding is named' : `there is no finding \`${missing}\``;
  throw new SimError(where, what, adviceOn(missing ?? '', known));
}

function adviceOn(missing: string, known: readonly string[]): string {
  if (/\s/.test(missing) && missing.split(/\s+/).every((name) => known.includes(name)))
    return 'Put commas between the names';
  const near = nearest(missing.replace(/[_\s-]/g, ''), known);
  return near === null ? `Choose from ${known.join(', ')}` : `Did you mean \`${near}\``;
}

/** Those of the names that the case has; models have findings of their own. Errors: SimError where it has none. */
function wantedOf(of: readonly string[], caseName: string, { columns }: Batch): string[] {
  const wanted = of.filter((name) => columns.some((column) => column.name === name));
  if (wanted.length > 0) return wanted;
  const what = `case \`${caseName}\` has none of ${of.join(', ')}`;
  throw new SimError(where, what, 'Ask for one that it has, or leave the case out with --only');
}

/**
 * Values of the first node at which a case is sound. `casesOver` has found it sound somewhere, which with an even number of steps may
 * lie between the nodes alone.
 * Errors: SimError at `--along` where it is sound at none.
 */
function firstSound(over: CaseOver, axes: readonly GridPlanAxis[]): number[] {
  const count = axes.reduce((product, { nodes }) => product * nodes.length, 1);
  let first: SimError | null = null;
  for (let node = 0; node < count; node++) {
    const values = valuesAt(axes, node);
    try {
      over.worldAt(values);
      return values;
    } catch (error) {
      if (!(error instanceof SimError)) throw error;
      first ??= error;
    }
  }
  const why = first ? `; at the first: ${first.where}: ${first.what}` : '';
  throw new SimError(
    '--along',
    `case \`${over.name}\` is sound at none of the ${count} nodes, though between them${why}`,
    'Give a narrower range, or more --steps',
  );
}

/** SI values of the axes at a node; the second axis runs fastest. */
export function valuesAt(axes: readonly GridPlanAxis[], node: number): number[] {
  const places = nodePlaces(
    axes.map(({ nodes }) => nodes.length),
    node,
  );
  return axes.map(({ nodes }, k) => nodes[places[k]].value);
}
