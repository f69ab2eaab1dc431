/** The answer of a trace first, then what stands against it. */
import type { TraceReport } from '../../../sim/studies/traceReport.ts';
import { traceAnswer } from '../../words/traceAnswer.ts';
import { element, userText } from '../element.ts';
import { caseSample } from '../lineSample.ts';
import { cautionNotices } from './answering.ts';

export function traceAnswering(trace: TraceReport): HTMLElement {
  const { lead, details } = traceAnswer(trace);
  const list = details.map(({ caseIndex, name, text }) =>
    element('li', {}, caseSample(caseIndex), element('p', {}, element('b', {}, userText(name), ':'), ` ${text}`)),
  );
  return element(
    'section',
    { class: 'answer', 'aria-label': 'Answer' },
    element('p', { class: 'lead' }, lead),
    list.length > 0 ? element('ul', { class: 'details' }, ...list) : null,
    ...cautionNotices(trace.cases),
  );
}
