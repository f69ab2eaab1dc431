/** The table of extremes: of every finding the lowest and highest value on the grid, and where. Pure. */
import type { GridReport } from '../../sim/studies/grid/gridReport.ts';
import { nodeText } from './gridAxes.ts';
import { extremesOf, offeredFindings, shownFinding } from './shownFinding.ts';

export interface ExtremeCell {
  readonly text: string;
  /** In small print: where. */
  readonly detail: string | null;
}

export interface ExtremeRow {
  readonly label: string;
  /** Two a case: lowest, highest. */
  readonly cells: readonly ExtremeCell[];
}

export function extremeRows(report: GridReport): ExtremeRow[] {
  const { chief, others } = offeredFindings(report);
  return [...chief, ...others].map(({ name, label }) => {
    const shown = shownFinding(report, name);
    const cells = shown.cases.flatMap((values) => {
      const found = extremesOf(values);
      if (found === null) return [none, none];
      const { low, high } = found;
      if (shown.text(low.value) === shown.text(high.value))
        return [{ text: shown.text(low.value), detail: null }, same];
      return [low, high].map(({ value, node }) => ({ text: shown.text(value), detail: nodeText(report.axes, node) }));
    });
    return { label, cells };
  });
}

const none: ExtremeCell = { text: '—', detail: 'no value' };
const same: ExtremeCell = { text: 'the same', detail: null };
