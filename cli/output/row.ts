/** A row of the terminal table: a quantity, and what it reads in each column. */
import type { Finding } from '../../sim/findings/finding.ts';
import { type Column, findingOf } from './columns.ts';
import type { GridRow } from './grid.ts';

/** A number as text; or why there is none; null where the model gives no such number. */
export type Cell = { readonly text: string } | { readonly reason: string } | null;

export interface Row extends GridRow {
  readonly cell: (column: Column) => Cell;
}

/** A finding that has a value. */
export type Defined = Finding & { readonly value: number };

/** A row that shows a finding. */
export function row(
  section: string,
  label: string,
  finding: string,
  text: (found: Defined, column: Column) => string,
  alone = label === '' ? section : label,
): Row {
  const cell = (column: Column): Cell => {
    const found = findingOf(column.state, finding);
    if (found === undefined) return null;
    if (found.value === null) return { reason: found.reason ?? 'not defined' };
    return { text: text({ ...found, value: found.value }, column) };
  };
  return { section, label, alone, cell };
}
