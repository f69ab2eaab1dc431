/** `trace.csv` and the `summary.json` of `trace`. */
import { climateEnds, severalClimates } from '../../sim/studies/climateRanges.ts';
import type { TraceReport, TraceReportPoint } from '../../sim/studies/traceReport.ts';
import { csvField, csvNumber } from './csv.ts';

const columns: readonly { readonly header: string; readonly of: (point: TraceReportPoint) => number | boolean }[] = [
  { header: 'stable', of: ({ stable }) => stable },
  { header: 'fold', of: ({ fold }) => fold },
  { header: 'log_multiplier', of: ({ logMultiplier }) => logMultiplier },
  { header: 'temperature_mean_K', of: ({ temperatureMean }) => temperatureMean },
  { header: 'temperature_max_K', of: ({ temperatureMax }) => temperatureMax },
  { header: 'temperature_min_K', of: ({ temperatureMin }) => temperatureMin },
  { header: 'ice_fraction', of: ({ iceFraction }) => iceFraction },
];

/** A row for each point, in the order in which its branch runs. Errors: throws when a number in it is not finite. */
export function traceCsvText({ along, cases }: TraceReport): string {
  const input = inputHeader(along);
  const rows = cases.flatMap(({ name, branches }) =>
    branches.flatMap(({ points }, branch) =>
      points.map((point, index) => {
        const values = columns.map(({ header, of }) => fieldOf(of(point), header));
        return [csvField(name), branch + 1, index + 1, csvNumber(point.value, input), ...values].join(',');
      }),
    ),
  );
  const header = ['case', 'branch', 'point', input, ...columns.map((column) => column.header)].join(',');
  return `${[header, ...rows].join('\n')}\n`;
}

function fieldOf(value: number | boolean, header: string): string {
  return typeof value === 'boolean' ? String(value) : csvNumber(value, header);
}

/** `star.luminosity_Lsun`; a pure number has no unit behind it. */
function inputHeader({ key, unit }: TraceReport['along']): string {
  return unit === '1' ? key : `${key}_${unit.replace(/[^A-Za-z0-9.^]+/g, '_')}`;
}

/** Inputs in the unit of `along`, temperatures in K. */
export function traceSummary({ program, scenario, along, cases }: TraceReport) {
  const { title, file, sha256 } = scenario;
  return {
    program,
    scenario: { title, file, sha256 },
    along,
    cases: cases.map((item) => ({
      name: item.name,
      model: item.model,
      folds: item.folds,
      climateEnds: climateEnds(item),
      severalClimates: severalClimates(item),
      branches: item.branches.map(({ ended, points }) => {
        return { ended, points: points.length, stable: points.filter(({ stable }) => stable).length };
      }),
      warnings: item.warnings,
    })),
  };
}
