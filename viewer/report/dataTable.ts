/** A table with quantities down and cases across. On a phone each row's name stands above its numbers. */
import { type Child, element } from './element.ts';

export interface TableColumn {
  readonly head: readonly Child[];
}

export interface DataTable {
  readonly caption: readonly Child[];
  /** Names the table for those who cannot see it. */
  readonly label: string;
  readonly corner: string;
  readonly columns: readonly TableColumn[];
  readonly rows: readonly { readonly head: readonly Child[]; readonly cells: readonly (readonly Child[])[] }[];
}

/** Roles are written out: a phone's layout takes the table display away, and the table's meaning would go with it. */
export function dataTable({ caption, label, corner, columns, rows }: DataTable): HTMLElement {
  const head = element(
    'tr',
    { role: 'row' },
    element('th', { role: 'columnheader', scope: 'col', class: 'corner' }, corner),
    ...columns.map((column) => element('th', { role: 'columnheader', scope: 'col' }, ...column.head)),
  );
  const body = rows.map((row) =>
    element(
      'tr',
      { role: 'row' },
      element('th', { role: 'rowheader', scope: 'row' }, ...row.head),
      ...row.cells.map((cell) => element('td', { role: 'cell' }, ...cell)),
    ),
  );
  const table = element(
    'table',
    { role: 'table', 'aria-label': label, style: `--columns: ${columns.length}` },
    element('thead', { role: 'rowgroup' }, head),
    element('tbody', { role: 'rowgroup' }, ...body),
  );
  const scroller = element(
    'div',
    { class: 'scroll', role: 'region', tabindex: '0', 'aria-label': `${label}, scrollable` },
    table,
  );
  return element('figure', { class: 'table' }, element('figcaption', {}, ...caption), scroller);
}
