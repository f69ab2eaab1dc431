/** What a file of samples gives, whatever its format. */
import { SimError } from '../sim/error.ts';
import { nearest } from '../sim/quantity/index.ts';

/** Columns of numbers as they stand in a file, all of one length; `placeOf` names a row in a message. */
export interface RawColumns {
  readonly count: number;
  readonly columns: ReadonlyMap<string, Float64Array>;
  placeOf(row: number): string;
}

/** Errors: SimError for a column that the file does not have. */
export function requireColumns(known: readonly string[], names: readonly string[], file: string): void {
  for (const name of names) {
    if (known.includes(name)) continue;
    const near = nearest(name, known);
    const mend = near === null ? `Its columns are ${known.slice(0, 30).join(', ')}` : `Did you mean \`${near}\``;
    throw new SimError(file, `there is no column \`${name}\``, mend);
  }
}
