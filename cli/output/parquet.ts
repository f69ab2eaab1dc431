/**
 * A table of numbers as Parquet: the number of the draw, then columns of doubles, null where undefined. The same numbers
 * give the same bytes. Units and labels stand in the metadata of the file, as JSON under `units` and `labels`.
 */
import { closeSync, openSync, writeSync } from 'node:fs';
import type { RowGroup } from 'hyparquet';
import { drawElement, numberElement, writeDraws, writeNumbers } from './parquetColumns.ts';
import { ByteWriter, ParquetWriter } from './parquetLibrary.ts';

export interface ParquetColumn {
  readonly name: string;
  readonly unit: string;
  readonly label: string;
}

export interface ParquetFile {
  /** One more row group: draws from `from` on, their numbers column by column. On the disk when it returns. */
  append(from: number, columns: readonly Float64Array[]): void;
  /** Ends the file; `metadata` goes into it as it is. */
  finish(metadata: Readonly<Record<string, string>>): void;
  /** Lets go of the file, whether it is finished or not. */
  close(): void;
}

/** Begins a file at `path`. Errors: as the system gives them. */
export function createParquet(path: string, columns: readonly ParquetColumn[]): ParquetFile {
  const file = openSync(path, 'w');
  const bytes = new ByteWriter();
  const flush = () => {
    const written = new Uint8Array(bytes.buffer, 0, bytes.index);
    for (let at = 0; at < written.length; ) at += writeSync(file, written, at);
    bytes.index = 0;
  };
  const writer = new ParquetWriter({
    writer: Object.assign(bytes, { finish: flush }),
    schema: [
      { name: 'draws', num_children: columns.length + 1 },
      drawElement,
      ...columns.map(({ name }) => numberElement(name)),
    ],
    createdBy: 'perilag',
  });
  return {
    append: (from, data) => {
      const group = writeGroup(bytes, from, columns, data);
      writer.row_groups.push(group);
      writer.num_rows += group.num_rows;
      flush();
    },
    finish: (metadata) => {
      const told = { units: byName(columns, 'unit'), labels: byName(columns, 'label'), ...metadata };
      writer.kvMetadata = Object.entries(told).map(([key, value]) => ({ key, value }));
      void writer.finish(); // at once: ours writes without waiting
    },
    close: () => closeSync(file),
  };
}

function writeGroup(
  bytes: ByteWriter,
  from: number,
  columns: readonly ParquetColumn[],
  data: readonly Float64Array[],
): RowGroup {
  const start = bytes.offset;
  const rows = data[0]?.length ?? 0;
  const chunks = [
    writeDraws(bytes, from, rows),
    ...columns.map(({ name }, index) => writeNumbers(bytes, name, data[index]!)),
  ];
  return {
    columns: chunks,
    num_rows: BigInt(rows),
    total_byte_size: chunks.reduce((sum, { meta_data }) => sum + meta_data!.total_uncompressed_size, 0n),
    total_compressed_size: BigInt(bytes.offset - start),
  };
}

function byName(columns: readonly ParquetColumn[], key: 'unit' | 'label'): string {
  return JSON.stringify(Object.fromEntries(columns.map((column) => [column.name, column[key]])));
}
