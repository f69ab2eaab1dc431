/** The tables of a spread as phases, and what makes a long one shorter. */
import { type Shard, shardRange } from '../engine/plan.ts';
import { type Phase, phasesOf } from './phases.ts';
import { duration } from './progressBar.ts';

export interface SpreadTableJob {
  readonly table: string;
  readonly job: { readonly rows: number };
}

/** In the order of the jobs; rows are those of the shard. */
export function spreadPhases(
  jobs: readonly SpreadTableJob[],
  shard: Shard | null,
  hasLatitudes: boolean,
): readonly Phase[] {
  const tables = jobs.map(({ table, job: { rows } }) => {
    const { from, to } = shard === null ? { from: 0, to: rows } : shardRange(rows, shard);
    return { name: table, rows: to - from };
  });
  const ways = [
    ...(jobs.some(({ table }) => table === 'indices') ? ['--no-indices'] : []),
    'fewer --draws',
    ...(hasLatitudes ? ['fewer planet.bands'] : []),
    'more --workers',
    `${shard === null ? '' : 'a smaller '}--shard on several machines`,
  ];
  return phasesOf(tables, `Shorter: ${ways.slice(0, -1).join(', ')}, or ${ways.at(-1)}.`, duration);
}
