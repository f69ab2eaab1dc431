/** Table 1 of a trace: the folds, where climates end. */
import type { TraceReport } from '../../../sim/studies/traceReport.ts';
import { foldTable } from '../../words/foldTable.ts';
import { dataTable } from '../dataTable.ts';
import { element, userText } from '../element.ts';
import { caseSample } from '../lineSample.ts';

export function foldsSection(trace: TraceReport): HTMLElement {
  const { labels, columns } = foldTable(trace);
  const heading = element('h2', {}, 'Where climates end');
  if (columns.length === 0) {
    return element('section', { class: 'grid' }, heading, element('p', {}, 'No fold lies within the range.'));
  }
  const table = dataTable({
    caption: [
      element('b', {}, 'Table 1. '),
      'The folds: where a stable and an unstable state meet, and a climate ends.',
    ],
    label: 'The folds',
    corner: 'Quantity',
    columns: columns.map(({ caseIndex, caseName, words }) => ({
      head: [caseSample(caseIndex), userText(caseName), element('small', {}, words)],
    })),
    rows: labels.map((label, row) => ({ head: [label], cells: columns.map(({ cells }) => [cells[row]!]) })),
  });
  const note = element(
    'aside',
    {},
    element(
      'p',
      {},
      'The climate that is left is the next stable one on the side of the unstable branch, read at the fold.',
    ),
    element('p', {}, 'To come back, the input must pass the other fold: this is hysteresis.'),
  );
  return element('section', { class: 'grid' }, heading, table, note);
}
