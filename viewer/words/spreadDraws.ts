/** How many draws there were, which, and how many failed. Pure. */
import type { SpreadReport } from '../../sim/studies/spread/spreadReport.ts';
import { percent } from './number.ts';

const kinds: Readonly<Record<SpreadReport['sampling'], string>> = {
  sobol: 'scrambled Sobol’ points',
  random: 'pseudo-random draws',
  posterior: 'draws from posterior samples',
};

export function drawsText({ draws, seed, sampling, indexRows, failed, cases }: SpreadReport): string {
  const rows = Math.max(0, ...cases.map(({ sample }) => sample.inputs[0]?.length ?? 0));
  return [
    `${draws} ${kinds[sampling]} of seed ${seed}; the same seed gives the same draws.`,
    indexRows > 0
      ? `What matters most rests on ${indexRows} rows of further runs.`
      : sampling === 'posterior'
        ? 'Indices suppose inputs that are drawn apart; for samples that go together a dependence by ranks stands in their place.'
        : 'No indices of what matters most were asked for.',
    `Percentiles are of all draws; this page carries the first ${rows} for its scatter, and draws.parquet holds every one.`,
    failed === 0 ? 'None failed.' : 'Failed draws are in no number here; failed.csv lists them with their inputs.',
  ].join(' ');
}

/** Empty where none failed. */
export function failedRows({
  cases,
  draws,
  failed,
}: SpreadReport): { caseIndex: number; name: string; count: string; share: string }[] {
  if (failed === 0) return [];
  return cases.map((one, caseIndex) => ({
    caseIndex,
    name: one.name,
    count: String(one.failed),
    share: one.failed === 0 ? 'none' : percent(one.failed / draws),
  }));
}
