/** The spread that the page carries, checked. Pure. */
import { percentileLevels } from '../../sim/studies/spread/percentiles.ts';
import type { SpreadBand, SpreadCase, SpreadFinding, SpreadReport } from '../../sim/studies/spread/spreadReport.ts';
import { damaged } from './readResult.ts';

type Unchecked<T> = { readonly [Key in keyof T]?: unknown } | null | undefined;

/** Errors: PageError when this is no spread, or one whose numbers are not all there. */
export function checkedSpread(value: unknown): SpreadReport {
  if (!isSpread(value)) throw damaged('the data are not a spread');
  for (const one of value.cases) {
    if (!isWhole(one)) throw damaged(`numbers of “${one.name}” are missing`);
  }
  return value;
}

function isSpread(value: unknown): value is SpreadReport {
  const spread = value as Unchecked<SpreadReport>;
  if (typeof spread !== 'object' || spread === null) return false;
  const { cases, draws, seed, failed, indexRows, sampling } = spread;
  const { file } = (spread.scenario ?? {}) as { file?: unknown };
  const { name } = (spread.program ?? {}) as { name?: unknown };
  if (typeof file !== 'string' || typeof name !== 'string') return false;
  if (![draws, seed, failed, indexRows].every(Number.isFinite) || !(Number(draws) > 0)) return false;
  if (!['sobol', 'random', 'posterior'].includes(String(sampling))) return false;
  return Array.isArray(cases) && cases.length > 0 && cases.every(isCase);
}

/** Every list that the page walks through is one. */
function isCase(one: Unchecked<SpreadCase>): boolean {
  if (typeof one?.name !== 'string' || typeof one.model !== 'string') return false;
  const { inputs, findings } = (one.sample ?? {}) as { inputs?: unknown; findings?: unknown };
  const lists = [one.inputs, one.findings, one.idle, one.bands, one.warnings, one.notes, inputs, findings];
  if (!lists.every(Array.isArray)) return false;
  const named = [...(one.inputs as unknown[]), ...(one.findings as unknown[])] as readonly Unchecked<SpreadFinding>[];
  return named.every((entry) => typeof entry?.label === 'string' && typeof entry.unit === 'string');
}

function isWhole({ inputs, findings, bands, sample }: SpreadCase): boolean {
  const rows = sample.inputs[0]?.length ?? sample.findings[0]?.length ?? 0;
  const columns = [...sample.inputs, ...sample.findings];
  return (
    sample.inputs.length === inputs.length &&
    sample.findings.length === findings.length &&
    columns.every((column) => column.length === rows) &&
    inputs.every(({ centre, summary }) => Number.isFinite(centre) && isSummary(summary)) &&
    findings.every((finding) => isFinding(finding, inputs.length)) &&
    bands.every(isBand)
  );
}

function isFinding({ atCentre, summary, histogram, importance }: SpreadFinding, inputs: number): boolean {
  const perInput = [importance?.first, importance?.total, importance?.ranks];
  return (
    (atCentre === null || Number.isFinite(atCentre)) &&
    isSummary(summary) &&
    (histogram === null || (Array.isArray(histogram?.counts) && histogram.counts.length > 0)) &&
    perInput.every((list) => list === null || list?.length === inputs)
  );
}

function isSummary(summary: SpreadFinding['summary'] | undefined): boolean {
  if (!Number.isFinite(summary?.defined)) return false;
  const { mean, percentiles } = summary!;
  if (mean === null || percentiles === null) return mean === percentiles;
  return [mean, ...percentileLevels.map((level) => percentiles[level])].every(Number.isFinite);
}

function isBand({ positions, levels, atCentre }: SpreadBand): boolean {
  const length = positions?.length ?? 0;
  if (length < 2 || levels?.length !== percentileLevels.length) return false;
  return [...levels, atCentre].every((values) => values?.length === length);
}
