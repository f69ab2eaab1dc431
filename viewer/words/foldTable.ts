/** The table of folds: a column for each place where a branch turns back. Pure. */
import type { TraceReport } from '../../sim/studies/traceReport.ts';
import { alongText } from './along.ts';
import { type ClimateEnd, climateEnds, foldsOf } from './climates.ts';
import { fixed, kelvin, percent, withUnit } from './number.ts';

export interface FoldColumn {
  readonly caseIndex: number;
  readonly caseName: string;
  /** What ends there. */
  readonly words: string;
  readonly cells: readonly string[];
}

export interface FoldTable {
  readonly labels: readonly string[];
  readonly columns: readonly FoldColumn[];
}

export function foldTable({ cases, along }: TraceReport): FoldTable {
  const labels = [
    `${along.label} at the fold`,
    'Mean temperature at the fold',
    'Highest area mean of the year',
    'Lowest area mean of the year',
    'Ice fraction at the fold',
    'The climate exists for',
    'Mean temperature of the climate that is left',
  ];
  const columns = cases.flatMap((oneCase, caseIndex) => {
    const ends = climateEnds(oneCase, along);
    return foldsOf(oneCase, along)
      .toSorted((a, b) => a.value - b.value)
      .map((point) => {
        const end = ends.find((one) => one.point === point);
        const { temperatureMean, temperatureMax, temperatureMin, iceFraction } = point;
        return {
          caseIndex,
          caseName: oneCase.name,
          words: end === undefined ? 'two unstable states meet' : `${end.name} climate ends`,
          cells: [
            alongText(point.value, along),
            ...[temperatureMean, temperatureMax, temperatureMin].map((value) => withUnit(fixed(value, 2), 'K')),
            percent(iceFraction),
            ...beyond(end),
          ],
        };
      });
  });
  return { labels, columns };
}

function beyond(end: ClimateEnd | undefined): string[] {
  if (end === undefined) return ['—', '—'];
  return [end.liesAbove ? 'higher values' : 'lower values', end.next === null ? 'none found' : kelvin(end.next)];
}
