/** Reads a table back, a column at a time, so that memory holds one column and not the table. */
import { type FileHandle, open } from 'node:fs/promises';
import type { AsyncBuffer, FileMetaData, RowGroup } from 'hyparquet';
import { SimError } from '../../sim/error.ts';
import { readNumbers } from './parquetColumns.ts';
import { parquetMetadataAsync, parquetReadColumn } from './parquetLibrary.ts';

export interface ParquetTable {
  readonly rows: number;
  /** In the order of the file. */
  readonly names: readonly string[];
  /** What else the file says: units, labels and what its writer added. */
  readonly metadata: Readonly<Record<string, string>>;
  /** One column, NaN for null. Errors: SimError when there is none of this name, or it holds no numbers. */
  column(name: string): Promise<Float64Array>;
  close(): Promise<void>;
}

/** Errors: as the system gives them; SimError when it is no Parquet file. */
export async function openParquet(path: string): Promise<ParquetTable> {
  const file = await open(path, 'r');
  try {
    const buffer = await bufferOf(file);
    const metadata = await parquetMetadataAsync(buffer).catch((error) => {
      throw new SimError(path, 'this is not a whole Parquet file', 'Name another, or make it again', error);
    });
    return tableOf(path, file, buffer, metadata);
  } catch (error) {
    await file.close();
    throw error;
  }
}

function tableOf(path: string, file: FileHandle, buffer: AsyncBuffer, metadata: FileMetaData): ParquetTable {
  const rows = Number(metadata.num_rows);
  const names = metadata.schema.slice(1).map(({ name }) => name);
  return {
    rows,
    names,
    metadata: Object.fromEntries((metadata.key_value_metadata ?? []).map(({ key, value }) => [key, value ?? ''])),
    column: async (name) => {
      if (!names.includes(name))
        throw new SimError(path, `there is no column "${name}"`, `Its columns are ${names.join(', ')}`);
      const values = new Float64Array(rows);
      let at = 0;
      // A group at a time: the library would hold all of them, as objects.
      for (const group of metadata.row_groups) {
        const part = values.subarray(at, at + Number(group.num_rows));
        const own = metadata.created_by === 'perilag' ? numbersOf(group, name) : null;
        if (own !== null) readNumbers(await buffer.slice(own.from, own.to), part);
        else await readAny(path, buffer, { ...metadata, num_rows: group.num_rows, row_groups: [group] }, name, part);
        at += part.length;
      }
      return values;
    },
    close: () => file.close(),
  };
}

/** Where in the file a column of doubles stands that `writeNumbers` wrote; null for the numbers of the draws. */
function numbersOf(group: RowGroup, name: string): { readonly from: number; readonly to: number } | null {
  const { meta_data } = group.columns.find((column) => column.meta_data?.path_in_schema[0] === name)!;
  if (meta_data?.type !== 'DOUBLE') return null;
  const from = Number(meta_data.data_page_offset);
  return { from, to: from + Number(meta_data.total_compressed_size) };
}

/** A column of one row group, whatever wrote it. */
async function readAny(path: string, file: AsyncBuffer, metadata: FileMetaData, name: string, out: Float64Array) {
  const found = await parquetReadColumn({ file, metadata, columns: [name] });
  for (const [row, value] of found.entries()) out[row] = numberOf(value, path, name);
}

function numberOf(value: unknown, path: string, name: string): number {
  if (typeof value === 'number') return value;
  if (value === null || value === undefined) return NaN;
  if (typeof value === 'bigint') return Number(value);
  throw new SimError(path, `the column "${name}" does not hold numbers`, 'Name a column of numbers');
}

async function bufferOf(file: FileHandle): Promise<AsyncBuffer> {
  const { size } = await file.stat();
  return {
    byteLength: size,
    slice: async (start, end = size) => {
      const bytes = new Uint8Array(end - start);
      for (let at = 0; at < bytes.length; ) {
        const { bytesRead } = await file.read(bytes, at, bytes.length - at, start + at);
        if (bytesRead === 0) throw new Error('the file became shorter while it was read');
        at += bytesRead;
      }
      return bytes.buffer;
    },
  };
}
