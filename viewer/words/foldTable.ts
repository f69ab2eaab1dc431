/** The table of folds: a row for each place where a climate ends. Pure. */
import type { TraceReport } from '../../sim/studies/traceReport.ts';
import { type Along, alongText } from './along.ts';
import type { TraceCase } from './arcs.ts';
import { type ClimateEnd, climateEnds, foldsOf } from './climates.ts';
import { fixed, kelvin, percent, withUnit } from './number.ts';

export interface FoldRow {
  readonly caseIndex: number;
  readonly caseName: string;
  /** What ends there. */
  readonly words: string;
  readonly cells: readonly string[];
}

export interface FoldTable {
  readonly labels: readonly string[];
  readonly rows: readonly FoldRow[];
  /** Folds at which no climate ends, each with its case; in the order of the cases. */
  readonly unstable: readonly { readonly caseName: string; readonly values: readonly string[] }[];
}

export function foldTable({ cases, along }: TraceReport): FoldTable {
  const labels = [
    `${along.label} at the fold`,
    'Mean temperature there',
    'Lowest and highest area mean',
    'Ice there',
    'It exists for',
    'Mean of the climate that is left',
  ];
  const rows = cases.flatMap((oneCase, caseIndex) =>
    climateEnds(oneCase, along)
      .toSorted((a, b) => a.point.value - b.point.value)
      .map((end) => ({
        caseIndex,
        caseName: oneCase.name,
        words: `${end.name} climate ends`,
        cells: cellsOf(end, along),
      })),
  );
  const unstable = cases
    .map((oneCase) => ({ caseName: oneCase.name, values: unstableFolds(oneCase, along) }))
    .filter(({ values }) => values.length > 0);
  return { labels, rows, unstable };
}

function cellsOf({ point, liesAbove, next }: ClimateEnd, along: Along): string[] {
  const { temperatureMean, temperatureMax, temperatureMin, iceFraction } = point;
  return [
    alongText(point.value, along),
    withUnit(fixed(temperatureMean, 2), 'K'),
    `${fixed(temperatureMin, 2)} to ${withUnit(fixed(temperatureMax, 2), 'K')}`,
    percent(iceFraction),
    liesAbove ? 'higher values' : 'lower values',
    next === null ? 'none found' : kelvin(next),
  ];
}

function unstableFolds(oneCase: TraceCase, along: Along): string[] {
  const ends = climateEnds(oneCase, along).map(({ point }) => point);
  const others = foldsOf(oneCase, along).filter((point) => !ends.includes(point));
  return others.toSorted((a, b) => a.value - b.value).map(({ value }) => alongText(value, along));
}
