/** Samples as Parquet. */
import { brotliDecompressSync, gunzipSync } from 'node:zlib';
import { parquetMetadataAsync, parquetRead } from 'hyparquet';
import { SimError } from '../sim/error.ts';
import { type RawColumns, requireColumns } from './samplesColumns.ts';

/** What Node unpacks beside the reader's own SNAPPY. */
const compressors = {
  GZIP: (input: Uint8Array) => new Uint8Array(gunzipSync(input)),
  BROTLI: (input: Uint8Array) => new Uint8Array(brotliDecompressSync(input)),
};

/** Errors: SimError that names file, row (from 1) and column: not readable, no such column, no number. */
export async function columnsOfParquet(bytes: Uint8Array, file: string, names: readonly string[]): Promise<RawColumns> {
  const buffer = bytes.slice().buffer as ArrayBuffer;
  const metadata = await readable(file, () => parquetMetadataAsync(buffer));
  const [root, ...rest] = metadata.schema;
  requireColumns(topNames(rest, root?.num_children ?? 0), names, file);
  const count = Number(metadata.num_rows);
  const columns = new Map(names.map((name) => [name, new Float64Array(count).fill(Number.NaN)]));
  const faults: { readonly row: number; readonly error: SimError }[] = []; // the reader passes on no error of ours
  const placeOf = (row: number) => `${file}: row ${row + 1}`;
  await readable(file, () =>
    parquetRead({
      file: buffer,
      metadata,
      columns: [...names],
      compressors,
      onChunk: ({ columnName, columnData, rowStart }) => {
        const column = columns.get(columnName)!;
        for (let i = 0; i < columnData.length && rowStart + i < count; i++) {
          const row = rowStart + i;
          const value = numberOf(columnData[i]);
          if (typeof value !== 'number') {
            faults.push({ row, error: new SimError(`${placeOf(row)}: ${columnName}`, value.what, mend) });
            return;
          }
          column[row] = value;
        }
      },
    }),
  );
  const [first] = faults.sort((a, b) => a.row - b.row);
  if (first) throw first.error;
  return { count, columns, placeOf };
}

interface Element {
  readonly name: string;
  readonly num_children?: number;
}

/** The schema lists a tree depth first: those of its first level. */
function topNames(elements: readonly Element[], count: number): string[] {
  const names: string[] = [];
  let at = 0;
  const skip = () => {
    const { num_children: children = 0 } = elements[at++]!;
    for (let i = 0; i < children; i++) skip();
  };
  while (names.length < count && at < elements.length) {
    names.push(elements[at]!.name);
    skip();
  }
  return names;
}

const mend = 'Give numbers, or leave the row out';

function numberOf(value: unknown): number | { readonly what: string } {
  if (typeof value === 'number') return value;
  if (typeof value === 'bigint') return Number(value);
  if (value === null || value === undefined) return { what: 'nothing is given' };
  return { what: `${typeof value} stands where a number should` };
}

async function readable<T>(file: string, read: () => Promise<T>): Promise<T> {
  try {
    return await read();
  } catch (error) {
    if (error instanceof SimError) throw error;
    const reason = error instanceof Error ? error.message : String(error);
    const mend = 'Write it again, packed with SNAPPY or GZIP or not at all';
    throw new SimError(file, `the Parquet file cannot be read (${reason})`, mend, error);
  }
}
