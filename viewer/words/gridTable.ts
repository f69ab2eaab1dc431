/** The table of extremes: of every finding the lowest and highest value on the grid, and where. Pure. */
import type { GridReport } from '../../sim/studies/grid/gridReport.ts';
import { bareNodeText } from './gridAxes.ts';
import { extremesOf, offeredFindings, shownFinding, spanText } from './shownFinding.ts';

export interface ExtremeCell {
  readonly text: string;
  /** In small print: where. */
  readonly details: readonly string[];
}

export interface ExtremeRow {
  readonly label: string;
  /** One a case. */
  readonly cells: readonly ExtremeCell[];
}

export function extremeRows(report: GridReport): ExtremeRow[] {
  const { chief, others } = offeredFindings(report);
  return [...chief, ...others].map(({ name, label }) => {
    const shown = shownFinding(report, name);
    const cells = shown.cases.map((values): ExtremeCell => {
      const found = extremesOf(values);
      if (found === null) return { text: '—', details: ['no value'] };
      const { low, high } = found;
      const span = spanText(shown, low.value, high.value);
      if (span === null) return { text: shown.text(low.value), details: ['throughout'] };
      const at = (node: number): string => bareNodeText(report.axes, node);
      return { text: span, details: [`lowest at ${at(low.node)}`, `highest at ${at(high.node)}`] };
    });
    return { label, cells };
  });
}
