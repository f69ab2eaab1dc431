/** The answer of a grid first, then what stands against it. */
import type { GridReport } from '../../../sim/studies/grid/gridReport.ts';
import { failures, gridAnswer } from '../../words/gridAnswer.ts';
import { element, userText } from '../element.ts';
import { caseSample } from '../lineSample.ts';
import { cautionNotices, notice } from './answering.ts';

export function gridAnswering(report: GridReport): HTMLElement {
  const { lead, details } = gridAnswer(report);
  const list = details.map(({ caseIndex, name, text }) =>
    element('li', {}, caseSample(caseIndex), element('p', {}, element('b', {}, userText(name), ':'), ` ${text}`)),
  );
  const notes = [...new Set([...report.cases.flatMap((one) => one.notes), ...report.notes])];
  return element(
    'section',
    { class: 'answer', 'aria-label': 'Answer' },
    element('p', { class: 'lead' }, lead),
    list.length > 0 ? element('ul', { class: 'details' }, ...list) : null,
    ...failures(report).map(({ name, text }) => notice('Not computed', name, text)),
    ...cautionNotices(report.cases),
    ...notes.map((text) => notice('Note', null, text)),
  );
}
