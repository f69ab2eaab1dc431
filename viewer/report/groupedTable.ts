/** A table whose rows stand in groups, each under a line of its own. */
import { dataTable } from './dataTable.ts';
import { type Child, element } from './element.ts';

type TableRow = Parameters<typeof dataTable>[0]['rows'][number];

export interface GroupedTable extends Omit<Parameters<typeof dataTable>[0], 'rows'> {
  readonly groups: readonly { readonly head: readonly Child[]; readonly rows: readonly TableRow[] }[];
}

export function groupedTable({ groups, ...table }: GroupedTable): HTMLElement {
  const made = dataTable({ ...table, rows: groups.flatMap(({ rows }) => rows) });
  const rows = [...made.querySelectorAll('tbody tr')];
  let first = 0;
  for (const { head, rows: own } of groups) {
    const span = String(table.columns.length + 1);
    const cell = element('th', { role: 'rowheader', scope: 'colgroup', colspan: span, class: 'group' }, ...head);
    rows[first]?.before(element('tr', { role: 'row' }, cell));
    first += own.length;
  }
  return made;
}
