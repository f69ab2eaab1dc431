/** Table 1: lowest and highest of every finding on the grid. */
import type { GridReport } from '../../../sim/studies/grid/gridReport.ts';
import { type ExtremeCell, extremeRows } from '../../words/gridTable.ts';
import { dataTable } from '../dataTable.ts';
import { type Child, element, userText } from '../element.ts';
import { caseSample } from '../lineSample.ts';

export function extremesSection(report: GridReport): HTMLElement {
  const columns = report.cases.flatMap(({ name }, at) =>
    ['lowest', 'highest'].map((which) => ({
      head: [caseSample(at), userText(name), element('small', {}, which)],
    })),
  );
  const table = dataTable({
    caption: [element('b', {}, 'Table 1. '), 'Lowest and highest of every finding on the grid, and where.'],
    label: 'Extremes over the grid',
    corner: 'Finding',
    columns,
    rows: extremeRows(report).map(({ label, cells }) => ({ head: [userText(label)], cells: cells.map(content) })),
  });
  const note = element(
    'aside',
    {},
    element('p', {}, 'Only worlds on the nodes count: between two of them a finding may go a little further.'),
    element('p', {}, 'Times that come round with the orbit are counted from periapsis; below zero is before it.'),
  );
  return element('section', { class: 'grid' }, element('h2', {}, 'Over the whole grid'), table, note);
}

function content({ text, detail }: ExtremeCell): Child[] {
  return [text, detail === null ? null : element('small', { class: 'detail' }, userText(detail))];
}
