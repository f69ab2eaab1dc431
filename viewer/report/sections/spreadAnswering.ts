/** The answer of a spread first, then what stands against it. */
import type { SpreadReport } from '../../../sim/studies/spread/spreadReport.ts';
import { keptUnits } from '../../words/number.ts';
import { failureText, spreadAnswer } from '../../words/spreadAnswer.ts';
import { element, userText } from '../element.ts';
import { caseSample } from '../lineSample.ts';
import { cautionNotices, notice } from './answering.ts';

export function spreadAnswering(report: SpreadReport): HTMLElement {
  const { lead, details } = spreadAnswer(report);
  const list = details.map(({ caseIndex, name, text }) =>
    element('li', {}, caseSample(caseIndex), element('p', {}, element('b', {}, userText(name), ':'), ` ${text}`)),
  );
  const failures = failureText(report);
  return element(
    'section',
    { class: 'answer', 'aria-label': 'Answer' },
    element('p', { class: 'lead' }, lead),
    list.length > 0 ? element('ul', { class: 'details' }, ...list) : null,
    failures === null ? null : notice('Caution', null, failures),
    ...cautionNotices(report.cases.map(({ name, warnings }) => ({ name, warnings: warnings.map(keptUnits) }))),
    ...cautionNotices(
      report.cases.map(({ name, notes }) => ({ name, warnings: notes.map(keptUnits) })),
      'Note',
    ),
  );
}
