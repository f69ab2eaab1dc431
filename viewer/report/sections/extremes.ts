/** Table 1: lowest and highest of every finding on the grid. */
import type { GridReport } from '../../../sim/studies/grid/gridReport.ts';
import { axesText } from '../../words/gridAxes.ts';
import { lookOf } from '../../words/gridMembers.ts';
import { type ExtremeCell, extremeRows } from '../../words/gridTable.ts';
import { dataTable } from '../dataTable.ts';
import { type Child, element, userText } from '../element.ts';
import { caseSample } from '../lineSample.ts';

export function extremesSection(report: GridReport): HTMLElement {
  const table = dataTable({
    caption: [
      element('b', {}, 'Table 1. '),
      `Every finding over the grid, lowest to highest. Beneath, where: ${axesText(report.axes)}.`,
    ],
    label: 'Extremes over the grid',
    corner: 'Finding',
    columns: report.cases.map((one) => ({ head: [caseSample(lookOf(one)), userText(one.name)] })),
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

function content({ text, details }: ExtremeCell): Child[] {
  return [
    element('span', { class: 'detail' }, text),
    ...details.map((detail) => element('small', { class: 'detail' }, detail)),
  ];
}
