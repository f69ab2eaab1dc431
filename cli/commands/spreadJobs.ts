/** The tables of a spread as jobs of the engine: the draws, the first of them as curves, and the further runs of the indices. */
import { bandSampler } from '../../sim/studies/spread/bandSampler.ts';
import { furtherRuns } from '../../sim/studies/spread/indexDesign.ts';
import type { SpreadPlan } from '../../sim/studies/spread/plan.ts';
import { bandColumnName } from '../../sim/studies/spread/summariseSpread.ts';
import type { Column, Job } from '../engine/job.ts';
import type { Held } from '../engine/room.ts';
import type { SpreadContext } from './spreadContext.ts';

/** All that a spread may write. */
export const spreadTables = ['draws', 'bands', 'indices'] as const;

export interface SpreadJob {
  readonly table: (typeof spreadTables)[number];
  readonly job: Job;
}

/** `summariseSpread` reads a column at a time: its values, the same unwrapped, the periods, scratch, and one or two that wait to be cleared. */
export const heldBySpread: Held = { columns: 6, heapANumber: 0, textANumber: 0 };

/** Draws that become curves: a year of many latitudes takes long, and shows its spread in fewer. */
const mostBands = 4096;
const mostZonalBands = 512;
const mostIndexRows = 4096;

export function bandDrawsOf({ cases, setup }: SpreadPlan): number {
  const isZonal = cases.some(({ drawn }) => drawn.model !== 'lumped');
  return Math.min(setup.draws, isZonal ? mostZonalBands : mostBands);
}

export function indexRowsOf({ setup }: SpreadPlan): number {
  return Math.min(setup.draws, mostIndexRows);
}

export function spreadJobs(plan: SpreadPlan, context: SpreadContext): SpreadJob[] {
  const { setup, inputColumns, findingColumns } = plan;
  const { sha256, samplesSha256, version, draws, seed, sampling, only } = context;
  const settings = {
    scenario: sha256,
    samples: samplesSha256,
    version,
    draws,
    seed,
    sampling,
    cases: only?.join('\n') ?? null,
  };
  const common = { setup, settings, context: { ...context } };
  const inputs = inputColumns.map(({ name, unit, label }) => ({ name, unit, label }));
  const findings = findingColumns.map(({ name, unit, label }) => ({ name, unit, label }));
  const bands = bandColumns(plan);
  const jobs: SpreadJob[] = [
    { table: 'draws', job: { ...common, kind: 'spreadDraws', inputs, findings, rows: setup.draws } },
  ];
  if (bands.length > 0) {
    jobs.push({
      table: 'bands',
      job: { ...common, kind: 'spreadBands', inputs: [], findings: bands, rows: bandDrawsOf(plan) },
    });
  }
  if (context.indices) {
    const rows = furtherRuns(indexRowsOf(plan), plan.dimensions.length);
    jobs.push({ table: 'indices', job: { ...common, kind: 'spreadIndices', inputs, findings, rows } });
  }
  return jobs;
}

function bandColumns(plan: SpreadPlan): Column[] {
  return plan.cases.flatMap(({ drawn, inputs }, index) => {
    const sampler = bandSampler(
      drawn,
      inputs.map(({ centre }) => centre),
    );
    return sampler.bands.flatMap(({ name, label, positions, along }) =>
      Array.from(positions, (position, i) => ({
        name: bandColumnName(plan, index, `${name}.${i}`),
        unit: 'K',
        label: `${label}, ${along === 'orbit' ? `${position.toFixed(4)} of the period after periapsis` : `${position.toFixed(1)} deg`}`,
      })),
    );
  });
}
