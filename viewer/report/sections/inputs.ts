/** Inputs: what sets the cases apart, what they share, and what follows from both. */
import {
  type DerivedRow,
  derivedRows,
  type InputCase,
  type InputCell,
  type InputRow,
  inputLists,
  useNote,
} from '../../words/inputRows.ts';
import { argumentOfPeriapsisNote } from '../../words/method.ts';
import { dataTable } from '../dataTable.ts';
import { type Child, element, userText } from '../element.ts';
import { caseSample } from '../lineSample.ts';

export function inputsSection(cases: readonly InputCase[]): HTMLElement {
  const { shared, different } = inputLists(cases);
  const derived = derivedRows(cases);
  return element(
    'section',
    { class: 'grid' },
    element('h2', {}, 'Inputs'),
    element(
      'div',
      { class: 'tables' },
      different.length > 0 ? differentTable(cases, different) : null,
      shared.length > 0 ? sharedTable(shared, cases) : null,
      ...derivedTables(cases, derived),
    ),
    element('aside', {}, element('p', {}, argumentOfPeriapsisNote)),
  );
}

function differentTable(cases: readonly InputCase[], rows: readonly InputRow[]): HTMLElement {
  return dataTable({
    caption: ['What sets the cases apart, as written.'],
    label: 'Inputs that differ between cases',
    corner: 'Input',
    columns: caseColumns(cases),
    rows: rows.map((row) => ({ head: inputHead(row), cells: row.cells.map(written) })),
  });
}

function sharedTable(rows: readonly InputRow[], cases: readonly InputCase[]): HTMLElement {
  const caseNames = cases.map(({ name }) => name);
  return dataTable({
    caption: [cases.length > 1 ? 'What all cases share.' : 'As written, and in SI.'],
    label: 'Inputs',
    corner: 'Input',
    columns: [{ head: ['As written'] }, { head: ['In SI'] }],
    rows: rows.map((row) => ({
      head: inputHead(row),
      cells: [[...marked(row.cells[0]!), tag(useNote(row, caseNames))], [row.cells[0]!.si ?? '']],
    })),
  });
}

/** One table for what all cases share, one for what differs. */
function derivedTables(cases: readonly InputCase[], rows: readonly DerivedRow[]): HTMLElement[] {
  const [same, apart] = [rows.filter(({ cells }) => cells.length === 1), rows.filter(({ cells }) => cells.length > 1)];
  const table = (chosen: readonly DerivedRow[], columns: { head: readonly Child[] }[], caption: string): HTMLElement =>
    dataTable({
      caption: [caption],
      label: caption,
      corner: 'Quantity',
      columns,
      rows: chosen.map(({ key, label, cells }) => ({
        head: keyed(label, key),
        cells: cells.map((cell) => [cell ?? '—']),
      })),
    });
  return [
    ...(same.length > 0 ? [table(same, [{ head: ['Value'] }], 'What follows from them.')] : []),
    ...(apart.length > 0 ? [table(apart, caseColumns(cases), 'What follows from them, case by case.')] : []),
  ];
}

function caseColumns(cases: readonly InputCase[]): { head: readonly Child[] }[] {
  return cases.map(({ name }, index) => ({ head: [caseSample(index), userText(name)] }));
}

function inputHead({ label, key }: InputRow): Child[] {
  return keyed(label, key);
}

function keyed(label: string, key: string): Child[] {
  return [userText(label), element('small', {}, element('code', {}, key))];
}

function written(cell: InputCell | null): Child[] {
  if (cell === null) return ['—'];
  const si = cell.si === null ? null : element('small', {}, cell.si);
  return [...marked(cell), tag(cell.used ? null : 'not used'), si];
}

function marked({ text, isDefault }: InputCell): Child[] {
  return [userText(text), tag(isDefault ? 'default' : null)];
}

function tag(words: string | null): Child {
  return words === null ? null : element('small', { class: 'tag' }, words);
}
