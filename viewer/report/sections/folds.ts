/** Table 1 of a trace: where climates end, a row each; on a phone every number has its label above it. */
import type { TraceReport } from '../../../sim/studies/traceReport.ts';
import { foldTable } from '../../words/foldTable.ts';
import { list } from '../../words/number.ts';
import { dataTable } from '../dataTable.ts';
import { element, userText } from '../element.ts';
import { caseSample } from '../lineSample.ts';

export function foldsSection(trace: TraceReport): HTMLElement {
  const { labels, rows, unstable } = foldTable(trace);
  const heading = element('h2', {}, 'Where climates end');
  const quiet = unstable.map(({ caseName, values }) =>
    element(
      'p',
      {},
      ...(trace.cases.length > 1 ? [userText(caseName), ': at '] : ['At ']),
      `${list(values)} two unstable states meet; no climate ends there.`,
    ),
  );
  if (rows.length === 0) {
    const none = quiet.length > 0 ? 'No climate ends within the range.' : 'No fold lies within the range.';
    return element('section', { class: 'grid' }, heading, element('p', {}, none), ...quiet);
  }
  const table = dataTable({
    caption: [
      element('b', {}, 'Table 1. '),
      'The folds: where a stable and an unstable state meet, and a climate ends.',
    ],
    label: 'The folds',
    corner: 'What ends',
    columns: labels.map((label) => ({ head: [label] })),
    rows: rows.map(({ caseIndex, caseName, words, cells }) => ({
      head: [caseSample(caseIndex), userText(caseName), element('small', {}, words)],
      cells: cells.map((cell, at) => [
        element('small', { class: 'phone-label', 'aria-hidden': 'true' }, labels[at]!),
        cell,
      ]),
    })),
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
    ...quiet,
  );
  return element('section', { class: 'grid folds' }, heading, table, note);
}
