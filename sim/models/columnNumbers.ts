/** Which findings of a model are wanted, by their place. */
import { SimError } from '../error.ts';
import type { FindingColumn } from '../findings/finding.ts';

/** Column numbers of the names wanted, in their order; all of them without names. Errors: SimError for a name that is no finding. */
export function columnNumbers(columns: readonly FindingColumn[], only: readonly string[] | undefined): number[] {
  if (only === undefined) return columns.map((_, i) => i);
  return only.map((name) => {
    const found = columns.findIndex((column) => column.name === name);
    if (found >= 0) return found;
    const names = columns.map((column) => column.name).join(', ');
    throw new SimError('of', `“${name}” is no finding of this model`, `Choose from ${names}`);
  });
}
