/** The data behind a figure as a table, one point a row. Pure. */
import type { GridReport } from '../../sim/studies/grid/gridReport.ts';
import type { CsvValue } from '../words/csv.ts';
import { nodePlace } from '../words/gridAxes.ts';
import type { ShownFinding } from '../words/shownFinding.ts';

export interface FigureTable {
  readonly columns: readonly FigureColumn[];
  readonly rows: readonly (readonly CsvValue[])[];
}

export interface FigureColumn {
  /** In plain words; a file makes `mean_temperature_K` of it. */
  readonly name: string;
  /** As it stands behind a number, or as the contract writes it; empty for words and pure numbers. */
  readonly unit: string;
}

export function words(name: string): FigureColumn {
  return { name, unit: '' };
}

/** A finding of some cases at every node of a grid; where there is no value, why. */
export function nodesTable(report: GridReport, shown: ShownFinding, caseIndices: readonly number[]): FigureTable {
  const { axes, cases } = report;
  return {
    columns: [
      words('case'),
      ...axes.map(({ label, unit }) => ({ name: label, unit })),
      { name: shown.label, unit: shown.symbol },
      words('note'),
    ],
    rows: caseIndices.flatMap((caseIndex) => {
      const { name, failed } = cases[caseIndex]!;
      const notComputed = new Set(failed.map(({ node }) => node));
      const count = axes.reduce((product, { nodes }) => product * nodes.length, 1);
      return Array.from({ length: count }, (_, node) => {
        const value = shown.cases[caseIndex]![node] ?? null;
        const note = value !== null ? null : notComputed.has(node) ? 'not computed' : 'no value';
        return [name, ...nodePlace(axes, node), value, note];
      });
    }),
  };
}
