/** A figure's data as a file: tidy, with units in the names of the columns. Pure. */
import { csvName, csvText } from '../words/csv.ts';
import type { Figure } from './figure.ts';
import { traceTable } from './traceTable.ts';

/** The figure's own table where its builder gives one, what its traces show where not. */
export function figureCsv(figure: Figure): string {
  const { columns, rows } = figure.table?.() ?? traceTable(figure);
  return csvText(distinct(columns.map(({ name, unit }) => csvName(name, unit))), rows);
}

/** A name that comes again is numbered: readers know columns by their names. */
function distinct(names: readonly string[]): string[] {
  return names.map((name, at) => {
    const before = names.slice(0, at).filter((other) => other === name).length;
    return before === 0 ? name : `${name}_${before + 1}`;
  });
}
