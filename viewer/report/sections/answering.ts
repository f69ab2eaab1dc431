/** The answer first, then what stands against it: accounts that were not kept, warnings, notes on the run. */
import type { RunResult } from '../../../sim/run.ts';
import { answer } from '../../words/answer.ts';
import { type Column, columnName } from '../../words/columns.ts';
import { element, userText } from '../element.ts';
import { columnSample } from '../lineSample.ts';

/** `moves` says what the reader has moved; null for a run as it was made. */
export function answering(result: RunResult, moves: string | null = null): HTMLElement {
  const { lead, details } = answer(result);
  const list = details.map(({ column, text }) => detail(column, text));
  return element(
    'section',
    { class: 'answer', 'aria-label': 'Answer' },
    moves === null ? null : element('p', { class: 'moves' }, element('b', {}, 'Moved by hand: '), userText(moves)),
    element('p', { class: 'lead' }, lead),
    list.length > 0 ? element('ul', { class: 'details' }, ...list) : null,
    ...notices(result),
  );
}

function detail(column: Column, text: string): HTMLElement {
  const name = element('b', {}, userText(columnName(column)), ':');
  return element('li', {}, columnSample(column), element('p', {}, name, ` ${text}`));
}

function notices(result: RunResult): HTMLElement[] {
  const failures = result.cases
    .filter(({ passed }) => !passed)
    .map(({ name }) =>
      notice('Not within tolerance', name, 'see the accounts below, and do not rely on these numbers.'),
    );
  const warnings = cautionNotices(result.cases);
  const notes = result.notes.map((text) => notice('Note', null, text));
  return [...failures, ...warnings, ...notes];
}

interface Warned {
  readonly name: string;
  readonly warnings: readonly string[];
}

export function cautionNotices(cases: readonly Warned[], kind = 'Caution'): HTMLElement[] {
  return grouped(cases).map(([text, names]) => notice(kind, names, text));
}

/** A warning that several cases share is said once; one that all share needs no names. */
function grouped(cases: readonly Warned[]): [string, string | null][] {
  const texts = [...new Set(cases.flatMap(({ warnings }) => warnings))];
  return texts.map((text) => {
    const names = cases.filter(({ warnings }) => warnings.includes(text)).map(({ name }) => name);
    return [text, names.length === cases.length ? null : names.join(', ')];
  });
}

export function notice(kind: string, names: string | null, text: string): HTMLElement {
  const who = names === null ? null : userText(names);
  return element('p', { class: 'notice' }, element('b', {}, kind), ' ', who, who ? ': ' : null, text);
}
