/** Every finding, to read and to copy. */
import type { RunResult } from '../../../sim/run.ts';
import type { Column } from '../../words/columns.ts';
import { latexTable } from '../../words/latexTable.ts';
import {
  type NumberCell,
  type NumbersTable,
  numbersCsv,
  numbersTable,
  numbersText,
  numberText,
  rowText,
} from '../../words/numbersTable.ts';
import { columnHead } from '../columnHead.ts';
import { copyText } from '../copyText.ts';
import { type Child, element, userText } from '../element.ts';
import { groupedTable } from '../groupedTable.ts';

export function numbersSection(result: RunResult, columns: readonly Column[]): HTMLElement {
  const table = numbersTable(columns);
  const folded = element('details', {}, element('summary', {}, 'Every finding'), everyFinding(table));
  openInPrint(folded);
  return element(
    'section',
    { class: 'grid numbers' },
    element('h2', {}, 'Numbers'),
    element('div', {}, copying(table, result.program.version), folded),
    notes(table),
  );
}

function everyFinding(table: NumbersTable): HTMLElement {
  return groupedTable({
    caption: ['Every finding of every case, under the name that it has in summary.json.'],
    label: 'Every finding',
    corner: 'Finding',
    columns: table.columns.map((column) => ({ head: columnHead(column) })),
    groups: table.groups.map(({ title, rows }) => ({
      head: [title],
      rows: rows.map((row) => ({
        head: [userText(rowText(row)), element('small', {}, element('code', {}, row.name))],
        cells: row.cells.map(content),
      })),
    })),
  });
}

function content(cell: NumberCell): Child[] {
  return [numberText(cell), cell.reason === null ? null : element('small', { class: 'reason' }, cell.reason)];
}

/** Without unfolding the table. */
function copying(table: NumbersTable, version: string): HTMLElement {
  const said = element('span', { role: 'status' });
  const ways: readonly (readonly [label: string, name: string, text: () => string])[] = [
    ['Copy as text', 'numbers.txt', () => numbersText(table)],
    ['Copy as CSV', 'numbers.csv', () => numbersCsv(table)],
    ['Copy as LaTeX', 'numbers.tex', () => latexTable(table, version)],
  ];
  const buttons = ways.map(([label, name, text]) => {
    const button = element('button', { type: 'button' }, label);
    button.addEventListener('click', async () => {
      said.replaceChildren();
      const done = await copyText(text(), name);
      said.replaceChildren(done === 'copied' ? 'Copied' : `Saved as ${name}`);
    });
    return button;
  });
  return element('p', { class: 'tools' }, ...buttons, said);
}

function openInPrint(folded: HTMLDetailsElement): void {
  const open = (): void => {
    if (folded.isConnected) folded.open = true;
    else removeEventListener('beforeprint', open); // the section was made anew
  };
  addEventListener('beforeprint', open);
}

function notes({ groups }: NumbersTable): HTMLElement {
  const hasError = groups.some(({ rows }) =>
    rows.some(({ cells }) => cells.some(({ shown }) => (shown?.error ?? null) !== null)),
  );
  return element(
    'aside',
    {},
    element(
      'p',
      {},
      `± is the numerical error, shown where it reaches the last digit${hasError ? '' : '; here it nowhere does'}.`,
    ),
    element('p', {}, 'As CSV the numbers come in SI units, with every digit and every error.'),
  );
}
